/** What a line-side capacitor gains: positive when it lowers the emission. */
import type { Interval } from '$lib/quantity/interval';
import { add, divide, multiply, type Complex } from './complex';
import { leastRatio, type Ratio } from './extreme';
import { capacitorImpedance, filterImpedance, type CapacitorPart, type Filter } from './filter';
import { ladder, type LadderSample } from './ladder';
import { sourceImpedance, type SourceModel } from './source';

/** A lossless network has no bottom at its resonance; gains are reported no lower than this [dB]. */
export const LOWEST_GAIN_DB = -200;

/**
 * Impedance at the line-side node without Cx: Z_p = Z_f·Z_s/(Z_f + Z_s) with Z_f = Z_L + Z_C.
 * @param filter the filter
 * @param sourceZ source impedance [Ω]
 * @param frequency [Hz], > 0
 * @returns impedance [Ω]; 0 for a short-circuited source, Infinity at a lossless parallel resonance
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF, two 50 µH networks at 145 kHz: 5.345 + 21.19j Ω
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

/** The least gain in a range, and where it lies. */
export interface WorstBenefit {
	readonly gain_dB: number;
	/** [Hz] */
	readonly frequency: number;
	/** Ls of an `impedance` source [H]; null for the others. */
	readonly inductance: number | null;
}

/** Finds the least gain of any line-side capacitor; the network is sampled once. */
export interface BenefitFinder {
	readonly worst: (choice: CapacitorPart) => WorstBenefit;
}

/** Under this square (−40 dB) the ratio of quadratics has lost digits, and the gain is taken from the network itself. */
const DEEP = 1e-4;

/** |Z_x·Z_f + Z_s·(Z_x + Z_f)|² over |Z_x|²·|Z_f + Z_s|², Z_s = R + jX: the square of |1 + Y_x/Y_p|. */
const gainRatio = (sample: LadderSample, capacitor: Complex): Ratio => {
	const { own, resistance } = sample;
	const [sumRe, sumIm] = [capacitor.re + own.re, capacitor.im + own.im];
	const aRe = capacitor.re * own.re - capacitor.im * own.im + resistance * sumRe;
	const aIm = capacitor.re * own.im + capacitor.im * own.re + resistance * sumIm;
	const size = capacitor.re * capacitor.re + capacitor.im * capacitor.im;
	const cRe = own.re + resistance;
	return {
		n0: aRe * aRe + aIm * aIm,
		n1: aIm * sumRe - aRe * sumIm,
		n2: sumRe * sumRe + sumIm * sumIm,
		d0: size * (cRe * cRe + own.im * own.im),
		d1: size * own.im,
		d2: size
	};
};

/**
 * Prepares the search for the least gain over a frequency range and the source's range of inductance.
 * @param filter the filter
 * @param source the source
 * @param range from ≤ to [Hz], > 0
 * @returns a finder; each `worst` is within 0.01 dB of the true minimum
 * @throws RangeError when the range is empty or not positive; OutsideCurveError where a curve was not measured
 * @example // 220 µH, 2.2 µF, two 50 µH networks, 126 to 138 kHz, 330 nF: 21.05 dB at 126 kHz
 * benefitFinder(filter, source, { from: 126e3, to: 138e3 }).worst({ capacitance: 330e-9 })
 * @see module `extreme`; checked against dense sampling in its tests
 */
export function benefitFinder(filter: Filter, source: SourceModel, range: Interval): BenefitFinder {
	const network = ladder(filter, source, range);
	return {
		worst: (choice) => {
			const { square, frequency, reactance } = leastRatio(network, choice, gainRatio);
			const inductance = network.inductive ? reactance / (2 * Math.PI * frequency) : null;
			if (square > DEEP) return { gain_dB: decibels(square), frequency, inductance };
			const sourceZ = sourceImpedance(source, frequency, inductance ?? undefined);
			return { gain_dB: benefitAt(filter, sourceZ, choice, frequency), frequency, inductance };
		}
	};
}

/**
 * Least gain of one line-side capacitor over a frequency range and the source's range of inductance.
 * @param filter the filter
 * @param source the source
 * @param range from ≤ to [Hz], > 0
 * @param choice the line-side capacitor
 * @returns least gain [dB] with its frequency [Hz] and source inductance [H]
 * @throws RangeError when the range is empty or not positive; OutsideCurveError where a curve was not measured
 * @example // 220 µH, 2.2 µF, two 50 µH networks, 126 to 138 kHz: 21.05 dB at 126 kHz
 * worstBenefit(filter, source, { from: 126e3, to: 138e3 }, { capacitance: 330e-9 })
 * @see benefitFinder
 */
export function worstBenefit(
	filter: Filter,
	source: SourceModel,
	range: Interval,
	choice: CapacitorPart
): WorstBenefit {
	return benefitFinder(filter, source, range).worst(choice);
}
