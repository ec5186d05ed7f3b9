/** Open bands and closed windows on the positive axis, where 0 and Infinity are legal ends. */

/** An interval of a positive quantity; 0 and Infinity stand for no end. */
export interface Interval {
	readonly from: number;
	readonly to: number;
}

/** Open bands merged into one; each edge keeps the band that set it. */
export interface UnitedBand<T extends Interval> extends Interval {
	readonly fromBand: T;
	readonly toBand: T;
}

/** A closed remainder; each edge keeps the band that set it, or null where the axis itself ends. */
export interface Gap<T extends Interval> extends Interval {
	readonly fromBand: T | null;
	readonly toBand: T | null;
	/** A single point left between two bands that touch. */
	readonly degenerate: boolean;
}

/**
 * Tells whether two values are equal but for rounding: |a − b| ≤ rel · max(|a|, |b|).
 * @param a one value
 * @param b the other
 * @param rel relative tolerance
 * @returns true where they are equal; 0 equals only 0, and Infinity only Infinity
 * @example relativelyEqual(8e-9, 8.000000000000001e-9) // true
 * Source: common practice.
 */
export function relativelyEqual(a: number, b: number, rel = 1e-12): boolean {
	if (a === b) return true;
	if (!Number.isFinite(a) || !Number.isFinite(b)) return false;
	return Math.abs(a - b) <= rel * Math.max(Math.abs(a), Math.abs(b));
}

const assertInterval = ({ from, to }: Interval): void => {
	if (!(from >= 0) || Number.isNaN(to)) {
		throw new RangeError(`an interval needs 0 ≤ from and a number to, got ${String(from)} … ${String(to)}`);
	}
};

/** Ties count as not below, so that bands which meet within rounding leave their common point. */
const below = (a: number, b: number): boolean => a < b && !relativelyEqual(a, b);

/** The band with the lowest lower (or highest upper) edge; of equal ones the first in `order`. */
const edgeBand = <T extends Interval>(
	members: ReadonlySet<T>,
	order: readonly T[],
	end: 'from' | 'to'
): T | undefined =>
	order
		.filter((band) => members.has(band))
		.reduce<T | undefined>((best, band) => {
			if (best === undefined) return band;
			const better = end === 'from' ? below(band.from, best.from) : below(best.to, band.to);
			return better ? band : best;
		}, undefined);

/**
 * Merges open bands: (a, b) ∪ (c, d) = (min(a, c), max(b, d)) where they overlap; bands that only touch
 * stay apart, because their common point is in neither.
 * @param bands open bands, any order; one without width forbids nothing and is left out
 * @returns merged bands, rising, each with the bands that set its edges (of equal edges, the first given)
 * @throws RangeError when an end is negative or not a number
 * @example uniteOpen([{ from: 1, to: 3 }, { from: 2, to: 5 }]) // [{ from: 1, to: 5, … }]
 * Source: textbook set algebra.
 */
export function uniteOpen<T extends Interval>(bands: readonly T[]): UnitedBand<T>[] {
	bands.forEach(assertInterval);
	const rising = bands
		.filter((band) => below(band.from, band.to))
		.sort((a, b) => a.from - b.from || a.to - b.to);
	const groups: { to: number; members: Set<T> }[] = [];
	for (const band of rising) {
		const last = groups.at(-1);
		if (last !== undefined && below(band.from, last.to)) {
			last.members.add(band);
			last.to = Math.max(last.to, band.to);
		} else {
			groups.push({ to: band.to, members: new Set([band]) });
		}
	}
	return groups.flatMap(({ members }) => {
		const fromBand = edgeBand(members, bands, 'from');
		const toBand = edgeBand(members, bands, 'to');
		if (fromBand === undefined || toBand === undefined) return [];
		return [{ from: fromBand.from, to: toBand.to, fromBand, toBand }];
	});
}

/**
 * Lists what open bands leave of the axis (0, ∞): closed windows, and single points between bands that touch.
 * @param bands open bands, any order, merged or not
 * @returns windows, rising, each with the band that sets each edge; an end at 0 or Infinity has none
 * @throws RangeError when an end is negative or not a number
 * @example closedComplement([{ from: 0, to: 8 }, { from: 8, to: Infinity }]) // [{ from: 8, to: 8, degenerate: true, … }]
 * Source: textbook set algebra.
 */
export function closedComplement<T extends Interval>(bands: readonly T[]): Gap<T>[] {
	const gaps: Gap<T>[] = [];
	let from = 0;
	let fromBand: T | null = null;
	for (const band of uniteOpen(bands)) {
		if (fromBand !== null || band.from > 0) {
			const degenerate = !below(from, band.from);
			gaps.push({ from, to: degenerate ? from : band.from, fromBand, toBand: band.fromBand, degenerate });
		}
		from = band.to;
		fromBand = band.toBand;
	}
	if (from < Infinity) gaps.push({ from, to: Infinity, fromBand, toBand: null, degenerate: false });
	return gaps;
}

/**
 * Tells whether a value lies inside an open band: from < value < to, a tie counting as outside.
 * @param band open band [any unit]
 * @param value value, > 0 [as the band]
 * @returns true where the band forbids the value
 * @example insideOpen({ from: 1e-9, to: 8e-9 }, 8e-9) // false
 * Source: textbook set algebra.
 */
export function insideOpen(band: Interval, value: number): boolean {
	return below(band.from, value) && below(value, band.to);
}
