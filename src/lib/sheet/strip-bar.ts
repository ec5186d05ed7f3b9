/** The small bars on one shared C axis: what a rule forbids, what is left, and the choice through all of them. */
import type { Finding, Window } from '$lib/rules/finding';
import type { Item } from '$lib/scene/scene';
import { dotCentres, dotRadius, hatchLines, roundDots } from './hatch';
import { strokeOf } from './ink';
import type { Box } from './paper';
import { rectangle, ruled } from './pen';
import { cornersOf } from './polygon';
import { BAR_WIDTH, type StripContext } from './strip-block';

/** Decades of capacitance, exponents of ten. */
export interface Axis {
	readonly from: number;
	readonly to: number;
}

const FEWEST = 4;
const MOST = 8;
/** Shortest stretch that a band is drawn with, so that a narrow one is still seen [mm]. */
const LEAST = 0.5;
const TICK_WIDTH = 0.7;

const ends = ({ evaluation, design }: StripContext): number[] => {
	const bands = evaluation.findings.flatMap((finding) => finding.bands);
	return [...bands, ...evaluation.windows]
		.flatMap(({ from, to }) => [from, to])
		.concat(design.choice.capacitance_F ?? [])
		.filter((value) => value > 0 && Number.isFinite(value))
		.map(Math.log10);
};

const middleOf = ({ evaluation, design }: StripContext, all: readonly number[]): number => {
	const home = design.choice.capacitance_F ?? evaluation.windows[0]?.target ?? null;
	return home === null ? (Math.min(...all) + Math.max(...all)) / 2 : Math.log10(home);
};

/**
 * Chooses the C axis of the bars: whole decades that hold every finite edge and the choice, four to eight of them.
 * @param context design and evaluation
 * @returns exponents of ten
 * @example chooseAxis(context) // { from: -9, to: -5 }
 */
export function chooseAxis(context: StripContext): Axis {
	const all = ends(context);
	if (all.length === 0) return { from: -9, to: -9 + FEWEST };
	const middle = middleOf(context, all);
	const least = Math.max(Math.floor(Math.min(...all) + 1e-9), Math.floor(middle) - MOST / 2);
	const most = Math.min(Math.ceil(Math.max(...all) - 1e-9), Math.floor(middle) + MOST / 2);
	const lacking = Math.max(0, FEWEST - (most - least));
	const below = middle - least < most - middle ? Math.ceil(lacking / 2) : Math.floor(lacking / 2);
	return { from: least - below, to: least - below + Math.max(FEWEST, most - least) };
}

/** The room of one row's bar; `top` and `height` are the row's, so that the verticals run on from row to row. */
export interface BarRoom {
	readonly axis: Axis;
	readonly context: StripContext;
	/** Left edge of the bars [mm]. */
	readonly x: number;
	readonly y: number;
	readonly height: number;
	readonly barHeight: number;
}

interface Ends {
	readonly from: number;
	readonly to: number;
}

const place = ({ axis, x, context }: BarRoom, capacitance: number): number => {
	const width = BAR_WIDTH * context.k;
	if (capacitance <= 0) return x;
	const part = (Math.log10(capacitance) - axis.from) / (axis.to - axis.from);
	return x + width * Math.min(1, Math.max(0, part));
};

/** A stretch of the axis, as high as the whole row or as the bar in its middle. */
const stretch = (room: BarRoom, { from, to }: Ends, whole: boolean): Box => {
	const height = whole ? room.height : room.barHeight;
	const top = room.y + (room.height - height) / 2;
	const left = place(room, from);
	const width = Math.max(LEAST, place(room, to) - left);
	const most = room.x + BAR_WIDTH * room.context.k;
	return { x: Math.min(left, most - width), y: top, width, height };
};

/**
 * Draws what runs through all rows: decade lines, and once there is a result its windows and the choice.
 * @param room the row's bar
 * @returns the marks behind the bar
 * @example barGround(room).length // 2 without a result
 */
export function barGround(room: BarRoom): Item[] {
	const { context, axis, x, y, height } = room;
	const { ink, k, evaluation, resultShown } = context;
	const step = (BAR_WIDTH * k) / (axis.to - axis.from);
	const decades = Array.from({ length: axis.to - axis.from + 1 }, (_, index) => x + index * step);
	const windows = resultShown ? evaluation.windows : [];
	return [
		...windows.map((window) => rectangle(stretch(room, window, true), { fill: ink.window })),
		ruled(
			decades.flatMap((at) => [at, y, at, y + height]),
			strokeOf(ink, 'rule', k)
		)
	];
}

/**
 * Draws the choice's vertical in one row, over everything else.
 * @param room the row's bar
 * @returns the line, or nothing without a choice
 * @example choiceLine(room).length // 1
 */
export function choiceLine(room: BarRoom): Item[] {
	const { context, y, height } = room;
	const chosen = context.design.choice.capacitance_F;
	if (!context.resultShown || chosen === null) return [];
	const x = place(room, chosen);
	return [ruled([x, y, x, y + height], { ...strokeOf(context.ink, 'reading', context.k), cap: 'butt' })];
}

const axisLine = (room: BarRoom): Item => {
	const { context, x, y, height } = room;
	const middle = y + height / 2;
	return ruled([x, middle, x + BAR_WIDTH * context.k, middle], strokeOf(context.ink, 'switching', context.k));
};

const closes = (windows: readonly Window[], rule: string, side: 'from' | 'to', edge: number): boolean =>
	windows.some((window) => window.limitedBy[side] === rule && Math.abs(window[side] / edge - 1) < 1e-9);

const bandItems = (room: BarRoom, finding: Finding, from: number, to: number): Item[] => {
	const { context } = room;
	const { ink, k, evaluation } = context;
	const box = stretch(room, { from, to }, false);
	const edge = finding.class === 'mandatory' ? 'mandatoryEdge' : 'designEdge';
	const corners = cornersOf(box);
	const fill: Item =
		finding.class === 'advisory'
			? { type: 'path', d: roundDots(dotCentres(corners, k), dotRadius(k)), fill: ink.advisory }
			: ruled(hatchLines(corners, finding.class, 'bank', k), {
					...strokeOf(ink, finding.class === 'mandatory' ? 'mandatoryBank' : 'designBank', k),
					width: 0.18 * k
				});
	const windows = context.resultShown ? evaluation.windows : [];
	const closing = [
		...(closes(windows, finding.rule, 'to', from) ? [box.x] : []),
		...(closes(windows, finding.rule, 'from', to) ? [box.x + box.width] : [])
	];
	const overhang = 0.5 * k;
	const ticks = closing.flatMap((at) => [at, box.y - overhang, at, box.y + box.height + overhang]);
	return [
		rectangle(box, { fill: ink.paper, stroke: strokeOf(ink, edge, k) }),
		...(fill.type === 'path' && fill.d.ops !== '' ? [fill] : []),
		...(ticks.length === 0 ? [] : [ruled(ticks, { colour: ink.ink, width: TICK_WIDTH * k })])
	];
};

/** Bands that share or touch are drawn as one box. */
const united = (finding: Finding): { from: number; to: number }[] => {
	const sorted = [...finding.bands].sort((a, b) => a.from - b.from);
	const joined: { from: number; to: number }[] = [];
	for (const { from, to } of sorted) {
		const last = joined.at(-1);
		if (last !== undefined && from < last.to) last.to = Math.max(last.to, to);
		else joined.push({ from, to });
	}
	return joined;
};

/**
 * Gives the bands of a rule with those joined that overlap.
 * @param finding what the rule found
 * @returns open intervals in order [F]
 * @example unitedBands(finding).length // 1
 */
export function unitedBands(finding: Finding): readonly { readonly from: number; readonly to: number }[] {
	return united(finding);
}

/**
 * Draws a rule's bands on the axis.
 * @param room the row's bar
 * @param finding what the rule found
 * @returns axis and hatched boxes
 * @example ruleBar(room, finding).length // ≥ 1
 */
export function ruleBar(room: BarRoom, finding: Finding): Item[] {
	return [axisLine(room), ...united(finding).flatMap(({ from, to }) => bandItems(room, finding, from, to))];
}

/**
 * Draws a window, or its nominal part, on the axis.
 * @param room the row's bar
 * @param from lower end [F]
 * @param to upper end [F]
 * @param nominal whether it is the nominal part
 * @returns axis and box
 * @example windowBar(room, 2.526e-7, 3.96e-7, false).length // 2
 */
export function windowBar(room: BarRoom, from: number, to: number, nominal: boolean): Item[] {
	const { context } = room;
	const { ink, k } = context;
	const box = stretch(room, { from, to }, false);
	const fill = nominal ? ink.nominal : ink.window;
	return [axisLine(room), rectangle(box, { fill, stroke: strokeOf(ink, 'windowEdge', k) })];
}
