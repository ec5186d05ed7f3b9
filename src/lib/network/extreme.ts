/**
 * The worst place of a line-side capacitor in a range of frequency and source inductance. Both what it gains and what
 * it carries are ratios |a + jXb|²/|c + jXd|² in the source's reactance X, so that the least over X is exact and only
 * the frequency is searched.
 */
import type { Complex } from './complex';
import { measuredBetween } from './curve';
import { capacitorImpedance, type CapacitorPart } from './filter';
import type { Ladder, LadderSample } from './ladder';
import { goldenMinimum, signChange } from './search';

/** n0 + 2·n1·X + n2·X² over d0 + 2·d1·X + d2·X². */
export interface Ratio {
	readonly n0: number;
	readonly n1: number;
	readonly n2: number;
	readonly d0: number;
	readonly d1: number;
	readonly d2: number;
}

/** Which ratio is sought at a sample, for a capacitor of the given impedance. */
export type Objective = (sample: LadderSample, capacitor: Complex) => Ratio;

export interface Least {
	/** Least value of the ratio. */
	readonly square: number;
	readonly frequency: number;
	/** Reactance of the source there [Ω]. */
	readonly reactance: number;
}

/** Spread of the ratio at which a search ends: 0.00004 dB. */
const SPREAD = 1e-5;

const valueAt = ({ n0, n1, n2, d0, d1, d2 }: Ratio, x: number): number => {
	const value = Math.max(0, n0 + x * (2 * n1 + x * n2)) / Math.max(0, d0 + x * (2 * d1 + x * d2));
	// 0/0 is a short-circuited source on a short-circuited filter, where a capacitor changes nothing.
	return Number.isNaN(value) ? 1 : value;
};

/** The better of two reactances; one outside the range is never better. */
const better = (
	ratio: Ratio,
	best: number,
	x: number,
	{ reactanceFrom, reactanceTo }: LadderSample
): number => (x > reactanceFrom && x <= reactanceTo && valueAt(ratio, x) < valueAt(ratio, best) ? x : best);

/** Reactance in the sample's range where the ratio is least: an end, or where its derivative, a quadratic, is 0. */
const leastReactance = (ratio: Ratio, sample: LadderSample): number => {
	const { reactanceFrom, reactanceTo } = sample;
	if (reactanceFrom === reactanceTo) return reactanceFrom;
	const { n0, n1, n2, d0, d1, d2 } = ratio;
	const a = n2 * d1 - n1 * d2;
	const b = n2 * d0 - n0 * d2;
	const c = n1 * d0 - n0 * d1;
	const best = better(ratio, reactanceFrom, reactanceTo, sample);
	const root = b * b - 4 * a * c;
	if (!(root >= 0)) return best;
	const q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(root)) / 2;
	return better(ratio, better(ratio, best, q / a, sample), c / q, sample);
};

const susceptance = ({ re, im }: Complex): number => -im / (re * re + im * im);

/** Above its self-resonance a capacitor is an inductor: both sides of it are looked at. */
const ownResonances = ({ esl = 0, capacitance, curve }: CapacitorPart, { from, to }: Ladder): number[] => {
	if (curve) return measuredBetween(curve, from, to);
	if (esl === 0) return [];
	const at = 1 / (2 * Math.PI * Math.sqrt(esl * capacitance));
	return at > from && at < to ? [at * (1 - 1e-9), at * (1 + 1e-9)] : [];
};

const withOwn = (of: Ladder, choice: CapacitorPart): readonly LadderSample[] => {
	const own = ownResonances(choice, of);
	if (own.length === 0) return of.samples;
	return [...of.samples, ...own.map(of.at)].sort((a, b) => a.frequency - b.frequency);
};

/** Frequencies between neighbours at which the node resonates with Cx, at either end of the source's reactance. */
const resonances = (of: Ladder, choice: CapacitorPart, samples: readonly LadderSample[]): number[] => {
	const found: number[] = [];
	const offFrom = (sample: LadderSample): number =>
		sample.susceptanceFrom + susceptance(capacitorImpedance(choice, sample.frequency));
	const offTo = (sample: LadderSample): number =>
		sample.susceptanceTo + susceptance(capacitorImpedance(choice, sample.frequency));
	let before: LadderSample | null = null;
	let [wasFrom, wasTo] = [false, false];
	for (const sample of samples) {
		const own = susceptance(capacitorImpedance(choice, sample.frequency));
		const isFrom = sample.susceptanceFrom + own > 0;
		const isTo = sample.susceptanceTo + own > 0;
		if (before && wasFrom !== isFrom)
			found.push(signChange((f) => offFrom(of.at(f)), before.frequency, sample.frequency));
		if (before && of.inductive && wasTo !== isTo)
			found.push(signChange((f) => offTo(of.at(f)), before.frequency, sample.frequency));
		before = sample;
		[wasFrom, wasTo] = [isFrom, isTo];
	}
	return found;
};

/**
 * The least of all, after a golden section in every valley not far above the least seen. The ends need none: the grid
 * has a neighbour so close to them that a slope at an end shows.
 */
const refined = (seen: readonly Least[], least: Least, evaluate: (f: number) => Least): Least => {
	let best = least;
	for (let index = 1; index < seen.length - 1; index += 1) {
		const [left, here, right] = [seen[index - 1], seen[index], seen[index + 1]];
		if (!left || !here || !right || here.square > 2 * least.square) continue;
		if (here.square > left.square || here.square > right.square) continue;
		const square = (f: number): number => evaluate(f).square;
		const at = evaluate(goldenMinimum(square, left.frequency, right.frequency, SPREAD));
		if (at.square < best.square) best = at;
	}
	return best;
};

/**
 * Least value of a ratio over a ladder's frequencies and source reactances.
 * @param of the ladder
 * @param choice the line-side capacitor
 * @param objective the ratio
 * @returns least value, where it lies [Hz], and the reactance of the source there [Ω]
 * @throws OutsideCurveError where the capacitor's curve was not measured
 * @example // gain of 48.70 nF at 145 kHz: square 0.0598 (−12.23 dB)
 * leastRatio(ladder(filter, source, range), { capacitance: 48.7e-9 }, gainRatio)
 * @see quotient of two quadratics; golden section over the frequency
 */
export function leastRatio(of: Ladder, choice: CapacitorPart, objective: Objective): Least {
	const evaluate = (sample: LadderSample): Least => {
		const ratio = objective(sample, capacitorImpedance(choice, sample.frequency));
		const reactance = leastReactance(ratio, sample);
		return { square: valueAt(ratio, reactance), frequency: sample.frequency, reactance };
	};
	const samples = withOwn(of, choice);
	const seen = samples.map(evaluate);
	if (samples.length > 1) {
		const dips = resonances(of, choice, samples);
		for (const f of dips) seen.push(evaluate(of.at(f)));
		if (dips.length > 0) seen.sort((a, b) => a.frequency - b.frequency);
	}
	let least: Least = { square: Infinity, frequency: of.from, reactance: 0 };
	for (const entry of seen) if (entry.square <= least.square) least = entry;
	return refined(seen, least, (f) => evaluate(of.at(f)));
}
