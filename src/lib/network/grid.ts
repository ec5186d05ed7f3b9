/** Frequencies at which a network must be looked at so that no resonance of it is missed. */
import type { Interval } from '$lib/quantity/interval';
import type { Complex } from './complex';
import { measuredBetween, type ImpedanceCurve } from './curve';
import { filterImpedance, type Filter } from './filter';
import { signChange } from './search';
import type { SourceModel } from './source';

const LOG_STEP = 0.05;
const FEWEST_STEPS = 4;

/** Share of the range by which a second point stands beside each end, to show the slope there. */
const EDGE = 1e-4;

/** How far beside a lossless resonance its two sides are looked at, relative. */
const BESIDE = 1e-9;

const resonance = (inductance: number, capacitance: number): number =>
	1 / (2 * Math.PI * Math.sqrt(inductance * capacitance));

/** Corner estimates from the parts alone; 0 or Infinity where a part is absent. */
const estimates = ({ inductor, capacitor, damping }: Filter): number[] => {
	const { inductance, parallelCapacitance = 0 } = inductor;
	const { capacitance, esl = 0 } = capacitor;
	const beside = damping?.capacitance ?? 0;
	return [
		resonance(inductance, parallelCapacitance),
		resonance(inductance + esl, capacitance),
		resonance(inductance + esl, capacitance + beside),
		resonance(esl, capacitance),
		resonance(esl, (capacitance * beside) / (capacitance + beside)),
		resonance(esl, parallelCapacitance)
	];
};

const spaced = ({ from, to }: Interval): number[] => {
	const span = Math.log(to / from);
	const steps = Math.max(FEWEST_STEPS, Math.ceil(span / LOG_STEP));
	const inner = Array.from(
		{ length: steps - 1 },
		(_, index) => from * Math.exp((span * (index + 1)) / steps)
	);
	return [from, from * Math.exp(EDGE * span), ...inner, to * Math.exp(-EDGE * span), to];
};

const sorted = (values: readonly number[], { from, to }: Interval): number[] =>
	[...new Set(values)].filter((f) => f >= from && f <= to).sort((a, b) => a - b);

/** Where the reactance passes zero, and on both sides of it where it equals the resistance. */
const seriesResonances = (impedance: (f: number) => Complex, grid: readonly number[]): number[] => {
	const found: number[] = [];
	for (const share of [0, 1, -1]) {
		const off = (f: number) => {
			const { re, im } = impedance(f);
			return im + share * re;
		};
		grid.forEach((to, index) => {
			const from = grid[index - 1];
			if (from === undefined || off(from) > 0 === off(to) > 0) return;
			const at = signChange(off, from, to);
			found.push(at * (1 - BESIDE), at * (1 + BESIDE));
		});
	}
	return found;
};

const curvesOf = (filter: Filter, source: SourceModel): ImpedanceCurve[] =>
	[
		filter.inductor.curve,
		filter.capacitor.curve,
		source.kind === 'measured' ? source.curve : undefined
	].filter((curve) => curve !== undefined);

/**
 * Frequencies to look at in a range: evenly in log f, at measured points, and around every series resonance of the
 * filter (where its reactance is 0, +R and −R), so that between neighbours the node's susceptance has no pole.
 * @param filter the filter
 * @param source the source, for its measured points
 * @param range from ≤ to [Hz], > 0
 * @returns frequencies in order, both ends among them; one alone where from = to [Hz]
 * @throws RangeError when the range is empty or not positive; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF: 145 kHz alone
 * frequencyGrid(filter, source, { from: 145e3, to: 145e3 }) // [145000]
 * @see R. M. Foster, A reactance theorem, 1924 (title recalled): between its poles a lossless susceptance only rises
 */
export function frequencyGrid(filter: Filter, source: SourceModel, range: Interval): number[] {
	const { from, to } = range;
	if (!(from > 0) || !(to >= from))
		throw new RangeError(`a range needs 0 < from ≤ to, got ${from} to ${to} Hz`);
	if (from === to) return [from];
	const measured = curvesOf(filter, source).flatMap((curve) => measuredBetween(curve, from, to));
	const plain = sorted([...spaced(range), ...estimates(filter), ...measured], range);
	return sorted([...plain, ...seriesResonances((f) => filterImpedance(filter, f), plain)], range);
}
