/** Reads the parts of a TrueType file that a subset is made of. */

export interface TrueType {
	readonly postScriptName: string;
	readonly unitsPerEm: number;
	readonly ascent: number;
	readonly descent: number;
	/** xMin, yMin, xMax, yMax of all glyphs. */
	readonly box: readonly [number, number, number, number];
	readonly glyphCount: number;
	/** Bytes of a table, empty where the file has none. */
	table(tag: string): Uint8Array;
	/** Glyph of a code point, 0 where there is none. */
	glyphOf(codePoint: number): number;
	/** Every code point that has a glyph, ascending. */
	readonly codePoints: readonly number[];
	/** Advance width and left side bearing. */
	metricsOf(glyph: number): readonly [number, number];
	/** Outline as stored, empty for a blank. */
	outlineOf(glyph: number): Uint8Array;
}

/**
 * Looks at bytes as big-endian numbers.
 * @param bytes any bytes
 * @returns the view
 * @example viewOf(new Uint8Array([1, 2])).getUint16(0) // 258
 * Source: ECMAScript DataView.
 */
export function viewOf(bytes: Uint8Array): DataView {
	return new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
}

const readTables = (bytes: Uint8Array): ReadonlyMap<string, Uint8Array> => {
	const view = viewOf(bytes);
	if (view.getUint32(0) !== 0x00010000) throw new RangeError('the font is not a TrueType file');
	const tables = new Map<string, Uint8Array>();
	for (let index = 0; index < view.getUint16(4); index += 1) {
		const entry = 12 + 16 * index;
		const offset = view.getUint32(entry + 8);
		tables.set(
			String.fromCharCode(...bytes.subarray(entry, entry + 4)),
			bytes.subarray(offset, offset + view.getUint32(entry + 12))
		);
	}
	return tables;
};

const findUnicodeMap = (cmap: DataView): number => {
	for (let index = 0; index < cmap.getUint16(2); index += 1) {
		const entry = 4 + 8 * index;
		const offset = cmap.getUint32(entry + 4);
		const isUnicode = cmap.getUint16(entry) === 3 && cmap.getUint16(entry + 2) === 1;
		if (isUnicode && cmap.getUint16(offset) === 4) return offset;
	}
	throw new RangeError('the font has no Unicode character map of format 4');
};

const readCharacters = (table: Uint8Array): ReadonlyMap<number, number> => {
	const cmap = viewOf(table);
	const start = findUnicodeMap(cmap);
	const bytes = cmap.getUint16(start + 6);
	const characters = new Map<number, number>();
	for (let segment = 0; segment < bytes; segment += 2) {
		const last = cmap.getUint16(start + 14 + segment);
		const first = cmap.getUint16(start + 16 + bytes + segment);
		const delta = cmap.getUint16(start + 16 + 2 * bytes + segment);
		const at = start + 16 + 3 * bytes + segment;
		const range = cmap.getUint16(at);
		for (let code = first; code <= last && code !== 0xffff; code += 1) {
			const raw = range === 0 ? code : cmap.getUint16(at + range + 2 * (code - first));
			const glyph = range !== 0 && raw === 0 ? 0 : (raw + delta) & 0xffff;
			if (glyph !== 0) characters.set(code, glyph);
		}
	}
	return characters;
};

const readName = (table: Uint8Array, wanted: number): string => {
	const view = viewOf(table);
	const strings = view.getUint16(4);
	for (let index = 0; index < view.getUint16(2); index += 1) {
		const entry = 6 + 12 * index;
		if (view.getUint16(entry) !== 3 || view.getUint16(entry + 6) !== wanted) continue;
		const start = strings + view.getUint16(entry + 10);
		const length = view.getUint16(entry + 8);
		let name = '';
		for (let at = start; at < start + length; at += 2) name += String.fromCharCode(view.getUint16(at));
		return name;
	}
	throw new RangeError(`the font has no name number ${String(wanted)}`);
};

/** Where each outline starts in glyf; one more than there are glyphs. */
const readPlaces = (loca: Uint8Array, long: boolean): number[] => {
	const view = viewOf(loca);
	return Array.from({ length: loca.length / (long ? 4 : 2) }, (_, index) =>
		long ? view.getUint32(4 * index) : 2 * view.getUint16(2 * index)
	);
};

/**
 * Reads a TrueType file.
 * @param bytes the file
 * @returns names, metrics, characters and outlines
 * @throws RangeError for another kind of file, or one without a name or a Unicode map
 * @example readTrueType(bytes).unitsPerEm // 1000 for Barlow
 * Source: OpenType specification 1.9, tables cmap, glyf, head, hhea, hmtx, loca, maxp, name.
 */
export function readTrueType(bytes: Uint8Array): TrueType {
	// A copy: a Buffer's slice would share its memory, and a subset would then write into the face.
	const tables = readTables(new Uint8Array(bytes));
	const table = (tag: string): Uint8Array => tables.get(tag) ?? new Uint8Array(0);
	const [head, hhea, hmtx] = [viewOf(table('head')), viewOf(table('hhea')), viewOf(table('hmtx'))];
	const characters = readCharacters(table('cmap'));
	const places = readPlaces(table('loca'), head.getInt16(50) === 1);
	const longMetrics = hhea.getUint16(34);
	return {
		postScriptName: readName(table('name'), 6),
		unitsPerEm: head.getUint16(18),
		ascent: hhea.getInt16(4),
		descent: hhea.getInt16(6),
		box: [head.getInt16(36), head.getInt16(38), head.getInt16(40), head.getInt16(42)],
		glyphCount: places.length - 1,
		table,
		glyphOf: (codePoint) => characters.get(codePoint) ?? 0,
		codePoints: [...characters.keys()].sort((a, b) => a - b),
		metricsOf: (glyph) => [
			hmtx.getUint16(4 * Math.min(glyph, longMetrics - 1)),
			glyph < longMetrics
				? hmtx.getInt16(4 * glyph + 2)
				: hmtx.getInt16(4 * longMetrics + 2 * (glyph - longMetrics))
		],
		outlineOf: (glyph) => table('glyf').subarray(places[glyph] ?? 0, places[glyph + 1] ?? 0)
	};
}
