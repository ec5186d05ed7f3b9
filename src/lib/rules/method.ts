/** What the method page and every finding say of each kind of rule. */
import type { RuleKind } from '$lib/design/design';
import { CAPACITOR_SHARE } from './capacitor-share';
import { DISCHARGE } from './discharge';
import { DISPLACEMENT_FACTOR } from './displacement-factor';
import type { FormulaPart } from './finding';
import { INPUT_STABILITY } from './input-stability';
import { INRUSH_CURRENT } from './inrush-current';
import { MANUAL_BAND } from './manual-band';
import { MINIMUM_BENEFIT } from './minimum-benefit';
import { REACTANCE_LIMIT } from './reactance-limit';
import { REACTIVE_CURRENT } from './reactive-current';
import { RESONANCE_GUARD } from './resonance-guard';
import { RIPPLE_CURRENT } from './ripple-current';
import { SELF_RESONANCE } from './self-resonance';
import { VOLTAGE_RATING } from './voltage-rating';

/** How far a source can be relied on. */
export type SourceStatus = 'published' | 'recalled' | 'common practice' | 'textbook' | 'judgement';

export interface Method {
	readonly kind: RuleKind;
	readonly name: string;
	readonly formula: readonly FormulaPart[];
	/** Why the rule exists, one sentence. */
	readonly rationale: string;
	/** Paragraphs. */
	readonly derivation: readonly string[];
	readonly source: { readonly text: string; readonly status: SourceStatus };
	readonly assumptions: readonly string[];
	/** When the rule misleads. */
	readonly misleads: readonly string[];
	readonly cautions: readonly string[];
}

/** Every kind of rule, in the order in which a worksheet is usually argued. */
export const METHODS: Readonly<Record<RuleKind, Method>> = {
	'capacitor-share': CAPACITOR_SHARE,
	'resonance-guard': RESONANCE_GUARD,
	'reactance-limit': REACTANCE_LIMIT,
	'minimum-benefit': MINIMUM_BENEFIT,
	'inrush-current': INRUSH_CURRENT,
	'voltage-rating': VOLTAGE_RATING,
	'reactive-current': REACTIVE_CURRENT,
	'displacement-factor': DISPLACEMENT_FACTOR,
	discharge: DISCHARGE,
	'ripple-current': RIPPLE_CURRENT,
	'input-stability': INPUT_STABILITY,
	'self-resonance': SELF_RESONANCE,
	'manual-band': MANUAL_BAND
};

/** Cautions that hold for every sheet. */
export const GENERAL_CAUTIONS: readonly string[] = [
	'Differential mode only: common-mode emission, and what turns one into the other, lie outside this sheet.',
	'Across mains only class X capacitors rated for the highest continuous voltage and certified to the standard that applies, with a fuse or a justified place, and a discharge path.',
	'Line to earth is class Y and outside this sheet.',
	'This is a calculation and a recorded approval, no proof of compliance; standards and local codes that apply, and the judgement of a qualified person, come first.'
];
