/** Where the real value of a part lies. */
import type { Tolerance } from '$lib/design/design';
import type { Interval } from '$lib/quantity/interval';

/**
 * Works out the interval in which the real capacitance of a nominal value lies.
 * @param nominal nominal value [F]
 * @param tolerance fractions
 * @returns closed interval [F]
 * @example toleranceInterval(3.3e-7, { toleranceMinus: 0.1, tolerancePlus: 0.1 }) // 297 … 363 nF
 * Source: common practice.
 */
export function toleranceInterval(nominal: number, tolerance: Tolerance): Interval {
	return { from: nominal * (1 - tolerance.toleranceMinus), to: nominal * (1 + tolerance.tolerancePlus) };
}
