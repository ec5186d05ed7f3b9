/** What people type, read as a value: SI prefixes, the letter code of parts, and no guessing. */
import { formatQuantity } from './format';
import { EXPONENT, unitExponent } from './prefix';
import {
	EXAMPLE,
	refuse,
	refuseAmbiguous,
	refuseBare,
	refuseSymbol,
	refuseText,
	refuseValue,
	type Refusal
} from './refusal';
import { splitUnit, UNITS } from './symbol';
import { UNIT, type Quantity } from './unit';

export type Parsed = { readonly ok: true; readonly value: number; readonly reading: string } | Refusal;

export interface ParseOptions {
	/** Zero is a value too. */
	readonly zero?: boolean;
	/** Values below zero, and zero, are values too. */
	readonly negative?: boolean;
}

const LONGEST = 64;

/** Letters of the part code and the prefix each stands for. */
const CODE_LETTERS: Readonly<Partial<Record<Quantity, Readonly<Partial<Record<string, string>>>>>> = {
	capacitance: { p: 'p', n: 'n', u: 'µ', µ: 'µ', m: 'm', F: '' },
	inductance: { p: 'p', n: 'n', u: 'µ', µ: 'µ', m: 'm', H: '' },
	resistance: { R: '', k: 'k', K: 'k', M: 'M', G: 'G', m: 'm', L: 'm' }
};

/** Tolerance letters that may end a part code [%]. */
const TOLERANCE: Readonly<Record<string, string>> = {
	B: '0.1',
	C: '0.25',
	D: '0.5',
	F: '1',
	G: '2',
	J: '5',
	K: '10',
	M: '20',
	N: '30'
};

/** One sign for each meaning: micro, ohm, minus; digit groups closed up. */
const normalise = (text: string): string =>
	text
		.trim()
		.replaceAll('\u03bc', 'µ')
		.replaceAll('\u2126', 'Ω')
		.replaceAll('\u2212', '-')
		.replace(/^\+/, '')
		.replace(/^(-?\d{1,3})((?:[ \u00a0\u202f\u2009]\d{3})+)(?!\d)/, (_, head: string, tail: string) => {
			return head + tail.replace(/\D/g, '');
		});

const exponentOf = (prefix: string): number => EXPONENT[prefix] ?? 0;

/** A decimal string is read once, so that 2.2 µF is the double nearest to 2.2e-6. */
const readNumber = (digits: string, exponent: number): number => {
	const [mantissa = '', own = '0'] = digits.replace(',', '.').toLowerCase().split('e');
	// Exponents past the range of a double would be written with an exponent themselves.
	const power = Math.max(-9999, Math.min(9999, Number(own))) + exponent;
	return Number(`${mantissa}e${String(power)}`);
};

/** A capacitor of millifarads is rare, and mF is also how microfarads were once abbreviated. */
const echo = (value: number, quantity: Quantity): string => {
	const reading = formatQuantity(value, quantity);
	return quantity === 'capacitance' && reading.endsWith('mF') ? `${reading} (millifarad)` : reading;
};

const CODE =
	/^(?<sign>-?)(?<whole>\d*)(?<letter>[A-Za-zµ])(?<places>\d*)(?<tolerance>[BCDFGJKMN]?)(?: ?(?<unit>F|H|Ω|ohm))?$/;

/** In 4n7F the letter is the unit far more often than a tolerance of one per cent. */
const echoTolerance = (letter: string, quantity: Quantity): string =>
	letter === '' || letter === UNIT[quantity] ? '' : ` ±${TOLERANCE[letter] ?? ''}\u00a0%`;

interface Code {
	readonly number: string;
	readonly letter: string;
	readonly tolerance: string;
	readonly unit: string;
}

const takeCode = (text: string): Code | null => {
	const groups = CODE.exec(text)?.groups;
	if (groups === undefined) return null;
	const { sign = '', whole = '', letter = '', places = '', tolerance = '', unit = '' } = groups;
	return whole + places === '' ? null : { number: `${sign}0${whole}.${places}0`, letter, tolerance, unit };
};

const readCode = (text: string, quantity: Quantity): Parsed | null => {
	const code = takeCode(text);
	const prefix = code === null ? undefined : CODE_LETTERS[quantity]?.[code.letter];
	if (code === null || prefix === undefined) return null;
	if (code.unit !== '' && !UNITS[quantity].includes(code.unit)) return null;
	const value = readNumber(code.number, exponentOf(prefix));
	return { ok: true, value, reading: echo(value, quantity) + echoTolerance(code.tolerance, quantity) };
};

/** "1,000" is one in some countries and a thousand in others; "0,125" and "1.125 µF" are not in doubt. */
const isAmbiguous = (number: string, hasUnit: boolean, quantity: Quantity): boolean => {
	const pointIsClear = hasUnit || quantity === 'number';
	const mark = pointIsClear ? ',' : '[.,]';
	return new RegExp(`^-?[1-9]\\d{0,2}${mark}\\d{3}(e|$)`, 'i').test(number);
};

interface Plain {
	readonly number: string;
	readonly symbol: string;
}

const PLAIN = /^(?<number>-?\d+(?:[.,]\d+)?(?:[eE][+-]?\d+)?)[ \u00a0\u202f]?(?<rest>.*)$/;

const takePlain = (text: string, quantity: Quantity): Plain | Refusal => {
	const groups = PLAIN.exec(text)?.groups;
	if (groups === undefined) return refuseText(text, quantity);
	const { number = '', rest = '' } = groups;
	const symbol = rest.trim();
	if (/^[\d.,]/.test(symbol)) {
		return refuse(`“${text}” holds more than one number: write one, such as ${EXAMPLE[quantity]}.`);
	}
	if (isAmbiguous(number, symbol !== '', quantity)) return refuseAmbiguous(number, symbol, quantity);
	if (symbol === '' && quantity !== 'number') return refuseBare(number, quantity);
	return { number, symbol };
};

const readPlain = (text: string, quantity: Quantity): Parsed => {
	const plain = takePlain(text, quantity);
	if ('ok' in plain) return plain;
	const { number, symbol } = plain;
	const prefix = splitUnit(symbol, quantity)?.prefix;
	if (prefix === undefined) return refuseSymbol(symbol, quantity);
	const value = readNumber(number, exponentOf(prefix) + unitExponent(quantity));
	if (!Number.isFinite(value)) return refuseValue('is too large', quantity);
	if (value === 0 && /[1-9]/.test(number.replace(/e.*/i, ''))) return refuseValue('is too small', quantity);
	return { ok: true, value, reading: echo(value, quantity) };
};

/** A range of the field may be narrower; this only tells what no field of this kind takes. */
const checkSign = (parsed: Parsed, quantity: Quantity, options: ParseOptions): Parsed => {
	const { zero = false, negative = false } = options;
	if (!parsed.ok || negative) return parsed;
	if (parsed.value < 0) return refuseValue('must not be below zero', quantity);
	return parsed.value === 0 && !zero ? refuseValue('must be above zero', quantity) : parsed;
};

/**
 * Reads a value as people type it: number, prefix and unit ("2.2 µF", "2,2uF"), or the letter code of parts
 * ("2u2", "4K7", "R47"). What could be meant in two ways is refused with a sentence that says what to enter.
 * @param text what was typed
 * @param quantity what it is a value of; decides units, prefixes and letters
 * @param options whether zero or values below zero are values here
 * @returns the value [SI base unit; per cent as a ratio] with its echo, or the reason for the refusal
 * @example parseQuantity('4u7', 'capacitance') // { ok: true, value: 4.7e-6, reading: '4.7 µF' }
 * Source: IEC 60062:2016 for the letters (recalled for capacitors), ISO 80000-1 for units; refusals are our own.
 */
export function parseQuantity(text: string, quantity: Quantity, options: ParseOptions = {}): Parsed {
	if (text.length > LONGEST) {
		return refuse(`Write at most ${String(LONGEST)} characters, such as ${EXAMPLE[quantity]}.`);
	}
	const clean = normalise(text);
	if (clean === '') return refuse(`Enter a value, such as ${EXAMPLE[quantity]}.`);
	const parsed = checkSign(readCode(clean, quantity) ?? readPlain(clean, quantity), quantity, options);
	// −0 would print as 0 but compare as another key.
	return parsed.ok && parsed.value === 0 ? { ...parsed, value: 0 } : parsed;
}
