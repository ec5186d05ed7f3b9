/** Limits of the voltage at the mains port over frequency, as dBµV against log f. */

export type Detector = 'quasi-peak' | 'average';

/** A straight piece against log f, both ends included [Hz], [dBµV]. */
export interface LimitSegment {
	readonly from: number;
	readonly to: number;
	readonly levelFrom: number;
	readonly levelTo: number;
}

export type LimitLine = Readonly<Record<Detector, readonly LimitSegment[]>>;

const flat = (from: number, to: number, level: number): LimitSegment => ({
	from,
	to,
	levelFrom: level,
	levelTo: level
});

/**
 * CISPR 32 class A, AC mains port, 0.15–30 MHz.
 * Values read on a public course page for EN 55022; that CISPR 32 has the same ones is recalled.
 */
export const CISPR_32_A: LimitLine = {
	'quasi-peak': [flat(150e3, 500e3, 79), flat(500e3, 30e6, 73)],
	average: [flat(150e3, 500e3, 66), flat(500e3, 30e6, 60)]
};

/**
 * CISPR 32 class B, AC mains port, 0.15–30 MHz; the first piece falls linearly with log f.
 * Values read on a public course page for EN 55022; that CISPR 32 has the same ones is recalled.
 */
export const CISPR_32_B: LimitLine = {
	'quasi-peak': [
		{ from: 150e3, to: 500e3, levelFrom: 66, levelTo: 56 },
		flat(500e3, 5e6, 56),
		flat(5e6, 30e6, 60)
	],
	average: [{ from: 150e3, to: 500e3, levelFrom: 56, levelTo: 46 }, flat(500e3, 5e6, 46), flat(5e6, 30e6, 50)]
};

/**
 * Limit line through points of a table, straight in dB against log f.
 * @param points frequency strictly increasing [Hz], levels [dBµV]
 * @returns the line; one point makes a line of one frequency
 * @throws RangeError when there is no point or a frequency does not increase
 * @example limitThrough([{ frequency: 1e5, quasiPeak: 60, average: 50 }]).average[0].levelFrom // 50
 * @see common practice
 */
export function limitThrough(
	points: readonly { readonly frequency: number; readonly quasiPeak: number; readonly average: number }[]
): LimitLine {
	const first = points[0];
	if (!first) throw new RangeError('a limit table needs at least one point');
	const pieces = (level: (point: (typeof points)[number]) => number): LimitSegment[] => {
		if (points.length === 1) return [flat(first.frequency, first.frequency, level(first))];
		return points.slice(1).map((point, index) => {
			const before = points[index] ?? first;
			if (!(point.frequency > before.frequency))
				throw new RangeError(`frequency must increase in a limit table, got ${point.frequency} Hz`);
			return { from: before.frequency, to: point.frequency, levelFrom: level(before), levelTo: level(point) };
		});
	};
	return { 'quasi-peak': pieces((p) => p.quasiPeak), average: pieces((p) => p.average) };
}

const levelOn = ({ from, to, levelFrom, levelTo }: LimitSegment, frequency: number): number =>
	from === to
		? levelFrom
		: levelFrom + ((levelTo - levelFrom) * Math.log(frequency / from)) / Math.log(to / from);

/**
 * Limit at a frequency: L = L1 + (L2 − L1) · log(f/f1) / log(f2/f1); where two pieces meet, the lower one.
 * @param line the limit line
 * @param detector quasi-peak or average
 * @param frequency [Hz], > 0
 * @returns [dBµV], or null where the line does not reach
 * @throws RangeError when the frequency is not > 0
 * @example limitAt(CISPR_32_B, 'quasi-peak', 290e3) // 60.524
 * @see CISPR 32, "at a transition the lower limit applies" (read as a note in a public test report for the radiated table; for the mains port recalled)
 */
export function limitAt(line: LimitLine, detector: Detector, frequency: number): number | null {
	if (!(frequency > 0)) throw new RangeError(`frequency must be > 0 Hz, got ${frequency}`);
	const levels = line[detector]
		.filter(({ from, to }) => frequency >= from && frequency <= to)
		.map((segment) => levelOn(segment, frequency));
	return levels.length === 0 ? null : Math.min(...levels);
}
