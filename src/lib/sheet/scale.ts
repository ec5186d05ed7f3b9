/** The C scale at the right: the chart cut at the lowest switching frequency, where edges and choice are read. */
import { formatQuantity } from '$lib/quantity/format';
import { textWidth } from '$lib/scene/metrics';
import type { Item } from '$lib/scene/scene';
import { ruleNumber, type Edge } from './band-edge';
import { capOf, penOf, segmentsPath, type Board } from './board';
import { formatEdge } from './edge';
import { HEADER_ROW } from './header';
import { hatchLines } from './hatch';
import { group, lettered, rectangle, ruled } from './pen';
import { capacitanceThrough, yOf } from './plot';
import { cornersOf } from './polygon';
import { gridValues } from './grid';
import { spread, type PlacedReading, type Reading } from './scale-labels';
import type { Box } from './paper';

/** Beside the plot at k = 1 [mm]. */
const GAP = 1.2;
const WIDTH = 3.6;
const LEADER = 1;
const LABEL = 2;
/** Right end of the rule numbers, from the plot. */
const NUMBERS = 26.4;

interface Scale {
	readonly board: Board;
	readonly box: Box;
	readonly readAt: number;
}

const scaleBox = ({ input: { plot }, k }: Board): Box => ({
	x: plot.x + plot.width + GAP * k,
	y: plot.y,
	width: WIDTH * k,
	height: plot.height
});

const yOfCapacitance = ({ board, readAt }: Scale, capacitance: number): number => {
	const { plot } = board.input;
	if (capacitance === 0) return plot.y;
	if (capacitance === Infinity) return plot.y + plot.height;
	const y = yOf(plot, 1 / (2 * Math.PI * readAt * capacitance));
	return Math.min(Math.max(y, plot.y), plot.y + plot.height);
};

const insideScale = ({ board: { input } }: Scale, y: number): boolean =>
	y > input.plot.y + 1e-6 && y < input.plot.y + input.plot.height - 1e-6;

const section = (scale: Scale, from: number, to: number): Box | null => {
	const top = yOfCapacitance(scale, from);
	const foot = yOfCapacitance(scale, to);
	return foot - top > 1e-6 ? { ...scale.box, y: top, height: foot - top } : null;
};

const fills = (scale: Scale): Item[] => {
	const { board } = scale;
	const { ink } = board.input;
	const hatched = board.zones.flatMap((zone): Item[] => {
		const box = zone.class === null ? null : section(scale, zone.from, zone.to);
		if (box === null || zone.class === null) return [];
		const lines = hatchLines(cornersOf(box), zone.class, 'bank', board.k);
		const stroke = { ...penOf(board, `${zone.class}Bank`), width: penOf(board, `${zone.class}Field`).width };
		return lines.length === 0 ? [] : [{ type: 'path', d: segmentsPath(lines), stroke }];
	});
	const lit = board.windows.flatMap((window): Item[] => {
		const whole = section(scale, window.from, window.to);
		const { nominalFrom, nominalTo, nominalEmpty } = window;
		const nominal =
			nominalEmpty || nominalFrom === null || nominalTo === null
				? null
				: section(scale, nominalFrom, nominalTo);
		return [
			...(whole === null ? [] : [rectangle(whole, { fill: ink.window })]),
			...(nominal === null ? [] : [rectangle(nominal, { fill: ink.nominal })])
		];
	});
	return [...lit, ...hatched];
};

/** Decades and their parts as ticks on the right side; decades are numbered. */
const ticks = (scale: Scale): Item[] => {
	const { board, box, readAt } = scale;
	const { plot, ink } = board.input;
	const right = box.x + box.width;
	const from = capacitanceThrough(readAt, plot.impedanceTo);
	const to = capacitanceThrough(readAt, plot.impedanceFrom);
	const lines = gridValues(from, to).flatMap(({ value, weight }) => {
		const y = yOfCapacitance(scale, value);
		const length = { gridDecade: 2.2, gridMiddle: 1.2, gridFine: 0.7 }[weight] * board.k;
		return [right, y, right + length, y];
	});
	const stroke = { ...penOf(board, 'capacitanceDecade'), colour: ink.capacitance };
	return lines.length === 0 ? [] : [ruled(lines, stroke)];
};

/** Edges that close no window need no more than three digits. */
const DIGITS = 3;

const readingText = ({ board }: Scale, { capacitance, forbids, limiting }: Edge): string => {
	const { decimalMark } = board.input;
	const round = forbids === 'larger' ? 'down' : 'up';
	if (limiting) return formatEdge(capacitance, round, decimalMark);
	return formatQuantity(capacitance, 'capacitance', { digits: DIGITS, round, decimalMark });
};

const edgeWeight = ({ limiting, finding }: Edge): number => {
	if (limiting) return 3;
	return finding.class === 'advisory' ? 1 : 2;
};

/** One reading of all edges at one value: the weightiest writes it, all rules are named. */
const readingOf = (scale: Scale, together: readonly Edge[]): Reading | null => {
	const { board } = scale;
	const [edge] = [...together].sort((a, b) => edgeWeight(b) - edgeWeight(a));
	if (edge === undefined) return null;
	const y = yOfCapacitance(scale, edge.capacitance);
	if (!insideScale(scale, y)) return null;
	const numbers = [...new Set(together.map(({ finding }) => ruleNumber(board, finding.rule)))];
	return {
		y,
		text: readingText(scale, edge),
		numbers,
		face: edge.limiting ? 'bold' : 'regular',
		fill: board.input.ink.ink,
		weight: edgeWeight(edge)
	};
};

const edgeReadings = (scale: Scale, edges: readonly Edge[]): Reading[] => {
	const byValue = new Map<number, Edge[]>();
	for (const edge of edges) byValue.set(edge.capacitance, [...(byValue.get(edge.capacitance) ?? []), edge]);
	return [...byValue.values()]
		.map((together) => readingOf(scale, together))
		.filter((reading) => reading !== null);
};

const choiceReading = (scale: Scale): Reading[] => {
	const { board } = scale;
	const { decimalMark, ink } = board.input;
	if (board.choice === null) return [];
	const y = yOfCapacitance(scale, board.choice);
	if (!insideScale(scale, y)) return [];
	const text = formatQuantity(board.choice, 'capacitance', { decimalMark });
	return [{ y, text, numbers: [], face: 'bold', fill: ink.ink, weight: 4 }];
};

const decadeReadings = (scale: Scale): Reading[] => {
	const { board, readAt } = scale;
	const { plot, ink, decimalMark } = board.input;
	const from = capacitanceThrough(readAt, plot.impedanceTo);
	const to = capacitanceThrough(readAt, plot.impedanceFrom);
	return gridValues(from, to)
		.filter(({ weight }) => weight === 'gridDecade')
		.map(({ value }) => ({
			y: yOfCapacitance(scale, value),
			text: formatQuantity(value, 'capacitance', { decimalMark }),
			numbers: [],
			face: 'regular',
			fill: ink.capacitance,
			weight: 0
		}));
};

/** As many rule numbers as stand between the value and the right end; an ellipsis says that there are more. */
const numbersText = ({ text, numbers, face }: Reading, room: number, cap: number): string => {
	const width = room - textWidth(text, face, cap) - 0.2 * cap;
	const tails = numbers.map((_, index) =>
		index === numbers.length - 1 ? numbers.join(' ') : `${numbers.slice(0, index + 1).join(' ')}…`
	);
	return tails.filter((tail) => textWidth(tail, face, cap) <= width).at(-1) ?? '';
};

const leaderOf = ({ board, box }: Scale, { reading, at }: PlacedReading): Item[] => {
	if (reading.weight === 0) return [];
	const right = box.x + box.width;
	const { k } = board;
	const way = [right, reading.y, right + 0.5 * k, reading.y, right + (LEADER + 0.7) * k, at];
	const stroke = { ...penOf(board, 'capacitanceDecade'), colour: board.input.ink.ink };
	return [{ type: 'path', d: { ops: 'MLL', at: way }, stroke }];
};

const labels = (scale: Scale, edges: readonly Edge[]): Item[] => {
	const { board, box } = scale;
	const { plot } = board.input;
	const cap = capOf(board);
	const readings = [...choiceReading(scale), ...edgeReadings(scale, edges), ...decadeReadings(scale)];
	const placed = spread(readings, { from: plot.y, to: plot.y + plot.height, pitch: 1.62 * cap });
	const x = box.x + box.width + LABEL * board.k;
	const end = plot.x + plot.width + NUMBERS * board.k;
	return placed.flatMap(({ reading, at }) => {
		const style = { cap, face: reading.face, fill: reading.fill } as const;
		const numbers = numbersText(reading, end - x, cap);
		return [
			...leaderOf(scale, { reading, at }),
			lettered(reading.text, x, at + cap / 2, style),
			...(numbers === '' ? [] : [lettered(numbers, end, at + cap / 2, { ...style, anchor: 'end' })])
		];
	});
};

const marks = (scale: Scale, edges: readonly Edge[]): Item[] => {
	const { board, box } = scale;
	const right = box.x + box.width;
	const level = (value: number): number[] => {
		const y = yOfCapacitance(scale, value);
		return insideScale(scale, y) ? [box.x, y, right, y] : [];
	};
	const strong = edges.filter(({ limiting }) => limiting).flatMap((edge) => level(edge.capacitance));
	const weak = edges.filter(({ limiting }) => !limiting).flatMap((edge) => level(edge.capacitance));
	const chosen = board.choice === null ? [] : level(board.choice);
	const mark = { role: 'choice', of: 'choice' } as const;
	return [
		...(weak.length === 0 ? [] : [ruled(weak, penOf(board, 'designEdge'))]),
		...(strong.length === 0 ? [] : [ruled(strong, penOf(board, 'windowEdge'))]),
		...(chosen.length === 0 ? [] : [ruled(chosen, penOf(board, 'choice'), mark)])
	];
};

/** Over the scale: the frequency at which it is cut, or a line to write it on. */
const head = (board: Board, box: Box): Item[] => {
	const { ink, words, decimalMark, plot, pane } = board.input;
	const { k, readAt } = board;
	const style = { cap: capOf(board), fill: ink.capacitance };
	const lower = plot.y - 2.6 * k;
	const upper = plot.y - 6.8 * k;
	const end = plot.x + plot.width + NUMBERS * k;
	const frequency = readAt === null ? '' : formatQuantity(readAt, 'frequency', { decimalMark });
	if (pane !== null)
		return [lettered(`${words.chart.scaleAt} ${frequency}`, box.x, plot.y - HEADER_ROW * k, style)];
	const first = lettered(words.chart.scaleAt, box.x, upper, style);
	if (readAt !== null) return [first, lettered(frequency, box.x, lower, style)];
	return [
		first,
		ruled([box.x, lower, end - 4.5 * k, lower], penOf(board, 'switching')),
		lettered('Hz', end, lower, { ...style, anchor: 'end' })
	];
};

/**
 * Draws the C scale.
 * @param board the chart
 * @param edges the rules' edges
 * @returns one group
 * @example scaleItems(board, edges)[0]?.role // 'scale'
 * Source: C = 1/(2π f_sw |Z|).
 */
export function scaleItems(board: Board, edges: readonly Edge[]): Item[] {
	const box = scaleBox(board);
	const border = rectangle(box, { stroke: penOf(board, 'switching') });
	if (board.readAt === null) return [group([border, ...head(board, box)], { role: 'scale' })];
	const scale = { board, box, readAt: board.readAt };
	return [
		group(
			[
				...fills(scale),
				...ticks(scale),
				border,
				...marks(scale, edges),
				...labels(scale, edges),
				...head(board, box)
			],
			{ role: 'scale' }
		)
	];
}
