import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { subsetFace } from './subset';
import { readTrueType, viewOf } from './truetype';
import { webTables } from './webface';

const face = readTrueType(readFileSync('static/fonts/barlow-sheet-regular.ttf'));
const charactersOf = (text: string): Map<number, number> =>
	new Map([...text].map((c) => [c.codePointAt(0) ?? 0, face.glyphOf(c.codePointAt(0) ?? 0)]));
const subset = (text: string) =>
	subsetFace(
		face,
		charactersOf(text),
		webTables(face, [
			[1, 'A'],
			[6, 'A-B']
		])
	);

/** Sum of a file's words, which a sound TrueType file makes a fixed number. */
const sum = (bytes: Uint8Array): number => {
	let total = 0;
	for (let at = 0; at < bytes.length; at += 4) total = (total + viewOf(bytes).getUint32(at)) >>> 0;
	return total;
};

describe('subsetFace', () => {
	it('can be read again, with the same widths and names', () => {
		const again = readTrueType(subset('10 kΩ, Größe Łódź').bytes);
		expect(again.postScriptName).toBe('A-B');
		for (const [code, glyph] of charactersOf('10 kΩ, Größe Łódź')) {
			expect(again.metricsOf(again.glyphOf(code))).toEqual(face.metricsOf(glyph));
		}
		expect(again.glyphOf(0x41)).toBe(0);
		expect(again.codePoints).toEqual([...charactersOf('10 kΩ, Größe Łódź').keys()].sort((a, b) => a - b));
	});

	it('orders glyphs by code point, after .notdef, and adds what they are composed of', () => {
		const { characters, glyphs } = subset('BA');
		expect([...characters]).toEqual([
			[0x41, 1],
			[0x42, 2]
		]);
		expect(glyphs).toHaveLength(3);
		expect(subset('.:').glyphs.length).toBeGreaterThan(3);
	});

	it('leaves the face as it was', () => {
		const first = subset('.·:Ä');
		subset('ÄÖÜ .');
		expect(Buffer.compare(subset('.·:Ä').bytes, first.bytes)).toBe(0);
	});

	it('has the check sum of a sound file', () => {
		expect(sum(subset('Ω').bytes)).toBe(0xb1b0afba);
	});

	it('is refused for a file of another kind', () => {
		expect(() => readTrueType(new Uint8Array(64))).toThrow(RangeError);
	});
});
