import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import { crosses, cutAtBoxes, keepInside, orientedAt, overlapping } from './oriented';

describe('overlapping', () => {
	it.each([
		['level, apart', orientedAt(0, 0, [2, 1], 0), orientedAt(4.1, 0, [2, 1], 0), false],
		['level, touching', orientedAt(0, 0, [2, 1], 0), orientedAt(4, 0, [2, 1], 0), false],
		['turned, corner inside', orientedAt(0, 0, [2, 1], 0), orientedAt(3, 0, [2, 1], 45), true],
		['side by side at 45°', orientedAt(0, 0, [10, 1], 45), orientedAt(-1.5, 1.5, [10, 1], 45), false],
		['crossed', orientedAt(0, 0, [10, 1], 45), orientedAt(0, 0, [10, 1], -45), true]
	])('%s', (_, a, b, expected) => {
		expect(overlapping(a, b)).toBe(expected);
		expect(overlapping(b, a)).toBe(expected);
	});
});

describe('cutAtBoxes', () => {
	it('takes out the middle', () => {
		expect(cutAtBoxes([-5, 0, 5, 0], [orientedAt(0, 0, [2, 1], 0)])).toEqual([-5, 0, -2, 0, 2, 0, 5, 0]);
	});

	it('leaves nothing inside any box', () => {
		const coordinate = fc.double({ min: -20, max: 20, noNaN: true });
		const box = fc
			.tuple(coordinate, coordinate, fc.constantFrom(0, 45, -45, 22.5))
			.map(([x, y, angle]) => orientedAt(x, y, [6, 1.5], angle));
		const segment = fc.tuple(coordinate, coordinate, coordinate, coordinate);
		fc.assert(
			fc.property(fc.array(box, { maxLength: 5 }), fc.array(segment, { maxLength: 8 }), (boxes, segments) => {
				const left = cutAtBoxes(segments.flat(), boxes);
				const inner = boxes.map((one) => ({ ...one, along: one.along - 1e-6, across: one.across - 1e-6 }));
				expect(inner.some((one) => crosses(one, left))).toBe(false);
			})
		);
	});
});

describe('keepInside', () => {
	it('clips to an upright rectangle', () => {
		expect(keepInside([-5, 1, 5, 1], { x: 0, y: 0, width: 2, height: 2 })).toEqual([0, 1, 2, 1]);
		expect(keepInside([-5, 3, 5, 3], { x: 0, y: 0, width: 2, height: 2 })).toEqual([]);
	});
});
