/** Leaves out points of a polyline that no eye would miss. */

/** Square of the distance of a point from the piece between two others. */
const squareDistance = (at: readonly number[], point: number, from: number, to: number): number => {
	const value = (index: number): number => at[index] ?? 0;
	const [x, y, x0, y0] = [value(2 * point), value(2 * point + 1), value(2 * from), value(2 * from + 1)];
	const [dx, dy] = [value(2 * to) - x0, value(2 * to + 1) - y0];
	const length = dx * dx + dy * dy;
	const t = length === 0 ? 0 : Math.min(1, Math.max(0, ((x - x0) * dx + (y - y0) * dy) / length));
	return (x - x0 - t * dx) ** 2 + (y - y0 - t * dy) ** 2;
};

interface Piece {
	readonly from: number;
	readonly to: number;
}

const farthest = (at: readonly number[], { from, to }: Piece): { point: number; square: number } => {
	let point = from;
	let square = 0;
	for (let index = from + 1; index < to; index += 1) {
		const here = squareDistance(at, index, from, to);
		if (here > square) [point, square] = [index, here];
	}
	return { point, square };
};

/**
 * Keeps as few points of a polyline as leave every dropped point within a distance of what is drawn.
 * @param at x, y, x, y … in order [mm]
 * @param tolerance greatest distance of a dropped point [mm], ≥ 0
 * @returns the points kept, first and last among them [mm]
 * @throws RangeError for a negative tolerance
 * @example simplify([0, 0, 5, 0.001, 10, 0]) // [0, 0, 10, 0]
 * Source: D. H. Douglas and T. K. Peucker, Cartographica 10 (1973) 112.
 */
export function simplify(at: readonly number[], tolerance = 0.01): number[] {
	if (!(tolerance >= 0)) throw new RangeError(`tolerance must be >= 0 mm, got ${String(tolerance)}`);
	const last = Math.floor(at.length / 2) - 1;
	if (last < 2) return [...at];
	const kept = new Set([0, last]);
	const open: Piece[] = [{ from: 0, to: last }];
	for (let piece = open.pop(); piece !== undefined; piece = open.pop()) {
		const { point, square } = farthest(at, piece);
		if (square > tolerance * tolerance) {
			kept.add(point);
			open.push({ from: piece.from, to: point }, { from: point, to: piece.to });
		}
	}
	return at.filter((_, index) => kept.has(index >> 1));
}
