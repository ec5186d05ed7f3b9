/**
 * The chart's axes: log f across, log |Z| up, decades of one length, so that inductances rise and capacitances fall
 * at exactly 45°. A C line keeps y − x, an L line keeps y + x; both are counted in millimetres of the paper.
 */
import { scaleLog, type ScaleLogarithmic } from 'd3-scale';

export interface Plot {
	/** Upper left corner [mm]. */
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly height: number;
	/** Length of a decade on both axes [mm]. */
	readonly decade: number;
	readonly frequencyFrom: number;
	readonly frequencyTo: number;
	readonly impedanceFrom: number;
	readonly impedanceTo: number;
}

/** The benefit pane; its C axis is the chart's foot, C = 1/(2π f impedanceFrom). */
export interface Pane {
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly height: number;
	readonly gainFrom: number;
	readonly gainTo: number;
}

interface Axes {
	readonly across: ScaleLogarithmic<number, number>;
	readonly up: ScaleLogarithmic<number, number>;
}

const known = new WeakMap<Plot, Axes>();

const axesOf = (plot: Plot): Axes => {
	const axes = known.get(plot) ?? {
		across: scaleLog([plot.frequencyFrom, plot.frequencyTo], [plot.x, plot.x + plot.width]),
		up: scaleLog([plot.impedanceFrom, plot.impedanceTo], [plot.y + plot.height, plot.y])
	};
	known.set(plot, axes);
	return axes;
};

/**
 * Gives the abscissa of a frequency.
 * @param plot axes
 * @param frequency > 0 [Hz]
 * @returns x [mm]
 * @example xOf(plot, 1e3) // plot.x where the chart starts at 1 kHz
 * Source: common practice, log-log reactance paper.
 */
export function xOf(plot: Plot, frequency: number): number {
	return axesOf(plot).across(frequency);
}

/**
 * Gives the ordinate of an impedance.
 * @param plot axes
 * @param impedance |Z| > 0 [Ω]
 * @returns y, down [mm]
 * @example yOf(plot, 0.1) // plot.y + plot.height where the chart starts at 100 mΩ
 * Source: common practice, log-log reactance paper.
 */
export function yOf(plot: Plot, impedance: number): number {
	return axesOf(plot).up(impedance);
}

/**
 * Reads a frequency back from the paper.
 * @param plot axes
 * @param x [mm]
 * @returns [Hz]
 * @example frequencyAt(plot, xOf(plot, 145e3)) // 145e3
 * Source: inverse of xOf.
 */
export function frequencyAt(plot: Plot, x: number): number {
	return axesOf(plot).across.invert(x);
}

/**
 * Reads an impedance back from the paper.
 * @param plot axes
 * @param y [mm]
 * @returns [Ω]
 * @example impedanceAt(plot, yOf(plot, 50)) // 50
 * Source: inverse of yOf.
 */
export function impedanceAt(plot: Plot, y: number): number {
	return axesOf(plot).up.invert(y);
}

/**
 * Gives the capacitance of which |Z| at f is the reactance, C = 1/(2π f |Z|).
 * @param frequency > 0 [Hz]
 * @param impedance > 0 [Ω]
 * @returns [F]
 * @example capacitanceThrough(12.7795e3, 2.64978) // 4.7e-6
 * Source: identity.
 */
export function capacitanceThrough(frequency: number, impedance: number): number {
	return 1 / (2 * Math.PI * frequency * impedance);
}

/**
 * Gives the inductance of which |Z| at f is the reactance, L = |Z|/(2π f).
 * @param frequency > 0 [Hz]
 * @param impedance > 0 [Ω]
 * @returns [H]
 * @example inductanceThrough(12.7795e3, 2.64978) // 33e-6
 * Source: identity.
 */
export function inductanceThrough(frequency: number, impedance: number): number {
	return impedance / (2 * Math.PI * frequency);
}

/**
 * Gives the constant y − x of a C line; it rises by one decade length for ten times the capacitance.
 * @param plot axes
 * @param capacitance ≥ 0, Infinity allowed [F]
 * @returns [mm], −Infinity for 0
 * @example fallOf(plot, 1e-6) - fallOf(plot, 1e-7) // plot.decade
 * Source: 1/(2π f C) on equal decades.
 */
export function fallOf(plot: Plot, capacitance: number): number {
	const atCorner = 2 * Math.PI * plot.frequencyFrom * plot.impedanceFrom * capacitance;
	return plot.y + plot.height - plot.x + plot.decade * Math.log10(atCorner);
}

/**
 * Reads a capacitance back from a C line's y − x.
 * @param plot axes
 * @param fall y − x [mm]
 * @returns [F]
 * @example capacitanceOfFall(plot, fallOf(plot, 330e-9)) // 330e-9
 * Source: inverse of fallOf.
 */
export function capacitanceOfFall(plot: Plot, fall: number): number {
	const decades = (fall - plot.y - plot.height + plot.x) / plot.decade;
	return 10 ** decades / (2 * Math.PI * plot.frequencyFrom * plot.impedanceFrom);
}

/**
 * Gives the constant y + x of an L line; it falls by one decade length for ten times the inductance.
 * @param plot axes
 * @param inductance > 0 [H]
 * @returns [mm]
 * @example riseOf(plot, 1e-6) - riseOf(plot, 1e-5) // plot.decade
 * Source: 2π f L on equal decades.
 */
export function riseOf(plot: Plot, inductance: number): number {
	const atCorner = (2 * Math.PI * plot.frequencyFrom * inductance) / plot.impedanceFrom;
	return plot.y + plot.height + plot.x - plot.decade * Math.log10(atCorner);
}

/** x1, y1, x2, y2 with x1 < x2 [mm]. */
export type Segment = readonly [number, number, number, number];

/**
 * Clips a C line to the plot.
 * @param plot axes
 * @param capacitance > 0 [F]
 * @returns the piece inside from left to right, or null where the line misses the plot [mm]
 * @example capacitanceLine(plot, 330e-9) // [x1, y1, x2, y2], x2 - x1 = y2 - y1
 * Source: 1/(2π f C) on equal decades.
 */
export function capacitanceLine(plot: Plot, capacitance: number): Segment | null {
	const fall = fallOf(plot, capacitance);
	const from = Math.max(plot.x, plot.y - fall);
	const to = Math.min(plot.x + plot.width, plot.y + plot.height - fall);
	return from < to ? [from, from + fall, to, to + fall] : null;
}

/**
 * Clips an L line to the plot.
 * @param plot axes
 * @param inductance > 0 [H]
 * @returns the piece inside from left to right, or null where the line misses the plot [mm]
 * @example inductanceLine(plot, 220e-6) // [x1, y1, x2, y2], x2 - x1 = y1 - y2
 * Source: 2π f L on equal decades.
 */
export function inductanceLine(plot: Plot, inductance: number): Segment | null {
	const rise = riseOf(plot, inductance);
	const from = Math.max(plot.x, rise - plot.y - plot.height);
	const to = Math.min(plot.x + plot.width, rise - plot.y);
	return from < to ? [from, rise - from, to, rise - to] : null;
}

/**
 * Gives where a C line leaves the chart at its foot, which is where it enters the benefit pane.
 * @param plot axes
 * @param capacitance > 0 [F]
 * @returns x, not clipped [mm]
 * @example footOf(plot, 330e-9) // xOf(plot, f) with 1/(2π f 330 nF) = impedanceFrom
 * Source: C = 1/(2π f impedanceFrom).
 */
export function footOf(plot: Plot, capacitance: number): number {
	return plot.y + plot.height - fallOf(plot, capacitance);
}

/** Room around the plot at k = 1, for numerals, check rules, the C scale and the switching label [mm]. */
export const PLOT_ROOM = { left: 16, right: 27, top: 11, bottom: 12 } as const;
