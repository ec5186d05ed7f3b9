/** Filter and source over a range of frequency and source inductance, sampled once for many line-side capacitors. */
import type { Interval } from '$lib/quantity/interval';
import { add, reciprocal, type Complex } from './complex';
import { inductorImpedance, shuntImpedance, type Filter } from './filter';
import { frequencyGrid } from './grid';
import { sourceImpedance, type SourceModel } from './source';

/** All of the network but Cx at one frequency. */
export interface LadderSample {
	readonly frequency: number;
	/** Z_L + Z_C [Ω]. */
	readonly own: Complex;
	/** Z_C with its damping branch [Ω]. */
	readonly shunt: Complex;
	/** Real part of the source [Ω]. */
	readonly resistance: number;
	/** Imaginary part of the source at its smallest and largest inductance [Ω]. */
	readonly reactanceFrom: number;
	readonly reactanceTo: number;
	/** Imaginary part of Y_p at either end of the source's inductance [S]. */
	readonly susceptanceFrom: number;
	readonly susceptanceTo: number;
}

export interface Ladder {
	readonly at: (frequency: number) => LadderSample;
	readonly samples: readonly LadderSample[];
	/** Ends of the frequency range [Hz]. */
	readonly from: number;
	readonly to: number;
	/** Whether the source's inductance is a quantity of its own, or part of a network or a measurement. */
	readonly inductive: boolean;
}

/**
 * Samples a filter and its source over a frequency range.
 * @param filter the filter
 * @param source the source; an `impedance` source over its whole range of inductance
 * @param range from ≤ to [Hz], > 0
 * @returns the ladder, to be evaluated for any Cx
 * @throws RangeError when the range is empty or not positive; OutsideCurveError where a curve was not measured
 * @example ladder(filter, source, { from: 145e3, to: 145e3 }).samples.length // 1
 * @see circuit of the module `filter`
 */
export function ladder(filter: Filter, source: SourceModel, range: Interval): Ladder {
	const inductive = source.kind === 'impedance';
	const at = (frequency: number): LadderSample => {
		const shunt = shuntImpedance(filter, frequency);
		const own = add(inductorImpedance(filter.inductor, frequency), shunt);
		const low = sourceImpedance(source, frequency);
		const high = inductive ? sourceImpedance(source, frequency, source.inductanceMax) : low;
		return {
			frequency,
			own,
			shunt,
			resistance: low.re,
			reactanceFrom: low.im,
			reactanceTo: high.im,
			susceptanceFrom: reciprocal(own).im + reciprocal(low).im,
			susceptanceTo: reciprocal(own).im + reciprocal(high).im
		};
	};
	return {
		at,
		samples: frequencyGrid(filter, source, range).map(at),
		from: range.from,
		to: range.to,
		inductive
	};
}
