/** Cx as a share of the capacitor C on the converter's side. */
import type { CapacitorShareRule, Design } from '$lib/design/design';
import type { Finding } from './finding';
import { computed, given, parts, symbol } from './formula';
import type { Method } from './method';
import { evaluated } from './outcome';

export const CAPACITOR_SHARE: Method = {
	kind: 'capacitor-share',
	name: 'Share of C',
	formula: parts`${symbol('C', 'x')} ≤ ${symbol('C', 'min')}/${symbol('k')}`,
	rationale: 'A small Cx leaves the filter’s cut-off where it was designed.',
	derivation: [
		'With a lossless source inductance Ls and a = Ls/L, b = Cx/C, x = ω²LC the natural frequencies solve 1 − x(1 + a + ab) + abx² = 0; without Cx the root is x = 1/(1 + a).',
		'For a source inductance without bound the cut-off falls by 1 − 1/√(1 + b), which is the largest shift that any source can cause: 8.7 % for one fifth. For a permitted shift p the share is 1/(1 − p)² − 1.',
		'The lower tolerance of C is put in, since the share is then largest.'
	],
	source: {
		text: 'Convention of filter design; the shift follows from the characteristic polynomial.',
		status: 'common practice'
	},
	assumptions: ['Lossless L, C and source inductance; C at its lower tolerance.'],
	misleads: [
		'One fifth is a convention, not physics: a Cx as large as C attenuates more. Where the cut-off is not critical the limit may be relaxed.',
		'With a source of no impedance the cut-off does not move at all.',
		'Together with the reactance limit it asks for C ≥ 1/(2πf) at 5 Ω and one fifth, whatever L is.'
	],
	cautions: [
		'Put in C as it is under direct-voltage bias and at the end of its life, not the value printed on it.'
	]
};

/**
 * Forbids every Cx above the given share of C: (C·(1 − t⁻)/k, ∞).
 * @param design the worksheet's design
 * @param rule divisor k, > 0
 * @returns a finding with one band [F]
 * @example capacitorShare(design, { divisor: 5, … }).bands[0].from // 3.96e-7 with C = 2.2 µF −10 %
 * Source: common practice.
 */
export function capacitorShare(design: Design, rule: CapacitorShareRule): Finding {
	const { capacitance_F: capacitance, toleranceMinus } = design.capacitor;
	const lower = 1 - toleranceMinus;
	const limit = (capacitance * lower) / rule.divisor;
	const smallest = toleranceMinus === 0 ? [] : parts`${given(lower, 'number')} · `;
	return evaluated(rule, CAPACITOR_SHARE, {
		bands: [{ from: limit, to: Infinity, cause: `More than 1/${String(rule.divisor)} of the smallest C` }],
		formula: {
			general: CAPACITOR_SHARE.formula,
			numbers: [
				...smallest,
				...parts`${given(capacitance, 'capacitance')} / ${given(rule.divisor, 'number')}`
			],
			result: [computed(limit, 'capacitance', 'down')]
		}
	});
}
