/** The filter's output impedance against the converter's negative input resistance. */
import type { Design, InputStabilityRule } from '$lib/design/design';
import type { Finding } from './finding';
import { parts, symbol } from './formula';
import type { Method } from './method';
import { notEvaluated } from './outcome';

export const INPUT_STABILITY: Method = {
	kind: 'input-stability',
	name: 'Input stability',
	formula: parts`max|${symbol('Z', 'o')}| ≤ ${symbol('V', 'min')}²/(${symbol('P')}·${symbol('m')})`,
	rationale:
		'A converter that draws constant power is a negative resistance, and an undamped filter before it oscillates.',
	derivation: [
		'A closed-loop converter draws P at any voltage: its input resistance is −V²/P, smallest in size at the lowest voltage. Where the filter’s output impedance stays under V_min²/P divided by a margin m of two or three, the loop gain of the two stays under one.',
		'The output impedance seen from the converter is Z_C in parallel with Z_L plus the source beside Cx. Its highest peak from 10 Hz to the lowest switching frequency is sought at the worst corner of tolerances and source inductance.'
	],
	source: { text: 'Middlebrook’s criterion for input filters.', status: 'recalled' },
	assumptions: ['Constant-power load with full bandwidth; sufficient, not necessary.'],
	misleads: [
		'The inductance of the source moves the peak far more than Cx does: 100 µH raised it 2.7-fold in an example where Cx added 3 %. Damping must be designed for L and the source inductance together.',
		'The bound on Cx is usually slack; the rule chiefly finds combinations without damping.'
	],
	cautions: ['Series resistances that are left out make the peak without bound.']
};

export function inputStability(_design: Design, rule: InputStabilityRule): Finding {
	return notEvaluated(rule, INPUT_STABILITY, 'Not calculated by this version.');
}
