/** What the arrow keys make of a value: the next preferred one, or ten times as much. */
import { formatQuantity } from '$lib/quantity/format';
import { parseQuantity } from '$lib/quantity/parse';
import { stepPreferred, type SeriesName } from '$lib/quantity/series';
import type { Quantity } from '$lib/quantity/unit';

const TOLERANCES = [0, 0.01, 0.02, 0.05, 0.1, 0.15, 0.2, 0.3, 0.5];

const nextTolerance = (value: number, by: number): number =>
	by > 0
		? (TOLERANCES.find((t) => t > value * (1 + 1e-9)) ?? value)
		: (TOLERANCES.findLast((t) => t < value * (1 - 1e-9)) ?? value);

const nextNumber = (value: number, by: number): number => {
	const size = Number.isInteger(value) ? 1 : 0.05;
	const next = Math.round((value + Math.sign(by) * size) * 100) / 100;
	return next > 0 ? next : value;
};

const next = (value: number, quantity: Quantity, series: SeriesName, by: number): number => {
	if (quantity === 'fraction') return nextTolerance(value, by);
	if (quantity === 'number') return nextNumber(value, by);
	if (quantity === 'gain' || quantity === 'level') return Math.round(value + Math.sign(by));
	return stepPreferred(value, series, by);
};

/**
 * Steps a typed value along its preferred series.
 * @returns the new text, or null where the text cannot be read
 * @example stepText('330 nF', 'capacitance', 'E6', 1) // '470 nF'
 */
export function stepText(text: string, quantity: Quantity, series: SeriesName, by: 1 | -1): string | null {
	const parsed = parseQuantity(text, quantity, { zero: true });
	if (!parsed.ok || (parsed.value === 0 && quantity !== 'fraction')) return null;
	return formatQuantity(next(parsed.value, quantity, series, by), quantity);
}

/**
 * Moves a typed value by decades.
 * @example shiftText('330 nF', 'capacitance', 1) // '3.3 µF'
 */
export function shiftText(text: string, quantity: Quantity, decades: number): string | null {
	const parsed = parseQuantity(text, quantity, { zero: true });
	if (!parsed.ok || parsed.value === 0 || quantity === 'fraction' || quantity === 'gain') return null;
	// By way of decimal text, or 3.3e-7 · 10 would be 3.3000000000000003e-6.
	const [mantissa = '', exponent = '0'] = parsed.value.toExponential().split('e');
	return formatQuantity(Number(`${mantissa}e${String(Number(exponent) + decades)}`), quantity);
}
