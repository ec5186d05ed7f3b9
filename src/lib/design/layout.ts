/** The door for a sheet's layout and title block. */
import * as z from 'zod/mini';
import { branch, flag, oneOf, quantity, text, whole } from './field';
import type { Issue } from './issue';
import { read } from './read';

/** 10^−9 … 10^12; a product of tens is not always the double nearest to its power. */
const POWERS = new Set(Array.from({ length: 22 }, (_, index) => Number(`1e${String(index - 9)}`)));

const powerOfTen = (words: string, kind: 'frequency' | 'resistance', from: number, to: number) =>
	quantity(words, kind, { from, to }).check(
		z.refine((value) => POWERS.has(value), {
			error: `Enter ${words} as a power of ten, such as 1, 10 or 1000.`
		}),
		z.meta({ enum: [...POWERS].filter((power) => power >= from && power <= to) })
	);

export const layoutSchema = branch('the layout', {
	paper: oneOf('the paper', ['A4', 'A3', 'Letter', 'Tabloid']),
	orientation: oneOf('the orientation', ['landscape', 'portrait']),
	decade_mm: z.optional(whole('the length of a decade in millimetres', 5, 200)),
	frequencyFrom_Hz: z.optional(powerOfTen('the lower end of the frequency axis', 'frequency', 1e-3, 1e10)),
	impedanceFrom_ohm: z.optional(powerOfTen('the lower end of the impedance axis', 'resistance', 1e-9, 1e9)),
	ink: z.optional(oneOf('the ink', ['colour', 'mono'])),
	strip: z.optional(flag('whether the sheet has its calculation strip')),
	benefitPane: z.optional(flag('whether the sheet has its benefit pane')),
	zones: z.optional(flag('whether the sheet has its zones')),
	decimalMark: z.optional(oneOf('the decimal mark', ['.', ','])),
	language: z.optional(oneOf('the language', ['en', 'de']))
});

/** The sheet's own `Layout` takes it; the room of designs knows no sheets. */
export type LayoutInput = z.output<typeof layoutSchema>;

const cell = (words: string, most: number) => z.optional(text(words, { most, least: 0 }));

export const titleBlockSchema = branch('the title block', {
	title: cell('the title', 200),
	supplementaryTitle: cell('the supplementary title', 100),
	owner: cell('the legal owner', 60),
	number: cell('the number', 30),
	creator: cell('the creator', 60),
	department: cell('the department', 40),
	reference: cell('the technical reference', 40)
});

export type TitleBlockInput = z.output<typeof titleBlockSchema>;

/**
 * Reads a layout.
 * @param input any JSON value
 * @returns the layout, or issues, each with a JSON pointer and what to enter
 * @example parseLayout({ paper: 'A4', orientation: 'landscape' }).ok // true
 */
export function parseLayout(
	input: unknown
): { readonly ok: true; readonly layout: LayoutInput } | { readonly ok: false; readonly issues: Issue[] } {
	const parsed = read(layoutSchema, input);
	return parsed.ok ? { ok: true, layout: parsed.value } : parsed;
}

/**
 * Reads the cells of a title block that people fill in; state, mark, approver and date are not among them.
 * @param input any JSON value
 * @returns the title block, or issues, each with a JSON pointer and what to enter
 * @example parseTitleBlock({ state: 'Issued' }).ok // false
 */
export function parseTitleBlock(
	input: unknown
):
	| { readonly ok: true; readonly titleBlock: TitleBlockInput }
	| { readonly ok: false; readonly issues: Issue[] } {
	const parsed = read(titleBlockSchema, input);
	return parsed.ok ? { ok: true, titleBlock: parsed.value } : parsed;
}

/**
 * Writes the layout's shape as JSON Schema.
 * @returns a schema of draft 2020-12
 * @example layoutJsonSchema().type // 'object'
 * Source: JSON Schema, draft 2020-12.
 */
export function layoutJsonSchema(): z.core.JSONSchema.BaseSchema {
	return {
		title: 'Herringbone sheet layout',
		description:
			'What is left out is chosen so that the lines that matter fall inside; the lower ends of the axes are powers of ten.',
		...z.toJSONSchema(layoutSchema, { io: 'input' })
	};
}
