/** The least benefit that Cx must bring at every line. */
import type { Design, MinimumBenefitRule } from '$lib/design/design';
import { benefitFinder, type BenefitFinder } from '$lib/network/benefit';
import type { CapacitorPart } from '$lib/network/filter';
import { capacitorPart, filterOf, firstGap, partCurves, sourceCurves, sourceModel } from './circuit';
import type { Finding } from './finding';
import { given, parts, symbol } from './formula';
import { linesOf, sourceOf } from './lines';
import type { Method } from './method';
import { evaluated, notEvaluated } from './outcome';
import { scanBands } from './scan';
import { bandsParts, plain } from './wording';
import { resonantCapacitances } from './worst-capacitance';

export const MINIMUM_BENEFIT: Method = {
	kind: 'minimum-benefit',
	name: 'Minimum benefit',
	formula: parts`20·log|1 + j2π${symbol('f')}·${symbol('C', 'x')}/${symbol('Y', 'p')}| ≥ ${symbol('G')}`,
	rationale: 'A capacitor that hardly helps is not worth its place.',
	derivation: [
		'With the noise current taken to the line-side node as a Norton source, the emission without Cx stands to that with Cx as |Y_p + Y_x| to |Y_p|: the benefit is 20·log|1 + Y_x/Y_p| whatever is measured at the source.',
		'It is taken at its minimum over the frequency range and the range of the source inductance, parts nominal and real, at every line at or above the stated frequency.'
	],
	source: {
		text: 'Nodal analysis of the ladder; agrees with circuit simulation to 0.001 dB.',
		status: 'textbook'
	},
	assumptions: ['The converter is a current source at the terminals of C; parts nominal.'],
	misleads: [
		'It is a gain against no Cx, not the level at the receiver: a large gain on a line that was far under the limit is worth nothing.'
	],
	cautions: ['Differential mode only.']
};

/** A shortfall of this many dB needs no further line to be looked at. */
const ENOUGH = 10;

/** How many times the emission exceeds what the minimum allows; the line that failed last is asked first. */
const shortfall = (finders: readonly BenefitFinder[], minimum: number): ((part: CapacitorPart) => number) => {
	let hardest = 0;
	return (part) => {
		let least = finders[hardest]?.worst(part).gain_dB ?? Infinity;
		for (const [index, finder] of finders.entries()) {
			if (least < minimum - ENOUGH) break;
			if (index === hardest) continue;
			const gain = finder.worst(part).gain_dB;
			if (gain < least) [least, hardest] = [gain, index];
		}
		return 10 ** ((minimum - Math.max(least, minimum - ENOUGH)) / 20);
	};
};

/**
 * Forbids every Cx whose benefit on the source is under the minimum at any line at or above the stated frequency.
 * @param design the worksheet's design
 * @param rule source, minimum [dB], lowest frequency that counts [Hz]
 * @returns a finding with one or more bands [F]; not-evaluated where a curve has no data or no line counts
 * @example minimumBenefit(design, { source: 'amn', minimum_dB: 20, … }).bands[0].from // 0
 * Source: nodal analysis of the ladder; edges by scan and bisection.
 */
export function minimumBenefit(design: Design, rule: MinimumBenefitRule): Finding {
	const source = sourceOf(design, rule.source);
	const [filter, model] = [filterOf(design), sourceModel(design, source)];
	const { curve: _, ...unmeasured } = design.choice;
	const lines = linesOf(design)
		.filter((line) => line.to >= rule.frequencyFrom_Hz)
		.map((line) => ({ ...line, from: Math.max(line.from, rule.frequencyFrom_Hz) }));
	if (lines.length === 0) {
		return notEvaluated(
			rule,
			MINIMUM_BENEFIT,
			`No line lies at or above ${plain(rule.frequencyFrom_Hz, 'frequency')}: enter more harmonics.`
		);
	}
	const gap = firstGap([...partCurves(filter), ...sourceCurves(model)], lines);
	if (gap !== null) return notEvaluated(rule, MINIMUM_BENEFIT, gap);
	const finders = lines.map((line) => benefitFinder(filter, model, line));
	const ratio = shortfall(finders, rule.minimum_dB);
	const partOf = (capacitance: number): CapacitorPart => capacitorPart(design, unmeasured, capacitance);
	const bands = scanBands(
		(capacitance) => ratio(partOf(capacitance)),
		rule.minimum_dB < 0 ? resonantCapacitances(filter, model, lines) : []
	);
	const cause = `Benefit under ${plain(rule.minimum_dB, 'gain')} on ${source.label}`;
	return evaluated(rule, MINIMUM_BENEFIT, {
		bands: bands.map((band) => ({ ...band, cause, source: source.id })),
		formula: {
			general: MINIMUM_BENEFIT.formula,
			numbers: parts`${given(rule.minimum_dB, 'gain')} from ${given(rule.frequencyFrom_Hz, 'frequency')}`,
			result: bandsParts(bands)
		}
	});
}
