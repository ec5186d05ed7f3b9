/**
 * All worst capacitances C0 = −Im(Y_p)/ω of a box of tolerances and ranges. At one frequency the extremes over L, C
 * and Ls are exact: each is a quotient of quadratics. Only the frequency is searched.
 */
import type { Interval } from '$lib/quantity/interval';
import { add, magnitude, multiply, reciprocal, type Complex } from './complex';
import { filterImpedance, inductorImpedance, shuntImpedance, type Filter } from './filter';
import { frequencyGrid } from './grid';
import { extremeImaginary } from './moebius';
import { goldenMinimum } from './search';
import { sourceImpedance, type SourceModel } from './source';

/** A filter whose L and C may lie anywhere in their intervals; a part that is a curve has none. */
export interface FilterBox {
	readonly filter: Filter;
	/** [H] */
	readonly inductance: Interval;
	/** [F] */
	readonly capacitance: Interval;
}

/** Beyond this multiple of 1/(ω²L) a lossless branch is at its pole. */
const POLE = 1e7;

/** Spread of C0, relative, at which the search over frequency ends. */
const SPREAD = 1e-10;

const MOST_ROUNDS = 12;

const ONE: Complex = { re: 1, im: 0 };
const NONE: Complex = { re: 0, im: 0 };

const TURN = 2 * Math.PI;

const filterWith = ({ filter }: FilterBox, inductance: number, capacitance: number): Filter => ({
	...filter,
	inductor: { ...filter.inductor, inductance },
	capacitor: { ...filter.capacitor, capacitance }
});

const branchSusceptance = (filter: Filter, frequency: number): number =>
	-reciprocal(filterImpedance(filter, frequency)).im;

/** −Im(1/Z_s) at its greatest (sign 1) or least (−1) over the source's inductance [S]. */
const sourceSusceptance = (source: SourceModel, frequency: number, sign: 1 | -1): number => {
	if (source.kind !== 'impedance') return -reciprocal(sourceImpedance(source, frequency)).im;
	const { resistance, inductanceMin, inductanceMax } = source;
	const [from, to] = [TURN * frequency * inductanceMin, TURN * frequency * inductanceMax];
	const at = (x: number): number => (x === 0 && resistance === 0 ? Infinity : x / (resistance ** 2 + x ** 2));
	if (sign > 0) return at(Math.min(Math.max(resistance, from), to));
	return Math.min(at(from), at(to));
};

/** L or C where −Im of the filter's admittance is extreme, the other one held. */
interface Turning {
	readonly inductance: (capacitance: number) => number;
	readonly capacitance: (inductance: number) => number;
}

const turnings = (box: FilterBox, frequency: number, sign: 1 | -1): Turning => {
	const omega = TURN * frequency;
	const { inductor, capacitor, damping } = box.filter;
	const across = omega * (inductor.parallelCapacitance ?? 0);
	const loss = inductor.resistance ?? 0;
	const own: Complex = { re: capacitor.esr ?? 0, im: omega * (capacitor.esl ?? 0) };
	const beside = damping
		? reciprocal({ re: damping.resistance, im: -1 / (omega * damping.capacitance) })
		: NONE;
	return {
		// With x = ωL: Z_L = (R + jx)/D, D = 1 + jωC_par(R + jx), so that Y = D/(R + jx + Z_C·D).
		inductance: (capacitance) => {
			if (inductor.curve || box.inductance.from === box.inductance.to) return box.inductance.from;
			const shunt = shuntImpedance(filterWith(box, box.inductance.from, capacitance), frequency);
			const p0 = { re: 1, im: across * loss };
			const p1 = { re: -across, im: 0 };
			const q0 = { re: loss + shunt.re - shunt.im * p0.im, im: shunt.re * p0.im + shunt.im };
			const q1 = { re: shunt.re * p1.re, im: 1 + shunt.im * p1.re };
			const range = { from: omega * box.inductance.from, to: omega * box.inductance.to };
			return extremeImaginary({ p0, p1, q0, q1 }, range, sign > 0 ? -1 : 1) / omega;
		},
		// With s = 1/(ωC): Z_C = N/(1 + Y_d·N), N = ESR + jωESL − js, so that Y = (1 + Y_d·N)/(N + Z_L·(1 + Y_d·N)).
		capacitance: (inductance) => {
			if (capacitor.curve || box.capacitance.from === box.capacitance.to) return box.capacitance.from;
			const series = inductorImpedance({ ...inductor, inductance }, frequency);
			const p0 = add(ONE, multiply(beside, own));
			const p1 = multiply(beside, { re: 0, im: -1 });
			const q0 = add(own, multiply(series, p0));
			const q1 = add({ re: 0, im: -1 }, multiply(series, p1));
			const range = { from: 1 / (omega * box.capacitance.to), to: 1 / (omega * box.capacitance.from) };
			return 1 / (omega * extremeImaginary({ p0, p1, q0, q1 }, range, sign > 0 ? -1 : 1));
		}
	};
};

/**
 * Greatest (sign 1) or least (−1) −Im(1/(Z_L + Z_C)) over L and C at one frequency: from every corner over L, then over
 * C, until neither moves.
 */
const lossySusceptance = (box: FilterBox, frequency: number, sign: 1 | -1): number => {
	const turning = turnings(box, frequency, sign);
	let best = -Infinity;
	for (const start of new Set([box.capacitance.from, box.capacitance.to])) {
		let capacitance = start;
		let last = -Infinity;
		for (let round = 0; round < MOST_ROUNDS; round += 1) {
			const inductance = turning.inductance(capacitance);
			capacitance = turning.capacitance(inductance);
			const value = sign * branchSusceptance(filterWith(box, inductance, capacitance), frequency);
			const done = !(value > last + 1e-13 * Math.abs(last));
			last = Math.max(last, value);
			if (done) break;
		}
		best = Math.max(best, last);
	}
	return sign * best;
};

const isLossless = ({ inductor, capacitor, damping }: Filter): boolean =>
	!damping &&
	!inductor.curve &&
	!capacitor.curve &&
	(inductor.resistance ?? 0) === 0 &&
	(capacitor.esr ?? 0) === 0;

/**
 * C0 at one frequency between its least and greatest. Without losses the reactance of the branch runs upwards from
 * L_min, C_min to L_max, C_max, and C0 downwards with it, from plus to minus infinity once per turn: the greatest lies
 * in the turn `first`, the least in the turn `last`.
 */
interface Slice {
	readonly frequency: number;
	readonly least: number;
	readonly greatest: number;
	readonly first: number;
	readonly last: number;
}

/** Extremes of C0 at one frequency [F]. */
type Edge = (frequency: number, sign: 1 | -1) => number;

const edgeOf = (box: FilterBox, source: SourceModel): Edge => {
	const { inductance, capacitance, filter } = box;
	const lossless = isLossless(filter);
	const small = filterWith(box, inductance.from, capacitance.from);
	const large = filterWith(box, inductance.to, capacitance.to);
	return (frequency, sign) => {
		const branch = lossless
			? branchSusceptance(sign > 0 ? small : large, frequency)
			: lossySusceptance(box, frequency, sign);
		return (branch + sourceSusceptance(source, frequency, sign)) / (TURN * frequency);
	};
};

/** The frequencies to look at, each with its turns. */
const slices = (box: FilterBox, source: SourceModel, range: Interval): Slice[] => {
	const { inductance, capacitance, filter } = box;
	const small = filterWith(box, inductance.from, capacitance.from);
	const large = filterWith(box, inductance.to, capacitance.to);
	const grid = new Set([...frequencyGrid(small, source, range), ...frequencyGrid(large, source, range)]);
	const edge = edgeOf(box, source);
	const lossless = isLossless(filter);
	const across = filter.inductor.parallelCapacitance ?? 0;
	let [first, last] = [0, 0];
	let before: readonly [boolean, boolean] | null = null;
	// Exactly on a lossless pole there is no value; its two sides are on the grid.
	const onPole = (f: number): boolean =>
		[small, large].some((each) => magnitude(filterImpedance(each, f)) === 0);
	return [...grid]
		.filter((f) => !onPole(f))
		.sort((a, b) => a - b)
		.map((frequency): Slice => {
			const seen = { frequency, least: edge(frequency, -1), greatest: edge(frequency, 1) };
			if (!lossless) return { ...seen, first, last };
			const positive = [small, large].map((each) => filterImpedance(each, frequency).im > 0);
			const now: readonly [boolean, boolean] = [positive[0] ?? false, positive[1] ?? false];
			if (before) {
				first += Number(now[0] && !before[0]);
				last += Number(now[1] && !before[1]);
			} else {
				const square = (TURN * frequency) ** 2 * across;
				const open = square * inductance.from < 1 && square * inductance.to > 1;
				last = open ? Number(!now[0]) + Number(now[1]) : Number(!now[0] && now[1]);
			}
			before = now;
			return { ...seen, first, last };
		});
};

/** Greatest (sign 1) or least (−1) C0 among neighbouring slices, searched between them where it turns. */
const extremeOf = (members: readonly Slice[], edge: Edge, sign: 1 | -1): number => {
	const values = members.map((slice) => sign * (sign > 0 ? slice.greatest : slice.least));
	const best = values.reduce((top, value, index) => (value > (values[top] ?? -Infinity) ? index : top), 0);
	const top = values[best] ?? -Infinity;
	const [left, right] = [members[best - 1], members[best + 1]];
	if (!left || !right || !Number.isFinite(top)) return sign * top;
	const value = (f: number): number => -sign * edge(f, sign);
	const at = goldenMinimum(value, left.frequency, right.frequency, SPREAD);
	return sign * Math.max(top, sign * edge(at, sign));
};

/** C0 of one turn; it reaches plus infinity where a slice enters the turn from the one before, minus where it leaves. */
const turnInterval = (all: readonly Slice[], turn: number, edge: Edge, pole: number): Interval => {
	const enters = all.some((slice) => slice.first < turn && turn <= slice.last);
	const leaves = all.some((slice) => slice.first <= turn && turn < slice.last);
	const top = extremeOf(
		all.filter((slice) => slice.first === turn),
		edge,
		1
	);
	const bottom = extremeOf(
		all.filter((slice) => slice.last === turn),
		edge,
		-1
	);
	return { from: leaves || bottom < -pole ? -Infinity : bottom, to: enters || top > pole ? Infinity : top };
};

const merged = (intervals: readonly Interval[]): Interval[] => {
	const result: Interval[] = [];
	for (const { from, to } of [...intervals].sort((a, b) => a.from - b.from)) {
		const last = result[result.length - 1];
		if (last && from <= last.to) result[result.length - 1] = { from: last.from, to: Math.max(last.to, to) };
		else result.push({ from, to });
	}
	return result;
};

/**
 * All positive worst capacitances over a box of frequency, L, C and source inductance: the image of
 * C0 = −Im(Y_p)/ω. With losses it is one interval; where a lossless L and C resonate in series inside the box, C0 runs
 * through infinity and may leave a gap.
 * @param box the filter with its intervals of L [H] and C [F]
 * @param source the source; an `impedance` source over its whole range of inductance
 * @param range frequencies from ≤ to [Hz], > 0
 * @returns intervals of C0 [F] in order, 0 and Infinity possible; none where nothing resonates
 * @throws RangeError when the range is empty or not positive; OutsideCurveError where a curve was not measured
 * @example // 220 µH ±15 %, 2.2 µF ±10 %, two 50 µH networks, 126 to 138 kHz: 18.40 nF to 24.27 nF
 * exactWorstRange(box, { kind: 'amn-50uH-5ohm', networks: 2 }, { from: 126e3, to: 138e3 })
 * @see extremes over L, C and Ls in closed form; checked by dense sampling in its tests
 */
export function exactWorstRange(box: FilterBox, source: SourceModel, range: Interval): Interval[] {
	const all = slices(box, source, range);
	const edge = edgeOf(box, source);
	const pole = isLossless(box.filter) ? POLE / ((TURN * range.from) ** 2 * box.inductance.from) : Infinity;
	const turns = new Set(all.flatMap((slice) => [slice.first, slice.last]));
	const found = [...turns].map((turn) => turnInterval(all, turn, edge, pole));
	return merged(found.filter(({ to }) => to > 0).map(({ from, to }) => ({ from: Math.max(0, from), to })));
}
