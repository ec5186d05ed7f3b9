/** A measured impedance over frequency, read between its points and never beyond them. */
import type { Complex } from './complex';

/** Points as measured, n of each, frequency strictly increasing. A design's curve has this shape. */
export interface CurvePoints {
	readonly frequency_Hz: readonly number[];
	readonly real_ohm: readonly number[];
	readonly imaginary_ohm: readonly number[];
}

/** One point ready to be read: natural logarithms of f [Hz] and |Z| [Ω], and unwrapped phase [rad]. */
interface CurvePoint {
	readonly frequency: number;
	readonly logFrequency: number;
	readonly logMagnitude: number;
	readonly phase: number;
}

/** The points in order of frequency, first and last named for the range they span. */
export interface ImpedanceCurve {
	readonly points: readonly CurvePoint[];
	readonly first: CurvePoint;
	readonly last: CurvePoint;
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

const prepared = (frequency: number, re: number, im: number, before: CurvePoint | undefined): CurvePoint => {
	if (!(frequency > (before?.frequency ?? 0)) || !Number.isFinite(frequency))
		throw new RangeError(`frequency must increase from point to point, got ${frequency} Hz`);
	const size = Math.hypot(re, im);
	if (!(size > 0) || !Number.isFinite(size))
		throw new RangeError(`impedance must be finite and not zero, got |Z| = ${size} Ω at ${frequency} Hz`);
	const angle = Math.atan2(im, re);
	const turns = before ? Math.round((before.phase - angle) / (2 * Math.PI)) : 0;
	return {
		frequency,
		logFrequency: Math.log(frequency),
		logMagnitude: Math.log(size),
		phase: angle + 2 * Math.PI * turns
	};
};

/**
 * Makes measured points ready to be read: logarithms of frequency and magnitude, phase unwrapped so that
 * neighbours differ by at most half a turn.
 * @param points n ≥ 1 points, frequency strictly increasing and > 0 [Hz], impedance not zero [Ω]
 * @returns the curve
 * @throws RangeError when the lengths differ, a frequency does not increase, or a value is zero or not finite
 * @example impedanceCurve({ frequency_Hz: [1e3], real_ohm: [0], imaginary_ohm: [10] }).first.phase // 1.5707963267948966
 * @see common practice
 */
export function impedanceCurve(points: CurvePoints): ImpedanceCurve {
	const { frequency_Hz: frequency, real_ohm: real, imaginary_ohm: imaginary } = points;
	if (real.length !== frequency.length || imaginary.length !== frequency.length)
		throw new RangeError('a curve needs as many real and imaginary values as frequencies');
	const ready: CurvePoint[] = [];
	frequency.forEach((f, index) => {
		ready.push(prepared(f, real[index] ?? NaN, imaginary[index] ?? NaN, ready[index - 1]));
	});
	const first = ready[0];
	const last = ready[ready.length - 1];
	if (!first || !last) throw new RangeError('a curve needs at least one point');
	return { points: ready, first, last };
}

/**
 * Whether a curve was measured at a frequency: f_first ≤ f ≤ f_last.
 * @param curve the curve
 * @param frequency [Hz]
 * @returns true inside the measured range, ends included
 * @example // measured from 1 kHz to 1 MHz
 * covers(curve, 2e6) // false
 * @see common practice: a measurement says nothing beyond its ends
 */
export function covers(curve: ImpedanceCurve, frequency: number): boolean {
	return frequency >= curve.first.frequency && frequency <= curve.last.frequency;
}

/** The two measured points around a frequency inside the range. */
const neighbours = ({ points, first, last }: ImpedanceCurve, frequency: number): [CurvePoint, CurvePoint] => {
	let low = 0;
	let high = points.length - 1;
	while (high - low > 1) {
		const middle = (low + high) >> 1;
		if ((points[middle] ?? last).frequency <= frequency) low = middle;
		else high = middle;
	}
	return [points[low] ?? first, points[high] ?? last];
};

/**
 * Impedance between measured points: log |Z| and unwrapped phase, both linear in log f.
 * @param curve the curve
 * @param frequency inside the measured range [Hz]
 * @returns impedance [Ω]
 * @throws OutsideCurveError beyond the first or last point: a curve is never extrapolated
 * @example // |Z| = 10 Ω at 1 kHz and 1 kΩ at 100 kHz, both inductive: 100j Ω at 10 kHz
 * impedanceAt(impedanceCurve({ frequency_Hz: [1e3, 1e5], real_ohm: [0, 0], imaginary_ohm: [10, 1e3] }), 1e4)
 * @see common practice
 */
export function impedanceAt(curve: ImpedanceCurve, frequency: number): Complex {
	if (!covers(curve, frequency))
		throw new OutsideCurveError(frequency, curve.first.frequency, curve.last.frequency);
	const [low, high] = neighbours(curve, frequency);
	const span = high.logFrequency - low.logFrequency;
	const share = span === 0 ? 0 : (Math.log(frequency) - low.logFrequency) / span;
	const size = Math.exp(low.logMagnitude + share * (high.logMagnitude - low.logMagnitude));
	const angle = low.phase + share * (high.phase - low.phase);
	return { re: size * Math.cos(angle), im: size * Math.sin(angle) };
}

/**
 * Frequencies at which a curve was measured, between two ends: where what is read from it may have a kink.
 * @param curve the curve
 * @param from lower end [Hz]
 * @param to upper end [Hz]
 * @returns frequencies inside, in order [Hz]
 * @example // measured at 1, 2, 5 and 10 kHz
 * measuredBetween(curve, 1.5e3, 6e3) // [2000, 5000]
 * @see common practice
 */
export function measuredBetween(curve: ImpedanceCurve, from: number, to: number): number[] {
	return curve.points.map((point) => point.frequency).filter((f) => f > from && f < to);
}
