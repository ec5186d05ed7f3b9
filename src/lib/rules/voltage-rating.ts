/** The ringing peak of the voltage on Cx at switch-on. */
import type { Design, VoltageRatingRule } from '$lib/design/design';
import type { Finding } from './finding';
import { computed, given, parts, symbol } from './formula';
import { stepVoltage } from './inrush-current';
import { sourceOf } from './lines';
import type { Method } from './method';
import { evaluated, notEvaluated } from './outcome';
import { plain } from './wording';

export const VOLTAGE_RATING: Method = {
	kind: 'voltage-rating',
	name: 'Voltage rating',
	formula: parts`${symbol('V')}·(1 + exp(−π${symbol('ζ')}/√(1 − ${symbol('ζ')}²))) ≤ ${symbol('V', 'lim')}`,
	rationale: 'Switched on through an inductance, Cx rings up to twice the voltage.',
	derivation: [
		'A step V into Ls, Rs and the discharged Cx overshoots to V·(1 + exp(−πζ/√(1 − ζ²))) with ζ = (Rs/2)·√(Cx/Ls), V itself from ζ = 1 on.',
		'The peak falls as Cx rises, because damping grows with Cx: a small Cx is the worst. V is the peak of the highest mains voltage (on dc the highest voltage), and Ls is put in at the end of its range that rings most.'
	],
	source: { text: 'Step response of a series circuit.', status: 'textbook' },
	assumptions: [
		'Cx alone and empty; closing at the peak of the voltage; a linear circuit without surge arrester.'
	],
	misleads: [
		'C behind L, a varistor or the converter’s load lower the peak; surges from lightning exceed it.'
	],
	cautions: [
		'A rating for surges follows from the capacitor’s class and the standard that applies, not from this peak.'
	]
};

/** Capacitance from which on the overshoot stays within the limit: 0 where any does, Infinity where none does [F]. */
const leastCapacitance = (
	voltage: number,
	limit: number,
	{ inductance, resistance }: { inductance: number; resistance: number }
): number => {
	if (limit >= 2 * voltage || (inductance === 0 && limit >= voltage)) return 0;
	if (limit < voltage || resistance === 0) return Infinity;
	const overshoot = Math.log(limit / voltage - 1);
	const zeta = limit === voltage ? 1 : -overshoot / Math.hypot(Math.PI, overshoot);
	return inductance * ((2 * zeta) / resistance) ** 2;
};

/**
 * Forbids every Cx that rings above the limit: (0, Ls·(2ζ/Rs)²) with the ζ whose overshoot is the limit.
 * @param design the worksheet's design
 * @param rule source, limit [V]
 * @returns a finding with at most one band [F]; not-evaluated for a source that is not given as Ls and Rs
 * @example voltageRating(design, { source: 'bus', limit_V: 50, … }).bands[0].from // 0
 * Source: textbook.
 */
export function voltageRating(design: Design, rule: VoltageRatingRule): Finding {
	const source = sourceOf(design, rule.source);
	if (source.kind !== 'impedance') {
		return notEvaluated(
			rule,
			VOLTAGE_RATING,
			`${source.label} is not given as inductance and resistance: name such a source.`
		);
	}
	const voltage = stepVoltage(design.supply);
	const worst = { inductance: source.inductanceMax_H, resistance: source.resistance_ohm };
	const limit = leastCapacitance(voltage, rule.limit_V, worst);
	const cause = `Ringing above ${plain(rule.limit_V, 'voltage')} from ${source.label}`;
	const result =
		limit === Infinity
			? parts`no capacitance`
			: parts`${symbol('C', 'x')} ≥ ${computed(limit, 'capacitance', 'up')}`;
	return evaluated(rule, VOLTAGE_RATING, {
		bands: limit === 0 ? [] : [{ from: 0, to: limit, cause, source: source.id }],
		formula: {
			general: VOLTAGE_RATING.formula,
			numbers: parts`${given(rule.limit_V, 'voltage')}, ${computed(voltage, 'voltage')}, ${given(worst.inductance, 'inductance')}, ${given(worst.resistance, 'resistance')}`,
			result: limit === 0 ? parts`no limit` : result
		}
	});
}
