/** Values of capacitance as the sheet prints them: edges rounded to the safe side, ranges under one unit. */
import { formatQuantity } from '$lib/quantity/format';
import type { Quantity } from '$lib/quantity/unit';

export type DecimalMark = '.' | ',';

/** Where a value lies: the lower edge of a window rounds up, its upper edge down. */
export type Safe = 'up' | 'down' | 'nearest';

const NO_BREAK_SPACE = '\u00a0';
const EDGE_DIGITS = 4;
const RANGE_DIGITS = 3;
const RATIO_MOST = 1000;

/** 396.0 says no more than 396 where four digits are the printed accuracy. */
const trim = (text: string): string => text.replace(/([.,]\d*?)0+(?=\D|$)/, '$1').replace(/[.,](?=\D|$)/, '');

/**
 * Writes a computed value in at most four digits, trailing zeros dropped.
 * @param value finite value [SI base unit]
 * @param round direction, to the safe side
 * @param mark decimal mark
 * @param quantity capacitance unless it says otherwise
 * @returns e.g. '252.6 nF'
 * @example formatEdge(2.5255e-7, 'up', '.') // '252.6 nF'
 */
export function formatEdge(
	value: number,
	round: Safe,
	mark: DecimalMark,
	quantity: Quantity = 'capacitance'
): string {
	return trim(formatQuantity(value, quantity, { digits: EDGE_DIGITS, round, decimalMark: mark }));
}

/**
 * Writes the upper end of a forbidden range in three digits, rounded outward.
 * @param value finite value, > 0 [F]
 * @param mark decimal mark
 * @returns e.g. '70.2 nF'
 * @example shortEdge(7.017e-8, '.') // '70.2 nF'
 */
export function shortEdge(value: number, mark: DecimalMark): string {
	return trim(formatQuantity(value, 'capacitance', { digits: RANGE_DIGITS, round: 'up', decimalMark: mark }));
}

/**
 * Joins two written values, with the unit once where both share it.
 * @param from lower value as written
 * @param to upper value as written
 * @returns e.g. '252.6 … 396 nF'
 * @example joinRange('4.64 nF', '97.9 nF') // '4.64 … 97.9 nF'
 */
export function joinRange(from: string, to: string): string {
	const [number = from, unit = ''] = from.split(NO_BREAK_SPACE);
	const joined = unit === to.split(NO_BREAK_SPACE)[1] ? number : from;
	return from === to ? to : `${joined}${NO_BREAK_SPACE}… ${to}`;
}

/**
 * Writes a forbidden range as short as it goes: three digits, rounded outward, the lower end in the upper end's unit
 * where that leaves it at least two of them.
 * @param from lower end, > 0 [F]
 * @param to upper end, finite [F]
 * @param mark decimal mark
 * @returns e.g. '0.19 … 4.46 µF'
 * @example shortRange(1.903e-7, 4.453e-6, '.') // '0.19 … 4.46 µF'
 */
export function shortRange(from: number, to: number, mark: DecimalMark): string {
	const options = { digits: RANGE_DIGITS, decimalMark: mark } as const;
	const high = trim(formatQuantity(to, 'capacitance', { ...options, round: 'up' }));
	const low = trim(formatQuantity(from, 'capacitance', { ...options, round: 'down' }));
	const [, unit = ''] = high.split(NO_BREAK_SPACE);
	const ratio = to / from;
	if (low.endsWith(`${NO_BREAK_SPACE}${unit}`) || ratio > RATIO_MOST) return joinRange(low, high);
	// The upper value's own number fixes what one of its units is.
	const scaled = Number((high.split(NO_BREAK_SPACE)[0] ?? '1').replace(',', '.')) / to;
	const parts = Math.floor(from * scaled * 100 + 1e-9) / 100;
	return parts < 0.1 ? joinRange(low, high) : `${trim(fixed(parts, 2, mark))}${NO_BREAK_SPACE}… ${high}`;
}

/**
 * Writes a number with a fixed count of decimals, a true minus and the layout's decimal mark.
 * @param value finite number
 * @param decimals digits after the mark
 * @param mark decimal mark
 * @param sign whether a positive value carries its sign too
 * @returns e.g. '−13.7'
 * @example fixed(-13.66, 1, ',') // '−13,7'
 */
export function fixed(value: number, decimals: number, mark: DecimalMark, sign = false): string {
	const digits = Math.abs(value).toFixed(decimals);
	const zero = Number(digits) === 0;
	const lead = zero ? '' : value < 0 ? '\u2212' : sign ? '+' : '';
	return `${lead}${digits.replace('.', mark)}`;
}
