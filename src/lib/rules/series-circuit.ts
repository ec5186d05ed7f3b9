/** A voltage step into inductance, resistance and a discharged capacitor in series. */

/** A step V into L, R and C in series. */
export interface SeriesCircuit {
	/** Height of the step [V]. */
	readonly voltage: number;
	/** [H] */
	readonly inductance: number;
	/** [Ω] */
	readonly resistance: number;
	/** [F] */
	readonly capacitance: number;
}

const arc = (zeta: number): number => {
	const off = 1 - zeta;
	if (Math.abs(off) < 1e-6) return 1 + off / 3;
	return zeta < 1
		? Math.acos(zeta) / Math.sqrt(1 - zeta * zeta)
		: Math.acosh(zeta) / Math.sqrt(zeta * zeta - 1);
};

/** Peak current as a share of V/R, rising with the damping ratio from 0 to 1. */
const share = (zeta: number): number => 2 * zeta * Math.exp(-zeta * arc(zeta));

/**
 * Works out the damping ratio ζ = (R/2)·√(C/L).
 * @param circuit step and parts
 * @returns damping ratio; Infinity without inductance
 * @example dampingRatio({ voltage: 28, inductance: 2e-6, resistance: 4, capacitance: 10e-6 }) // 4.472
 * Source: textbook.
 */
export function dampingRatio({ inductance, resistance, capacitance }: SeriesCircuit): number {
	return (resistance / 2) * Math.sqrt(capacitance / inductance);
}

/**
 * Works out the peak current: (V/Z0)·exp(−ζ·acos ζ/√(1 − ζ²)), Z0 = √(L/C), with acosh above ζ = 1.
 * @param circuit step and parts
 * @returns peak current [A]
 * @example peakCurrent({ voltage: 325.27, inductance: 1e-4, resistance: 0.5, capacitance: 1e-6 }) // 31.294
 * Source: textbook; agrees with circuit simulation.
 */
export function peakCurrent(circuit: SeriesCircuit): number {
	const { voltage, inductance, resistance, capacitance } = circuit;
	if (inductance === 0) return voltage / resistance;
	const zeta = dampingRatio(circuit);
	return (voltage / Math.sqrt(inductance / capacitance)) * Math.exp(-zeta * arc(zeta));
}

/**
 * Works out the peak voltage on the capacitor: V·(1 + exp(−πζ/√(1 − ζ²))), V itself from ζ = 1 on.
 * @param circuit step and parts
 * @returns peak voltage [V]
 * @example peakVoltage({ voltage: 325.27, inductance: 1e-4, resistance: 0.5, capacitance: 1e-6 }) // 625.96
 * Source: textbook; agrees with circuit simulation.
 */
export function peakVoltage(circuit: SeriesCircuit): number {
	const zeta = dampingRatio(circuit);
	if (!(zeta < 1)) return circuit.voltage;
	return circuit.voltage * (1 + Math.exp((-Math.PI * zeta) / Math.sqrt(1 - zeta * zeta)));
}

/** Damping ratios beyond this give V/R to the last bit. */
const LARGEST_RATIO = 1e8;

/**
 * Finds the capacitance whose peak current is the limit; the peak rises with the capacitance throughout.
 * @param step height V [V], L [H], R [Ω]
 * @param limit peak current, > 0 [A]
 * @returns capacitance [F]; 0 where every capacitance exceeds the limit, Infinity where none does
 * @example limitingCapacitance({ voltage: 357.8, inductance: 50e-6, resistance: 0.4 }, 40) // 6.714e-7
 * Source: bisection in the damping ratio of the textbook's closed form.
 */
export function limitingCapacitance(step: Omit<SeriesCircuit, 'capacitance'>, limit: number): number {
	const { voltage, inductance, resistance } = step;
	if (limit * resistance >= voltage) return Infinity;
	if (inductance === 0) return 0;
	if (resistance === 0) return inductance * (limit / voltage) ** 2;
	const wanted = (limit * resistance) / voltage;
	let low = wanted / 2;
	let high = low;
	while (share(high) < wanted) {
		if (high > LARGEST_RATIO) return Infinity;
		low = high;
		high *= 2;
	}
	while (high - low > 1e-15 * high) {
		const middle = (low + high) / 2;
		if (middle <= low || middle >= high) break;
		if (share(middle) < wanted) low = middle;
		else high = middle;
	}
	return inductance * ((2 * low) / resistance) ** 2;
}
