/** The current that Cx draws from the mains at line frequency. */
import type { Design, ReactiveCurrentRule } from '$lib/design/design';
import type { Finding } from './finding';
import { computed, given, parts, symbol } from './formula';
import type { Method } from './method';
import { evaluated, notApplicable } from './outcome';
import { plain } from './wording';

export const REACTIVE_CURRENT: Method = {
	kind: 'reactive-current',
	name: 'Reactive current',
	formula: parts`${symbol('C', 'x')} ≤ ${symbol('I')}/(2π·${symbol('f', 'max')}·${symbol('V', 'max')})`,
	rationale: 'Cx draws current at line frequency whether or not the converter works.',
	derivation: [
		'A capacitor at the rms voltage V takes I = 2πfVCx. The highest line frequency and the highest voltage are put in.'
	],
	source: { text: 'Law of the capacitor in the steady state.', status: 'textbook' },
	assumptions: ['Sinusoidal mains at its highest voltage and frequency; Cx alone, no other capacitor.'],
	misleads: [
		'Harmonics of the mains add to the current; at 400 Hz the same capacitor takes eight times the current of 50 Hz.',
		'Power metering and limits on harmonic current judge the whole apparatus, not Cx alone.'
	],
	cautions: []
};

/**
 * Forbids every Cx that draws more than the limit at line frequency: (I/(2π·f_max·V_max), ∞).
 * @param design the worksheet's design
 * @param rule limit, rms [A]
 * @returns a finding with one band [F]; not-applicable on dc
 * @example reactiveCurrent(design, { limit_A: 0.035, … }).bands[0].from // 4.403e-7 at 253 V, 50 Hz
 * Source: textbook.
 */
export function reactiveCurrent(design: Design, rule: ReactiveCurrentRule): Finding {
	const { kind, voltageMax_V: voltage, frequencyMax_Hz: frequency } = design.supply;
	if (kind === 'dc' || frequency === undefined) {
		return notApplicable(rule, REACTIVE_CURRENT, 'A dc supply has no line frequency.');
	}
	const limit = rule.limit_A / (2 * Math.PI * frequency * voltage);
	return evaluated(rule, REACTIVE_CURRENT, {
		bands: [
			{
				from: limit,
				to: Infinity,
				cause: `Reactive current above ${plain(rule.limit_A, 'current')} at line frequency`
			}
		],
		formula: {
			general: REACTIVE_CURRENT.formula,
			numbers: parts`${given(rule.limit_A, 'current')}/(2π · ${given(frequency, 'frequency')} · ${given(voltage, 'voltage')})`,
			result: [computed(limit, 'capacitance', 'down')]
		}
	});
}
