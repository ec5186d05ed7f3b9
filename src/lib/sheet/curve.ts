/** Curves over frequency: sources as they are and measurements, traced along the plot and clipped to it. */
import { magnitude } from '$lib/network/complex';
import { covers, impedanceAt, impedanceCurve } from '$lib/network/curve';
import type { Item } from '$lib/scene/scene';
import { capOf, clearOfLabels, penOf, curvePath, settle, type Board } from './board';
import { shorten } from './fitting';
import { ON_LINE, roomOf, type Label, type Place } from './label';
import { keepInside } from './oriented';
import { frequencyAt, xOf, yOf, type Plot } from './plot';

/** Between the points of a traced curve [mm]. */
const STEP = 1.25;

const joinPoints = (points: readonly (readonly [number, number] | null)[]): number[] => {
	const segments: number[] = [];
	for (const [index, point] of points.slice(1).entries()) {
		const before = points[index];
		if (point !== null && before !== null && before !== undefined) segments.push(...before, ...point);
	}
	return segments;
};

/**
 * Traces |Z| over the plot's frequencies.
 * @param plot axes
 * @param size |Z| at a frequency [Ω], null where there is none
 * @returns segments inside the plot, one after the other [mm]
 * @example traced(plot, () => 50).every(Number.isFinite) // true
 * Source: sampling at equal steps of log f.
 */
export function traced(plot: Plot, size: (frequency: number) => number | null): number[] {
	const count = Math.ceil(plot.width / STEP);
	const points = Array.from({ length: count + 1 }, (_, index) => {
		const x = plot.x + (plot.width * index) / count;
		const value = size(frequencyAt(plot, x));
		return value === null || !(value > 0) || !Number.isFinite(value)
			? null
			: ([x, yOf(plot, value)] as const);
	});
	return keepInside(joinPoints(points), plot);
}

/** How far a curve may leave the middle of its lettering [mm]. */
const BEND = 0.6;

const interpolated = (segments: readonly number[], index: number): Place | null => {
	const [x1, y1, x2, y2] = segments.slice(4 * index, 4 * index + 4);
	if (x1 === undefined || y1 === undefined || x2 === undefined || y2 === undefined) return null;
	return { x: (x1 + x2) / 2, y: (y1 + y2) / 2, angle: 0, cost: 0 };
};

/** The middle of a piece of curve, turned with its chord; null where the piece is bent or broken. */
const chordPlace = (segments: readonly number[], middle: number, half: number): Place | null => {
	const centre = interpolated(segments, middle);
	if (centre === null) return null;
	const reach = Math.max(1, Math.round(half / STEP));
	const before = interpolated(segments, middle - reach);
	const after = interpolated(segments, middle + reach);
	if (before === null || after === null || middle < reach) return null;
	const length = Math.hypot(after.x - before.x, after.y - before.y);
	if (length > 3 * half) return null;
	const sin = (after.y - before.y) / length;
	const cos = (after.x - before.x) / length;
	const off = Math.abs((centre.x - before.x) * sin - (centre.y - before.y) * cos);
	return off > BEND ? null : { ...centre, angle: (Math.asin(sin) * 180) / Math.PI };
};

/** Cost of standing beside the curve instead of on it. */
const BESIDE_COST = 12;

/**
 * Lists the places of a traced curve where it is straight enough for a label, nearest to the preferred one first: on
 * the curve, then below and above it.
 * @param segments the curve [mm]
 * @param label what is to stand on it
 * @param preferred part of the curve's length, 0 … 1
 * @yields places turned with the curve
 * @example [...tracePlaces(segments, label, 0.8)].length
 * Source: sheet design.
 */
export function* tracePlaces(
	segments: readonly number[],
	label: Label,
	preferred: number
): Generator<Place, void, undefined> {
	const count = segments.length / 4;
	const [half, across] = roomOf(label);
	const straight: Place[] = [];
	for (let step = 0; step <= 2 * count; step += 1) {
		const away = Math.ceil(step / 2);
		const index = Math.round(preferred * count) + (step % 2 === 0 ? -away : away);
		const place = index < 0 || index >= count ? null : chordPlace(segments, index, half);
		if (place === null) continue;
		straight.push({ ...place, cost: (10 * away) / count });
		yield { ...place, cost: (10 * away) / count };
	}
	for (const place of straight) {
		const turn = (place.angle * Math.PI) / 180;
		for (const beside of [across + BEND, -across - BEND]) {
			const [dx, dy] = [-beside * Math.sin(turn), beside * Math.cos(turn)];
			yield { ...place, x: place.x + dx, y: place.y + dy, cost: BESIDE_COST + place.cost };
		}
	}
}

export interface MeasuredLine {
	readonly label: string;
	readonly segments: readonly number[];
}

/** A file name on the chart is cut to this at k = 1 [mm]. */
const NAME_WIDTH = 40;

/**
 * Lays the measured curves over the chart: |Z| through their own points.
 * @param board the chart
 * @returns one line per curve that meets the plot
 * @example settleMeasured(board).length // 0 where the design has none
 * Source: the measurements' own files.
 */
export function settleMeasured(board: Board): MeasuredLine[] {
	const { design, plot, ink } = board.input;
	return (design?.curves ?? []).flatMap((curve) => {
		const points = curve.frequency_Hz.map((frequency, index) => {
			const size = Math.hypot(curve.real_ohm[index] ?? 0, curve.imaginary_ohm[index] ?? 0);
			return size > 0 ? ([xOf(plot, frequency), yOf(plot, size)] as const) : null;
		});
		const segments = keepInside(joinPoints(points), plot);
		if (segments.length === 0) return [];
		const ready = impedanceCurve(curve);
		const even = traced(plot, (frequency) =>
			covers(ready, frequency) ? magnitude(impedanceAt(ready, frequency)) : null
		);
		const cap = capOf(board);
		const text = shorten(curve.fileName, { width: NAME_WIDTH * board.k, cap });
		const label: Label = { text, cap, face: 'regular', fill: ink.graphite };
		settle(board, label, tracePlaces(even, label, 0.7));
		board.field.curves.push({ segments, cost: ON_LINE });
		return [{ label: `${curve.label}, ${curve.fileName}`, segments }];
	});
}

/**
 * Draws the measured curves, broken at lettering.
 * @param board the chart, all labels placed
 * @param lines what settleMeasured gave
 * @returns one path per curve
 * @example measuredItems(board, settleMeasured(board)).length
 * Source: sheet design.
 */
export function measuredItems(board: Board, lines: readonly MeasuredLine[]): Item[] {
	return lines.map(({ label, segments }) => ({
		type: 'path',
		label,
		d: curvePath(clearOfLabels(board, segments)),
		stroke: { ...penOf(board, 'curve'), join: 'round' }
	}));
}
