/** Text that must stay within a width: wrapped between words, shortened with an ellipsis, never made smaller. */
import type { Face } from '$lib/scene/scene';
import { textWidth } from '$lib/scene/metrics';

export interface Measure {
	readonly width: number;
	readonly cap: number;
	readonly face?: Face;
}

const ELLIPSIS = '…';

const fits = (text: string, { width, cap, face = 'regular' }: Measure): boolean =>
	textWidth(text, face, cap) <= width;

/** How many leading characters fit, by halving. */
const fittingCount = (characters: readonly string[], tail: string, measure: Measure): number => {
	let low = 0;
	let high = characters.length;
	while (low < high) {
		const middle = Math.ceil((low + high) / 2);
		if (fits(characters.slice(0, middle).join('') + tail, measure)) low = middle;
		else high = middle - 1;
	}
	return low;
};

/**
 * Shortens a text to a width, with an ellipsis where something was cut.
 * @param text one line
 * @param measure width and lettering [mm]
 * @returns the text, or its beginning and '…'; empty when not even one character fits
 * @example shorten('series inductor', { width: 12, cap: 2.5 }) // 'series i…'
 */
export function shorten(text: string, measure: Measure): string {
	if (fits(text, measure)) return text;
	const characters = [...text];
	const count = fittingCount(characters, ELLIPSIS, measure);
	return count === 0 ? '' : `${characters.slice(0, count).join('').trimEnd()}${ELLIPSIS}`;
}

/** Cuts a word that is wider than a whole line. */
const cutWord = (word: string, measure: Measure): string[] => {
	const pieces: string[] = [];
	let rest = [...word];
	while (!fits(rest.join(''), measure) && rest.length > 1) {
		const count = Math.max(1, fittingCount(rest, '', measure));
		pieces.push(rest.slice(0, count).join(''));
		rest = rest.slice(count);
	}
	return [...pieces, rest.join('')];
};

/**
 * Breaks a text into lines between its words; a word wider than the line is cut.
 * @param text any text; line ends count as spaces
 * @param measure width of a line and lettering [mm]
 * @param most greatest number of lines; what is left over ends the last one in an ellipsis
 * @returns the lines, none for a blank text
 * @example wrap('Charger auxiliary supply', { width: 30, cap: 3.5 }, 2) // ['Charger', 'auxiliary supply']
 */
export function wrap(text: string, measure: Measure, most = Infinity): string[] {
	const words = text.split(/[ \t\n\r]+/).filter((word) => word !== '');
	const { cap, face = 'regular', width: room } = measure;
	const space = textWidth(' ', face, cap);
	const lines: string[] = [];
	let used = 0;
	for (const piece of words.flatMap((word) => cutWord(word, measure))) {
		const width = textWidth(piece, face, cap);
		const line = lines.at(-1);
		if (line !== undefined && used + space + width <= room) {
			lines[lines.length - 1] = `${line} ${piece}`;
			used += space + width;
		} else {
			lines.push(piece);
			used = width;
		}
	}
	if (lines.length <= most) return lines;
	const last = lines.slice(most - 1).join(' ');
	return [...lines.slice(0, most - 1), shorten(last, measure)];
}
