/** The best damping branch Rd–Cd across C: the resistance that keeps the peak of the output impedance lowest. */
import type { Interval } from '$lib/quantity/interval';
import type { CapacitorPart, DampingBranch, Filter } from './filter';
import { outputPeak, type Peak } from './peak';
import type { SourceModel } from './source';

/** The branch, and the peak it leaves. */
export interface BestDamping extends DampingBranch {
	/** Peak of |Z_o| with a source of no impedance [Ω]. */
	readonly peak: number;
	/** Where it lies [Hz]. */
	readonly frequency: number;
}

/**
 * Best damping for n = Cd/C, with R0 = √(L/C) and f0 = 1/(2π√(LC)):
 * Rd = R0·√((2 + n)(4 + 3n)/(2n²(4 + n))), peak R0·√(2(2 + n))/n at f0·√(2/(2 + n)).
 * For a source of inductance Ls put L + Ls in place of L.
 * @param inductance L or L + Ls [H], > 0
 * @param capacitance C [F], > 0
 * @param ratio n = Cd/C, > 0
 * @returns Rd [Ω], Cd [F], peak [Ω] and its frequency [Hz]
 * @throws RangeError when a value is not > 0
 * @example bestDamping(33e-6, 4.7e-6, 2) // Rd 2.4189 Ω, Cd 9.4 µF, 3.747 Ω at 9.036 kHz
 * @see R. W. Erickson, Optimal single resistor damping of input filters; Erickson and Maksimović, Fundamentals of
 * Power Electronics, ch. 10 (titles known, formulas recalled; the optimum is confirmed numerically in the tests)
 */
export function bestDamping(inductance: number, capacitance: number, ratio: number): BestDamping {
	for (const value of [inductance, capacitance, ratio])
		if (!(value > 0)) throw new RangeError(`inductance, capacitance and ratio must be > 0, got ${value}`);
	const n = ratio;
	const size = Math.sqrt(inductance / capacitance);
	const corner = 1 / (2 * Math.PI * Math.sqrt(inductance * capacitance));
	return {
		resistance: size * Math.sqrt(((2 + n) * (4 + 3 * n)) / (2 * n * n * (4 + n))),
		capacitance: n * capacitance,
		peak: (size * Math.sqrt(2 * (2 + n))) / n,
		frequency: corner * Math.sqrt(2 / (2 + n))
	};
}

/**
 * Ratio n = Cd/C whose best damping keeps the peak at a target: n = (R0/Z)²·(1 + √(1 + 4·(Z/R0)²)).
 * @param inductance L or L + Ls [H], > 0
 * @param capacitance C [F], > 0
 * @param target highest |Z_o| allowed [Ω], > 0
 * @returns n
 * @throws RangeError when a value is not > 0
 * @example dampingRatioFor(33e-6, 4.7e-6, 3.7473) // 2.0000
 * @see as bestDamping
 */
export function dampingRatioFor(inductance: number, capacitance: number, target: number): number {
	for (const value of [inductance, capacitance, target])
		if (!(value > 0)) throw new RangeError(`inductance, capacitance and target must be > 0, got ${value}`);
	const share = (target * target * capacitance) / inductance;
	return (1 + Math.sqrt(1 + 4 * share)) / share;
}

/** A proposal with what it does to the real network. */
export interface DampingProposal extends BestDamping {
	/** Exact peaks on the given source, without and with the branch. */
	readonly before: Peak;
	readonly after: Peak;
}

/** Where the peaks are taken. */
export interface DampingSetting {
	/** The line-side capacitor; null without one. */
	readonly choice: CapacitorPart | null;
	readonly source: SourceModel;
	/** [Hz] */
	readonly range: Interval;
	/** Inductance of the source that the branch is designed for [H]; 0 designs it for L alone. */
	readonly sourceInductance: number;
}

/**
 * Proposes a damping branch and tells the exact peak of |Z_o| before and after it.
 * @param filter the filter; a branch that it has is left out before and replaced after
 * @param ratio n = Cd/C, > 0
 * @param setting source, line-side capacitor, frequency range [Hz] and the Ls to design for [H]
 * @returns the branch with both peaks [Ω]
 * @throws RangeError when a value is not > 0; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF, source 100 µH + 0.1 Ω, designed for both: Rd 4.856 Ω
 * proposeDamping(filter, 2, { choice: null, source, range, sourceInductance: 100e-6 })
 * @see bestDamping
 */
export function proposeDamping(filter: Filter, ratio: number, setting: DampingSetting): DampingProposal {
	const { inductor, capacitor } = filter;
	const inductance = inductor.inductance + setting.sourceInductance;
	const best = bestDamping(inductance, capacitor.capacitance, ratio);
	const { choice, source, range } = setting;
	return {
		...best,
		before: outputPeak({ inductor, capacitor }, choice, source, range),
		after: outputPeak({ inductor, capacitor, damping: best }, choice, source, range)
	};
}
