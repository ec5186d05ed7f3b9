/** From what an analyser measured to the impedance of the part, by the fixture it sat in. */
import { add, divide, magnitude, multiply, subtract, type Complex } from './complex';
import type { Fixture, MeasuredPoint } from './measurement';

const one: Complex = { re: 1, im: 0 };
const times = (a: Complex, factor: number): Complex => ({ re: a.re * factor, im: a.im * factor });

/**
 * Impedance of a part from the scattering parameter that its fixture uses:
 * reflection Z = R (1 + S11) / (1 − S11); shunt-through Z = (R/2) · S21 / (1 − S21); series-through Z = 2R (1 − S21) / S21.
 * @param fixture how the part was connected
 * @param s S11 for reflection, S21 for the other two
 * @param reference reference resistance of the ports, R [Ω], > 0
 * @returns impedance [Ω]; not finite where the formula has no end (S11 = 1, S21 = 1 or S21 = 0)
 * @example impedanceFromScattering('shunt-through', { re: 0.5, im: 0 }, 50) // { re: 25, im: 0 }
 * @see Pozar, Microwave Engineering, table 4.2 (recalled), for a single series or shunt element
 */
export function impedanceFromScattering(fixture: Fixture, s: Complex, reference: number): Complex {
	if (!(reference > 0)) throw new RangeError(`reference must be > 0 Ω, got ${reference}`);
	const rest = subtract(one, s);
	if (fixture === 'reflection') return times(divide(add(one, s), rest), reference);
	if (fixture === 'shunt-through') return times(divide(s, rest), reference / 2);
	return times(divide(rest, s), 2 * reference);
}

/** A point that the fixture or the physics casts doubt on. */
export interface Doubt {
	/** Index of the point. */
	readonly index: number;
	readonly reason: 'near-floor' | 'near-ceiling' | 'negative-resistance';
}

/** Within 6 dB of the limit. */
const NEAR = 2;

const limitDoubt = (size: number, fixture: Fixture, limits: { low: number; high: number }) => {
	if (fixture === 'shunt-through' && size < NEAR * limits.low) return 'near-floor';
	if (fixture === 'series-through' && size > limits.high / NEAR) return 'near-ceiling';
	return null;
};

/**
 * Marks points within 6 dB of what the fixture can resolve, and points with negative resistance.
 * Shunt-through resolves down to (R/2)·10^(N/20), series-through up to 2R·10^(−N/20).
 * @param points measured points
 * @param fixture how the part was connected
 * @param floor_dB the analyser's noise floor N in |S21|, < 0 [dB]
 * @param reference reference resistance R [Ω]
 * @returns one entry for each doubtful point, in order
 * @example // 0.3 mΩ measured shunt-through at −100 dB: the floor is 0.25 mΩ
 * doubtfulPoints([{ frequency: 1e6, impedance: { re: 3e-4, im: 0 } }], 'shunt-through', -100)[0].reason // 'near-floor'
 * @see common practice
 */
export function doubtfulPoints(
	points: readonly MeasuredPoint[],
	fixture: Fixture,
	floor_dB = -100,
	reference = 50
): Doubt[] {
	const noise = 10 ** (floor_dB / 20);
	const limits = { low: (reference / 2) * noise, high: (2 * reference) / noise };
	return points.flatMap(({ impedance }, index): Doubt[] => {
		const near = limitDoubt(magnitude(impedance), fixture, limits);
		if (near) return [{ index, reason: near }];
		return impedance.re < 0 ? [{ index, reason: 'negative-resistance' }] : [];
	});
}

/**
 * Complex number from the two columns of a Touchstone pair.
 * @param format MA magnitude and degrees, DB 20·log10 and degrees, RI real and imaginary
 * @param a first column
 * @param b second column
 * @returns the number
 * @example pair('MA', 2, 90) // { re: 1.2e-16, im: 2 }
 * @see Touchstone file format, IBIS Open Forum (read in public readers)
 */
export function pair(format: 'MA' | 'DB' | 'RI', a: number, b: number): Complex {
	if (format === 'RI') return { re: a, im: b };
	const size = format === 'DB' ? 10 ** (a / 20) : a;
	const angle = (b * Math.PI) / 180;
	return multiply({ re: size, im: 0 }, { re: Math.cos(angle), im: Math.sin(angle) });
}
