/** The displacement factor at light load. */
import type { Design, DisplacementFactorRule } from '$lib/design/design';
import type { Finding } from './finding';
import { computed, given, parts, symbol } from './formula';
import type { Method } from './method';
import { evaluated, notApplicable, notEvaluated } from './outcome';
import { plain } from './wording';

export const DISPLACEMENT_FACTOR: Method = {
	kind: 'displacement-factor',
	name: 'Displacement factor',
	formula: parts`${symbol('C', 'x')} ≤ ${symbol('P')}·tan(acos ${symbol('λ')})/(2π·${symbol('f', 'max')}·${symbol('V', 'max')}²) − ${symbol('C', 'other')}`,
	rationale: 'At light load the reactive power of the capacitors spoils the displacement factor.',
	derivation: [
		'Capacitors across the line take the reactive power Q = 2πfV²C. With the active power P the displacement factor is cos(atan(Q/P)), so Q may be at most P·tan(acos λ).',
		'The lightest load, the highest voltage and the highest line frequency are put in; the other X capacitors on the line side of the rectifier are taken off.'
	],
	source: { text: 'Law of reactive power.', status: 'textbook' },
	assumptions: ['The load itself draws a current in phase with the voltage; sinusoidal mains.'],
	misleads: [
		'It is the displacement factor of the fundamental. A rectifier’s distortion lowers the whole power factor further.',
		'Standby power does not change; metering of reactive energy does.'
	],
	cautions: ['Count all X capacitors on the line side of the rectifier.']
};

/**
 * Forbids every Cx that brings the displacement factor under the minimum at light load:
 * (P·tan(acos λ)/(2π·f_max·V_max²) − C_other, ∞).
 * @param design the worksheet's design
 * @param rule minimum λ, other X capacitance [F]
 * @returns a finding with one band [F]; not-applicable on dc, not-evaluated without a light load
 * @example displacementFactor(design, { minimum: 0.9, … }).bands[0].from // 7.225e-7 at 30 W, 253 V, 50 Hz
 * Source: textbook.
 */
export function displacementFactor(design: Design, rule: DisplacementFactorRule): Finding {
	const { kind, voltageMax_V: voltage, frequencyMax_Hz: frequency } = design.supply;
	if (kind === 'dc' || frequency === undefined) {
		return notApplicable(rule, DISPLACEMENT_FACTOR, 'A dc supply has no displacement factor.');
	}
	const power = design.load?.lightLoad_W;
	if (power === undefined)
		return notEvaluated(rule, DISPLACEMENT_FACTOR, 'The light load is missing: enter its power.');
	const { minimum, otherCapacitance_F: other } = rule;
	const tangent = Math.tan(Math.acos(minimum));
	const limit = Math.max(0, (power * tangent) / (2 * Math.PI * frequency * voltage ** 2) - other);
	const cause = `Displacement factor under ${String(minimum)} at ${plain(power, 'power')}`;
	const takenOff = other > 0 ? parts` − ${given(other, 'capacitance')}` : [];
	const numbers = parts`${given(power, 'power')} · ${computed(tangent, 'number')}/(2π · ${given(frequency, 'frequency')} · (${given(voltage, 'voltage')})²)`;
	return evaluated(rule, DISPLACEMENT_FACTOR, {
		bands: [{ from: limit, to: Infinity, cause }],
		formula: {
			general: DISPLACEMENT_FACTOR.formula,
			numbers: [...numbers, ...takenOff],
			result: limit > 0 ? [computed(limit, 'capacitance', 'down')] : parts`no capacitance`
		}
	});
}
