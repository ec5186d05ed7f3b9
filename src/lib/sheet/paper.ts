/** Paper sizes and how a sheet is divided: frame, bottom band with title block, strip, room for the chart. */
import type { Layout, PaperName } from './layout';

/** A rectangle on the paper, x and y of its upper left corner [mm]. */
export interface Box {
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly height: number;
}

export interface Paper {
	readonly width: number;
	readonly height: number;
	/** Factor on lettering and room: √2 on A3 and Tabloid, so that a copy reduced to A4 keeps 2.5 mm. */
	readonly k: number;
	readonly frame: Box;
	readonly titleBlock: Box;
	readonly check: Box;
	/** One column in landscape, two in portrait, none without a strip. */
	readonly strip: readonly Box[];
	/** Where the chart and its margins stand. */
	readonly chart: Box;
}

/** Short and long side [mm]: ISO 216, ANSI/ASME Y14.1 (the latter recalled). */
const SIDES: Readonly<Record<PaperName, readonly [number, number]>> = {
	A4: [210, 297],
	A3: [297, 420],
	Letter: [215.9, 279.4],
	Tabloid: [279.4, 431.8]
};

const LARGE: Readonly<Record<PaperName, boolean>> = { A4: false, A3: true, Letter: false, Tabloid: true };

/** Filing margin at the left, the others [mm]: ISO 5457 (through national texts). */
const FILING_MARGIN = 20;
const MARGIN = 10;

export const TITLE_BLOCK_WIDTH = 180;
export const BAND_HEIGHT = 27;

const STRIP_WIDTH = { small: 84, large: 119 } as const;
/** Height of the strip under a portrait chart [mm]. */
const STRIP_HEIGHT: Readonly<Record<PaperName, number>> = { A4: 95, Letter: 91, A3: 134, Tabloid: 134 };
/** Room of the check block where none is left beside the title block [mm]. */
const CHECK_HEIGHT = 22;
const CHECK_WIDTH_LEAST = 60;

/**
 * Divides the paper of a layout.
 * @param layout paper, orientation, and whether there is a strip
 * @returns the sizes and boxes [mm]
 * @example dividePaper({ paper: 'A4', orientation: 'landscape' }).titleBlock.x // 107
 * Source: ISO 5457 for the margins, ISO 7200 for the 180 mm title block at the lower right.
 */
export function dividePaper(layout: Layout): Paper {
	const [short, long] = SIDES[layout.paper];
	const landscape = layout.orientation === 'landscape';
	const width = landscape ? long : short;
	const height = landscape ? short : long;
	const frame = {
		x: FILING_MARGIN,
		y: MARGIN,
		width: width - FILING_MARGIN - MARGIN,
		height: height - 2 * MARGIN
	};
	const k = LARGE[layout.paper] ? Math.SQRT2 : 1;
	const titleBlock = {
		x: frame.x + frame.width - TITLE_BLOCK_WIDTH,
		y: frame.y + frame.height - BAND_HEIGHT,
		width: TITLE_BLOCK_WIDTH,
		height: BAND_HEIGHT
	};
	return { width, height, k, frame, titleBlock, ...divideField(layout, frame) };
}

type Field = Pick<Paper, 'strip' | 'chart' | 'check'>;

const divideField = (layout: Layout, frame: Box): Field => {
	const field = { ...frame, height: frame.height - BAND_HEIGHT };
	const beside = frame.width - TITLE_BLOCK_WIDTH;
	const band = { x: frame.x, y: field.y + field.height, width: beside, height: BAND_HEIGHT };
	const check = beside >= CHECK_WIDTH_LEAST ? band : null;
	if (layout.strip === false) return withoutStrip(field, check);
	return layout.orientation === 'landscape'
		? { check: check ?? band, ...stripAtRight(field, LARGE[layout.paper]) }
		: stripUnder(field, STRIP_HEIGHT[layout.paper], check);
};

const withoutStrip = (field: Box, check: Box | null): Field => {
	if (check !== null) return { strip: [], chart: field, check };
	const chart = { ...field, height: field.height - CHECK_HEIGHT };
	return { strip: [], chart, check: { ...field, y: chart.y + chart.height, height: CHECK_HEIGHT } };
};

const stripAtRight = (field: Box, large: boolean): Pick<Paper, 'strip' | 'chart'> => {
	const width = large ? STRIP_WIDTH.large : STRIP_WIDTH.small;
	const chart = { ...field, width: field.width - width };
	return { strip: [{ ...field, x: field.x + chart.width, width }], chart };
};

const stripUnder = (field: Box, height: number, check: Box | null): Field => {
	const chart = { ...field, height: field.height - height };
	const y = chart.y + chart.height;
	const width = field.width / 2;
	const left = { x: field.x, y, width, height };
	const right = { ...left, x: field.x + width };
	if (check !== null) return { strip: [left, right], chart, check };
	const foot = { ...right, y: y + height - CHECK_HEIGHT, height: CHECK_HEIGHT };
	return { strip: [left, { ...right, height: height - CHECK_HEIGHT }], chart, check: foot };
};

/**
 * The zone of a point: the grid fields of 50 mm counted from the centre marks, letters down, figures across.
 * @param length side of the frame's outer paper along one axis [mm]
 * @returns positions of the field borders, from the paper's centre outward [mm]
 * @example fieldBorders(297, 20, 287) // [48.5, 98.5, 148.5, 198.5, 248.5]
 * Source: ISO 5457, grid reference system (recalled).
 */
export function fieldBorders(length: number, from: number, to: number): number[] {
	const centre = length / 2;
	const first = Math.ceil((from - centre) / 50 + 1e-9);
	const last = Math.floor((to - centre) / 50 - 1e-9);
	return Array.from({ length: last - first + 1 }, (_, index) => centre + 50 * (first + index));
}
