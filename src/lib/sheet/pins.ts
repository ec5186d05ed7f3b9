/** Notes pinned to the chart: a small numbered flag each; the note itself is listed in the strip. */
import { textWidth } from '$lib/scene/metrics';
import type { Item } from '$lib/scene/scene';
import { capOf, penOf, type Board } from './board';
import { NEVER } from './label';
import { orientedAt, overlapping } from './oriented';
import { lettered, ruled } from './pen';
import { xOf, yOf } from './plot';

/** At k = 1 [mm]. */
const POLE = 5.2;
const CLOTH = 3.9;
const PADDING = 0.8;

/**
 * Plants a numbered flag at each pin inside the plot and keeps lettering off it.
 * @param board the chart
 * @returns poles, cloths and numbers
 * @example pinItems(board).length // 0 without pins
 * Source: sheet design.
 */
export function pinItems(board: Board): Item[] {
	const { plot, design, ink } = board.input;
	const { k } = board;
	const cap = capOf(board);
	return (design?.pins ?? []).flatMap((pin, index): Item[] => {
		const x = xOf(plot, pin.frequency_Hz);
		const y = yOf(plot, pin.impedance_ohm);
		if (x < plot.x || x > plot.x + plot.width || y < plot.y || y > plot.y + plot.height) return [];
		const text = String(index + 1);
		const width = textWidth(text, 'semibold', cap) + 2 * PADDING * k;
		const left = x + width > plot.x + plot.width - 1 ? x - width : x;
		const below = y - POLE * k < plot.y + 1;
		const end = y + (below ? POLE : -POLE) * k;
		const top = below ? end - CLOTH * k : end;
		const box = orientedAt(
			left + width / 2,
			top + (CLOTH * k) / 2,
			[width / 2 + 0.3, (CLOTH * k) / 2 + 0.3],
			0
		);
		if (board.field.boxes.some((other) => overlapping(box, other))) return [];
		board.field.boxes.push(box);
		board.field.columns.push({ from: x, to: x, cost: NEVER / 100 });
		const cloth = [left, top, left + width, top, left + width, top + CLOTH * k, left, top + CLOTH * k];
		return [
			ruled([x, y, x, end], penOf(board, 'tick')),
			{
				type: 'path',
				label: `${text}: ${pin.text}`,
				d: { ops: 'MLLLZ', at: cloth },
				fill: ink.paper,
				stroke: penOf(board, 'switching')
			},
			lettered(text, left + width / 2, top + (CLOTH * k + cap) / 2, {
				cap,
				face: 'semibold',
				fill: ink.ink,
				anchor: 'middle'
			})
		];
	});
}
