/** A measured impedance over frequency, read between its points and never beyond them. */
import type { Complex } from './complex';

/** Points as measured, n of each, frequency strictly increasing. A design's curve has this shape. */
export interface CurvePoints {
	readonly frequency_Hz: readonly number[];
	readonly real_ohm: readonly number[];
	readonly imaginary_ohm: readonly number[];
}

/** The same points ready to be read: n natural logarithms of f [Hz] and |Z| [Ω], and n unwrapped phases [rad]. */
export interface ImpedanceCurve {
	readonly frequency: readonly number[];
	readonly logFrequency: readonly number[];
	readonly logMagnitude: readonly number[];
	readonly phase: readonly number[];
}

/** A frequency was asked for at which nothing was measured. */
export class OutsideCurveError extends RangeError {
	constructor(
		readonly frequency: number,
		readonly from: number,
		readonly to: number
	) {
		super(`the curve covers ${from} Hz to ${to} Hz, asked for ${frequency} Hz`);
		this.name = 'OutsideCurveError';
	}
}

/**
 * Makes measured points ready to be read: logarithms of frequency and magnitude, phase unwrapped so that
 * neighbours differ by at most half a turn.
 * @param points n ≥ 1 points, frequency strictly increasing and > 0 [Hz], impedance not zero [Ω]
 * @returns the curve
 * @throws RangeError when the lengths differ, a frequency does not increase, or a value is zero or not finite
 * @example impedanceCurve({ frequency_Hz: [1e3], real_ohm: [0], imaginary_ohm: [10] }).phase // [1.5707963267948966]
 */
export function impedanceCurve(points: CurvePoints): ImpedanceCurve {
	const { frequency_Hz: frequency, real_ohm: real, imaginary_ohm: imaginary } = points;
	if (frequency.length === 0 || real.length !== frequency.length || imaginary.length !== frequency.length)
		throw new RangeError('a curve needs as many real and imaginary values as frequencies, at least one');
	const logMagnitude: number[] = [];
	const phase: number[] = [];
	frequency.forEach((f, index) => {
		const re = real[index] ?? NaN;
		const im = imaginary[index] ?? NaN;
		if (!(f > (frequency[index - 1] ?? 0)) || !Number.isFinite(f))
			throw new RangeError(`frequency must increase, got ${f} Hz at point ${index + 1}`);
		const size = Math.hypot(re, im);
		if (!(size > 0) || !Number.isFinite(size))
			throw new RangeError(`impedance must be finite and not zero, got |Z| = ${size} Ω at ${f} Hz`);
		const angle = Math.atan2(im, re);
		const before = phase[index - 1] ?? angle;
		logMagnitude.push(Math.log(size));
		phase.push(angle + 2 * Math.PI * Math.round((before - angle) / (2 * Math.PI)));
	});
	return { frequency, logFrequency: frequency.map(Math.log), logMagnitude, phase };
}

/**
 * Whether a curve was measured at a frequency: f_first ≤ f ≤ f_last.
 * @param curve the curve
 * @param frequency [Hz]
 * @returns true inside the measured range, ends included
 * @example covers(impedanceCurve({ frequency_Hz: [1e3, 1e6], real_ohm: [1, 1], imaginary_ohm: [0, 0] }), 2e6) // false
 */
export function covers(curve: ImpedanceCurve, frequency: number): boolean {
	const { frequency: at } = curve;
	return frequency >= (at[0] ?? Infinity) && frequency <= (at[at.length - 1] ?? -Infinity);
}

/**
 * Impedance between measured points: log |Z| and unwrapped phase, both linear in log f.
 * @param curve the curve
 * @param frequency inside the measured range [Hz]
 * @returns impedance [Ω]
 * @throws OutsideCurveError beyond the first or last point: a curve is never extrapolated
 * @example // |Z| = 10 Ω at 1 kHz and 1 kΩ at 100 kHz, both inductive: 100j Ω at 10 kHz
 * impedanceAt(impedanceCurve({ frequency_Hz: [1e3, 1e5], real_ohm: [0, 0], imaginary_ohm: [10, 1e3] }), 1e4)
 */
export function impedanceAt(curve: ImpedanceCurve, frequency: number): Complex {
	const at = curve.frequency;
	if (!covers(curve, frequency))
		throw new OutsideCurveError(frequency, at[0] ?? NaN, at[at.length - 1] ?? NaN);
	let low = 0;
	let high = at.length - 1;
	while (high - low > 1) {
		const middle = (low + high) >> 1;
		if ((at[middle] ?? Infinity) <= frequency) low = middle;
		else high = middle;
	}
	const { logFrequency: x, logMagnitude: m, phase: p } = curve;
	const span = (x[high] ?? 0) - (x[low] ?? 0);
	const share = span === 0 ? 0 : (Math.log(frequency) - (x[low] ?? 0)) / span;
	const size = Math.exp((m[low] ?? 0) + share * ((m[high] ?? 0) - (m[low] ?? 0)));
	const angle = (p[low] ?? 0) + share * ((p[high] ?? 0) - (p[low] ?? 0));
	return { re: size * Math.cos(angle), im: size * Math.sin(angle) };
}
