/** Makes a small TrueType file of some characters of a face: no hinting, no layout tables, glyphs numbered anew. */
import { viewOf, type TrueType } from './truetype';

export interface Subset {
	/** A TrueType file. */
	readonly bytes: Uint8Array;
	/** Glyphs of the face in their new order, `.notdef` first. */
	readonly glyphs: readonly number[];
	/** New glyph of each code point. */
	readonly characters: ReadonlyMap<number, number>;
}

/** Which of a face's glyphs stands for a code point. */
export type CharacterMap = ReadonlyMap<number, number>;

const MORE_COMPONENTS = 0x20;
const HAS_INSTRUCTIONS = 0x100;

/** Offset, flags and glyph of each component, and where the components end. */
const componentsOf = (outline: Uint8Array): { at: number; flags: number; glyph: number; end: number }[] => {
	if (outline.length === 0 || viewOf(outline).getInt16(0) >= 0) return [];
	const view = viewOf(outline);
	const components = [];
	let at = 10;
	for (let more = true; more;) {
		const flags = view.getUint16(at);
		const words = (flags & 1) === 1 ? 4 : 2;
		const scale = (flags & 8) === 8 ? 2 : (flags & 0x40) === 0x40 ? 4 : (flags & 0x80) === 0x80 ? 8 : 0;
		const end = at + 4 + words + scale;
		components.push({ at, flags, glyph: view.getUint16(at + 2), end });
		more = (flags & MORE_COMPONENTS) !== 0;
		at = end;
	}
	return components;
};

const withoutInstructions = (outline: Uint8Array): Uint8Array => {
	const contours = viewOf(outline).getInt16(0);
	const at = 10 + 2 * contours;
	const length = viewOf(outline).getUint16(at);
	const bare = new Uint8Array(outline.length - length);
	bare.set(outline.subarray(0, at));
	bare.set(outline.subarray(at + 2 + length), at + 2);
	return bare;
};

const bareOutline = (outline: Uint8Array, newGlyph: ReadonlyMap<number, number>): Uint8Array => {
	if (outline.length === 0) return outline;
	const components = componentsOf(outline);
	const last = components.at(-1);
	if (last === undefined) return withoutInstructions(outline);
	const bare = outline.slice(0, last.end);
	for (const { at, flags, glyph } of components) {
		viewOf(bare).setUint16(at, flags & ~HAS_INSTRUCTIONS);
		viewOf(bare).setUint16(at + 2, newGlyph.get(glyph) ?? 0);
	}
	return bare;
};

/** `.notdef`, the glyphs asked for in the order of their code points, then what they are composed of. */
const closureOf = (face: TrueType, wanted: CharacterMap): number[] => {
	const glyphs = new Set([0, ...[...wanted].sort(([a], [b]) => a - b).map(([, glyph]) => glyph)]);
	for (const glyph of glyphs) {
		for (const component of componentsOf(face.outlineOf(glyph))) glyphs.add(component.glyph);
	}
	return [...glyphs];
};

const outlineTables = (face: TrueType, glyphs: readonly number[]): Record<'glyf' | 'loca', Uint8Array> => {
	const newGlyph = new Map(glyphs.map((glyph, index) => [glyph, index]));
	const outlines = glyphs.map((glyph) => bareOutline(face.outlineOf(glyph), newGlyph));
	const padded = (length: number): number => (length + 3) & ~3;
	const glyf = new Uint8Array(outlines.reduce((sum, { length }) => sum + padded(length), 0));
	if (glyf.length > 0x1fffe) throw new RangeError(`${String(glyf.length)} bytes of outlines are too many`);
	const loca = new Uint8Array(2 * glyphs.length + 2);
	let at = 0;
	outlines.forEach((outline, index) => {
		glyf.set(outline, at);
		at += padded(outline.length);
		viewOf(loca).setUint16(2 * index + 2, at / 2);
	});
	return { glyf, loca };
};

const metricTables = (face: TrueType, glyphs: readonly number[]): Record<string, Uint8Array> => {
	const hmtx = new Uint8Array(4 * glyphs.length);
	glyphs.forEach((glyph, index) => {
		const [advance, bearing] = face.metricsOf(glyph);
		viewOf(hmtx).setUint16(4 * index, advance);
		viewOf(hmtx).setInt16(4 * index + 2, bearing);
	});
	const hhea = face.table('hhea').slice();
	viewOf(hhea).setUint16(34, glyphs.length);
	const maxp = face.table('maxp').slice();
	viewOf(maxp).setUint16(4, glyphs.length);
	// Without hinting: one zone and nothing for a program to use.
	viewOf(maxp).setUint16(14, 1);
	maxp.fill(0, 16, 28);
	const head = face.table('head').slice();
	viewOf(head).setUint32(8, 0);
	viewOf(head).setInt16(50, 0);
	return { head, hhea, hmtx, maxp };
};

const checksum = (bytes: Uint8Array): number => {
	let sum = 0;
	for (let at = 0; at < bytes.length; at += 4) {
		const word =
			((bytes[at] ?? 0) << 24) |
			((bytes[at + 1] ?? 0) << 16) |
			((bytes[at + 2] ?? 0) << 8) |
			(bytes[at + 3] ?? 0);
		sum = (sum + word) >>> 0;
	}
	return sum;
};

const fileOf = (tables: Readonly<Record<string, Uint8Array>>): Uint8Array => {
	const tags = Object.keys(tables).sort();
	const bytesOf = (tag: string): Uint8Array => tables[tag] ?? new Uint8Array(0);
	const heading = 12 + 16 * tags.length;
	const size = tags.reduce((sum, tag) => sum + ((bytesOf(tag).length + 3) & ~3), heading);
	const file = new Uint8Array(size);
	const view = viewOf(file);
	const power = Math.floor(Math.log2(tags.length));
	view.setUint32(0, 0x00010000);
	[tags.length, 16 << power, power, 16 * tags.length - (16 << power)].forEach((value, index) => {
		view.setUint16(4 + 2 * index, value);
	});
	let at = heading;
	tags.forEach((tag, index) => {
		const bytes = bytesOf(tag);
		const entry = 12 + 16 * index;
		file.set(
			Array.from(tag, (letter) => letter.charCodeAt(0)),
			entry
		);
		view.setUint32(entry + 4, checksum(bytes));
		view.setUint32(entry + 8, at);
		view.setUint32(entry + 12, bytes.length);
		file.set(bytes, at);
		at += (bytes.length + 3) & ~3;
	});
	const head = 12 + 16 * tags.indexOf('head');
	view.setUint32(view.getUint32(head + 8) + 8, (0xb1b0afba - checksum(file)) >>> 0);
	return file;
};

/**
 * Makes a TrueType file of some characters: tables glyf, loca, head, hhea, hmtx and maxp, and those given beside.
 * @param face the face
 * @param characters glyph of the face for each code point
 * @param extra makes further tables from the new character map, such as a cmap
 * @returns the file, its glyphs and its characters
 * @throws RangeError for more than 128 KiB of outlines
 * @example subsetFace(face, new Map([[0x2126, face.glyphOf(0x3a9)]])).glyphs.length // 2
 * Source: OpenType specification 1.9, tables glyf and loca.
 */
export function subsetFace(
	face: TrueType,
	characters: CharacterMap,
	extra: (characters: CharacterMap) => Readonly<Record<string, Uint8Array>> = () => ({})
): Subset {
	const glyphs = closureOf(face, characters);
	const newGlyph = new Map(glyphs.map((glyph, index) => [glyph, index]));
	const renumbered = new Map(
		[...characters].sort(([a], [b]) => a - b).map(([code, glyph]) => [code, newGlyph.get(glyph) ?? 0])
	);
	const tables = {
		...metricTables(face, glyphs),
		...outlineTables(face, glyphs),
		...extra(renumbered)
	};
	return { bytes: fileOf(tables), glyphs, characters: renumbered };
}
