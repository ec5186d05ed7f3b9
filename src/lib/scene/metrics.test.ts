import { describe, expect, it } from 'vitest';
import { CAP_RATIO, missingCharacters, normaliseText, textWidth } from './metrics';

describe('textWidth', () => {
	// Advance widths as fontkit reads them from the published faces, tabular figures.
	it.each([
		['0', 'regular', 527],
		['1111', 'regular', 4 * 527],
		['88', 'medium', 2 * 533],
		['7', 'semibold', 538],
		['4', 'bold', 544],
		['Ω', 'regular', 641],
		['\u2126', 'regular', 641],
		['µ', 'bold', 551],
		['\u03bc', 'bold', 551],
		['−', 'regular', 500],
		['A\u0308', 'regular', textWidth('Ä', 'regular', CAP_RATIO) * 1000],
		['', 'regular', 0]
	] as const)('measures %s in %s', (text, face, thousandths) => {
		expect(textWidth(text, face, CAP_RATIO)).toBeCloseTo(thousandths / 1000, 12);
	});

	it('grows with the capital height', () => {
		expect(textWidth('2.2 µF', 'bold', 5)).toBeCloseTo(2 * textWidth('2.2 µF', 'bold', 2.5), 12);
	});
});

describe('normaliseText', () => {
	it.each([
		['\u2126', 'Ω'],
		['\u03bcF', 'µF'],
		['u\u0308', 'ü'],
		['2\u202f200', '2\u00a0200'],
		['a\u2002b', 'a\u00a0\u00a0b'],
		['a\nb\tc', 'a b c'],
		['EN\u201160384', 'EN-60384'],
		['plain', 'plain']
	])('writes %j as %j', (text, expected) => {
		expect(normaliseText(text)).toBe(expected);
	});
});

describe('missingCharacters', () => {
	it.each([
		['R ∥ C → C₀', ['∥', '→', '₀']],
		['電源 電', ['電', '源']],
		['👍', ['👍']],
		['e\u0300\u0333', ['\u0333']],
		['a\u0000b\u200bc', ['\u0000', '\u200b']],
		['\ud800', ['\ud800']],
		['Größe Łódź Ağrı Őr Șura Việt 2.2 µF ≤ 10 kΩ ±10 % π√(L·C) ² ½ ° ∞ – — “x”', []]
	])('finds in %j what the faces lack', (text, expected) => {
		expect(missingCharacters(text)).toEqual(expected);
	});
});
