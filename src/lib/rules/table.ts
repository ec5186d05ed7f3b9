/** The one table of rules by kind, and the findings of a design. */
import type { Design, Rule, RuleKind } from '$lib/design/design';
import { capacitorShare } from './capacitor-share';
import { discharge } from './discharge';
import { displacementFactor } from './displacement-factor';
import type { Finding } from './finding';
import { inputStability } from './input-stability';
import { inrushCurrent } from './inrush-current';
import { manualBand } from './manual-band';
import { minimumBenefit } from './minimum-benefit';
import { reactanceLimit } from './reactance-limit';
import { reactiveCurrent } from './reactive-current';
import { resonanceGuard } from './resonance-guard';
import { rippleCurrent } from './ripple-current';
import { selfResonance } from './self-resonance';
import { voltageRating } from './voltage-rating';

type RuleOf<K extends RuleKind> = Extract<Rule, { readonly kind: K }>;

type RuleTable = { readonly [K in RuleKind]: (design: Design, rule: RuleOf<K>) => Finding };

const TABLE: RuleTable = {
	'capacitor-share': capacitorShare,
	'resonance-guard': resonanceGuard,
	'reactance-limit': reactanceLimit,
	'minimum-benefit': minimumBenefit,
	'inrush-current': inrushCurrent,
	'voltage-rating': voltageRating,
	'reactive-current': reactiveCurrent,
	'displacement-factor': displacementFactor,
	discharge,
	'ripple-current': rippleCurrent,
	'input-stability': inputStability,
	'self-resonance': selfResonance,
	'manual-band': manualBand
};

const answer = <K extends RuleKind>(design: Design, rule: RuleOf<K>, kind: K): Finding =>
	TABLE[kind](design, rule);

/**
 * Asks one rule; an override by name is noted on the finding of a design or advisory rule.
 * @param design the worksheet's design
 * @param rule one of its rules
 * @returns the finding, bands in farads
 * @example findingOf(design, design.rules[0]).state // 'evaluated'
 * Source: common practice.
 */
export function findingOf(design: Design, rule: Rule): Finding {
	const finding = answer(design, rule, rule.kind);
	if (rule.class === 'mandatory') return finding;
	const override = design.overrides?.find((entry) => entry.rule === rule.id);
	return override === undefined ? finding : { ...finding, override };
}

/**
 * Asks every rule of a design, in its order.
 * @param design the worksheet's design
 * @returns findings, one per rule
 * @example findingsOf(design).length === design.rules.length // true
 * Source: common practice.
 */
export function findingsOf(design: Design): Finding[] {
	return design.rules.map((rule) => findingOf(design, rule));
}
