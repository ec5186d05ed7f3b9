/** From a design to all that its rules say: findings, windows, candidates, recommendation, conflict. */
import type { Design } from '$lib/design/design';
import { benefitMeter } from './benefit';
import { candidatesOf, recommendedOf } from './candidates';
import { conflictOf } from './conflict';
import { ENGINE_VERSION } from './engine';
import type { Evaluation } from './finding';
import { findingsOf } from './table';
import { verdictOf } from './verdict';
import { closingBands, windowsOf } from './windows';

/**
 * Evaluates a design.
 * @param design a parsed design, SI units
 * @returns findings, windows [F], candidates, recommendation [F], verdict on the choice, conflict, benefits [dB]
 * @example evaluate(chargerAuxiliary).recommended // 3.3e-7
 * Source: the rules' own sources; the algebra of bands and windows is textbook.
 */
export function evaluate(design: Design): Evaluation {
	const findings = findingsOf(design);
	const windows = windowsOf(closingBands(findings), design.choice);
	const gainsOf = benefitMeter(design);
	const candidates = candidatesOf(design, windows, findings, gainsOf);
	const chosen = design.choice.capacitance_F;
	const gains = chosen === null ? { benefits: [], gaps: [] } : gainsOf(chosen);
	return {
		engine: ENGINE_VERSION,
		findings,
		windows,
		candidates,
		recommended: recommendedOf(design, windows, findings, candidates),
		choice: verdictOf(design, windows, findings, gains),
		conflict: conflictOf(design, findings),
		benefit: gains.benefits
	};
}
