/** The benefit of a nominal value at every line of every source. */
import type { Design } from '$lib/design/design';
import { benefitFinder, type BenefitFinder, type WorstBenefit } from '$lib/network/benefit';
import type { ImpedanceCurve } from '$lib/network/curve';
import type { SourceModel } from '$lib/network/source';
import { relativelyEqual, type Interval } from '$lib/quantity/interval';
import { capacitorPart, filterOf, partCurves, sourceCurves, sourceModel, uncovered } from './circuit';
import type { Benefit } from './finding';
import { linesOf } from './lines';

/** Gains of one nominal value, and the lines of which a measured curve knows nothing. */
export interface Gains {
	readonly benefits: readonly Benefit[];
	/** In words, one per line. */
	readonly gaps: readonly string[];
}

interface MeteredLine {
	readonly benefit: Pick<Benefit, 'source' | 'switching' | 'harmonic'>;
	readonly range: Interval;
	readonly label: string;
	readonly model: SourceModel;
	readonly curves: readonly ImpedanceCurve[];
	readonly finder: () => BenefitFinder;
}

/** An inductance read back from a reactance misses the end of its range by rounding. */
const onEnd = (worst: WorstBenefit, model: SourceModel): WorstBenefit => {
	if (model.kind !== 'impedance' || worst.inductance === null) return worst;
	const { inductance } = worst;
	const end = [model.inductanceMin, model.inductanceMax].find((value) =>
		relativelyEqual(value, inductance, 1e-9)
	);
	return end === undefined ? worst : { ...worst, inductance: end };
};

/** Samples of the network are taken when they are first asked for, and serve every value after that. */
const meteredLines = (design: Design): MeteredLine[] => {
	const filter = filterOf(design);
	return design.sources.flatMap((source) => {
		const model = sourceModel(design, source);
		const curves = [...partCurves(filter), ...sourceCurves(model)];
		return linesOf(design).map((line): MeteredLine => {
			let finder: BenefitFinder | null = null;
			return {
				benefit: { source: source.id, switching: line.switching.id, harmonic: line.harmonic },
				range: line,
				label: source.label,
				model,
				curves,
				finder: () => (finder ??= benefitFinder(filter, model, line))
			};
		});
	});
};

/**
 * Prepares the benefits of a design: for every source and line the least gain over the frequency range and the range
 * of the source's inductance, other parts nominal and real, Cx with the choice's resistance and inductance.
 * @param design the worksheet's design
 * @returns a function from a nominal value [F] to its gains [dB]
 * @example benefitMeter(chargerAuxiliary)(330e-9).benefits[0].gain_dB // 21.05
 * Source: nodal analysis of the ladder.
 */
export function benefitMeter(design: Design): (capacitance: number) => Gains {
	const lines = meteredLines(design);
	const { choice } = design;
	const { curve: _, ...unmeasured } = choice;
	return (capacitance) => {
		const part = capacitorPart(
			design,
			capacitance === choice.capacitance_F ? choice : unmeasured,
			capacitance
		);
		const benefits: Benefit[] = [];
		const gaps: string[] = [];
		const measured = part.curve === undefined ? [] : [part.curve];
		for (const { benefit, range, label, curves, model, finder } of lines) {
			const gap = uncovered([...curves, ...measured], range);
			if (gap === null) benefits.push({ ...benefit, ...onEnd(finder().worst(part), model) });
			else gaps.push(`No benefit known on ${label}. ${gap}`);
		}
		return { benefits, gaps };
	};
}
