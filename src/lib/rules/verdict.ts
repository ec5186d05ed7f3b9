/** What the rules say of the design's own choice. */
import type { Design } from '$lib/design/design';
import { relativelyEqual, type Interval } from '$lib/quantity/interval';
import type { Gains } from './benefit';
import type { Finding, Verdict, Window } from './finding';
import { toleranceInterval } from './tolerance';
import { breaksRule, warningsOf } from './warnings';
import { closesWindows } from './windows';

const atMost = (a: number, b: number): boolean => a <= b || relativelyEqual(a, b);

const holds = (window: Window, { from, to }: Interval): boolean =>
	atMost(window.from, from) && atMost(to, window.to);

const marginOf = (upper: number | null, lower: number | null): number | null =>
	upper === null || lower === null ? null : upper / lower - 1;

const margins = (nominal: number, window: Window | undefined): Pick<Verdict, 'marginFrom' | 'marginTo'> => ({
	marginFrom: marginOf(nominal, window?.nominalFrom ?? null),
	marginTo: marginOf(window?.nominalTo ?? null, nominal)
});

/**
 * Judges the choice: allowed where its whole tolerance interval lies in one window, nominal-only where its nominal
 * value does, else forbidden; margins are against the window that holds the nominal value.
 * @param design the worksheet's design
 * @param windows what the rules leave [F]
 * @param findings what the rules answered
 * @param gains gains of the choice
 * @returns the verdict, or null without a choice
 * @example verdictOf(chargerAuxiliary, windows, findings, gains)?.state // 'allowed'
 * Source: common practice.
 */
export function verdictOf(
	design: Design,
	windows: readonly Window[],
	findings: readonly Finding[],
	gains: Gains
): Verdict | null {
	const nominal = design.choice.capacitance_F;
	if (nominal === null) return null;
	const interval = toleranceInterval(nominal, design.choice);
	const around = windows.find((window) => holds(window, interval));
	const home = around ?? windows.find((window) => holds(window, { from: nominal, to: nominal }));
	return {
		state: around !== undefined ? 'allowed' : home !== undefined ? 'nominal-only' : 'forbidden',
		breaks: findings
			.filter((finding) => closesWindows(finding) && breaksRule(finding, interval))
			.map(({ rule }) => rule),
		warnings: warningsOf(interval, gains, findings, design.sources),
		...margins(nominal, home)
	};
}
