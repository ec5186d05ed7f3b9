/** Turned rectangles: the room of a label, which other lettering keeps clear of and lines stop at. */

export interface Oriented {
	/** Centre [mm]. */
	readonly x: number;
	readonly y: number;
	/** Halves of width and height [mm]. */
	readonly along: number;
	readonly across: number;
	/** Cosine and sine of the turn, clockwise on paper. */
	readonly cos: number;
	readonly sin: number;
	/** Halves of the upright rectangle around it [mm]. */
	readonly spanX: number;
	readonly spanY: number;
}

/**
 * Makes a turned rectangle.
 * @param x centre [mm]
 * @param y centre, down [mm]
 * @param half halves of its width and height [mm]
 * @param angle turn, clockwise on paper [degree]
 * @returns the rectangle
 * @example orientedAt(0, 0, [10, 2], 45).spanX // 8.49
 * Source: plane geometry.
 */
export function orientedAt(
	x: number,
	y: number,
	[along, across]: readonly [number, number],
	angle: number
): Oriented {
	const cos = Math.cos((angle * Math.PI) / 180);
	const sin = Math.sin((angle * Math.PI) / 180);
	const spanX = along * Math.abs(cos) + across * Math.abs(sin);
	const spanY = along * Math.abs(sin) + across * Math.abs(cos);
	return { x, y, along, across, cos, sin, spanX, spanY };
}

const separated = (a: Oriented, b: Oriented): boolean => {
	const dx = b.x - a.x;
	const dy = b.y - a.y;
	const cos = Math.abs(a.cos * b.cos + a.sin * b.sin);
	const sin = Math.abs(a.cos * b.sin - a.sin * b.cos);
	return (
		Math.abs(dx * a.cos + dy * a.sin) >= a.along + b.along * cos + b.across * sin ||
		Math.abs(dy * a.cos - dx * a.sin) >= a.across + b.along * sin + b.across * cos
	);
};

/**
 * Tells whether two turned rectangles share room; those that only touch do not.
 * @param a one
 * @param b the other
 * @returns true where they overlap
 * @example overlapping(orientedAt(0, 0, [2, 1], 0), orientedAt(3, 0, [2, 1], 45)) // true
 * Source: separating axis theorem.
 */
export function overlapping(a: Oriented, b: Oriented): boolean {
	if (Math.abs(a.x - b.x) >= a.spanX + b.spanX || Math.abs(a.y - b.y) >= a.spanY + b.spanY) return false;
	return !separated(a, b) && !separated(b, a);
}

/** A number of a flat list; 0 past its end, which no caller reaches. */
export const numberAt = (numbers: readonly number[], index: number): number => numbers[index] ?? 0;

/** Parameters of the two ends of what lies inside, of a segment given by its start and its way. */
type Inside = readonly [from: number, to: number];

const slab = (start: number, step: number, half: number): Inside | null => {
	if (Math.abs(step) < 1e-9) return Math.abs(start) < half ? [0, 1] : null;
	const a = (-half - start) / step;
	const b = (half - start) / step;
	return a < b ? [a, b] : [b, a];
};

const insideOf = (box: Oriented, segments: readonly number[], index: number): Inside | null => {
	const x = numberAt(segments, index);
	const y = numberAt(segments, index + 1);
	const dx = numberAt(segments, index + 2) - x;
	const dy = numberAt(segments, index + 3) - y;
	const u = (x - box.x) * box.cos + (y - box.y) * box.sin;
	const v = (y - box.y) * box.cos - (x - box.x) * box.sin;
	const first = slab(u, dx * box.cos + dy * box.sin, box.along);
	const second = slab(v, dy * box.cos - dx * box.sin, box.across);
	if (first === null || second === null) return null;
	const from = Math.max(0, first[0], second[0]);
	const to = Math.min(1, first[1], second[1]);
	return from < to ? [from, to] : null;
};

const apart = (box: Oriented, segments: readonly number[], index: number): boolean => {
	const x1 = numberAt(segments, index) - box.x;
	const y1 = numberAt(segments, index + 1) - box.y;
	const x2 = numberAt(segments, index + 2) - box.x;
	const y2 = numberAt(segments, index + 3) - box.y;
	return (
		(x1 > box.spanX && x2 > box.spanX) ||
		(x1 < -box.spanX && x2 < -box.spanX) ||
		(y1 > box.spanY && y2 > box.spanY) ||
		(y1 < -box.spanY && y2 < -box.spanY)
	);
};

/**
 * Tells whether any of the segments runs through a turned rectangle.
 * @param box the rectangle
 * @param segments x1, y1, x2, y2 of each, one after the other [mm]
 * @returns true where some of one lies inside
 * @example crosses(orientedAt(0, 0, [2, 1], 0), [-5, 0, 5, 0]) // true
 * Source: Liang and Barsky, parametric line clipping.
 */
export function crosses(box: Oriented, segments: readonly number[]): boolean {
	for (let index = 0; index < segments.length; index += 4) {
		if (!apart(box, segments, index) && insideOf(box, segments, index) !== null) return true;
	}
	return false;
}

/** Left over from a cut shorter than this, a piece of line prints as a speck [mm]. */
const SPECK = 0.2;

interface Piece {
	readonly segments: readonly number[];
	readonly index: number;
	readonly speck: number;
}

const pushPiece = (pieces: number[], { segments, index, speck }: Piece, [from, to]: Inside): void => {
	const x = numberAt(segments, index);
	const y = numberAt(segments, index + 1);
	const [endX, endY] = [numberAt(segments, index + 2), numberAt(segments, index + 3)];
	const [dx, dy] = [endX - x, endY - y];
	if (to - from < 1 && (to - from) * Math.hypot(dx, dy) < speck) return;
	if (from === 0) pieces.push(x, y);
	else pieces.push(x + from * dx, y + from * dy);
	if (to === 1) pieces.push(endX, endY);
	else pieces.push(x + to * dx, y + to * dy);
};

const NONE: readonly Inside[] = [];

/** Parts of one segment inside any of the boxes, by their start; empty for most segments. */
const coveredParts = (
	segments: readonly number[],
	index: number,
	boxes: readonly Oriented[]
): readonly Inside[] => {
	let parts: Inside[] | null = null;
	for (const box of boxes) {
		const inside = apart(box, segments, index) ? null : insideOf(box, segments, index);
		if (inside === null) continue;
		if (parts === null) parts = [inside];
		else parts.push(inside);
	}
	if (parts === null) return NONE;
	return parts.length > 1 ? parts.sort((a, b) => a[0] - b[0]) : parts;
};

/**
 * Takes out of straight segments what lies inside any of the rectangles.
 * @param segments x1, y1, x2, y2 of each, one after the other [mm]
 * @param boxes turned rectangles
 * @param speck pieces shorter than this that a cut leaves are dropped [mm]
 * @returns what is left, in the same form [mm]
 * @example cutAtBoxes([-5, 0, 5, 0], [orientedAt(0, 0, [2, 1], 0)]) // [-5, 0, -2, 0, 2, 0, 5, 0]
 * Source: Liang and Barsky, parametric line clipping.
 */
export function cutAtBoxes(
	segments: readonly number[],
	boxes: readonly Oriented[],
	speck = SPECK
): readonly number[] {
	const left: number[] = [];
	for (let index = 0; index < segments.length; index += 4) {
		const piece = { segments, index, speck };
		let from = 0;
		for (const part of coveredParts(segments, index, boxes)) {
			if (part[0] > from) pushPiece(left, piece, [from, part[0]]);
			from = Math.max(from, part[1]);
		}
		if (from < 1) pushPiece(left, piece, [from, 1]);
	}
	return left;
}

interface Upright {
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly height: number;
}

/**
 * Keeps of straight segments what lies inside an upright rectangle.
 * @param segments x1, y1, x2, y2 of each, one after the other [mm]
 * @param room upper left corner and size [mm]
 * @returns what is inside, in the same form [mm]
 * @example keepInside([-5, 1, 5, 1], { x: 0, y: 0, width: 2, height: 2 }) // [0, 1, 2, 1]
 * Source: Liang and Barsky, parametric line clipping.
 */
export function keepInside(segments: readonly number[], room: Upright): number[] {
	const half = [room.width / 2, room.height / 2] as const;
	const box = orientedAt(room.x + half[0], room.y + half[1], half, 0);
	const kept: number[] = [];
	for (let index = 0; index < segments.length; index += 4) {
		const inside = insideOf(box, segments, index);
		if (inside !== null) pushPiece(kept, { segments, index, speck: SPECK }, inside);
	}
	return kept;
}
