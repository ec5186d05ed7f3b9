/** The peak of a filter's output impedance, which a converter of constant power must stay clear of. */
import type { Interval } from '$lib/quantity/interval';
import { magnitude, reciprocal } from './complex';
import { capacitorImpedance, outputImpedance, type CapacitorPart, type Filter } from './filter';
import { ladderOf } from './transient';
import { rootsOf } from './polynomial';
import { goldenMinimum } from './search';
import { sourceImpedance, type SourceModel } from './source';

/** The greatest value of an impedance, and where it lies. */
export interface Peak {
	/** [Ω] */
	readonly impedance: number;
	/** [Hz] */
	readonly frequency: number;
}

const PER_DECADE = 8;

/** Spread of the impedance, relative, at which a search ends. */
const SPREAD = 1e-8;

/**
 * Greatest value of a magnitude over frequency: evenly in log f and at the given frequencies, then by golden section
 * in every hill not far below the highest.
 * @param of magnitude at a frequency [Ω]
 * @param range 0 < from ≤ to [Hz]
 * @param seeds frequencies near which a peak narrower than the grid may lie [Hz]
 * @returns peak [Ω] and its frequency [Hz]
 * @throws RangeError when the range is empty or not positive
 * @example peakBetween((f) => 1 / (1 + (f - 1e3) ** 2), { from: 10, to: 1e5 }, [1e3]) // 1 at 1 kHz
 * @see golden section
 */
export function peakBetween(
	of: (frequency: number) => number,
	range: Interval,
	seeds: readonly number[]
): Peak {
	const { from, to } = range;
	if (!(from > 0) || !(to >= from))
		throw new RangeError(`a range needs 0 < from ≤ to, got ${from} to ${to} Hz`);
	const steps = Math.max(1, Math.ceil(PER_DECADE * Math.log10(to / from)));
	const even = Array.from({ length: steps }, (_, index) => from * (to / from) ** (index / steps));
	const grid = [...new Set([...even, to, ...seeds.filter((f) => f > from && f < to)])].sort((a, b) => a - b);
	const seen = grid.map((frequency): Peak => ({ frequency, impedance: of(frequency) }));
	const highest = seen.reduce((a, b) => (b.impedance > a.impedance ? b : a));
	let best = highest;
	seen.forEach((here, index) => {
		const [left, right] = [seen[index - 1] ?? here, seen[index + 1] ?? here];
		if (here.impedance < highest.impedance / 2) return;
		if (left.impedance > here.impedance || right.impedance > here.impedance) return;
		const frequency = goldenMinimum((f) => -of(f), left.frequency, right.frequency, SPREAD);
		const impedance = of(frequency);
		if (impedance > best.impedance) best = { frequency, impedance };
	});
	return best;
}

/** Frequencies around each natural oscillation of filter and source, a few of its widths apart. */
const oscillations = (
	filter: Filter,
	choice: CapacitorPart,
	source: SourceModel,
	inductance: number
): number[] => {
	if (source.kind !== 'impedance') return [];
	const step = { voltage: 1, inductance, resistance: source.resistance };
	return rootsOf(ladderOf(step, choice, filter).D)
		.filter(({ im }) => im > 0)
		.flatMap(({ re, im }) => {
			const width = Math.max(-re, 1e-9 * im);
			return [im - 3 * width, im - width, im, im + width, im + 3 * width];
		})
		.map((omega) => omega / (2 * Math.PI));
};

/**
 * Peak of the output impedance |Z_o| = |Z_C ∥ (Z_L + Z_s ∥ 1/Y_x)| over frequency.
 * @param filter the filter
 * @param choice the line-side capacitor; null without one
 * @param source the source; of an `impedance` source its largest inductance
 * @param range 0 < from ≤ to [Hz]
 * @returns peak [Ω] and its frequency [Hz]; where nothing damps, as high as rounding lets it
 * @throws RangeError when the range is empty or not positive; OutsideCurveError where a curve was not measured
 * @example // 33 µH, 4.7 µF, 9.4 µF + 2.419 Ω, source 100 µH + 0.1 Ω: 9.265 Ω at 3.824 kHz
 * outputPeak(filter, null, source, { from: 10, to: 145e3 })
 * @see R. D. Middlebrook, Input filter considerations (title recalled); agrees with ngspice in tests/reference
 */
export function outputPeak(
	filter: Filter,
	choice: CapacitorPart | null,
	source: SourceModel,
	range: Interval
): Peak {
	const inductance = source.kind === 'impedance' ? source.inductanceMax : 0;
	const none = { re: 0, im: 0 };
	const of = (f: number): number => {
		const shunt = choice ? reciprocal(capacitorImpedance(choice, f)) : none;
		return magnitude(outputImpedance(filter, shunt, sourceImpedance(source, f, inductance), f));
	};
	return peakBetween(of, range, oscillations(filter, choice ?? { capacitance: 0 }, source, inductance));
}
