/** Labels down a scale, pushed apart where their readings lie close together. */
import type { Face } from '$lib/scene/scene';

export interface Reading {
	/** Where it is read [mm]. */
	readonly y: number;
	readonly text: string;
	/** Numbers of the rules. */
	readonly numbers: readonly string[];
	readonly face: Face;
	readonly fill: string;
	/** 4 stays where it is read; lighter ones leave first where there is no room; 0 gives way rather than move. */
	readonly weight: number;
}

export interface PlacedReading {
	readonly reading: Reading;
	/** Middle of its lettering [mm]. */
	readonly at: number;
}

export interface Span {
	readonly from: number;
	readonly to: number;
	/** Least distance between two labels [mm]. */
	readonly pitch: number;
}

/** Pushes labels down from a floor, then back up from the foot. */
const push = (readings: readonly Reading[], from: number, to: number, pitch: number): number[] => {
	const places: number[] = [];
	for (const { y } of readings) places.push(Math.max(y, (places.at(-1) ?? from - pitch) + pitch));
	let limit = to + pitch;
	for (let index = places.length - 1; index >= 0; index -= 1) {
		limit = Math.min(places[index] ?? limit, limit - pitch);
		places[index] = limit;
	}
	return places;
};

/** Groups of neighbours that touch are centred about what they read, so that a pair opens to both sides. */
const relax = (readings: readonly Reading[], from: number, to: number, pitch: number): number[] => {
	const groups: { sum: number; count: number; start: number }[] = [];
	const startOf = (sum: number, count: number): number => {
		const start = sum / count - ((count - 1) * pitch) / 2;
		return Math.min(Math.max(start, from), Math.max(from, to - (count - 1) * pitch));
	};
	for (const { y } of readings) {
		let group = { sum: y, count: 1, start: startOf(y, 1) };
		for (
			let last = groups.at(-1);
			last !== undefined && last.start + last.count * pitch > group.start;
			last = groups.at(-1)
		) {
			groups.pop();
			const [sum, count] = [last.sum + group.sum, last.count + group.count];
			group = { sum, count, start: startOf(sum, count) };
		}
		groups.push(group);
	}
	return groups.flatMap(({ count, start }) =>
		Array.from({ length: count }, (_, index) => start + index * pitch)
	);
};

const keepHeaviest = (readings: readonly Reading[], most: number): Reading[] => {
	if (readings.length <= most) return [...readings];
	const kept = new Set([...readings].sort((a, b) => b.weight - a.weight).slice(0, Math.max(0, most)));
	return readings.filter((reading) => kept.has(reading));
};

const place = (readings: readonly Reading[], { from, to, pitch }: Span): PlacedReading[] => {
	const most = Math.floor((to - from) / pitch + 1 + 1e-9);
	const kept = keepHeaviest(readings, most).sort((a, b) => a.y - b.y);
	const relaxed = relax(kept, from, to, pitch);
	const moved = kept.map((reading, index) => ({ ...reading, y: relaxed[index] ?? reading.y }));
	const places = push(moved, from, to, pitch);
	return kept.map((reading, index) => ({ reading, at: places[index] ?? reading.y }));
};

/**
 * Places labels beside a scale: the choice where it is read, the others pushed apart, decades where room is left.
 * @param readings labels in any order
 * @param span the scale and the least distance of two labels [mm]
 * @returns where each label stands; no two nearer than the pitch
 * @example spread([{ y: 10, … }, { y: 11, … }], { from: 0, to: 100, pitch: 4 }).map(({ at }) => at) // [8.5, 12.5]
 * Source: sheet design, C scale.
 */
export function spread(readings: readonly Reading[], span: Span): PlacedReading[] {
	const fixed = readings.filter(({ weight }) => weight === 4);
	const movable = readings.filter(({ weight }) => weight > 0 && weight < 4);
	const borders = fixed.map(({ y }) => y).sort((a, b) => a - b);
	const placed: PlacedReading[] = fixed.map((reading) => ({ reading, at: reading.y }));
	let from = span.from;
	for (const border of [...borders, Infinity]) {
		const lowest = from === span.from ? -Infinity : from - span.pitch;
		const own = movable.filter(({ y }) => y > lowest && y <= border);
		const to = border === Infinity ? span.to : border - span.pitch;
		placed.push(...place(own, { from, to, pitch: span.pitch }));
		from = border + span.pitch;
	}
	for (const reading of readings.filter(({ weight }) => weight === 0)) {
		const clear = placed.every(({ at }) => Math.abs(at - reading.y) >= span.pitch);
		if (clear) placed.push({ reading, at: reading.y });
	}
	return placed.sort((a, b) => a.at - b.at);
}
