/** Fewer points of a measured curve: those that carry its shape stay, as they were measured. */
import { impedanceCurve, type ImpedanceCurve } from './curve';
import type { MeasuredPoint } from './measurement';

/** What is left of a curve. */
export interface Thinned {
	readonly points: readonly MeasuredPoint[];
	/** Greatest |ΔZ|/|Z| between what was measured and what is read between the points that stay; 0 where all stay. */
	readonly deviation: number;
}

type Ready = ImpedanceCurve['points'];

/** Points from one that stays to the next, and the one between that is missed most. */
interface Span {
	readonly from: number;
	readonly to: number;
	readonly worst: number;
	readonly deviation: number;
}

/** Neighbours further apart in phase could be unwrapped the other way round [rad]. */
const MOST_TURN = 3;

const missedBy = (a: Ready[number], b: Ready[number], point: Ready[number]): number => {
	const share = (point.logFrequency - a.logFrequency) / (b.logFrequency - a.logFrequency);
	const size = a.logMagnitude + share * (b.logMagnitude - a.logMagnitude) - point.logMagnitude;
	const angle = a.phase + share * (b.phase - a.phase) - point.phase;
	return Math.hypot(size, angle);
};

const spanOf = (ready: Ready, from: number, to: number): Span => {
	const [a, b] = [ready[from], ready[to]];
	let span: Span = { from, to, worst: from, deviation: 0 };
	if (!a || !b) return span;
	for (let index = from + 1; index < to; index++) {
		const point = ready[index] ?? a;
		const deviation = missedBy(a, b, point);
		if (deviation > span.deviation) span = { from, to, worst: index, deviation };
	}
	const turned = Math.abs(b.phase - a.phase) > MOST_TURN && to - from > 1;
	return turned ? { from, to, worst: (from + to) >> 1, deviation: Infinity } : span;
};

/**
 * Thins a curve: starts with both ends and takes back, again and again, the point that straight lines in log |Z| and
 * unwrapped phase over log f miss most.
 * @param points measured points, frequency increasing [Hz], impedance not zero [Ω]
 * @param most points to keep, ≥ 2
 * @returns the points that stay, with the greatest relative error of what is read between them
 * @throws RangeError when fewer than two points are to stay
 * @example // 20 000 points of an ideal capacitor lie on one line
 * thin(points, 1000).points.length // 2
 * @see Ramer (1972) and Douglas and Peucker (1973), line simplification (recalled); here by number of points
 */
export function thin(points: readonly MeasuredPoint[], most: number): Thinned {
	if (!(most >= 2)) throw new RangeError(`a curve keeps at least 2 points, asked for ${most}`);
	if (points.length <= most) return { points, deviation: 0 };
	const { points: ready } = impedanceCurve({
		frequency_Hz: points.map(({ frequency }) => frequency),
		real_ohm: points.map(({ impedance }) => impedance.re),
		imaginary_ohm: points.map(({ impedance }) => impedance.im)
	});
	const spans = [spanOf(ready, 0, ready.length - 1)];
	while (spans.length < most - 1) {
		const at = spans.reduce(
			(best, { deviation }, n) => (deviation > (spans[best]?.deviation ?? 0) ? n : best),
			0
		);
		const span = spans[at];
		if (!span || span.deviation < 1e-12) break;
		spans.splice(at, 1, spanOf(ready, span.from, span.worst), spanOf(ready, span.worst, span.to));
	}
	const kept = [...spans.map(({ from }) => from), ready.length - 1];
	return {
		points: kept.flatMap((index) => points[index] ?? []),
		deviation: Math.max(...spans.map(({ deviation }) => deviation))
	};
}
