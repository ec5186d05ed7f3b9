/**
 * Hatches: lines at 67.5° and 22.5°, well off the grid and off the L and C lines at ±45°, anchored to the paper so that
 * neighbouring fields run on, and clipped here so that no writer needs a pattern.
 */
import type { RuleClass } from '$lib/design/design';
import type { PathData } from '$lib/scene/scene';
import { numberAt } from './oriented';
import { chordOf, type Polygon } from './polygon';

/** Rise above the level, counter-clockwise on paper [degree]. */
export const HATCH_ANGLE: Readonly<Record<Exclude<RuleClass, 'advisory'>, number>> = {
	mandatory: 67.5,
	design: 22.5
};

/** Between the lines of a bank at k = 1; every fifth runs on through the field [mm]. */
const PITCH = 1;

/** bank: every line; field: every fifth; fringe: every second. */
export type Density = 'bank' | 'field' | 'fringe';

const EVERY: Readonly<Record<Density, number>> = { bank: 1, field: 5, fringe: 2 };

/** Shorter pieces of hatch between lettering and an edge look like a dotted line and are left out [mm]. */
export const HATCH_SPECK = 1.2;

/** A chord shorter than this prints as a speck [mm]. */
const SPECK = 0.15;

const normalOf = (angle: number): readonly [number, number] => {
	const turn = (angle * Math.PI) / 180;
	return [Math.sin(turn), Math.cos(turn)];
};

const NORMAL = {
	mandatory: normalOf(HATCH_ANGLE.mandatory),
	design: normalOf(HATCH_ANGLE.design)
} as const;

const rangeAlong = (polygon: Polygon, [a, b]: readonly [number, number]): readonly [number, number] => {
	let least = Infinity;
	let greatest = -Infinity;
	for (let index = 0; index < polygon.length; index += 2) {
		const along = a * (polygon[index] ?? 0) + b * (polygon[index + 1] ?? 0);
		least = Math.min(least, along);
		greatest = Math.max(greatest, along);
	}
	return [least, greatest];
};

/**
 * Hatches a convex polygon.
 * @param polygon convex [mm]
 * @param ruleClass mandatory or design: the angle
 * @param density how many of the lines
 * @param k factor of the paper on the pitch
 * @returns x1, y1, x2, y2 of each line, one after the other [mm]
 * @example hatchLines([0, 0, 10, 0, 10, 10, 0, 10], 'design', 'field', 1).length / 4 // 3
 * Source: common practice of drawing offices; angles chosen to stand off ±45°.
 */
export function hatchLines(
	polygon: Polygon,
	ruleClass: Exclude<RuleClass, 'advisory'>,
	density: Density,
	k: number
): number[] {
	const normal = NORMAL[ruleClass];
	const [a, b] = normal;
	const pitch = PITCH * k * EVERY[density];
	const [least, greatest] = rangeAlong(polygon, normal);
	const lines: number[] = [];
	for (let count = Math.ceil(least / pitch); count * pitch < greatest; count += 1) {
		const chord = chordOf(polygon, [a, b, count * pitch]);
		if (chord === null) continue;
		const [x1, y1, x2, y2] = chord;
		if (Math.hypot(x2 - x1, y2 - y1) >= SPECK) lines.push(x1, y1, x2, y2);
	}
	return lines;
}

/** Between dots in a row at k = 1; the rows stand √3/2 of it apart [mm]. */
const DOT_PITCH = 1.5;
const DOT_RADIUS = 0.27;
/** Control length of a quarter circle of radius 1: 4/3·(√2 − 1). */
const QUARTER = 0.5522847498;

const insideConvex = (polygon: Polygon, x: number, y: number, room: number): boolean => {
	const count = polygon.length;
	for (let index = 0; index < count; index += 2) {
		const ax = polygon[index] ?? 0;
		const ay = polygon[index + 1] ?? 0;
		const dx = (polygon[(index + 2) % count] ?? 0) - ax;
		const dy = (polygon[(index + 3) % count] ?? 0) - ay;
		if (dx * (y - ay) - dy * (x - ax) < room * Math.hypot(dx, dy)) return false;
	}
	return true;
};

/**
 * Sets the dots of an advisory band on a triangular raster anchored to the paper.
 * @param polygon convex, corners clockwise on paper [mm]
 * @param k factor of the paper
 * @param density dense beside an edge, every third dot of every third row beyond
 * @returns x and y of each dot that lies wholly inside [mm]
 * @example dotCentres([0, 0, 3, 0, 3, 3, 0, 3], 1).length > 0 // true
 * Source: common practice of drawing offices.
 */
export function dotCentres(polygon: Polygon, k: number, density: 'bank' | 'field' = 'bank'): number[] {
	const pitch = DOT_PITCH * k * (density === 'bank' ? 1 : 3);
	const rise = (pitch * Math.sqrt(3)) / 2;
	const [left, right] = rangeAlong(polygon, [1, 0]);
	const [top, foot] = rangeAlong(polygon, [0, 1]);
	const centres: number[] = [];
	for (let row = Math.ceil(top / rise); row * rise < foot; row += 1) {
		const shift = row % 2 === 0 ? 0 : pitch / 2;
		for (let count = Math.ceil((left - shift) / pitch); count * pitch + shift < right; count += 1) {
			const x = count * pitch + shift;
			if (insideConvex(polygon, x, row * rise, DOT_RADIUS * k)) centres.push(x, row * rise);
		}
	}
	return centres;
}

/**
 * Draws round dots as one path.
 * @param centres x and y of each [mm]
 * @param radius [mm]
 * @returns closed outlines to fill
 * @example roundDots([0, 0], 0.27).ops // 'MCCCCZ'
 * Source: cubic approximation of the circle.
 */
export function roundDots(centres: readonly number[], radius: number): PathData {
	const at: number[] = [];
	const c = QUARTER * radius;
	for (let index = 0; index < centres.length; index += 2) {
		const x = centres[index] ?? 0;
		const y = centres[index + 1] ?? 0;
		at.push(x + radius, y);
		at.push(x + radius, y + c, x + c, y + radius, x, y + radius);
		at.push(x - c, y + radius, x - radius, y + c, x - radius, y);
		at.push(x - radius, y - c, x - c, y - radius, x, y - radius);
		at.push(x + c, y - radius, x + radius, y - c, x + radius, y);
	}
	return { ops: 'MCCCCZ'.repeat(centres.length / 2), at };
}

/** A line this short with round ends prints as a dot in every reader [mm]. */
const DOT_LENGTH = 0.01;

/**
 * Draws the dots of an advisory band as short strokes with round ends.
 * @param centres x and y of each [mm]
 * @returns path data to stroke with the dot's diameter
 * @example dotPath([1, 2]).ops // 'ML'
 * Source: scene format.
 */
export function dotPath(centres: readonly number[]): PathData {
	const at: number[] = [];
	for (let index = 0; index < centres.length; index += 2) {
		const x = numberAt(centres, index);
		const y = numberAt(centres, index + 1);
		at.push(x, y, x + DOT_LENGTH, y);
	}
	return { ops: 'ML'.repeat(centres.length / 2), at };
}

/** Radius of an advisory dot [mm]. */
export const dotRadius = (k: number): number => DOT_RADIUS * k;
