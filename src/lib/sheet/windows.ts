/** Windows: the lit channel between the banks, with the range of nominal values inside it. */
import type { Window } from '$lib/rules/finding';
import type { Item } from '$lib/scene/scene';
import { clearOfLabels, fallsOf, penOf, segmentsPath, type Board } from './board';
import { joinRange, formatEdge } from './edge';
import { NEVER } from './label';
import { capacitanceLine, type Segment } from './plot';
import { fallStrip, polygonPath } from './polygon';

/** A channel narrower than this, square to its edges and at k = 1, is kept free of lettering [mm]. */
const CHANNEL = 10;

/**
 * Tells whether a window is a channel that lettering and grid keep out of; a wide one is paper to work on.
 * @param board the chart
 * @param window the window
 * @returns true for a narrow one
 * @example isChannel(board, { from: 253e-9, to: 396e-9, … }) // true on a 35 mm decade
 * Source: sheet design.
 */
export function isChannel(board: Board, { from, to }: Window): boolean {
	const fall = fallsOf(board);
	return (fall(to) - fall(from)) / Math.SQRT2 < CHANNEL * board.k;
}

/** Half the width of the choice and of a window's edge, with a little air [mm]. */
const CHOICE_ROOM = 1;
const EDGE_ROOM = 0.3;

/**
 * Keeps lettering off the windows' channels and edges and off the choice.
 * @param board the chart
 * @example reserveWindows(board)
 * Source: sheet design.
 */
export function reserveWindows(board: Board): void {
	const fall = fallsOf(board);
	const reserve = (from: number, to: number, room: number): void => {
		board.field.falls.push({ from: from - room, to: to + room, cost: NEVER });
	};
	for (const window of board.windows) {
		const ends = [fall(window.from), fall(window.to)] as const;
		if (isChannel(board, window)) reserve(...ends, EDGE_ROOM);
		else for (const end of ends.filter(Number.isFinite)) reserve(end, end, EDGE_ROOM);
	}
	if (board.choice !== null) reserve(fall(board.choice), fall(board.choice), CHOICE_ROOM * board.k);
}

/**
 * Names a window for assistive technology.
 * @param board the chart
 * @param window the window
 * @returns e.g. 'Window 252.6 … 396 nF'
 * @example windowLabel(board, window)
 * Source: sheet design.
 */
export function windowLabel(board: Board, window: Window): string {
	const { words, decimalMark } = board.input;
	const from = window.from > 0 ? formatEdge(window.from, 'up', decimalMark) : '0';
	const to = window.to < Infinity ? formatEdge(window.to, 'down', decimalMark) : '∞';
	return `${words.strip.window} ${joinRange(from, to)}`;
}

const fillItem = (
	board: Board,
	range: readonly [number, number],
	fill: string,
	mark: Partial<Item>
): Item[] => {
	const fall = fallsOf(board);
	const polygon = fallStrip(board.input.plot, fall(range[0]), fall(range[1]));
	return polygon.length === 0 ? [] : [{ ...mark, type: 'path', d: polygonPath(polygon), fill }];
};

/**
 * Fills the windows and their nominal ranges.
 * @param board the chart
 * @param channels the narrow ones, or the wide ones
 * @returns fills, window by window
 * @example windowFills(board, true)[0]?.role // 'window'
 * Source: sheet design, colour.
 */
export function windowFills(board: Board, channels: boolean): Item[] {
	const { ink } = board.input;
	return board.windows.flatMap((window, index) => {
		if (isChannel(board, window) !== channels) return [];
		const of = String(index);
		const { nominalFrom, nominalTo } = window;
		const mark = { role: 'window', of, label: windowLabel(board, window) } as const;
		const nominal =
			nominalFrom === null || nominalTo === null || window.nominalEmpty
				? []
				: fillItem(board, [nominalFrom, nominalTo], ink.nominal, { role: 'window', of: `${of} nominal` });
		return [...fillItem(board, [window.from, window.to], ink.window, mark), ...nominal];
	});
}

const degenerateLine = (board: Board, window: Window, of: string): Item[] => {
	const line = window.degenerate ? capacitanceLine(board.input.plot, window.from) : null;
	if (line === null) return [];
	const stroke = penOf(board, 'windowEdge');
	return [{ type: 'path', role: 'window', of, d: segmentsPath(line), stroke }];
};

/**
 * Draws the edges of the nominal ranges, and the line that is all of a window between two bands that touch.
 * @param board the chart, all labels placed
 * @returns one path per line
 * @example windowLines(board).length
 * Source: sheet design.
 */
export function windowLines(board: Board): Item[] {
	const { plot } = board.input;
	return board.windows.flatMap((window, index) => {
		const values = window.nominalEmpty ? [] : [window.nominalFrom, window.nominalTo];
		const lines = values
			.filter((value) => value !== null)
			.map((value) => capacitanceLine(plot, value))
			.filter((line): line is Segment => line !== null);
		const clear = clearOfLabels(board, lines.flat());
		const stroke = penOf(board, 'nominalEdge');
		const dashed: Item[] = clear.length === 0 ? [] : [{ type: 'path', d: segmentsPath(clear), stroke }];
		return [...dashed, ...degenerateLine(board, window, String(index))];
	});
}
