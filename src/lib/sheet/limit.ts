/** What a rule's finding says in one short phrase: its limit, or why it has none. */
import type { Finding } from '$lib/rules/finding';
import { formatEdge, joinRange, shortEdge, shortRange, type DecimalMark } from './edge';
import { unitedBands } from './strip-bar';
import { fill, type Words } from './words';

interface Ends {
	readonly from: number;
	readonly to: number;
}

const SPACE = '\u00a0';

/** Edges round to the forbidden side's outside: what is printed as allowed is allowed. */
const bandText = ({ from, to }: Ends, words: Words, mark: DecimalMark): string => {
	if (from <= 0 && to === Infinity) return words.limit.all;
	if (from <= 0) return `≥${SPACE}${formatEdge(to, 'up', mark)}`;
	if (to === Infinity) return `≤${SPACE}${formatEdge(from, 'down', mark)}`;
	return fill(words.limit.not, { range: shortRange(from, to, mark) });
};

const severalText = (bands: readonly Ends[], words: Words, mark: DecimalMark): string => {
	const least = bands[0]?.from ?? 0;
	const most = Math.max(...bands.map(({ to }) => to));
	const low = least <= 0 ? '0' : formatEdge(least, 'down', mark);
	const high = most === Infinity ? '∞' : formatEdge(most, 'up', mark);
	const open = least <= 0 || most === Infinity;
	const range = open ? joinRange(low, high) : shortRange(least, most, mark);
	return fill(words.limit.bands, { n: String(bands.length), range });
};

/**
 * Writes what a rule allows, or why it says nothing.
 * @param finding what the rule found
 * @param words fixed words
 * @param mark decimal mark
 * @returns e.g. '≤ 396 nF', 'not 4.64 … 97.9 nF', '2 bands, 5 … 40 nF', 'not evaluated'
 * @example limitText(share, wordsOf('en'), '.') // '≤ 396 nF'
 */
export function limitText(finding: Finding, words: Words, mark: DecimalMark): string {
	if (finding.state === 'not-evaluated') return words.limit.notEvaluated;
	if (finding.state === 'not-applicable') return words.limit.notApplicable;
	const bands = unitedBands(finding);
	const [only] = bands;
	if (only === undefined) return words.limit.none;
	return bands.length === 1 ? bandText(only, words, mark) : severalText(bands, words, mark);
}

/**
 * Writes the same in fewer words, for a row where the rule's name needs the room: a dash for the dots, and of
 * several bands how many there are and where the last one ends.
 * @param finding what the rule found
 * @param words fixed words
 * @param mark decimal mark
 * @returns e.g. '2 bands to 70.2 nF', 'not 0.19–4.46 µF'
 * @example shortLimitText(guard, wordsOf('en'), '.') // 'not 4.63–98 nF'
 */
export function shortLimitText(finding: Finding, words: Words, mark: DecimalMark): string {
	const bands = unitedBands(finding);
	const most = Math.max(...bands.map(({ to }) => to));
	if (bands.length > 1 && most < Infinity)
		return fill(words.limit.bandsTo, { n: String(bands.length), to: shortEdge(most, mark) });
	return limitText(finding, words, mark).replace(`${SPACE}… `, '–');
}

/**
 * Writes the closed interval of a window, its edges rounded inward.
 * @param window ends, 0 and Infinity for none [F]
 * @param words fixed words
 * @param mark decimal mark
 * @returns e.g. '252.6 … 396 nF', '≥ 252.6 nF', 'any value'
 * @example windowText({ from: 2.5263e-7, to: 3.96e-7 }, wordsOf('en'), '.') // '252.7 … 396 nF'
 */
export function windowText({ from, to }: Ends, words: Words, mark: DecimalMark): string {
	if (from <= 0 && to === Infinity) return words.limit.anyValue;
	if (from <= 0) return `≤${SPACE}${formatEdge(to, 'down', mark)}`;
	if (to === Infinity) return `≥${SPACE}${formatEdge(from, 'up', mark)}`;
	return joinRange(formatEdge(from, 'up', mark), formatEdge(to, 'down', mark));
}
