/** The title block: 180 × 27 mm at the lower right, cells and captions after ISO 7200. */
import type { Face, Item } from '$lib/scene/scene';
import { shorten, wrap } from './fitting';
import type { Ink } from './ink';
import type { SheetKind, TitleBlock } from './layout';
import { signPath } from './mark';
import type { Box } from './paper';
import { group, lettered, rectangle, ruled } from './pen';
import { fill, type Words } from './words';

/** Borders of the columns and rows from the block's upper left corner [mm]. */
const COLUMNS = [0, 46, 107.5, 138.5, 180] as const;
const ROW = 9;

const CAP = 2.5;
/** A value that is too wide loses weight before it loses letters. */
const FACES = ['semibold', 'medium', 'regular'] as const;
const TITLE_CAP = 3.5;
const NUMBER_CAPS = [5, 3.5, 2.5] as const;
const PAD = 1.3;
const SIGN = 6.2;
/** Baselines in a row of 9 mm: caption, then value. */
const CAPTION_BASE = 3.3;
const VALUE_BASE = 7.5;
/** Baselines of the title's lines by how many there are; a third one is set in the small lettering. */
const TITLE_BASES: readonly (readonly number[])[] = [[], [9.6], [8.8, 15], [8.1, 13.25, 17.15]];
const TITLE_LINES = 2;

export interface TitleBlockInput {
	readonly box: Box;
	readonly block: TitleBlock;
	readonly kind: SheetKind;
	readonly step: number | null;
	readonly steps: number;
	/** e.g. 'en' and 'A4'. */
	readonly language: string;
	readonly paper: string;
	readonly ink: Ink;
	readonly words: Words;
}

/** What stands in one cell of one row. */
interface Cell {
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly caption: string;
	readonly value: string;
}

const cellItems = ({ x, y, width, caption, value }: Cell, ink: Ink): Item[] => {
	const measure = { width: width - 2 * PAD, cap: CAP };
	const face = FACES.find((weight) => shorten(value, { ...measure, face: weight }) === value) ?? 'regular';
	const shown = shorten(value, { ...measure, face });
	const head = lettered(shorten(caption, measure), x + PAD, y + CAPTION_BASE, {
		cap: CAP,
		fill: ink.graphite
	});
	if (shown === '') return [head];
	return [head, lettered(shown, x + PAD, y + VALUE_BASE, { cap: CAP, face, fill: ink.ink })];
};

const documentType = ({ kind, step, steps, words }: TitleBlockInput): string => {
	const { type, blank, worked } = words.document;
	if (kind === 'blank') return `${type}, ${blank}`;
	if (kind === 'worked') return `${type}, ${worked}`;
	const phrase = fill(words.document.step, { step: String(step ?? 1), steps: String(steps) });
	return `${type}, ${phrase}`;
};

const cells = (input: TitleBlockInput): Cell[] => {
	const { box, block, words, kind, step, steps } = input;
	const at = (column: 0 | 1 | 2 | 3, row: number, caption: string, value: string): Cell => ({
		x: box.x + COLUMNS[column],
		y: box.y + row * ROW,
		width: (COLUMNS[column + 1] ?? 180) - COLUMNS[column],
		caption,
		value
	});
	const owner = at(0, 0, words.block.owner, block.owner ?? '');
	const maker = [block.creator, block.department].filter((part) => part !== undefined && part !== '');
	const sheet = kind === 'step' ? `${String(step ?? 1)}/${String(steps)}` : '1/1';
	return [
		{ ...owner, x: owner.x + SIGN + PAD, width: owner.width - SIGN - PAD },
		at(0, 1, words.block.preparedBy, maker.join(' · ')),
		at(0, 2, words.block.approvedBy, ''),
		at(1, 0, words.block.documentType, documentType(input)),
		at(2, 0, words.block.status, words.block.notIssued),
		at(2, 1, words.block.dateOfIssue, words.block.notIssued),
		at(2, 2, words.block.reference, block.reference ?? ''),
		at(3, 0, words.block.sheet, `${sheet} · ${input.language} · ${input.paper}`)
	];
};

interface TitleLine {
	readonly text: string;
	readonly cap: number;
	readonly face: Face;
}

/** The title wraps into the line below; what two lines do not hold, or the supplementary title, takes the third. */
const titleLines = ({ block }: TitleBlockInput): TitleLine[] => {
	const measure = { width: COLUMNS[2] - COLUMNS[1] - 2 * PAD, cap: TITLE_CAP, face: 'bold' } as const;
	const { title = '', supplementaryTitle = '' } = block;
	const second = supplementaryTitle.trim();
	const whole = wrap(title, measure);
	const cut = second === '' ? whole : wrap(title, measure, TITLE_LINES);
	const lines = cut.slice(0, TITLE_LINES).map((text): TitleLine => ({ text, cap: TITLE_CAP, face: 'bold' }));
	const rest = second === '' ? whole.slice(TITLE_LINES).join(' ') : second;
	if (rest === '') return lines;
	const cap = lines.length < TITLE_LINES ? TITLE_CAP : CAP;
	const face = second === '' ? 'bold' : 'regular';
	return [...lines, { text: shorten(rest, { ...measure, cap, face }), cap, face }];
};

const titleItems = (input: TitleBlockInput): Item[] => {
	const { box, ink, words } = input;
	const x = box.x + COLUMNS[1] + PAD;
	const y = box.y + ROW;
	const lines = titleLines(input);
	const bases = TITLE_BASES[lines.length] ?? [];
	return [
		lettered(words.block.title, x, y + CAPTION_BASE, { cap: CAP, fill: ink.graphite }),
		...lines.map(({ text, cap, face }, index) =>
			lettered(text, x, y + (bases[index] ?? 0), { cap, face, fill: ink.ink })
		)
	];
};

const numberItems = ({ box, block, ink, words }: TitleBlockInput): Item[] => {
	const left = box.x + COLUMNS[3] + PAD;
	const right = box.x + COLUMNS[4] - PAD;
	const y = box.y + ROW;
	const caption = { cap: CAP, fill: ink.graphite };
	const width = right - left;
	const number = block.number ?? '';
	const cap =
		NUMBER_CAPS.find((size) => shorten(number, { width, cap: size, face: 'bold' }) === number) ?? CAP;
	const shown = shorten(number, { width, cap, face: 'bold' });
	return [
		lettered(words.block.number, left, y + CAPTION_BASE, caption),
		lettered(words.block.revision, right, y + CAPTION_BASE, { ...caption, anchor: 'end' }),
		...(shown === '' ? [] : [lettered(shown, left, y + 15.4, { cap, face: 'bold', fill: ink.ink })])
	];
};

const ruling = ({ x, y }: Box): { heavy: number[]; light: number[] } => {
	const upright = COLUMNS.slice(1, 4).flatMap((column) => [x + column, y, x + column, y + 3 * ROW]);
	const level = [
		...[x, y + ROW, x + 180, y + ROW],
		...[x, y + 2 * ROW, x + COLUMNS[1], y + 2 * ROW],
		...[x + COLUMNS[2], y + 2 * ROW, x + COLUMNS[3], y + 2 * ROW]
	];
	return { heavy: upright, light: level };
};

/**
 * Draws the title block of a sheet that is not issued.
 * @param input its box, the cells that people fill in, kind and step, palette, words
 * @returns one group with role `title-block`; every text stays inside its cell
 * @example titleBlockItems(input)[0].role // 'title-block'
 * Source: ISO 7200:2004 for the cells and the width of 180 mm.
 */
export function titleBlockItems(input: TitleBlockInput): Item[] {
	const { box, ink } = input;
	const { heavy, light } = ruling(box);
	const sign = signPath(box.x + PAD, box.y + (ROW - SIGN) / 2, SIGN);
	return [
		group(
			[
				ruled(heavy, { colour: ink.ink, width: 0.35 }),
				ruled(light, { colour: ink.ink, width: 0.35 }),
				rectangle(box, { stroke: { colour: ink.ink, width: 0.7, join: 'miter' } }),
				{ type: 'path', d: sign, fill: ink.ink },
				...cells(input).flatMap((cell) => cellItems(cell, ink)),
				...titleItems(input),
				...numberItems(input)
			],
			{ role: 'title-block' }
		)
	];
}
