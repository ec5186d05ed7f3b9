/** The benefit over the C axis: least gain of each source and harmonic on the exact network. */
import type { Design, Source } from '$lib/design/design';
import { benefitFinder } from '$lib/network/benefit';
import {
	capacitorPart,
	filterOf,
	partCurves,
	sourceCurves,
	sourceModel,
	uncovered
} from '$lib/rules/circuit';
import { linesOf, type Line } from '$lib/rules/lines';

export interface BenefitCurve {
	readonly source: Source;
	readonly line: Line;
	/** Gain of a nominal value [dB]. */
	readonly gain: (capacitance: number) => number;
}

/** More curves than this cannot be told apart in the pane. */
const MOST = 6;
/** Harmonics drawn for the first source. */
const ORDERS = 3;

interface Wanted {
	readonly source: Source;
	readonly line: Line;
}

/** Every fundamental of the first source, its harmonics 2 and 3, then the other sources' fundamentals. */
const wantedOf = (design: Design): Wanted[] => {
	const lines = linesOf(design);
	const [first, ...others] = design.sources;
	const fundamentals = lines.filter(({ harmonic }) => harmonic === 1);
	const harmonics = lines.filter(
		({ harmonic, switching }) => harmonic > 1 && harmonic <= ORDERS && switching === design.switching[0]
	);
	if (first === undefined) return [];
	return [
		...fundamentals.map((line) => ({ source: first, line })),
		...harmonics.map((line) => ({ source: first, line })),
		...others.flatMap((source) => fundamentals.slice(0, 1).map((line) => ({ source, line })))
	];
};

/**
 * Prepares the curves of the benefit pane; a line of which a measured curve knows nothing has none.
 * @param design the worksheet's design
 * @returns at most six curves, the first source's fundamental first
 * @example benefitCurves(chargerAuxiliary)[0]?.gain(330e-9) // 21.05
 * Source: nodal analysis of the ladder.
 */
export function benefitCurves(design: Design): BenefitCurve[] {
	const filter = filterOf(design);
	const { curve: _, ...unmeasured } = design.choice;
	return wantedOf(design)
		.slice(0, MOST)
		.flatMap(({ source, line }) => {
			const model = sourceModel(design, source);
			if (uncovered([...partCurves(filter), ...sourceCurves(model)], line) !== null) return [];
			const finder = benefitFinder(filter, model, line);
			const gain = (capacitance: number): number =>
				finder.worst(capacitorPart(design, unmeasured, capacitance)).gain_dB;
			return [{ source, line, gain }];
		});
}

export interface Harm {
	/** [dB], < 0 */
	readonly gain: number;
	/** [Hz] */
	readonly frequency: number;
}

const counts = (design: Design, source: Source): boolean =>
	(source.kind !== 'impedance' && source.kind !== 'measured') ||
	design.rules.some((rule) => rule.class !== 'advisory' && 'source' in rule && rule.source === source.id);

/**
 * Finds what a value does worst to any line of a network, or of a source that a mandatory or design rule names.
 * @param design the worksheet's design
 * @param capacitance nominal value [F]
 * @returns gain and frequency, or null where no line gets worse
 * @example worstHarm(avionicsConverter, 180e-9)?.gain // −13.7 at 420 kHz
 * Source: nodal analysis of the ladder.
 */
export function worstHarm(design: Design, capacitance: number): Harm | null {
	const filter = filterOf(design);
	const { curve: _, ...unmeasured } = design.choice;
	const part = capacitorPart(design, unmeasured, capacitance);
	let worst: Harm | null = null;
	for (const source of design.sources.filter((entry) => counts(design, entry))) {
		const model = sourceModel(design, source);
		for (const line of linesOf(design)) {
			if (uncovered([...partCurves(filter), ...sourceCurves(model)], line) !== null) continue;
			const { gain_dB: gain, frequency } = benefitFinder(filter, model, line).worst(part);
			if (gain < 0 && (worst === null || gain < worst.gain)) worst = { gain, frequency };
		}
	}
	return worst;
}
