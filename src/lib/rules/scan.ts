/** Forbidden bands of a quantity that need not rise or fall with Cx: scan, refine, find the edges. */
import type { Interval } from '$lib/quantity/interval';

/** The scan's ends; beyond them a band goes on to 0 or without end [F]. */
const SMALLEST = 1e-12;
const LARGEST = 0.1;

const COARSE_PER_DECADE = 5;
/** Cells in which the quantity may cross its limit are cut into this many: 40 points a decade. */
const FINE = 8;

const WIDTH = Math.LN10 / COARSE_PER_DECADE;

/** Points nearer than this to the one before are looked at once. */
const SAME = 1e-6;

/** A cell is left whole where both ends lie on one side of the limit, further from it than this … */
const CLEAR = 0.2;
/** … and than this many times the difference of its ends. */
const CALM = 3;

/** A place of the scan: ln C, and ln of the quantity over its limit, above 0 where it is forbidden. */
interface Place {
	readonly at: number;
	readonly excess: number;
}

const isQuiet = (left: Place, right: Place): boolean => {
	if (left.excess > 0 !== right.excess > 0) return false;
	const nearest = Math.min(Math.abs(left.excess), Math.abs(right.excess));
	return nearest > CLEAR + CALM * Math.abs(left.excess - right.excess);
};

/** Logarithms without bound would spoil the search for the edge. */
const bounded = (excess: number): number =>
	Math.max(-700, Math.min(700, Number.isNaN(excess) ? 700 : excess));

const coarsePlaces = (excess: (at: number) => number, extra: readonly number[]): Place[] => {
	const count = Math.round(Math.log10(LARGEST / SMALLEST)) * COARSE_PER_DECADE;
	const even = Array.from({ length: count + 1 }, (_, index) => SMALLEST * 10 ** (index / COARSE_PER_DECADE));
	const known = [...extra].sort((a, b) => a - b);
	// Between two neighbouring resonances there may be a way through that both ends hide.
	const middles = known.slice(1).map((value, index) => Math.sqrt(value * (known[index] ?? value)));
	const inside = [...known, ...middles].filter((value) => value > SMALLEST && value < LARGEST);
	const sorted = [...even, ...inside].sort((a, b) => a - b);
	const apart = sorted.filter((value, index) => !(value < (sorted[index - 1] ?? 0) * (1 + SAME)));
	return apart.map((value) => ({ at: Math.log(value), excess: excess(Math.log(value)) }));
};

const refined = (excess: (at: number) => number, coarse: readonly Place[]): Place[] =>
	coarse.flatMap((place, index) => {
		const left = coarse[index - 1];
		if (left === undefined || isQuiet(left, place)) return [place];
		const pieces = Math.max(2, Math.ceil((FINE * (place.at - left.at)) / WIDTH));
		const between = Array.from({ length: pieces - 1 }, (_, step) => {
			const at = left.at + ((place.at - left.at) * (step + 1)) / pieces;
			return { at, excess: excess(at) };
		});
		return [...between, place];
	});

/** Edges are found to this ratio of 1 + 10⁻¹¹, as logarithms of capacitance and of excess alike. */
const SPREAD = 1e-11;

const MOST_ROUNDS = 200;

/** False position with a halved weight for an end that stays, and bisection in every third round. */
const edgeBetween = (excess: (at: number) => number, left: Place, right: Place): number => {
	let [low, high] = [left, right];
	let [lowWeight, highWeight] = [1, 1];
	for (let round = 1; round < MOST_ROUNDS && high.at - low.at > SPREAD; round += 1) {
		const [below, above] = [Math.abs(low.excess) * lowWeight, Math.abs(high.excess) * highWeight];
		const share = round % 3 === 0 ? 0.5 : below / (below + above);
		const at = low.at + share * (high.at - low.at);
		const here = { at, excess: excess(at) };
		if (Math.abs(here.excess) < SPREAD) return at;
		if (here.excess > 0 === left.excess > 0) [low, lowWeight, highWeight] = [here, 1, highWeight / 2];
		else [high, lowWeight, highWeight] = [here, lowWeight / 2, 1];
	}
	return (low.at + high.at) / 2;
};

/**
 * Finds the capacitances at which a quantity exceeds its limit, from 1 pF to 100 mF with 40 points a decade wherever
 * it may cross, the edges found to the last digits; a band at an end of the scan goes on beyond it.
 * @param ratio the quantity over its limit at a capacitance [F]; forbidden above 1
 * @param extra capacitances that must not be passed over, such as resonances [F]
 * @returns open bands, rising [F]
 * @example scanBands((c) => c / 1e-6) // [{ from: 1e-6, to: Infinity }]
 * Source: common practice.
 */
export function scanBands(ratio: (capacitance: number) => number, extra: readonly number[] = []): Interval[] {
	const excess = (at: number): number => bounded(Math.log(ratio(Math.exp(at))));
	const places = refined(excess, coarsePlaces(excess, extra));
	const bands: Interval[] = [];
	let from = (places[0]?.excess ?? 0) > 0 ? 0 : null;
	places.forEach((place, index) => {
		const left = places[index - 1];
		if (left === undefined || left.excess > 0 === place.excess > 0) return;
		const edge = Math.exp(edgeBetween(excess, left, place));
		if (from === null) {
			from = edge;
		} else {
			bands.push({ from, to: edge });
			from = null;
		}
	});
	if (from !== null) bands.push({ from, to: Infinity });
	return bands;
}
