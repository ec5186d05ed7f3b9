/** The ranges of the worst capacitance over tolerances and ranges, by the exact network. */
import type { CapacitorPart, Filter, InductorPart } from '$lib/network/filter';
import { sourceImpedance, type SourceModel } from '$lib/network/source';
import { exactWorstRange, type FilterBox } from '$lib/network/worst-range';
import type { Interval } from '$lib/quantity/interval';
import { reciprocal } from '$lib/network/complex';

const TURN = 2 * Math.PI;

const isSeriesBranch = (inductor: InductorPart, capacitor: CapacitorPart, { damping }: Filter): boolean =>
	[damping, inductor.curve, inductor.parallelCapacitance, capacitor.curve].every(
		(part) => part === undefined
	);

/** Reactance of L and C in series [Ω]. */
const reactanceOf = ({ filter }: FilterBox, frequency: number, values: readonly [number, number]): number => {
	const [inductance, capacitance] = values;
	const omega = TURN * frequency;
	return omega * (inductance + (filter.capacitor.esl ?? 0)) - 1 / (omega * capacitance);
};

/** With a plain series branch above its resonance the susceptance falls with f, L and C: the corners are the ends. */
const isPlain = (box: FilterBox, source: SourceModel, range: Interval): boolean => {
	const { inductor, capacitor } = box.filter;
	if (source.kind === 'measured' || !isSeriesBranch(inductor, capacitor, box.filter)) return false;
	const lowest = reactanceOf(box, range.from, [box.inductance.from, box.capacitance.from]);
	return lowest > (inductor.resistance ?? 0) + (capacitor.esr ?? 0);
};

/** −Im(1/Z_s) at its greatest or least over the source's inductance [S]. */
const sourceSusceptance = (source: SourceModel, frequency: number, sign: 1 | -1): number => {
	if (source.kind !== 'impedance') return -reciprocal(sourceImpedance(source, frequency)).im;
	const { resistance, inductanceMin: low, inductanceMax: high } = source;
	const at = (inductance: number): number => {
		const reactance = TURN * frequency * inductance;
		return reactance === 0 && resistance === 0 ? Infinity : reactance / (resistance ** 2 + reactance ** 2);
	};
	if (sign < 0) return Math.min(at(low), at(high));
	return at(Math.min(Math.max(resistance / (TURN * frequency), low), high));
};

const plainCapacitance = (
	box: FilterBox,
	source: SourceModel,
	range: Interval,
	end: 'from' | 'to'
): number => {
	const { inductor, capacitor } = box.filter;
	const frequency = range[end];
	const resistance = (inductor.resistance ?? 0) + (capacitor.esr ?? 0);
	const reactance = reactanceOf(box, frequency, [box.inductance[end], box.capacitance[end]]);
	const own = reactance / (resistance ** 2 + reactance ** 2);
	return (own + sourceSusceptance(source, frequency, end === 'from' ? 1 : -1)) / (TURN * frequency);
};

/**
 * Finds the ranges of C0 = −Im(Y_p)/ω over L, C, source inductance and frequency: in closed form for a plain series
 * branch above its resonance, else by the network's search.
 * @param box the filter with its intervals of L [H] and C [F]
 * @param source the source
 * @param range frequencies [Hz]
 * @returns ranges of positive C0, rising [F]; none where nothing resonates
 * @throws OutsideCurveError where a curve was not measured
 * @example worstRanges(box, source, { from: 126e3, to: 138e3 })[0] // 18.6 … 24.5 nF for 220 µH ±15 %, two 50 µH networks
 * Source: nodal analysis.
 */
export function worstRanges(box: FilterBox, source: SourceModel, range: Interval): Interval[] {
	if (!isPlain(box, source, range)) return exactWorstRange(box, source, range);
	return [
		{ from: plainCapacitance(box, source, range, 'to'), to: plainCapacitance(box, source, range, 'from') }
	];
}

/**
 * Lists capacitances that resonate at the given lines with these very parts: the middle of each range, and the ends of a wide one.
 * @param filter the other parts
 * @param source the source
 * @param lines frequency ranges [Hz]
 * @returns capacitances [F]
 * @example resonantCapacitances(filter, source, [{ from: 145e3, to: 145e3 }]) // [4.87e-8, …]
 * Source: nodal analysis.
 */
export function resonantCapacitances(
	filter: Filter,
	source: SourceModel,
	lines: readonly Interval[]
): number[] {
	const { inductance } = filter.inductor;
	const { capacitance } = filter.capacitor;
	const box = {
		filter,
		inductance: { from: inductance, to: inductance },
		capacitance: { from: capacitance, to: capacitance }
	};
	return lines
		.flatMap((line) => worstRanges(box, source, line))
		.flatMap(({ from, to }) => (to < 2 * from ? [Math.sqrt(from * to)] : [from, Math.sqrt(from * to), to]))
		.filter((value) => value > 0 && value < Infinity);
}
