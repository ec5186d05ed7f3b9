/** What the parts of the chart share: the input, what this sheet may show of it, and the room that is taken. */
import type { Design } from '$lib/design/design';
import type { Finding, Window } from '$lib/rules/finding';
import type { PathData, Stroke, TextItem } from '$lib/scene/scene';
import { simplify } from '$lib/scene/simplify';
import type { ChartInput } from './chart';
import { strokeOf, type Pen } from './ink';
import { fieldOf, placeLabel, type Field, type Label, type Place } from './label';
import { cutAtBoxes, numberAt } from './oriented';
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
	const { design, evaluation, step } = input;
	const all = evaluation?.findings ?? [];
	const findings = step === null ? all : all.slice(0, Math.max(0, step - 1));
	return {
		input,
		k: input.k,
		readAt: lowestFrequency(design),
		findings,
		...decidedOf(input, step === null || step >= all.length + 2),
		zones: zonesOf(findings),
		field: fieldOf(input.plot),
		texts: []
	};
}

const lowestFrequency = (design: Design | null): number | null =>
	design === null ? null : Math.min(...design.switching.map((entry) => entry.frequencyMin_Hz));

const decidedOf = (
	{ design, evaluation }: ChartInput,
	decided: boolean
): Pick<Board, 'windows' | 'choice'> => ({
	windows: decided ? (evaluation?.windows ?? []) : [],
	choice: decided ? (design?.choice.capacitance_F ?? null) : null
});

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
 * Places a label by its whole text, or by its row's number alone where the whole finds no room.
 * @param board the chart
 * @param labels the same label, from its longest text to its shortest
 * @param places where a text may stand
 * @returns true where one of them found a place
 * @example settleFirst(board, [label, { ...label, text: '5.2' }], placesOf)
 * Source: sheet design.
 */
export function settleFirst(
	board: Board,
	labels: readonly Label[],
	places: (label: Label) => Iterable<Place>
): boolean {
	return labels.some((label) => settle(board, label, places(label)));
}

/**
 * Joins segments into one path; a segment that starts where the last one ended goes on with it, so that dashes run on.
 * @param segments x1, y1, x2, y2 of each, one after the other [mm]
 * @returns path data
 * @example segmentsPath([0, 0, 1, 1, 1, 1, 2, 0]).ops // 'MLL'
 * Source: scene format.
 */
export function segmentsPath(segments: readonly number[]): PathData {
	let ops = '';
	const at: number[] = [];
	let [endX, endY] = [NaN, NaN];
	for (let index = 0; index + 3 < segments.length; index += 4) {
		const [x, y] = [numberAt(segments, index), numberAt(segments, index + 1)];
		if (x !== endX || y !== endY) {
			ops += 'M';
			at.push(x, y);
		}
		[endX, endY] = [numberAt(segments, index + 2), numberAt(segments, index + 3)];
		ops += 'L';
		at.push(endX, endY);
	}
	return { ops, at };
}

/** Points of a curve nearer than this to what is drawn are left out [mm]. */
const SMOOTH = 0.02;

/**
 * Joins the segments of a traced curve into one path with no more points than its bends need.
 * @param segments x1, y1, x2, y2 of each, one after the other [mm]
 * @returns path data
 * @example curvePath([0, 0, 1, 0, 1, 0, 2, 0]).at // [0, 0, 2, 0]
 * Source: Douglas and Peucker, through simplify.
 */
export function curvePath(segments: readonly number[]): PathData {
	const { ops, at } = segmentsPath(segments);
	const runs = ops.split('M').slice(1);
	let next = 0;
	const kept = runs.map((run) => {
		const count = 2 * (run.length + 1);
		next += count;
		return simplify(at.slice(next - count, next), SMOOTH);
	});
	return { ops: kept.map((points) => `M${'L'.repeat(points.length / 2 - 1)}`).join(''), at: kept.flat() };
}

/** Segments with the room of all lettering taken out. */
export const clearOfLabels = (board: Board, segments: readonly number[], speck?: number): readonly number[] =>
	cutAtBoxes(segments, board.field.boxes, speck);
