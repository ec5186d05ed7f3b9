/** What a value does that no closing rule forbids, but that whoever picks it must know. */
import type { Source } from '$lib/design/design';
import { relativelyEqual, type Interval } from '$lib/quantity/interval';
import type { Gains } from './benefit';
import type { Benefit, Finding } from './finding';
import { closesWindows } from './windows';
import { plain, worded } from './wording';

const before = (a: number, b: number): boolean => a < b && !relativelyEqual(a, b);

/**
 * Tells whether a rule's bands reach into a closed interval, a tie counting as not.
 * @param finding what the rule answered
 * @param interval closed interval [F]
 * @returns true where some value of the interval is forbidden
 * @example breaksRule(share, { from: 2.97e-7, to: 3.63e-7 }) // false
 * Source: textbook set algebra.
 */
export function breaksRule(finding: Finding, interval: Interval): boolean {
	return finding.bands.some(
		(band) => before(band.from, band.to) && before(interval.from, band.to) && before(band.from, interval.to)
	);
}

const negativeGain = (benefit: Benefit, sources: readonly Source[]): string => {
	const label = sources.find((source) => source.id === benefit.source)?.label ?? benefit.source;
	const gain = `−${Math.abs(benefit.gain_dB).toFixed(1)} dB`;
	const at = benefit.inductance === null ? '' : `, ${worded(benefit.inductance, 'inductance')}`;
	return `${gain} at ${plain(benefit.frequency, 'frequency')} on ${label}${at}`;
};

/**
 * Lists the warnings of a nominal value: advisory rules and rules put aside that it breaks, by id; and each
 * line that it makes worse or of which a curve knows nothing, in words.
 * @param interval where the real capacitance lies [F]
 * @param gains gains of the nominal value
 * @param findings what the rules answered
 * @param sources the design's sources, for their labels
 * @returns rule ids and words
 * @example warningsOf(interval, gains, findings, sources) // ['−13.7 dB at 420 kHz on Test network']
 * Source: common practice.
 */
export function warningsOf(
	interval: Interval,
	{ benefits, gaps }: Gains,
	findings: readonly Finding[],
	sources: readonly Source[]
): string[] {
	const broken = findings.filter((finding) => !closesWindows(finding) && breaksRule(finding, interval));
	const negative = benefits.filter(({ gain_dB }) => gain_dB < 0);
	return [
		...broken.map(({ rule }) => rule),
		...negative.map((benefit) => negativeGain(benefit, sources)),
		...gaps
	];
}
