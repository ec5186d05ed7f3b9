/** Section 5 of the strip: each rule with its limit, its formula with the numbers put in, and its bar. */
import type { Rule } from '$lib/design/design';
import type { Finding } from '$lib/rules/finding';
import { textWidth } from '$lib/scene/metrics';
import type { Item } from '$lib/scene/scene';
import { formatEdge } from './edge';
import { shorten } from './fitting';
import { dotCentres, dotRadius, hatchLines, roundDots } from './hatch';
import { strokeOf } from './ink';
import { limitText, shortLimitText } from './limit';
import { lettered, rectangle, ruled } from './pen';
import { cornersOf } from './polygon';
import { formulaRuns, runItems, wrapRuns, type Run } from './runs';
import { barGround, choiceLine, ruleBar, type Axis, type BarRoom } from './strip-bar';
import {
	BAR_WIDTH,
	BASE,
	CAP,
	findingOf,
	heading,
	NUMBER_WIDTH,
	ROW,
	rowLine,
	rowNumber,
	textRoom,
	type Block,
	type StripContext
} from './strip-block';
import { fill } from './words';

/** A second line stands this much lower; a row ends this much under its last line. */
const LEADING = 3.7;
const INDEX_ROOM = 0.4;
const AXIS_ROW = 3.5;
const BAR_HEIGHT = 3.4;
const BAR_HEIGHT_LOW = 2.6;
const SWATCH = 4.6;

type RuleClass = Finding['class'];

const swatch = (context: StripContext, ruleClass: RuleClass, x: number, y: number): Item[] => {
	const { ink, k } = context;
	const box = { x, y: y + (BASE - CAP) * k, width: SWATCH * k, height: CAP * k };
	const corners = cornersOf(box);
	const pen = ruleClass === 'mandatory' ? 'mandatoryEdge' : 'designEdge';
	const outline = rectangle(box, { fill: ink.paper, stroke: strokeOf(ink, pen, k) });
	if (ruleClass === 'advisory') {
		return [
			outline,
			{ type: 'path', d: roundDots(dotCentres(corners, k), dotRadius(k)), fill: ink.advisory }
		];
	}
	const hatch = hatchLines(corners, ruleClass, 'bank', k);
	return [outline, ruled(hatch, { ...strokeOf(ink, pen, k), width: 0.18 * k })];
};

/** The classes that occur, at the right end of the section's head. */
const legend =
	(context: StripContext): Block['draw'] =>
	(x, y) => {
		const { ink, k, words, width, design } = context;
		const used = new Set(design.rules.map((rule) => rule.class));
		const classes = (['advisory', 'design', 'mandatory'] as const).filter((name) => used.has(name));
		let right = x + width;
		return classes.flatMap((ruleClass) => {
			const word = words.class[ruleClass];
			const item = lettered(word, right, y + BASE * k, { cap: CAP * k, fill: ink.graphite, anchor: 'end' });
			const left = right - textWidth(word, 'regular', CAP * k) - (SWATCH + 1) * k;
			right = left - 2 * k;
			return [item, ...swatch(context, ruleClass, left, y)];
		});
	};

const axisBlock = (context: StripContext, axis: Axis): Block => {
	const { ink, k, words, width, mark } = context;
	const lettering = { cap: CAP * k, fill: ink.capacitance };
	const end = (exponent: number): string => formatEdge(Number(`1e${String(exponent)}`), 'nearest', mark);
	return {
		height: AXIS_ROW * k,
		heading: true,
		draw: (x, y) => {
			const left = x + width - BAR_WIDTH * k;
			const base = y + 3.1 * k;
			const note = shorten(words.strip.numbersPutIn, { width: textRoom(context), cap: CAP * k });
			return [
				lettered(note, x + NUMBER_WIDTH * k, base, { cap: CAP * k, fill: ink.graphite }),
				lettered(end(axis.from), left, base, lettering),
				lettered(end(axis.to), x + width, base, { ...lettering, anchor: 'end' })
			];
		}
	};
};

interface RuleRow {
	readonly number: string;
	readonly name: string;
	readonly limit: string;
	/** Said where the name needs the room. */
	readonly shortLimit: string;
	/** Whether an edge of it closes a window. */
	readonly decides: boolean;
	readonly finding: Finding | null;
	readonly lines: readonly (readonly Run[])[];
}

const decides = ({ evaluation }: StripContext, id: string): boolean =>
	evaluation.windows.some(({ limitedBy }) => limitedBy.from === id || limitedBy.to === id);

const overrideText = ({ design, words }: StripContext, id: string): string => {
	const override = design.overrides?.find((entry) => entry.rule === id);
	return override === undefined ? '' : fill(words.limit.overridden, { ...override });
};

/** The reason of a rule that was not evaluated stands even where formulas give way. */
const explanation = (context: StripContext, finding: Finding, formulas: boolean): Run[][] => {
	const { mark, k, words } = context;
	const text = textRoom(context);
	const cap = CAP * k;
	if (finding.reason !== null) return wrapRuns([{ text: finding.reason }], text, cap, formulas ? 3 : 1);
	if (!formulas) return [];
	const advisory = finding.class === 'advisory' ? [{ text: `${words.class.advisory} · ` }] : [];
	const numbers = formulaRuns(finding.formula?.numbers ?? [], mark);
	return numbers.length + advisory.length === 0 ? [] : wrapRuns([...advisory, ...numbers], text, cap, 2);
};

const ruleRow = (context: StripContext, rule: Rule, index: number, formulas: boolean): RuleRow => {
	const finding = index < context.rulesShown ? findingOf(context.evaluation, rule.id) : null;
	const number = `5.${String(index + 1)}`;
	const name = context.words.rule[rule.kind];
	if (finding === null)
		return { number, name, limit: '', shortLimit: '', decides: false, finding, lines: [] };
	const override = overrideText(context, rule.id);
	const overriding =
		override === ''
			? []
			: wrapRuns([{ text: override }], textRoom(context), CAP * context.k, formulas ? 3 : 1);
	return {
		number,
		name,
		limit: limitText(finding, context.words, context.mark),
		shortLimit: shortLimitText(finding, context.words, context.mark),
		decides: context.resultShown && decides(context, rule.id),
		finding,
		lines: [...explanation(context, finding, formulas), ...overriding]
	};
};

const firstLine = (context: StripContext, row: RuleRow, x: number, y: number): Item[] => {
	const { ink, k } = context;
	const cap = CAP * k;
	const room = textRoom(context);
	const face = row.decides ? 'bold' : 'semibold';
	const nameRoom = room - textWidth(row.name, 'semibold', cap) - 1.5 * k;
	const said = textWidth(row.limit, face, cap) <= nameRoom ? row.limit : row.shortLimit;
	const limit = shorten(said, { width: room, cap, face });
	const taken = limit === '' ? 0 : textWidth(limit, face, cap) + 1.5 * k;
	const name = shorten(row.name, { width: room - taken, cap, face: 'semibold' });
	const left = x + NUMBER_WIDTH * k;
	const base = y + BASE * k;
	return [
		rowNumber(context, row.number, x, y),
		...(name === '' ? [] : [lettered(name, left, base, { cap, face: 'semibold', fill: ink.ink })]),
		...(limit === '' ? [] : [lettered(limit, left + room, base, { cap, face, fill: ink.ink, anchor: 'end' })])
	];
};

/** How far each line stands under the row's first; a line that follows an index stands lower. */
const baselines = (lines: RuleRow['lines']): number[] => {
	let below = 0;
	return lines.map((_, index) => {
		const indexed = lines[index - 1]?.some(({ shift }) => shift === 'index') === true;
		below += indexed ? LEADING + INDEX_ROOM : LEADING;
		return below;
	});
};

const ruleBlock = (context: StripContext, axis: Axis, row: RuleRow, least: number): Block => {
	const { ink, k, width } = context;
	const bases = baselines(row.lines);
	const lines = Math.max(least, bases.length);
	const height = (ROW + Math.max(least * LEADING, bases.at(-1) ?? 0)) * k;
	return {
		height,
		optional: true,
		draw: (x, y) => {
			const barHeight = (lines > 0 ? BAR_HEIGHT : BAR_HEIGHT_LOW) * k;
			const room: BarRoom = { axis, context, x: x + width - BAR_WIDTH * k, y, height, barHeight };
			return [
				...barGround(room),
				...firstLine(context, row, x, y),
				...row.lines.flatMap((line, index) =>
					runItems(line, {
						x: x + NUMBER_WIDTH * k,
						y: y + (BASE + (bases[index] ?? 0)) * k,
						cap: CAP * k,
						fill: ink.graphite
					})
				),
				...(row.finding === null ? [] : ruleBar(room, row.finding)),
				...choiceLine(room),
				rowLine(context, x, y + height)
			];
		}
	};
};

/**
 * The rows of the rules.
 * @param context design, evaluation, palette, scale
 * @param axis shared C axis
 * @param formulas whether each row has a second line with the formula
 * @returns the blocks
 * @example ruleBlocks(context, { from: -9, to: -5 }, true)[0].heading // true
 */
export function ruleBlocks(context: StripContext, axis: Axis, formulas: boolean): Block[] {
	const { design, words, ink, k } = context;
	const head = heading(context, '5', words.strip.rules, legend(context));
	if (design.rules.length === 0) {
		const cap = CAP * k;
		const none: Block = {
			height: ROW * k,
			draw: (x, y) => [
				lettered(words.strip.noRules, x + NUMBER_WIDTH * k, y + BASE * k, { cap, fill: ink.graphite })
			]
		};
		return [head, none];
	}
	const rows = design.rules.map((rule, index) => ruleRow(context, rule, index, formulas));
	return [
		head,
		axisBlock(context, axis),
		...rows.map((row) => ruleBlock(context, axis, row, formulas ? 1 : 0))
	];
}
