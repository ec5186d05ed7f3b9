import { describe, expect, it } from 'vitest';
import { scanBands } from './scan';

const near = (found: number | undefined, expected: number): void => {
	if (expected === 0 || expected === Infinity) expect(found).toBe(expected);
	else expect(Math.abs((found ?? NaN) / expected - 1)).toBeLessThan(1e-9);
};

/** A hill of the given width, 4 high at its top. */
const hill = (top: number, width: number) => (c: number) => 4 / (1 + (Math.log(c / top) / width) ** 2);

describe('bands of a quantity over its limit', () => {
	it.each([
		['rising', (c: number) => c / 3e-7, [[3e-7, Infinity]]],
		['falling', (c: number) => (3e-7 / c) ** 2, [[0, 3e-7]]],
		['never', () => 0.5, []],
		['always', () => Infinity, [[0, Infinity]]],
		[
			'one hill',
			hill(1e-7, 0.5),
			[[1e-7 * Math.exp(-0.5 * Math.sqrt(3)), 1e-7 * Math.exp(0.5 * Math.sqrt(3))]]
		],
		[
			'two hills',
			(c: number) => Math.max(hill(1e-8, 0.1)(c), hill(1e-6, 0.1)(c)),
			[1e-8, 1e-6].map((top) => [top * Math.exp(-0.1 * Math.sqrt(3)), top * Math.exp(0.1 * Math.sqrt(3))])
		]
	] as const)('%s', (_, ratio, expected) => {
		const found = scanBands(ratio);
		expect(found).toHaveLength(expected.length);
		expected.forEach(([from, to], index) => {
			near(found[index]?.from, from ?? NaN);
			near(found[index]?.to, to ?? NaN);
		});
	});

	it('does not pass over a needle that it was told of', () => {
		const needle = hill(2.2e-8, 1e-4);
		expect(scanBands(needle)).toEqual([]);
		const [band] = scanBands(needle, [2.2e-8]);
		near(band?.from, 2.2e-8 * Math.exp(-1e-4 * Math.sqrt(3)));
	});
});
