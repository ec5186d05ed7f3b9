/** The parameters of every kind of rule, in the order in which a row asks for them. */
import type { RuleKind } from '$lib/design/design';
import type { Quantity } from '$lib/quantity/unit';
import { METHODS } from '$lib/rules/method';

export type RuleField = { readonly key: string; readonly name: string } & (
	| {
			readonly type: 'quantity';
			readonly quantity: Quantity;
			readonly zero?: boolean;
			readonly open?: boolean;
	  }
	| { readonly type: 'source' | 'flag' | 'text' }
	| { readonly type: 'options'; readonly options: readonly (readonly [value: string, name: string])[] }
);

const source: RuleField = { key: 'source', name: 'Source', type: 'source' };
const quantity = (key: string, name: string, of: Quantity): RuleField => ({
	key,
	name,
	type: 'quantity',
	quantity: of
});
const otherCapacitance: RuleField = {
	key: 'otherCapacitance_F',
	name: 'Other X capacitance',
	type: 'quantity',
	quantity: 'capacitance',
	zero: true
};

export const RULE_FIELDS: Readonly<Record<RuleKind, readonly RuleField[]>> = {
	'capacitor-share': [quantity('divisor', 'C divided by', 'number')],
	'resonance-guard': [
		source,
		quantity('guard', 'Ratio kept from f', 'number'),
		quantity('harmonicGuard', 'from harmonics', 'number'),
		{
			key: 'method',
			name: 'Method',
			type: 'options',
			options: [
				['exact', 'exact network'],
				['approximate', 'rule of thumb']
			]
		}
	],
	'reactance-limit': [
		quantity('reference_ohm', 'Reference', 'resistance'),
		quantity('divisor', 'divided by', 'number')
	],
	'minimum-benefit': [
		source,
		quantity('minimum_dB', 'At least', 'gain'),
		quantity('frequencyFrom_Hz', 'from', 'frequency')
	],
	'inrush-current': [
		source,
		quantity('limit_A', 'At most', 'current'),
		{ key: 'includeCapacitor', name: 'Count C too', type: 'flag' }
	],
	'voltage-rating': [source, quantity('limit_V', 'At most', 'voltage')],
	'reactive-current': [quantity('limit_A', 'At most', 'current')],
	'displacement-factor': [quantity('minimum', 'At least', 'number'), otherCapacitance],
	discharge: [
		quantity('resistance_ohm', 'Bleed resistor', 'resistance'),
		{ key: 'resistorTolerance', name: 'its tolerance', type: 'quantity', quantity: 'fraction', zero: true },
		quantity('seconds', 'Within', 'time'),
		quantity('safeVoltage_V', 'down to', 'voltage'),
		otherCapacitance
	],
	'ripple-current': [source, quantity('limit_A', 'At most', 'current')],
	'input-stability': [source, quantity('margin', 'Margin, ratio', 'number')],
	'self-resonance': [
		quantity('frequency_Hz', 'Useful up to', 'frequency'),
		quantity('factor', 'times', 'number')
	],
	'manual-band': [
		{ key: 'from_F', name: 'From', type: 'quantity', quantity: 'capacitance', open: true },
		{ key: 'to_F', name: 'to', type: 'quantity', quantity: 'capacitance', open: true },
		{ key: 'reason', name: 'Reason', type: 'text' }
	]
};

/** Names in the order in which a menu offers them. */
export const RULE_NAMES = Object.fromEntries(
	Object.values(METHODS).map(({ kind, name }) => [kind, name])
) as Readonly<Record<RuleKind, string>>;
