/** The self-resonance of Cx against the highest frequency that needs it. */
import type { Design, SelfResonanceRule } from '$lib/design/design';
import type { Finding } from './finding';
import { computed, given, parts, symbol } from './formula';
import type { Method } from './method';
import { evaluated, notEvaluated } from './outcome';
import { plain } from './wording';

export const SELF_RESONANCE: Method = {
	kind: 'self-resonance',
	name: 'Self-resonance',
	formula: parts`${symbol('C', 'x')} ≤ 1/((2π·${symbol('k')}·${symbol('f')})²·${symbol('L', 'ESL')})`,
	rationale: 'Above its self-resonance Cx is an inductance, and more capacitance gains nothing.',
	derivation: [
		'Cx resonates with its own series inductance at f = 1/(2π√(ESL·Cx)). For this to stay at or above k times the frequency that still needs Cx, Cx ≤ 1/((2πkf)²·ESL).'
	],
	source: { text: 'Resonance of a series circuit.', status: 'textbook' },
	assumptions: ['ESL includes the leads and the loop on the board, and does not depend on Cx.'],
	misleads: [
		'Near the resonance the real part is better than the ideal one; far above it attenuation falls to the ratio of the impedance beside Cx to the ESL’s.',
		'Between the self-resonances of Cx and C the two can ring against each other.'
	],
	cautions: [
		'As a rule 0.6–1 nH per millimetre of lead and body (common practice): measure it in its place where it matters.'
	]
};

/**
 * Forbids every Cx whose self-resonance falls under factor · frequency: (1/((2πkf)²·ESL), ∞).
 * @param design the worksheet's design; the choice's ESL [H]
 * @param rule frequency [Hz], factor
 * @returns a finding with one band [F]; without band where ESL is 0; not-evaluated without ESL
 * @example selfResonance(design, { frequency_Hz: 1.45e6, factor: 1, … }).bands[0].from // 6.693e-7 with 18 nH
 * Source: textbook.
 */
export function selfResonance(design: Design, rule: SelfResonanceRule): Finding {
	const inductance = design.choice.esl_H;
	if (inductance === undefined) {
		return notEvaluated(rule, SELF_RESONANCE, 'The choice’s ESL is missing: enter it, with leads and loop.');
	}
	const general = SELF_RESONANCE.formula;
	if (inductance === 0) {
		return evaluated(rule, SELF_RESONANCE, {
			bands: [],
			formula: { general, numbers: [], result: parts`no limit` }
		});
	}
	const { factor, frequency_Hz: frequency } = rule;
	const limit = 1 / ((2 * Math.PI * factor * frequency) ** 2 * inductance);
	return evaluated(rule, SELF_RESONANCE, {
		bands: [
			{
				from: limit,
				to: Infinity,
				cause: `Self-resonance of Cx below ${plain(factor * frequency, 'frequency')}`
			}
		],
		formula: {
			general,
			numbers: parts`1/((2π · ${given(factor, 'number')} · ${given(frequency, 'frequency')})² · ${given(inductance, 'inductance')})`,
			result: [computed(limit, 'capacitance', 'down')]
		}
	});
}
