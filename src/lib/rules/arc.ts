/** Extremes of the imaginary part on the circle that (a·t + b)/(c·t + d) draws while the real t runs. */
import { add, divide, multiply, subtract, type Complex } from '$lib/network/complex';

/** (a·t + b)/(c·t + d). */
export interface Arc {
	readonly a: Complex;
	readonly b: Complex;
	readonly c: Complex;
	readonly d: Complex;
}

/**
 * Works out a point of the circle.
 * @param arc coefficients
 * @param t real parameter
 * @returns (a·t + b)/(c·t + d)
 * @example pointOf({ a: zero, b: one, c: j, d: one }, 1) // { re: 0.5, im: -0.5 }
 * Source: textbook.
 */
export function pointOf({ a, b, c, d }: Arc, t: number): Complex {
	return divide({ re: a.re * t + b.re, im: a.im * t + b.im }, { re: c.re * t + d.re, im: c.im * t + d.im });
}

const imaginaryOfProduct = (a: Complex, conjugated: Complex): number =>
	a.im * conjugated.re - a.re * conjugated.im;

/** The derivative is (ad − bc)/(ct + d)²; its imaginary part vanishes at the roots of a quadratic in t. */
const turningPoints = ({ a, b, c, d }: Arc): readonly number[] => {
	const slope = subtract(multiply(a, d), multiply(b, c));
	const second = imaginaryOfProduct(slope, multiply(c, c));
	const first = 2 * imaginaryOfProduct(slope, multiply(c, d));
	const constant = imaginaryOfProduct(slope, multiply(d, d));
	const square = first * first - 4 * second * constant;
	if (!(square >= 0)) return [];
	const half = -(first + (first < 0 ? -1 : 1) * Math.sqrt(square)) / 2;
	return [half / second, constant / half];
};

/**
 * Finds where on a range of t the imaginary part is largest or smallest.
 * @param arc coefficients
 * @param range least and greatest t
 * @param sign 1 for the largest, −1 for the smallest imaginary part
 * @returns t
 * @example turnOf({ a: zero, b: one, c: j, d: one }, { from: -5, to: 5 }, 1) // −1, where 1/(1 + jt) has +0.5j
 * Source: derivative of a Möbius transformation.
 */
export function turnOf(
	arc: Arc,
	range: { readonly from: number; readonly to: number },
	sign: 1 | -1
): number {
	const inside = turningPoints(arc).filter((t) => t > range.from && t < range.to);
	return [range.from, range.to, ...inside].reduce((best, t) =>
		sign * pointOf(arc, t).im > sign * pointOf(arc, best).im ? t : best
	);
}

const ONE: Complex = { re: 1, im: 0 };

const J: Complex = { re: 0, im: 1 };

/**
 * Writes the branch's admittance 1/(Z_L + q) over the reactance t of an inductor R + jt with the susceptance across it.
 * @param resistance R [Ω]
 * @param across susceptance of the capacitance across the winding [S]
 * @param rest q, in series with the inductor [Ω]
 * @returns the arc of the admittance [S] over t [Ω]
 * @example pointOf(inductorArc(0, 0, { re: 1, im: 0 }), 1) // 1/(1 + j)
 * Source: textbook.
 */
export function inductorArc(resistance: number, across: number, rest: Complex): Arc {
	const p: Complex = { re: 0, im: across };
	const shunted = add(ONE, multiply(rest, p));
	return {
		a: multiply(J, p),
		b: { re: 1, im: across * resistance },
		c: multiply(J, shunted),
		d: add({ re: resistance, im: 0 }, multiply(rest, { re: 1, im: across * resistance }))
	};
}

/**
 * Writes the branch's admittance 1/(z + Z_C) over s = 1/(ωC), Z_C being e − js beside a damping branch.
 * @param series z, the inductor [Ω]
 * @param own e, the capacitor's resistance and own inductance [Ω]
 * @param damping impedance of the damping branch [Ω], or null
 * @returns the arc of the admittance [S] over s [Ω]
 * @example pointOf(capacitorArc({ re: 1, im: 0 }, { re: 0, im: 0 }, null), 1) // 1/(1 − j)
 * Source: textbook.
 */
export function capacitorArc(series: Complex, own: Complex, damping: Complex | null): Arc {
	const minusJ: Complex = { re: 0, im: -1 };
	if (damping === null) return { a: { re: 0, im: 0 }, b: ONE, c: minusJ, d: add(series, own) };
	const both = add(damping, own);
	return {
		a: minusJ,
		b: both,
		c: multiply(minusJ, add(series, damping)),
		d: add(multiply(series, both), multiply(damping, own))
	};
}
