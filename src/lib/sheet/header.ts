/** The switching frequencies: bands down the chart, their values and harmonics above it. */
import type { Switching } from '$lib/design/design';
import { formatQuantity } from '$lib/quantity/format';
import { textWidth } from '$lib/scene/metrics';
import type { Item } from '$lib/scene/scene';
import { capOf, penOf, type Board } from './board';
import { joinRange } from './edge';
import { NEVER } from './label';
import { lettered, rectangle, ruled } from './pen';
import { xOf } from './plot';

/** Above the plot at k = 1: baseline of the row, lower where no numerals stand between [mm]. */
const ROW = 2.6;
const ROW_ABOVE_NUMERALS = 5.6;
const ELBOW = 1.2;
const GAP = 1;

const rowHeight = (board: Board): number => (board.input.pane === null ? ROW : ROW_ABOVE_NUMERALS) * board.k;

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

/** Symbol with its index, and the value where there is room for it; null where even the symbol finds none. */
const headingOf = (board: Board, entry: Switching, taken: readonly Taken[]): Heading | null => {
	const { plot, ink, design } = board.input;
	const { k } = board;
	const x = xOf(plot, Math.sqrt(entry.frequencyMin_Hz * entry.frequencyMax_Hz));
	const index =
		(design?.switching.length ?? 1) > 1 ? String(1 + (design?.switching.indexOf(entry) ?? 0)) : '';
	const sub = `sw${index}`;
	const caps = { symbol: 3.5 * k, sub: 2.5 * k };
	const symbolWidth = textWidth('f', 'bold', caps.symbol);
	const subWidth = textWidth(sub, 'semibold', caps.sub);
	const y = plot.y - rowHeight(board);
	for (const value of [valueOf(board, entry), '']) {
		const valueWidth = value === '' ? 0 : textWidth(value, 'bold', caps.symbol) + 1.6 * k;
		const width = symbolWidth + 0.3 * k + subWidth + valueWidth;
		for (const left of [x - ELBOW * k - 0.8 * k - width, x + (ELBOW + 0.8) * k]) {
			const span = { from: left, to: left + width };
			if (left < plot.x - 12 * k || span.to > plot.x + plot.width || !free(taken, span)) continue;
			const style = { fill: ink.ink, face: 'bold' } as const;
			const elbow = left < x ? x - ELBOW * k : x + ELBOW * k;
			const level = y - 1.25 * k;
			return {
				taken: { from: Math.min(left, x), to: Math.max(span.to, x) },
				items: [
					ruled([elbow, level, x, level, x, level, x, plot.y], penOf(board, 'switching')),
					lettered('f', left, y, { ...style, cap: caps.symbol }),
					lettered(sub, left + symbolWidth + 0.3 * k, y + 0.75 * k, {
						...style,
						face: 'semibold',
						cap: caps.sub
					}),
					...(value === ''
						? []
						: [lettered(value, span.to - valueWidth + 1.6 * k, y, { ...style, cap: caps.symbol })])
				]
			};
		}
	}
	return null;
};

const harmonicTicks = (board: Board, entry: Switching, taken: Taken[]): Item[] => {
	const { plot, ink } = board.input;
	const { k } = board;
	const cap = capOf(board);
	const centre = Math.sqrt(entry.frequencyMin_Hz * entry.frequencyMax_Hz);
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
		inside(board, xOf(board.input.plot, Math.sqrt(entry.frequencyMin_Hz * entry.frequencyMax_Hz)))
	);
	const taken: Taken[] = [];
	const headings = entries.flatMap((entry) => {
		const heading = headingOf(board, entry, taken);
		if (heading === null) return [];
		taken.push(heading.taken);
		return [...heading.items];
	});
	return [...headings, ...entries.flatMap((entry) => harmonicTicks(board, entry, taken))];
}
