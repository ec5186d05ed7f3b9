/** What a line-side capacitor gains at one frequency: positive when it lowers the emission. */
import { add, divide, multiply, type Complex } from './complex';
import { capacitorImpedance, filterImpedance, type CapacitorPart, type Filter } from './filter';

/** A lossless network has no bottom at its resonance; gains are reported no lower than this [dB]. */
export const LOWEST_GAIN_DB = -200;

/**
 * Impedance at the line-side node without Cx: Z_p = Z_f·Z_s/(Z_f + Z_s) with Z_f = Z_L + Z_C.
 * @param filter the filter
 * @param sourceZ source impedance [Ω]
 * @param frequency [Hz], > 0
 * @returns impedance [Ω]; 0 for a short-circuited source, Infinity at a lossless parallel resonance
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF, two 50 µH networks at 145 kHz: 5.171 + 21.28j Ω
 * nodeImpedance(filter, sourceImpedance({ kind: 'amn-50uH-5ohm', networks: 2 }, 145e3), 145e3)
 */
export function nodeImpedance(filter: Filter, sourceZ: Complex, frequency: number): Complex {
	const own = filterImpedance(filter, frequency);
	const sum = add(own, sourceZ);
	if (sum.re === 0 && sum.im === 0) return { re: Infinity, im: 0 };
	return divide(multiply(own, sourceZ), sum);
}

/**
 * Decibels of a power ratio, no lower than the lowest gain: 10·log10 r.
 * @param square ratio of squares, ≥ 0
 * @returns gain [dB]
 * @example decibels(4) // 6.0206
 */
export function decibels(square: number): number {
	return Math.max(LOWEST_GAIN_DB, 10 * Math.log10(square));
}

/**
 * Exact gain of a line-side capacitor: ΔIL = 20·log10 |1 + Y_x/Y_p|; the same for node voltage, source current and
 * receiver voltage, since Cx leaves Z_s as it is.
 * @param filter the filter
 * @param sourceZ source impedance [Ω]
 * @param choice the line-side capacitor
 * @param frequency [Hz], > 0
 * @returns gain [dB], positive when the capacitor lowers the emission; never under −200 dB
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF, two 50 µH networks, 145 kHz, 194.2 nF (four times the worst value): 9.27 dB
 * benefitAt(filter, sourceZ, { capacitance: 194.2e-9 }, 145e3)
 * @see Norton's theorem; agrees with ngspice to 0.01 dB in tests/reference
 */
export function benefitAt(
	filter: Filter,
	sourceZ: Complex,
	choice: CapacitorPart,
	frequency: number
): number {
	const node = nodeImpedance(filter, sourceZ, frequency);
	const own = capacitorImpedance(choice, frequency);
	const sum = add(own, node);
	return decibels((sum.re * sum.re + sum.im * sum.im) / (own.re * own.re + own.im * own.im));
}
