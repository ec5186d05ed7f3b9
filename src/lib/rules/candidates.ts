/** The preferred values that fit into the windows, ranked, and the one to recommend. */
import type { Design, Source } from '$lib/design/design';
import { relativelyEqual } from '$lib/quantity/interval';
import { coarsestSeries, preferredValues, SERIES_NAMES } from '$lib/quantity/series';
import type { Gains } from './benefit';
import type { Benefit, Candidate, Finding, Window } from './finding';
import { toleranceInterval } from './tolerance';
import { warningsOf } from './warnings';
import { closesWindows } from './windows';

/** Values outside are no line-side capacitors [F]. */
const SMALLEST = 1e-12;
const LARGEST = 100e-3;

const MOST = 50;

interface Place {
	readonly capacitance: number;
	readonly window: number;
	readonly nominalFrom: number;
	readonly nominalTo: number;
	/** |log(C/target)|. */
	readonly distance: number;
	/** Place of its coarsest series. */
	readonly fineness: number;
}

const finenessOf = (value: number): number => {
	const name = coarsestSeries(value);
	return name === null ? SERIES_NAMES.length : SERIES_NAMES.indexOf(name);
};

const placesIn = (window: Window, index: number, series: Design['choice']['series']): Place[] => {
	const { nominalFrom, nominalTo, target } = window;
	if (nominalFrom === null || nominalTo === null || target === null || window.nominalEmpty) return [];
	const from = Math.max(nominalFrom, SMALLEST);
	const to = Math.min(Math.max(nominalTo, nominalFrom), LARGEST);
	if (from > to) return [];
	return preferredValues(series, from, to).map((capacitance) => ({
		capacitance,
		window: index,
		nominalFrom,
		nominalTo,
		distance: Math.abs(Math.log(capacitance / target)),
		fineness: finenessOf(capacitance)
	}));
};

/** Two logarithms that differ by rounding alone are a tie, which the coarser series and then the smaller value win. */
const byRank = (a: Place, b: Place): number => {
	const near = a.distance - b.distance;
	if (Math.abs(near) > 1e-12) return near;
	return a.fineness - b.fineness || a.capacitance - b.capacitance;
};

/**
 * Lists the preferred values of the choice's series whose whole tolerance interval lies in a window closed at both
 * ends: the 50 nearest to their window's target, ranked by |log(C/target)|, then coarser series, then smaller value.
 * @param design the worksheet's design
 * @param windows what the rules leave [F]
 * @param findings what the rules answered
 * @param gainsOf gains of a nominal value
 * @returns candidates, best first
 * @example candidatesOf(design, windows, findings, gainsOf)[0].capacitance // 3.3e-7
 * Source: common practice.
 */
export function candidatesOf(
	design: Design,
	windows: readonly Window[],
	findings: readonly Finding[],
	gainsOf: (capacitance: number) => Gains
): Candidate[] {
	const { choice, sources } = design;
	const ranked = windows.flatMap((window, index) => placesIn(window, index, choice.series)).sort(byRank);
	return ranked.slice(0, MOST).map(({ capacitance, window, nominalFrom, nominalTo }) => {
		const gains = gainsOf(capacitance);
		return {
			capacitance,
			series: coarsestSeries(capacitance) ?? choice.series,
			window,
			marginFrom: capacitance / nominalFrom - 1,
			marginTo: nominalTo / capacitance - 1,
			warnings: warningsOf(toleranceInterval(capacitance, choice), gains, findings, sources),
			benefit: gains.benefits
		};
	});
}

/** Networks always count; another source counts where a rule that closes windows names it. */
const countingSources = (design: Design, findings: readonly Finding[]): readonly string[] => {
	const closing = new Set(findings.filter(closesWindows).map(({ rule }) => rule));
	const named = new Set(
		design.rules.flatMap((rule) => ('source' in rule && closing.has(rule.id) ? [rule.source] : []))
	);
	const isNetwork = ({ kind }: Source): boolean => kind !== 'impedance' && kind !== 'measured';
	return design.sources.filter((source) => isNetwork(source) || named.has(source.id)).map(({ id }) => id);
};

/** Every fundamental on every source that counts must be known not to get worse. */
const isHarmless = (design: Design, sources: readonly string[], benefits: readonly Benefit[]): boolean =>
	sources.every((source) =>
		design.switching.every(({ id }) =>
			benefits.some(
				(entry) =>
					entry.source === source && entry.switching === id && entry.harmonic === 1 && entry.gain_dB >= 0
			)
		)
	);

const byWidth =
	(windows: readonly Window[]) =>
	(a: number, b: number): number => {
		const [first, second] = [windows[a]?.widthDecades ?? 0, windows[b]?.widthDecades ?? 0];
		return relativelyEqual(first, second) ? a - b : second - first;
	};

/**
 * Recommends the best-ranked candidate of the widest window that makes no fundamental worse, neither on a network nor
 * on a source that a closing rule names. A single point between bands is never recommended, and nothing is while a
 * mandatory rule is not evaluated.
 * @param design the worksheet's design
 * @param windows what the rules leave [F]
 * @param findings what the rules answered
 * @param candidates ranked candidates
 * @returns nominal value [F], or null
 * @example recommendedOf(design, windows, findings, candidates) // 3.3e-7
 * Source: common practice.
 */
export function recommendedOf(
	design: Design,
	windows: readonly Window[],
	findings: readonly Finding[],
	candidates: readonly Candidate[]
): number | null {
	if (findings.some((finding) => finding.class === 'mandatory' && finding.state === 'not-evaluated'))
		return null;
	const sources = countingSources(design, findings);
	const harmless = candidates.filter(
		({ window, benefit }) => windows[window]?.degenerate === false && isHarmless(design, sources, benefit)
	);
	const widest = [...new Set(harmless.map(({ window }) => window))].sort(byWidth(windows))[0];
	return harmless.find(({ window }) => window === widest)?.capacitance ?? null;
}
