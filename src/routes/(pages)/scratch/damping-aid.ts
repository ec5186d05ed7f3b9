/** Damping branches that the page proposes, with values that can be bought and the peaks they leave. */
import type { Design, Source } from '$lib/design/design';
import { proposeDamping, type DampingProposal } from '$lib/network/damping';
import { outputPeak, type Peak } from '$lib/network/peak';
import { asymptoticInductance, type SourceModel } from '$lib/network/source';
import type { Interval } from '$lib/quantity/interval';
import { nearestPreferred } from '$lib/quantity/series';
import {
	capacitorPart,
	filterOf,
	partCurves,
	sourceCurves,
	sourceModel,
	uncovered
} from '$lib/rules/circuit';

export interface Branch {
	/** What it is designed for. */
	readonly name: string;
	readonly best: DampingProposal;
	/** Nearest preferred values, E12 and E6 [Ω], [F]. */
	readonly resistance: number;
	readonly capacitance: number;
	/** Exact peak with the preferred values [Ω]. */
	readonly bought: Peak;
}

export type Proposal =
	| { readonly ok: true; readonly branches: readonly Branch[]; readonly range: Interval }
	| { readonly ok: false; readonly reason: string };

const LOWEST_HZ = 10;

const inductanceOf = (model: SourceModel): number => {
	if (model.kind === 'measured') return 0;
	return model.kind === 'impedance' ? model.inductanceMax : asymptoticInductance(model);
};

/**
 * Proposes the best branch for L alone and for L with the source's inductance, both judged on that source.
 * @param ratio n = Cd/C, > 0
 */
export function dampingBranches(design: Design, source: Source, ratio: number): Proposal {
	const whole = { from: LOWEST_HZ, to: Math.min(...design.switching.map((entry) => entry.frequencyMin_Hz)) };
	const filter = filterOf(design);
	const model = sourceModel(design, source);
	const { capacitance_F: chosen } = design.choice;
	const choice = chosen === null ? null : capacitorPart(design, design.choice, chosen);
	const curves = [...partCurves(filter), ...sourceCurves(model), ...(choice?.curve ? [choice.curve] : [])];
	const range = {
		from: Math.max(whole.from, ...curves.map(({ first }) => first.frequency)),
		to: Math.min(whole.to, ...curves.map(({ last }) => last.frequency))
	};
	if (!(range.from < range.to)) return { ok: false, reason: uncovered(curves, whole) ?? '' };
	const { inductor, capacitor } = filter;
	const branch = (name: string, sourceInductance: number): Branch => {
		const best = proposeDamping(filter, ratio, { choice, source: model, range, sourceInductance });
		const resistance = nearestPreferred(best.resistance, 'E12');
		const capacitance = nearestPreferred(best.capacitance, 'E6');
		const bought = outputPeak(
			{ inductor, capacitor, damping: { resistance, capacitance } },
			choice,
			model,
			range
		);
		return { name, best, resistance, capacitance, bought };
	};
	const inductance = inductanceOf(model);
	return {
		ok: true,
		range,
		branches: [branch('L alone', 0), ...(inductance > 0 ? [branch('L and source', inductance)] : [])]
	};
}
