/** The filter's output impedance against the converter's negative input resistance. */
import type { Design, ImpedanceSource, InputStabilityRule } from '$lib/design/design';
import { capacitorPart, cornersOf, filterOf, firstGap, partCurves } from './circuit';
import type { Finding } from './finding';
import { computed, given, parts, symbol } from './formula';
import { sourceOf } from './lines';
import type { Method } from './method';
import { evaluated, notApplicable, notEvaluated } from './outcome';
import { outputPeak, type Corner } from './output-peak';
import { scanBands } from './scan';
import { bandsParts, worded } from './wording';

export const INPUT_STABILITY: Method = {
	kind: 'input-stability',
	name: 'Input stability',
	formula: parts`max|${symbol('Z', 'o')}| ≤ ${symbol('V', 'min')}²/(${symbol('P')}·${symbol('m')})`,
	rationale:
		'A converter that draws constant power is a negative resistance, and an undamped filter before it oscillates.',
	derivation: [
		'A closed-loop converter draws P at any voltage: its input resistance is −V²/P, smallest in size at the lowest voltage. Where the filter’s output impedance stays under V_min²/P divided by a margin m of two or three, the loop gain of the two stays under one.',
		'The output impedance seen from the converter is Z_C in parallel with Z_L plus the source beside Cx. Its highest peak from 10 Hz to the lowest switching frequency is sought at the worst corner of tolerances and source inductance.'
	],
	source: { text: 'Middlebrook’s criterion for input filters.', status: 'recalled' },
	assumptions: ['Constant-power load with full bandwidth; sufficient, not necessary.'],
	misleads: [
		'The inductance of the source moves the peak far more than Cx does: 100 µH raised it 2.7-fold in an example where Cx added 3 %. Damping must be designed for L and the source inductance together.',
		'The bound on Cx is usually slack; the rule chiefly finds combinations without damping.'
	],
	cautions: ['Series resistances that are left out make the peak without bound.']
};

/** The search begins here [Hz]. */
const LOWEST = 10;

const stabilityCorners = (design: Design, source: ImpedanceSource): Corner[] =>
	cornersOf(design).flatMap((filter) =>
		[...new Set([source.inductanceMin_H, source.inductanceMax_H])].map((inductance) => ({
			filter,
			resistance: source.resistance_ohm,
			inductance
		}))
	);

/** Names what has no damping at all, because its peak has no bound. */
const undamped = ({ damping, inductor, capacitor }: Design, source: ImpedanceSource): readonly string[] => {
	const losses = [source.resistance_ohm, inductor.resistance_ohm ?? 0, capacitor.esr_ohm ?? 0];
	if (damping !== undefined || inductor.curve !== undefined || capacitor.curve !== undefined) return [];
	if (losses.some((loss) => loss > 0))
		return ['L and C have no damping branch; only series resistance limits the peak.'];
	return ['L, C and the source have neither damping nor losses: the peak has no bound.'];
};

/**
 * Forbids every Cx with which the output impedance peaks above V_min²/(P·m), 10 Hz to the lowest switching frequency.
 * @param design the worksheet's design; needs the load
 * @param rule source, margin m
 * @returns a finding with one or more bands [F]; not-applicable on ac, not-evaluated without load, Ls and Rs
 * @example inputStability(design, { source: 'bus', margin: 2, … }).state // 'evaluated'
 * Source: Middlebrook's criterion (recalled); edges by scan and bisection.
 */
export function inputStability(design: Design, rule: InputStabilityRule): Finding {
	if (design.supply.kind === 'ac') {
		return notApplicable(
			rule,
			INPUT_STABILITY,
			'Behind a rectifier the criterion is one of the DC link, not of Cx.'
		);
	}
	const source = sourceOf(design, rule.source);
	const { load } = design;
	if (load === undefined)
		return notEvaluated(rule, INPUT_STABILITY, 'The load is missing: enter its power and lowest voltage.');
	if (source.kind !== 'impedance') {
		return notEvaluated(
			rule,
			INPUT_STABILITY,
			`${source.label} is not given as inductance and resistance: name such a source.`
		);
	}
	const lowest = Math.min(...design.switching.map((entry) => entry.frequencyMin_Hz));
	const range = { from: Math.min(LOWEST, lowest), to: lowest };
	const gap = firstGap(partCurves(filterOf(design)), [range]);
	if (gap !== null) return notEvaluated(rule, INPUT_STABILITY, gap);
	const limit = load.voltageMin_V ** 2 / load.power_W / rule.margin;
	const peak = outputPeak(stabilityCorners(design, source), range, limit);
	const { curve: _, ...unmeasured } = design.choice;
	const bands = scanBands((capacitance) => peak(capacitorPart(design, unmeasured, capacitance)) / limit);
	const cause = `Output impedance above ${worded(limit, 'resistance')} on ${source.label}`;
	return evaluated(rule, INPUT_STABILITY, {
		bands: bands.map((band) => ({ ...band, cause, source: source.id })),
		formula: {
			general: INPUT_STABILITY.formula,
			numbers: parts`(${given(load.voltageMin_V, 'voltage')})²/(${given(load.power_W, 'power')} · ${given(rule.margin, 'number')}) = ${computed(limit, 'resistance', 'down')}`,
			result: bandsParts(bands)
		},
		cautions: undamped(design, source)
	});
}
