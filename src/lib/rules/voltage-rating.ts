/** The ringing peak of the voltage on Cx at switch-on. */
import type { Design, VoltageRatingRule } from '$lib/design/design';
import type { Finding } from './finding';
import { parts, symbol } from './formula';
import type { Method } from './method';
import { notEvaluated } from './outcome';

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

export function voltageRating(_design: Design, rule: VoltageRatingRule): Finding {
	return notEvaluated(rule, VOLTAGE_RATING, 'Not calculated by this version.');
}
