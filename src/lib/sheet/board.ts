/** What the parts of the chart share: the input, what this sheet may show of it, and the room that is taken. */
import type { Finding, Window } from '$lib/rules/finding';
import type { PathData, Stroke, TextItem } from '$lib/scene/scene';
import type { ChartInput } from './chart';
import { strokeOf, type Pen } from './ink';
import { fieldOf, placeLabel, type Field, type Label, type Place } from './label';
import { cutAtBoxes } from './oriented';
import { fallOf } from './plot';
import { zonesOf, type Zone } from './zones';

export interface Board {
	readonly input: ChartInput;
	/** Factor of the paper. */
	readonly k: number;
	/** Lowest switching frequency, where C is read; null on a blank sheet [Hz]. */
	readonly readAt: number | null;
	/** Rules that this sheet shows, in their order. */
	readonly findings: readonly Finding[];
	/** Windows that this sheet shows: none before the last step. */
	readonly windows: readonly Window[];
	/** The choice that this sheet shows [F]. */
	readonly choice: number | null;
	readonly zones: readonly Zone[];
	readonly field: Field;
	readonly texts: TextItem[];
}

/**
 * Prepares the chart of one sheet.
 * @param input the chart's input
 * @returns the board, nothing placed yet
 * @example boardOf({ ...input, step: 1 }).findings // []
 * Source: build-up steps: parts, then rule by rule, then windows and choice.
 */
export function boardOf(input: ChartInput): Board {
	const { design, evaluation, step, plot } = input;
	const all = evaluation?.findings ?? [];
	const decided = step === null || step >= all.length + 2;
	const findings = step === null ? all : all.slice(0, Math.max(0, step - 1));
	const lowest = Math.min(...(design?.switching.map((entry) => entry.frequencyMin_Hz) ?? []));
	return {
		input,
		k: input.k,
		readAt: Number.isFinite(lowest) ? lowest : null,
		findings,
		windows: decided ? (evaluation?.windows ?? []) : [],
		choice: decided ? (design?.choice.capacitance_F ?? null) : null,
		zones: zonesOf(findings),
		field: fieldOf(plot),
		texts: []
	};
}

/** Capital height of all that is read at arm's length [mm]. */
export const capOf = ({ k }: Pick<Board, 'k'>): number => 2.5 * k;

export const penOf = ({ input }: Pick<Board, 'input'>, pen: Pen): Stroke => strokeOf(input.ink, pen, input.k);

export const fallsOf =
	({ input }: Board) =>
	(capacitance: number): number =>
		fallOf(input.plot, capacitance);

/**
 * Places a label on the chart and keeps its text.
 * @param board the chart
 * @param label what to set
 * @param places where it may stand
 * @returns true where it found a place
 * @example settle(board, label, alongSegment(line, { preferred: 0.2, beside: 0 }))
 * Source: sheet design.
 */
export function settle(board: Board, label: Label, places: Iterable<Place>): boolean {
	const placed = placeLabel(board.field, label, places);
	if (placed !== null) board.texts.push(placed.item);
	return placed !== null;
}

/**
 * Joins segments into one path; a segment that starts where the last one ended goes on with it, so that dashes run on.
 * @param segments x1, y1, x2, y2 of each, one after the other [mm]
 * @returns path data
 * @example segmentsPath([0, 0, 1, 1, 1, 1, 2, 0]).ops // 'MLL'
 * Source: scene format.
 */
export function segmentsPath(segments: readonly number[]): PathData {
	const ops: string[] = [];
	const at: number[] = [];
	for (let index = 0; index < segments.length; index += 4) {
		const [x1 = 0, y1 = 0, x2 = 0, y2 = 0] = segments.slice(index, index + 4);
		const joined = index > 0 && at.at(-2) === x1 && at.at(-1) === y1;
		if (!joined) {
			ops.push('M');
			at.push(x1, y1);
		}
		ops.push('L');
		at.push(x2, y2);
	}
	return { ops: ops.join(''), at };
}

/** Segments with the room of all lettering taken out. */
export const clearOfLabels = (board: Board, segments: readonly number[]): readonly number[] =>
	cutAtBoxes(segments, board.field.boxes);
