/** The sign: two columns of bones at ±45°, the falling ones set a third of a pitch lower, so that it is a weave. */
import type { PathData } from '$lib/scene/scene';

/** In parts of the square's side. */
const PITCH = 0.24;
const BONE = 0.1033;
const GAP = 0.0533;
const STAGGER = PITCH / 3;
/** Pieces cut off smaller than this part of the square are left out: they print as specks. */
const SPECK = 0.012;

type Point = readonly [number, number];

/** Keeps what lies on the inner side of a level line. */
const cutLevel = (polygon: readonly Point[], level: number, below: boolean): Point[] => {
	const inside = ([, y]: Point): boolean => (below ? y >= level : y <= level);
	return polygon.flatMap((point, index): Point[] => {
		const previous = polygon.at(index - 1) ?? point;
		if (inside(point) === inside(previous)) return inside(point) ? [point] : [];
		const t = (level - previous[1]) / (point[1] - previous[1]);
		const crossing: Point = [previous[0] + t * (point[0] - previous[0]), level];
		return inside(point) ? [crossing, point] : [crossing];
	});
};

const area = (polygon: readonly Point[]): number =>
	Math.abs(
		polygon.reduce((sum, [x, y], index) => {
			const [px, py] = polygon.at(index - 1) ?? [x, y];
			return sum + px * y - x * py;
		}, 0)
	) / 2;

const isSpeck = (polygon: readonly Point[]): boolean => polygon.length < 3 || area(polygon) < SPECK;

const bones = (): Point[][] => {
	const inner = 0.5 - GAP / 2;
	const outer = 0.5 + GAP / 2;
	const count = Math.ceil(2 / PITCH);
	return Array.from({ length: count }, (_, index) => (index - 3) * PITCH).flatMap((joint): Point[][] => {
		const low = joint + STAGGER - PITCH;
		return [
			[
				[0, joint + inner],
				[inner, joint],
				[inner, joint + BONE],
				[0, joint + inner + BONE]
			],
			[
				[outer, low],
				[1, low + inner],
				[1, low + inner + BONE],
				[outer, low + BONE]
			]
		];
	});
};

const SIGN: readonly (readonly Point[])[] = bones()
	.map((bone) => cutLevel(cutLevel(bone, 0, true), 1, false))
	.filter((piece) => !isSpeck(piece));

/**
 * Draws the sign.
 * @param x left edge of its square [mm]
 * @param y upper edge [mm]
 * @param size side of the square, ≥ 6 in print [mm]
 * @returns filled outlines, all inside the square
 * @example signPath(10, 10, 9).ops.startsWith('MLLL') // true
 */
export function signPath(x: number, y: number, size: number): PathData {
	return {
		ops: SIGN.map((piece) => `M${'L'.repeat(piece.length - 1)}Z`).join(''),
		at: SIGN.flatMap((piece) => piece.flatMap(([u, v]) => [x + u * size, y + v * size]))
	};
}
