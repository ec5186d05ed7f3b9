/** The thirteen kinds of rule, as they may be stated. */
import * as z from 'zod/mini';
import { byKind, flag, branch, id, oneOf, quantity, text } from './field';

const stated = <Kind extends string, Shape extends z.core.$ZodLooseShape>(kind: Kind, shape: Shape) =>
	branch(`the rule ${kind}`, {
		id: id('the id of the rule'),
		kind: z.literal(kind),
		class: oneOf('the class of the rule', ['mandatory', 'design', 'advisory']),
		...shape
	});

const source = id('the source that the rule is worked out with');
const divisor = (words: string) => quantity(words, 'number', { from: 1e-3, to: 1e6 });
const current = quantity('the current limit', 'current', { from: 1e-9, to: 1e6 });
const capacitance = (words: string, from: number) => quantity(words, 'capacitance', { from, to: 10 });
const otherCapacitance = capacitance('the other capacitance across the line', 0);
const ratio = (words: string, from: number) => quantity(words, 'number', { from, to: 100 });
const end = (words: string) => z.nullable(capacitance(words, 1e-15));

export const RULE_KINDS = [
	'capacitor-share',
	'resonance-guard',
	'reactance-limit',
	'minimum-benefit',
	'inrush-current',
	'voltage-rating',
	'reactive-current',
	'displacement-factor',
	'discharge',
	'ripple-current',
	'input-stability',
	'self-resonance',
	'manual-band'
] as const;

export const ruleSchema = byKind('the rule', RULE_KINDS, [
	stated('capacitor-share', { divisor: divisor('the divisor of the capacitor') }),
	stated('resonance-guard', {
		source,
		guard: ratio('the guard factor of the fundamental', 1),
		harmonicGuard: ratio('the guard factor of the harmonics', 1),
		method: oneOf('the method', ['approximate', 'exact'])
	}),
	stated('reactance-limit', {
		reference_ohm: quantity('the reference resistance', 'resistance', { from: 1e-6, to: 1e9 }),
		divisor: divisor('the divisor of the reference')
	}),
	stated('minimum-benefit', {
		source,
		minimum_dB: quantity('the benefit asked for', 'gain', { from: -200, to: 200 }),
		frequencyFrom_Hz: quantity('the lowest frequency of the rule', 'frequency', { from: 1, to: 1e9 })
	}),
	stated('inrush-current', {
		source,
		limit_A: current,
		includeCapacitor: flag('whether the converter’s capacitor is charged too')
	}),
	stated('voltage-rating', {
		source,
		limit_V: quantity('the voltage limit', 'voltage', { from: 1e-3, to: 1e6 })
	}),
	stated('reactive-current', { limit_A: current }),
	stated('displacement-factor', {
		minimum: quantity('the least displacement factor', 'number', { from: 0.01, to: 0.9999 }),
		otherCapacitance_F: otherCapacitance
	}),
	stated('discharge', {
		resistance_ohm: quantity('the discharge resistance', 'resistance', { from: 1e-3, to: 1e12 }),
		resistorTolerance: quantity('the tolerance of the resistor', 'fraction', { from: 0, to: 1, under: true }),
		seconds: quantity('the discharge time', 'time', { from: 1e-6, to: 1e6 }),
		safeVoltage_V: quantity('the safe voltage', 'voltage', { from: 1e-3, to: 1e6 }),
		otherCapacitance_F: otherCapacitance
	}),
	stated('ripple-current', { source, limit_A: current }),
	stated('input-stability', {
		source,
		margin: quantity('the impedance margin', 'number', { from: 1, to: 1000 })
	}),
	stated('self-resonance', {
		frequency_Hz: quantity('the frequency that Cx is needed at', 'frequency', { from: 1, to: 1e10 }),
		factor: quantity('the frequency factor', 'number', { from: 0.01, to: 1000 })
	}),
	stated('manual-band', {
		from_F: end('the lower end of the band'),
		to_F: end('the upper end of the band'),
		reason: text('the reason for crossing the band out', { most: 300 })
	})
]);
