/** The distance kept from the resonance of Cx with L and the source at every line. */
import type { Design, ResonanceGuardRule, Source } from '$lib/design/design';
import type { Filter } from '$lib/network/filter';
import { approximateWorstCapacitance, cornerFrequency } from '$lib/network/resonance';
import { asymptoticInductance } from '$lib/network/source';
import type { FilterBox } from '$lib/network/worst-range';
import { uniteOpen, type Interval } from '$lib/quantity/interval';
import { filterOf, firstGap, partCurves, sourceCurves, sourceModel } from './circuit';
import type { Band, Finding, Formula, FormulaPart } from './finding';
import { computed, given, parts, symbol } from './formula';
import { linesOf, sourceOf, type Line } from './lines';
import type { Method } from './method';
import { evaluated, notEvaluated } from './outcome';
import { toleranceInterval } from './tolerance';
import { plain, worded, wordedRange } from './wording';
import { worstRanges } from './worst-capacitance';

export const RESONANCE_GUARD: Method = {
	kind: 'resonance-guard',
	name: 'Resonance guard',
	formula: parts`${symbol('C', 'x')} outside ${symbol('C', '0')}/${symbol('k')}² … ${symbol('k')}²·${symbol('C', '0')}`,
	rationale:
		'Where Cx resonates with L and the source at a line, it makes that line worse instead of better.',
	derivation: [
		'At a frequency f the emission is divided by |1 + jωCx/Y_p|, Y_p being the admittance seen at the line-side node without Cx. The worst Cx cancels its imaginary part: C0 = −Im(Y_p)/ω. Damping by the network’s resistance limits the depth but does not move it.',
		'Where C is nearly a short and the source an inductance Ls, this is C0 = 1/((2πf)²·L∥Ls). A ratio k kept in frequency is k² in capacitance, since f falls with the root of C.',
		'The exact form takes C0 from the whole network with its real parts and Cx ideal. Both forms unite the bands over the ranges of frequency, of L and of the source inductance, the exact one also over the tolerance of C, and over every harmonic with its own ratio.'
	],
	source: {
		text: 'Nodal analysis of the ladder; the ratio of two is a convention.',
		status: 'common practice'
	},
	assumptions: ['Lines stay in the stated ranges; the other parts keep their tolerances.'],
	misleads: [
		'Every Cx below 2·C0 makes its line worse than no Cx at all; the zone below the band only limits the harm (2.5 dB for a ratio of two) and often puts a harmonic on the resonance.',
		'The approximate form is more than 5 % off where the line lies under 4.6 times the resonance of L and C, and fails at it.',
		'A source that may have almost no inductance forbids everything above: some length of cable always resonates. A pass on the test network says nothing of the installation.'
	],
	cautions: [
		'Count burst mode, frequency foldback, dither and loss of synchronisation into the frequency range.'
	]
};

/** The rule of thumb is drawn beside the exact band from this difference in capacitance on. */
const THUMB_DIFFERENCE = 0.05;

const guardOf = (rule: ResonanceGuardRule, line: Line): number =>
	line.harmonic === 1 ? rule.guard : rule.harmonicGuard;

const guardedLines = (design: Design, rule: ResonanceGuardRule): Line[] =>
	linesOf(design).filter((line) => line.harmonic === 1 || rule.harmonicGuard > 1);

const inductanceRange = (source: Source): Interval | null => {
	if (source.kind === 'measured') return null;
	if (source.kind === 'impedance') return { from: source.inductanceMin_H, to: source.inductanceMax_H };
	const inductance = asymptoticInductance(source);
	return { from: inductance, to: inductance };
};

const thumbRange = (design: Design, line: Line, source: Interval): Interval => {
	const { inductance_H: inductance, toleranceMinus, tolerancePlus } = design.inductor;
	return {
		from: approximateWorstCapacitance(line.to, inductance * (1 + tolerancePlus), source.to),
		to: approximateWorstCapacitance(line.from, inductance * (1 - toleranceMinus), source.from)
	};
};

/** The highest frequency at which L and C can resonate: the approximation needs every line above it. */
const highestCorner = ({ inductor, capacitor }: Design): number => {
	const inductance = inductor.inductance_H * (1 - inductor.toleranceMinus);
	const capacitance = capacitor.capacitance_F * (1 - capacitor.toleranceMinus);
	return cornerFrequency(inductance, capacitance);
};

interface GuardedRange {
	readonly line: Line;
	readonly guard: number;
	/** Range of C0 [F]. */
	readonly worst: Interval;
}

const bandOf = (source: Source, { line, guard, worst }: GuardedRange): Band => {
	const order = line.harmonic === 1 ? '' : ` (n = ${String(line.harmonic)})`;
	return {
		from: worst.from / guard ** 2,
		to: worst.to * guard ** 2,
		cause: `Resonance of L and ${source.label} at ${wordedRange(line.from, line.to, 'frequency', plain)}${order}`,
		source: source.id,
		switching: line.switching.id,
		harmonic: line.harmonic
	};
};

const rangeParts = ({ from, to }: Interval): FormulaPart[] => {
	if (from === 0)
		return to === Infinity ? parts`every capacitance` : parts`below ${computed(to, 'capacitance', 'up')}`;
	if (to === Infinity) return parts`above ${computed(from, 'capacitance', 'down')}`;
	return parts`${computed(from, 'capacitance', 'down')} … ${computed(to, 'capacitance', 'up')}`;
};

const formulaOf = (ranges: readonly GuardedRange[], bands: readonly Band[]): Formula => {
	const first = ranges[0];
	const united = uniteOpen(bands);
	const result = united
		.slice(0, 2)
		.flatMap((band, index) => [...(index === 0 ? [] : parts`, `), ...rangeParts(band)]);
	const more = united.length > 2 ? parts` and ${String(united.length - 2)} more` : [];
	const guard =
		first === undefined ? [] : parts`, 1/${given(first.guard, 'number')}² … ${given(first.guard, 'number')}²`;
	return {
		general: RESONANCE_GUARD.formula,
		numbers:
			first === undefined
				? []
				: [
						...parts`${symbol('C', '0')} ${wordedRange(first.worst.from, first.worst.to, 'capacitance')}`,
						...guard
					],
		result: united.length === 0 ? parts`no limit` : [...result, ...more]
	};
};

const approximate = (design: Design, rule: ResonanceGuardRule, source: Source): Finding => {
	const inductances = inductanceRange(source);
	if (inductances === null) {
		return notEvaluated(
			rule,
			RESONANCE_GUARD,
			`${source.label} is a measured curve without an inductance: use the exact method.`
		);
	}
	const corner = highestCorner(design);
	const low = design.switching.find((entry) => entry.frequencyMin_Hz <= corner);
	if (low !== undefined) {
		const reason = `${plain(low.frequencyMin_Hz, 'frequency')} is not above the resonance of L and C, up to ${worded(corner, 'frequency')}: use the exact method.`;
		return notEvaluated(rule, RESONANCE_GUARD, reason);
	}
	const ranges = guardedLines(design, rule).map((line) => ({
		line,
		guard: guardOf(rule, line),
		worst: thumbRange(design, line, inductances)
	}));
	const bands = ranges.map((range) => bandOf(source, range));
	return evaluated(rule, RESONANCE_GUARD, {
		bands,
		formula: formulaOf(ranges, bands),
		assumptions: ['C is taken as a short and the source as its inductance alone.']
	});
};

const boxOf = (design: Design, filter: Filter): FilterBox => ({
	filter,
	inductance: toleranceInterval(design.inductor.inductance_H, design.inductor),
	capacitance: toleranceInterval(design.capacitor.capacitance_F, design.capacitor)
});

/** Names the rule of thumb's edges beside a band from which they differ by more than 5 %. */
const thumbEdgesOf = (
	design: Design,
	source: Source,
	ranges: readonly GuardedRange[]
): NonNullable<Finding['thumbEdges']> => {
	const inductances = inductanceRange(source);
	if (inductances === null) return [];
	const differs = (thumb: number, exact: number): boolean => Math.abs(thumb / exact - 1) > THUMB_DIFFERENCE;
	return ranges.flatMap(({ line, guard, worst }) => {
		if (line.from <= highestCorner(design)) return [];
		const thumb = thumbRange(design, line, inductances);
		const order = line.harmonic === 1 ? '' : `, n = ${String(line.harmonic)}`;
		return [
			{ thumb: thumb.from / guard ** 2, exact: worst.from / guard ** 2 },
			{ thumb: thumb.to * guard ** 2, exact: worst.to * guard ** 2 }
		]
			.filter(
				(edge) =>
					Number.isFinite(edge.thumb) && Number.isFinite(edge.exact) && differs(edge.thumb, edge.exact)
			)
			.map((edge) => ({ capacitance: edge.thumb, label: `rule of thumb${order}` }));
	});
};

const measuredParts = ({ inductor, capacitor }: Design): readonly string[] =>
	inductor.curve === undefined && capacitor.curve === undefined
		? []
		: ['A measured curve stands for its part as it is, without tolerance.'];

const exact = (design: Design, rule: ResonanceGuardRule, source: Source): Finding => {
	const [filter, model] = [filterOf(design), sourceModel(design, source)];
	const lines = guardedLines(design, rule);
	const gap = firstGap([...partCurves(filter), ...sourceCurves(model)], lines);
	if (gap !== null) return notEvaluated(rule, RESONANCE_GUARD, gap);
	const box = boxOf(design, filter);
	const ranges = lines.flatMap((line) =>
		worstRanges(box, model, line).map((worst) => ({ line, guard: guardOf(rule, line), worst }))
	);
	const bands = ranges.map((range) => bandOf(source, range));
	return evaluated(rule, RESONANCE_GUARD, {
		bands,
		formula: formulaOf(ranges, bands),
		assumptions: ['The whole network with real parts; Cx itself ideal.', ...measuredParts(design)],
		thumbEdges: thumbEdgesOf(design, source, ranges)
	});
};

/**
 * Keeps Cx away from resonance at every line: (C0/k², k²·C0) united over ranges and tolerances.
 * @param design the worksheet's design
 * @param rule source, guard k for n = 1 and for n ≥ 2, method
 * @returns a finding with a band per line [F]; not-evaluated where the method does not reach or a curve has no data
 * @example resonanceGuard(design, { source: 'amn', guard: 2, method: 'approximate', … }).bands[0].to // 9.795e-8
 * Source: common practice.
 */
export function resonanceGuard(design: Design, rule: ResonanceGuardRule): Finding {
	const source = sourceOf(design, rule.source);
	return rule.method === 'approximate' ? approximate(design, rule, source) : exact(design, rule, source);
}
