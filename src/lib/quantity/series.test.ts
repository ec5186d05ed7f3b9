import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	coarsestSeries,
	nearestPreferred,
	preferredValues,
	SERIES,
	SERIES_NAMES,
	stepPreferred,
	type SeriesName
} from './series';

const values = fc.double({ min: 1e-12, max: 0.1, noNaN: true });
const series = fc.constantFrom(...SERIES_NAMES);

describe('preferredValues', () => {
	it.each([
		['E6', 280.7e-9, 360e-9, [330e-9]],
		['E6', 330e-9, 330e-9, [330e-9]],
		['E12', 4.009e-6, 6e-6, [4.7e-6, 5.6e-6]],
		['E24', 168.4e-9, 205e-9, [180e-9, 200e-9]],
		['E24', 168.4e-9, 173e-9, []],
		['E3', 9e-7, 2.2e-5, [1e-6, 2.2e-6, 4.7e-6, 1e-5, 2.2e-5]],
		['E6', 360e-9, 280e-9, []],
		// An edge computed as 0.33 · 1e-6 is a bit above the value itself.
		['E6', 0.33 * 1e-6 * (1 + 4e-16), 4e-7, [330e-9]]
	] as [SeriesName, number, number, number[]][])('%s from %d to %d', (name, from, to, expected) => {
		expect(preferredValues(name, from, to)).toEqual(expected);
	});

	it('gives the nearest double to each decimal', () => {
		expect(preferredValues('E24', 1e-12, 0.1)).toEqual(
			Array.from({ length: 11 }, (_, decade) =>
				SERIES.E24.map((m) => Number(`${String(m)}e${String(decade - 12)}`))
			)
				.flat()
				.concat(0.1)
		);
	});

	it.each([
		[0, 1],
		[NaN, 1],
		[1, Infinity]
	])('refuses %d … %d', (from, to) => {
		expect(() => preferredValues('E6', from, to)).toThrow(RangeError);
	});
});

describe('nearestPreferred', () => {
	it.each([
		[318e-9, 'E6', 330e-9],
		[9.9, 'E6', 10],
		[8.1, 'E6', 6.8],
		[8.3, 'E6', 10],
		[4.7, 'E96', 4.75],
		[1e-12, 'E3', 1e-12]
	] as [number, SeriesName, number][])('of %d in %s', (value, name, expected) => {
		expect(nearestPreferred(value, name)).toBe(expected);
	});

	it('is no further, by ratio, than any neighbour', () => {
		fc.assert(
			fc.property(values, series, (value, name) => {
				const nearest = nearestPreferred(value, name);
				const away = (other: number): number => Math.abs(Math.log(other / value));
				expect(away(nearest)).toBeLessThanOrEqual(away(stepPreferred(nearest, name, 1)) + 1e-12);
				expect(away(nearest)).toBeLessThanOrEqual(away(stepPreferred(nearest, name, -1)) + 1e-12);
			})
		);
	});
});

describe('stepPreferred', () => {
	it.each([
		[330e-9, 'E12', 1, 390e-9],
		[330e-9, 'E12', -1, 270e-9],
		[350e-9, 'E12', 1, 390e-9],
		[350e-9, 'E12', -1, 330e-9],
		[350e-9, 'E12', 0, 350e-9],
		[1e-6, 'E3', -1, 470e-9],
		[1e-6, 'E3', 3, 1e-5],
		[9.1e-6, 'E24', 1, 1e-5]
	] as [number, SeriesName, number, number][])('from %d in %s by %d', (value, name, steps, expected) => {
		expect(stepPreferred(value, name, steps)).toBe(expected);
	});

	it('comes back', () => {
		fc.assert(
			fc.property(values, series, fc.integer({ min: 1, max: 300 }), (value, name, steps) => {
				const start = nearestPreferred(value, name);
				expect(stepPreferred(stepPreferred(start, name, steps), name, -steps)).toBe(start);
			})
		);
	});

	it('refuses half a step', () => {
		expect(() => stepPreferred(1, 'E6', 0.5)).toThrow(RangeError);
	});
});

describe('coarsestSeries', () => {
	it.each([
		[4.7e-6, 'E3'],
		[1e-12, 'E3'],
		[330e-9, 'E6'],
		[5.6e-6, 'E12'],
		[5.1e-6, 'E24'],
		[4.64e-9, 'E48'],
		[4.75e-9, 'E96'],
		[9.2e-9, 'E192'],
		[9.19e-9, null],
		[331e-9, null],
		[3.3000001e-7, null],
		[0, null],
		[-1, null],
		[NaN, null],
		[Infinity, null]
	])('of %d', (value, expected) => {
		expect(coarsestSeries(value)).toBe(expected);
	});
});
