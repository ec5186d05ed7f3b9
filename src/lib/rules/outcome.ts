/** The three ways in which a rule answers, each carrying the words of its method. */
import type { Rule } from '$lib/design/design';
import type { Band, Finding, Formula } from './finding';
import type { Method } from './method';

/** What a rule worked out; `assumptions` and `cautions` add to those of its method. */
export interface Outcome {
	readonly bands: readonly Band[];
	readonly formula: Formula;
	readonly assumptions?: readonly string[];
	readonly cautions?: readonly string[];
	readonly thumbEdges?: Finding['thumbEdges'];
}

const said = (rule: Rule, method: Method): Pick<Finding, 'rule' | 'kind' | 'class' | 'rationale'> => ({
	rule: rule.id,
	kind: rule.kind,
	class: rule.class,
	rationale: method.rationale
});

/**
 * Answers with bands and the formula that gave them.
 * @param rule the rule asked
 * @param method its words
 * @param outcome bands [F], formula, and what this design adds to the words
 * @returns a finding in the state evaluated
 * @example evaluated(rule, METHOD, { bands: [], formula }).reason // null
 * Source: common practice.
 */
export function evaluated(rule: Rule, method: Method, outcome: Outcome): Finding {
	return {
		...said(rule, method),
		state: 'evaluated',
		reason: null,
		bands: outcome.bands,
		formula: outcome.formula,
		assumptions: [...method.assumptions, ...(outcome.assumptions ?? [])],
		cautions: [...method.cautions, ...(outcome.cautions ?? [])],
		...(outcome.thumbEdges === undefined ? {} : { thumbEdges: outcome.thumbEdges })
	};
}

const unanswered = (rule: Rule, method: Method): Omit<Finding, 'state' | 'reason'> => ({
	...said(rule, method),
	bands: [],
	formula: null,
	assumptions: method.assumptions,
	cautions: method.cautions
});

/**
 * Answers that data are missing or the formula does not reach this design.
 * @param rule the rule asked
 * @param method its words
 * @param reason what is missing and what to enter
 * @returns a finding in the state not-evaluated, without bands
 * @example notEvaluated(rule, METHOD, 'The choice has no ESL.').bands // []
 * Source: common practice.
 */
export function notEvaluated(rule: Rule, method: Method, reason: string): Finding {
	return { ...unanswered(rule, method), state: 'not-evaluated', reason };
}

/**
 * Answers that the rule says nothing of this kind of design.
 * @param rule the rule asked
 * @param method its words
 * @param reason why it does not apply
 * @returns a finding in the state not-applicable, without bands
 * @example notApplicable(rule, METHOD, 'The supply is dc.').state // 'not-applicable'
 * Source: common practice.
 */
export function notApplicable(rule: Rule, method: Method, reason: string): Finding {
	return { ...unanswered(rule, method), state: 'not-applicable', reason };
}
