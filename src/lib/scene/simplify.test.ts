import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { simplify } from './simplify';

const distance = (at: readonly number[], x: number, y: number): number => {
	let least = Infinity;
	for (let i = 0; i + 3 < at.length; i += 2) {
		const [x0 = 0, y0 = 0, x1 = 0, y1 = 0] = at.slice(i, i + 4);
		const length = (x1 - x0) ** 2 + (y1 - y0) ** 2;
		const t = length === 0 ? 0 : ((x - x0) * (x1 - x0) + (y - y0) * (y1 - y0)) / length;
		const u = Math.min(1, Math.max(0, t));
		least = Math.min(least, Math.hypot(x - x0 - u * (x1 - x0), y - y0 - u * (y1 - y0)));
	}
	return least;
};

describe('simplify', () => {
	it.each([
		['a bump under the tolerance', [0, 0, 5, 0.009, 10, 0], [0, 0, 10, 0]],
		['a bump over the tolerance', [0, 0, 5, 0.011, 10, 0], [0, 0, 5, 0.011, 10, 0]],
		['a line that turns back on itself', [0, 0, 10, 0, 4, 0], [0, 0, 10, 0, 4, 0]],
		['two points', [0, 0, 1, 1], [0, 0, 1, 1]],
		['nothing', [], []]
	])('treats %s', (_, at, expected) => {
		expect(simplify(at)).toEqual(expected);
	});

	it('keeps every dropped point within the tolerance, and both ends', () => {
		const point = fc.double({ min: 0, max: 300, noNaN: true });
		fc.assert(
			fc.property(
				fc.array(fc.tuple(point, point), { minLength: 2, maxLength: 40 }),
				fc.double({ min: 0.01, max: 40, noNaN: true }),
				(points, tolerance) => {
					const at = points.flat();
					const kept = simplify(at, tolerance);
					expect(kept.slice(0, 2)).toEqual(at.slice(0, 2));
					expect(kept.slice(-2)).toEqual(at.slice(-2));
					for (const [x, y] of points) expect(distance(kept, x, y)).toBeLessThanOrEqual(tolerance + 1e-9);
				}
			)
		);
	});

	it('refuses a negative tolerance', () => {
		expect(() => simplify([0, 0, 1, 1], -1)).toThrow(RangeError);
	});
});
