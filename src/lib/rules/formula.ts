/** Formulas written as parts, and read back as plain text. */
import type { Formula, FormulaPart } from './finding';
import { formatQuantity } from '$lib/quantity/format';
import type { Quantity } from '$lib/quantity/unit';

/** Three digits are what a computed limit carries on paper. */
export const COMPUTED_DIGITS = 3;

/**
 * Writes a symbol such as C with the index min.
 * @param base letter
 * @param sub index
 * @returns the part
 * @example symbol('C', 'min') // C_min
 * Source: common practice.
 */
export function symbol(base: string, sub?: string): FormulaPart {
	return sub === undefined ? { type: 'symbol', base } : { type: 'symbol', base, sub };
}

/**
 * Writes a value as it was given, exact up to 12 significant digits.
 * @param value value [SI]
 * @param quantity what it is
 * @returns the part
 * @example given(2.2e-6, 'capacitance') // 2.2 µF
 * Source: common practice.
 */
export function given(value: number, quantity: Quantity): FormulaPart {
	return { type: 'quantity', value, quantity };
}

/**
 * Writes a computed value with three digits, to the nearest or to the safe side.
 * @param value value [SI]
 * @param quantity what it is
 * @param round direction of rounding; absent for the nearest
 * @returns the part
 * @example computed(2.5263e-7, 'capacitance', 'up') // 253 nF
 * Source: common practice.
 */
export function computed(value: number, quantity: Quantity, round?: 'up' | 'down'): FormulaPart {
	const part = { type: 'quantity', value, quantity, digits: COMPUTED_DIGITS } as const;
	return round === undefined ? part : { ...part, round };
}

/**
 * Reads a template as formula parts: its strings become text, its values stand as parts.
 * @param strings text between the values
 * @param values parts, or plain text
 * @returns parts in order
 * @example parts`${symbol('C', 'x')} ≤ ${symbol('C', 'min')}/k`
 * Source: common practice.
 */
export function parts(
	strings: TemplateStringsArray,
	...values: readonly (FormulaPart | string)[]
): FormulaPart[] {
	return strings.flatMap((text, index) => {
		const value = values[index];
		const written: FormulaPart[] = text === '' ? [] : [{ type: 'text', text }];
		if (value === undefined) return written;
		return [...written, typeof value === 'string' ? ({ type: 'text', text: value } as const) : value];
	});
}

const symbolText = (base: string, sub?: string, sup?: string): string => {
	const index = sub === undefined ? '' : sub.length === 1 ? sub : `_${sub}`;
	return `${base}${index}${sup === undefined ? '' : `^${sup}`}`;
};

const partText = (part: FormulaPart): string => {
	if (part.type === 'text') return part.text;
	if (part.type === 'symbol') return symbolText(part.base, part.sub, part.sup);
	const { value, quantity, digits, round } = part;
	return formatQuantity(value, quantity, {
		...(digits === undefined ? {} : { digits }),
		...(round === undefined ? {} : { round })
	});
};

/**
 * Reads formula parts as plain text with a decimal point.
 * @param formulaParts parts in order
 * @returns text, an index of one letter set on the line, a longer one after an underscore
 * @example partsText(parts`${symbol('C', 'x')} ≤ ${given(3.96e-7, 'capacitance')}`) // 'Cx ≤ 396 nF'
 * Source: common practice.
 */
export function partsText(formulaParts: readonly FormulaPart[]): string {
	return formulaParts.map(partText).join('');
}

/**
 * Reads a formula as one line: general = numbers = result, leaving out what is empty.
 * @param formula law, law with numbers, result
 * @returns one line of text
 * @example formulaText(share) // 'Cx ≤ C_min/k = 0.9 · 2.2 µF / 5 = 396 nF'
 * Source: common practice.
 */
export function formulaText({ general, numbers, result }: Formula): string {
	return [general, numbers, result]
		.map(partsText)
		.filter((text) => text !== '')
		.join(' = ');
}
