/** Why no nominal window remains: the smallest set of rules that alone leaves none. */
import type { Design, Tolerance } from '$lib/design/design';
import { insideOpen, uniteOpen, type Interval } from '$lib/quantity/interval';
import { cureOf } from './cure';
import type { Conflict, Finding } from './finding';
import { METHODS } from './method';
import { closesWindows, closingBands, leavesNominal, windowsOf, type ClosingBand } from './windows';
import { wordedBand, wordedRange } from './wording';

/** Sets looked at before the search settles for one from which no rule can be left out. */
const MOST_SETS = 20_000;

const meets = (band: Interval, interval: Interval): boolean =>
	insideOpen(band, interval.from) ||
	insideOpen(band, interval.to) ||
	(band.from >= interval.from && band.to <= interval.to && band.from < band.to);

/** The tolerance interval of a nominal value that is still free: every complete set has a rule that forbids it. */
const freeInterval = (bands: readonly ClosingBand[], tolerance: Tolerance): Interval | null => {
	const free = windowsOf(bands, tolerance).find((window) => !window.nominalEmpty);
	if (free === undefined) return null;
	const upward = (1 + tolerance.tolerancePlus) / (1 - tolerance.toleranceMinus);
	if (free.from > 0) return { from: free.from, to: Math.min(free.to, free.from * upward) };
	return { from: 0, to: 0 };
};

const reaches = (band: Interval, interval: Interval): boolean =>
	interval.to === 0 ? band.from === 0 && band.to > 0 : meets(band, interval);

const inOrder = (left: readonly number[], right: readonly number[]): number => {
	const at = left.findIndex((value, index) => value !== right[index]);
	return at < 0 ? 0 : (left[at] ?? 0) - (right[at] ?? 0);
};

interface Search {
	readonly groups: readonly (readonly ClosingBand[])[];
	readonly tolerance: Tolerance;
	readonly seen: Set<string>;
	readonly found: number[][];
}

/** Goes on from a set of rules by every rule that reaches a value the set leaves free, down to the given size. */
const deepen = (search: Search, chosen: readonly number[], size: number): void => {
	const key = chosen.join();
	if (search.seen.has(key) || search.seen.size > MOST_SETS) return;
	search.seen.add(key);
	const free = freeInterval(
		chosen.flatMap((index) => search.groups[index] ?? []),
		search.tolerance
	);
	if (free === null) {
		search.found.push([...chosen]);
		return;
	}
	if (chosen.length === size) return;
	search.groups.forEach((group, index) => {
		if (chosen.includes(index) || !group.some((band) => reaches(band, free))) return;
		deepen(
			search,
			[...chosen, index].sort((a, b) => a - b),
			size
		);
	});
};

/** Leaves out, from the last on, every rule that the rest does not need. */
const withoutNeedless = (groups: Search['groups'], tolerance: Tolerance): number[] =>
	groups
		.map((_, index) => index)
		.reduceRight<number[]>(
			(kept, index) => {
				const fewer = kept.filter((other) => other !== index);
				const bands = fewer.flatMap((other) => groups[other] ?? []);
				return leavesNominal(bands, tolerance) ? kept : fewer;
			},
			groups.map((_, index) => index)
		);

/**
 * Finds the smallest set of groups of bands that alone leaves no nominal value; of equal ones the first in order.
 * Past 20 000 sets it answers with one from which no group can be left out.
 * @param groups bands of each rule, in order [F]; together they must leave no nominal value
 * @param tolerance of the choice, fractions
 * @returns indices of the groups, rising
 * @example smallestSet([[{ from: 0, to: 2e-7, rule: 'a' }], [{ from: 1e-7, to: Infinity, rule: 'b' }]], tolerance) // [0, 1]
 * Source: iterative deepening; common practice.
 */
export function smallestSet(groups: readonly (readonly ClosingBand[])[], tolerance: Tolerance): number[] {
	const fallback = withoutNeedless(groups, tolerance);
	let spent = 0;
	for (let size = 1; size < fallback.length && spent <= MOST_SETS; size += 1) {
		const search: Search = { groups, tolerance, seen: new Set(), found: [] };
		deepen(search, [], size);
		spent += search.seen.size;
		const first = search.found.sort(inOrder)[0];
		if (first !== undefined) return first;
	}
	return firstOfSize(groups, tolerance, fallback);
}

/** The fallback has the smallest size when nothing smaller was found; an earlier set of that size goes before it. */
const firstOfSize = (groups: Search['groups'], tolerance: Tolerance, fallback: number[]): number[] => {
	const search: Search = { groups, tolerance, seen: new Set(), found: [] };
	deepen(search, [], fallback.length);
	return [...search.found, fallback].sort(inOrder)[0] ?? fallback;
};

const forbids = (finding: Finding): string => {
	const bands = uniteOpen(finding.bands).map(wordedBand);
	const shown = bands.length > 3 ? [...bands.slice(0, 3), `${String(bands.length - 3)} more`] : bands;
	return `${METHODS[finding.kind].name} (${finding.rule}) forbids ${shown.join(' and ')}`;
};

const percent = (fraction: number): string => String(Number((100 * fraction).toPrecision(3)));

const remainder = (findings: readonly Finding[], tolerance: Tolerance): string => {
	const left = windowsOf(closingBands(findings), tolerance).filter((window) => !window.degenerate);
	if (left.length === 0) return 'together they leave nothing.';
	const ranges = left.map(({ from, to }) => wordedRange(from, to, 'capacitance'));
	const minus = percent(tolerance.toleranceMinus);
	const plus = percent(tolerance.tolerancePlus);
	return `what they leave, ${ranges.join(' and ')}, is too narrow for a tolerance of −${minus}/+${plus} %.`;
};

/**
 * Explains why no nominal window remains and what would cure it; null where one remains.
 * @param design the worksheet's design
 * @param findings what its rules answered
 * @returns rules, explanation and cure, or null
 * @example conflictOf(design, findings)?.rules // ['share', 'reactance']
 * Source: common practice.
 */
export function conflictOf(design: Design, findings: readonly Finding[]): Conflict | null {
	const { choice } = design;
	if (leavesNominal(closingBands(findings), choice)) return null;
	const closing = findings.filter((finding) => closesWindows(finding) && finding.bands.length > 0);
	const set = smallestSet(
		closing.map((finding) => closingBands([finding])),
		choice
	).flatMap((index) => closing[index] ?? []);
	const alone = set.length === 1 ? 'alone it leaves nothing.' : remainder(set, choice);
	const rules = set.map((finding) => finding.rule);
	return {
		rules,
		explanation: `${set.map(forbids).join('; ')}: ${alone}`,
		cure: cureOf(design, findings, rules)
	};
}
