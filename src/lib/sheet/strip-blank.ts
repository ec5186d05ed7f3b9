/** The strip of a blank sheet: the same numbered rows, empty, high enough to write in. */
import type { Design, RuleKind } from '$lib/design/design';
import type { Item } from '$lib/scene/scene';
import { strokeOf, type Ink } from './ink';
import { lettered, rectangle, ruled } from './pen';
import { runItems, type Run } from './runs';
import { BAR_WIDTH, CAP, NUMBER_WIDTH, type Block } from './strip-block';
import type { Words } from './words';

const HEAD = 5.3;
const GIVEN = 6.2;
const RULE = 11.2;
const RESULT = 6.8;
const BAR_HEIGHT = 3.4;
const DECADES = 4;
const RULE_ROWS = 5;
/** Rows lower than this part of their full height have no room for the hint. */
const HINT_LEAST = 0.95;
/** Ruled lines for notes, and room under the last one. */
const NOTE_LINES = 1;

export interface BlankContext {
	readonly design: Design | null;
	readonly ink: Ink;
	readonly words: Words;
	readonly k: number;
	readonly width: number;
}

const DEFAULT_RULES: readonly RuleKind[] = ['capacitor-share', 'resonance-guard', 'reactance-limit'];

const head = ({ ink, k, width }: BlankContext, number: string, name: string): Block => {
	const bold = { cap: CAP * k, face: 'bold', fill: ink.ink } as const;
	return {
		height: HEAD * k,
		heading: true,
		draw: (x, y) => [
			...(number === '' ? [] : [lettered(number, x, y + 3.35 * k, bold)]),
			lettered(name, x + (number === '' ? 0 : NUMBER_WIDTH * k), y + 3.35 * k, bold),
			ruled([x, y + 4.5 * k, x + width, y + 4.5 * k], strokeOf(ink, 'head', k))
		]
	};
};

const row = (context: BlankContext, number: string, name: readonly Run[], height: number): Block => {
	const { ink, k, width } = context;
	const line = { cap: CAP * k, fill: ink.ink };
	return {
		height: height * k,
		draw: (x, y) => {
			const base = y + Math.min(height - 1.3, 4.7) * k;
			return [
				...runItems([{ text: number }], { x, y: base, ...line }),
				...runItems(name, { x: x + NUMBER_WIDTH * k, y: base, ...line }),
				ruled([x, y + height * k, x + width, y + height * k], strokeOf(ink, 'rule', k))
			];
		}
	};
};

const symbol = (base: string, index?: string): Run[] => [
	{ text: base, face: 'bold' },
	...(index === undefined ? [] : [{ text: index, shift: 'index' } as const])
];

/** An empty bar over the decade lines of the axis. */
const emptyBar = ({ ink, k, width }: BlankContext, x: number, y: number, height: number): Item[] => {
	const left = x + width - BAR_WIDTH * k;
	const step = (BAR_WIDTH * k) / DECADES;
	const lines = Array.from({ length: DECADES + 1 }, (_, index) => left + index * step);
	const box = { x: left, y: y + (height - BAR_HEIGHT * k) / 2, width: BAR_WIDTH * k, height: BAR_HEIGHT * k };
	return [
		ruled(
			lines.flatMap((at) => [at, y, at, y + height]),
			strokeOf(ink, 'rule', k)
		),
		rectangle(box, { fill: ink.paper, stroke: strokeOf(ink, 'switching', k) })
	];
};

const withBar = (context: BlankContext, block: Block): Block => ({
	...block,
	draw: (x, y) => [...emptyBar(context, x, y, block.height), ...block.draw(x, y)]
});

const axisNote = ({ ink, k, words }: BlankContext): Block => ({
	height: 3.7 * k,
	heading: true,
	draw: (x, y) => [
		lettered(words.strip.hatchTheBar, x + NUMBER_WIDTH * k, y + 3.1 * k, { cap: CAP * k, fill: ink.graphite })
	]
});

/** What the three usual rules ask for, to put the numbers into. */
const HINTS: Readonly<Partial<Record<RuleKind, readonly Run[]>>> = {
	'capacitor-share': [{ text: 'C' }, { text: 'min', shift: 'index' }, { text: ' / k' }],
	'resonance-guard': [
		{ text: 'C' },
		{ text: '0', shift: 'index' },
		{ text: ' / k² … k² · C' },
		{ text: '0', shift: 'index' }
	],
	'reactance-limit': [{ text: 'k / (2π · f · R)' }]
};

const hinted = (context: BlankContext, kind: RuleKind | null, block: Block): Block => {
	const hint = kind === null ? undefined : HINTS[kind];
	const { ink, k } = context;
	if (hint === undefined) return block;
	return {
		...block,
		draw: (x, y) => [
			...block.draw(x, y),
			...runItems(hint, { x: x + NUMBER_WIDTH * k, y: y + 9.4 * k, cap: CAP * k, fill: ink.graphite })
		]
	};
};

const kindsOf = (design: Design | null): (RuleKind | null)[] => {
	const kinds = design === null ? DEFAULT_RULES : design.rules.map(({ kind }) => kind);
	return [...kinds, ...Array.from({ length: Math.max(0, RULE_ROWS - kinds.length) }, () => null)];
};

/**
 * Counts the rule rows of a blank strip: one for each rule of the design, at least five.
 * @param design if there is one
 * @returns rows
 * @example blankRules(null) // 5
 */
export function blankRules(design: Design | null): number {
	return kindsOf(design).length;
}

const ruleBlock = (context: BlankContext, kind: RuleKind | null, index: number, scale: number): Block => {
	const name = kind === null ? '' : context.words.rule[kind];
	const block = row(context, `5.${String(index + 1)}`, [{ text: name, face: 'semibold' }], RULE * scale);
	return withBar(context, hinted(context, scale < HINT_LEAST ? null : kind, block));
};

const given = (context: BlankContext, scale: number): Block[] =>
	[
		{ number: '1.1', name: symbol('U') },
		{ number: '2.1', name: symbol('f', 'sw') },
		{ number: '3.1', name: symbol('L') },
		{ number: '3.2', name: symbol('C') },
		{ number: '4.1', name: symbol('Z', 's') },
		{ number: '4.2', name: [] }
	].map(({ number, name }) => row(context, number, name, GIVEN * scale));

/** How a blank strip is spaced. */
export interface BlankWay {
	/** Part of the full height of its rows, 0.76 … 1. */
	readonly scale: number;
	readonly notes: boolean;
	/** Rule rows. */
	readonly rules: number;
}

const noteBlocks = (context: BlankContext): Block[] => [
	head(context, '', context.words.strip.notes),
	...Array.from({ length: NOTE_LINES }, () => row(context, '', [], RESULT)),
	{ height: RESULT * context.k, draw: () => [] }
];

/**
 * The rows of a blank strip.
 * @param context design if there is one, palette, words, scale, width of a row [mm]
 * @param way height of its rows, notes, rule rows
 * @returns the blocks
 * @example blankBlocks(context, { scale: 1, notes: true, rules: 5 })[0].heading // true
 */
export function blankBlocks(context: BlankContext, { scale, notes, rules }: BlankWay): Block[] {
	const { words, design } = context;
	const text = (name: string): Run[] => [{ text: name, face: 'semibold' }];
	const result = RESULT * scale;
	return [
		head(context, '', words.strip.given),
		...given(context, scale),
		head(context, '5', words.strip.rules),
		axisNote(context),
		...kindsOf(design)
			.slice(0, rules)
			.map((kind, index) => ruleBlock(context, kind, index, scale)),
		head(context, '6', words.strip.windowAndChoice),
		withBar(context, row(context, '6.1', text(words.strip.window), result)),
		withBar(context, row(context, '6.2', text(words.strip.nominal), result)),
		row(context, '6.3', symbol('C', 'x'), result),
		row(context, '6.4', text(words.strip.margins), result),
		...(notes ? noteBlocks(context) : [])
	];
}
