/** The evaluation as outside clients read it: JSON with the unit in each key, null for no end. */
import type { Band, Benefit, Candidate, Evaluation, Finding, Window } from './finding';
import { formulaText, partsText } from './formula';
import { METHODS } from './method';

const end = (value: number): number | null => (value > 0 && Number.isFinite(value) ? value : null);

const bandAnswer = ({ from, to, ...rest }: Band) => ({ from_F: end(from), to_F: end(to), ...rest });

const findingAnswer = ({ thumbEdges, formula, bands, ...finding }: Finding) => ({
	...finding,
	bands: bands.map(bandAnswer),
	formula: formula === null ? partsText(METHODS[finding.kind].formula) : formulaText(formula),
	...(thumbEdges === undefined
		? {}
		: { thumbEdges: thumbEdges.map(({ capacitance, label }) => ({ capacitance_F: capacitance, label })) })
});

const windowAnswer = (window: Window) => ({
	from_F: end(window.from),
	to_F: end(window.to),
	limitedBy: window.limitedBy,
	nominalFrom_F: window.nominalFrom,
	nominalTo_F: window.nominalTo,
	nominalEmpty: window.nominalEmpty,
	target_F: window.target,
	widthDecades: window.widthDecades,
	degenerate: window.degenerate
});

const benefitAnswer = ({ source, switching, harmonic, frequency, inductance, gain_dB }: Benefit) => ({
	source,
	switching,
	harmonic,
	frequency_Hz: frequency,
	inductance_H: inductance,
	gain_dB
});

const candidateAnswer = ({ capacitance, benefit, ...rest }: Candidate) => ({
	capacitance_F: capacitance,
	...rest,
	benefit: benefit.map(benefitAnswer)
});

/**
 * Writes an evaluation as the interface's JSON.
 * @param evaluation what evaluate() answered
 * @returns plain JSON; capacitance [F], frequency [Hz], inductance [H], gain [dB]; null for an end at 0 or without end
 * @example toAnswer(evaluate(chargerAuxiliary)).recommended_F // 3.3e-7
 * Source: the interface's own description.
 */
export function toAnswer(evaluation: Evaluation) {
	return {
		engine: evaluation.engine,
		findings: evaluation.findings.map(findingAnswer),
		windows: evaluation.windows.map(windowAnswer),
		candidates: evaluation.candidates.map(candidateAnswer),
		recommended_F: evaluation.recommended,
		choice: evaluation.choice,
		conflict: evaluation.conflict,
		benefit: evaluation.benefit.map(benefitAnswer)
	};
}

/** The interface's JSON. */
export type Answer = ReturnType<typeof toAnswer>;
