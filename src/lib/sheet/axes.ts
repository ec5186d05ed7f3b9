/** The plot's border, ticks and numerals; frequencies stand above where the benefit pane takes the foot. */
import { formatQuantity } from '$lib/quantity/format';
import { textWidth } from '$lib/scene/metrics';
import type { Item } from '$lib/scene/scene';
import { capOf, penOf, type Board } from './board';
import { orientedAt, type Oriented } from './oriented';
import { lettered, rectangle, ruled } from './pen';
import { xOf, yOf } from './plot';

/** Outside the border, at k = 1 [mm]. */
const TICK = 1.2;
const NUMERAL_GAP = 0.5;

/**
 * Lists the powers of ten from one value to another, both included.
 * @param from power of ten
 * @param to power of ten
 * @returns rising
 * @example powersOfTen(1e3, 1e5) // [1000, 10000, 100000]
 * Source: identity.
 */
export function powersOfTen(from: number, to: number): number[] {
	const first = Math.round(Math.log10(from));
	const last = Math.round(Math.log10(to));
	return Array.from({ length: last - first + 1 }, (_, index) => Number(`1e${String(first + index)}`));
}

/** How far a numeral of the level axis may reach past the left border, where the upright one stands; in capital heights. */
const OVERHANG = 0.3;

/**
 * Moves the middle of a numeral so far right that it misses the upright axis's own numeral at the corner.
 * @param text the numeral
 * @param x where it belongs [mm]
 * @param left the plot's left border [mm]
 * @param cap capital height [mm]
 * @returns middle of the numeral [mm]
 * @example clearOfLeft('1 kHz', 36, 36, 2.5) > 36 // true
 * Source: sheet design.
 */
export function clearOfLeft(text: string, x: number, left: number, cap: number): number {
	return Math.max(x, left - OVERHANG * cap + textWidth(text, 'regular', cap) / 2);
}

const frequencyNumerals = (board: Board): Item[] => {
	const { plot, pane, decimalMark, ink } = board.input;
	const { k } = board;
	const cap = capOf(board);
	const above = pane !== null;
	const border = above ? plot.y : plot.y + plot.height;
	const away = (above ? -1 : 1) * TICK * k;
	const baseline = above ? border - (TICK + NUMERAL_GAP) * k : border + (TICK + NUMERAL_GAP) * k + cap;
	const values = powersOfTen(plot.frequencyFrom, plot.frequencyTo);
	const ticks = values.flatMap((value) => [xOf(plot, value), border, xOf(plot, value), border + away]);
	const numerals = values.map((value) => {
		const text = formatQuantity(value, 'frequency', { decimalMark });
		const x = clearOfLeft(text, xOf(plot, value), plot.x, cap);
		return lettered(text, x, baseline, { cap, fill: ink.ink, anchor: 'middle' });
	});
	const symbol = lettered('f', plot.x + plot.width - plot.decade / 2, baseline, {
		cap,
		face: 'bold',
		fill: ink.ink,
		anchor: 'middle'
	});
	return [ruled(ticks, penOf(board, 'tick')), ...numerals, symbol];
};

/**
 * Gives the room of the frequency numerals above the chart, which leaders from above stop at.
 * @param board the chart
 * @returns none where the numerals stand at the foot
 * @example numeralBoxes(board).length
 * Source: sheet design.
 */
export function numeralBoxes(board: Board): Oriented[] {
	const { plot, pane, decimalMark } = board.input;
	if (pane === null) return [];
	const cap = capOf(board);
	const middle = plot.y - (TICK + NUMERAL_GAP) * board.k - cap / 2;
	return powersOfTen(plot.frequencyFrom, plot.frequencyTo).map((value) => {
		const text = formatQuantity(value, 'frequency', { decimalMark });
		const width = textWidth(text, 'regular', cap);
		return orientedAt(
			clearOfLeft(text, xOf(plot, value), plot.x, cap),
			middle,
			[width / 2 + 0.3 * cap, 0.75 * cap],
			0
		);
	});
}

const impedanceNumerals = (board: Board): Item[] => {
	const { plot, decimalMark, ink } = board.input;
	const { k } = board;
	const cap = capOf(board);
	const right = plot.x - (TICK + NUMERAL_GAP) * k;
	const values = powersOfTen(plot.impedanceFrom, plot.impedanceTo);
	const ticks = values.flatMap((value) => [plot.x - TICK * k, yOf(plot, value), plot.x, yOf(plot, value)]);
	const numerals = values.map((value) =>
		lettered(formatQuantity(value, 'resistance', { decimalMark }), right, yOf(plot, value) + cap / 2, {
			cap,
			fill: ink.ink,
			anchor: 'end'
		})
	);
	const symbol = lettered('|Z|', right, plot.y + plot.decade / 2 + 0.7 * cap, {
		cap: 1.4 * cap,
		face: 'bold',
		fill: ink.ink,
		anchor: 'end'
	});
	return [ruled(ticks, penOf(board, 'tick')), ...numerals, symbol];
};

/**
 * Draws border, ticks, numerals and the two symbols.
 * @param board the chart
 * @returns items outside the plot, and its border
 * @example axisItems(board).length
 * Source: sheet design.
 */
export function axisItems(board: Board): Item[] {
	return [
		...frequencyNumerals(board),
		...impedanceNumerals(board),
		rectangle(board.input.plot, { stroke: penOf(board, 'border') })
	];
}
