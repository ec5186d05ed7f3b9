/** A band crossed out by hand. */
import type { Design, ManualBandRule } from '$lib/design/design';
import type { Finding } from './finding';
import { parts } from './formula';
import type { Method } from './method';
import { evaluated } from './outcome';
import { wordedBand } from './wording';

export const MANUAL_BAND: Method = {
	kind: 'manual-band',
	name: 'Crossed out by hand',
	formula: parts`a < Cx < b`,
	rationale: 'Somebody knows a reason that no formula here knows.',
	derivation: ['The band is forbidden as drawn, with the reason that was given.'],
	source: { text: 'The judgement of the person who crossed it out.', status: 'judgement' },
	assumptions: [],
	misleads: ['The band does not move when the design changes: look at it again after every change.'],
	cautions: []
};

/**
 * Forbids the band that was crossed out by hand.
 * @param _design not used
 * @param rule ends [F], null for none, and the reason
 * @returns a finding with one band [F]
 * @example manualBand(design, { from_F: 1e-7, to_F: null, … }).bands[0].to // Infinity
 * Source: the person who drew it.
 */
export function manualBand(_design: Design, rule: ManualBandRule): Finding {
	const band = { from: rule.from_F ?? 0, to: rule.to_F ?? Infinity };
	return evaluated(rule, MANUAL_BAND, {
		bands: [{ ...band, cause: `Crossed out by hand: ${rule.reason}` }],
		formula: { general: [], numbers: [], result: parts`not ${wordedBand(band)}` }
	});
}
