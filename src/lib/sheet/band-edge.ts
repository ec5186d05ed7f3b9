/** The edges of every rule's bands, and the rules' names beside them. */
import type { Band, Finding } from '$lib/rules/finding';
import { closesWindows } from '$lib/rules/windows';
import { uniteOpen, type Interval } from '$lib/quantity/interval';
import { capOf, fallsOf, settleFirst, type Board } from './board';
import type { Pen } from './ink';
import { alongSegment, ON_LINE, roomOf, type Label } from './label';
import { capacitanceLine } from './plot';

export interface Edge {
	readonly finding: Finding;
	readonly capacitance: number;
	/** Whether the rule forbids what is larger or what is smaller. */
	readonly forbids: 'larger' | 'smaller';
	/** Whether it borders what is left. */
	readonly limiting: boolean;
	/** Harmonics n ≥ 2 that alone make this band; empty where the fundamental has a part in it. */
	readonly harmonics: readonly number[];
}

const harmonicsOf = (bands: readonly Band[], united: Interval): number[] => {
	const inside = bands.filter(({ from, to }) => from >= united.from && to <= united.to);
	const orders = inside.map(({ harmonic }) => harmonic ?? 1);
	return orders.includes(1) ? [] : [...new Set(orders)].sort((a, b) => a - b);
};

const limits = (board: Board, value: number): boolean =>
	board.zones.some((zone) => zone.class === null && (zone.from === value || zone.to === value));

/**
 * Lists the edges of every rule's united bands.
 * @param board the chart
 * @returns limiting edges first, else in the order of the rules
 * @example edgesOf(board)[0]?.limiting // true
 * Source: union of open intervals.
 */
export function edgesOf(board: Board): Edge[] {
	const edges = board.findings.flatMap((finding) =>
		uniteOpen(finding.bands).flatMap(({ from, to }): Edge[] => {
			const harmonics = harmonicsOf(finding.bands, { from, to });
			const closes = closesWindows(finding);
			return [
				{ finding, capacitance: from, forbids: 'larger', limiting: closes && limits(board, from), harmonics },
				{ finding, capacitance: to, forbids: 'smaller', limiting: closes && limits(board, to), harmonics }
			];
		})
	);
	const inside = edges.filter(({ capacitance }) => capacitance > 0 && capacitance < Infinity);
	return [...inside.filter(({ limiting }) => limiting), ...inside.filter(({ limiting }) => !limiting)];
}

/**
 * Gives the number of a rule's row in the strip.
 * @param board the chart
 * @param rule its id
 * @returns e.g. '5.2'
 * @example ruleNumber(board, 'guard') // '5.2'
 * Source: sheet design.
 */
export function ruleNumber(board: Pick<Board, 'input'>, rule: string): string {
	const index = board.input.design?.rules.findIndex(({ id }) => id === rule) ?? -1;
	return `5.${String(index + 1)}`;
}

/**
 * Gives the pen of an edge: strongest where it borders what is left.
 * @param edge the edge
 * @returns pen
 * @example edgePen({ ...edge, limiting: true }) // 'windowEdge'
 * Source: sheet design.
 */
export const edgePen = ({ finding, limiting }: Edge): Pen => {
	if (limiting) return 'windowEdge';
	if (!closesWindows(finding)) return 'advisoryEdge';
	return finding.class === 'mandatory' ? 'mandatoryEdge' : 'designEdge';
};

const edgeText = (board: Board, { finding, harmonics }: Edge): string => {
	const number = ruleNumber(board, finding.rule);
	if (harmonics.length > 0) return `${number} n = ${harmonics.join(', ')}`;
	return `${number} ${board.input.words.rule[finding.kind]}`;
};

/** Between an edge and the room of its name at k = 1; above the line the room reaches down to the descenders [mm]. */
const BESIDE = { larger: 0.2, smaller: 0.45 } as const;

const settleEdgeName = (board: Board, edge: Edge): void => {
	const line = capacitanceLine(board.input.plot, edge.capacitance);
	if (line === null) return;
	const { ink } = board.input;
	const label: Label = {
		text: edgeText(board, edge),
		cap: capOf(board),
		face: edge.limiting ? 'semibold' : 'regular',
		fill: edge.finding.class === 'mandatory' ? ink.mandatory : ink.ink,
		of: edge.finding.rule
	};
	const away = roomOf(label)[1] + BESIDE[edge.forbids] * board.k;
	const beside = edge.forbids === 'larger' ? away : -away;
	const preferred = edge.forbids === 'larger' ? 0.3 : 0.25;
	const short = { ...label, text: ruleNumber(board, edge.finding.rule) };
	settleFirst(board, [label, short], () => alongSegment(line, { preferred, beside }));
};

/** Half of the room of an edge across [mm]. */
const HALF_ROOM = 0.25;

/**
 * Places the rules' names beside their edges, on the forbidden side, and gives the edges.
 * @param board the chart; parts placed
 * @returns every edge, limiting ones first
 * @example settleEdges(board).length
 * Source: sheet design.
 */
export function settleEdges(board: Board): Edge[] {
	const edges = edgesOf(board);
	const fall = fallsOf(board);
	for (const { capacitance } of edges) {
		const at = fall(capacitance);
		board.field.falls.push({ from: at - HALF_ROOM, to: at + HALF_ROOM, cost: ON_LINE });
	}
	for (const edge of edges) settleEdgeName(board, edge);
	return edges;
}
