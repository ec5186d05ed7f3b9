/**
 * Switching on: a step of voltage into Ls and Rs, which feed the line-side capacitor and, through L, the capacitor C
 * with its damping branch, all discharged. The linear network is solved exactly by its natural modes.
 */
import type { CapacitorPart, Filter } from './filter';
import { impulseModes, most, opposite, stepModes, type Modes } from './modes';
import { plus, product, rootsOf, type Polynomial } from './polynomial';

/** The step and what it comes through. */
export interface Step {
	/** Height V [V]. */
	readonly voltage: number;
	/** Ls [H], ≥ 0. */
	readonly inductance: number;
	/** Rs [Ω], ≥ 0. */
	readonly resistance: number;
}

const trimmed = (of: Polynomial): Polynomial => {
	let length = of.length;
	while (length > 1 && of[length - 1] === 0) length -= 1;
	return of.slice(0, length);
};

/** Z_C of the filter as numerator over s·rest. */
const shuntOf = ({ capacitor, damping }: Filter): { numerator: Polynomial; rest: Polynomial } => {
	const own = [1, capacitor.capacitance * (capacitor.esr ?? 0)];
	if (!damping) return { numerator: own, rest: [capacitor.capacitance] };
	const beside = [1, damping.capacitance * damping.resistance];
	return {
		numerator: product(own, beside),
		rest: plus(product([capacitor.capacitance], beside), product([damping.capacitance], own))
	};
};

/** F and D of I = V·F/D, and M of V_x = V·M/(s·D). */
/**
 * Polynomials of the network in s, lowest power first: source current V·F/D, line-side voltage V·M/(s·D). The roots of
 * D are the natural frequencies of the network on its source.
 * @param step height [V], Ls [H], Rs [Ω]
 * @param choice the line-side capacitor
 * @param filter L, C and damping behind it; null for the line-side capacitor alone
 * @returns F, D and M
 * @example // 1 H, 1 Ω, 1 F: D = 1 + s + s²
 * ladderOf({ voltage: 1, inductance: 1, resistance: 1 }, { capacitance: 1 }, null).D // [1, 1, 1]
 * @see nodal analysis in s
 */
export function ladderOf(
	step: Step,
	choice: CapacitorPart,
	filter: Filter | null
): { F: Polynomial; D: Polynomial; M: Polynomial } {
	const own = [1, choice.capacitance * (choice.esr ?? 0)];
	const series = [step.resistance, step.inductance];
	if (!filter) {
		const F = [choice.capacitance];
		return { F, M: own, D: trimmed(plus(product([0, ...F], series), own)) };
	}
	const { numerator, rest } = shuntOf(filter);
	const { inductance, resistance = 0 } = filter.inductor;
	// Z_b = sL + R + Z_C = B/(s·rest); Z_x = own/(s·Cx); both in parallel are M/(s·F).
	const branch = plus(product([resistance, inductance], [0, ...rest]), numerator);
	const F = plus(product([choice.capacitance], branch), product(rest, own));
	const M = product(own, branch);
	return { F: trimmed(F), M: trimmed(M), D: trimmed(plus(product(series, [0, ...F]), M)) };
}

const peakOf = (modes: Modes): number => most(opposite(modes), most(modes));

const checked = (step: Step, choice: CapacitorPart): void => {
	for (const value of [step.voltage, step.inductance, step.resistance, choice.capacitance])
		if (!(value >= 0) || !Number.isFinite(value))
			throw new RangeError(`the step needs finite values ≥ 0, got ${value}`);
};

/**
 * Peak of the source current after a step into the discharged network. Winding and series resistances count; the
 * capacitors' inductances and the winding's capacitance do not.
 * @param step height [V], Ls [H], Rs [Ω]
 * @param choice the line-side capacitor
 * @param filter L, C and damping behind it; null for the line-side capacitor alone
 * @returns largest |current| [A], no more than 4e-6 of itself short; Infinity where nothing limits it
 * @throws RangeError when a value is negative or not finite
 * @example // 325.27 V, 100 µH, 0.4 Ω, 470 nF, behind it 33 µH and 4.7 µF: 61.81 A
 * peakSourceCurrent({ voltage: 325.27, inductance: 1e-4, resistance: 0.4 }, { capacitance: 470e-9 }, filter)
 * @see Heaviside's expansion theorem; agrees with ngspice to 0.1 % in tests/reference
 */
export function peakSourceCurrent(step: Step, choice: CapacitorPart, filter: Filter | null): number {
	checked(step, choice);
	const { F, D } = ladderOf(step, choice, filter);
	if (F.length >= D.length) return Infinity;
	return step.voltage * peakOf(impulseModes({ numerator: F, denominator: D, poles: rootsOf(D) }));
}

/**
 * Peak of the voltage across the line-side capacitor after a step into the discharged network; the same network as
 * for the current.
 * @param step height [V], Ls [H], Rs [Ω]
 * @param choice the line-side capacitor
 * @param filter L, C and damping behind it; null for the line-side capacitor alone
 * @returns largest |voltage| [V], no more than 4e-6 of itself short
 * @throws RangeError when a value is negative or not finite
 * @example // 325.27 V, 100 µH, 0.4 Ω, 470 nF, behind it 33 µH and 4.7 µF: 606.9 V
 * peakCapacitorVoltage({ voltage: 325.27, inductance: 1e-4, resistance: 0.4 }, { capacitance: 470e-9 }, filter)
 * @see Heaviside's expansion theorem; agrees with ngspice to 0.1 % in tests/reference
 */
export function peakCapacitorVoltage(step: Step, choice: CapacitorPart, filter: Filter | null): number {
	checked(step, choice);
	const { D, M } = ladderOf(step, choice, filter);
	return step.voltage * peakOf(stepModes({ numerator: M, denominator: D, poles: rootsOf(D) }));
}

/**
 * Joule integral of the inrush of one capacitor: ∫i²dt = C·V²/(2·Rs), whatever the inductance.
 * @param step height V [V] and Rs [Ω], > 0
 * @param capacitance C [F]
 * @returns I²t [A²s]
 * @throws RangeError when the resistance is not > 0
 * @example jouleIntegral({ voltage: 325.27, inductance: 1e-4, resistance: 0.4 }, 470e-9) // 0.062158
 * @see energy balance: Rs turns as much into heat as C stores
 */
export function jouleIntegral(step: Step, capacitance: number): number {
	if (!(step.resistance > 0)) throw new RangeError(`resistance must be > 0 Ω, got ${step.resistance}`);
	return (capacitance * step.voltage * step.voltage) / (2 * step.resistance);
}
