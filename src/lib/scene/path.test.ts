import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { PathBuilder } from './path';

const on = (draw: (path: PathBuilder) => unknown) => {
	const path = new PathBuilder();
	draw(path);
	return path.data();
};

/** Point of a cubic curve at t. */
const cubic = (t: number, p: readonly number[]): [number, number] => {
	const weights = [(1 - t) ** 3, 3 * (1 - t) ** 2 * t, 3 * (1 - t) * t * t, t ** 3];
	const along = (first: number) => weights.reduce((sum, w, i) => sum + w * (p[2 * i + first] ?? NaN), 0);
	return [along(0), along(1)];
};

describe('PathBuilder', () => {
	const table = [
		['lines', (p: PathBuilder) => p.moveTo(0, 1).lineTo(2, 3), 'ML', [0, 1, 2, 3]],
		['a line without a start', (p: PathBuilder) => p.lineTo(2, 3), 'M', [2, 3]],
		['a rectangle', (p: PathBuilder) => p.rect(1, 2, 3, 4), 'MLLLZ', [1, 2, 4, 2, 4, 6, 1, 6]],
		[
			'a quadratic curve, raised to a cubic one',
			(p: PathBuilder) => p.moveTo(0, 0).quadraticCurveTo(3, 3, 6, 0),
			'MC',
			[0, 0, 2, 2, 4, 2, 6, 0]
		],
		['a path that is closed twice', (p: PathBuilder) => p.rect(0, 0, 1, 1).closePath(), 'MLLLZ', null],
		['nothing', (p: PathBuilder) => p.closePath(), '', []],
		['a full circle', (p: PathBuilder) => p.arc(0, 0, 1, 0, 2 * Math.PI), 'MCCCC', null],
		['a quarter', (p: PathBuilder) => p.arc(0, 0, 1, 0, Math.PI / 2), 'MC', null],
		['an arc from where the pen is', (p: PathBuilder) => p.moveTo(1, 0).arc(0, 0, 1, 0, 1), 'MC', null],
		['an arc after a line', (p: PathBuilder) => p.moveTo(5, 5).arc(0, 0, 1, 0, 1), 'MLC', null],
		['a corner without a radius', (p: PathBuilder) => p.moveTo(0, 0).arcTo(1, 0, 1, 1, 0), 'ML', [0, 0, 1, 0]]
	] as const;
	it.each(table)('draws %s', (_, draw, ops, at) => {
		const data = on(draw);
		expect(data.ops).toBe(ops);
		if (at !== null) expect(data.at).toEqual(at);
	});

	it('goes on from the start of a closed path', () => {
		const { at } = on((p) => p.moveTo(1, 1).lineTo(9, 1).closePath().quadraticCurveTo(1, 4, 1, 7));
		expect(at.slice(4)).toEqual([1, 3, 1, 5, 1, 7]);
	});

	it('keeps arcs within 0.03 % of the radius of the circle', () => {
		fc.assert(
			fc.property(
				fc.double({ min: 0.1, max: 200, noNaN: true }),
				fc.double({ min: -7, max: 7, noNaN: true }),
				fc.double({ min: -7, max: 7, noNaN: true }),
				fc.boolean(),
				(radius, start, end, anticlockwise) => {
					const { ops, at } = on((p) => p.arc(10, 20, radius, start, end, anticlockwise));
					expect(at.length).toBe(2 + 6 * (ops.length - 1));
					for (let curve = 0; curve < ops.length - 1; curve += 1) {
						const points = at.slice(6 * curve, 6 * curve + 8);
						for (const t of [0.2, 0.5, 0.8, 1]) {
							const [x, y] = cubic(t, points);
							expect(Math.abs(Math.hypot(x - 10, y - 20) - radius)).toBeLessThan(3e-4 * radius);
						}
					}
					const turn = anticlockwise ? start - end : end - start;
					if (Math.abs(turn) < 2 * Math.PI) {
						expect(at.at(-2)).toBeCloseTo(10 + radius * Math.cos(end), 8);
						expect(at.at(-1)).toBeCloseTo(20 + radius * Math.sin(end), 8);
					}
				}
			)
		);
	});

	it('rounds corners to the right and to the left', () => {
		const right = on((p) => p.moveTo(0, 0).arcTo(10, 0, 10, 10, 2)).at.map((v) => Number(v.toFixed(6)));
		expect(right.slice(2, 4)).toEqual([8, 0]);
		expect(right.slice(-2)).toEqual([10, 2]);
		const left = on((p) => p.moveTo(0, 0).arcTo(10, 0, 10, -10, 2)).at.map((v) => Number(v.toFixed(6)));
		expect(left.slice(2, 4)).toEqual([8, 0]);
		expect(left.slice(-2)).toEqual([10, -2]);
	});

	it('refuses a negative radius', () => {
		expect(() => new PathBuilder().arc(0, 0, -1, 0, 1)).toThrow(RangeError);
	});
});
