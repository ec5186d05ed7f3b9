/** Where marks lie on the paper: upright bounds, turned boxes of lettering, and whether two boxes overlap. */
import { textWidth } from './metrics';
import type { Item, PathItem, TextItem } from './scene';

/** An upright rectangle [mm]. */
export interface Bounds {
	readonly left: number;
	readonly top: number;
	readonly right: number;
	readonly bottom: number;
}

/** A turned rectangle: its centre, half of its sizes along and across its own direction, and that direction. */
export interface OrientedBox {
	readonly x: number;
	readonly y: number;
	readonly along: number;
	readonly across: number;
	readonly cos: number;
	readonly sin: number;
}

/** Reach of brackets and roots above the baseline, and of descenders below, in capital heights; accents reach further. */
const ABOVE = 1.15;
const BELOW = 0.32;

const startOf = { start: 0, middle: -0.5, end: -1 } as const;

/**
 * Gives the room that a line of lettering takes.
 * @param item the text
 * @param clearance added on all four sides [mm]
 * @returns the turned box [mm]
 * @example textBox({ ...text, text: '0', cap: 0.7, x: 0, anchor: 'start' }).along // 0.2635, half of 0.527
 * Source: bounding boxes of the Barlow faces.
 */
export function textBox(item: TextItem, clearance = 0): OrientedBox {
	const angle = ((item.angle ?? 0) * Math.PI) / 180;
	const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
	const width = textWidth(item.text, item.face, item.cap);
	const u = width * (startOf[item.anchor] + 0.5);
	const v = (item.cap * (BELOW - ABOVE)) / 2;
	return {
		x: item.x + u * cos - v * sin,
		y: item.y + u * sin + v * cos,
		along: width / 2 + clearance,
		across: (item.cap * (ABOVE + BELOW)) / 2 + clearance,
		cos,
		sin
	};
}

/**
 * Gives the four corners of a turned box.
 * @param box the box
 * @returns x, y, x, y … of the corners in order [mm]
 * @example cornersOfBox({ x: 0, y: 0, along: 2, across: 1, cos: 1, sin: 0 }) // [-2, -1, 2, -1, 2, 1, -2, 1]
 * Source: plane geometry.
 */
export function cornersOfBox({ x, y, along, across, cos, sin }: OrientedBox): readonly number[] {
	const corner = (u: number, v: number): [number, number] => [x + u * cos - v * sin, y + u * sin + v * cos];
	return [
		...corner(-along, -across),
		...corner(along, -across),
		...corner(along, across),
		...corner(-along, across)
	];
}

const separated = (a: OrientedBox, b: OrientedBox, [x, y]: readonly [number, number]): boolean => {
	const reach = (box: OrientedBox): number =>
		box.along * Math.abs(box.cos * x + box.sin * y) + box.across * Math.abs(box.cos * y - box.sin * x);
	return Math.abs((b.x - a.x) * x + (b.y - a.y) * y) >= reach(a) + reach(b);
};

/**
 * Tells whether two turned boxes share more than an edge: no axis of either separates them.
 * @param a one box
 * @param b the other
 * @returns true where they overlap
 * @example overlaps(box, { ...box, x: box.x + 3 * box.along }) // false for an upright box
 * Source: S. Gottschalk, M. C. Lin, D. Manocha, OBBTree, 1996: separating axes.
 */
export function overlaps(a: OrientedBox, b: OrientedBox): boolean {
	return !(
		separated(a, b, [a.cos, a.sin]) ||
		separated(a, b, [-a.sin, a.cos]) ||
		separated(a, b, [b.cos, b.sin]) ||
		separated(a, b, [-b.sin, b.cos])
	);
}

const boundsOfPoints = (at: readonly number[], margin: number): Bounds | null => {
	if (at.length < 2) return null;
	let [left, top, right, bottom] = [Infinity, Infinity, -Infinity, -Infinity];
	for (let index = 0; index + 1 < at.length; index += 2) {
		const [x, y] = [at[index] ?? 0, at[index + 1] ?? 0];
		left = Math.min(left, x);
		top = Math.min(top, y);
		right = Math.max(right, x);
		bottom = Math.max(bottom, y);
	}
	return { left: left - margin, top: top - margin, right: right + margin, bottom: bottom + margin };
};

const pathBounds = (item: PathItem): Bounds | null =>
	boundsOfPoints(item.d.at, item.stroke === undefined ? 0 : item.stroke.width / 2);

const unite = (a: Bounds | null, b: Bounds | null): Bounds | null =>
	a === null || b === null
		? (a ?? b)
		: {
				left: Math.min(a.left, b.left),
				top: Math.min(a.top, b.top),
				right: Math.max(a.right, b.right),
				bottom: Math.max(a.bottom, b.bottom)
			};

/**
 * Gives an upright rectangle that holds a mark: control points and half the pen for a path, its room for a text.
 * @param item a mark or a group
 * @returns the bounds [mm], or null for a mark without a point
 * @example itemBounds({ type: 'path', d: { ops: 'ML', at: [0, 0, 4, 2] } }) // { left: 0, top: 0, right: 4, bottom: 2 }
 * Source: a Bézier curve lies in the hull of its control points.
 */
export function itemBounds(item: Item): Bounds | null {
	switch (item.type) {
		case 'group':
			return item.items.map(itemBounds).reduce(unite, null);
		case 'path':
			return pathBounds(item);
		case 'text':
			return boundsOfPoints(cornersOfBox(textBox(item)), 0);
	}
}
