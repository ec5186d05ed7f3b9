/** The ripple current in Cx over all lines. */
import type { Design, RippleCurrentRule } from '$lib/design/design';
import type { Finding } from './finding';
import { parts, symbol } from './formula';
import type { Method } from './method';
import { notEvaluated } from './outcome';

export const RIPPLE_CURRENT: Method = {
	kind: 'ripple-current',
	name: 'Ripple current',
	formula: parts`√(Σ|${symbol('I', 'N')}·${symbol('Y', 'x')}/(${symbol('Y', 'p')} + ${symbol('Y', 'x')})|²) ≤ ${symbol('I')}`,
	rationale: 'Cx is heated by what it diverts, most of all near resonance.',
	derivation: [
		'Each line’s noise current I reaches the line-side node as the Norton current I_N = I·Z_C/(Z_C + Z_L) and divides between Y_p and Cx: I_x = I_N·Y_x/(Y_p + Y_x).',
		'With y = ωCx and a limit under I_N the current exceeds the limit above one root of a quadratic in y; with a limit over I_N it exceeds it only between two roots around C0. For several lines the squares are added, each line at its own worst frequency and corner of the tolerances.'
	],
	source: { text: 'Nodal analysis of the ladder.', status: 'textbook' },
	assumptions: [
		'Line-frequency current and its harmonics are left out.',
		'The lines are not related in phase: their squares add.'
	],
	misleads: ['Every line at its own worst corner at once is more than can happen; it is the safe side.'],
	cautions: [
		'Add the current at line frequency, and the derating for frequency and temperature of the part’s own data.'
	]
};

export function rippleCurrent(_design: Design, rule: RippleCurrentRule): Finding {
	return notEvaluated(rule, RIPPLE_CURRENT, 'Not calculated by this version.');
}
