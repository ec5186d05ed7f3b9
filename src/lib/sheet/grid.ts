/** The reactance grid: decades, their halves by 2 and 5, and the lines between, level and upright. */
import type { Item } from '$lib/scene/scene';
import { clearOfLabels, penOf, segmentsPath, type Board } from './board';
import type { Pen } from './ink';
import { xOf, yOf } from './plot';

type Weight = 'gridDecade' | 'gridMiddle' | 'gridFine';

const weightOf = (mantissa: number): Weight => {
	if (mantissa === 1) return 'gridDecade';
	return mantissa === 2 || mantissa === 5 ? 'gridMiddle' : 'gridFine';
};

/** Borders are drawn by the frame of the plot. */
const inner = (value: number, from: number, to: number): boolean =>
	value > from * (1 + 1e-9) && value < to * (1 - 1e-9);

/**
 * Lists the lines of a logarithmic grid strictly between two values.
 * @param from lower end, > 0
 * @param to upper end
 * @returns value and weight of each, rising
 * @example gridValues(1, 10).map(({ value }) => value) // [2, 3, 4, 5, 6, 7, 8, 9]
 * Source: common practice, log-log paper.
 */
export function gridValues(from: number, to: number): { readonly value: number; readonly weight: Weight }[] {
	const values: { value: number; weight: Weight }[] = [];
	const last = Math.ceil(Math.log10(to) - 1e-9);
	for (let exponent = Math.floor(Math.log10(from) + 1e-9); exponent < last; exponent += 1) {
		for (let mantissa = 1; mantissa <= 9; mantissa += 1) {
			const value = Number(`${String(mantissa)}e${String(exponent)}`);
			if (inner(value, from, to)) values.push({ value, weight: weightOf(mantissa) });
		}
	}
	return values;
}

/**
 * Draws the grid, interrupted by lettering.
 * @param board the chart, labels placed
 * @returns one path per weight
 * @example gridItems(board).length // 3
 * Source: common practice, log-log paper.
 */
export function gridItems(board: Board): Item[] {
	const { plot } = board.input;
	const lines: Record<Weight, number[]> = { gridFine: [], gridMiddle: [], gridDecade: [] };
	for (const { value, weight } of gridValues(plot.frequencyFrom, plot.frequencyTo)) {
		const x = xOf(plot, value);
		lines[weight].push(x, plot.y, x, plot.y + plot.height);
	}
	for (const { value, weight } of gridValues(plot.impedanceFrom, plot.impedanceTo)) {
		const y = yOf(plot, value);
		lines[weight].push(plot.x, y, plot.x + plot.width, y);
	}
	return (Object.keys(lines) as (Weight & Pen)[])
		.map((weight) => [weight, clearOfLabels(board, lines[weight])] as const)
		.filter(([, segments]) => segments.length > 0)
		.map(([weight, segments]) => ({
			type: 'path',
			role: 'grid',
			d: segmentsPath(segments),
			stroke: penOf(board, weight)
		}));
}
