/** A window that looks inviting although every value in it makes a line worse says so at the window itself. */
import type { Window } from '$lib/rules/finding';
import { capOf, settle, type Board } from './board';
import type { Harm } from './benefit-curve';
import { fixed, formatEdge } from './edge';
import { alongSegment, roomOf, type Label } from './label';
import { capacitanceLine } from './plot';
import { windowHarm } from './window-harm';

const textOf = ({ input }: Board, harm: Harm): string => {
	const gain = `${fixed(harm.gain, 1, input.decimalMark)}\u00a0dB`;
	const frequency = formatEdge(harm.frequency, 'nearest', input.decimalMark, 'frequency');
	return `${input.words.chart.harmful} ${gain}, ${frequency}`;
};

const settleHarm = (board: Board, window: Window, index: number): void => {
	const { plot, ink } = board.input;
	const { design, evaluation } = board.input;
	if (design === null || evaluation === null) return;
	const harm = windowHarm(design, evaluation, index);
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
