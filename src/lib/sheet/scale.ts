/** The C scale at the right: the chart cut at the lowest switching frequency, where edges and choice are read. */
import { formatQuantity } from '$lib/quantity/format';
import type { Item } from '$lib/scene/scene';
import { ruleNumber, type Edge } from './band-edge';
import { capOf, penOf, segmentsPath, type Board } from './board';
import { formatEdge } from './edge';
import { hatchLines } from './hatch';
import { group, lettered, rectangle, ruled } from './pen';
import { capacitanceThrough, yOf } from './plot';
import { cornersOf } from './polygon';
import { gridValues } from './grid';
import { spread, type Reading } from './scale-labels';
import type { Box } from './paper';

/** Beside the plot at k = 1 [mm]. */
const GAP = 1.2;
const WIDTH = 4;
const LEADER = 1.6;
const LABEL = 3;
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

const edgeReadings = (scale: Scale, edges: readonly Edge[]): Reading[] => {
	const { board } = scale;
	const { decimalMark, ink } = board.input;
	const readings = new Map<number, Reading>();
	for (const edge of edges) {
		const y = yOfCapacitance(scale, edge.capacitance);
		if (!insideScale(scale, y)) continue;
		const number = ruleNumber(board, edge.finding.rule);
		const known = readings.get(edge.capacitance);
		const numbers = [known?.numbers ?? '', number].filter((text) => text !== '');
		const round = edge.forbids === 'larger' ? 'down' : 'up';
		readings.set(edge.capacitance, {
			y,
			text: formatEdge(edge.capacitance, round, decimalMark),
			numbers: [...new Set(numbers.join(' ').split(' '))].join(' '),
			face: edge.limiting || known?.face === 'bold' ? 'bold' : 'regular',
			fill: ink.ink,
			weight: Math.max(known?.weight ?? 0, edge.limiting ? 3 : edge.finding.class === 'advisory' ? 1 : 2)
		});
	}
	return [...readings.values()];
};

const choiceReading = (scale: Scale): Reading[] => {
	const { board } = scale;
	const { decimalMark, ink } = board.input;
	if (board.choice === null) return [];
	const y = yOfCapacitance(scale, board.choice);
	if (!insideScale(scale, y)) return [];
	const text = formatQuantity(board.choice, 'capacitance', { decimalMark });
	return [{ y, text, numbers: '', face: 'bold', fill: ink.ink, weight: 4 }];
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
			numbers: '',
			face: 'regular',
			fill: ink.capacitance,
			weight: 0
		}));
};

const labels = (scale: Scale, edges: readonly Edge[]): Item[] => {
	const { board, box } = scale;
	const { plot } = board.input;
	const cap = capOf(board);
	const readings = [...choiceReading(scale), ...edgeReadings(scale, edges), ...decadeReadings(scale)];
	const right = box.x + box.width;
	const placed = spread(readings, { from: plot.y, to: plot.y + plot.height, pitch: 1.62 * cap });
	const x = right + LABEL * board.k;
	return placed.flatMap(({ reading, at }) => {
		const style = { cap, face: reading.face, fill: reading.fill } as const;
		const bend = right + LEADER * board.k;
		const leader =
			reading.weight === 0
				? []
				: [
						{
							type: 'path' as const,
							d: {
								ops: 'MLL',
								at: [right, reading.y, right + 0.6 * board.k, reading.y, bend + 0.9 * board.k, at]
							},
							stroke: penOf(board, 'capacitanceDecade')
						}
					];
		const inked = leader.map((item) => ({
			...item,
			stroke: { ...item.stroke, colour: board.input.ink.ink }
		}));
		const numbers = lettered(reading.numbers, plot.x + plot.width + NUMBERS * board.k, at + cap / 2, {
			...style,
			anchor: 'end'
		});
		return [
			...inked,
			lettered(reading.text, x, at + cap / 2, style),
			...(reading.numbers === '' ? [] : [numbers])
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
	const { ink, words, decimalMark, plot } = board.input;
	const { k, readAt } = board;
	const cap = capOf(board);
	const style = { cap, fill: ink.capacitance };
	const upper = plot.y - 6.4 * k;
	const lower = plot.y - 2.2 * k;
	const first = lettered(words.chart.scaleAt, box.x, upper, style);
	if (readAt !== null) {
		return [first, lettered(formatQuantity(readAt, 'frequency', { decimalMark }), box.x, lower, style)];
	}
	const end = plot.x + plot.width + NUMBERS * k - 4.5 * k;
	return [
		first,
		ruled([box.x, lower, end, lower], penOf(board, 'switching')),
		lettered('Hz', plot.x + plot.width + NUMBERS * k, lower, { ...style, anchor: 'end' })
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
