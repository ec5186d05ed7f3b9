/** The C axis in one line: where the bands, windows and the choice lie, larger values at the left as in the chart. */
import type { RuleClass } from '$lib/design/design';
import type { Evaluation } from '$lib/rules/finding';

/** Ends of the axis [F]; `low` stands at the right. */
export interface Axis {
	readonly low: number;
	readonly high: number;
}

export interface Box {
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly height: number;
}

/** Steep or shallow strokes, never near the 45° of the L and C lines; dots advise. */
const HATCH_ANGLE: Readonly<Record<Exclude<RuleClass, 'advisory'>, number>> = {
	mandatory: 67.5,
	design: 22.5
};

const SHORTEST_DECADES = 4;
const LONGEST_DECADES = 7;

const closingEdges = (evaluation: Evaluation): number[] => [
	...evaluation.windows.flatMap(({ from, to }) => [from, to]),
	...evaluation.findings.flatMap(({ bands }) => bands.flatMap(({ from, to }) => [from, to]))
];

/**
 * Chooses whole decades that hold the edges of all bands and the choice, four to seven of them.
 * @param evaluation what the rules left
 * @param choice chosen capacitance [F], or null
 * @returns ends of the axis [F]
 * @example axisOf(evaluationOfJ1, 330e-9) // { low: 1e-9, high: 1e-5 }
 * Source: our own layout.
 */
export function axisOf(evaluation: Evaluation, choice: number | null): Axis {
	const values = [...closingEdges(evaluation), choice ?? 0].filter((c) => c > 0 && Number.isFinite(c));
	if (values.length === 0) return { low: 1e-9, high: 1e-5 };
	const logs = values.map((c) => Math.log10(c)).sort((a, b) => a - b);
	let low = Math.floor(logs[0] ?? -9);
	let high = Math.ceil(logs.at(-1) ?? -5);
	while (high - low < SHORTEST_DECADES) {
		if ((logs[0] ?? 0) - low <= high - (logs.at(-1) ?? 0)) low -= 1;
		else high += 1;
	}
	if (high - low > LONGEST_DECADES) low = high - LONGEST_DECADES;
	return { low: Number(`1e${String(low)}`), high: Number(`1e${String(high)}`) };
}

/**
 * Place of a capacitance along the slice, clamped to its ends: x = width · lg(high/C) / lg(high/low).
 * @param capacitance [F], 0 and Infinity are legal
 * @param axis ends [F]
 * @param width length of the slice
 * @returns distance from the left end, in the unit of `width`
 * @example place(1e-7, { low: 1e-9, high: 1e-5 }, 80) // 40
 * Source: common practice, a logarithmic axis.
 */
export function place(capacitance: number, axis: Axis, width: number): number {
	if (capacitance <= 0) return width;
	const share = Math.log10(axis.high / capacitance) / Math.log10(axis.high / axis.low);
	return Math.max(0, Math.min(1, share)) * width;
}

const round = (value: number): string => String(Math.round(value * 100) / 100);

/** One stroke through the box's local origin line, clipped to the box; empty when it misses. */
const stroke = (offset: number, slope: number, { x, y, width, height }: Box): string => {
	const atX = (px: number): number => y + height - (px - x) * slope + offset;
	const left = Math.max(x, x + (offset - 0) / slope);
	const right = Math.min(x + width, x + (height + offset) / slope);
	return right - left < 0.2 ? '' : `M${round(left)} ${round(atX(left))}L${round(right)} ${round(atX(right))}`;
};

const dots = ({ x, y, width, height }: Box, pitch: number): string => {
	let path = '';
	for (let row = 0; pitch / 2 + row * pitch < height; row += 1) {
		const first = pitch / 2 + (row % 2 === 0 ? 0 : pitch / 2);
		for (let px = first; px < width; px += pitch) {
			path += `M${round(x + px)} ${round(y + pitch / 2 + row * pitch)}h0`;
		}
	}
	return path;
};

/**
 * Hatches a box for a class of rule: strokes at 67.5° (mandatory) or 22.5° (design), dots (advisory).
 * @param box what to fill
 * @param ruleClass decides the hatch
 * @param pitch distance of the strokes, in the unit of the box
 * @returns SVG path data, clipped to the box
 * @example hatch({ x: 0, y: 0, width: 10, height: 5 }, 'advisory', 4) // 'M2 2h0M6 2h0'
 * Source: our own drawing rules.
 */
export function hatch(box: Box, ruleClass: RuleClass, pitch: number): string {
	if (box.width <= 0) return '';
	if (ruleClass === 'advisory') return dots(box, pitch);
	const angle = (HATCH_ANGLE[ruleClass] * Math.PI) / 180;
	const slope = Math.tan(angle);
	const step = pitch / Math.cos(angle);
	let path = '';
	for (let offset = step / 2 - box.height; offset < box.width * slope; offset += step) {
		path += stroke(offset, slope, box);
	}
	return path;
}
