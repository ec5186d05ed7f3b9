/** The capacitance that a filter and its source turn into a resonance: the worst choice at one frequency. */
import { divide, type Complex } from './complex';
import { filterImpedance, type Filter } from './filter';

const TURN = 2 * Math.PI;

/**
 * Corner of an L–C filter: f0 = 1/(2π·√(L·C)).
 * @param inductance L [H], > 0
 * @param capacitance C [F], > 0
 * @returns corner frequency [Hz]
 * @throws RangeError when a value is not > 0
 * @example cornerFrequency(33e-6, 4.7e-6) // 12779.5 Hz
 * @see identity
 */
export function cornerFrequency(inductance: number, capacitance: number): number {
	if (!(inductance > 0)) throw new RangeError(`inductance must be > 0 H, got ${inductance}`);
	if (!(capacitance > 0)) throw new RangeError(`capacitance must be > 0 F, got ${capacitance}`);
	return 1 / (TURN * Math.sqrt(inductance * capacitance));
}

/**
 * Worst capacitance by the rule of thumb: C0 = 1/((2πf)²·L∥Ls), with C taken as a short.
 * @param frequency f [Hz], > 0
 * @param inductance L [H], > 0
 * @param sourceInductance Ls [H], ≥ 0
 * @returns C0 [F]; Infinity for Ls = 0
 * @throws RangeError when frequency or inductance is not > 0, or Ls < 0
 * @example approximateWorstCapacitance(145e3, 33e-6, 100e-6) // 48.556 nF
 * @see common practice; above 4.58 · f0 within 5 % of the exact value
 */
export function approximateWorstCapacitance(
	frequency: number,
	inductance: number,
	sourceInductance: number
): number {
	if (!(frequency > 0)) throw new RangeError(`frequency must be > 0 Hz, got ${frequency}`);
	if (!(inductance > 0)) throw new RangeError(`inductance must be > 0 H, got ${inductance}`);
	if (!(sourceInductance >= 0))
		throw new RangeError(`source inductance must be ≥ 0 H, got ${sourceInductance}`);
	const omega = TURN * frequency;
	return (1 / inductance + 1 / sourceInductance) / (omega * omega);
}

/**
 * Worst capacitance exactly: C0 = −Im(Y_p)/ω. At a fixed frequency |Y_p + jωCx| is least there; losses set how deep
 * the loss of attenuation is, not where.
 * @param filter the filter
 * @param sourceZ source impedance [Ω]
 * @param frequency [Hz], > 0
 * @returns C0 [F]; ≤ 0 where no capacitance resonates; ±Infinity at a lossless series resonance
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF, two 50 µH networks at 145 kHz: 48.70 nF
 * exactWorstCapacitance(filter, sourceImpedance({ kind: 'amn-50uH-5ohm', networks: 2 }, 145e3), 145e3)
 * @see minimum of |Y_p + jωCx| over Cx; agrees with ngspice in tests/reference
 */
export function exactWorstCapacitance(filter: Filter, sourceZ: Complex, frequency: number): number {
	const own = filterImpedance(filter, frequency);
	const one = { re: 1, im: 0 };
	return -(divide(one, own).im + divide(one, sourceZ).im) / (TURN * frequency);
}
