/** The source current after a voltage step into the whole filter with Cx, by the natural modes of the network. */
import { goldenMinimum } from '$lib/network/search';
import type { CapacitorPart, Filter } from '$lib/network/filter';
import { productOf, readAt, rootsOf, sumOf, type Polynomial } from './polynomial';

/** Step V through Rs and Ls into Cx, with L and C behind, all capacitors empty. */
export interface SwitchOn {
	/** [V] */
	readonly voltage: number;
	/** Rs [Ω] */
	readonly resistance: number;
	/** Ls [H] */
	readonly inductance: number;
	readonly filter: Filter;
	readonly choice: CapacitorPart;
}

/** One mode: amplitude · e^((decay + j·turn)·t), of which the real part counts. */
interface Mode {
	readonly re: number;
	readonly im: number;
	/** [1/s], not above 0 but for rounding */
	readonly decay: number;
	/** [rad/s] */
	readonly turn: number;
}

/** Admittance s·N/D of C with its damping branch. */
const shuntBranch = ({ capacitor, damping }: Filter): { n: Polynomial; d: Polynomial } => {
	const own = [1, capacitor.capacitance * (capacitor.esr ?? 0)];
	if (damping === undefined) return { n: [capacitor.capacitance], d: own };
	const beside = [1, damping.capacitance * damping.resistance];
	return {
		n: sumOf(productOf([capacitor.capacitance], beside), productOf([damping.capacitance], own)),
		d: productOf(own, beside)
	};
};

/** Source current over V: N(s)/D(s). */
const response = ({ filter, choice, resistance, inductance }: SwitchOn): { n: Polynomial; d: Polynomial } => {
	const shunt = shuntBranch(filter);
	const coil = [filter.inductor.resistance ?? 0, filter.inductor.inductance];
	const branch = sumOf(productOf(productOf([0, 1], coil), shunt.n), shunt.d);
	const own = [1, choice.capacitance * (choice.esr ?? 0)];
	const n = sumOf(productOf([choice.capacitance], branch), productOf(shunt.n, own));
	const loop = productOf(productOf([0, 1], [resistance, inductance]), n);
	return { n, d: sumOf(loop, productOf(own, branch)) };
};

const trimmed = (polynomial: Polynomial): Polynomial => {
	const highest = polynomial.findLastIndex((value) => value !== 0);
	return polynomial.slice(0, highest + 1);
};

/** A missing power, as in a lossless network, is put in too small to matter, since the roots need every one. */
const filled = (polynomial: Polynomial): number[] =>
	polynomial.map((value, power) => {
		if (value !== 0) return value;
		const [before, after] = [polynomial[power - 1] ?? 1, polynomial[power + 1] ?? 1];
		return 1e-13 * Math.sqrt(Math.abs(before * after));
	});

const modesOf = (circuit: SwitchOn): Mode[] => {
	const { n, d } = response(circuit);
	const denominator = filled(trimmed(d));
	return rootsOf(denominator).map((root) => {
		const above = readAt(n, root);
		const { slopeRe, slopeIm } = readAt(denominator, root);
		const size = slopeRe * slopeRe + slopeIm * slopeIm;
		return {
			re: (circuit.voltage * (above.re * slopeRe + above.im * slopeIm)) / size,
			im: (circuit.voltage * (above.im * slopeRe - above.re * slopeIm)) / size,
			decay: Math.min(0, root.re),
			turn: root.im
		};
	});
};

const currentAt = (modes: readonly Mode[], time: number): number =>
	modes.reduce((sum, { re, im, decay, turn }) => {
		const envelope = Math.exp(decay * time);
		return sum + envelope * (re * Math.cos(turn * time) - im * Math.sin(turn * time));
	}, 0);

const envelopeAt = (modes: readonly Mode[], time: number): number =>
	modes.reduce((sum, { re, im, decay }) => sum + Math.hypot(re, im) * Math.exp(decay * time), 0);

const STEPS_PER_TURN = 24;
const MOST_STEPS = 8_000;

/** An oscillation this much faster than the strongest mode counts with its envelope: at most 0.006 % too much. */
const RIPPLE_RATIO = 300;

const strengthOf = ({ re, im }: Mode): number => Math.hypot(re, im);

const isRippleOf =
	(strongest: Mode) =>
	({ decay, turn }: Mode): boolean =>
		Math.abs(turn) > Math.abs(decay) &&
		Math.abs(turn) > RIPPLE_RATIO * Math.hypot(strongest.decay, strongest.turn);

/** A mode that has died away needs no short steps any more. */
const stepAt = (modes: readonly Mode[], time: number, highest: number): number => {
	const alive = modes.filter((mode) => strengthOf(mode) * Math.exp(mode.decay * time) > 1e-4 * highest);
	const fastest = alive.reduce((most, { decay, turn }) => Math.max(most, Math.hypot(decay, turn)), 0);
	return (2 * Math.PI) / (STEPS_PER_TURN * fastest);
};

/**
 * Works out the peak of the source current after the step: exact modes, the peak sought in time until the envelope
 * has fallen under it.
 * @param circuit step and network; self-inductance of the capacitors and capacitance across L are left out
 * @returns peak current [A]
 * @example switchOnPeak({ voltage: 325.27, resistance: 0.4, inductance: 1e-4, … }) // 61.81 A with 470 nF, 33 µH, 4.7 µF
 * Source: partial fractions of the network's response; agrees with circuit simulation.
 */
export function switchOnPeak(circuit: SwitchOn): number {
	if (circuit.inductance === 0 && (circuit.choice.esr ?? 0) === 0)
		return circuit.voltage / circuit.resistance;
	const modes = modesOf(circuit);
	const strongest = modes.reduce((most, mode) => (strengthOf(mode) > strengthOf(most) ? mode : most));
	const isRipple = isRippleOf(strongest);
	const slow = modes.filter((mode) => !isRipple(mode));
	const ripple = modes.filter(isRipple);
	const crestAt = (time: number): number => currentAt(slow, time) + envelopeAt(ripple, time);
	let highest = 0;
	let [time, at, width] = [0, 0, 0];
	for (let count = 0; count < MOST_STEPS; count += 1) {
		const step = stepAt(slow, time, highest);
		time += step;
		const crest = crestAt(time);
		if (crest > highest) [highest, at, width] = [crest, time, step];
		if (!Number.isFinite(step) || envelopeAt(modes, time) <= highest) break;
	}
	const found = goldenMinimum((moment) => -crestAt(moment), Math.max(0, at - width), at + width, 1e-13);
	return Math.max(highest, crestAt(found));
}
