/** Findings and windows in the words of a row. Limits round to the safe side. */
import { formatQuantity } from '$lib/quantity/format';
import type { Band, Finding, Window } from '$lib/rules/finding';

const farads = (value: number, round: 'up' | 'down' | 'nearest' = 'nearest'): string =>
	formatQuantity(value, 'capacitance', { digits: 3, round });

const joined = (from: string, to: string): string => {
	const [number, unit] = from.split('\u00a0');
	const same = unit !== undefined && to.endsWith(`\u00a0${unit}`);
	return same ? `${number ?? ''}–${to}` : `${from} – ${to}`;
};

/**
 * A range of capacitance, its unit once where both ends share it.
 * @example capacitanceRange(2.53e-7, 3.96e-7) // '253–396 nF'
 */
export function capacitanceRange(from: number, to: number, inward: boolean): string {
	return joined(farads(from, inward ? 'up' : 'down'), farads(to, inward ? 'down' : 'up'));
}

const bandText = ({ from, to }: Band): string => {
	if (from <= 0 && to === Infinity) return 'no value';
	if (from <= 0) return `≥ ${farads(to, 'up')}`;
	if (to === Infinity) return `≤ ${farads(from, 'down')}`;
	return `not ${capacitanceRange(from, to, false)}`;
};

/**
 * What a rule leaves, as its row says it.
 * @example limitText(shareOfJ1) // '≤ 396 nF'
 */
export function limitText(finding: Finding): string {
	if (finding.state === 'not-applicable') return 'does not apply';
	if (finding.state === 'not-evaluated') return 'not evaluated';
	const [first, ...more] = finding.bands;
	if (first === undefined) return 'forbids nothing';
	if (more.length === 0) return bandText(first);
	const from = Math.min(...finding.bands.map((band) => band.from));
	const to = Math.max(...finding.bands.map((band) => band.to));
	return `${String(finding.bands.length)} bands: ${bandText({ ...first, from, to })}`;
}

/** A window of real capacitance, rounded inward. */
export function windowText({ from, to, degenerate }: Window): string {
	if (degenerate) return `${farads(from)} alone`;
	if (from <= 0 && to === Infinity) return 'any value';
	if (from <= 0) return `up to ${farads(to, 'down')}`;
	if (to === Infinity) return `from ${farads(from, 'up')}`;
	return capacitanceRange(from, to, true);
}

/** The nominal values whose whole tolerance fits into the window. */
export function nominalText({ nominalFrom, nominalTo, nominalEmpty }: Window): string {
	if (nominalEmpty) return 'none: narrower than the tolerance';
	if (nominalFrom === null && nominalTo === null) return 'open';
	if (nominalFrom === null) return `up to ${farads(nominalTo ?? 0, 'down')}`;
	if (nominalTo === null) return `from ${farads(nominalFrom, 'up')}`;
	return capacitanceRange(nominalFrom, nominalTo, true);
}

/** A margin or gain with its sign and a true minus. */
export function signed(value: number, digits: number): string {
	const text = Math.abs(value).toFixed(digits);
	if (Number(text) === 0) return text;
	return `${value < 0 ? '\u2212' : '+'}${text}`;
}

/** A gain to a tenth of a dB. */
export function gainText(gain: number): string {
	return signed(gain, 1);
}

/** A margin in per cent, to a tenth. */
export function marginText(margin: number): string {
	return `${signed(margin * 100, 1)}\u00a0%`;
}
