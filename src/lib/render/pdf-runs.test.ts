import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { repeatedLines } from './pdf-runs';

/** Follows the operators and gives each stroked line's ends. */
const linesOf = (content: string): number[][] => {
	const lines: number[][] = [];
	let [ox, oy] = [0, 0];
	let start: number[] = [];
	for (const command of content.trim().split('\n')) {
		const [name = '', ...numbers] = command.split(' ').reverse();
		const [y = 0, x = 0] = numbers.map(Number);
		if (name === 'q') [ox, oy] = [0, 0];
		if (name === 'Q') [ox, oy] = [0, 0];
		if (name === 'cm') [ox, oy] = [ox + x, oy + y];
		if (name === 'm') start = [x + ox, y + oy];
		if (name === 'l') lines.push([...start, x + ox, y + oy]);
	}
	return lines;
};

describe('repeatedLines', () => {
	it('leaves a few lines as they are', () => {
		expect(repeatedLines([0, 0, 10, 0, 5, 5, 15, 5], Math.round)).toBe('0 0 m\n10 0 l\n5 5 m\n15 5 l\nS\n');
	});

	it('moves the origin along a pattern', () => {
		const at = [0, 1, 2, 3].flatMap((n) => [100 + 7 * n, 50, 116 + 7 * n, 43]);
		const step = '1 0 0 1 7 0 cm\n0 0 m\n16 -7 l\nS\n';
		expect(repeatedLines(at, Math.round)).toBe(
			`q\n1 0 0 1 100 50 cm\n0 0 m\n16 -7 l\nS\n${step.repeat(3)}Q\n`
		);
	});

	it('draws every line, off by one unit at most', () => {
		const place = fc.integer({ min: 0, max: 30000 });
		const line = fc.tuple(place, place, fc.constantFrom(160, 161, 159, 300), fc.constantFrom(-67, -66, 12));
		fc.assert(
			fc.property(fc.array(line, { minLength: 1, maxLength: 60 }), (lines) => {
				const given = lines.map(([x, y, dx, dy]) => [x, y, x + dx, y + dy]);
				const drawn = linesOf(repeatedLines(given.flat(), Math.round));
				expect(drawn).toHaveLength(given.length);
				for (const want of given) {
					const near = drawn.some((have) => have.every((v, i) => Math.abs(v - (want[i] ?? NaN)) <= 1));
					expect(near).toBe(true);
				}
			})
		);
	});
});
