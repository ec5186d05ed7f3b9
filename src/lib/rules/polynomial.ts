/** Real polynomials and their complex roots, coefficients rising from the constant. */
import type { Complex } from '$lib/network/complex';

export type Polynomial = readonly number[];

/**
 * Sums polynomials.
 * @param terms coefficients rising from the constant
 * @returns sum
 * @example sumOf([1, 2], [0, 0, 3]) // [1, 2, 3]
 * Source: textbook.
 */
export function sumOf(...terms: readonly Polynomial[]): number[] {
	const length = Math.max(...terms.map((term) => term.length));
	return Array.from({ length }, (_, power) => terms.reduce((sum, term) => sum + (term[power] ?? 0), 0));
}

/**
 * Multiplies two polynomials.
 * @param a coefficients rising from the constant
 * @param b likewise
 * @returns product
 * @example productOf([1, 1], [1, 1]) // [1, 2, 1]
 * Source: textbook.
 */
export function productOf(a: Polynomial, b: Polynomial): number[] {
	const product = new Array<number>(a.length + b.length - 1).fill(0);
	a.forEach((left, i) => {
		b.forEach((right, j) => {
			product[i + j] = (product[i + j] ?? 0) + left * right;
		});
	});
	return product;
}

/** Value and slope at a complex point, by Horner's scheme. */
interface Reading {
	readonly re: number;
	readonly im: number;
	readonly slopeRe: number;
	readonly slopeIm: number;
}

/**
 * Reads a polynomial and its slope at a complex point.
 * @param polynomial coefficients rising from the constant
 * @param point where
 * @returns value and slope
 * @example readAt([0, 0, 1], { re: 0, im: 1 }) // value −1, slope 2j
 * Source: Horner's scheme.
 */
export function readAt(polynomial: Polynomial, { re: x, im: y }: Complex): Reading {
	let [re, im, slopeRe, slopeIm] = [0, 0, 0, 0];
	for (let power = polynomial.length - 1; power >= 0; power -= 1) {
		[slopeRe, slopeIm] = [slopeRe * x - slopeIm * y + re, slopeRe * y + slopeIm * x + im];
		[re, im] = [re * x - im * y + (polynomial[power] ?? 0), re * y + im * x];
	}
	return { re, im, slopeRe, slopeIm };
}

/** Scaled so that the roots' geometric mean is 1: circuit polynomials span fifty powers of ten. */
const scaleOf = (polynomial: Polynomial): number => {
	const degree = polynomial.length - 1;
	return Math.abs((polynomial[0] ?? 1) / (polynomial[degree] ?? 1)) ** (1 / degree);
};

/** The next corner of Newton's polygon: where the line from this power on rises most steeply. */
const nextCorner = (height: readonly number[], from: number): number => {
	const slopeTo = (power: number): number => ((height[power] ?? 0) - (height[from] ?? 0)) / (power - from);
	let corner = from + 1;
	for (let power = from + 2; power < height.length; power += 1) {
		if (slopeTo(power) > slopeTo(corner)) corner = power;
	}
	return corner;
};

/** Starting points on the circles of Newton's polygon, which separates roots of very different size. */
const starts = (polynomial: Polynomial): Complex[] => {
	const height = polynomial.map((value) => Math.log(Math.abs(value)));
	const points: Complex[] = [];
	let from = 0;
	while (from < polynomial.length - 1) {
		const to = nextCorner(height, from);
		const radius = Math.exp(((height[from] ?? 0) - (height[to] ?? 0)) / (to - from));
		for (let index = from; index < to; index += 1) {
			const angle = (2 * Math.PI * (index - from)) / (to - from) + 0.7 + from;
			points.push({ re: radius * Math.cos(angle), im: radius * Math.sin(angle) });
		}
		from = to;
	}
	return points;
};

const MOST_ROUNDS = 200;

/** Aberth's correction: Newton's step, repelled by the other roots. */
const corrected = (polynomial: Polynomial, roots: readonly Complex[], index: number): Complex => {
	const root = roots[index] ?? { re: 0, im: 0 };
	const { re, im, slopeRe, slopeIm } = readAt(polynomial, root);
	const size = slopeRe * slopeRe + slopeIm * slopeIm;
	const stepRe = (re * slopeRe + im * slopeIm) / size;
	const stepIm = (im * slopeRe - re * slopeIm) / size;
	let [pushRe, pushIm] = [0, 0];
	roots.forEach((other, place) => {
		if (place === index) return;
		const [x, y] = [root.re - other.re, root.im - other.im];
		const distance = x * x + y * y;
		pushRe += x / distance;
		pushIm -= y / distance;
	});
	const weightRe = 1 - (stepRe * pushRe - stepIm * pushIm);
	const weightIm = -(stepRe * pushIm + stepIm * pushRe);
	const weight = weightRe * weightRe + weightIm * weightIm;
	return {
		re: root.re - (stepRe * weightRe + stepIm * weightIm) / weight,
		im: root.im - (stepIm * weightRe - stepRe * weightIm) / weight
	};
};

/**
 * Finds all roots at once by Aberth's method.
 * @param polynomial coefficients rising from the constant, none of them zero
 * @returns complex roots, any order
 * @throws RangeError when a coefficient is zero or not finite
 * @example rootsOf([2, -3, 1]) // 1 and 2
 * Source: O. Aberth, Iteration methods for finding all zeros of a polynomial simultaneously, 1973 (title recalled).
 */
export function rootsOf(polynomial: Polynomial): Complex[] {
	if (polynomial.some((value) => value === 0 || !Number.isFinite(value))) {
		throw new RangeError(`coefficients must be finite and not zero, got ${polynomial.join(', ')}`);
	}
	const scale = scaleOf(polynomial);
	const last = (polynomial.at(-1) ?? 1) * scale ** (polynomial.length - 1);
	const scaled = polynomial.map((value, power) => (value * scale ** power) / last);
	const roots = starts(scaled);
	for (let round = 0; round < MOST_ROUNDS; round += 1) {
		let moved = 0;
		roots.forEach((root, index) => {
			const next = corrected(scaled, roots, index);
			if (!Number.isFinite(next.re) || !Number.isFinite(next.im)) return;
			moved = Math.max(
				moved,
				Math.hypot(next.re - root.re, next.im - root.im) / Math.hypot(next.re, next.im)
			);
			roots[index] = next;
		});
		if (moved < 1e-14) break;
	}
	return roots.map(({ re, im }) => ({ re: re * scale, im: im * scale }));
}
