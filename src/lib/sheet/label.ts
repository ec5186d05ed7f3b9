/**
 * Where lettering stands in the chart. Each label tries the places of its track in the order of their own cost; what it
 * would touch adds to it. The cheapest place wins; the same design always gives the same places.
 */
import type { Face, TextItem } from '$lib/scene/scene';
import { textWidth } from '$lib/scene/metrics';
import { crosses, orientedAt, overlapping, type Oriented } from './oriented';
import type { Segment } from './plot';
import type { Box } from './paper';

/** A range of y − x, y + x or x that a label should keep clear of [mm]. */
export interface Obstacle {
	readonly from: number;
	readonly to: number;
	readonly cost: number;
}

/** What stands in a field already; labels that find a place are added to it. */
export interface Field {
	/** No label leaves it. */
	readonly room: Box;
	readonly boxes: Oriented[];
	/** Ranges of y − x: C lines and windows. */
	readonly falls: Obstacle[];
	/** Ranges of y + x: L lines. */
	readonly rises: Obstacle[];
	/** Ranges of x. */
	readonly columns: Obstacle[];
	readonly curves: { readonly segments: readonly number[]; readonly cost: number }[];
}

/** Centre of a label, its turn clockwise on paper [degree], and what this place costs in itself. */
export interface Place {
	readonly x: number;
	readonly y: number;
	readonly angle: number;
	readonly cost: number;
}

export interface Label {
	readonly text: string;
	readonly cap: number;
	readonly face: Face;
	readonly fill: string;
	readonly of?: string;
}

export interface Placed {
	readonly item: TextItem;
	readonly box: Oriented;
}

/** Cost of what must not happen. */
export const NEVER = 1000;
/** Cost of lying on another line, which then stops at the label. */
export const ON_LINE = 60;
/** A label stands this clear of what it stops or stands beside, at cap height 2.5 [mm]. */
const CLEAR = 0.55;
/** Letters reach this much further below the baseline than above the capitals, in capital heights; half of it. */
const DESCENT = 0.06;

/**
 * Makes an empty field.
 * @param room no label leaves it [mm]
 * @returns the field
 * @example fieldOf(plot).boxes.length // 0
 * Source: sheet design.
 */
export function fieldOf(room: Box): Field {
	return { room, boxes: [], falls: [], rises: [], columns: [], curves: [] };
}

const meets = (centre: number, half: number, { from, to }: Obstacle): boolean =>
	centre + half > from && centre - half < to;

const costOfRanges = (obstacles: readonly Obstacle[], centre: number, half: number): number => {
	let cost = 0;
	for (const obstacle of obstacles) if (meets(centre, half, obstacle)) cost += obstacle.cost;
	return cost;
};

const leaves = ({ x, y, width, height }: Box, box: Oriented): boolean =>
	box.x - box.spanX < x ||
	box.x + box.spanX > x + width ||
	box.y - box.spanY < y ||
	box.y + box.spanY > y + height;

const costOfCurves = (field: Field, box: Oriented): number => {
	let cost = 0;
	for (const curve of field.curves) if (crosses(box, curve.segments)) cost += curve.cost;
	return cost;
};

const costOf = (field: Field, box: Oriented): number => {
	if (leaves(field.room, box)) return NEVER;
	const falling = Math.abs(box.sin - box.cos) * box.along + Math.abs(box.cos + box.sin) * box.across;
	const rising = Math.abs(box.cos + box.sin) * box.along + Math.abs(box.cos - box.sin) * box.across;
	let cost =
		costOfRanges(field.falls, box.y - box.x, falling) +
		costOfRanges(field.rises, box.y + box.x, rising) +
		costOfRanges(field.columns, box.x, box.spanX);
	for (const other of field.boxes) if (overlapping(box, other)) cost += NEVER;
	return cost >= NEVER ? cost : cost + costOfCurves(field, box);
};

/**
 * Gives the room of one line of text about its centre, clearance included.
 * @param label text and lettering
 * @returns halves of width and height [mm]
 * @example roomOf({ text: '100 nF', cap: 2.5, face: 'regular', fill: '#2B5C9B' })[1] // 1.95
 * Source: sheet design, text + 0.55.
 */
export function roomOf({ text, cap, face }: Label): readonly [number, number] {
	const clear = (CLEAR * cap) / 2.5;
	return [textWidth(text, face, cap) / 2 + clear, cap * (0.5 + DESCENT) + clear];
}

const boxAt = (half: readonly [number, number], { cap }: Label, { x, y, angle }: Place): Oriented => {
	const turn = (angle * Math.PI) / 180;
	const shift = DESCENT * cap;
	return orientedAt(x - shift * Math.sin(turn), y + shift * Math.cos(turn), half, angle);
};

const itemAt = (label: Label, { x, y, angle }: Place): TextItem => {
	const turn = (angle * Math.PI) / 180;
	return {
		type: 'text',
		role: 'text',
		text: label.text,
		x: x - (label.cap / 2) * Math.sin(turn),
		y: y + (label.cap / 2) * Math.cos(turn),
		cap: label.cap,
		face: label.face,
		fill: label.fill,
		anchor: 'middle',
		...(angle === 0 ? {} : { angle }),
		...(label.of === undefined ? {} : { of: label.of })
	};
};

/**
 * Finds the cheapest place for a label and takes it.
 * @param field what stands there; the label's room is added to it
 * @param label what to set
 * @param places tried in the order given, their own cost not falling
 * @returns the text and its room, or null where every place costs too much
 * @example placeLabel(field, label, alongSegment(line, { preferred: 0.2, beside: 0 }))
 * Source: sheet design, label cost.
 */
export function placeLabel(field: Field, label: Label, places: Iterable<Place>): Placed | null {
	const half = roomOf(label);
	let best: { place: Place; box: Oriented } | null = null;
	let least = NEVER;
	for (const place of places) {
		if (place.cost >= least) break;
		const box = boxAt(half, label, place);
		const cost = place.cost + costOf(field, box);
		if (cost >= least) continue;
		least = cost;
		best = { place, box };
	}
	if (best === null) return null;
	field.boxes.push(best.box);
	return { item: itemAt(label, best.place), box: best.box };
}

export interface Track {
	/** Where along the segment the label would best stand, 0 … 1. */
	readonly preferred: number;
	/** Shift to the right of the reading direction, down on paper [mm]. */
	readonly beside: number;
}

const STEPS = 100;
/** Cost of sliding along the whole line. */
const SLIDE = 10;

/**
 * Lists the places along a straight line, nearest to the preferred one first.
 * @param segment left to right [mm]
 * @param track preferred place and shift beside the line
 * @yields places turned with the line
 * @example [...alongSegment([0, 0, 10, 10], { preferred: 0.5, beside: 0 })][0] // { x: 5, y: 5, angle: 45, cost: 0 }
 * Source: sheet design, 10·|t − preferred|.
 */
export function* alongSegment(
	[x1, y1, x2, y2]: Segment,
	{ preferred, beside }: Track
): Generator<Place, void, undefined> {
	const length = Math.hypot(x2 - x1, y2 - y1);
	const cos = (x2 - x1) / length;
	const sin = (y2 - y1) / length;
	const angle = (Math.atan2(y2 - y1, x2 - x1) * 180) / Math.PI;
	for (let count = 0; count <= 2 * STEPS; count += 1) {
		const away = Math.ceil(count / 2) / STEPS;
		const t = preferred + (count % 2 === 0 ? -away : away);
		if (t < 0 || t > 1) continue;
		const x = x1 + t * (x2 - x1) - beside * sin;
		yield { x, y: y1 + t * (y2 - y1) + beside * cos, angle, cost: SLIDE * away };
	}
}

/** How far a level label may leave the height of its point, in halves of its own height. */
const ROUNDS = 5;

/**
 * Lists level places around a point: right, left, above and below, ever further.
 * @param x the point [mm]
 * @param y [mm]
 * @param half halves of the label's width and height [mm]
 * @param gap between the point and the label's room [mm]
 * @yields level places
 * @example [...aroundPoint(0, 0, [5, 2], 1)][0] // { x: 6, y: 0, angle: 0, cost: 0 }
 * Source: common practice of map lettering.
 */
export function* aroundPoint(
	x: number,
	y: number,
	[along, across]: readonly [number, number],
	gap: number
): Generator<Place, void, undefined> {
	const side = along + gap;
	for (let round = 0; round < ROUNDS; round += 1) {
		const rise = round * across;
		const spots = [
			[side, rise],
			[-side, rise],
			[side, -rise],
			[-side, -rise],
			[0, across + gap + rise],
			[0, -across - gap - rise]
		];
		for (const [index, [dx = 0, dy = 0]] of spots.entries())
			yield { x: x + dx, y: y + dy, angle: 0, cost: 10 * round + index };
	}
}
