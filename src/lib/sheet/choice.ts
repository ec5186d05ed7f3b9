/** The choice: the one extra-wide line, read at the lowest switching frequency, with its flag. */
import type { Verdict } from '$lib/rules/finding';
import { formatQuantity } from '$lib/quantity/format';
import { textWidth } from '$lib/scene/metrics';
import type { Item, PathData } from '$lib/scene/scene';
import { ruleNumber } from './band-edge';
import { capOf, penOf, segmentsPath, type Board } from './board';
import { fixed } from './edge';
import { shorten } from './fitting';
import { roundDots } from './hatch';
import { orientedAt } from './oriented';
import { group, lettered, ruled } from './pen';
import { capacitanceLine, xOf, yOf, type Plot } from './plot';
import { fill } from './words';

/** The flag at k = 1 [mm]. */
const VALUE_CAP = 7;
const HALF_HEIGHT = 8.5;
const POINT = 4.5;
const LEAD = 14;
const PADDING = 5;
const INSET = 3;
const SCALE_GAP = 1.2;

interface Flag {
	/** Where the choice is read [mm]. */
	readonly x: number;
	readonly y: number;
	/** Tip and far end of the flag; the far end lies left of the tip on a mirrored flag. */
	readonly tip: number;
	readonly end: number;
	/** Middle of its height. */
	readonly middle: number;
	readonly value: string;
	readonly note: string;
}

const reactance = (frequency: number, capacitance: number): number =>
	1 / (2 * Math.PI * frequency * capacitance);

/**
 * Writes both margins of a choice, or what speaks against it.
 * @param board the chart
 * @param verdict the evaluation's word on the choice
 * @returns e.g. '−14.9 %  +9.1 %'
 * @example verdictNote(board, { state: 'allowed', marginFrom: 0.175, marginTo: 0.091, … }) // '−14.9 %  +9.1 %'
 * Source: margins to the nominal edges, as parts of the choice.
 */
export function verdictNote(board: Board, verdict: Verdict): string {
	const { words, decimalMark } = board.input;
	if (verdict.state === 'forbidden') {
		const rules = verdict.breaks.map((rule) => ruleNumber(board, rule)).join(', ');
		return fill(words.verdict.forbidden, { rules });
	}
	if (verdict.state === 'nominal-only') return words.verdict.nominalOnly;
	const percent = (part: number): string => `${fixed(100 * part, 1, decimalMark, true)}\u00a0%`;
	const down = verdict.marginFrom === null ? '' : percent(1 / (1 + verdict.marginFrom) - 1);
	const up = verdict.marginTo === null ? '' : percent(verdict.marginTo);
	return [down, up].filter((text) => text !== '').join('\u2002');
}

const clampMiddle = ({ input, k }: Board, y: number): number => {
	const room = (HALF_HEIGHT + 1) * k;
	return Math.min(Math.max(y, input.plot.y + room), input.plot.y + input.plot.height - room);
};

const noteOf = (board: Board): string => {
	const verdict = board.input.evaluation?.choice ?? null;
	if (verdict === null) return '';
	const width = (board.input.plot.width / 3) * 0.9;
	return shorten(verdictNote(board, verdict), { width, cap: capOf(board), face: 'semibold' });
};

/** To the right up to the border; to the left where that has no room; with a shorter lead where neither has. */
const endsOf = (plot: Plot, x: number, width: number, k: number): Pick<Flag, 'tip' | 'end'> => {
	const left = plot.x + INSET * k;
	const right = plot.x + plot.width - INSET * k;
	const lead = LEAD * k;
	if (x + lead + width <= right) return { tip: Math.max(x + lead, right - width), end: right };
	if (x - lead - width >= left) return { tip: x - lead, end: x - lead - width };
	if (right - x >= x - left) return { tip: right - width, end: right };
	return { tip: left + width, end: left };
};

/** The flag, or null where the choice is not read inside the plot. */
const flagOf = (board: Board): Flag | null => {
	const { choice, readAt, k } = board;
	const { plot, decimalMark } = board.input;
	if (choice === null || readAt === null) return null;
	const x = xOf(plot, readAt);
	const y = yOf(plot, reactance(readAt, choice));
	if (y < plot.y || y > plot.y + plot.height || x < plot.x || x > plot.x + plot.width) return null;
	const value = formatQuantity(choice, 'capacitance', { decimalMark });
	const note = noteOf(board);
	const valueWidth = textWidth(value, 'bold', VALUE_CAP * k);
	const noteWidth = textWidth(note, 'semibold', capOf(board));
	const width = Math.max(valueWidth, noteWidth) + (2 * PADDING + POINT) * k;
	const ends = endsOf(plot, x, width, k);
	return { x, y, ...ends, middle: clampMiddle(board, y), value, note };
};

/**
 * Reserves the flag's room.
 * @param board the chart
 * @returns the flag to draw later, or null
 * @example reserveFlag(board)?.value // '330 nF'
 * Source: sheet design: the flag reserves its area first.
 */
export function reserveFlag(board: Board): Flag | null {
	const flag = flagOf(board);
	if (flag === null) return null;
	const half = [Math.abs(flag.end - flag.tip) / 2 + 0.5, HALF_HEIGHT * board.k + 0.5] as const;
	board.field.boxes.push(orientedAt((flag.tip + flag.end) / 2, flag.middle, half, 0));
	const { plot } = board.input;
	const ways = flag.end > flag.tip ? [flag.x, flag.end] : [flag.tip, plot.x + plot.width];
	const [from = 0, to = 0] = ways;
	board.field.boxes.push(orientedAt((from + to) / 2, flag.y, [(to - from) / 2, 0.6 * board.k], 0));
	return flag;
}

const flagOutline = ({ tip, end, middle, y }: Flag, k: number): PathData => {
	const shoulder = tip + Math.sign(end - tip) * POINT * k;
	const top = middle - HALF_HEIGHT * k;
	const foot = middle + HALF_HEIGHT * k;
	return { ops: 'MLLLLZ', at: [tip, y, shoulder, top, end, top, end, foot, shoulder, foot] };
};

const flagTexts = (board: Board, flag: Flag): Item[] => {
	const { ink } = board.input;
	const { k } = board;
	const left = Math.min(flag.end, flag.tip);
	const x = left + (PADDING + (flag.end > flag.tip ? POINT : 0)) * k;
	const value = lettered(flag.value, x, flag.middle + 0.8 * k, {
		cap: VALUE_CAP * k,
		face: 'bold',
		fill: ink.ink
	});
	const note = lettered(flag.note, x, flag.middle + 6.1 * k, {
		cap: capOf(board),
		face: 'semibold',
		fill: ink.ink
	});
	const mark = { role: 'text', of: 'choice' } as const;
	return [{ ...value, ...mark }, ...(flag.note === '' ? [] : [{ ...note, ...mark }])];
};

/** Radii at k = 1: the choice's reading, a window edge's reading [mm]. */
const READING = 1.5;
const EDGE_READING = 0.75;

const readingCircles = (board: Board): Item[] => {
	const { readAt, k } = board;
	const { plot, ink } = board.input;
	if (readAt === null) return [];
	const spots = board.windows
		.flatMap(({ from, to }) => [from, to])
		.filter((value) => value > 0 && value < Infinity)
		.map((value) => yOf(plot, reactance(readAt, value)))
		.filter((y) => y > plot.y && y < plot.y + plot.height);
	if (spots.length === 0) return [];
	const centres = spots.flatMap((y) => [xOf(plot, readAt), y]);
	const d = roundDots(centres, EDGE_READING * k);
	return [{ type: 'path', d, fill: ink.paper, stroke: penOf(board, 'head') }];
};

const readingLine = (board: Board, flag: Flag): Item => {
	const { plot } = board.input;
	const scale = plot.x + plot.width + SCALE_GAP * board.k;
	const ways =
		flag.end > flag.tip
			? [flag.x, flag.y, flag.tip, flag.y, flag.end, flag.y, scale, flag.y]
			: [flag.tip, flag.y, scale, flag.y];
	return ruled(ways, penOf(board, 'reading'), { role: 'choice', of: 'choice' });
};

/**
 * Draws the choice's line, its reading and its flag, over everything else.
 * @param board the chart, all labels placed
 * @param flag what reserveFlag gave
 * @returns line, circles, flag
 * @example choiceItems(board, flag)[0]?.role // 'choice'
 * Source: sheet design.
 */
export function choiceItems(board: Board, flag: Flag | null): Item[] {
	const { plot, ink, decimalMark } = board.input;
	const { choice, k } = board;
	if (choice === null) return readingCircles(board);
	const line = capacitanceLine(plot, choice);
	const mark = { role: 'choice', of: 'choice' } as const;
	const label = `${board.input.words.strip.choice} ${formatQuantity(choice, 'capacitance', { decimalMark })}`;
	const stroke = penOf(board, 'choice');
	const drawn: Item[] =
		line === null ? [] : [{ type: 'path', ...mark, label, d: segmentsPath(line), stroke }];
	if (flag === null) return [...drawn, ...readingCircles(board)];
	const reading = roundDots([flag.x, flag.y], READING * k);
	return [
		...drawn,
		readingLine(board, flag),
		...readingCircles(board),
		{ type: 'path', ...mark, d: reading, fill: ink.paper, stroke: penOf(board, 'reading') },
		group(
			[
				{ type: 'path', ...mark, d: flagOutline(flag, k), fill: ink.paper, stroke: penOf(board, 'border') },
				...flagTexts(board, flag)
			],
			mark
		)
	];
}
