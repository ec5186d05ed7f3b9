/** Convex polygons as flat lists x, y, x, y …, and how bands and hatches are clipped to them. */
import type { PathData } from '$lib/scene/scene';
import { numberAt } from './oriented';

/** Corners one after the other, x and y each; empty where nothing is left [mm]. */
export type Polygon = readonly number[];

interface Rectangle {
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly height: number;
}

/**
 * Gives the corners of a rectangle.
 * @param box upper left corner and size [mm]
 * @returns the polygon
 * @example cornersOf({ x: 0, y: 0, width: 2, height: 1 }) // [0, 0, 2, 0, 2, 1, 0, 1]
 * Source: plane geometry.
 */
export function cornersOf({ x, y, width, height }: Rectangle): Polygon {
	return [x, y, x + width, y, x + width, y + height, x, y + height];
}

/**
 * Keeps what lies where a·x + b·y ≥ c.
 * @param polygon convex
 * @param line a, b, c of the border
 * @returns the convex polygon that is left, possibly empty
 * @example keepSide([0, 0, 2, 0, 2, 2, 0, 2], [1, 0, 1]) // the right half
 * Source: Sutherland and Hodgman, re-entrant polygon clipping.
 */
export function keepSide(polygon: Polygon, [a, b, c]: readonly [number, number, number]): Polygon {
	const kept: number[] = [];
	let px = numberAt(polygon, polygon.length - 2);
	let py = numberAt(polygon, polygon.length - 1);
	let before = a * px + b * py - c;
	for (let index = 0; index < polygon.length; index += 2) {
		const x = numberAt(polygon, index);
		const y = numberAt(polygon, index + 1);
		const here = a * x + b * y - c;
		if (here >= 0 !== before >= 0) {
			const t = before / (before - here);
			kept.push(px + t * (x - px), py + t * (y - py));
		}
		if (here >= 0) kept.push(x, y);
		[px, py, before] = [x, y, here];
	}
	return kept.length < 6 ? [] : kept;
}

/**
 * Cuts the strip between two C lines out of a rectangle.
 * @param box the plot [mm]
 * @param from least y − x, −Infinity allowed [mm]
 * @param to greatest y − x, Infinity allowed [mm]
 * @returns the polygon inside, possibly empty
 * @example fallStrip(plot, fallOf(plot, 1e-7), fallOf(plot, 1e-6))
 * Source: plane geometry.
 */
export function fallStrip(box: Rectangle, from: number, to: number): Polygon {
	let polygon = cornersOf(box);
	if (from > -Infinity) polygon = keepSide(polygon, [-1, 1, from]);
	if (to < Infinity && polygon.length > 0) polygon = keepSide(polygon, [1, -1, -to]);
	return polygon;
}

/**
 * Gives where a straight line runs inside a convex polygon.
 * @param polygon convex
 * @param line a, b, c of a·x + b·y = c, with a² + b² = 1
 * @returns x1, y1, x2, y2, or null where it misses [mm]
 * @example chordOf([0, 0, 2, 0, 2, 2, 0, 2], [0, 1, 1]) // a level line across the middle
 * Source: plane geometry.
 */
export function chordOf(
	polygon: Polygon,
	[a, b, c]: readonly [number, number, number]
): readonly [number, number, number, number] | null {
	const found: number[] = [];
	let px = numberAt(polygon, polygon.length - 2);
	let py = numberAt(polygon, polygon.length - 1);
	let before = a * px + b * py - c;
	for (let index = 0; index < polygon.length; index += 2) {
		const x = numberAt(polygon, index);
		const y = numberAt(polygon, index + 1);
		const here = a * x + b * y - c;
		if (here >= 0 !== before >= 0) {
			const t = before / (before - here);
			found.push(px + t * (x - px), py + t * (y - py));
		}
		[px, py, before] = [x, y, here];
	}
	const [x1 = 0, y1 = 0, x2 = 0, y2 = 0] = found;
	return found.length < 4 ? null : [x1, y1, x2, y2];
}

/**
 * Writes a polygon as a closed path.
 * @param polygon corners
 * @returns path data
 * @example polygonPath([0, 0, 2, 0, 2, 1]).ops // 'MLLZ'
 * Source: scene format.
 */
export function polygonPath(polygon: Polygon): PathData {
	return { ops: `M${'L'.repeat(polygon.length / 2 - 1)}Z`, at: polygon };
}
