/** What the rows of the strip are made of: blocks of known height that draw themselves where they are put. */
import type { Design, Rule } from '$lib/design/design';
import type { Evaluation, Finding } from '$lib/rules/finding';
import type { Item } from '$lib/scene/scene';
import type { DecimalMark } from './edge';
import type { Ink } from './ink';
import { strokeOf } from './ink';
import { lettered, ruled } from './pen';
import type { Words } from './words';

/** Everything that the rows read. Lengths in the strip are given at k = 1 and multiplied by `k`. */
export interface StripContext {
	readonly design: Design;
	readonly evaluation: Evaluation;
	readonly ink: Ink;
	readonly words: Words;
	readonly mark: DecimalMark;
	readonly k: number;
	/** Width of a row [mm]. */
	readonly width: number;
	/** How many rules are filled in; the others stand empty. */
	readonly rulesShown: number;
	/** Whether windows, choice and benefit are filled in. */
	readonly resultShown: boolean;
}

export interface Block {
	/** [mm] */
	readonly height: number;
	/** A heading starts a section and stays with the block under it. */
	readonly heading?: boolean;
	/** A row that may give way when the strip is too long. */
	readonly optional?: boolean;
	/** @param x left edge; @param y upper edge [mm] */
	readonly draw: (x: number, y: number) => Item[];
}

export const CAP = 2.5;
export const ROW = 4.35;
export const HEAD = 5;
/** Baseline from a row's upper edge. */
export const BASE = 3.35;
export const NUMBER_WIDTH = 7;
export const SYMBOL_WIDTH = 8.4;
export const BAR_WIDTH = 24;
/** Room of name, limit and formula, left of the bars. */
export const textRoom = ({ width, k }: StripContext): number => width - (NUMBER_WIDTH + BAR_WIDTH + 1.6) * k;

/**
 * Draws the thin line under a row.
 * @param context palette and scale
 * @param x left edge [mm]
 * @param y where the row ends [mm]
 * @returns the line
 * @example rowLine(context, 205, 30).stroke.width // 0.18
 */
export function rowLine({ ink, k, width }: StripContext, x: number, y: number): Item {
	return ruled([x, y, x + width, y], strokeOf(ink, 'rule', k));
}

/**
 * A section's head: number, name, heavy line.
 * @param context palette and scale
 * @param number of the section, or '' for none
 * @param name of the section
 * @param aside what stands at the right in the same row
 * @returns the block
 * @example heading(context, '5', 'Rules').heading // true
 */
export function heading(
	context: StripContext,
	number: string,
	name: string,
	aside: Block['draw'] = () => []
): Block {
	const { ink, k, width } = context;
	const lettering = { cap: CAP * k, face: 'bold', fill: ink.ink } as const;
	return {
		height: HEAD * k,
		heading: true,
		draw: (x, y) => [
			...(number === '' ? [] : [lettered(number, x, y + BASE * k, lettering)]),
			lettered(name, x + (number === '' ? 0 : NUMBER_WIDTH * k), y + BASE * k, lettering),
			...aside(x, y),
			ruled([x, y + 4.4 * k, x + width, y + 4.4 * k], strokeOf(ink, 'head', k))
		]
	};
}

/**
 * Draws a row's number.
 * @param context palette and scale
 * @param number e.g. '5.2'
 * @param x left edge [mm]
 * @param y upper edge of the row [mm]
 * @returns the number
 * @example rowNumber(context, '5.2', 205, 30).text // '5.2'
 */
export function rowNumber({ ink, k }: StripContext, number: string, x: number, y: number): Item {
	return lettered(number, x, y + BASE * k, { cap: CAP * k, fill: ink.ink });
}

/**
 * The number under which a rule stands in the strip.
 * @param rules the design's rules
 * @param id of the rule
 * @returns e.g. '5.2', or the id when no rule has it
 * @example ruleNumber(design.rules, 'guard') // '5.2'
 */
export function ruleNumber(rules: readonly Rule[], id: string): string {
	const index = rules.findIndex((rule) => rule.id === id);
	return index < 0 ? id : `5.${String(index + 1)}`;
}

/**
 * Finds what a rule found.
 * @param evaluation of the design
 * @param id of the rule
 * @returns its finding, or null
 * @example findingOf(evaluation, 'share')?.kind // 'capacitor-share'
 */
export function findingOf(evaluation: Evaluation, id: string): Finding | null {
	return evaluation.findings.find((finding) => finding.rule === id) ?? null;
}
