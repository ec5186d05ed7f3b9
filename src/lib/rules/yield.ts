/** How many capacitors out of a lot fall inside the windows, by formula and by drawing lots with a printed seed. */
import type { Interval } from '$lib/quantity/interval';
import { standardNormal } from '$lib/quantity/normal';

export type Spread = 'uniform' | 'normal';

/** A part bought to a tolerance. */
export interface Lot {
	/** [F] */
	readonly nominal: number;
	readonly toleranceMinus: number;
	readonly tolerancePlus: number;
	/** `normal` takes a third of the tolerance for one standard deviation, which no data sheet promises. */
	readonly spread: Spread;
}

export interface Share {
	/** Estimated or exact probability, 0 … 1. */
	readonly probability: number;
	/** 95 % interval of the estimate (Wilson). */
	readonly from: number;
	readonly to: number;
}

const below = ({ nominal, toleranceMinus, tolerancePlus, spread }: Lot, capacitance: number): number => {
	if (capacitance === Infinity) return 1;
	const reach = (capacitance < nominal ? toleranceMinus : tolerancePlus) * nominal;
	if (spread === 'normal')
		return reach === 0
			? Number(capacitance >= nominal)
			: standardNormal((3 * (capacitance - nominal)) / reach);
	const low = nominal * (1 - toleranceMinus);
	const width = nominal * (toleranceMinus + tolerancePlus);
	return width === 0 ? Number(capacitance >= nominal) : Math.min(1, Math.max(0, (capacitance - low) / width));
};

const inside = (windows: readonly Interval[], capacitance: number): boolean =>
	windows.some(({ from, to }) => capacitance >= from && capacitance <= to);

/**
 * Probability that a part of a lot lies in a window: uniform, the overlap over the width;
 * normal, Φ((b − Cn)/σ) − Φ((a − Cn)/σ) with σ = t·Cn/3.
 * @param lot nominal value [F], tolerance and spread
 * @param windows closed intervals that do not overlap [F]
 * @returns probability, 0 … 1
 * @example yieldOf({ nominal: 330e-9, toleranceMinus: 0.1, tolerancePlus: 0.1, spread: 'uniform' }, [{ from: 300e-9, to: 310e-9 }]) // 0.1515
 * @see textbook statistics; that a tolerance is three standard deviations is an assumption
 */
export function yieldOf(lot: Lot, windows: readonly Interval[]): number {
	if (lot.toleranceMinus + lot.tolerancePlus === 0) return Number(inside(windows, lot.nominal));
	return windows.reduce((sum, { from, to }) => sum + below(lot, to) - below(lot, from), 0);
}

const rotated = (x: number, by: number): number => ((x << by) | (x >>> (32 - by))) >>> 0;

/** xoshiro128** seeded by splitmix32; numbers in [0, 1). */
const generator = (seed: number): (() => number) => {
	let z = seed >>> 0;
	const state = Array.from({ length: 4 }, () => {
		z = (z + 0x9e3779b9) >>> 0;
		let mixed = Math.imul(z ^ (z >>> 16), 0x21f0aaad);
		mixed = Math.imul(mixed ^ (mixed >>> 15), 0x735a2d97);
		return (mixed ^ (mixed >>> 15)) >>> 0;
	}) as [number, number, number, number];
	return () => {
		const result = Math.imul(rotated(Math.imul(state[1], 5), 7), 9) >>> 0;
		const shifted = state[1] << 9;
		state[2] ^= state[0];
		state[3] ^= state[1];
		state[1] ^= state[2];
		state[0] ^= state[3];
		state[2] ^= shifted;
		state[3] = rotated(state[3], 11);
		return result / 0x100000000;
	};
};

const drawn = ({ nominal, toleranceMinus, tolerancePlus, spread }: Lot, random: () => number): number => {
	if (spread === 'uniform')
		return nominal * (1 - toleranceMinus + random() * (toleranceMinus + tolerancePlus));
	const radius = Math.sqrt(-2 * Math.log(1 - random()));
	const deviation = radius * Math.cos(2 * Math.PI * random());
	return nominal * (1 + ((deviation < 0 ? toleranceMinus : tolerancePlus) * deviation) / 3);
};

const NORMAL_95 = 1.959963984540054;

/**
 * Wilson's 95 % interval of a share: (p + z²/2N ± z√(p(1−p)/N + z²/4N²)) / (1 + z²/N).
 * @param hits number that passed
 * @param count number drawn, > 0
 * @returns the share and its interval
 * @throws RangeError when count is not a whole number above 0
 * @example wilson(0, 100).to // 0.037
 * @see E. B. Wilson, Probable inference, the law of succession, and statistical inference (1927; recalled)
 */
export function wilson(hits: number, count: number): Share {
	if (!Number.isInteger(count) || count < 1)
		throw new RangeError(`count must be a whole number from 1, got ${count}`);
	const probability = hits / count;
	const square = NORMAL_95 ** 2;
	const centre = probability + square / (2 * count);
	const reach = NORMAL_95 * Math.sqrt((probability * (1 - probability)) / count + square / (4 * count ** 2));
	const scale = 1 + square / count;
	return {
		probability,
		from: hits === 0 ? 0 : (centre - reach) / scale,
		to: hits === count ? 1 : (centre + reach) / scale
	};
}

/**
 * Draws parts of a lot and counts those inside the windows; the same seed gives the same answer.
 * @param lot nominal value [F], tolerance and spread
 * @param windows closed intervals [F]
 * @param draw number of parts and seed of the generator (xoshiro128**, whole number)
 * @returns share inside with its 95 % interval
 * @throws RangeError when count is not a whole number above 0
 * @example simulateYield(lot, [{ from: 280e-9, to: 360e-9 }], { count: 100000, seed: 1 }).probability // near 1
 * @see Blackman and Vigna, Scrambled linear pseudorandom number generators (generator recalled); Box and Muller (1958) for the normal spread
 */
export function simulateYield(
	lot: Lot,
	windows: readonly Interval[],
	draw: { readonly count: number; readonly seed: number }
): Share {
	const random = generator(draw.seed);
	let hits = 0;
	for (let index = 0; index < draw.count; index++) if (inside(windows, drawn(lot, random))) hits++;
	return wilson(hits, draw.count);
}
