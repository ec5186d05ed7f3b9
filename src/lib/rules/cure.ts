/** The smallest change of one value that opens a nominal window again. */
import type { Design, Rule } from '$lib/design/design';
import type { Cure, Finding } from './finding';
import { knobsOf, type Knob } from './knob';
import { findingOf } from './table';
import { closesWindows, closingBands, leavesNominal } from './windows';
import { worded } from './wording';

/** Ratios tried in turn, as natural logarithms: one per cent up to a factor of a thousand. */
const REACH = [0.01, 0.02, 0.05, 0.1, 0.2, 0.35, 0.5, 0.75, 1, 1.4, 1.9, 2.5, 3.2, 4, 5.2, 6.9];

const CURE_DIGITS = 3;

/** Tells whether a changed design has a nominal window. */
type Trial = (changed: Design) => boolean;

/** Rules that are worked out by a scan: asked last, and only so many times. */
const isScanned = (rule: Rule): boolean =>
	['minimum-benefit', 'ripple-current', 'input-stability'].includes(rule.kind) ||
	(rule.kind === 'inrush-current' && rule.includeCapacitor);

const MOST_SCANS = 80;

/** What is left of the scans, shared by all that is tried for one cure. */
interface Budget {
	scans: number;
}

/** Asks again only what the change can reach, the quick rules first: once they leave nothing, the rest cannot help. */
const trialOf = (findings: readonly Finding[], knob: Knob, budget: Budget): Trial => {
	const asked = findings.filter(closesWindows);
	return (changed) => {
		const reached = changed.rules.filter((rule) => knob.reaches(rule));
		const kept = asked.filter((finding) => !reached.some(({ id }) => id === finding.rule));
		const again = reached.filter(({ id }) => asked.some((finding) => finding.rule === id));
		const quick = again.filter((rule) => !isScanned(rule)).map((rule) => findingOf(changed, rule));
		const soFar = closingBands([...kept, ...quick]);
		const scanned = again.filter(isScanned);
		if (!leavesNominal(soFar, changed.choice)) return false;
		if (scanned.length === 0) return true;
		budget.scans -= scanned.length;
		if (budget.scans < 0) return false;
		const slow = scanned.map((rule) => findingOf(changed, rule));
		return leavesNominal([...soFar, ...closingBands(slow)], changed.choice);
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

/** Bisects between a value that leaves none and one that opens a window, as far as the rounding needs it. */
const edge = (opens: (value: number) => boolean, direction: Knob['direction'], bounds: Bounds): number => {
	let { shut, open } = bounds;
	while (
		roundOutward(open, direction) !== roundOutward(shut, direction) &&
		Math.abs(open / shut - 1) > 1e-7
	) {
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
const turned = (design: Design, trial: Trial, knob: Knob): number | null => {
	const opens = (value: number): boolean => trial(knob.turn(design, value));
	const bounds = bracket(opens, knob);
	if (bounds === null) return null;
	const exact = edge(opens, knob.direction, bounds);
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
	const budget = { scans: MOST_SCANS };
	for (const tier of ['part', 'factor'] as const) {
		const found = knobs
			.filter((knob) => knob.tier === tier)
			.flatMap((knob): Turned[] => {
				const value = turned(design, trialOf(findings, knob, budget), knob);
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
