/** The drawing frame with its centring marks, and the grid reference zones at the top and the right. */
import type { Item } from '$lib/scene/scene';
import type { Ink } from './ink';
import { fieldBorders, type Paper } from './paper';
import { group, lettered, rectangle, ruled } from './pen';

const FRAME_LINE = 0.7;
const ZONE_LINE = 0.35;
const ZONE_CAP = 3.5;
/** Depth of the zone strip and length of the centring marks outside the frame [mm]. */
const ZONE_DEPTH = 5;
/** A remainder narrower than this belongs to the field beside it [mm]. */
const FIELD_LEAST = 8;

/** Letters that are not taken for figures. */
const LETTERS = 'ABCDEFGHJKLMNPQRSTUVWXYZ';

const centringMarks = (paper: Paper): number[] => {
	const { frame } = paper;
	const right = frame.x + frame.width;
	const foot = frame.y + frame.height;
	const x = paper.width / 2;
	const y = paper.height / 2;
	return [
		...[x, frame.y - ZONE_DEPTH, x, frame.y],
		...[x, foot, x, foot + ZONE_DEPTH],
		...[frame.x - ZONE_DEPTH, y, frame.x, y],
		...[right, y, right + ZONE_DEPTH, y]
	];
};

interface Field {
	readonly middle: number;
	readonly sign: string;
}

/** Borders of the fields, without those that would leave a sliver at an end. */
const bordersOf = (length: number, from: number, to: number): number[] =>
	fieldBorders(length, from, to).filter((at) => at - from >= FIELD_LEAST && to - at >= FIELD_LEAST);

const fieldsOf = (
	borders: readonly number[],
	[from, to]: readonly [number, number],
	sign: (n: number) => string
): Field[] => {
	const ends = [from, ...borders, to];
	return ends.slice(0, -1).map((start, index) => ({
		middle: (start + (ends[index + 1] ?? to)) / 2,
		sign: sign(index)
	}));
};

const zoneItems = (paper: Paper, ink: Ink): Item[] => {
	const { frame } = paper;
	const right = frame.x + frame.width;
	const foot = frame.y + frame.height;
	const top = frame.y - ZONE_DEPTH;
	const side = right + ZONE_DEPTH;
	const across = bordersOf(paper.width, frame.x, right);
	const down = bordersOf(paper.height, frame.y, foot);
	const lines = [
		...[
			frame.x,
			frame.y,
			frame.x,
			top,
			frame.x,
			top,
			side,
			top,
			side,
			top,
			side,
			foot,
			side,
			foot,
			right,
			foot
		],
		...across.flatMap((x) => [x, top, x, frame.y]),
		...down.flatMap((y) => [right, y, side, y])
	];
	const lettering = { cap: ZONE_CAP, fill: ink.ink, anchor: 'middle' } as const;
	const baseline = frame.y - FRAME_LINE / 2 - (ZONE_DEPTH - FRAME_LINE / 2 - ZONE_CAP) / 2;
	const centre = right + FRAME_LINE / 2 + (ZONE_DEPTH - FRAME_LINE / 2) / 2;
	return [
		ruled(lines, { colour: ink.ink, width: ZONE_LINE, cap: 'square' }),
		...fieldsOf(across, [frame.x, right], (index) => String(index + 1)).map(({ middle, sign }) =>
			lettered(sign, middle, baseline, lettering)
		),
		...fieldsOf(down, [frame.y, foot], (index) => LETTERS[index] ?? '').map(({ middle, sign }) =>
			lettered(sign, centre, middle + ZONE_CAP / 2, lettering)
		)
	];
};

/**
 * Draws the frame, its centring marks and the zones.
 * @param paper sizes of the sheet [mm]
 * @param ink palette
 * @param zones whether the grid reference zones stand at the top and the right
 * @returns one group with role `frame`
 * @example frameItems(dividePaper({ paper: 'A4', orientation: 'landscape' }), ink, true).length // 1
 * Source: ISO 5457 (recalled): 0.7 mm frame and centring marks, fields of 50 mm from the centre, 3.5 mm signs.
 */
export function frameItems(paper: Paper, ink: Ink, zones: boolean): Item[] {
	const stroke = { colour: ink.ink, width: FRAME_LINE };
	const field = paper.titleBlock.y;
	const right = paper.frame.x + paper.frame.width;
	return [
		group(
			[
				...(zones ? zoneItems(paper, ink) : []),
				ruled(centringMarks(paper), stroke),
				ruled([paper.frame.x, field, right, field], { colour: ink.ink, width: 0.35 }),
				...stripBorders(paper).map((segment) => ruled(segment, { colour: ink.ink, width: 0.35 })),
				rectangle(paper.frame, { stroke: { ...stroke, join: 'miter' } })
			],
			{ role: 'frame' }
		)
	];
}

const stripBorders = ({ strip, frame, chart, check, titleBlock }: Paper): number[][] => {
	const right = frame.x + frame.width;
	const chartFoot = chart.y + chart.height;
	const under = chartFoot < titleBlock.y - 1 ? [[frame.x, chartFoot, right, chartFoot]] : [];
	const aside = check.y < titleBlock.y - 1 ? [[check.x, check.y, check.x + check.width, check.y]] : [];
	return [
		...under,
		...aside,
		...strip
			.filter((column) => column.x > frame.x)
			.map((column) => [column.x, column.y, column.x, titleBlock.y])
	];
};
