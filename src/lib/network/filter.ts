/**
 * The converter's filter: noise current I into node c, capacitor C (and Rd–Cd) across c, inductor L from c to the
 * line-side node x, the source across x, and the line-side capacitor Cx across x.
 */
import { add, divide, multiply, parallel, reciprocal, type Complex } from './complex';
import { impedanceAt, type ImpedanceCurve } from './curve';

/** Inductance [H], winding resistance [Ω], capacitance across the winding [F]; a curve stands for all three. */
export interface InductorPart {
	readonly inductance: number;
	readonly resistance?: number;
	readonly parallelCapacitance?: number;
	readonly curve?: ImpedanceCurve;
}

/** Capacitance [F] with series resistance [Ω] and inductance [H]; a curve stands for all three. */
export interface CapacitorPart {
	readonly capacitance: number;
	readonly esr?: number;
	readonly esl?: number;
	readonly curve?: ImpedanceCurve;
}

/** Rd [Ω] in series with Cd [F], both across C. */
export interface DampingBranch {
	readonly resistance: number;
	readonly capacitance: number;
}

export interface Filter {
	readonly inductor: InductorPart;
	readonly capacitor: CapacitorPart;
	readonly damping?: DampingBranch;
}

const TURN = 2 * Math.PI;

/**
 * Impedance of a real capacitor: Z = ESR + jωESL + 1/(jωC), or its measured curve.
 * @param part the capacitor
 * @param frequency [Hz], > 0
 * @returns impedance [Ω]
 * @throws RangeError when frequency is not > 0; OutsideCurveError where its curve was not measured
 * @example capacitorImpedance({ capacitance: 470e-9, esr: 0.012, esl: 18e-9 }, 10e6) // |Z| = 1.0972 Ω
 * @see common practice (series equivalent circuit)
 */
export function capacitorImpedance(part: CapacitorPart, frequency: number): Complex {
	if (!(frequency > 0)) throw new RangeError(`frequency must be > 0 Hz, got ${frequency}`);
	if (part.curve) return impedanceAt(part.curve, frequency);
	const omega = TURN * frequency;
	return { re: part.esr ?? 0, im: omega * (part.esl ?? 0) - 1 / (omega * part.capacitance) };
}

/**
 * Impedance of a real inductor: Z = (DCR + jωL) ∥ 1/(jωC_par), or its measured curve.
 * @param part the inductor
 * @param frequency [Hz], > 0
 * @returns impedance [Ω]
 * @throws RangeError when frequency is not > 0; OutsideCurveError where its curve was not measured
 * @example inductorImpedance({ inductance: 33e-6 }, 145e3) // 30.065j Ω
 * @see common practice (parallel equivalent circuit)
 */
export function inductorImpedance(part: InductorPart, frequency: number): Complex {
	if (!(frequency > 0)) throw new RangeError(`frequency must be > 0 Hz, got ${frequency}`);
	if (part.curve) return impedanceAt(part.curve, frequency);
	const omega = TURN * frequency;
	const winding = { re: part.resistance ?? 0, im: omega * part.inductance };
	const across = part.parallelCapacitance ?? 0;
	if (across === 0) return winding;
	return divide(winding, { re: 1 - omega * across * winding.im, im: omega * across * winding.re });
}

/**
 * Impedance of the converter-side capacitor with its damping branch: Z_C ∥ (Rd + 1/(jωCd)).
 * @param filter the filter
 * @param frequency [Hz], > 0
 * @returns impedance [Ω]
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a curve was not measured
 * @example shuntImpedance({ inductor: { inductance: 33e-6 }, capacitor: { capacitance: 4.7e-6 } }, 145e3) // −0.23354j Ω
 */
export function shuntImpedance(filter: Filter, frequency: number): Complex {
	const capacitor = capacitorImpedance(filter.capacitor, frequency);
	if (!filter.damping) return capacitor;
	const { resistance, capacitance } = filter.damping;
	return parallel(capacitor, { re: resistance, im: -1 / (TURN * frequency * capacitance) });
}

/**
 * Impedance of the filter seen from the line-side node: Z_f = Z_L + Z_C.
 * @param filter the filter
 * @param frequency [Hz], > 0
 * @returns impedance [Ω]
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a curve was not measured
 * @example filterImpedance({ inductor: { inductance: 33e-6 }, capacitor: { capacitance: 4.7e-6 } }, 145e3) // 29.832j Ω
 */
export function filterImpedance(filter: Filter, frequency: number): Complex {
	return add(inductorImpedance(filter.inductor, frequency), shuntImpedance(filter, frequency));
}

/**
 * Admittance at the line-side node without Cx: Y_p = 1/(Z_L + Z_C) + 1/Z_s.
 * @param filter the filter
 * @param sourceZ source impedance [Ω]
 * @param frequency [Hz], > 0
 * @returns admittance [S]
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF, two 50 µH networks at 145 kHz: 0.01119 − 0.04437j S
 * nodeAdmittance(filter, sourceImpedance({ kind: 'amn-50uH-5ohm', networks: 2 }, 145e3), 145e3)
 * @see Norton's theorem at the line-side node
 */
export function nodeAdmittance(filter: Filter, sourceZ: Complex, frequency: number): Complex {
	return add(reciprocal(filterImpedance(filter, frequency)), reciprocal(sourceZ));
}

/**
 * Line-side voltage per ampere of noise current: V_x/I = H / (Y_p + Y_x), H = Z_C/(Z_L + Z_C).
 * @param filter the filter
 * @param shuntY admittance of Cx [S]; zero without it
 * @param sourceZ source impedance [Ω]
 * @param frequency [Hz], > 0
 * @returns transfer impedance [V/A]
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF, two 50 µH networks at 145 kHz without Cx: 0.17109 V/A
 * magnitude(transferImpedance(filter, { re: 0, im: 0 }, sourceZ, 145e3))
 */
export function transferImpedance(
	filter: Filter,
	shuntY: Complex,
	sourceZ: Complex,
	frequency: number
): Complex {
	const shunt = shuntImpedance(filter, frequency);
	const series = inductorImpedance(filter.inductor, frequency);
	// The form without 1/Z_s keeps a short-circuited source finite.
	const loop = add(add(series, shunt), sourceZ);
	const detour = multiply(multiply(add(series, shunt), sourceZ), shuntY);
	return divide(multiply(shunt, sourceZ), add(loop, detour));
}

/**
 * Impedance that the converter sees: Z_o = Z_C ∥ (Z_L + Z_s ∥ 1/Y_x).
 * @param filter the filter
 * @param shuntY admittance of Cx [S]; zero without it
 * @param sourceZ source impedance [Ω]
 * @param frequency [Hz], > 0
 * @returns output impedance of the filter [Ω]
 * @throws RangeError when frequency is not > 0; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF, 9.4 µF + 2.419 Ω, source 0.1 Ω + 100 µH, no Cx: 9.265 Ω at 3.824 kHz
 * magnitude(outputImpedance(filter, { re: 0, im: 0 }, { re: 0.1, im: 2.403 }, 3824))
 * @see R. D. Middlebrook, input filter considerations (title recalled)
 */
export function outputImpedance(
	filter: Filter,
	shuntY: Complex,
	sourceZ: Complex,
	frequency: number
): Complex {
	const line = divide(sourceZ, add({ re: 1, im: 0 }, multiply(sourceZ, shuntY)));
	return parallel(
		shuntImpedance(filter, frequency),
		add(inductorImpedance(filter.inductor, frequency), line)
	);
}
