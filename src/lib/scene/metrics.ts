/** How wide lettering is: one table of Barlow's advance widths, with figures of equal width and no kerning. */
import { CHARACTERS, WIDTHS } from './barlow';
import type { Face } from './scene';

/** Capital height over font size in all four faces. */
export const CAP_RATIO = 0.7;

/** Width of a character that the faces lack, in thousandths of the font size; such a text is refused before it is printed. */
const UNKNOWN = 600;

const tableOf = (widths: readonly number[]): ReadonlyMap<string, number> =>
	new Map([...CHARACTERS].map((character, index) => [character, widths[index] ?? UNKNOWN]));

const tables: Readonly<Record<Face, ReadonlyMap<string, number>>> = {
	regular: tableOf(WIDTHS.regular),
	medium: tableOf(WIDTHS.medium),
	semibold: tableOf(WIDTHS.semibold),
	bold: tableOf(WIDTHS.bold)
};

/** Spellings that the faces write with another character. */
const twins: Readonly<Record<string, string>> = {
	'\u03bc': '\u00b5',
	'\u2011': '-',
	'\u2002': '\u00a0\u00a0',
	'\u2003': '\u00a0\u00a0\u00a0\u00a0',
	'\t': ' ',
	'\n': ' ',
	'\r': ' '
};

/**
 * Writes one character for what may come as either of two: U+2126 becomes Ω, U+03BC becomes µ, letters with marks
 * become one character, typographic spaces become no-break spaces (an en space two, an em space four), line ends a space.
 * @param text any text
 * @returns the text as it is measured and drawn
 * @example normaliseText('10 k\u2126') // '10 kΩ' with U+03A9
 * Source: Unicode Standard Annex 15, form C; the micro sign kept as IEC 80000 and keyboards write it.
 */
export function normaliseText(text: string): string {
	// Plain ASCII is most of a sheet and is in its final form.
	if (/^[ -~]*$/.test(text)) return text;
	return text
		.normalize('NFC')
		.replace(/[\u03bc\u2000-\u200a\u2011\u202f\t\n\r]/g, (twin) => twins[twin] ?? '\u00a0');
}

/**
 * Measures a text set in one face: sum of advance widths · cap / (1000 · 0.7).
 * @param text the text; a character that the face lacks counts 0.6 of the font size
 * @param face one of the four weights
 * @param cap capital height [mm]
 * @returns width [mm]
 * @example textWidth('0', 'regular', 0.7) // 0.527
 * Source: advance widths of the Barlow faces, tabular figures.
 */
export function textWidth(text: string, face: Face, cap: number): number {
	const table = tables[face];
	let sum = 0;
	for (const character of normaliseText(text)) sum += table.get(character) ?? UNKNOWN;
	return (sum / 1000) * (cap / CAP_RATIO);
}

/**
 * Finds the characters that no shipped face has; control characters and lone combining marks are among them.
 * @param text any text
 * @returns each missing character once, in order of appearance
 * @example missingCharacters('R1 ∥ R2') // ['∥']
 * Source: the character maps of the Barlow faces.
 */
export function missingCharacters(text: string): string[] {
	return [...new Set(normaliseText(text))].filter((character) => !tables.regular.has(character));
}
