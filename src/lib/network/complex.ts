/** Complex numbers as plain pairs: impedances [Ω] and admittances [S] of the network rooms. */

export type Complex = { readonly re: number; readonly im: number };

/**
 * Sum of two complex numbers: a + b.
 * @param a first term, any unit
 * @param b second term, same unit
 * @returns a + b, same unit
 * @example add({ re: 1, im: 2 }, { re: 3, im: -1 }) // { re: 4, im: 1 }
 */
export function add(a: Complex, b: Complex): Complex {
	return { re: a.re + b.re, im: a.im + b.im };
}

/**
 * Difference of two complex numbers: a − b.
 * @param a minuend, any unit
 * @param b subtrahend, same unit
 * @returns a − b, same unit
 * @example subtract({ re: 1, im: 2 }, { re: 3, im: -1 }) // { re: -2, im: 3 }
 */
export function subtract(a: Complex, b: Complex): Complex {
	return { re: a.re - b.re, im: a.im - b.im };
}

/**
 * Product of two complex numbers: a · b.
 * @param a first factor
 * @param b second factor
 * @returns a · b in the product of the units
 * @example multiply({ re: 1, im: 2 }, { re: 3, im: -1 }) // { re: 5, im: 5 }
 */
export function multiply(a: Complex, b: Complex): Complex {
	return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

/**
 * Reciprocal of a complex number: 1/a = a* / |a|².
 * @param a impedance [Ω] or admittance [S]
 * @returns its inverse; { re: Infinity, im: 0 } for zero, so that a short circuit stays a number
 * @example reciprocal({ re: 0, im: 2 }) // { re: 0, im: -0.5 }
 */
export function reciprocal(a: Complex): Complex {
	const square = a.re * a.re + a.im * a.im;
	if (square === 0) return { re: Infinity, im: 0 };
	return { re: a.re / square, im: -a.im / square };
}

/**
 * Quotient of two complex numbers: a / b.
 * @param a dividend
 * @param b divisor, not zero
 * @returns a / b in the quotient of the units
 * @example divide({ re: 5, im: 5 }, { re: 3, im: -1 }) // { re: 1, im: 2 }
 */
export function divide(a: Complex, b: Complex): Complex {
	const square = b.re * b.re + b.im * b.im;
	return { re: (a.re * b.re + a.im * b.im) / square, im: (a.im * b.re - a.re * b.im) / square };
}

/**
 * Magnitude |a| = √(re² + im²).
 * @param a any unit
 * @returns |a|, same unit
 * @example magnitude({ re: 3, im: 4 }) // 5
 */
export function magnitude(a: Complex): number {
	return Math.sqrt(a.re * a.re + a.im * a.im);
}

/**
 * Phase arg a = atan2(im, re).
 * @param a any unit
 * @returns phase in (−π, π] [rad]
 * @example phase({ re: 0, im: 2 }) // 1.5707963267948966
 */
export function phase(a: Complex): number {
	return Math.atan2(a.im, a.re);
}

/**
 * Parallel connection of two impedances: Z = a·b / (a + b).
 * @param a impedance [Ω]
 * @param b impedance [Ω]
 * @returns impedance of both side by side [Ω]; 0 when either is a short
 * @example parallel({ re: 100, im: 0 }, { re: 0, im: 100 }) // { re: 50, im: 50 }
 */
export function parallel(a: Complex, b: Complex): Complex {
	const sum = add(a, b);
	return sum.re === 0 && sum.im === 0 ? { re: Infinity, im: 0 } : divide(multiply(a, b), sum);
}
