/** Embeds a subset of a face so that its text stays text: glyphs by number, and a map back to Unicode. */
import { PDFContext, PDFName, PDFRawStream, PDFString, type PDFRef } from 'pdf-lib';
import type { Face } from '$lib/scene/scene';
import { digest } from './digest';
import { subsetFace, type Subset } from './subset';
import type { TrueType } from './truetype';

export type FontSet = Readonly<Record<Face, TrueType>>;

/** Symbolic: glyphs are chosen by number, not by an encoding. */
const SYMBOLIC = 4;

/** A subset and what is written of it, packed. */
export interface PackedSubset {
	readonly subset: Subset;
	/** The font program and the map back to Unicode, deflated. */
	readonly program: Uint8Array;
	readonly unicode: Uint8Array;
}

/** Sheets set the same characters again and again, and packing costs more than all the rest of a file. */
const KEPT = 32;
const packed = new WeakMap<TrueType, Map<string, PackedSubset>>();

const glyphsOf = (face: TrueType, codePoints: readonly number[]): Map<number, number> => {
	const characters = new Map<number, number>();
	for (const code of codePoints) {
		const glyph = face.glyphOf(code);
		if (glyph === 0) {
			const name = `U+${code.toString(16).toUpperCase().padStart(4, '0')}`;
			throw new RangeError(`${face.postScriptName} has no glyph for ${name}`);
		}
		characters.set(code, glyph);
	}
	return characters;
};

const pack = (face: TrueType, codePoints: readonly number[]): PackedSubset => {
	const subset = subsetFace(face, glyphsOf(face, codePoints));
	const context = PDFContext.create();
	return {
		subset,
		program: context.flateStream(subset.bytes).contents,
		unicode: context.flateStream(toUnicode(subset.characters)).contents
	};
};

/**
 * Makes a subset of the characters of a text; the last few are kept.
 * @param face the face
 * @param codePoints what is drawn in it, ascending
 * @returns the subset, packed
 * @throws RangeError for a character that the face lacks, which must be refused where it is entered
 * @example packSubset(face, [0x3a9]).subset.glyphs.length // 2: .notdef and Ω
 * Source: OpenType specification 1.9.
 */
export function packSubset(face: TrueType, codePoints: readonly number[]): PackedSubset {
	const kept = packed.get(face) ?? new Map<string, PackedSubset>();
	packed.set(face, kept);
	const key = codePoints.join();
	const subset = kept.get(key) ?? pack(face, codePoints);
	kept.delete(key);
	kept.set(key, subset);
	const [oldest] = kept.keys();
	if (kept.size > KEPT && oldest !== undefined) kept.delete(oldest);
	return subset;
}

/** Six capitals made from the font program, as PDF asks of a subset's name. */
const tagOf = (bytes: Uint8Array): string => {
	let [rest] = digest([bytes]);
	let tag = '';
	for (let letter = 0; letter < 6; letter += 1) {
		tag += String.fromCharCode(65 + (rest % 26));
		rest = Math.floor(rest / 26);
	}
	return tag;
};

const hex = (value: number): string => value.toString(16).toUpperCase().padStart(4, '0');

/** A code point in UTF-16, as hexadecimal digits. */
const utf16 = (code: number): string => {
	const text = String.fromCodePoint(code);
	return Array.from({ length: text.length }, (_, index) => hex(text.charCodeAt(index))).join('');
};

/** Runs of consecutive glyphs with consecutive code points: first glyph, last glyph, first code point. */
const rangesOf = (characters: ReadonlyMap<number, number>): [number, number, number][] => {
	const ranges: [number, number, number][] = [];
	for (const [code, glyph] of [...characters].sort(([, a], [, b]) => a - b)) {
		const range = ranges.at(-1);
		const continues = range !== undefined && range[1] === glyph - 1 && range[2] - range[0] === code - glyph;
		// Within a range only the last byte may change, on both sides.
		if (continues && (glyph & 0xff) !== 0 && (code & 0xff) !== 0) range[1] = glyph;
		else ranges.push([glyph, glyph, code]);
	}
	return ranges;
};

/**
 * Writes the map from glyphs back to Unicode.
 * @param characters glyph of each code point
 * @returns the CMap as text
 * @example toUnicode(new Map([[0x3a9, 1]])).includes('<0001><0001><03A9>') // true
 * Source: PDF Reference 1.4, 5.9.2; Adobe Technical Note 5411.
 */
export function toUnicode(characters: ReadonlyMap<number, number>): string {
	const lines = rangesOf(characters).map(
		([first, last, code]) => `<${hex(first)}><${hex(last)}><${utf16(code)}>`
	);
	let blocks = '';
	for (let start = 0; start < lines.length; start += 100) {
		const block = lines.slice(start, start + 100);
		blocks += `${String(block.length)} beginbfrange\n${block.join('\n')}\nendbfrange\n`;
	}
	return (
		'/CIDInit /ProcSet findresource begin\n12 dict begin\nbegincmap\n' +
		'/CIDSystemInfo << /Registry (Adobe) /Ordering (UCS) /Supplement 0 >> def\n' +
		'/CMapName /Adobe-Identity-UCS def\n/CMapType 2 def\n' +
		`1 begincodespacerange\n<0000><FFFF>\nendcodespacerange\n${blocks}` +
		'endcmap\nCMapName currentdict /CMap defineresource pop\nend\nend\n'
	);
}

/**
 * Marks the glyphs that a subset holds: one bit each, highest bit first.
 * @param count number of glyphs, all of them present
 * @returns the bytes
 * @example cidSet(3) // Uint8Array [0b11100000]
 * Source: PDF Reference 1.4, 5.7.2; ISO 19005-1, 6.3.5.
 */
export function cidSet(count: number): Uint8Array {
	const bytes = new Uint8Array(Math.ceil(count / 8)).fill(0xff);
	if (count % 8 !== 0) bytes[bytes.length - 1] = 0xff & (0xff << (8 - (count % 8)));
	return bytes;
}

const writePacked = (context: PDFContext, bytes: Uint8Array, entries: Record<string, number> = {}): PDFRef =>
	context.register(
		PDFRawStream.of(context.obj({ Filter: 'FlateDecode', Length: bytes.length, ...entries }), bytes)
	);

const writeDescriptor = (
	context: PDFContext,
	face: TrueType,
	{ subset, program }: PackedSubset
): [PDFName, PDFRef] => {
	const name = PDFName.of(`${tagOf(subset.bytes)}+${face.postScriptName}`);
	const scaled = (value: number): number => Math.round((value * 1000) / face.unitsPerEm);
	const set = cidSet(subset.glyphs.length);
	const descriptor = context.obj({
		Type: 'FontDescriptor',
		FontName: name,
		Flags: SYMBOLIC,
		FontBBox: face.box.map(scaled),
		ItalicAngle: 0,
		Ascent: scaled(face.ascent),
		Descent: scaled(face.descent),
		CapHeight: 700,
		StemV: 80,
		FontFile2: writePacked(context, program, { Length1: subset.bytes.length }),
		CIDSet: context.register(PDFRawStream.of(context.obj({ Length: set.length }), set))
	});
	return [name, context.register(descriptor)];
};

/**
 * Embeds a subset as a composite font with glyph numbers for codes.
 * @param context the file under construction
 * @param face the face that the subset is of
 * @param part its glyphs, packed
 * @returns the font's reference, for a page's resources
 * @example embedSubset(context, face, packSubset(face, [0x3a9]))
 * Source: PDF Reference 1.4, 5.6; ISO 19005-1, 6.3.
 */
export function embedSubset(context: PDFContext, face: TrueType, part: PackedSubset): PDFRef {
	const [name, descriptor] = writeDescriptor(context, face, part);
	const widths = part.subset.glyphs.map((glyph) =>
		Math.round((face.metricsOf(glyph)[0] * 1000) / face.unitsPerEm)
	);
	const descendant = context.obj({
		Type: 'Font',
		Subtype: 'CIDFontType2',
		BaseFont: name,
		CIDSystemInfo: {
			Registry: PDFString.of('Adobe'),
			Ordering: PDFString.of('Identity'),
			Supplement: 0
		},
		FontDescriptor: descriptor,
		DW: 1000,
		W: [0, widths],
		CIDToGIDMap: 'Identity'
	});
	return context.register(
		context.obj({
			Type: 'Font',
			Subtype: 'Type0',
			BaseFont: name,
			Encoding: 'Identity-H',
			DescendantFonts: [context.register(descendant)],
			ToUnicode: writePacked(context, part.unicode)
		})
	);
}
