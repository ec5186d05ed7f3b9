/** Predicted level at the receiver of a test network, line by line, against a limit. Differential mode only. */
import type { Design, NetworkSource } from '$lib/design/design';
import { reciprocal, magnitude, type Complex } from '$lib/network/complex';
import { capacitorImpedance, transferImpedance, type CapacitorPart, type Filter } from '$lib/network/filter';
import { frequencyGrid } from '$lib/network/grid';
import {
	CISPR_32_A,
	CISPR_32_B,
	limitAt,
	limitThrough,
	type Detector,
	type LimitLine
} from '$lib/network/limit-line';
import { goldenMinimum } from '$lib/network/search';
import { sourceImpedance } from '$lib/network/source';
import { capacitorPart, filterOf, partCurves, uncovered } from './circuit';
import { linesOf, type Line } from './lines';

/** One line at the receiver. Levels in dBµV; null where there is nothing to say. */
export interface EmissionLine {
	readonly source: string;
	readonly switching: string;
	readonly harmonic: number;
	/** Where the level without Cx is highest [Hz]. */
	readonly frequency: number;
	readonly levelWithout: number;
	/** With the design's choice. */
	readonly levelWith: number | null;
	readonly limit: Readonly<Record<Detector, number | null>>;
	/** Benefit that Cx must bring for the tighter limit and the margin; 0 or less asks for none [dB]. */
	readonly required_dB: number | null;
	/** How far the level with the choice stays under the tighter limit and the margin; negative is over [dB]. */
	readonly reserve_dB: number | null;
}

export interface Emission {
	readonly lines: readonly EmissionLine[];
	/** First harmonic of each switching entry that reaches the band where the limit line exists. */
	readonly firstInBand: readonly { readonly switching: string; readonly harmonic: number | null }[];
	/** What is left out, in words. */
	readonly remarks: readonly string[];
}

const MICROVOLT = 1e-6;

const limitLineOf = (design: Design): LimitLine | null => {
	const { emission } = design;
	if (emission === undefined) return null;
	if (emission.limit === 'cispr-32-a') return CISPR_32_A;
	if (emission.limit === 'cispr-32-b') return CISPR_32_B;
	return limitThrough(
		(emission.table ?? []).map((point) => ({
			frequency: point.frequency_Hz,
			quasiPeak: point.quasiPeak_dBuV,
			average: point.average_dBuV
		}))
	);
};

/**
 * Level at one receiver port: 20·log10(I·|Z_T| / (n · 1 µV)), n networks sharing the differential voltage.
 * @param current rms of the line [A], > 0
 * @param transfer line-side voltage per ampere [V/A]
 * @param networks networks in series in the loop
 * @returns [dBµV]
 * @example receiverLevel(1e-3, { re: 0.17109, im: 0 }, 2) // 38.64
 * @see textbook; each port of two equal networks sees half of the differential voltage
 */
export function receiverLevel(current: number, transfer: Complex, networks: 1 | 2): number {
	return 20 * Math.log10((current * magnitude(transfer)) / networks / MICROVOLT);
}

interface Receiver {
	readonly filter: Filter;
	readonly source: NetworkSource;
}

const levelAt = (
	{ filter, source }: Receiver,
	current: number,
	part: CapacitorPart | null,
	f: number
): number => {
	const shunt = part ? reciprocal(capacitorImpedance(part, f)) : { re: 0, im: 0 };
	const model = { kind: source.kind, networks: source.networks };
	return receiverLevel(
		current,
		transferImpedance(filter, shunt, sourceImpedance(model, f), f),
		source.networks
	);
};

/** Highest level over the frequency range of a line, and where. */
const highest = (receiver: Receiver, current: number, part: CapacitorPart | null, line: Line) => {
	const under = (f: number) => -levelAt(receiver, current, part, f);
	const grid = frequencyGrid(
		receiver.filter,
		{ kind: receiver.source.kind, networks: receiver.source.networks },
		line
	);
	const values = grid.map(under);
	const best = values.indexOf(Math.min(...values));
	const from = grid[best - 1] ?? line.from;
	const to = grid[best + 1] ?? line.to;
	const refined = from < to ? goldenMinimum(under, from, to, 1e-9) : line.from;
	const frequency = under(refined) <= (values[best] ?? Infinity) ? refined : (grid[best] ?? line.from);
	return { frequency, level: -under(frequency) };
};

const tighter = (limit: Readonly<Record<Detector, number | null>>): number | null => {
	const levels = [limit['quasi-peak'], limit.average].filter((level) => level !== null);
	return levels.length === 0 ? null : Math.min(...levels);
};

/** Tightest limit over the range of a line, which may straddle a step. */
const limitOver = (limits: LimitLine, detector: Detector, { from, to }: Line): number | null => {
	const steps = limits[detector].flatMap((segment) => [segment.from, segment.to]);
	const levels = [from, to, ...steps.filter((f) => f > from && f < to)]
		.map((f) => limitAt(limits, detector, f))
		.filter((level) => level !== null);
	return levels.length === 0 ? null : Math.min(...levels);
};

const difference = (a: number | null, b: number | null): number | null =>
	a === null || b === null ? null : a - b;

const chosenPart = (design: Design): CapacitorPart | null => {
	const { capacitance_F: chosen } = design.choice;
	return chosen === null ? null : capacitorPart(design, design.choice, chosen);
};

const emissionLine = (design: Design, limits: LimitLine, receiver: Receiver, line: Line): EmissionLine => {
	const current = line.switching.current_A?.[line.harmonic - 1] ?? 0;
	const without = highest(receiver, current, null, line);
	const part = chosenPart(design);
	const levelWith = part ? highest(receiver, current, part, line).level : null;
	const limit = {
		'quasi-peak': limitOver(limits, 'quasi-peak', line),
		average: limitOver(limits, 'average', line)
	};
	const allowed = difference(tighter(limit), design.emission?.margin_dB ?? 0);
	return {
		source: receiver.source.id,
		switching: line.switching.id,
		harmonic: line.harmonic,
		frequency: without.frequency,
		levelWithout: without.level,
		levelWith,
		limit,
		required_dB: difference(without.level, allowed),
		reserve_dB: difference(allowed, levelWith)
	};
};

const firstInBand = (design: Design, limits: LimitLine) =>
	design.switching.map((switching) => {
		const start = Math.min(
			...limits['quasi-peak'].map(({ from }) => from),
			...limits.average.map(({ from }) => from)
		);
		const harmonic = Math.ceil(start / switching.frequencyMax_Hz - 1e-12);
		return { switching: switching.id, harmonic: harmonic <= switching.harmonics ? harmonic : null };
	});

const remarksOf = (design: Design, gaps: readonly string[]): string[] => {
	const silent = design.switching.filter((entry) => entry.current_A === undefined);
	const unread = design.sources.filter((source) => source.kind === 'impedance' || source.kind === 'measured');
	return [
		'Differential mode only: the receiver reads half of it with the common mode added or taken away.',
		'A line without spreading reads the same for peak, quasi-peak and average.',
		...silent.map(({ label }) => `No level for ${label}: its current per harmonic is not given.`),
		...unread.map(({ label }) => `No level on ${label}: it has no receiver port.`),
		...gaps
	];
};

/**
 * Predicts the level of every line with a known current on every test network of a design, with and without Cx.
 * Level = 20·log10(I·|V_x/I| / (n · 1 µV)), the highest over the line's frequency range, other parts nominal and real.
 * @param design the worksheet's design, SI units
 * @returns lines and remarks, or null where the design asks for no emission
 * @throws RangeError when the design lacks a curve it names, which a parsed design never does
 * @example // 1 mA at 145 kHz into 33 µH, 4.7 µF and two 50 µH networks, no Cx
 * emissionOf(design).lines[0].levelWithout // 38.64
 * @see nodal analysis; CISPR 32 for the limits as their module says
 */
export function emissionOf(design: Design): Emission | null {
	const limits = limitLineOf(design);
	if (limits === null) return null;
	const filter = filterOf(design);
	const part = chosenPart(design);
	const curves = [...partCurves(filter), ...(part?.curve ? [part.curve] : [])];
	const gaps = new Set<string>();
	const lines = design.sources.flatMap((source) => {
		if (source.kind === 'impedance' || source.kind === 'measured') return [];
		return linesOf(design).flatMap((line) => {
			if (!(line.switching.current_A?.[line.harmonic - 1] ?? 0)) return [];
			const gap = uncovered(curves, line);
			if (gap === null) return [emissionLine(design, limits, { filter, source }, line)];
			gaps.add(gap);
			return [];
		});
	});
	return { lines, firstInBand: firstInBand(design, limits), remarks: remarksOf(design, [...gaps]) };
}
