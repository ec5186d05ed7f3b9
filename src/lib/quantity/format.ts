/** Values as people read them: engineering prefixes, and the letter code of small parts. */
import { EXPONENT, PREFIXES, unitExponent } from './prefix';
import { UNIT, type Quantity } from './unit';

export interface FormatOptions {
	/** Significant digits; absent prints the value exactly, up to twelve. */
	readonly digits?: number;
	readonly decimalMark?: '.' | ',';
	/** Rounding toward +∞ (`up`) or −∞ (`down`), so that a printed edge lies inside its window. */
	readonly round?: 'nearest' | 'up' | 'down';
}

const NO_BREAK_SPACE = '\u00a0';
const MINUS = '\u2212';
const EXACT_DIGITS = 12;

/** |value| = 0.d₁d₂d₃… · 10^point. */
interface Decimal {
	readonly digits: string;
	readonly point: number;
}

const readDecimal = (text: string): Decimal => {
	const [mantissa = '', exponent = '0'] = text.split('e');
	return { digits: mantissa.replace('.', ''), point: Number(exponent) + 1 };
};

const oneMore = ({ digits, point }: Decimal): Decimal => {
	const next = String(BigInt(digits) + 1n);
	return next.length > digits.length
		? { digits: next.slice(0, digits.length), point: point + 1 }
		: { digits: next, point };
};

const oneLess = ({ digits, point }: Decimal): Decimal => {
	const next = String(BigInt(digits) - 1n);
	return next.length < digits.length || next === '0'
		? { digits: '9'.repeat(digits.length), point: point - 1 }
		: { digits: next, point };
};

/** Rounds a magnitude; a value within 1e-12 of a printed one is that one, or float noise would move edges. */
const roundDecimal = (magnitude: number, count: number, round: 'nearest' | 'up' | 'down'): Decimal => {
	const text = magnitude.toExponential(count - 1);
	const nearest = readDecimal(text);
	const error = (Number(text) - magnitude) / magnitude;
	if (round === 'up' && error < -1e-12) return oneMore(nearest);
	if (round === 'down' && error > 1e-12) return oneLess(nearest);
	return nearest;
};

/** Writes 0.d₁d₂… · 10^point without an exponent. */
const expand = ({ digits, point }: Decimal): string => {
	if (point <= 0) return `0.${'0'.repeat(-point)}${digits}`;
	if (point >= digits.length) return digits.padEnd(point, '0');
	return `${digits.slice(0, point)}.${digits.slice(point)}`;
};

const toDecimal = (magnitude: number, options: FormatOptions, negative: boolean): Decimal => {
	const round = options.round ?? 'nearest';
	const outward = negative && round !== 'nearest' ? (round === 'up' ? 'down' : 'up') : round;
	const rounded = roundDecimal(magnitude, options.digits ?? EXACT_DIGITS, outward);
	if (options.digits !== undefined) return rounded;
	return { digits: rounded.digits.replace(/0+$/, ''), point: rounded.point };
};

/** The largest prefix that keeps the mantissa at or above one; the smallest where none does. */
const choosePrefix = (quantity: Quantity, point: number): string => {
	const fitting = PREFIXES[quantity].filter((prefix) => (EXPONENT[prefix] ?? 0) < point);
	return fitting.at(-1) ?? PREFIXES[quantity][0] ?? '';
};

const assertFormattable = (value: number, digits?: number): void => {
	if (!Number.isFinite(value)) throw new RangeError(`value must be finite, got ${String(value)}`);
	if (digits !== undefined && !(Number.isInteger(digits) && digits >= 1 && digits <= 17)) {
		throw new RangeError(`digits must be whole, 1 … 17, got ${String(digits)}`);
	}
};

const writeZero = ({ digits = 1 }: FormatOptions): string =>
	digits > 1 ? `0.${'0'.repeat(digits - 1)}` : '0';

/**
 * Writes a value with its engineering prefix and unit, mantissa 1 ≤ m < 1000 also after rounding.
 * @param value finite value [SI base unit; a fraction as a ratio]
 * @param quantity what it is a value of
 * @param options significant digits, decimal mark and direction of rounding
 * @returns number, no-break space, prefix and unit; a fraction in per cent, a plain number without unit
 * @throws RangeError when the value is not finite or the digits are not 1 … 17
 * @example formatQuantity(3.3e-7, 'capacitance') // '330 nF'
 * Source: ISO 80000-1 and NIST SP 811 §7.2 (recalled) for the space and the prefixes.
 */
export function formatQuantity(value: number, quantity: Quantity, options: FormatOptions = {}): string {
	assertFormattable(value, options.digits);
	const space = UNIT[quantity] === '' ? '' : NO_BREAK_SPACE;
	if (value === 0) return mark(writeZero(options), options) + space + UNIT[quantity];
	const negative = value < 0;
	const decimal = toDecimal(Math.abs(value), options, negative);
	const point = decimal.point - unitExponent(quantity);
	const prefix = choosePrefix(quantity, point);
	const number = expand({ digits: decimal.digits, point: point - (EXPONENT[prefix] ?? 0) });
	return `${negative ? MINUS : ''}${mark(number, options)}${space}${prefix}${UNIT[quantity]}`;
}

const mark = (number: string, { decimalMark = '.' }: FormatOptions): string =>
	number.replace('.', decimalMark);

type Coded = 'capacitance' | 'inductance' | 'resistance';

/** Letters that stand for the decimal mark, rising with the prefix. */
const LETTERS: Readonly<Record<Coded, Readonly<Record<string, string>>>> = {
	capacitance: { p: 'p', n: 'n', µ: 'µ', m: 'm', '': 'F' },
	inductance: { n: 'n', µ: 'µ', m: 'm', '': 'H' },
	resistance: { m: 'm', '': 'R', k: 'K', M: 'M', G: 'G' }
};

const lettersOf = (quantity: Quantity): Readonly<Record<string, string>> => {
	if (quantity === 'capacitance' || quantity === 'inductance' || quantity === 'resistance')
		return LETTERS[quantity];
	throw new RangeError(`there is no letter code for a ${quantity}`);
};

/** The largest prefix under the mantissa; a tenth of an ohm is coded R1, though else a digit stands before the letter. */
const chooseCodePrefix = (quantity: Quantity, point: number): string => {
	const prefixes = Object.keys(lettersOf(quantity));
	const reach = quantity === 'resistance' && point === 0 ? 1 : point;
	return prefixes.filter((prefix) => (EXPONENT[prefix] ?? 0) < reach).at(-1) ?? prefixes[0] ?? '';
};

/**
 * Writes a value in the letter code of parts, where a letter stands for the decimal mark.
 * @param value value, > 0 [F, H or Ω]
 * @param quantity capacitance, inductance or resistance
 * @returns the code, exact up to twelve digits
 * @throws RangeError when the value is not positive and finite, or the quantity has no letter code
 * @example formatRkm(4700, 'resistance') // '4K7'
 * Source: IEC 60062:2016, decimal-mark letters (capacitors recalled).
 */
export function formatRkm(value: number, quantity: Quantity): string {
	if (!(value > 0) || !Number.isFinite(value)) {
		throw new RangeError(`value must be > 0 and finite, got ${String(value)}`);
	}
	const { digits, point } = toDecimal(value, {}, false);
	const prefix = chooseCodePrefix(quantity, point);
	const [whole = '', places = ''] = expand({ digits, point: point - (EXPONENT[prefix] ?? 0) }).split('.');
	return `${whole === '0' ? '' : whole}${lettersOf(quantity)[prefix] ?? ''}${places}`;
}
