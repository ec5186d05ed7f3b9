/** The tables that a browser asks of a face beyond what a PDF needs. */
import type { CharacterMap } from './subset';
import { viewOf, type TrueType } from './truetype';

/** Runs of consecutive code points with consecutive glyphs: first, last, delta. */
const runsOf = (characters: CharacterMap): [number, number, number][] => {
	const runs: [number, number, number][] = [];
	for (const [code, glyph] of [...characters].sort(([a], [b]) => a - b)) {
		const run = runs.at(-1);
		if (run !== undefined && run[1] === code - 1 && run[2] === glyph - code) run[1] = code;
		else runs.push([code, code, glyph - code]);
	}
	return [...runs, [0xffff, 0xffff, 1]];
};

const cmapTable = (characters: CharacterMap): Uint8Array => {
	const runs = runsOf(characters);
	const bytes = 2 * runs.length;
	const table = new Uint8Array(12 + 16 + 4 * bytes);
	const view = viewOf(table);
	const power = Math.floor(Math.log2(runs.length));
	view.setUint32(0, 1);
	view.setUint16(4, 3);
	view.setUint16(6, 1);
	view.setUint32(8, 12);
	const heading = [4, 16 + 4 * bytes, 0, bytes, 2 << power, power, bytes - (2 << power)];
	heading.forEach((value, index) => view.setUint16(12 + 2 * index, value));
	runs.forEach(([first, last, delta], index) => {
		view.setUint16(26 + 2 * index, last);
		view.setUint16(28 + bytes + 2 * index, first);
		view.setUint16(28 + 2 * bytes + 2 * index, delta & 0xffff);
	});
	return table;
};

/** Name records for Windows, English: number and text. */
const nameTable = (names: readonly (readonly [number, string])[]): Uint8Array => {
	const strings = 6 + 12 * names.length;
	const table = new Uint8Array(strings + names.reduce((sum, [, text]) => sum + 2 * text.length, 0));
	const view = viewOf(table);
	view.setUint16(2, names.length);
	view.setUint16(4, strings);
	let at = 0;
	names.forEach(([number, text], index) => {
		[3, 1, 0x409, number, 2 * text.length, at].forEach((value, field) => {
			view.setUint16(6 + 12 * index + 2 * field, value);
		});
		for (let letter = 0; letter < text.length; letter += 1) {
			view.setUint16(strings + at + 2 * letter, text.charCodeAt(letter));
		}
		at += 2 * text.length;
	});
	return table;
};

/** No glyph names. */
const postTable = (face: TrueType): Uint8Array => {
	const table = new Uint8Array(32);
	table.set(face.table('post').subarray(0, 16));
	viewOf(table).setUint32(0, 0x00030000);
	return table;
};

const os2Table = (face: TrueType, characters: CharacterMap): Uint8Array => {
	const codes = [...characters.keys()];
	const table = face.table('OS/2').slice();
	viewOf(table).setUint16(64, Math.min(...codes));
	viewOf(table).setUint16(66, Math.max(...codes));
	return table;
};

/**
 * Makes the tables cmap, name, OS/2 and post of a face.
 * @param face the face that the subset is taken from
 * @param names name numbers and texts, ascending
 * @returns what subsetFace takes as its further tables
 * @example subsetFace(face, characters, webTables(face, [[1, 'Barlow Sheet']]))
 * Source: OpenType specification 1.9, tables cmap (format 4), name, OS/2 and post (version 3).
 */
export function webTables(
	face: TrueType,
	names: readonly (readonly [number, string])[]
): (characters: CharacterMap) => Readonly<Record<string, Uint8Array>> {
	return (characters) => ({
		cmap: cmapTable(characters),
		name: nameTable(names),
		'OS/2': os2Table(face, characters),
		post: postTable(face)
	});
}
