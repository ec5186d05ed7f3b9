/** The highest peak of the filter's output impedance over frequency and corners, for any Cx. */
import { goldenMinimum } from '$lib/network/search';
import type { Complex } from '$lib/network/complex';
import { inductorImpedance, shuntImpedance, type CapacitorPart, type Filter } from '$lib/network/filter';
import type { Interval } from '$lib/quantity/interval';

/** One corner of the tolerances with one source impedance. */
export interface Corner {
	readonly filter: Filter;
	/** Rs [Ω] */
	readonly resistance: number;
	/** Ls [H] */
	readonly inductance: number;
}

const PER_DECADE = 24;

/** Peaks estimated under this share of the highest are not refined. */
const WORTH_A_SEARCH = 0.8;

/** An estimate this far from the limit, as a logarithm of the ratio, decides by itself. */
const CLEAR = 0.3;

/** All of the output admittance but Cx at one frequency [Ω, S]. */
interface Sample {
	readonly omega: number;
	readonly shuntRe: number;
	readonly shuntIm: number;
	readonly coilRe: number;
	readonly coilIm: number;
	readonly source: Corner;
}

const sampleAt = (corner: Corner, frequency: number): Sample => {
	const shunt = shuntImpedance(corner.filter, frequency);
	const coil = inductorImpedance(corner.filter.inductor, frequency);
	const size = shunt.re * shunt.re + shunt.im * shunt.im;
	return {
		omega: 2 * Math.PI * frequency,
		shuntRe: shunt.re / size,
		shuntIm: -shunt.im / size,
		coilRe: coil.re,
		coilIm: coil.im,
		source: corner
	};
};

/** Output admittance 1/Z_C + 1/(Z_L + Z_s∥Z_x) [S]; written out, because it stands in the innermost loop. */
const admittanceAt = (sample: Sample, part: CapacitorPart): Complex => {
	const { omega, source } = sample;
	const capRe = part.esr ?? 0;
	const capIm = omega * (part.esl ?? 0) - 1 / (omega * part.capacitance);
	const sourceIm = omega * source.inductance;
	const sumRe = capRe + source.resistance;
	const sumIm = capIm + sourceIm;
	const productRe = capRe * source.resistance - capIm * sourceIm;
	const productIm = capRe * sourceIm + capIm * source.resistance;
	const sumSize = sumRe * sumRe + sumIm * sumIm;
	const branchRe = sample.coilRe + (productRe * sumRe + productIm * sumIm) / sumSize;
	const branchIm = sample.coilIm + (productIm * sumRe - productRe * sumIm) / sumSize;
	const size = branchRe * branchRe + branchIm * branchIm;
	return { re: sample.shuntRe + branchRe / size, im: sample.shuntIm - branchIm / size };
};

/** A frequency range in which the impedance may peak, with an estimate of the peak [Ω]. */
interface Summit {
	readonly corner: Corner;
	readonly from: number;
	readonly to: number;
	readonly estimate: number;
}

interface SampledCorner {
	readonly corner: Corner;
	readonly samples: readonly Sample[];
}

const frequencyOf = (sample: Sample | undefined): number => (sample?.omega ?? NaN) / (2 * Math.PI);

/** What a stretch between two samples may hold: a zero of the susceptance, or a sample above its neighbours [Ω]. */
const estimateAt = (seen: readonly Complex[], sizes: readonly number[], index: number): number | null => {
	const [here, next] = [seen[index], seen[index + 1]];
	const size = sizes[index] ?? Infinity;
	if (here === undefined) return null;
	if (next !== undefined && here.im > 0 !== next.im > 0) {
		const share = here.im / (here.im - next.im);
		return 1 / Math.min(Math.abs(here.re + share * (next.re - here.re)), size);
	}
	const isLowest = size <= Math.min(sizes[index - 1] ?? Infinity, sizes[index + 1] ?? Infinity);
	return isLowest ? 1 / size : null;
};

const summitsOf = ({ corner, samples }: SampledCorner, part: CapacitorPart): Summit[] => {
	const seen = samples.map((sample) => admittanceAt(sample, part));
	const sizes = seen.map(({ re, im }) => Math.hypot(re, im));
	const last = samples.length - 1;
	return seen.flatMap((_, index): Summit[] => {
		const estimate = estimateAt(seen, sizes, index);
		if (estimate === null) return [];
		const from = frequencyOf(samples[Math.max(0, index - 1)]);
		return [{ corner, from, to: frequencyOf(samples[Math.min(last, index + 2)]), estimate }];
	});
};

const refinedPeak = ({ corner, from, to, estimate }: Summit, part: CapacitorPart): number => {
	const sizeAt = (logarithm: number): number => {
		const { re, im } = admittanceAt(sampleAt(corner, Math.exp(logarithm)), part);
		return Math.hypot(re, im);
	};
	const at = goldenMinimum(sizeAt, Math.log(from), Math.log(to), 1e-11);
	const found = 1 / Math.min(sizeAt(at), sizeAt(Math.log(from)), sizeAt(Math.log(to)));
	return Number.isNaN(found) ? estimate : found;
};

/**
 * Prepares the search for the peak of |Z_o| = |Z_C ∥ (Z_L + Z_s∥Z_x)| over a frequency range at the worst corner,
 * for many Cx: sampled once, refined only near the limit.
 * @param corners filters with source impedances
 * @param range frequencies [Hz]
 * @param limit impedance near which the peak must be exact [Ω]
 * @returns a function from Cx to the peak [Ω]; an estimate where it lies further from the limit
 * @throws OutsideCurveError where a curve was not measured
 * @example outputPeak([corner], { from: 10, to: 145e3 }, 10)({ capacitance: 4.7e-6 }) // 10.39 Ω with 100 µH, 33 µH, 4.7 µF
 * Source: nodal analysis; agrees with circuit simulation.
 */
export function outputPeak(
	corners: readonly Corner[],
	range: Interval,
	limit: number
): (part: CapacitorPart) => number {
	const span = Math.log10(range.to / range.from);
	const steps = Math.max(2, Math.ceil(span * PER_DECADE));
	const grid = Array.from({ length: steps + 1 }, (_, index) =>
		Math.min(range.to, range.from * 10 ** ((span * index) / steps))
	);
	const sampled = corners.map((corner) => ({
		corner,
		samples: grid.map((frequency) => sampleAt(corner, frequency))
	}));
	return (part) => {
		const summits = sampled.flatMap((corner) => summitsOf(corner, part));
		const highest = summits.reduce((most, { estimate }) => Math.max(most, estimate), 0);
		if (Math.abs(Math.log(highest / limit)) > CLEAR) return highest;
		return summits
			.filter(({ estimate }) => estimate >= WORTH_A_SEARCH * highest)
			.reduce((most, summit) => Math.max(most, refinedPeak(summit, part)), 0);
	};
}
