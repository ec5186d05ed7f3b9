import { describe, expect, it } from 'vitest';
import { coarsestSeries, preferredValues, SERIES, SERIES_NAMES } from '$lib/quantity/series';
import published from './series.json';

describe('preferred values against the published lists of IEC 60063', () => {
	it.each(SERIES_NAMES)('%s', (name) => {
		expect(SERIES[name]).toEqual(published.series[name]);
		expect(SERIES[name]).toHaveLength(Number(name.slice(1)));
	});

	it.each(['E48', 'E96', 'E192'] as const)('%s follows round(10^(k/m)), but for 9.20', (name) => {
		const size = published.series[name].length;
		const odd = published.series[name].filter(
			(value, k) => value !== Math.round(100 * 10 ** (k / size)) / 100
		);
		expect(odd).toEqual(name === 'E192' ? [9.2] : []);
	});

	it('E24 departs from the formula in eight values', () => {
		const odd = published.series.E24.filter((value, k) => value !== Math.round(10 * 10 ** (k / 24)) / 10);
		expect(odd).toEqual([2.7, 3.0, 3.3, 3.6, 3.9, 4.3, 4.7, 8.2]);
	});

	it('4.7 is in E24 and E192 but lies between two values of E96', () => {
		expect(published.series.E192).toContain(4.7);
		expect(preferredValues('E96', 4.6, 4.8)).toEqual([4.64, 4.75]);
		expect(coarsestSeries(4.7)).toBe('E3');
	});
});
