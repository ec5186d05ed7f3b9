/** The values of a design that may be turned to cure a conflict, and the way each is turned. */
import type { Design, Rule, RuleKind } from '$lib/design/design';
import type { Quantity } from '$lib/quantity/unit';
import { METHODS } from './method';

export interface Knob {
	/** A part of the filter is turned before a rule's factor or limit. */
	readonly tier: 'part' | 'factor';
	/** JSON pointer into the design. */
	readonly pointer: string;
	readonly symbol: string;
	readonly quantity: Quantity;
	/** Where it stands now, > 0 [SI]. */
	readonly value: number;
	readonly direction: 'up' | 'down';
	readonly least?: number;
	readonly most?: number;
	readonly turn: (design: Design, value: number) => Design;
	/** Whether turning it can change what a rule answers. */
	readonly reaches: (rule: Rule) => boolean;
}

/** What these kinds answer does not depend on the filter's parts. */
const APART_FROM_PARTS: readonly RuleKind[] = [
	'reactance-limit',
	'voltage-rating',
	'reactive-current',
	'displacement-factor',
	'discharge',
	'manual-band'
];

const dependsOnParts = (rule: Rule): boolean =>
	!APART_FROM_PARTS.includes(rule.kind) && !(rule.kind === 'inrush-current' && !rule.includeCapacitor);

const capacitor = (design: Design): Knob => ({
	tier: 'part',
	pointer: '/capacitor/capacitance_F',
	symbol: 'C',
	quantity: 'capacitance',
	value: design.capacitor.capacitance_F,
	direction: 'up',
	turn: (from, value) => ({ ...from, capacitor: { ...from.capacitor, capacitance_F: value } }),
	reaches: dependsOnParts
});

const inductor = (design: Design, direction: 'up' | 'down'): Knob => ({
	tier: 'part',
	pointer: '/inductor/inductance_H',
	symbol: 'L',
	quantity: 'inductance',
	value: design.inductor.inductance_H,
	direction,
	turn: (from, value) => ({ ...from, inductor: { ...from.inductor, inductance_H: value } }),
	reaches: dependsOnParts
});

const seriesInductance = (design: Design): Knob => ({
	tier: 'part',
	pointer: '/choice/esl_H',
	symbol: 'ESL of Cx',
	quantity: 'inductance',
	value: design.choice.esl_H ?? 0,
	direction: 'down',
	turn: (from, value) => ({ ...from, choice: { ...from.choice, esl_H: value } }),
	reaches: dependsOnParts
});

interface Parameter {
	readonly key: string;
	readonly name: string;
	readonly quantity: Quantity;
	readonly direction: 'up' | 'down';
	readonly least?: number;
	readonly most?: number;
	readonly tier?: 'part';
}

const ratio = (key: string, name: string): Parameter => ({
	key,
	name,
	quantity: 'number',
	direction: 'down',
	least: 1
});

/** What of each kind of rule may be eased, and how far. */
const PARAMETERS: Readonly<Record<Rule['kind'], readonly Parameter[]>> = {
	'capacitor-share': [ratio('divisor', 'divisor')],
	'resonance-guard': [ratio('guard', 'guard'), ratio('harmonicGuard', 'guard of the harmonics')],
	'reactance-limit': [ratio('divisor', 'divisor')],
	'minimum-benefit': [{ key: 'minimum_dB', name: 'minimum', quantity: 'gain', direction: 'down' }],
	'inrush-current': [{ key: 'limit_A', name: 'limit', quantity: 'current', direction: 'up' }],
	'voltage-rating': [{ key: 'limit_V', name: 'limit', quantity: 'voltage', direction: 'up' }],
	'reactive-current': [{ key: 'limit_A', name: 'limit', quantity: 'current', direction: 'up' }],
	'displacement-factor': [{ key: 'minimum', name: 'minimum', quantity: 'number', direction: 'down' }],
	discharge: [
		{ key: 'resistance_ohm', name: 'resistance', quantity: 'resistance', direction: 'down', tier: 'part' }
	],
	'ripple-current': [{ key: 'limit_A', name: 'limit', quantity: 'current', direction: 'up' }],
	'input-stability': [ratio('margin', 'margin')],
	'self-resonance': [ratio('factor', 'factor')],
	'manual-band': []
};

const withParameter = (design: Design, id: string, entry: Readonly<Record<string, number>>): Design => ({
	...design,
	rules: design.rules.map((rule) => (rule.id === id ? { ...rule, ...entry } : rule))
});

const valueOf = (rule: Rule, key: string): number => {
	const value: unknown = Object.entries(rule).find(([name]) => name === key)?.[1];
	return typeof value === 'number' ? value : 0;
};

/** A mandatory rule's limit is not the engineer's to ease; the bleeder is a part and may change under any class. */
const parametersOf = (design: Design, rule: Rule): Knob[] =>
	PARAMETERS[rule.kind]
		.filter(({ tier }) => tier === 'part' || rule.class !== 'mandatory')
		.map(({ key, name, tier, ...rest }) => ({
			...rest,
			tier: tier ?? 'factor',
			pointer: `/rules/${String(design.rules.indexOf(rule))}/${key}`,
			symbol: `${name} of ${METHODS[rule.kind].name} (${rule.id})`,
			value: valueOf(rule, key),
			turn: (from: Design, value: number) => withParameter(from, rule.id, { [key]: value }),
			reaches: ({ id }: Rule) => id === rule.id
		}));

const partsOf = (design: Design, rule: Rule): Knob[] => {
	switch (rule.kind) {
		case 'capacitor-share':
		case 'input-stability':
			return [capacitor(design)];
		case 'resonance-guard':
			return [inductor(design, 'up'), inductor(design, 'down')];
		case 'minimum-benefit':
		case 'ripple-current':
			return [inductor(design, 'up')];
		case 'self-resonance':
			return [seriesInductance(design)];
		default:
			return [];
	}
};

/**
 * Lists the values that may be turned to ease the rules in conflict, each once, in the order of the rules.
 * @param design the worksheet's design
 * @param rules ids of the rules in conflict
 * @returns knobs that stand above zero
 * @example knobsOf(design, ['share', 'reactance'])[0].pointer // '/capacitor/capacitance_F'
 * Source: common practice.
 */
export function knobsOf(design: Design, rules: readonly string[]): Knob[] {
	const knobs = design.rules
		.filter((rule) => rules.includes(rule.id))
		.flatMap((rule) => [...partsOf(design, rule), ...parametersOf(design, rule)]);
	return knobs.filter(
		(knob, index) =>
			knob.value > 0 &&
			knobs.findIndex(
				({ pointer, direction }) => pointer === knob.pointer && direction === knob.direction
			) === index
	);
}
