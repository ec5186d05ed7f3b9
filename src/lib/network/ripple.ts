/** The share of the noise current that a line-side capacitor carries. */
import type { Interval } from '$lib/quantity/interval';
import { add, divide, magnitude, multiply, type Complex } from './complex';
import { leastRatio, type Ratio } from './extreme';
import {
	capacitorImpedance,
	inductorImpedance,
	shuntImpedance,
	type CapacitorPart,
	type Filter
} from './filter';
import { ladder, type LadderSample } from './ladder';
import type { SourceModel } from './source';

/**
 * Noise current that reaches the line-side node as a Norton source, per ampere: I_N/I = |Z_C/(Z_L + Z_C)|.
 * @param filter the filter
 * @param frequency [Hz], > 0
 * @returns share [A/A]
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a curve was not measured
 * @example injectedShare({ inductor: { inductance: 33e-6 }, capacitor: { capacitance: 4.7e-6 } }, 145e3) // 0.0078285
 * @see Norton's theorem
 */
export function injectedShare(filter: Filter, frequency: number): number {
	const shunt = shuntImpedance(filter, frequency);
	return magnitude(divide(shunt, add(inductorImpedance(filter.inductor, frequency), shunt)));
}

/**
 * Current in the line-side capacitor per ampere of noise current: I_Cx/I = (I_N/I)·|Y_x/(Y_p + Y_x)|.
 * @param filter the filter
 * @param sourceZ source impedance [Ω]
 * @param choice the line-side capacitor
 * @param frequency [Hz], > 0
 * @returns share [A/A]
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF, two 50 µH networks, 145 kHz, 49 nF: 0.031221
 * capacitorCurrent(filter, sourceZ, { capacitance: 49e-9 }, 145e3)
 * @see current divider; agrees with ngspice in tests/reference
 */
export function capacitorCurrent(
	filter: Filter,
	sourceZ: Complex,
	choice: CapacitorPart,
	frequency: number
): number {
	const shunt = shuntImpedance(filter, frequency);
	const own = add(inductorImpedance(filter.inductor, frequency), shunt);
	const capacitor = capacitorImpedance(choice, frequency);
	const loops = add(multiply(capacitor, add(own, sourceZ)), multiply(own, sourceZ));
	return magnitude(divide(multiply(shunt, sourceZ), loops));
}

/**
 * Capacitances of an ideal Cx that carry more than a rating at one frequency: with y = ωCx and Y_p = G − jB,
 * (I_N² − I_r²)·y² + 2·I_r²·B·y − I_r²·(G² + B²) > 0.
 * @param injected Norton current I_N at the node [A]
 * @param node Y_p [S]
 * @param rating I_r [A], > 0
 * @param frequency [Hz], > 0
 * @returns open interval [F]; above the one root where I_r ≤ I_N, between both where I_r > I_N; null when none
 * @throws RangeError when rating or frequency is not > 0
 * @example // 1 A through 33 µH, 4.7 µF, two 50 µH networks, 145 kHz, rated 12 mA: 31.90 nF to 137.7 nF
 * overloadBand(0.0078285, nodeAdmittance(filter, sourceZ, 145e3), 0.012, 145e3)
 * @see quadratic in ωCx of the current divider
 */
export function overloadBand(
	injected: number,
	node: Complex,
	rating: number,
	frequency: number
): Interval | null {
	if (!(rating > 0)) throw new RangeError(`rating must be > 0 A, got ${rating}`);
	if (!(frequency > 0)) throw new RangeError(`frequency must be > 0 Hz, got ${frequency}`);
	const omega = 2 * Math.PI * frequency;
	const limit = rating * rating;
	const a = injected * injected - limit;
	const half = -limit * node.im;
	const c = -limit * (node.re * node.re + node.im * node.im);
	const root = half * half - a * c;
	if (a < 0 && (root <= 0 || half <= 0)) return null;
	// Both forms of the root lose no digits for half ≥ 0 and half < 0 respectively.
	const rise = half + Math.sqrt(root);
	const lower = half >= 0 ? -c / rise : (Math.sqrt(root) - half) / a;
	return { from: lower / omega, to: a < 0 ? -rise / a / omega : Infinity };
}

/** Most current in a range, and where it flows. */
export interface WorstCurrent {
	/** [A/A] */
	readonly share: number;
	/** [Hz] */
	readonly frequency: number;
}

/** |Z_x·Z_f + Z_s·(Z_x + Z_f)|² over |Z_C|²·|Z_s|²: the reciprocal of the share, squared. */
const currentRatio = (sample: LadderSample, capacitor: Complex): Ratio => {
	const { own, shunt, resistance } = sample;
	const [sumRe, sumIm] = [capacitor.re + own.re, capacitor.im + own.im];
	const aRe = capacitor.re * own.re - capacitor.im * own.im + resistance * sumRe;
	const aIm = capacitor.re * own.im + capacitor.im * own.re + resistance * sumIm;
	const size = shunt.re * shunt.re + shunt.im * shunt.im;
	return {
		n0: aRe * aRe + aIm * aIm,
		n1: aIm * sumRe - aRe * sumIm,
		n2: sumRe * sumRe + sumIm * sumIm,
		d0: size * resistance * resistance,
		d1: 0,
		d2: size
	};
};

/**
 * Prepares the search for the most current in any line-side capacitor over a frequency range and the source's range
 * of inductance.
 * @param filter the filter
 * @param source the source
 * @param range from ≤ to [Hz], > 0
 * @returns finder of the share [A/A] and its frequency [Hz]
 * @throws RangeError when the range is empty or not positive; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF, two 50 µH networks, 145 kHz, 49 nF: 0.031221
 * currentFinder(filter, source, { from: 145e3, to: 145e3 }).worst({ capacitance: 49e-9 }).share
 * @see module `extreme`
 */
export function currentFinder(
	filter: Filter,
	source: SourceModel,
	range: Interval
): { readonly worst: (choice: CapacitorPart) => WorstCurrent } {
	const network = ladder(filter, source, range);
	return {
		worst: (choice) => {
			const { square, frequency } = leastRatio(network, choice, currentRatio);
			return { share: 1 / Math.sqrt(square), frequency };
		}
	};
}
