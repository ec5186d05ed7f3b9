/** Texts that print, held against the characters of the shipped faces: what cannot be printed is refused, never dropped. */
import type { Design } from '$lib/design/design';
import { missingCharacters } from '$lib/scene/metrics';
import type { TitleBlock } from './layout';

/** A place, and a sentence that says what to enter instead. */
export interface PrintIssue {
	/** JSON pointer (RFC 6901) into what was checked. */
	readonly pointer: string;
	readonly detail: string;
}

interface Printed {
	readonly pointer: string;
	readonly words: string;
	readonly text: string | undefined;
}

const codePoint = (character: string): string =>
	`U+${(character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0')}`;

/** A lone accent or an invisible sign says nothing by itself, so its number stands beside it. */
const name = (character: string): string => `“${character}” (${codePoint(character)})`;

const NAMED = 3;

const check = ({ pointer, words, text }: Printed): PrintIssue[] => {
	const missing = missingCharacters((text ?? '').replace(/[\t\n\r]/g, ' '));
	if (missing.length === 0) return [];
	const more = missing.length > NAMED ? ' and others' : '';
	const named = missing.slice(0, NAMED).map(name).join(', ') + more;
	return [{ pointer, detail: `Enter ${words} without ${named}: the sheet’s lettering does not have it.` }];
};

const labels = (key: string, words: string, items: readonly { readonly label: string }[] = []): Printed[] =>
	items.map(({ label }, index) => ({ pointer: `/${key}/${String(index)}/label`, words, text: label }));

/**
 * Lists the texts of a design that no shipped face can print.
 * @param design the design
 * @returns an issue for each text, with the characters named; empty where all can be printed
 * @example unprintableInDesign({ ...chargerAuxiliary, title: '電源' })[0].pointer // '/title'
 * Source: our own rule.
 */
export function unprintableInDesign(design: Design): PrintIssue[] {
	const { rules, pins = [], overrides = [] } = design;
	const printed: Printed[] = [
		{ pointer: '/title', words: 'the title', text: design.title },
		{ pointer: '/notes', words: 'the notes', text: design.notes },
		...labels('switching', 'the label', design.switching),
		...labels('sources', 'the label', design.sources),
		...labels('curves', 'the label', design.curves),
		...rules.map((rule, index) => ({
			pointer: `/rules/${String(index)}/reason`,
			words: 'the reason for crossing the band out',
			text: rule.kind === 'manual-band' ? rule.reason : undefined
		})),
		...pins.map(({ text }, index) => ({
			pointer: `/pins/${String(index)}/text`,
			words: 'the text of the note',
			text
		})),
		...overrides.flatMap(({ by, reason }, index) => [
			{ pointer: `/overrides/${String(index)}/by`, words: 'the name of the person', text: by },
			{ pointer: `/overrides/${String(index)}/reason`, words: 'the reason for overriding', text: reason }
		])
	];
	return printed.flatMap(check);
}

const CELLS: readonly (readonly [keyof TitleBlock, string])[] = [
	['title', 'the title'],
	['supplementaryTitle', 'the supplementary title'],
	['owner', 'the legal owner'],
	['number', 'the number'],
	['creator', 'the creator'],
	['department', 'the department'],
	['reference', 'the technical reference']
];

/**
 * Lists the cells of a title block that no shipped face can print.
 * @param block the cells that people fill in
 * @returns an issue for each cell, with the characters named; empty where all can be printed
 * @example unprintableInTitleBlock({ title: '電源' })[0].pointer // '/title'
 * Source: our own rule.
 */
export function unprintableInTitleBlock(block: TitleBlock): PrintIssue[] {
	return CELLS.flatMap(([key, words]) => check({ pointer: `/${key}`, words, text: block[key] }));
}
