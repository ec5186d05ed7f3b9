import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { derivative, plus, product, rootsOf, valueAt } from './polynomial';
import { goldenMinimum, signChange } from './search';

describe('minimum and sign change', () => {
	it('finds the bottom of a valley', () => {
		expect(goldenMinimum((x) => (x - 2) ** 2 + 1, 0, 5, 1e-14)).toBeCloseTo(2, 6);
		expect(goldenMinimum((x) => x, 1, 2, 1e-12)).toBeCloseTo(1, 9);
	});
	it.each([
		['a root', (x: number) => x * x - 2, 1, 2, Math.SQRT2],
		['a root beside a flat', (x: number) => (x - 1) ** 9, 0, 5, 1],
		['a pole', (x: number) => 1 / (x - 1.3), 1, 2, 1.3],
		['a step', (x: number) => (x < 1.7 ? -1 : 1), 1, 2, 1.7]
	])('finds %s', (_, of, from, to, expected) => {
		expect(signChange(of, from, to)).toBeCloseTo(expected, 9);
	});
});

describe('polynomials', () => {
	it('add, multiply, derive and evaluate', () => {
		expect(plus([1, 2], [0, 1, 3])).toEqual([1, 3, 3]);
		expect(product([1, 2], [3, 4, 5])).toEqual([3, 10, 13, 10]);
		expect(derivative([5, 1, 3])).toEqual([1, 6]);
		expect(valueAt([1, 0, 1], { re: 0, im: 1 })).toEqual({ re: 0, im: 0 });
	});

	it.each([
		['real', [6, 5, 1], [-3, -2]],
		['far apart', product([1, 1], [1, 1e-9]), [-1e9, -1]]
	])('have %s roots', (_, of, expected) => {
		const found = rootsOf(of).map(({ re }) => re);
		expect(found).toHaveLength(2);
		found
			.sort((a, b) => a - b)
			.forEach((root, index) => {
				expect(root / (expected[index] ?? NaN)).toBeCloseTo(1, 12);
			});
	});

	it('set two equal roots a little apart', () => {
		const [one, two] = rootsOf([1, 2, 1]);
		expect(one?.re).toBeCloseTo(-1, 7);
		expect(two?.re).toBeCloseTo(-1, 7);
		expect(one).not.toEqual(two);
	});

	it('give back the roots they were made of, from slow to fast', () => {
		const size = fc.double({ min: 2, max: 10, noNaN: true }).map((power) => 10 ** power);
		const pair = fc.tuple(size, fc.double({ min: 1e-6, max: 0.99, noNaN: true }));
		fc.assert(
			fc.property(pair, pair, size, ([a, damped], [b, other], real) => {
				const factor = (w: number, zeta: number) => [1, (2 * zeta) / w, 1 / (w * w)];
				const of = product(product(factor(a, damped), factor(b, other)), [1, 1 / real]);
				// Roots that nearly meet are known to half the digits only.
				fc.pre(Math.abs(Math.log(a / b)) > 0.05 && [a, b].every((w) => Math.abs(Math.log(w / real)) > 0.05));
				const found = rootsOf(of);
				expect(found).toHaveLength(5);
				for (const [w, zeta] of [
					[a, damped],
					[b, other],
					[real, 1]
				] as const) {
					const [re, im] = [-zeta * w, w * Math.sqrt(1 - zeta * zeta)];
					const miss = Math.min(...found.map((root) => Math.hypot(root.re - re, root.im - im)));
					expect(miss / w).toBeLessThan(1e-9);
				}
			})
		);
	});

	it.each([[[0, 1]], [[1, 0]], [[1, NaN]]])('refuse to be solved: %j', (of) => {
		expect(() => rootsOf(of)).toThrow(RangeError);
	});
});
