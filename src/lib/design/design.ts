/**
 * The shape of one worksheet's question: all that the design file states, in SI base units with the unit in the key.
 * AC voltages are rms; tolerances are fractions (0.1 is 10 %).
 */
import type { SeriesName } from '$lib/quantity/series';

export type RuleClass = 'mandatory' | 'design' | 'advisory';

export interface Supply {
	readonly kind: 'ac' | 'dc';
	readonly voltage_V: number;
	readonly voltageMax_V: number;
	/** Present exactly when `kind` is `ac`. */
	readonly frequency_Hz?: number;
	readonly frequencyMax_Hz?: number;
}

export interface Load {
	readonly power_W: number;
	readonly voltageMin_V: number;
	readonly lightLoad_W?: number;
}

export interface Switching {
	readonly id: string;
	readonly label: string;
	readonly frequencyMin_Hz: number;
	readonly frequencyMax_Hz: number;
	/** Lines n = 1 … harmonics. */
	readonly harmonics: number;
	/** rms per harmonic, `harmonics` long [A]. */
	readonly current_A?: readonly number[];
}

export interface Tolerance {
	readonly toleranceMinus: number;
	readonly tolerancePlus: number;
}

export interface Inductor extends Tolerance {
	readonly inductance_H: number;
	readonly resistance_ohm?: number;
	readonly parallelCapacitance_F?: number;
	/** Id of a measured curve that stands for the part. */
	readonly curve?: string;
}

export interface CapacitorParasitics {
	readonly esr_ohm?: number;
	readonly esl_H?: number;
	readonly curve?: string;
}

export interface Capacitor extends Tolerance, CapacitorParasitics {
	readonly capacitance_F: number;
}

export interface Damping {
	readonly resistance_ohm: number;
	readonly capacitance_F: number;
}

export type NetworkKind = 'amn-50uH-5ohm' | 'amn-50uH' | 'amn-5uH-1ohm' | 'an-5uH';

export interface NetworkSource {
	readonly id: string;
	readonly label: string;
	readonly kind: NetworkKind;
	/** Networks in series in the differential-mode loop. */
	readonly networks: 1 | 2;
}

export interface ImpedanceSource {
	readonly id: string;
	readonly label: string;
	readonly kind: 'impedance';
	readonly inductanceMin_H: number;
	readonly inductanceMax_H: number;
	readonly resistance_ohm: number;
}

export interface MeasuredSource {
	readonly id: string;
	readonly label: string;
	readonly kind: 'measured';
	readonly curve: string;
}

export type Source = NetworkSource | ImpedanceSource | MeasuredSource;

export interface Choice extends Tolerance, CapacitorParasitics {
	readonly capacitance_F: number | null;
	readonly series: SeriesName;
}

interface RuleBase {
	readonly id: string;
	readonly class: RuleClass;
}

export interface CapacitorShareRule extends RuleBase {
	readonly kind: 'capacitor-share';
	readonly divisor: number;
}
export interface ResonanceGuardRule extends RuleBase {
	readonly kind: 'resonance-guard';
	readonly source: string;
	/** Frequency ratio kept from the fundamental, ≥ 1. */
	readonly guard: number;
	/** The same for n ≥ 2; 1 makes no bands for them. */
	readonly harmonicGuard: number;
	readonly method: 'approximate' | 'exact';
}
export interface ReactanceLimitRule extends RuleBase {
	readonly kind: 'reactance-limit';
	readonly reference_ohm: number;
	readonly divisor: number;
}
export interface MinimumBenefitRule extends RuleBase {
	readonly kind: 'minimum-benefit';
	readonly source: string;
	readonly minimum_dB: number;
	readonly frequencyFrom_Hz: number;
}
export interface InrushCurrentRule extends RuleBase {
	readonly kind: 'inrush-current';
	readonly source: string;
	readonly limit_A: number;
	readonly includeCapacitor: boolean;
}
export interface VoltageRatingRule extends RuleBase {
	readonly kind: 'voltage-rating';
	readonly source: string;
	readonly limit_V: number;
}
export interface ReactiveCurrentRule extends RuleBase {
	readonly kind: 'reactive-current';
	readonly limit_A: number;
}
export interface DisplacementFactorRule extends RuleBase {
	readonly kind: 'displacement-factor';
	readonly minimum: number;
	readonly otherCapacitance_F: number;
}
export interface DischargeRule extends RuleBase {
	readonly kind: 'discharge';
	readonly resistance_ohm: number;
	readonly resistorTolerance: number;
	readonly seconds: number;
	readonly safeVoltage_V: number;
	readonly otherCapacitance_F: number;
}
export interface RippleCurrentRule extends RuleBase {
	readonly kind: 'ripple-current';
	readonly source: string;
	readonly limit_A: number;
}
export interface InputStabilityRule extends RuleBase {
	readonly kind: 'input-stability';
	readonly source: string;
	/** Ratio |Zin| / |Zo| asked for, ≥ 1. */
	readonly margin: number;
}
export interface SelfResonanceRule extends RuleBase {
	readonly kind: 'self-resonance';
	readonly frequency_Hz: number;
	readonly factor: number;
}
export interface ManualBandRule extends RuleBase {
	readonly kind: 'manual-band';
	/** null is 0. */
	readonly from_F: number | null;
	/** null has no upper end. */
	readonly to_F: number | null;
	readonly reason: string;
}

export type Rule =
	| CapacitorShareRule
	| ResonanceGuardRule
	| ReactanceLimitRule
	| MinimumBenefitRule
	| InrushCurrentRule
	| VoltageRatingRule
	| ReactiveCurrentRule
	| DisplacementFactorRule
	| DischargeRule
	| RippleCurrentRule
	| InputStabilityRule
	| SelfResonanceRule
	| ManualBandRule;

export type RuleKind = Rule['kind'];

export interface Curve {
	readonly id: string;
	readonly label: string;
	readonly fileName: string;
	readonly sha256: string;
	/** Strictly increasing, n points [Hz]. */
	readonly frequency_Hz: readonly number[];
	readonly real_ohm: readonly number[];
	readonly imaginary_ohm: readonly number[];
}

export interface LimitPoint {
	readonly frequency_Hz: number;
	readonly quasiPeak_dBuV: number;
	readonly average_dBuV: number;
}

export interface Emission {
	readonly limit: 'cispr-32-a' | 'cispr-32-b' | 'table';
	readonly table?: readonly LimitPoint[];
	readonly margin_dB: number;
}

/** A note pinned to a chart point. */
export interface Pin {
	readonly id: string;
	readonly text: string;
	readonly frequency_Hz: number;
	readonly impedance_ohm: number;
}

export interface Override {
	readonly rule: string;
	readonly by: string;
	readonly reason: string;
	/** ISO 8601 calendar date. */
	readonly date: string;
}

export interface Design {
	readonly format: 'herringbone-design';
	readonly formatVersion: 1;
	readonly title: string;
	readonly supply: Supply;
	readonly load?: Load;
	readonly switching: readonly Switching[];
	readonly inductor: Inductor;
	readonly capacitor: Capacitor;
	readonly damping?: Damping;
	readonly sources: readonly Source[];
	readonly choice: Choice;
	readonly rules: readonly Rule[];
	readonly curves?: readonly Curve[];
	readonly emission?: Emission;
	readonly pins?: readonly Pin[];
	readonly overrides?: readonly Override[];
	readonly notes?: string;
}
