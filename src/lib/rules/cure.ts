/** The smallest change of one value that opens a nominal window again. */
import type { Design } from '$lib/design/design';
import type { Cure, Finding } from './finding';
import { knobsOf, type Knob } from './knob';
import { findingOf } from './table';
import { closesWindows, closingBands, leavesNominal } from './windows';
import { worded } from './wording';

/** Ratios tried in turn, as natural logarithms: one per cent up to a factor of a thousand. */
const REACH = [0.01, 0.02, 0.05, 0.1, 0.2, 0.35, 0.5, 0.75, 1, 1.4, 1.9, 2.5, 3.2, 4, 5.2, 6.9];

const CURE_DIGITS = 3;

/** Evaluates a changed design, asking again only the rules that the change can reach and that close windows. */
type Trial = (changed: Design) => boolean;

const trialOf = (findings: readonly Finding[], knob: Knob): Trial => {
	const asked = findings.filter(closesWindows);
	return (changed) => {
		const answers = asked.map((finding) => {
			const rule = changed.rules.find(({ id }) => id === finding.rule);
			return rule !== undefined && knob.reaches(rule) ? findingOf(changed, rule) : finding;
		});
		return leavesNominal(closingBands(answers), changed.choice);
	};
};

/**
 * Rounds away from where it was computed, to three significant digits.
 * @param value value, > 0 [any unit]
 * @param direction up or down
 * @returns rounded value [as `value`]
 * @example roundOutward(1.7154e-6, 'up') // 1.72e-6
 * Source: common practice.
 */
export function roundOutward(value: number, direction: 'up' | 'down'): number {
	const [mantissa = '', exponent = ''] = value.toExponential(CURE_DIGITS - 1).split('e');
	const nearest = Number(`${mantissa}e${exponent}`);
	const past = direction === 'up' ? nearest < value : nearest > value;
	return past ? neighbour(nearest, direction) : nearest;
}

const neighbour = (rounded: number, direction: 'up' | 'down'): number => {
	const [mantissa = '', exponent = ''] = rounded.toExponential(CURE_DIGITS - 1).split('e');
	const least = 10 ** (CURE_DIGITS - 1);
	const whole = Math.round(Number(mantissa) * least);
	const power = Number(exponent) - CURE_DIGITS + 1;
	if (direction === 'down' && whole === least)
		return Number(`${String(10 * least - 1)}e${String(power - 1)}`);
	return Number(`${String(whole + (direction === 'up' ? 1 : -1))}e${String(power)}`);
};

const within = (knob: Knob, value: number): boolean =>
	value >= (knob.least ?? 0) && value <= (knob.most ?? Infinity);

interface Bounds {
	readonly shut: number;
	readonly open: number;
}

/** Bisects between a value that leaves none and one that opens a window. */
const edge = (opens: (value: number) => boolean, bounds: Bounds): number => {
	let { shut, open } = bounds;
	while (Math.abs(open / shut - 1) > 1e-6) {
		const middle = Math.sqrt(open * shut);
		if (opens(middle)) open = middle;
		else shut = middle;
	}
	return open;
};

const bracket = (opens: (value: number) => boolean, knob: Knob): Bounds | null => {
	const sign = knob.direction === 'up' ? 1 : -1;
	let shut = knob.value;
	for (const reach of REACH) {
		const asked = knob.value * Math.exp(sign * reach);
		const tried = within(knob, asked) ? asked : sign < 0 ? (knob.least ?? 0) : (knob.most ?? Infinity);
		if (tried === shut) return null;
		if (opens(tried)) return { shut, open: tried };
		shut = tried;
	}
	return null;
};

/** The value rounded to the safe side, checked by evaluating the design with it. */
const turned = (design: Design, findings: readonly Finding[], knob: Knob): number | null => {
	const trial = trialOf(findings, knob);
	const opens = (value: number): boolean => trial(knob.turn(design, value));
	const bounds = bracket(opens, knob);
	if (bounds === null) return null;
	const exact = edge(opens, bounds);
	let value = roundOutward(exact, knob.direction);
	for (let step = 0; step < 3; step += 1) {
		if (within(knob, value) && opens(value)) return value;
		value = neighbour(value, knob.direction);
	}
	return null;
};

interface Turned {
	readonly knob: Knob;
	readonly value: number;
	readonly change: number;
}

const cureFrom = ({ knob, value }: Turned): Cure => {
	const relation = knob.direction === 'up' ? '≥' : '≤';
	const text = `${knob.symbol} ${relation} ${worded(value, knob.quantity)} would open a window`;
	return { text, pointer: knob.pointer, value };
};

/**
 * Finds the smallest change of one value that, evaluated again, opens a nominal window: parts of the filter
 * before factors and limits of design rules; limits of mandatory rules are never touched.
 * @param design the worksheet's design, without a nominal window
 * @param findings what its rules answered
 * @param rules ids of the rules in conflict
 * @returns the cure, rounded to the safe side; null where no single change cures
 * @example cureOf(chargerAuxiliaryFirstTry, findings, ['share', 'reactance'])?.text // 'C ≥ 1.72 µF would open a window'
 * Source: common practice.
 */
export function cureOf(design: Design, findings: readonly Finding[], rules: readonly string[]): Cure | null {
	const knobs = knobsOf(design, rules);
	for (const tier of ['part', 'factor'] as const) {
		const found = knobs
			.filter((knob) => knob.tier === tier)
			.flatMap((knob): Turned[] => {
				const value = turned(design, findings, knob);
				return value === null ? [] : [{ knob, value, change: Math.abs(Math.log(value / knob.value)) }];
			});
		const best = found.reduce<Turned | null>(
			(least, next) => (least === null || next.change < least.change ? next : least),
			null
		);
		if (best !== null) return cureFrom(best);
	}
	return null;
}
