import { describe, expect, it } from 'vitest';
import { shiftText, stepText } from './stepping';

const plain = (text: string | null): string | null => text?.replaceAll('\u00a0', ' ') ?? null;

describe('arrow keys', () => {
	it.each([
		['330 nF', 'capacitance', 'E6', 1, '470 nF'],
		['330 nF', 'capacitance', 'E6', -1, '220 nF'],
		['680n', 'capacitance', 'E6', 1, '1 µF'],
		['300 nF', 'capacitance', 'E6', 1, '330 nF'],
		['10 %', 'fraction', 'E6', 1, '15 %'],
		['0 %', 'fraction', 'E6', 1, '1 %'],
		['5', 'number', 'E6', -1, '4'],
		['1.15', 'number', 'E6', 1, '1.2'],
		['1', 'number', 'E6', -1, '1'],
		['6 dB', 'gain', 'E6', 1, '7 dB'],
		['2,200', 'capacitance', 'E6', 1, null]
	] as const)('%s (%s, %s) by %i is %s', (text, quantity, series, by, expected) => {
		expect(plain(stepText(text, quantity, series, by))).toBe(expected);
	});

	it.each([
		['330 nF', 1, '3.3 µF'],
		['330 nF', -1, '33 nF'],
		['x', 1, null]
	] as const)('%s by %i decades is %s', (text, decades, expected) => {
		expect(plain(shiftText(text, 'capacitance', decades))).toBe(expected);
	});
});
