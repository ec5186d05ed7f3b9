/** A window that looks inviting although every value in it makes a line worse says so at the window itself. */
import type { Window } from '$lib/rules/finding';
import { capOf, settle, type Board } from './board';
import { worstHarm, type Harm } from './benefit-curve';
import { fixed, formatEdge } from './edge';
import { alongSegment, roomOf, type Label } from './label';
import { capacitanceLine } from './plot';

/** A value that stands for the whole window: its target, or the edge it has. */
const standIn = ({ from, to, target }: Window): number | null => {
	if (target !== null) return target;
	if (from > 0 && to < Infinity) return Math.sqrt(from * to);
	if (from > 0) return from;
	return to < Infinity ? to : null;
};

/** At the candidates where there are any, since only they can be chosen: the least harm that one can have. */
const harmOf = (board: Board, window: Window, index: number): Harm | null => {
	const { design, evaluation } = board.input;
	if (design === null || evaluation === null) return null;
	const candidates = evaluation.candidates.filter((candidate) => candidate.window === index);
	const value = standIn(window);
	const values = candidates.length > 0 ? candidates.map(({ capacitance }) => capacitance) : [value];
	const harms = values.map((entry) => (entry === null ? null : worstHarm(design, entry)));
	if (harms.some((harm) => harm === null)) return null;
	return harms.reduce(
		(least, harm) => (least === null || (harm?.gain ?? 0) > least.gain ? harm : least),
		null
	);
};

const textOf = ({ input }: Board, harm: Harm): string => {
	const gain = `${fixed(harm.gain, 1, input.decimalMark)}\u00a0dB`;
	const frequency = formatEdge(harm.frequency, 'nearest', input.decimalMark, 'frequency');
	return `${input.words.chart.harmful} ${gain}, ${frequency}`;
};

const settleHarm = (board: Board, window: Window, index: number): void => {
	const { plot, ink } = board.input;
	const harm = harmOf(board, window, index);
	if (harm === null) return;
	const label: Label = {
		text: textOf(board, harm),
		cap: capOf(board),
		face: 'semibold',
		fill: ink.mandatory,
		of: String(index)
	};
	const away = roomOf(label)[1] + 0.5 * board.k;
	for (const [edge, beside] of [
		[window.from, -away],
		[window.to, away]
	] as const) {
		const line = edge > 0 && edge < Infinity ? capacitanceLine(plot, edge) : null;
		if (line !== null && settle(board, label, alongSegment(line, { preferred: 0.6, beside }))) return;
	}
};

/**
 * Sets the warning beside each window that harms and does not hold the choice.
 * @param board the chart; windows reserved
 * @example settleHarms(board)
 * Source: nodal analysis of the ladder.
 */
export function settleHarms(board: Board): void {
	for (const [index, window] of board.windows.entries()) {
		const chosen = board.choice !== null && board.choice >= window.from && board.choice <= window.to;
		if (!chosen && !window.degenerate) settleHarm(board, window, index);
	}
}
