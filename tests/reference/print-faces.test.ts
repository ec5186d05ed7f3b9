/** The shipped faces are what is made from Barlow as published, and the table of widths is theirs. */
import { readFileSync } from 'node:fs';
import fontkit from '@pdf-lib/fontkit';
import subsetFont from 'subset-font';
import { describe, expect, it } from 'vitest';
import { CHARACTERS, WIDTHS } from '../../src/lib/scene/barlow';
import { CAP_RATIO } from '../../src/lib/scene/metrics';
import { colourProfile } from '../../src/lib/render/pdf-profile';
import type { Face } from '../../src/lib/scene/scene';
import { makeFace, publishedFace, widthsOf } from './print-faces';

interface Reader {
	readonly postscriptName: string;
	readonly capHeight: number;
	readonly unitsPerEm: number;
	readonly availableFeatures: readonly string[];
	readonly 'OS/2': { readonly usWeightClass: number };
	glyphForCodePoint(code: number): { readonly advanceWidth: number; readonly path: { toSVG(): string } };
	layout(
		text: string,
		features?: readonly string[]
	): {
		readonly glyphs: readonly { readonly path: { toSVG(): string } }[];
	};
}

const shipped = (face: Face) => readFileSync(`static/fonts/barlow-sheet-${face}.ttf`);
const read = (bytes: Buffer): Reader => fontkit.create(bytes) as unknown as Reader;

describe.each([
	['regular', 400],
	['medium', 500],
	['semibold', 600],
	['bold', 700]
] as const)('barlow-sheet-%s', (face, weight) => {
	const reader = read(shipped(face));

	it('is made from the published face', () => {
		expect(Buffer.compare(shipped(face), makeFace(face))).toBe(0);
	});

	it('has the widths of the table, and the published ones', () => {
		const widths = [...CHARACTERS].map((c) => reader.glyphForCodePoint(c.codePointAt(0) ?? 0).advanceWidth);
		expect(widths).toEqual(WIDTHS[face]);
		expect(widthsOf(face)).toEqual(WIDTHS[face]);
	});

	it('has the published outlines, with the tabular figures', () => {
		const published = publishedFace(face).reader as unknown as Reader;
		for (const character of CHARACTERS) {
			const features = /\d/.test(character) ? ['tnum'] : [];
			const outline = published.layout(character, features).glyphs[0]?.path.toSVG();
			expect(reader.glyphForCodePoint(character.codePointAt(0) ?? 0).path.toSVG(), character).toBe(outline);
		}
	});

	it('is the same packed for browsers', async () => {
		const packed = readFileSync(`static/fonts/barlow-sheet-${face}.woff2`);
		expect(packed.subarray(0, 4).toString()).toBe('wOF2');
		const web = read(await subsetFont(packed, CHARACTERS, { targetFormat: 'truetype' }));
		for (const character of CHARACTERS) {
			const code = character.codePointAt(0) ?? 0;
			expect(web.glyphForCodePoint(code).advanceWidth).toBe(reader.glyphForCodePoint(code).advanceWidth);
		}
	});

	it('has its weight, its capital height and no layout features', () => {
		expect(reader['OS/2'].usWeightClass).toBe(weight);
		expect(reader.capHeight / reader.unitsPerEm).toBe(CAP_RATIO);
		expect(reader.availableFeatures).toEqual([]);
	});
});

describe('the colour profile', () => {
	// Colourants of sRGB from the chromaticities of IEC 61966-2-1, adapted from D65 to D50 by Bradford.
	type Triple = readonly [number, number, number];
	type Matrix = readonly [Triple, Triple, Triple];
	const times = (m: Matrix, v: Triple): Triple => {
		const row = (r: Triple): number => r[0] * v[0] + r[1] * v[1] + r[2] * v[2];
		return [row(m[0]), row(m[1]), row(m[2])];
	};
	const inverse = ([[a, b, c], [d, e, f], [g, h, i]]: Matrix): Matrix => {
		const det = a * (e * i - f * h) - b * (d * i - f * g) + c * (d * h - e * g);
		const over = (n: number): number => n / det;
		return [
			[over(e * i - f * h), over(c * h - b * i), over(b * f - c * e)],
			[over(f * g - d * i), over(a * i - c * g), over(c * d - a * f)],
			[over(d * h - e * g), over(b * g - a * h), over(a * e - b * d)]
		];
	};
	const xyz = (x: number, y: number): Triple => [x / y, 1, (1 - x - y) / y];
	const bradford: Matrix = [
		[0.8951, 0.2664, -0.1614],
		[-0.7502, 1.7135, 0.0367],
		[0.0389, -0.0685, 1.0296]
	];

	it('has the primaries of sRGB', () => {
		const profile = Buffer.from(colourProfile());
		const primaries = [xyz(0.64, 0.33), xyz(0.3, 0.6), xyz(0.15, 0.06)] as const;
		const [white, d50] = [xyz(0.3127, 0.329), [0.9642, 1, 0.8249]] as const;
		const [r, g, b] = primaries;
		const amounts = times(
			inverse([
				[r[0], g[0], b[0]],
				[r[1], g[1], b[1]],
				[r[2], g[2], b[2]]
			]),
			white
		);
		const [from, to] = [times(bradford, white), times(bradford, d50)];
		primaries.forEach((primary, index) => {
			const cone = times(bradford, [
				primary[0] * (amounts[index] ?? 0),
				primary[1] * (amounts[index] ?? 0),
				primary[2] * (amounts[index] ?? 0)
			]);
			const adapted = times(inverse(bradford), [
				(cone[0] * to[0]) / from[0],
				(cone[1] * to[1]) / from[1],
				(cone[2] * to[2]) / from[2]
			]);
			const tag = ['rXYZ', 'gXYZ', 'bXYZ'][index] ?? '';
			const at = profile.readUInt32BE(profile.indexOf(tag, 128) + 4) + 8;
			adapted.forEach((value, part) => {
				expect(profile.readInt32BE(at + 4 * part) / 65536, tag).toBeCloseTo(value, 3);
			});
		});
		expect(profile.readUInt32BE(0)).toBe(profile.length);
	});
});
