/** The lines of the parts already fixed: L, C, and the sources as they are (networks and measurements by their curve). */
import type { ImpedanceSource, Source } from '$lib/design/design';
import { magnitude } from '$lib/network/complex';
import { covers } from '$lib/network/curve';
import { asymptoticInductance, sourceImpedance } from '$lib/network/source';
import { formatQuantity } from '$lib/quantity/format';
import { sourceModel } from '$lib/rules/circuit';
import type { Item } from '$lib/scene/scene';
import { capOf, clearOfLabels, penOf, curvePath, settleFirst, type Board } from './board';
import { tracePlaces, traced } from './curve';
import { shorten } from './fitting';
import type { Pen } from './ink';
import { alongSegment, ON_LINE, type Label } from './label';
import { capacitanceLine, fallOf, inductanceLine, riseOf, type Segment } from './plot';

/** A line of a part as it will be drawn. */
export interface PartLine {
	readonly of: string;
	readonly label: string;
	readonly pen: Pen;
	readonly segments: readonly number[];
}

/** Half of the room that a line of a part takes across [mm]. */
const HALF_ROOM = 0.4;
/** A source's name on the chart is cut to this at k = 1 [mm]. */
const NAME_WIDTH = 34;

const componentLabel = (board: Board, text: string, fill: string, of: string): Label => ({
	text,
	cap: 3.5 * board.k,
	face: 'semibold',
	fill,
	of
});

const inductorLine = (board: Board): PartLine[] => {
	const { plot, design, ink, decimalMark } = board.input;
	if (design === null) return [];
	const inductance = design.inductor.inductance_H;
	const line = inductanceLine(plot, inductance);
	if (line === null) return [];
	const rise = riseOf(plot, inductance);
	const text = `L ${formatQuantity(inductance, 'inductance', { decimalMark })}`;
	const label = componentLabel(board, text, ink.inductance, 'inductor');
	settleFirst(board, [label, shortOf(label)], () => alongSegment(line, { preferred: 0.14, beside: 0 }));
	board.field.rises.push({ from: rise - HALF_ROOM, to: rise + HALF_ROOM, cost: ON_LINE });
	return [{ of: 'inductor', label: text, pen: 'inductor', segments: line }];
};

const capacitorLine = (board: Board): PartLine[] => {
	const { plot, design, ink, decimalMark } = board.input;
	if (design === null) return [];
	const capacitance = design.capacitor.capacitance_F;
	const line = capacitanceLine(plot, capacitance);
	if (line === null) return [];
	const fall = fallOf(plot, capacitance);
	const text = `C ${formatQuantity(capacitance, 'capacitance', { decimalMark })}`;
	const label = componentLabel(board, text, ink.capacitance, 'capacitor');
	settleFirst(board, [label, shortOf(label)], () => alongSegment(line, { preferred: 0.45, beside: 0 }));
	board.field.falls.push({ from: fall - HALF_ROOM, to: fall + HALF_ROOM, cost: ON_LINE });
	return [{ of: 'capacitor', label: text, pen: 'capacitor', segments: line }];
};

const sourceLabel = (board: Board, source: Source, tail: string): Label => {
	const cap = capOf(board);
	const row = 1 + (board.input.design?.sources.indexOf(source) ?? 0);
	const name = shorten(source.label, { width: NAME_WIDTH * board.k, cap, face: 'semibold' });
	return {
		text: `4.${String(row)} ${name}${tail === '' ? '' : ` ${tail}`}`,
		cap,
		face: 'semibold',
		fill: board.input.ink.source,
		of: `source:${source.id}`
	};
};

/** Symbol or row number alone. */
const shortOf = (label: Label): Label => ({ ...label, text: label.text.split(' ')[0] ?? '' });

const networkTail = (source: Source): string => {
	if (source.kind === 'measured' || source.kind === 'impedance') return '';
	const value = formatQuantity(asymptoticInductance({ kind: source.kind, networks: 1 }), 'inductance');
	return source.networks === 1 ? value : `${String(source.networks)} × ${value}`;
};

const sourceCurve = (board: Board, source: Source, pen: Pen): PartLine[] => {
	const { design, plot } = board.input;
	if (design === null) return [];
	const model = sourceModel(design, source);
	const size = (frequency: number): number | null =>
		model.kind === 'measured' && !covers(model.curve, frequency)
			? null
			: magnitude(sourceImpedance(model, frequency));
	const segments = traced(plot, size);
	if (segments.length === 0) return [];
	const label = sourceLabel(board, source, networkTail(source));
	settleFirst(board, [label, shortOf(label)], (text) => tracePlaces(segments, text, 0.85));
	board.field.curves.push({ segments, cost: ON_LINE });
	return [{ of: `source:${source.id}`, label: label.text, pen, segments }];
};

const sourceRange = (board: Board, source: ImpedanceSource, pen: Pen): PartLine[] => {
	const { plot, decimalMark } = board.input;
	const ends = [...new Set([source.inductanceMin_H, source.inductanceMax_H])].filter((value) => value > 0);
	return ends.flatMap((inductance): PartLine[] => {
		const line: Segment | null = inductanceLine(plot, inductance);
		if (line === null) return [];
		const rise = riseOf(plot, inductance);
		const tail = formatQuantity(inductance, 'inductance', { decimalMark });
		const label = sourceLabel(board, source, tail);
		settleFirst(board, [label, shortOf(label)], () => alongSegment(line, { preferred: 0.84, beside: 0 }));
		board.field.rises.push({ from: rise - HALF_ROOM, to: rise + HALF_ROOM, cost: ON_LINE });
		return [{ of: `source:${source.id}`, label: label.text, pen, segments: line }];
	});
};

/**
 * Places the names of the parts and gives their lines.
 * @param board the chart; windows, choice and switching band reserved
 * @returns L, C, then the sources in order
 * @example settleParts(board)[0]?.of // 'inductor'
 * Source: 2π f L, 1/(2π f C); networks by their exact |Z|, other sources by the asymptote of Ls.
 */
export function settleParts(board: Board): PartLine[] {
	const sources = board.input.design?.sources ?? [];
	const parts = [...inductorLine(board), ...capacitorLine(board)];
	const drawn = sources.flatMap((source, index) => {
		const pen: Pen = index === 0 ? 'source' : 'sourceRange';
		return source.kind === 'impedance' ? sourceRange(board, source, pen) : sourceCurve(board, source, pen);
	});
	return [...parts, ...drawn];
}

/**
 * Draws the lines of the parts, broken at lettering.
 * @param board the chart, all labels placed
 * @param lines what settleParts gave
 * @returns one path per line
 * @example partItems(board, settleParts(board))[0]?.role // 'component-line'
 * Source: sheet design.
 */
export function partItems(board: Board, lines: readonly PartLine[]): Item[] {
	return lines
		.map((line) => ({ ...line, segments: clearOfLabels(board, line.segments) }))
		.filter(({ segments }) => segments.length > 0)
		.map(({ of, label, pen, segments }) => ({
			type: 'path',
			role: 'component-line',
			of,
			label,
			d: curvePath(segments),
			stroke: penOf(board, pen)
		}));
}
