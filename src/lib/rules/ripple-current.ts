/** The ripple current in Cx over all lines. */
import type { Design, RippleCurrentRule } from '$lib/design/design';
import type { CapacitorPart } from '$lib/network/filter';
import { currentFinder } from '$lib/network/ripple';
import type { SourceModel } from '$lib/network/source';
import {
	capacitorPart,
	cornersOf,
	filterOf,
	firstGap,
	partCurves,
	sourceCurves,
	sourceModel
} from './circuit';
import type { Finding } from './finding';
import { given, parts, symbol } from './formula';
import { linesOf, sourceOf } from './lines';
import type { Method } from './method';
import { evaluated, notEvaluated } from './outcome';
import { scanBands } from './scan';
import { bandsParts, plain } from './wording';
import { resonantCapacitances } from './worst-capacitance';

export const RIPPLE_CURRENT: Method = {
	kind: 'ripple-current',
	name: 'Ripple current',
	formula: parts`√(Σ|${symbol('I', 'N')}·${symbol('Y', 'x')}/(${symbol('Y', 'p')} + ${symbol('Y', 'x')})|²) ≤ ${symbol('I')}`,
	rationale: 'Cx is heated by what it diverts, most of all near resonance.',
	derivation: [
		'Each line’s noise current I reaches the line-side node as the Norton current I_N = I·Z_C/(Z_C + Z_L) and divides between Y_p and Cx: I_x = I_N·Y_x/(Y_p + Y_x).',
		'With y = ωCx and a limit under I_N the current exceeds the limit above one root of a quadratic in y; with a limit over I_N it exceeds it only between two roots around C0. For several lines the squares are added, each line at its own worst frequency and corner of the tolerances.'
	],
	source: { text: 'Nodal analysis of the ladder.', status: 'textbook' },
	assumptions: [
		'Line-frequency current and its harmonics are left out.',
		'The lines are not related in phase: their squares add.'
	],
	misleads: ['Every line at its own worst corner at once is more than can happen; it is the safe side.'],
	cautions: [
		'Add the current at line frequency, and the derating for frequency and temperature of the part’s own data.'
	]
};

interface LoadedLine {
	/** rms noise current of the line [A]. */
	readonly current: number;
	/** One per corner of the tolerances. */
	readonly finders: readonly ReturnType<typeof currentFinder>[];
}

const loadedLines = (design: Design, model: SourceModel): LoadedLine[] => {
	const corners = cornersOf(design);
	return linesOf(design)
		.map((line) => ({ line, current: line.switching.current_A?.[line.harmonic - 1] ?? 0 }))
		.filter(({ current }) => current > 0)
		.map(({ line, current }) => ({
			current,
			finders: corners.map((filter) => currentFinder(filter, model, line))
		}));
};

const rms = (lines: readonly LoadedLine[], part: CapacitorPart): number =>
	Math.sqrt(
		lines.reduce((sum, { current, finders }) => {
			const share = Math.max(...finders.map((finder) => finder.worst(part).share));
			return sum + (current * share) ** 2;
		}, 0)
	);

/**
 * Forbids every Cx whose rms ripple current exceeds the limit, over all lines of all switching entries, each at its
 * own worst frequency and corner of the tolerances.
 * @param design the worksheet's design; needs the current of every harmonic
 * @param rule source, limit, rms [A]
 * @returns a finding with one or more bands [F]; not-evaluated without currents
 * @example rippleCurrent(design, { source: 'amn', limit_A: 0.012, … }).bands[0] // 31.9 … 137.7 nF
 * Source: current divider; edges by scan and bisection.
 */
export function rippleCurrent(design: Design, rule: RippleCurrentRule): Finding {
	const silent = design.switching.find(({ current_A }) => current_A === undefined);
	if (silent !== undefined) {
		return notEvaluated(
			rule,
			RIPPLE_CURRENT,
			`The noise currents of ${silent.label} are missing: enter one per harmonic.`
		);
	}
	const source = sourceOf(design, rule.source);
	const [filter, model] = [filterOf(design), sourceModel(design, source)];
	const gap = firstGap([...partCurves(filter), ...sourceCurves(model)], linesOf(design));
	if (gap !== null) return notEvaluated(rule, RIPPLE_CURRENT, gap);
	const { curve: _, ...unmeasured } = design.choice;
	const lines = loadedLines(design, model);
	const bands = scanBands(
		(capacitance) => rms(lines, capacitorPart(design, unmeasured, capacitance)) / rule.limit_A,
		resonantCapacitances(filter, model, linesOf(design))
	);
	const cause = `Ripple current above ${plain(rule.limit_A, 'current')} from ${source.label}`;
	return evaluated(rule, RIPPLE_CURRENT, {
		bands: bands.map((band) => ({ ...band, cause, source: source.id })),
		formula: {
			general: RIPPLE_CURRENT.formula,
			numbers: parts`${String(lines.length)} lines, ${given(rule.limit_A, 'current')}`,
			result: bandsParts(bands)
		}
	});
}
