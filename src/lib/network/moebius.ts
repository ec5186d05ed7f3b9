/** The circle that (p0 + p1·t)/(q0 + q1·t) draws in the complex plane while a real part value t runs. */
import type { Interval } from '$lib/quantity/interval';
import { divide, multiply, subtract, type Complex } from './complex';

export interface Moebius {
	readonly p0: Complex;
	readonly p1: Complex;
	readonly q0: Complex;
	readonly q1: Complex;
}

const imaginaryAt = ({ p0, p1, q0, q1 }: Moebius, t: number): number =>
	divide({ re: p0.re + t * p1.re, im: p0.im + t * p1.im }, { re: q0.re + t * q1.re, im: q0.im + t * q1.im })
		.im;

/** Im(a·b*). */
const cross = (a: Complex, b: Complex): number => a.im * b.re - a.re * b.im;

/**
 * Where on a range the imaginary part of (p0 + p1·t)/(q0 + q1·t) is greatest or least: at an end, or where its
 * derivative (p1·q0 − p0·q1)/(q0 + q1·t)² has no imaginary part, a quadratic in t.
 * @param circle the four coefficients
 * @param range least and greatest t
 * @param sign 1 for the greatest, −1 for the least
 * @returns t
 * @example // 1/(1 + jt) is −0.5j at its lowest
 * extremeImaginary({ p0: { re: 1, im: 0 }, p1: zero, q0: { re: 1, im: 0 }, q1: { re: 0, im: 1 } }, { from: 0, to: 9 }, -1) // 1
 * @see derivative of a linear fractional transformation
 */
export function extremeImaginary(circle: Moebius, range: Interval, sign: 1 | -1): number {
	const { p0, p1, q0, q1 } = circle;
	const slope = subtract(multiply(p1, q0), multiply(p0, q1));
	const a = cross(slope, multiply(q1, q1));
	const b = 2 * cross(slope, multiply(q0, q1));
	const c = cross(slope, multiply(q0, q0));
	const half = -(b + (b < 0 ? -1 : 1) * Math.sqrt(Math.max(0, b * b - 4 * a * c))) / 2;
	let best = range.from;
	let value = sign * imaginaryAt(circle, best);
	for (const t of [range.to, half / a, c / half]) {
		if (!(t > range.from && t <= range.to)) continue;
		const there = sign * imaginaryAt(circle, t);
		if (there > value) [best, value] = [t, there];
	}
	return best;
}
