/** Forbidden capacitances: the union hatched once by its strongest class, and each rule's own edges with its name. */
import { fill } from './words';
import type { Finding } from '$lib/rules/finding';
import { closesWindows } from '$lib/rules/windows';
import { uniteOpen } from '$lib/quantity/interval';
import type { Item } from '$lib/scene/scene';
import { edgePen, ruleNumber, type Edge } from './band-edge';
import { clearOfLabels, fallsOf, penOf, segmentsPath, type Board } from './board';
import { dotCentres, dotPath, dotRadius, HATCH_SPECK, hatchLines } from './hatch';
import type { Pen } from './ink';
import { capacitanceLine } from './plot';
import { fallStrip, polygonPath } from './polygon';
import { group } from './pen';
import { stripsOf, type Strip } from './zones';

const hatchOf = (board: Board, strips: readonly Strip[]): number[] => {
	const { plot } = board.input;
	const lines: number[] = [];
	for (const strip of strips) {
		const polygon = fallStrip(plot, strip.from, strip.to);
		if (polygon.length === 0) continue;
		for (const value of hatchLines(polygon, strip.class, strip.density, board.k)) lines.push(value);
	}
	return lines;
};

/** Deep of the fringe on an edge that closes no window, at k = 1 [mm]. */
const FRINGE = 1.6;

const fringeOf = (board: Board, edges: readonly Edge[], strips: readonly Strip[]): number[] => {
	const fall = fallsOf(board);
	const deep = FRINGE * board.k * Math.SQRT2;
	return edges.flatMap((edge) => {
		const at = fall(edge.capacitance);
		const [from, to] = edge.forbids === 'larger' ? [at, at + deep] : [at - deep, at];
		const middle = (from + to) / 2;
		const inBank = strips.some(
			(strip) => strip.density === 'bank' && strip.from < middle && middle < strip.to
		);
		const polygon = inBank ? [] : fallStrip(board.input.plot, from, to);
		if (polygon.length === 0 || edge.finding.class === 'advisory') return [];
		return hatchLines(polygon, edge.finding.class, 'fringe', board.k);
	});
};

const hatchPath = (board: Board, segments: readonly number[], pen: Pen): Item[] => {
	const clear = clearOfLabels(board, segments, HATCH_SPECK * board.k);
	return clear.length === 0 ? [] : [{ type: 'path', d: segmentsPath(clear), stroke: penOf(board, pen) }];
};

/**
 * Draws the union's hatch: banks, fields and fringes, broken at lettering.
 * @param board the chart, all labels placed
 * @param edges what settleEdges gave
 * @returns one group
 * @example hatchItems(board, edges)[0]?.role // 'band'
 * Source: sheet design, hatch.
 */
export function hatchItems(board: Board, edges: readonly Edge[]): Item[] {
	const strips = stripsOf(board.zones, fallsOf(board), board.k);
	const bare = edges.filter((edge) => !edge.limiting && closesWindows(edge.finding));
	const items = (['mandatory', 'design'] as const).flatMap((ruleClass) => {
		const own = strips.filter((strip) => strip.class === ruleClass);
		const inBank = own.filter(({ density }) => density === 'bank');
		const inField = own.filter(({ density }) => density === 'field');
		const fringed = bare.filter(({ finding }) => finding.class === ruleClass);
		return [
			...hatchPath(board, hatchOf(board, inField), `${ruleClass}Field`),
			...hatchPath(board, hatchOf(board, inBank), `${ruleClass}Bank`),
			...hatchPath(board, fringeOf(board, fringed, strips), `${ruleClass}Bank`)
		];
	});
	return items.length === 0 ? [] : [group(items, { role: 'band' })];
}

/** Deep of the dense dots beside the ends of an advisory piece, at k = 1, square to them [mm]. */
const DOTTED_DEPTH = 5;

/** The advisory band's pieces inside what is left, as y − x: elsewhere something stronger forbids already. */
const advisedSpans = (board: Board, finding: Finding): (readonly [number, number])[] => {
	const fall = fallsOf(board);
	return uniteOpen(finding.bands).flatMap((band) =>
		board.zones
			.filter((zone) => zone.class === null)
			.map((zone) => [Math.max(zone.from, band.from), Math.min(zone.to, band.to)] as const)
			.filter(([from, to]) => from < to)
			.map(([from, to]) => [fall(from), fall(to)] as const)
	);
};

const dotsOf = (board: Board, [from, to]: readonly [number, number]): number[] => {
	const { plot } = board.input;
	const deep = DOTTED_DEPTH * board.k * Math.SQRT2;
	const dots = (start: number, end: number, density: 'bank' | 'field'): number[] => {
		const polygon = start < end ? fallStrip(plot, start, end) : [];
		return polygon.length === 0 ? [] : dotCentres(polygon, board.k, density);
	};
	if (to - from < 2 * deep) return dots(from, to, 'bank');
	return [
		...dots(from, from + deep, 'bank'),
		...dots(from > -Infinity ? from + deep : from, to < Infinity ? to - deep : to, 'field'),
		...dots(to - deep, to, 'bank')
	];
};

const clearDots = (board: Board, centres: readonly number[]): number[] => {
	const clear: number[] = [];
	for (let index = 0; index < centres.length; index += 2) {
		const x = centres[index] ?? 0;
		const y = centres[index + 1] ?? 0;
		const covered = board.field.boxes.some(
			(box) =>
				Math.abs((x - box.x) * box.cos + (y - box.y) * box.sin) < box.along + dotRadius(board.k) &&
				Math.abs((y - box.y) * box.cos - (x - box.x) * box.sin) < box.across + dotRadius(board.k)
		);
		if (!covered) clear.push(x, y);
	}
	return clear;
};

const dotItems = (board: Board, finding: Finding): Item[] => {
	if (closesWindows(finding)) return [];
	const centres = clearDots(
		board,
		advisedSpans(board, finding).flatMap((span) => dotsOf(board, span))
	);
	if (centres.length === 0) return [];
	const stroke = { colour: board.input.ink.advisory, width: 2 * dotRadius(board.k), cap: 'round' } as const;
	return [{ type: 'path', d: dotPath(centres), stroke }];
};

const thumbLines = (board: Board, finding: Finding): Item[] =>
	(finding.thumbEdges ?? []).flatMap(({ capacitance }): Item[] => {
		const line = capacitanceLine(board.input.plot, capacitance);
		const clear = line === null ? [] : clearOfLabels(board, line);
		if (clear.length === 0) return [];
		const label = board.input.words.chart.thumb;
		return [{ type: 'path', label, d: segmentsPath(clear), stroke: penOf(board, 'thumbEdge') }];
	});

/** Without a visible edge the band's room itself, unpainted, still tells a reader where it lies. */
const bandRoom = (board: Board, finding: Finding): Item[] => {
	const fall = fallsOf(board);
	return finding.bands
		.map(({ from, to }) => fallStrip(board.input.plot, fall(from), fall(to)))
		.filter((polygon) => polygon.length > 0)
		.map((polygon) => ({ type: 'path', role: 'band', of: finding.rule, d: polygonPath(polygon) }));
};

const bandLabel = (board: Board, finding: Finding): string =>
	fill('{number} {name} ({class})', {
		number: ruleNumber(board, finding.rule),
		name: board.input.words.rule[finding.kind],
		class: board.input.words.class[finding.class]
	});

/**
 * Draws each rule's own edges, its advisory dots and its rule of thumb.
 * @param board the chart, all labels placed
 * @param edges what settleEdges gave
 * @returns one group per rule that forbids something
 * @example edgeItems(board, edges)[0]?.of // 'share'
 * Source: sheet design.
 */
export function edgeItems(board: Board, edges: readonly Edge[]): Item[] {
	return board.findings.flatMap((finding) => {
		if (finding.bands.length === 0) return [];
		const mark = { role: 'band', of: finding.rule } as const;
		const lines = edges
			.filter((edge) => edge.finding === finding)
			.flatMap((edge): Item[] => {
				const line = capacitanceLine(board.input.plot, edge.capacitance);
				if (line === null) return [];
				const clear = edge.limiting ? line : clearOfLabels(board, line);
				return clear.length === 0
					? []
					: [{ type: 'path', ...mark, d: segmentsPath(clear), stroke: penOf(board, edgePen(edge)) }];
			});
		const shown = lines.length > 0 ? lines : bandRoom(board, finding);
		const items = [...shown, ...dotItems(board, finding), ...thumbLines(board, finding)];
		return items.length === 0 ? [] : [group(items, { ...mark, label: bandLabel(board, finding) })];
	});
}
