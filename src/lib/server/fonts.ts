/** The sheet's faces on the server: read once, whole for PDF, in subsets for an SVG that stands alone. */
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { deflateSync } from 'node:zlib';
import { gatherCharacters } from '$lib/render/pdf-content';
import type { FontSet } from '$lib/render/pdf-font';
import { subsetFace } from '$lib/render/subset';
import { FONT_FAMILY } from '$lib/render/svg';
import { readTrueType, viewOf, type TrueType } from '$lib/render/truetype';
import { webTables } from '$lib/render/webface';
import type { Face, Scene } from '$lib/scene/scene';

let fonts: FontSet | undefined;

/** Beside the sources, or among the files of a build. */
const folders = ['static/fonts', 'build/client/fonts'];

const readFace = (face: Face): TrueType => {
	const files = folders.map((folder) => join(process.cwd(), folder, `barlow-sheet-${face}.ttf`));
	const file = files.find((candidate) => existsSync(candidate));
	if (file === undefined) throw new Error(`the sheet's face is missing: ${files.join(' or ')}`);
	return readTrueType(readFileSync(file));
};

/**
 * Gives the four faces that sheets are set in, read from disk once.
 * @returns the faces
 * @throws Error when a file is missing
 * @example sheetFonts().bold.unitsPerEm // 1000
 */
export function sheetFonts(): FontSet {
	fonts ??= {
		regular: readFace('regular'),
		medium: readFace('medium'),
		semibold: readFace('semibold'),
		bold: readFace('bold')
	};
	return fonts;
}

/** Wraps a TrueType file as WOFF 1.0: each table deflated by itself. */
const woffOf = (file: Uint8Array): Uint8Array => {
	const source = viewOf(file);
	const count = source.getUint16(4);
	const heading = new Uint8Array(44 + 20 * count);
	const view = viewOf(heading);
	const parts: Uint8Array[] = [heading];
	let at = heading.length;
	for (let index = 0; index < count; index += 1) {
		const entry = 12 + 16 * index;
		const [offset, length] = [source.getUint32(entry + 8), source.getUint32(entry + 12)];
		const plain = file.subarray(offset, offset + length);
		const packed = deflateSync(plain);
		const stored = packed.length < length ? packed : plain;
		const place = 44 + 20 * index;
		heading.set(file.subarray(entry, entry + 4), place);
		[at, stored.length, length, source.getUint32(entry + 4)].forEach((value, field) => {
			view.setUint32(place + 4 + 4 * field, value);
		});
		parts.push(stored, new Uint8Array(-stored.length & 3));
		at += (stored.length + 3) & ~3;
	}
	view.setUint32(0, 0x774f4646);
	view.setUint32(4, 0x00010000);
	view.setUint32(8, at);
	view.setUint16(12, count);
	view.setUint32(16, file.length);
	view.setUint16(20, 1);
	return Buffer.concat(parts);
};

const weights: Readonly<Record<Face, number>> = { regular: 400, medium: 500, semibold: 600, bold: 700 };

/** Sheets of one design set the same characters again and again. */
const KEPT = 64;
const embedded = new Map<string, string>();

const faceRule = (face: Face, codes: readonly number[]): string => {
	const font = sheetFonts()[face];
	const known = codes.flatMap((code): [number, number][] => {
		const glyph = font.glyphOf(code);
		return glyph === 0 ? [] : [[code, glyph]];
	});
	if (known.length === 0) return '';
	const names = [[1, FONT_FAMILY] as const, [2, 'Regular'] as const, [6, font.postScriptName] as const];
	const { bytes } = subsetFace(font, new Map(known), webTables(font, names));
	const data = Buffer.from(woffOf(bytes)).toString('base64');
	return `@font-face{font-family:"${FONT_FAMILY}";font-weight:${String(weights[face])};src:url(data:font/woff;base64,${data}) format("woff")}`;
};

const keptRule = (face: Face, codes: readonly number[]): string => {
	const key = `${face} ${String.fromCodePoint(...codes)}`;
	const rule = embedded.get(key) ?? faceRule(face, codes);
	embedded.delete(key);
	embedded.set(key, rule);
	const [oldest] = embedded.keys();
	if (embedded.size > KEPT && oldest !== undefined) embedded.delete(oldest);
	return rule;
};

/**
 * Makes the rules that embed what a drawing sets, so that its SVG looks alike where Barlow is not installed.
 * @param scene the drawing
 * @returns one rule for each face in use, with the file in a data address
 * @example toSvg(scene, { fontCss: embeddedFontCss(scene) })
 * Source: WOFF File Format 1.0, W3C 2012.
 */
export function embeddedFontCss(scene: Scene): string {
	const characters = {
		regular: new Set<number>(),
		medium: new Set<number>(),
		semibold: new Set<number>(),
		bold: new Set<number>()
	};
	gatherCharacters(scene.items, characters);
	return (['regular', 'medium', 'semibold', 'bold'] as const)
		.map((face) =>
			keptRule(
				face,
				[...characters[face]].sort((a, b) => a - b)
			)
		)
		.join('');
}
