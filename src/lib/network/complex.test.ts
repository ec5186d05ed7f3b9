import { describe, expect, it } from 'vitest';
import { add, divide, magnitude, multiply, parallel, phase, reciprocal, subtract } from './complex';

const a = { re: 1, im: 2 };
const b = { re: 3, im: -1 };

it('adds, subtracts, multiplies and divides', () => {
	expect(add(a, b)).toEqual({ re: 4, im: 1 });
	expect(subtract(a, b)).toEqual({ re: -2, im: 3 });
	expect(multiply(a, b)).toEqual({ re: 5, im: 5 });
	expect(divide({ re: 5, im: 5 }, b)).toEqual({ re: 1, im: 2 });
});

it('tells magnitude and phase', () => {
	expect(magnitude({ re: 3, im: 4 })).toBe(5);
	expect(phase({ re: 0, im: 2 })).toBe(Math.PI / 2);
	expect(phase({ re: -1, im: 0 })).toBe(Math.PI);
});

describe('connections', () => {
	it.each([
		[
			{ re: 0, im: 2 },
			{ re: 0, im: -0.5 }
		],
		[
			{ re: 4, im: 0 },
			{ re: 0.25, im: -0 }
		],
		[
			{ re: 0, im: 0 },
			{ re: Infinity, im: 0 }
		]
	])('reciprocal of %j', (value, expected) => {
		expect(reciprocal(value)).toEqual(expected);
	});
	it.each([
		[
			{ re: 100, im: 0 },
			{ re: 0, im: 100 },
			{ re: 50, im: 50 }
		],
		[
			{ re: 0, im: 0 },
			{ re: 7, im: 1 },
			{ re: 0, im: 0 }
		],
		[
			{ re: 0, im: 3 },
			{ re: 0, im: -3 },
			{ re: Infinity, im: 0 }
		]
	])('%j beside %j', (one, other, expected) => {
		expect(parallel(one, other)).toEqual(expected);
	});
});
