/** The fixed words of the sheet, one table per language; what people typed is never translated. */
import type { RuleClass, RuleKind } from '$lib/design/design';
import { german } from './words-de';
import { english } from './words-en';

export type Language = 'en' | 'de';

/** Braces mark a place that `fill` fills. */
export interface Words {
	/** Short names, as they stand in the strip and along the rule's edge. */
	readonly rule: Readonly<Record<RuleKind, string>>;
	readonly class: Readonly<Record<RuleClass, string>>;
	readonly document: {
		readonly type: string;
		readonly blank: string;
		readonly worked: string;
		readonly step: string;
	};
	readonly block: {
		readonly owner: string;
		readonly preparedBy: string;
		readonly approvedBy: string;
		readonly documentType: string;
		readonly title: string;
		readonly status: string;
		readonly dateOfIssue: string;
		readonly reference: string;
		readonly sheet: string;
		readonly number: string;
		readonly revision: string;
		readonly notIssued: string;
	};
	readonly check: {
		readonly codeLater: string;
		readonly decade: string;
		readonly data: string;
		readonly engine: string;
		readonly equalDecades: string;
		readonly reading: string;
		readonly cautions: string;
		readonly stepParts: string;
		readonly stepRule: string;
		readonly stepChoice: string;
		readonly rulesText: string;
	};
	readonly chart: {
		/** Head of the C scale: the chart cut at this frequency. */
		readonly scaleAt: string;
		readonly paneTitle: string;
		readonly capacitanceFalls: string;
		readonly source: string;
		readonly harmful: string;
		readonly thumb: string;
	};
	readonly strip: {
		readonly given: string;
		readonly supply: string;
		readonly load: string;
		readonly lightLoad: string;
		readonly converter: string;
		readonly filter: string;
		readonly sources: string;
		readonly rules: string;
		readonly windowAndChoice: string;
		readonly notes: string;
		readonly cautions: string;
		readonly inductor: string;
		readonly capacitor: string;
		readonly damping: string;
		readonly harmonics: string;
		readonly alternating: string;
		readonly direct: string;
		readonly measured: string;
		readonly numbersPutIn: string;
		readonly hatchTheBar: string;
		readonly window: string;
		readonly nominal: string;
		readonly choice: string;
		readonly margins: string;
		readonly benefitOf: string;
		readonly benefit: string;
		/** Where the sources stand in columns beside it. */
		readonly benefitColumns: string;
		readonly noRules: string;
		readonly moreRows: string;
	};
	readonly limit: {
		readonly not: string;
		readonly bands: string;
		readonly bandsTo: string;
		readonly none: string;
		readonly all: string;
		readonly notEvaluated: string;
		readonly notApplicable: string;
		readonly overridden: string;
		readonly anyValue: string;
		readonly noWindow: string;
		readonly nominalEmpty: string;
		readonly nominalOpen: string;
		readonly moreWindows: string;
	};
	readonly verdict: {
		readonly noChoice: string;
		readonly recommended: string;
		readonly forbidden: string;
		readonly nominalOnly: string;
		readonly worst: string;
	};
	readonly caution: {
		readonly open: string;
		readonly windowHarms: string;
		readonly choiceHarms: string;
		readonly advisory: string;
		readonly mode: string;
		readonly classX: string;
		readonly hotPlug: string;
		readonly approval: string;
		readonly standards: string;
	};
	readonly description: {
		readonly chart: string;
		readonly plain: string;
		readonly forbids: string;
		readonly window: string;
		readonly noWindow: string;
		readonly choice: string;
		readonly noChoice: string;
		readonly step: string;
		readonly forbidden: string;
		readonly allowed: string;
		readonly nominalOnly: string;
		readonly benefit: string;
	};
}

const WORDS: Readonly<Record<Language, Words>> = { en: english, de: german };

/**
 * Gives the fixed words in one language.
 * @param language the layout's language; English when it names none
 * @returns the table
 * @example wordsOf('de').block.notIssued // 'Nicht freigegeben'
 */
export function wordsOf(language: Language = 'en'): Words {
	return WORDS[language];
}

/**
 * Puts values into the braces of a phrase.
 * @param phrase text with places such as `{from}`
 * @param values what stands in each place; a place without a value stays as it is
 * @returns the phrase with its values
 * @example fill('not {from} … {to}', { from: '1', to: '2 nF' }) // 'not 1 … 2 nF'
 */
export function fill(phrase: string, values: Readonly<Record<string, string>>): string {
	return phrase.replace(/\{(\w+)\}/g, (place, name: string) => values[name] ?? place);
}
