/** What feeds the converter: artificial networks of the test standards, the installed mains, or a measured curve. */
import { parallel, type Complex } from './complex';
import { impedanceAt, type ImpedanceCurve } from './curve';

export type NetworkKind = 'amn-50uH-5ohm' | 'amn-50uH' | 'amn-5uH-1ohm' | 'an-5uH';

/** One artificial network, or two in series as the differential-mode current sees them. */
export interface NetworkModel {
	readonly kind: NetworkKind;
	readonly networks: 1 | 2;
}

/** Loop resistance [Ω] and a range of loop inductance [H]. */
export interface ImpedanceModel {
	readonly kind: 'impedance';
	readonly resistance: number;
	readonly inductanceMin: number;
	readonly inductanceMax: number;
}

export interface MeasuredModel {
	readonly kind: 'measured';
	readonly curve: ImpedanceCurve;
}

export type SourceModel = NetworkModel | ImpedanceModel | MeasuredModel;

/** Per line, at the terminals of the equipment: 50 Ω ∥ (L + R). */
const NETWORKS: Record<NetworkKind, { readonly inductance: number; readonly resistance: number }> = {
	'amn-50uH-5ohm': { inductance: 50e-6, resistance: 5 },
	'amn-50uH': { inductance: 50e-6, resistance: 0 },
	'amn-5uH-1ohm': { inductance: 5e-6, resistance: 1 },
	'an-5uH': { inductance: 5e-6, resistance: 0 }
};

const RECEIVER_OHM = 50;

/**
 * Impedance of the source at the converter's terminals.
 * Networks: Z = n · (50 Ω ∥ (R + jωL)); impedance: Z = Rs + jωLs; measured: the curve between its points.
 * @param source the model
 * @param frequency [Hz], > 0
 * @param inductance Ls of an `impedance` source [H], ≥ 0; its lower end when left out; ignored by the others
 * @returns impedance [Ω]
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a measured source was not measured
 * @example sourceImpedance({ kind: 'amn-50uH-5ohm', networks: 1 }, 150e3) // 32.72 Ω at 43.35°
 * @see CISPR 16-1-2, artificial mains networks 50 Ω/50 µH + 5 Ω, 50 Ω/50 µH and 50 Ω/5 µH + 1 Ω (values recalled;
 * every row of its impedance tables is recomputed in tests/reference); CISPR 25, 5 µH network (recalled)
 */
export function sourceImpedance(source: SourceModel, frequency: number, inductance?: number): Complex {
	if (!(frequency > 0)) throw new RangeError(`frequency must be > 0 Hz, got ${frequency}`);
	const omega = 2 * Math.PI * frequency;
	if (source.kind === 'impedance')
		return { re: source.resistance, im: omega * (inductance ?? source.inductanceMin) };
	if (source.kind === 'measured') return impedanceAt(source.curve, frequency);
	const { inductance: coil, resistance } = NETWORKS[source.kind];
	const one = parallel({ re: RECEIVER_OHM, im: 0 }, { re: resistance, im: omega * coil });
	return { re: source.networks * one.re, im: source.networks * one.im };
}

/**
 * Inductance by which a network is replaced in rules of thumb: L_s = networks × 50 µH or 5 µH.
 * @param source an artificial network
 * @returns inductance [H]
 * @example asymptoticInductance({ kind: 'amn-50uH-5ohm', networks: 2 }) // 0.0001
 * @see common practice
 */
export function asymptoticInductance(source: NetworkModel): number {
	return source.networks * NETWORKS[source.kind].inductance;
}
