/** Gain over the line-side capacitance: the curve, where it passes zero, and its deepest points. */
import type { BenefitFinder } from './benefit';
import type { CapacitorPart } from './filter';
import { goldenMinimum, signChange } from './search';

/** A capacitance [F] and its gain [dB]. */
export interface GainPoint {
	readonly capacitance: number;
	readonly gain_dB: number;
}

export interface BenefitCurve {
	/** One per capacitance given. */
	readonly points: readonly GainPoint[];
	/** Capacitances at which the gain passes 0 dB [F], in order. */
	readonly breakEven: readonly number[];
	/** The two deepest valleys, deepest first; fewer where there are fewer. */
	readonly worst: readonly GainPoint[];
}

/** Spread of the gain, relative, at which a search for a valley ends. */
const SPREAD = 1e-7;

/**
 * Gain over capacitance, by the least gain of a finder at each.
 * @param finder filter, source and range, as benefitFinder makes it
 * @param capacitances in rising order, n of them [F]
 * @param parasitics series resistance [Ω] and inductance [H] that every value shares
 * @returns n points [dB], break-even capacitances [F] and the deepest valleys
 * @throws OutsideCurveError where the capacitor's curve was not measured
 * @example // 33 µH, 4.7 µF, two 50 µH networks, 145 kHz, 1 nF to 1 µF: break-even at 97.39 nF, −12.23 dB at 48.70 nF
 * benefitCurve(benefitFinder(filter, source, range), capacitances)
 * @see at one frequency an ideal Cx breaks even at twice the worst value
 */
export function benefitCurve(
	finder: BenefitFinder,
	capacitances: readonly number[],
	parasitics: Omit<CapacitorPart, 'capacitance'> = {}
): BenefitCurve {
	const gain = (capacitance: number): number => finder.worst({ ...parasitics, capacitance }).gain_dB;
	const gainAtLog = (log: number): number => gain(Math.exp(log));
	const points = capacitances.map((capacitance) => ({ capacitance, gain_dB: gain(capacitance) }));
	const breakEven: number[] = [];
	const valleys: GainPoint[] = [];
	points.forEach((here, index) => {
		const [before, after] = [points[index - 1], points[index + 1]];
		if (!before) return;
		const [from, to] = [Math.log(before.capacitance), Math.log((after ?? here).capacitance)];
		if (before.gain_dB > 0 !== here.gain_dB > 0)
			breakEven.push(Math.exp(signChange(gainAtLog, from, Math.log(here.capacitance))));
		if (!after || here.gain_dB > before.gain_dB || here.gain_dB >= after.gain_dB) return;
		const capacitance = Math.exp(goldenMinimum(gainAtLog, from, to, SPREAD));
		valleys.push({ capacitance, gain_dB: gain(capacitance) });
	});
	const worst = valleys.sort((a, b) => a.gain_dB - b.gain_dB).slice(0, 2);
	return { points, breakEven, worst };
}
