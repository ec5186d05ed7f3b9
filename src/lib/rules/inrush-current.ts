/** The peak of the current that rushes in at switch-on. */
import type { Design, ImpedanceSource, InrushCurrentRule, Supply } from '$lib/design/design';
import { peakSourceCurrent } from '$lib/network/transient';
import { capacitorPart, filterOf } from './circuit';
import type { Finding, Formula } from './finding';
import { computed, given, parts, symbol } from './formula';
import { sourceOf } from './lines';
import type { Method } from './method';
import { evaluated, notEvaluated } from './outcome';
import { scanBands } from './scan';
import { limitingCapacitance } from './series-circuit';
import { toleranceInterval } from './tolerance';
import { bandsParts, plain } from './wording';

export const INRUSH_CURRENT: Method = {
	kind: 'inrush-current',
	name: 'Inrush current',
	formula: parts`${symbol('V')}·√(${symbol('C', 'x')}/${symbol('L', 's')})·d(${symbol('ζ')}) ≤ ${symbol('I')}`,
	rationale: 'Switched on at the peak of the voltage, the empty capacitors draw a surge through the source.',
	derivation: [
		'A step V into Ls, Rs and the discharged Cx gives the peak (V/Z0)·exp(−ζ·acos ζ/√(1 − ζ²)) with Z0 = √(Ls/Cx) and ζ = (Rs/2)·√(Cx/Ls); above ζ = 1 acosh and √(ζ² − 1) take their places, and the peak tends to V/Rs.',
		'The peak rises with Cx throughout, so one limit results. V is the peak of the highest mains voltage (on dc the highest voltage), and Ls its smallest value.',
		'With the capacitor C included, the whole linear network is solved at its smallest L and largest C: then the peak need not rise with Cx, and several bands may result.'
	],
	source: {
		text: 'Step response of a series circuit; of the whole network by its natural modes.',
		status: 'textbook'
	},
	assumptions: [
		'All capacitors empty; closing at the peak of the voltage; a linear circuit without rectifier, thermistor or relay.'
	],
	misleads: [
		'The capacitor C behind L usually dominates: 4.7 µF draws 58 A where 470 nF alone draw 22 A. Include it where no other part limits it.',
		'Rectifier, thermistor, contact and the fuse’s I²t are the true limits.'
	],
	cautions: ['The fuse and the switch must be judged by their own data, I²t among them.']
};

/**
 * Works out the height of the step at the worst instant: √2·V_max on ac, V_max on dc.
 * @param supply the design's supply
 * @returns step [V]
 * @example stepVoltage({ kind: 'ac', voltageMax_V: 253, … }) // 357.8
 * Source: common practice.
 */
export function stepVoltage(supply: Pick<Supply, 'kind' | 'voltageMax_V'>): number {
	return supply.kind === 'ac' ? Math.SQRT2 * supply.voltageMax_V : supply.voltageMax_V;
}

/** L at its smallest and C at its largest, with everything empty: the hardest that the network is driven. */
const wholeNetwork = (design: Design, rule: InrushCurrentRule, source: ImpedanceSource): Finding => {
	if (design.inductor.curve !== undefined || design.capacitor.curve !== undefined) {
		return notEvaluated(
			rule,
			INRUSH_CURRENT,
			'A measured curve gives no transient: enter L and C as values, without a curve.'
		);
	}
	const nominal = filterOf(design);
	const filter = {
		...nominal,
		inductor: {
			...nominal.inductor,
			inductance: toleranceInterval(design.inductor.inductance_H, design.inductor).from
		},
		capacitor: {
			...nominal.capacitor,
			capacitance: toleranceInterval(design.capacitor.capacitance_F, design.capacitor).to
		}
	};
	const voltage = stepVoltage(design.supply);
	const step = { voltage, inductance: source.inductanceMin_H, resistance: source.resistance_ohm };
	const { curve: _, ...unmeasured } = design.choice;
	const bands = scanBands(
		(capacitance) =>
			peakSourceCurrent(step, capacitorPart(design, unmeasured, capacitance), filter) / rule.limit_A
	);
	const cause = `Inrush of Cx and C above ${plain(rule.limit_A, 'current')} from ${source.label}`;
	return evaluated(rule, INRUSH_CURRENT, {
		bands: bands.map((band) => ({ ...band, cause, source: source.id })),
		formula: {
			general: parts`${symbol('Î')}(${symbol('C', 'x')}, ${symbol('C')}) ≤ ${symbol('I')}`,
			numbers: parts`${given(rule.limit_A, 'current')}, ${computed(voltage, 'voltage')}, ${given(step.inductance, 'inductance')}, ${given(step.resistance, 'resistance')}`,
			result: bandsParts(bands)
		},
		assumptions: [
			'L at its smallest and C at its largest value; series resistances and damping as given, self-inductances left out.'
		]
	});
};

/**
 * Forbids every Cx whose inrush exceeds the limit: (Cx*, ∞) for Cx alone, Cx* by bisection.
 * @param design the worksheet's design
 * @param rule source, limit [A], whether C is included
 * @returns a finding with its bands [F]; not-evaluated for a source that is not given as Ls and Rs
 * @example inrushCurrent(design, { source: 'mains', limit_A: 40, … }).bands[0].from // 6.714e-7 at 50 µH, 0.4 Ω
 * Source: textbook.
 */
export function inrushCurrent(design: Design, rule: InrushCurrentRule): Finding {
	const source = sourceOf(design, rule.source);
	if (source.kind !== 'impedance') {
		return notEvaluated(
			rule,
			INRUSH_CURRENT,
			`${source.label} is not given as inductance and resistance: name such a source.`
		);
	}
	if (rule.includeCapacitor) return wholeNetwork(design, rule, source);
	const voltage = stepVoltage(design.supply);
	const step = { voltage, inductance: source.inductanceMin_H, resistance: source.resistance_ohm };
	const limit = limitingCapacitance(step, rule.limit_A);
	const cause = `Inrush above ${plain(rule.limit_A, 'current')} from ${source.label}`;
	const formula: Formula = {
		general: INRUSH_CURRENT.formula,
		numbers: parts`${given(rule.limit_A, 'current')}, ${computed(voltage, 'voltage')}, ${given(step.inductance, 'inductance')}, ${given(step.resistance, 'resistance')}`,
		result:
			limit === Infinity
				? parts`no limit`
				: parts`${symbol('C', 'x')} ≤ ${computed(limit, 'capacitance', 'down')}`
	};
	return evaluated(rule, INRUSH_CURRENT, {
		bands: limit === Infinity ? [] : [{ from: limit, to: Infinity, cause, source: source.id }],
		formula
	});
}
