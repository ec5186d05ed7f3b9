/** The design's parts as the network room takes them. */
import type { Capacitor, CapacitorParasitics, Design, Inductor, Source } from '$lib/design/design';
import { covers, impedanceCurve, type ImpedanceCurve } from '$lib/network/curve';
import type { CapacitorPart, Filter, InductorPart } from '$lib/network/filter';
import type { SourceModel } from '$lib/network/source';
import type { Interval } from '$lib/quantity/interval';
import { toleranceInterval } from './tolerance';
import { wordedRange } from './wording';

const curveOf = (design: Pick<Design, 'curves'>, id: string): ImpedanceCurve => {
	const curve = design.curves?.find((entry) => entry.id === id);
	if (curve === undefined) throw new RangeError(`no curve has the id ${id}`);
	return impedanceCurve(curve);
};

/**
 * Takes a capacitor with its series resistance and inductance, or its measured curve.
 * @param design the worksheet's design, for its curves
 * @param part C or the choice
 * @param capacitance what it is taken to be [F]
 * @returns the part
 * @throws RangeError when the design lacks the curve, which a parsed design never does
 * @example capacitorPart(design, design.capacitor, 2.2e-6).capacitance // 2.2e-6
 * Source: common practice.
 */
export function capacitorPart(
	design: Pick<Design, 'curves'>,
	part: CapacitorParasitics,
	capacitance: number
): CapacitorPart {
	return {
		capacitance,
		...(part.esr_ohm === undefined ? {} : { esr: part.esr_ohm }),
		...(part.esl_H === undefined ? {} : { esl: part.esl_H }),
		...(part.curve === undefined ? {} : { curve: curveOf(design, part.curve) })
	};
}

const inductorPart = (design: Design, part: Inductor): InductorPart => ({
	inductance: part.inductance_H,
	...(part.resistance_ohm === undefined ? {} : { resistance: part.resistance_ohm }),
	...(part.parallelCapacitance_F === undefined ? {} : { parallelCapacitance: part.parallelCapacitance_F }),
	...(part.curve === undefined ? {} : { curve: curveOf(design, part.curve) })
});

const nominalCapacitor = (design: Design, part: Capacitor): CapacitorPart =>
	capacitorPart(design, part, part.capacitance_F);

/**
 * Builds the filter with nominal, real parts.
 * @param design the worksheet's design
 * @returns the filter without Cx
 * @throws RangeError when the design lacks a curve it names
 * @example filterOf(chargerAuxiliary).inductor.inductance // 2.2e-4
 * Source: common practice.
 */
export function filterOf(design: Design): Filter {
	const { damping } = design;
	const filter = {
		inductor: inductorPart(design, design.inductor),
		capacitor: nominalCapacitor(design, design.capacitor)
	};
	if (damping === undefined) return filter;
	return { ...filter, damping: { resistance: damping.resistance_ohm, capacitance: damping.capacitance_F } };
}

/**
 * Builds the model of a source.
 * @param design the worksheet's design, for its curves
 * @param source one of its sources
 * @returns the model
 * @throws RangeError when the design lacks a curve it names
 * @example sourceModel(design, design.sources[0]).kind // 'amn-50uH-5ohm'
 * Source: common practice.
 */
export function sourceModel(design: Pick<Design, 'curves'>, source: Source): SourceModel {
	if (source.kind === 'measured') return { kind: 'measured', curve: curveOf(design, source.curve) };
	if (source.kind !== 'impedance') return { kind: source.kind, networks: source.networks };
	return {
		kind: 'impedance',
		resistance: source.resistance_ohm,
		inductanceMin: source.inductanceMin_H,
		inductanceMax: source.inductanceMax_H
	};
}

/**
 * Lists the measured curves that stand for parts of the filter.
 * @param filter the filter
 * @returns curves
 * @example partCurves(filterOf(chargerAuxiliary)) // []
 * Source: common practice.
 */
export function partCurves({ inductor, capacitor }: Filter): ImpedanceCurve[] {
	return [inductor.curve, capacitor.curve].filter((curve) => curve !== undefined);
}

/**
 * Lists the measured curve that stands for a source.
 * @param source the model
 * @returns the curve alone, or nothing
 * @example sourceCurves({ kind: 'an-5uH', networks: 1 }) // []
 * Source: common practice.
 */
export function sourceCurves(source: SourceModel): ImpedanceCurve[] {
	return source.kind === 'measured' ? [source.curve] : [];
}

/**
 * Says where a curve was not measured that a frequency range needs.
 * @param curves curves in use
 * @param range frequencies needed [Hz]
 * @returns a sentence, or null where all curves cover the range
 * @example uncovered([], { from: 126e3, to: 138e3 }) // null
 * Source: a curve is never extrapolated.
 */
export function uncovered(curves: readonly ImpedanceCurve[], range: Interval): string | null {
	const short = curves.find((curve) => !covers(curve, range.from) || !covers(curve, range.to));
	if (short === undefined) return null;
	const measured = wordedRange(short.first.frequency, short.last.frequency, 'frequency');
	return `A measured curve covers ${measured} and not ${wordedRange(range.from, range.to, 'frequency')}: measure further, or leave the curve out.`;
}

/**
 * Says of the first line that needs more than a curve covers.
 * @param curves curves in use
 * @param lines frequency ranges needed [Hz]
 * @returns a sentence, or null where all curves cover all lines
 * @example firstGap([], lines) // null
 * Source: a curve is never extrapolated.
 */
export function firstGap(curves: readonly ImpedanceCurve[], lines: readonly Interval[]): string | null {
	return lines.map((line) => uncovered(curves, line)).find((gap) => gap !== null) ?? null;
}

const ends = ({ from, to }: Interval): number[] => (from === to ? [from] : [from, to]);

/**
 * Lists the four corners of the tolerances of L and C; one where there are none.
 * @param design the worksheet's design
 * @returns filters without Cx
 * @example cornersOf(chargerAuxiliary).length // 4
 * Source: worst case, arithmetical.
 */
export function cornersOf(design: Design): Filter[] {
	const filter = filterOf(design);
	const inductances = ends(toleranceInterval(design.inductor.inductance_H, design.inductor));
	const capacitances = ends(toleranceInterval(design.capacitor.capacitance_F, design.capacitor));
	return inductances.flatMap((inductance) =>
		capacitances.map((capacitance) => ({
			...filter,
			inductor: { ...filter.inductor, inductance },
			capacitor: { ...filter.capacitor, capacitance }
		}))
	);
}
