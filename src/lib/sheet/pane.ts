/**
 * The benefit pane under the chart: bands, windows and choice run straight down into it from the chart's foot, and the
 * curves say what each capacitance does to each line.
 */
import { formatQuantity } from '$lib/quantity/format';
import { closesWindows } from '$lib/rules/windows';
import type { Item } from '$lib/scene/scene';
import { edgePen, type Edge } from './band-edge';
import { capOf, fallsOf, penOf, segmentsPath, type Board } from './board';
import { fixed } from './edge';
import { wrap } from './fitting';
import { HATCH_SPECK, hatchLines, roundDots } from './hatch';
import type { Pen } from './ink';
import { fieldOf } from './label';
import { cutAtBoxes, type Oriented } from './oriented';
import { benefitItems, settleBenefit, type Below, type DrawnCurve } from './pane-curves';
import { group, lettered, rectangle, ruled } from './pen';
import { capacitanceThrough, footOf, type Pane } from './plot';
import { polygonPath, cornersOf } from './polygon';
import { clearOfLeft, powersOfTen } from './axes';
import { stripsOf } from './zones';

const clipX = (pane: Pane, x: number): number => Math.min(Math.max(x, pane.x), pane.x + pane.width);

/** The column of a range of capacitance in the pane, or null where it misses it. */
const column = (
	{ board, pane }: Below,
	from: number,
	to: number
): { x: number; y: number; width: number; height: number } | null => {
	const { plot } = board.input;
	const left = clipX(pane, to === Infinity ? -Infinity : footOf(plot, to));
	const right = clipX(pane, from === 0 ? Infinity : footOf(plot, from));
	return right > left ? { x: left, y: pane.y, width: right - left, height: pane.height } : null;
};

const insidePane = ({ pane }: Below, x: number): boolean => x > pane.x && x < pane.x + pane.width;

const upright = ({ pane }: Below, x: number): number[] => [x, pane.y, x, pane.y + pane.height];

/** Decades of C that the pane's foot shows. */
const decadesOf = ({ board }: Below): number[] => {
	const { plot } = board.input;
	const from = capacitanceThrough(plot.frequencyTo, plot.impedanceFrom);
	const to = capacitanceThrough(plot.frequencyFrom, plot.impedanceFrom);
	return powersOfTen(10 ** Math.ceil(Math.log10(from)), 10 ** Math.floor(Math.log10(to)));
};

const levelOf = ({ pane }: Below, gain: number): number =>
	pane.y + ((pane.gainTo - gain) / (pane.gainTo - pane.gainFrom)) * pane.height;

/** Level lines every 20 dB. */
const gainsOf = ({ pane }: Below): number[] => {
	const first = Math.ceil(pane.gainFrom / 20);
	const last = Math.floor(pane.gainTo / 20);
	return Array.from({ length: last - first + 1 }, (_, index) => 20 * (first + index));
};

const gridBelow = (below: Below): Item[] => {
	const { board, pane } = below;
	const { plot } = board.input;
	const right = pane.x + pane.width;
	const level = (gain: number): number[] => [pane.x, levelOf(below, gain), right, levelOf(below, gain)];
	const levels = gainsOf(below).filter((gain) => gain > pane.gainFrom && gain < pane.gainTo);
	const decades = decadesOf(below).flatMap((value) => upright(below, footOf(plot, value)));
	const drawn = (segments: readonly number[], pen: Pen): Item[] => {
		const clear = cutAtBoxes(segments, below.field.boxes);
		return clear.length === 0
			? []
			: [{ type: 'path', role: 'grid', d: segmentsPath(clear), stroke: penOf(board, pen) }];
	};
	return [
		...drawn(levels.filter((gain) => gain !== 0).flatMap(level), 'gridMiddle'),
		...drawn(decades, 'gridMiddle'),
		...drawn(pane.gainFrom < 0 && pane.gainTo > 0 ? level(0) : [], 'head')
	];
};

const hatchBelow = (below: Below): Item[] => {
	const { board, pane, field } = below;
	const { plot } = board.input;
	const strips = stripsOf(board.zones, fallsOf(board), board.k);
	const foot = plot.y + plot.height;
	const items = strips.flatMap((strip): Item[] => {
		const left = clipX(pane, foot - strip.to);
		const right = clipX(pane, foot - strip.from);
		if (right <= left) return [];
		const polygon = cornersOf({ x: left, y: pane.y, width: right - left, height: pane.height });
		const hatch = hatchLines(polygon, strip.class, strip.density, board.k);
		const lines = cutAtBoxes(hatch, field.boxes, HATCH_SPECK * board.k);
		const pen: Pen = `${strip.class}${strip.density === 'bank' ? 'Bank' : 'Field'}`;
		return lines.length === 0 ? [] : [{ type: 'path', d: segmentsPath(lines), stroke: penOf(board, pen) }];
	});
	return items.length === 0 ? [] : [group(items, { role: 'band' })];
};

const edgesBelow = (below: Below, edges: readonly Edge[]): Item[] =>
	edges.flatMap((edge): Item[] => {
		const x = footOf(below.board.input.plot, edge.capacitance);
		if (!insidePane(below, x)) return [];
		const lines = cutAtBoxes(upright(below, x), below.field.boxes);
		const mark = { role: 'band', of: edge.finding.rule } as const;
		return [ruled(lines, penOf(below.board, edgePen(edge)), mark)];
	});

const windowsBelow = (below: Below): Item[] => {
	const { board } = below;
	const { ink } = board.input;
	return board.windows.flatMap((window, index): Item[] => {
		const whole = column(below, window.from, window.to);
		if (whole === null) return [];
		const mark = { role: 'window', of: String(index) } as const;
		const { nominalFrom, nominalTo, nominalEmpty } = window;
		const nominal =
			nominalEmpty || nominalFrom === null || nominalTo === null
				? null
				: column(below, nominalFrom, nominalTo);
		return [
			{ type: 'path', ...mark, d: polygonPath(cornersOf(whole)), fill: ink.window },
			...(nominal === null ? [] : [rectangle(nominal, { fill: ink.nominal })])
		];
	});
};

const nominalsBelow = (below: Below): Item[] => {
	const { board, field } = below;
	const values = board.windows
		.filter((window) => !window.nominalEmpty)
		.flatMap((window) => [window.nominalFrom, window.nominalTo]);
	const lines = values
		.filter((value) => value !== null)
		.map((value) => footOf(board.input.plot, value))
		.filter((x) => insidePane(below, x))
		.flatMap((x) => upright(below, x));
	const clear = cutAtBoxes(lines, field.boxes);
	return clear.length === 0 ? [] : [ruled(clear, penOf(board, 'nominalEdge'))];
};

/** Radius of the ring where the choice meets the first curve, at k = 1 [mm]. */
const READING = 0.9;

const choiceBelow = (below: Below, curves: readonly DrawnCurve[]): Item[] => {
	const { board } = below;
	if (board.choice === null) return [];
	const x = footOf(board.input.plot, board.choice);
	if (!insidePane(below, x)) return [];
	const line = ruled(upright(below, x), penOf(board, 'choice'), { role: 'choice', of: 'choice' });
	const [first] = curves;
	const y = first === undefined ? -1 : levelOf(below, first.curve.gain(board.choice));
	if (y < below.pane.y || y > below.pane.y + below.pane.height) return [line];
	const ring = roundDots([x, y], READING * board.k);
	const { paper } = board.input.ink;
	return [line, { type: 'path', d: ring, fill: paper, stroke: penOf(board, 'head') }];
};

/** Outside the pane at k = 1 [mm]. */
const TICK = 1.2;
const NUMERAL_GAP = 0.5;

const gainNumerals = (below: Below): Item[] => {
	const { board, pane } = below;
	const { ink } = board.input;
	const { k } = board;
	const cap = capOf(board);
	const right = pane.x - (TICK + NUMERAL_GAP) * k;
	// The chart's lowest numeral stands at the pane's head.
	const levels = gainsOf(below).filter((gain) => levelOf(below, gain) - pane.y > 1.5 * cap);
	const ticks = levels.flatMap((gain) => [
		pane.x - TICK * k,
		levelOf(below, gain),
		pane.x,
		levelOf(below, gain)
	]);
	return [
		ruled(ticks, penOf(board, 'tick')),
		...levels.map((gain) =>
			lettered(fixed(gain, 0, '.', true), right, levelOf(below, gain) + cap / 2, {
				cap,
				fill: ink.ink,
				anchor: 'end'
			})
		)
	];
};

const capacitanceNumerals = (below: Below): Item[] => {
	const { board, pane } = below;
	const { ink, plot, decimalMark } = board.input;
	const { k } = board;
	const cap = capOf(board);
	const foot = pane.y + pane.height;
	const baseline = foot + (TICK + NUMERAL_GAP) * k + cap;
	const decades = decadesOf(below);
	const ticks = decades.flatMap((value) => [footOf(plot, value), foot, footOf(plot, value), foot + TICK * k]);
	const numerals = decades.map((value) => {
		const text = formatQuantity(value, 'capacitance', { decimalMark });
		const x = clearOfLeft(text, footOf(plot, value), pane.x, cap);
		return lettered(text, x, baseline, { cap, fill: ink.capacitance, anchor: 'middle' });
	});
	return [ruled(ticks, penOf(board, 'tick')), ...numerals];
};

/** Beside the pane's foot: C falls to the right, other than on most axes. */
const direction = (below: Below): Item[] => {
	const { board, pane } = below;
	const { ink, words } = board.input;
	const { k } = board;
	const cap = capOf(board);
	const x = pane.x + pane.width + 2 * k;
	const foot = pane.y + pane.height;
	const lines = wrap(words.chart.capacitanceFalls, { width: 23 * k, cap }, 2);
	const [tail, tip, barb] = [x, x + 9 * k, 0.8 * k];
	const level = foot - 0.6 * k;
	const at = [
		tail,
		level,
		tip,
		level,
		tip - 2 * barb,
		level - barb,
		tip,
		level,
		tip - 2 * barb,
		level + barb
	];
	const stroke = { ...penOf(board, 'switching'), colour: ink.capacitance };
	return [
		...lines.map((line, index) =>
			lettered(line, x, level - 2.4 * k - (lines.length - 1 - index) * 1.6 * cap, {
				cap,
				fill: ink.capacitance
			})
		),
		{ type: 'path', d: { ops: 'MLMLL', at }, stroke }
	];
};

/** The choice, the windows and their edges keep lettering off. */
const reserveBelow = (below: Below, edges: readonly Edge[]): void => {
	const { board, field } = below;
	const { plot } = board.input;
	const foot = (value: number): number => footOf(plot, value);
	if (board.choice !== null)
		field.columns.push({ from: foot(board.choice) - 0.9, to: foot(board.choice) + 0.9, cost: 1000 });
	for (const edge of edges.filter(({ finding }) => closesWindows(finding))) {
		const x = foot(edge.capacitance);
		field.columns.push({ from: x - 0.25, to: x + 0.25, cost: edge.limiting ? 200 : 60 });
	}
};

/** Everything in the pane, in the order it is drawn. */
const drawBelow = (below: Below, edges: readonly Edge[]): Item[] => {
	const curves = settleBenefit(below);
	return [
		...windowsBelow(below),
		...gridBelow(below),
		...hatchBelow(below),
		...edgesBelow(below, edges),
		...nominalsBelow(below),
		...benefitItems(below, curves),
		...choiceBelow(below, curves),
		...below.texts
	];
};

/**
 * Draws the benefit pane.
 * @param board the chart, all labels placed
 * @param edges the rules' edges
 * @returns the pane with its numerals and border
 * @example paneItems(board, edges).length // 0 without a pane
 * Source: sheet design.
 */
export function paneItems(board: Board, edges: readonly Edge[]): Item[] {
	const { pane } = board.input;
	if (pane === null) return [];
	const boxes: Oriented[] = [];
	const below: Below = { board, pane, field: { ...fieldOf(pane), boxes }, texts: [] };
	reserveBelow(below, edges);
	return [
		...drawBelow(below, edges),
		...gainNumerals(below),
		...capacitanceNumerals(below),
		...direction(below),
		rectangle(pane, { stroke: penOf(board, 'border') })
	];
}
