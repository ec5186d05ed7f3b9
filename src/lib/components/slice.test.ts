import { describe, expect, it } from 'vitest';
import { hatch, place } from './slice';

const axis = { low: 1e-9, high: 1e-5 };

describe('place', () => {
	it.each([
		[1e-5, 0],
		[1e-7, 40],
		[1e-9, 80],
		[0, 80],
		[Infinity, 0],
		[1e-12, 80]
	])('puts %f F at %f of 80, larger values at the left', (capacitance, expected) => {
		expect(place(capacitance, axis, 80)).toBeCloseTo(expected, 9);
	});
});

describe('hatch', () => {
	const box = { x: 10, y: 2, width: 30, height: 12 };
	const points = (path: string): number[][] =>
		[...path.matchAll(/[ML](-?[\d.]+) (-?[\d.]+)/g)].map((m) => [Number(m[1]), Number(m[2])]);

	it.each(['mandatory', 'design'] as const)('keeps every %s stroke inside its box', (ruleClass) => {
		const path = hatch(box, ruleClass, 3);
		expect(points(path).length).toBeGreaterThan(8);
		for (const [x = NaN, y = NaN] of points(path)) {
			expect(x).toBeGreaterThanOrEqual(9.99);
			expect(x).toBeLessThanOrEqual(40.01);
			expect(y).toBeGreaterThanOrEqual(1.99);
			expect(y).toBeLessThanOrEqual(14.01);
		}
	});

	it.each([
		['mandatory', 67.5],
		['design', 22.5]
	] as const)('draws %s strokes at %f degrees', (ruleClass, angle) => {
		const ends = points(hatch(box, ruleClass, 3));
		const middle = Math.floor(ends.length / 4) * 2;
		const [[x1 = 0, y1 = 0] = [], [x2 = 0, y2 = 0] = []] = ends.slice(middle, middle + 2);
		expect((Math.atan2(y1 - y2, x2 - x1) * 180) / Math.PI).toBeCloseTo(angle, 0);
	});

	it('draws nothing into an empty box and dots for advice', () => {
		expect(hatch({ ...box, width: 0 }, 'design', 3)).toBe('');
		expect(hatch({ x: 0, y: 0, width: 10, height: 5 }, 'advisory', 4)).toBe('M2 2h0M6 2h0');
	});
});
