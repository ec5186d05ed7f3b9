/** Real polynomials in s, lowest power first, and their roots. */
import type { Complex } from './complex';

export type Polynomial = readonly number[];

/**
 * Sum of two polynomials.
 * @param a coefficients, lowest power first, n of them
 * @param b coefficients, lowest power first, m of them
 * @returns max(n, m) coefficients
 * @example plus([1, 2], [0, 1, 3]) // [1, 3, 3]
 * @see identity
 */
export function plus(a: Polynomial, b: Polynomial): Polynomial {
	return Array.from(
		{ length: Math.max(a.length, b.length) },
		(_, power) => (a[power] ?? 0) + (b[power] ?? 0)
	);
}

/**
 * Product of two polynomials.
 * @param a coefficients, lowest power first, n of them
 * @param b coefficients, lowest power first, m of them
 * @returns n + m − 1 coefficients
 * @example product([1, 2], [0, 1]) // [0, 1, 2]
 * @see identity
 */
export function product(a: Polynomial, b: Polynomial): Polynomial {
	const result = new Array<number>(a.length + b.length - 1).fill(0);
	a.forEach((left, power) => {
		b.forEach((right, other) => {
			result[power + other] = (result[power + other] ?? 0) + left * right;
		});
	});
	return result;
}

/**
 * Value of a polynomial at a complex point, by Horner's rule.
 * @param of coefficients, lowest power first
 * @param at s
 * @returns value
 * @example valueAt([1, 0, 1], { re: 0, im: 1 }) // { re: 0, im: 0 }
 * @see identity
 */
export function valueAt(of: Polynomial, at: Complex): Complex {
	let re = 0;
	let im = 0;
	for (let power = of.length - 1; power >= 0; power -= 1)
		[re, im] = [re * at.re - im * at.im + (of[power] ?? 0), re * at.im + im * at.re];
	return { re, im };
}

/**
 * Derivative of a polynomial.
 * @param of coefficients, lowest power first, n of them
 * @returns n − 1 coefficients
 * @example derivative([5, 1, 3]) // [1, 6]
 * @see identity
 */
export function derivative(of: Polynomial): Polynomial {
	return of.slice(1).map((coefficient, index) => coefficient * (index + 1));
}

/** First guesses of the roots' sizes: the slopes of the upper hull of log |coefficient| over the power. */
const firstSizes = (of: Polynomial): number[] => {
	const hull: number[] = [];
	const height = (power: number): number => Math.log(Math.abs(of[power] ?? 0));
	const slope = (from: number, to: number): number => (height(to) - height(from)) / (to - from);
	of.forEach((coefficient, power) => {
		if (coefficient === 0) return;
		while (hull.length > 1) {
			const [before = 0, last = 0] = hull.slice(-2);
			if (slope(before, last) > slope(last, power)) break;
			hull.pop();
		}
		hull.push(power);
	});
	return hull.slice(1).flatMap((to, index) => {
		const from = hull[index] ?? 0;
		return new Array<number>(to - from).fill(Math.exp(-slope(from, to)));
	});
};

const MOST_ROUNDS = 200;

/** A root this much of its size from the axis is real but for rounding. */
const REAL = 1e-13;

/** One step of all roots; the largest relative move. */
const step = (of: Polynomial, slope: Polynomial, roots: Complex[]): number => {
	let largest = 0;
	roots.forEach((root, index) => {
		const value = valueAt(of, root);
		const size = value.re * value.re + value.im * value.im;
		if (size === 0) return;
		// With the ratio n = p′/p the step is 1/(n − Σ 1/(z − z_k)).
		const rise = valueAt(slope, root);
		let re = (rise.re * value.re + rise.im * value.im) / size;
		let im = (rise.im * value.re - rise.re * value.im) / size;
		roots.forEach((other, place) => {
			if (place === index) return;
			const [dx, dy] = [root.re - other.re, root.im - other.im];
			const square = dx * dx + dy * dy || Number.MIN_VALUE;
			re -= dx / square;
			im += dy / square;
		});
		const square = re * re + im * im;
		roots[index] = { re: root.re - re / square, im: root.im + im / square };
		largest = Math.max(largest, 1 / Math.sqrt(square) / Math.hypot(root.re, root.im));
	});
	return largest;
};

/** Conjugate partners made exactly so, roots on the axis exactly real, twins set a little apart. */
const tidied = (roots: readonly Complex[]): Complex[] => {
	const upper = roots.filter(({ re, im }) => im > REAL * Math.hypot(re, im));
	const off = ({ re, im }: Complex): number => Math.abs(im) / Math.hypot(re, im);
	const real = [...roots]
		.sort((a, b) => off(a) - off(b))
		.slice(0, roots.length - 2 * upper.length)
		.map(({ re }) => re);
	real.sort((a, b) => a - b);
	const apart = real.map((re, index) => {
		const before = real[index - 1];
		return before !== undefined && Math.abs(re - before) < 1e-9 * Math.abs(re) ? re * (1 - 1e-9) : re;
	});
	return [
		...upper.flatMap(({ re, im }) => [
			{ re, im },
			{ re, im: -im }
		]),
		...apart.map((re) => ({ re, im: 0 }))
	];
};

/**
 * All roots of a real polynomial, by the simultaneous iteration of Ehrlich and Aberth.
 * @param of n + 1 coefficients, lowest power first; the lowest and the highest not 0
 * @returns n roots: conjugate pairs side by side, then the real ones; equal ones are set 1e-9 apart
 * @throws RangeError when a coefficient is not finite, or the lowest or highest is 0
 * @example rootsOf([6, 5, 1]) // −3 and −2
 * @see O. Aberth, Iteration methods for finding all zeros of a polynomial simultaneously, 1973 (title recalled)
 */
export function rootsOf(of: Polynomial): Complex[] {
	if (of.some((value) => !Number.isFinite(value)) || of[0] === 0 || of[of.length - 1] === 0)
		throw new RangeError('roots need finite coefficients, the lowest and highest not 0');
	const slope = derivative(of);
	// Angles off the axes, so that neither real nor imaginary symmetry holds the iteration.
	const roots = firstSizes(of).map((size, index) => ({
		re: size * Math.cos(2.4 + 2.4 * index),
		im: size * Math.sin(2.4 + 2.4 * index)
	}));
	for (let round = 0; round < MOST_ROUNDS; round += 1) if (step(of, slope, roots) < 1e-15) break;
	return tidied(roots);
}
