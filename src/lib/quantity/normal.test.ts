import { describe, expect, it } from 'vitest';
import { standardNormal } from './normal';

// 0 … 1.96: Abramowitz and Stegun, table 26.1 (recalled); the others with the C library’s erfc.
describe('standardNormal', () => {
	it.each([
		[0, 0.5],
		[1, 0.841344746068543],
		[-1, 0.158655253931457],
		[1.959963984540054, 0.975],
		[2.999, 0.9986456634662729],
		[3.001, 0.998654527174915],
		[-6, 9.865876450376946e-10]
	])('Φ(%d) = %d', (x, p) => {
		expect(Math.abs(standardNormal(x) / p - 1)).toBeLessThan(1e-12);
	});
	it('ends at 0 and 1', () => {
		expect([
			standardNormal(-Infinity),
			standardNormal(-50),
			standardNormal(50),
			standardNormal(Infinity)
		]).toEqual([0, 0, 1, 1]);
	});
});
