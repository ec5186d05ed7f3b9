/** What the closing rules leave of the C axis, and which nominal values fit into it with their tolerance. */
import type { Tolerance } from '$lib/design/design';
import { closedComplement, relativelyEqual, type Gap, type Interval } from '$lib/quantity/interval';
import type { Band, Finding, Window } from './finding';

/** A forbidden band that closes windows, and the rule it comes from [F]. */
export interface ClosingBand extends Interval {
	readonly rule: string;
}

/**
 * Tells whether a finding's bands close windows: mandatory and design rules do, unless put aside by name.
 * @param finding what a rule answered
 * @returns true where its bands close windows
 * @example closesWindows({ class: 'advisory', … }) // false
 * Source: common practice.
 */
export function closesWindows(finding: Finding): boolean {
	return finding.class !== 'advisory' && finding.override === undefined;
}

/**
 * Lists the bands that close windows, in the order of the rules.
 * @param findings what the rules answered
 * @returns bands with their rule [F]
 * @example closingBands(findings).length
 * Source: common practice.
 */
export function closingBands(findings: readonly Finding[]): ClosingBand[] {
	return findings
		.filter(closesWindows)
		.flatMap(({ rule, bands }) => bands.map(({ from, to }: Band) => ({ from, to, rule })));
}

/** A nominal edge that lies past the other by rounding alone still leaves its one value. */
const isEmpty = (from: number | null, to: number | null): boolean =>
	from !== null && to !== null && from > to && !relativelyEqual(from, to);

const windowOf = (gap: Gap<ClosingBand>, { toleranceMinus, tolerancePlus }: Tolerance): Window => {
	const nominalFrom = gap.from > 0 ? gap.from / (1 - toleranceMinus) : null;
	const nominalTo = gap.to < Infinity ? gap.to / (1 + tolerancePlus) : null;
	const closed = nominalFrom !== null && nominalTo !== null;
	return {
		from: gap.from,
		to: gap.to,
		limitedBy: { from: gap.fromBand?.rule ?? null, to: gap.toBand?.rule ?? null },
		nominalFrom,
		nominalTo,
		nominalEmpty: isEmpty(nominalFrom, nominalTo),
		target: closed ? Math.sqrt(nominalFrom * nominalTo) : null,
		widthDecades: closed ? Math.log10(gap.to / gap.from) : null,
		degenerate: gap.degenerate
	};
};

/**
 * Lists the closed windows between open bands on (0, ∞), rising; the nominal edges are from/(1 − t⁻) and to/(1 + t⁺).
 * @param bands closing bands, any order [F]
 * @param tolerance of the choice, fractions
 * @returns windows of real capacitance with their nominal edges [F]
 * @example windowsOf([{ from: 0, to: 2.5e-7, rule: 'a' }, { from: 4e-7, to: Infinity, rule: 'b' }], tolerance)[0].to // 4e-7
 * Source: textbook set algebra; the guard band for tolerance is common practice.
 */
export function windowsOf(bands: readonly ClosingBand[], tolerance: Tolerance): Window[] {
	return closedComplement(bands).map((gap) => windowOf(gap, tolerance));
}

/**
 * Tells whether any nominal value fits between the bands with its whole tolerance interval.
 * @param bands closing bands [F]
 * @param tolerance of the choice, fractions
 * @returns true where a nominal window remains
 * @example leavesNominal([{ from: 0, to: Infinity, rule: 'a' }], tolerance) // false
 * Source: textbook set algebra.
 */
export function leavesNominal(bands: readonly ClosingBand[], tolerance: Tolerance): boolean {
	return windowsOf(bands, tolerance).some((window) => !window.nominalEmpty);
}
