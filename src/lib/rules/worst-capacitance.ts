/** The range of the worst capacitance over a box of frequency, L, C and source inductance, by the exact network. */
import { add, divide, reciprocal, type Complex } from '$lib/network/complex';
import { inductorImpedance, shuntImpedance, type Filter } from '$lib/network/filter';
import { frequencyGrid } from '$lib/network/grid';
import { goldenMinimum } from '$lib/network/search';
import { sourceImpedance, type SourceModel } from '$lib/network/source';
import type { Interval } from '$lib/quantity/interval';
import { capacitorArc, inductorArc, turnOf, type Arc } from './arc';

/** The other parts with their ranges; a measured curve stands for its part as it is. */
export interface Box {
	readonly filter: Filter;
	/** L [H] */
	readonly inductance: Interval;
	/** C [F] */
	readonly capacitance: Interval;
	readonly source: SourceModel;
	/** [Hz] */
	readonly frequency: Interval;
}

/** Losses under this share of ωL are taken to be this large, so that a lossless resonance stays a number. */
const LEAST_LOSS = 1e-9;

/** A susceptance this many times 1/(ωL) is a resonance without losses: no end. */
const BEYOND = 1e7;

const SPREAD = 1e-9;

const MOST_ROUNDS = 20;

const withValues = ({ filter }: Box, inductance: number, capacitance: number): Filter => ({
	...filter,
	inductor: { ...filter.inductor, inductance },
	capacitor: { ...filter.capacitor, capacitance }
});

const lossOf = ({ filter }: Box, reactance: number): number =>
	Math.max(filter.inductor.resistance ?? 0, LEAST_LOSS * reactance);

/** −Im(1/Z_s) over the source's range of inductance [S]. */
const sourceSusceptance = (model: SourceModel, frequency: number, sign: 1 | -1): number => {
	const omega = 2 * Math.PI * frequency;
	if (model.kind !== 'impedance') return -reciprocal(sourceImpedance(model, frequency)).im;
	const { resistance, inductanceMin: low, inductanceMax: high } = model;
	const at = (inductance: number): number => {
		if (inductance === 0) return resistance === 0 ? Infinity : 0;
		return (omega * inductance) / (resistance ** 2 + (omega * inductance) ** 2);
	};
	const peak = resistance / omega;
	const values = [at(low), at(high), ...(peak > low && peak < high ? [at(peak)] : [])];
	return sign > 0 ? Math.max(...values) : Math.min(...values);
};

interface Corner {
	/** ωL [Ω] */
	readonly reactance: number;
	/** 1/(ωC) [Ω] */
	readonly elastance: number;
}

/** The branch over one of the two reactances with the other held, and what the held one is. */
interface Branch {
	readonly overInductor: (elastance: number) => Arc | null;
	readonly overCapacitor: (reactance: number) => Arc | null;
	/** −Im of the admittance [S]. */
	readonly susceptance: (corner: Corner) => number;
}

const branchOf = (box: Box, frequency: number): Branch => {
	const omega = 2 * Math.PI * frequency;
	const { inductor, capacitor, damping } = box.filter;
	const across = omega * (inductor.parallelCapacitance ?? 0);
	const own: Complex = { re: capacitor.esr ?? 0, im: omega * (capacitor.esl ?? 0) };
	const beside = damping ? { re: damping.resistance, im: -1 / (omega * damping.capacitance) } : null;
	const rest = (elastance: number): Complex =>
		shuntImpedance(
			{ ...box.filter, capacitor: { ...capacitor, capacitance: 1 / (omega * elastance) } },
			frequency
		);
	const series = (reactance: number): Complex => {
		if (inductor.curve) return inductorImpedance(inductor, frequency);
		const resistance = lossOf(box, reactance);
		return divide({ re: resistance, im: reactance }, { re: 1 - across * reactance, im: across * resistance });
	};
	return {
		overInductor: (elastance) =>
			inductor.curve ? null : inductorArc(lossOf(box, omega * box.inductance.from), across, rest(elastance)),
		overCapacitor: (reactance) => (capacitor.curve ? null : capacitorArc(series(reactance), own, beside)),
		susceptance: ({ reactance, elastance }) => -reciprocal(add(series(reactance), rest(elastance))).im
	};
};

/** Goes to the turning point over L, then over C, until neither moves: each step is exact. */
const climb = (box: Box, frequency: number, start: Corner, sign: 1 | -1): number => {
	const omega = 2 * Math.PI * frequency;
	const branch = branchOf(box, frequency);
	const reactances = { from: omega * box.inductance.from, to: omega * box.inductance.to };
	const elastances = { from: 1 / (omega * box.capacitance.to), to: 1 / (omega * box.capacitance.from) };
	let { reactance, elastance } = start;
	let best = branch.susceptance(start);
	for (let round = 0; round < MOST_ROUNDS; round += 1) {
		const overL = branch.overInductor(elastance);
		if (overL) reactance = turnOf(overL, reactances, sign === 1 ? -1 : 1);
		const overC = branch.overCapacitor(reactance);
		if (overC) elastance = turnOf(overC, elastances, sign === 1 ? -1 : 1);
		const value = branch.susceptance({ reactance, elastance });
		if (!(sign * (value - best) > 1e-15 * Math.abs(best)))
			return sign > 0 ? Math.max(best, value) : Math.min(best, value);
		best = value;
	}
	return best;
};

/** −Im(1/(Z_L + Z_C)) at its largest or smallest over L and C [S]. */
const branchSusceptance = (box: Box, frequency: number, sign: 1 | -1): number => {
	const omega = 2 * Math.PI * frequency;
	const low = { reactance: omega * box.inductance.from, elastance: 1 / (omega * box.capacitance.from) };
	const high = { reactance: omega * box.inductance.to, elastance: 1 / (omega * box.capacitance.to) };
	const value =
		sign * Math.max(sign * climb(box, frequency, low, sign), sign * climb(box, frequency, high, sign));
	return Math.abs(value) * low.reactance > BEYOND ? sign * Infinity : value;
};

const capacitanceAt = (box: Box, frequency: number, sign: 1 | -1): number =>
	(branchSusceptance(box, frequency, sign) + sourceSusceptance(box.source, frequency, sign)) /
	(2 * Math.PI * frequency);

/** With a plain series branch above its resonance the susceptance falls with f, L and C: the corners are the ends. */
const isPlain = ({ filter, inductance, capacitance, source, frequency }: Box): boolean => {
	const { inductor, capacitor, damping } = filter;
	const special = [damping, inductor.curve, inductor.parallelCapacitance, capacitor.curve];
	if (special.some((part) => part !== undefined) || source.kind === 'measured') return false;
	const omega = 2 * Math.PI * frequency.from;
	const reactance = omega * (inductance.from + (capacitor.esl ?? 0)) - 1 / (omega * capacitance.from);
	return reactance > (inductor.resistance ?? 0) + (capacitor.esr ?? 0);
};

const plainCapacitance = (box: Box, end: 'from' | 'to', sign: 1 | -1): number => {
	const { filter, inductance, capacitance } = box;
	const frequency = box.frequency[end];
	const omega = 2 * Math.PI * frequency;
	const resistance = (filter.inductor.resistance ?? 0) + (filter.capacitor.esr ?? 0);
	const own = omega * (inductance[end] + (filter.capacitor.esl ?? 0)) - 1 / (omega * capacitance[end]);
	return (own / (resistance ** 2 + own ** 2) + sourceSusceptance(box.source, frequency, sign)) / omega;
};

/** The extreme over frequency: at the points where anything can turn, and between the best one's neighbours. */
const extreme = (box: Box, grid: readonly number[], sign: 1 | -1): number => {
	const values = grid.map((frequency) => sign * capacitanceAt(box, frequency, sign));
	const best = values.reduce((top, value, index) => (value > (values[top] ?? -Infinity) ? index : top), 0);
	const [from, to] = [grid[best - 1] ?? grid[best], grid[best + 1] ?? grid[best]];
	const top = values[best] ?? NaN;
	if (from === undefined || to === undefined || from === to || !Number.isFinite(top)) return sign * top;
	const at = goldenMinimum((frequency) => -sign * capacitanceAt(box, frequency, sign), from, to, SPREAD);
	return sign * Math.max(top, sign * capacitanceAt(box, at, sign));
};

const gridOf = (box: Box): number[] => {
	const corners = [
		withValues(box, box.inductance.from, box.capacitance.from),
		withValues(box, box.inductance.to, box.capacitance.to)
	];
	const points = corners.flatMap((filter) => frequencyGrid(filter, box.source, box.frequency));
	return [...new Set(points)].sort((a, b) => a - b);
};

/**
 * Finds the range of C0 = −Im(Y_p)/ω over the box; what of it is negative resonates with no capacitance.
 * A resonance without losses is taken as the limit of small ones, so that the range stays in one piece.
 * @param box the other parts with their ranges
 * @returns range of C0 [F], from 0 where some of the box is negative; null where no capacitance resonates
 * @throws OutsideCurveError where a curve was not measured
 * @example worstRange(box) // 18.6 … 24.5 nF for 220 µH ±15 % and two 50 µH networks at 126–138 kHz
 * Source: nodal analysis; extremes over L, C and the source exactly, over frequency by search.
 */
export function worstRange(box: Box): Interval | null {
	const plain = isPlain(box);
	const grid = plain ? [] : gridOf(box);
	const to = plain ? plainCapacitance(box, 'from', 1) : extreme(box, grid, 1);
	if (!(to > 0)) return null;
	const from = plain ? plainCapacitance(box, 'to', -1) : extreme(box, grid, -1);
	return { from: Math.max(0, from), to };
}

/**
 * Lists capacitances that resonate at the given lines with nominal parts: the ends and the middle of each range.
 * @param filter the other parts
 * @param source the source
 * @param lines frequency ranges [Hz]
 * @returns capacitances [F]
 * @example nominalResonances(filter, source, [{ from: 145e3, to: 145e3 }]) // [4.87e-8, …]
 * Source: nodal analysis.
 */
export function nominalResonances(filter: Filter, source: SourceModel, lines: readonly Interval[]): number[] {
	const exactly = (value: number): Interval => ({ from: value, to: value });
	return lines.flatMap((frequency) => {
		const { inductor, capacitor } = filter;
		const worst = worstRange({
			filter,
			inductance: exactly(inductor.inductance),
			capacitance: exactly(capacitor.capacitance),
			source,
			frequency
		});
		return worst === null
			? []
			: [worst.from, Math.sqrt(worst.from * worst.to), worst.to].filter((value) => value > 0);
	});
}
