/** The voltage left on the plug's pins some seconds after disconnection. */
import type { Design, DischargeRule } from '$lib/design/design';
import type { Finding } from './finding';
import { computed, given, parts, symbol } from './formula';
import type { Method } from './method';
import { evaluated } from './outcome';
import { plain } from './wording';

export const DISCHARGE: Method = {
	kind: 'discharge',
	name: 'Discharge',
	formula: parts`${symbol('C', 'x')} ≤ ${symbol('t')}/(${symbol('R', 'max')}·ln(${symbol('V', '0')}/${symbol('V', 's')})) − ${symbol('C', 'other')}`,
	rationale: 'What is unplugged must soon be safe to touch.',
	derivation: [
		'A capacitor discharges through R as V(t) = V0·exp(−t/(RC)); it reaches the safe voltage after t = R·C·ln(V0/Vs).',
		'V0 is the peak of the highest mains voltage, √2·V_max (on dc V_max itself). The resistor is put in at its upper tolerance, and the other capacitors across the line are taken off.'
	],
	source: {
		text: 'Law of the discharge. Time and voltage come from the standard that applies: for example 60 V within 5 s in IEC 60204-1, 6.2.4, and 5 s at the plug’s pins in IEC 61010-1, 6.10.3, both known from public quotations only.',
		status: 'textbook'
	},
	assumptions: [
		'One resistor discharges all capacitance across the line; disconnection at the peak of the voltage.'
	],
	misleads: [
		'What discharges the capacitor must work in every position of the switch and with any single fault that the standard names.',
		'A series pair of resistors shares the voltage and survives one short; its tolerance is that of the sum.'
	],
	cautions: [
		'Time, voltage and fault conditions follow from the standard and the local code that apply; a qualified person must confirm them and the measurement at the plug.'
	]
};

/**
 * Forbids every Cx that still holds more than the safe voltage after the given time:
 * (t/(R·(1 + tol)·ln(V0/Vs)) − C_other, ∞).
 * @param design the worksheet's design
 * @param rule resistance [Ω] and its tolerance, time [s], safe voltage [V], other capacitance [F]
 * @returns a finding with one band [F]; without band where the peak voltage is safe already
 * @example discharge(design, { resistance_ohm: 940e3, seconds: 2, … }).bands[0].from // 1.1915e-6 at 253 V
 * Source: textbook.
 */
export function discharge(design: Design, rule: DischargeRule): Finding {
	const { kind, voltageMax_V: voltage } = design.supply;
	const { seconds, safeVoltage_V: safe, otherCapacitance_F: other } = rule;
	const start = kind === 'ac' ? Math.SQRT2 * voltage : voltage;
	const resistance = rule.resistance_ohm * (1 + rule.resistorTolerance);
	const general = DISCHARGE.formula;
	if (start <= safe) {
		const numbers = parts`${computed(start, 'voltage')} ≤ ${given(safe, 'voltage')}`;
		return evaluated(rule, DISCHARGE, { bands: [], formula: { general, numbers, result: parts`no limit` } });
	}
	const limit = Math.max(0, seconds / (resistance * Math.log(start / safe)) - other);
	const takenOff = other > 0 ? parts` − ${given(other, 'capacitance')}` : [];
	const numbers = parts`${given(seconds, 'time')}/(${given(resistance, 'resistance')} · ln(${computed(start, 'voltage')}/${given(safe, 'voltage')}))`;
	return evaluated(rule, DISCHARGE, {
		bands: [
			{
				from: limit,
				to: Infinity,
				cause: `More than ${plain(safe, 'voltage')} left after ${plain(seconds, 'time')}`
			}
		],
		formula: {
			general,
			numbers: [...numbers, ...takenOff],
			result: limit > 0 ? [computed(limit, 'capacitance', 'down')] : parts`no capacitance`
		}
	});
}
