/** Values and ranges in the sentences of findings, warnings and explanations. */
import { formatQuantity } from '$lib/quantity/format';
import type { Quantity } from '$lib/quantity/unit';
import type { FormulaPart } from './finding';
import { COMPUTED_DIGITS, parts } from './formula';

/**
 * Writes a computed value with three digits.
 * @param value value [SI]
 * @param quantity what it is
 * @param round direction of rounding
 * @returns text
 * @example worded(2.5263e-7, 'capacitance', 'up') // '253 nF'
 * Source: common practice.
 */
export function worded(
	value: number,
	quantity: Quantity,
	round: 'nearest' | 'up' | 'down' = 'nearest'
): string {
	return formatQuantity(value, quantity, { digits: COMPUTED_DIGITS, round });
}

/**
 * Writes a value that was given, without trailing zeros, to four digits at most.
 * @param value value [SI]
 * @param quantity what it is
 * @returns text
 * @example plain(60, 'voltage') // '60 V'
 * Source: common practice.
 */
export function plain(value: number, quantity: Quantity): string {
	return formatQuantity(Number(value.toPrecision(4)), quantity);
}

/**
 * Writes a range with its unit once where both ends share it; one value where they agree.
 * @param from lower end, 0 for none [SI]
 * @param to upper end, Infinity for none [SI]
 * @param quantity what it is
 * @param write how each end is written: computed to three digits unless told otherwise
 * @returns text
 * @example wordedRange(126e3, 138e3, 'frequency', plain) // '126–138 kHz'
 * Source: common practice.
 */
export function wordedRange(
	from: number,
	to: number,
	quantity: Quantity,
	write: (value: number, quantity: Quantity) => string = worded
): string {
	if (from === 0) return to === Infinity ? 'any' : `up to ${write(to, quantity)}`;
	if (to === Infinity) return `from ${write(from, quantity)}`;
	const low = write(from, quantity);
	const high = write(to, quantity);
	if (low === high) return low;
	const [lowNumber, lowUnit] = low.split(/\s/u);
	const [, highUnit] = high.split(/\s/u);
	return lowUnit === highUnit && lowNumber !== undefined ? `${lowNumber}–${high}` : `${low} – ${high}`;
}

/**
 * Writes an open band of capacitance in words, rounded outward so that nothing forbidden reads as free.
 * @param band 0 and Infinity stand for no end [F]
 * @returns text
 * @example wordedBand({ from: 3.96e-7, to: Infinity }) // 'above 396 nF'
 * Source: common practice.
 */
export function wordedBand({ from, to }: { readonly from: number; readonly to: number }): string {
	if (from === 0 && to === Infinity) return 'every capacitance';
	if (from === 0) return `below ${worded(to, 'capacitance', 'up')}`;
	if (to === Infinity) return `above ${worded(from, 'capacitance', 'down')}`;
	return `from ${worded(from, 'capacitance', 'down')} to ${worded(to, 'capacitance', 'up')}`;
}

/**
 * Writes what bands forbid as the result of a formula.
 * @param bands open bands [F]
 * @returns parts
 * @example bandsParts([{ from: 3.96e-7, to: Infinity }]) // 'not above 396 nF'
 * Source: common practice.
 */
export function bandsParts(bands: readonly { readonly from: number; readonly to: number }[]): FormulaPart[] {
	if (bands.length === 0) return parts`no limit`;
	const shown = bands.slice(0, 2).map(wordedBand).join(', ');
	return parts`not ${bands.length > 2 ? `${shown}, and ${String(bands.length - 2)} more` : shown}`;
}
