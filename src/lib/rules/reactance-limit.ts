/** The reactance of Cx against the resistance of the measuring network. */
import type { Design, ReactanceLimitRule } from '$lib/design/design';
import type { Finding } from './finding';
import { computed, given, parts, symbol } from './formula';
import type { Method } from './method';
import { evaluated } from './outcome';
import { plain } from './wording';

export const REACTANCE_LIMIT: Method = {
	kind: 'reactance-limit',
	name: 'Reactance limit',
	formula: parts`${symbol('C', 'x')} ≥ ${symbol('k')}/(2π·${symbol('f', 'min')}·${symbol('R')})`,
	rationale: 'Cx must be the easier path beside the measuring network at the lowest switching frequency.',
	derivation: [
		'The reactance 1/(2πfCx) shall be at most the reference resistance divided by k: Cx ≥ k/(2πfR). It is largest at the lowest frequency of all switching entries.',
		'With 50 Ω and 10 this is the familiar Cx ≥ 1/(10πf).'
	],
	source: { text: 'Rule of thumb of filter design.', status: 'common practice' },
	assumptions: ['The network is taken as the reference resistance alone, and Cx as ideal.'],
	misleads: [
		'It does not ensure any attenuation: L limits the current that Cx diverts only where 2πf·(L∥Ls) is much larger than the reactance of Cx. At the limit, 145 kHz and C = 4.7 µF, L = 150 µH gains 18.6 dB while L = 4.7 µH loses 12.8 dB.',
		'In differential mode two networks in series are 100 Ω, and their inductance lies in parallel: below some hundred kilohertz the network is far from its resistance.',
		'Below 150 kHz the conducted limits do not apply; there the switching frequency is a safe stand-in for its first harmonic in the band.'
	],
	cautions: ['Read it with the exact benefit beside it, never alone.']
};

/**
 * Forbids every Cx whose reactance exceeds R/k at the lowest switching frequency: (0, k/(2π·f_min·R)).
 * @param design the worksheet's design
 * @param rule reference resistance R [Ω], divisor k
 * @returns a finding with one band [F]
 * @example reactanceLimit(design, { reference_ohm: 50, divisor: 10, … }).bands[0].to // 2.526e-7 at 126 kHz
 * Source: common practice.
 */
export function reactanceLimit(design: Design, rule: ReactanceLimitRule): Finding {
	const lowest = Math.min(...design.switching.map((entry) => entry.frequencyMin_Hz));
	const limit = rule.divisor / (2 * Math.PI * lowest * rule.reference_ohm);
	const most = plain(rule.reference_ohm / rule.divisor, 'resistance');
	return evaluated(rule, REACTANCE_LIMIT, {
		bands: [{ from: 0, to: limit, cause: `Reactance of Cx above ${most} at ${plain(lowest, 'frequency')}` }],
		formula: {
			general: REACTANCE_LIMIT.formula,
			numbers: parts`${given(rule.divisor, 'number')}/(2π · ${given(lowest, 'frequency')} · ${given(rule.reference_ohm, 'resistance')})`,
			result: [computed(limit, 'capacitance', 'up')]
		}
	});
}
