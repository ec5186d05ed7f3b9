/** The two families at ±45°: L lines rise, C lines fall, each labelled on its own border. */
import { formatQuantity } from '$lib/quantity/format';
import type { Item, Role } from '$lib/scene/scene';
import { capOf, clearOfLabels, penOf, segmentsPath, settle, type Board } from './board';
import type { Pen } from './ink';
import { alongSegment, roomOf, type Label, type Obstacle } from './label';
import {
	capacitanceLine,
	capacitanceThrough,
	fallOf,
	inductanceLine,
	inductanceThrough,
	riseOf,
	type Plot,
	type Segment
} from './plot';

/** Label to border, and what is left of a line that runs close beside a heavier one, at k = 1 [mm]. */
const LABEL_INSET = 4.5;
const STUB = 22;
/** Nearer than this two lines print as one thick one [mm]. */
const CLOSE = 0.7;
/** One length of dash pattern more or less is not worth a label [mm]. */
const SHORTEST = 12;

interface Family {
	readonly quantity: 'inductance' | 'capacitance';
	readonly role: Role;
	readonly pen: Pen;
	readonly finePen: Pen;
	readonly colour: 'inductance' | 'capacitance';
	/** From which end of the line the label stands. */
	readonly end: 'left' | 'right';
	readonly line: (plot: Plot, value: number) => Segment | null;
	readonly constant: (plot: Plot, value: number) => number;
	readonly range: (plot: Plot) => readonly [number, number];
}

const CAPACITANCES: Family = {
	quantity: 'capacitance',
	role: 'capacitance-line',
	pen: 'capacitanceDecade',
	finePen: 'capacitanceFine',
	colour: 'capacitance',
	end: 'left',
	line: capacitanceLine,
	constant: fallOf,
	range: (plot) => [
		capacitanceThrough(plot.frequencyTo, plot.impedanceTo),
		capacitanceThrough(plot.frequencyFrom, plot.impedanceFrom)
	]
};

const INDUCTANCES: Family = {
	quantity: 'inductance',
	role: 'inductance-line',
	pen: 'inductanceDecade',
	finePen: 'inductanceFine',
	colour: 'inductance',
	end: 'right',
	line: inductanceLine,
	constant: riseOf,
	range: (plot) => [
		inductanceThrough(plot.frequencyTo, plot.impedanceFrom),
		inductanceThrough(plot.frequencyFrom, plot.impedanceTo)
	]
};

const valuesOf = (family: Family, plot: Plot, mantissas: readonly number[]): number[] => {
	const [from, to] = family.range(plot);
	const first = Math.floor(Math.log10(from));
	const last = Math.ceil(Math.log10(to));
	return Array.from({ length: last - first + 1 }, (_, index) => first + index)
		.flatMap((exponent) => mantissas.map((mantissa) => Number(`${String(mantissa)}e${String(exponent)}`)))
		.filter((value) => value > from * (1 + 1e-9) && value < to * (1 - 1e-9));
};

const lengthOf = ([x1, , x2]: Segment): number => (x2 - x1) * Math.SQRT2;

const partOf = ([x1, y1, x2, y2]: Segment, from: number, to: number): Segment => [
	x1 + from * (x2 - x1),
	y1 + from * (y2 - y1),
	x1 + to * (x2 - x1),
	y1 + to * (y2 - y1)
];

const stubOf = (segment: Segment, end: Family['end'], length: number): Segment => {
	const part = Math.min(1, length / lengthOf(segment));
	return end === 'left' ? partOf(segment, 0, part) : partOf(segment, 1 - part, 1);
};

const labelOf = (board: Board, family: Family, value: number): Label => ({
	text: formatQuantity(value, family.quantity, { decimalMark: board.input.decimalMark }),
	cap: capOf(board),
	face: 'regular',
	fill: board.input.ink[family.colour]
});

const runsClose = (board: Board, family: Family, value: number): boolean => {
	const constant = family.constant(board.input.plot, value);
	const room = CLOSE * board.k * Math.SQRT2;
	const beside = ({ from, to }: Obstacle): boolean => constant + room > from && constant - room < to;
	return (family.end === 'left' ? board.field.falls : board.field.rises).some(beside);
};

interface DecadeLine {
	readonly family: Family;
	readonly segment: Segment;
	readonly decade: boolean;
}

const settleDecade = (board: Board, family: Family, value: number): DecadeLine | null => {
	const segment = family.line(board.input.plot, value);
	if (segment === null) return null;
	const length = lengthOf(segment);
	const decade = Number.isInteger(Math.round(Math.log10(value) * 1e9) / 1e9);
	if (length < SHORTEST * board.k) return { family, segment, decade };
	const close = runsClose(board, family, value);
	if (close && !decade) return null;
	const shown = close ? stubOf(segment, family.end, STUB * board.k) : segment;
	if (!decade) return { family, segment, decade };
	const label = labelOf(board, family, value);
	const inset = Math.min(0.5, (LABEL_INSET * board.k + roomOf(label)[0]) / lengthOf(shown));
	const preferred = family.end === 'left' ? inset : 1 - inset;
	const found = settle(board, label, alongSegment(shown, { preferred, beside: 0 }));
	return close && !found ? null : { family, segment: shown, decade };
};

/**
 * Places the labels of the decade lines and gives the lines that will be drawn.
 * @param board the chart; heavier lines and their labels placed
 * @returns C lines, then L lines
 * @example settleDecades(board).length
 * Source: sheet design: each border carries one family.
 */
export function settleDecades(board: Board): DecadeLine[] {
	const blank = board.input.design === null;
	return [CAPACITANCES, INDUCTANCES].flatMap((family) => {
		const decades = valuesOf(family, board.input.plot, [1]);
		const others = blank ? valuesOf(family, board.input.plot, [2, 5]) : [];
		return [...decades, ...others]
			.map((value) => settleDecade(board, family, value))
			.filter((line) => line !== null);
	});
}

/**
 * Draws the decade lines, broken at lettering.
 * @param board the chart, all labels placed
 * @param lines what settleDecades gave
 * @returns one path per family and weight
 * @example decadeItems(board, settleDecades(board)).length // 2
 * Source: common practice, reactance paper.
 */
export function decadeItems(board: Board, lines: readonly DecadeLine[]): Item[] {
	return [CAPACITANCES, INDUCTANCES].flatMap((family) =>
		[false, true].flatMap((decade): Item[] => {
			const own = lines.filter((line) => line.family === family && line.decade === decade);
			const segments = clearOfLabels(
				board,
				own.flatMap(({ segment }) => [...segment])
			);
			if (segments.length === 0) return [];
			const pen = decade ? family.pen : family.finePen;
			return [{ type: 'path', role: family.role, d: segmentsPath(segments), stroke: penOf(board, pen) }];
		})
	);
}
