/** What a new design starts with, and what a rule that is added starts with; every value is the user's to change. */
import type { Design, Rule, RuleKind, Source } from './design';

const fivePercent = { toleranceMinus: 0.05, tolerancePlus: 0.05 } as const;
const tenPercent = { toleranceMinus: 0.1, tolerancePlus: 0.1 } as const;
const twentyPercent = { toleranceMinus: 0.2, tolerancePlus: 0.2 } as const;

const isImpedance = (source: Source): boolean => source.kind === 'impedance';
const isNetwork = (source: Source): boolean => source.kind !== 'impedance' && source.kind !== 'measured';

/** The first source that suits, or else the first there is. */
const sourceFor = ({ sources }: Design, suits: (source: Source) => boolean): string =>
	(sources.find(suits) ?? sources[0])?.id ?? '';

type Start = (id: string, design: Design) => Rule;

const STARTS: Readonly<Record<RuleKind, Start>> = {
	'capacitor-share': (id) => ({ id, kind: 'capacitor-share', class: 'design', divisor: 5 }),
	'resonance-guard': (id, design) => ({
		id,
		kind: 'resonance-guard',
		class: 'design',
		source: sourceFor(design, isNetwork),
		guard: 2,
		harmonicGuard: 1.15,
		method: 'exact'
	}),
	'reactance-limit': (id) => ({
		id,
		kind: 'reactance-limit',
		class: 'design',
		reference_ohm: 50,
		divisor: 10
	}),
	'minimum-benefit': (id, design) => ({
		id,
		kind: 'minimum-benefit',
		class: 'design',
		source: sourceFor(design, isNetwork),
		minimum_dB: 10,
		frequencyFrom_Hz: 150e3
	}),
	'inrush-current': (id, design) => ({
		id,
		kind: 'inrush-current',
		class: 'design',
		source: sourceFor(design, isImpedance),
		limit_A: 40,
		includeCapacitor: false
	}),
	'voltage-rating': (id, { supply, sources }) => ({
		id,
		kind: 'voltage-rating',
		class: 'mandatory',
		source: (sources.find(isImpedance) ?? sources[0])?.id ?? '',
		// Ringing may double the step; a limit beyond that would forbid nothing.
		limit_V: Math.ceil(supply.voltageMax_V * (supply.kind === 'ac' ? 2.5 : 1.8))
	}),
	'reactive-current': (id) => ({ id, kind: 'reactive-current', class: 'mandatory', limit_A: 0.035 }),
	'displacement-factor': (id) => ({
		id,
		kind: 'displacement-factor',
		class: 'design',
		minimum: 0.9,
		otherCapacitance_F: 0
	}),
	discharge: (id) => ({
		id,
		kind: 'discharge',
		class: 'mandatory',
		resistance_ohm: 1e6,
		resistorTolerance: fivePercent.tolerancePlus,
		seconds: 2,
		safeVoltage_V: 60,
		otherCapacitance_F: 0
	}),
	'ripple-current': (id, design) => ({
		id,
		kind: 'ripple-current',
		class: 'design',
		source: sourceFor(design, isNetwork),
		limit_A: 1
	}),
	'input-stability': (id, design) => ({
		id,
		kind: 'input-stability',
		class: 'design',
		source: sourceFor(design, isImpedance),
		margin: 2
	}),
	'self-resonance': (id, { switching }) => ({
		id,
		kind: 'self-resonance',
		class: 'advisory',
		frequency_Hz: Math.max(1, ...switching.map(({ frequencyMax_Hz }) => frequencyMax_Hz)),
		factor: 2
	}),
	'manual-band': (id) => ({
		id,
		kind: 'manual-band',
		class: 'design',
		from_F: null,
		to_F: 1e-9,
		reason: 'Crossed out by hand'
	})
};

/**
 * Makes a rule of a kind as it starts in a design.
 * @param kind the kind of rule
 * @param id its id, not yet in use among the design's rules
 * @param design the design that it will join; its first suitable source is taken
 * @returns the rule; where no source suits it names the first, and the design is refused until one is entered
 * @example newRule('capacitor-share', 'share', newDesign('ac')) // { …, class: 'design', divisor: 5 }
 * Source: common practice.
 */
export function newRule(kind: RuleKind, id: string, design: Design): Rule {
	return STARTS[kind](id, design);
}

const STARTING_RULES: readonly (readonly [RuleKind, string])[] = [
	['capacitor-share', 'share'],
	['resonance-guard', 'guard'],
	['reactance-limit', 'reactance']
];

const AC_RULES: readonly (readonly [RuleKind, string])[] = [
	['reactive-current', 'reactive'],
	['discharge', 'discharge']
];

const frame = {
	format: 'herringbone-design',
	formatVersion: 1,
	title: 'New worksheet',
	sources: [{ id: 'amn', label: 'Test network', kind: 'amn-50uH-5ohm', networks: 2 }],
	choice: { capacitance_F: null, ...tenPercent, series: 'E6' },
	rules: []
} as const;

const mains: Design = {
	...frame,
	supply: { kind: 'ac', voltage_V: 230, voltageMax_V: 253, frequency_Hz: 50, frequencyMax_Hz: 50 },
	switching: [
		{ id: 'converter', label: 'Converter', frequencyMin_Hz: 150e3, frequencyMax_Hz: 150e3, harmonics: 5 }
	],
	inductor: { inductance_H: 220e-6, ...twentyPercent },
	capacitor: { capacitance_F: 4.7e-6, ...twentyPercent }
};

const bus: Design = {
	...frame,
	supply: { kind: 'dc', voltage_V: 24, voltageMax_V: 32 },
	switching: [
		{ id: 'converter', label: 'Converter', frequencyMin_Hz: 300e3, frequencyMax_Hz: 300e3, harmonics: 5 }
	],
	inductor: { inductance_H: 4.7e-6, ...twentyPercent },
	capacitor: { capacitance_F: 22e-6, ...twentyPercent }
};

/**
 * Makes a design to start from: plausible parts, two networks, and the rules that practice starts with.
 * @param supply ac or dc
 * @returns a complete design without a choice
 * @example newDesign('dc').rules.map(({ kind }) => kind) // ['capacitor-share', 'resonance-guard', 'reactance-limit']
 * Source: common practice.
 */
export function newDesign(supply: 'ac' | 'dc'): Design {
	const design = supply === 'ac' ? mains : bus;
	const kinds = supply === 'ac' ? [...STARTING_RULES, ...AC_RULES] : STARTING_RULES;
	return { ...design, rules: kinds.map(([kind, id]) => newRule(kind, id, design)) };
}
