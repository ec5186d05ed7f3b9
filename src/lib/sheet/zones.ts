/** The C axis cut at every edge: what is forbidden, by its strongest class, and what is left. */
import type { Finding } from '$lib/rules/finding';
import { closesWindows } from '$lib/rules/windows';

export interface Zone {
	/** [F], 0 and Infinity for no end. */
	readonly from: number;
	readonly to: number;
	/** Strongest class that forbids it; null where nothing does. */
	readonly class: 'mandatory' | 'design' | null;
}

const strongest = (findings: readonly Finding[], value: number): Zone['class'] => {
	const covers = ({ bands }: Finding): boolean => bands.some(({ from, to }) => from < value && value < to);
	const covering = findings.filter(covers);
	if (covering.some((finding) => finding.class === 'mandatory')) return 'mandatory';
	return covering.length > 0 ? 'design' : null;
};

/** A value between two edges, of which one or both may lie at an end of the axis. */
const between = (from: number, to: number): number => {
	if (from > 0 && to < Infinity) return Math.sqrt(from) * Math.sqrt(to);
	if (to < Infinity) return to / 2;
	return from > 0 ? from * 2 : 1;
};

/**
 * Cuts the C axis into pieces of one class each; neighbours differ.
 * @param findings the rules that count; advisory and overridden ones forbid nothing
 * @returns pieces that cover (0, ∞), rising [F]
 * @example zonesOf([]) // [{ from: 0, to: Infinity, class: null }]
 * Source: union of open intervals.
 */
export function zonesOf(findings: readonly Finding[]): Zone[] {
	const closing = findings.filter(closesWindows);
	const edges = closing.flatMap(({ bands }) => bands.flatMap(({ from, to }) => [from, to]));
	const cuts = [...new Set([0, ...edges, Infinity])].sort((a, b) => a - b);
	const zones: Zone[] = [];
	for (const [index, to] of cuts.slice(1).entries()) {
		const from = cuts[index] ?? 0;
		const piece = { from, to, class: strongest(closing, between(from, to)) };
		const last = zones.at(-1);
		if (last?.class === piece.class) zones[zones.length - 1] = { ...last, to };
		else zones.push(piece);
	}
	return zones;
}

/** Deep from a window's edge stands the dense bank, at k = 1, square to the edge [mm]. */
const BANK_DEPTH = 5;

export interface Strip {
	/** Range of y − x [mm]. */
	readonly from: number;
	readonly to: number;
	readonly class: 'mandatory' | 'design';
	readonly density: 'bank' | 'field';
}

interface Span {
	readonly from: number;
	readonly to: number;
}

const banksOf = (zones: readonly Zone[], fall: (value: number) => number, k: number): Span[] => {
	const depth = BANK_DEPTH * k * Math.SQRT2;
	return zones
		.filter((zone) => zone.class === null)
		.flatMap(({ from, to }) => [
			{ from: fall(from) - depth, to: fall(from) },
			{ from: fall(to), to: fall(to) + depth }
		])
		.filter(({ from, to }) => Number.isFinite(from) && Number.isFinite(to));
};

/**
 * Divides the forbidden pieces into strips of one class and density: dense banks beside the windows, fields beyond.
 * @param zones pieces of the C axis
 * @param fall y − x of a capacitance [mm]
 * @param k factor of the paper on the depth of the banks
 * @returns strips that do not overlap, by rising y − x [mm]
 * @example stripsOf(zonesOf(findings), (value) => fallOf(plot, value), 1)
 * Source: sheet design, hatch.
 */
export function stripsOf(zones: readonly Zone[], fall: (value: number) => number, k: number): Strip[] {
	const banks = banksOf(zones, fall, k);
	const strips: Strip[] = [];
	for (const zone of zones) {
		if (zone.class === null) continue;
		const ends = { from: fall(zone.from), to: fall(zone.to) };
		const cuts = banks.flatMap(({ from, to }) => [from, to]).filter((at) => at > ends.from && at < ends.to);
		const borders = [...new Set([ends.from, ...cuts, ends.to])].sort((a, b) => a - b);
		for (const [index, to] of borders.slice(1).entries()) {
			const from = borders[index] ?? ends.from;
			const inBank = banks.some((bank) => bank.from <= from && to <= bank.to);
			strips.push({ from, to, class: zone.class, density: inBank ? 'bank' : 'field' });
		}
	}
	return strips;
}
