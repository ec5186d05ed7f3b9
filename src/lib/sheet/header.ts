/** The switching frequencies: bands down the chart, their values and harmonics above it. */
import type { Switching } from '$lib/design/design';
import { formatQuantity } from '$lib/quantity/format';
import { textWidth } from '$lib/scene/metrics';
import type { Item } from '$lib/scene/scene';
import { capOf, penOf, type Board } from './board';
import { numeralBoxes } from './axes';
import { joinRange } from './edge';
import { NEVER } from './label';
import { cutAtBoxes } from './oriented';
import { lettered, rectangle, ruled } from './pen';
import { xOf } from './plot';

/** Above the plot at k = 1: baseline of the row where no numerals stand between [mm]. */
const ROW = 2.9;
/** Baseline of the row above the numerals at k = 1 [mm]. */
export const HEADER_ROW = 6.2;
const ELBOW = 1.2;
const GAP = 1;

const rowHeight = (board: Board): number => (board.input.pane === null ? ROW : HEADER_ROW) * board.k;

const centreOf = ({ frequencyMin_Hz, frequencyMax_Hz }: Switching): number =>
	Math.sqrt(frequencyMin_Hz * frequencyMax_Hz);

interface Taken {
	readonly from: number;
	readonly to: number;
}

const free = (taken: readonly Taken[], { from, to }: Taken): boolean =>
	taken.every((other) => to + GAP < other.from || from - GAP > other.to);

const valueOf = (board: Board, { frequencyMin_Hz, frequencyMax_Hz }: Switching): string => {
	const { decimalMark } = board.input;
	const from = formatQuantity(frequencyMin_Hz, 'frequency', { decimalMark });
	return joinRange(from, formatQuantity(frequencyMax_Hz, 'frequency', { decimalMark }));
};

const inside = ({ input: { plot } }: Board, x: number): boolean => x >= plot.x && x <= plot.x + plot.width;

/**
 * Draws the bands of the switching frequencies down the chart and keeps lettering off them.
 * @param board the chart
 * @returns fills and edges
 * @example switchingBands(board).length // 2 for one entry with a range
 * Source: sheet design.
 */
export function switchingBands(board: Board): Item[] {
	const { plot, design, ink } = board.input;
	return (design?.switching ?? []).flatMap((entry) => {
		const from = Math.max(plot.x, xOf(plot, entry.frequencyMin_Hz));
		const to = Math.min(plot.x + plot.width, xOf(plot, entry.frequencyMax_Hz));
		if (from > plot.x + plot.width || to < plot.x) return [];
		board.field.columns.push({ from: from - 0.3, to: to + 0.3, cost: NEVER });
		const foot = plot.y + plot.height;
		const edges = [...new Set([from, to])].flatMap((x) => [x, plot.y, x, foot]);
		const band = { x: from, y: plot.y, width: to - from, height: plot.height };
		const fill = to > from ? [rectangle(band, { fill: ink.switching })] : [];
		return [
			...fill,
			ruled(edges, penOf(board, 'switching'), { label: `${entry.label}, ${valueOf(board, entry)}` })
		];
	});
}

interface Heading {
	readonly items: readonly Item[];
	readonly taken: Taken;
}

interface Wording {
	/** Index of the symbol f. */
	readonly sub: string;
	/** Empty where only the symbol finds room. */
	readonly value: string;
}

/** Widths of symbol, index and value, and where each starts from the left end [mm]. */
const measured = ({ k }: Board, { sub, value }: Wording): { sub: number; value: number; width: number } => {
	const afterSymbol = textWidth('f', 'bold', 3.5 * k) + 0.3 * k;
	const afterSub = afterSymbol + textWidth(sub, 'semibold', 2.5 * k);
	if (value === '') return { sub: afterSymbol, value: afterSub, width: afterSub };
	const start = afterSub + 1.6 * k;
	return { sub: afterSymbol, value: start, width: start + textWidth(value, 'bold', 3.5 * k) };
};

/** The leader from the lettering down to the band, broken at a numeral of the axis. */
const leader = (board: Board, x: number, elbow: number): Item => {
	const { plot } = board.input;
	const level = plot.y - rowHeight(board) - 1.25 * board.k;
	return ruled(
		cutAtBoxes([elbow, level, x, level, x, level, x, plot.y], numeralBoxes(board)),
		penOf(board, 'switching')
	);
};

const headingAt = (board: Board, wording: Wording, left: number): Item[] => {
	const { plot, ink } = board.input;
	const { k } = board;
	const y = plot.y - rowHeight(board);
	const starts = measured(board, wording);
	const style = { fill: ink.ink, face: 'bold', cap: 3.5 * k } as const;
	return [
		lettered('f', left, y, style),
		lettered(wording.sub, left + starts.sub, y + 0.75 * k, { ...style, face: 'semibold', cap: 2.5 * k }),
		...(wording.value === '' ? [] : [lettered(wording.value, left + starts.value, y, style)])
	];
};

const wordingsOf = (board: Board, entry: Switching): Wording[] => {
	const entries = board.input.design?.switching ?? [];
	const sub = entries.length > 1 ? `sw${String(1 + entries.indexOf(entry))}` : 'sw';
	return [
		{ sub, value: valueOf(board, entry) },
		{ sub, value: '' }
	];
};

/** The lowest frequency is written to the left of its band, others to the right, so that they part. */
const leftmost = ({ input }: Board, entry: Switching): boolean =>
	(input.design?.switching ?? []).every((other) => centreOf(other) >= centreOf(entry));

/** Symbol with its index, and the value where there is room for it; null where even the symbol finds none. */
const headingOf = (board: Board, entry: Switching, taken: readonly Taken[]): Heading | null => {
	const { plot } = board.input;
	const { k } = board;
	const x = xOf(plot, centreOf(entry));
	const away = (ELBOW + 0.8) * k;
	const places = wordingsOf(board, entry).flatMap((wording) => {
		const { width } = measured(board, wording);
		const left = { wording, side: -1, span: { from: x - away - width, to: x - away } };
		const right = { wording, side: 1, span: { from: x + away, to: x + away + width } };
		return leftmost(board, entry) ? [left, right] : [right, left];
	});
	const room = ({ from, to }: Taken): Taken => ({ from: Math.min(from, x), to: Math.max(to, x) });
	const place = places.find(({ span }) => span.from >= plot.x - 0.5 * k && free(taken, room(span)));
	if (place === undefined) return null;
	const { wording, side, span } = place;
	return {
		taken: room(span),
		items: [leader(board, x, x + side * ELBOW * k), ...headingAt(board, wording, span.from)]
	};
};

const harmonicTicks = (board: Board, entry: Switching, taken: Taken[]): Item[] => {
	const { plot, ink } = board.input;
	const { k } = board;
	const cap = capOf(board);
	const centre = centreOf(entry);
	const ticks: number[] = [];
	const numerals: Item[] = [];
	const y = plot.y - rowHeight(board);
	for (let order = 2; order <= entry.harmonics; order += 1) {
		const x = xOf(plot, order * centre);
		if (!inside(board, x)) continue;
		ticks.push(x, plot.y, x, plot.y - 1.2 * k);
		const text = `${String(order)}×`;
		const half = textWidth(text, 'regular', cap) / 2;
		const span = { from: x - half, to: x + half };
		if (!free(taken, span)) continue;
		taken.push(span);
		numerals.push(lettered(text, x, y, { cap, fill: ink.ink, anchor: 'middle' }));
	}
	return ticks.length === 0 ? [] : [ruled(ticks, penOf(board, 'tick')), ...numerals];
};

/**
 * Sets the switching frequencies and their harmonics above the chart.
 * @param board the chart
 * @returns leaders, values, ticks and orders
 * @example headerItems(board).length
 * Source: sheet design.
 */
export function headerItems(board: Board): Item[] {
	const entries = (board.input.design?.switching ?? []).filter((entry) =>
		inside(board, xOf(board.input.plot, centreOf(entry)))
	);
	const right = board.input.plot.x + board.input.plot.width;
	// The head of the C scale stands beyond.
	const taken: Taken[] = [{ from: right + GAP, to: Infinity }];
	const headings = entries.flatMap((entry) => {
		const heading = headingOf(board, entry, taken);
		if (heading === null) return [];
		taken.push(heading.taken);
		return [...heading.items];
	});
	return [...headings, ...entries.flatMap((entry) => harmonicTicks(board, entry, taken))];
}
