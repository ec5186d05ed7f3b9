/** The curves of the benefit pane, their names, and the values that matter: at the choice and at the worst. */
import { formatQuantity } from '$lib/quantity/format';
import type { Item, Stroke, TextItem } from '$lib/scene/scene';
import { benefitCurves, type BenefitCurve } from './benefit-curve';
import { capOf, penOf, curvePath, type Board } from './board';
import { fixed } from './edge';
import { aroundPoint, placeLabel, roomOf, type Field, type Label, type Place } from './label';
import { cutAtBoxes, keepInside } from './oriented';
import { capacitanceOfFall, footOf, type Pane } from './plot';

/** What is drawn below the chart. */
export interface Below {
	readonly board: Board;
	readonly pane: Pane;
	readonly field: Field;
	readonly texts: TextItem[];
}

export interface DrawnCurve {
	readonly curve: BenefitCurve;
	readonly segments: readonly number[];
	readonly stroke: Stroke;
}

/** Between the points of a curve, before corners are refined [mm]. */
const STEP = 3;
/** A corner sharper than this is refined [dB]. */
const BEND = 0.4;

interface Point {
	readonly x: number;
	readonly gain: number;
}

const gainAt = ({ board, pane }: Below, curve: BenefitCurve, x: number): Point => {
	const { plot } = board.input;
	return { x, gain: curve.gain(capacitanceOfFall(plot, pane.y - x + (plot.y + plot.height - pane.y))) };
};

const refine = (points: readonly Point[], at: (x: number) => Point): Point[] => {
	const bent = points.map((point, index) => {
		const before = points[index - 1];
		const after = points[index + 1];
		if (before === undefined || after === undefined) return false;
		const part = (point.x - before.x) / (after.x - before.x);
		return Math.abs(point.gain - before.gain - part * (after.gain - before.gain)) > BEND;
	});
	return points.flatMap((point, index) => {
		const after = points[index + 1];
		if (after === undefined || !(bent[index] === true || bent[index + 1] === true)) return [point];
		return [point, at((point.x + after.x) / 2)];
	});
};

const pointsOf = (below: Below, curve: BenefitCurve): Point[] => {
	const { pane } = below;
	const at = (x: number): Point => gainAt(below, curve, x);
	const count = Math.ceil(pane.width / STEP);
	const points = Array.from({ length: count + 1 }, (_, index) => at(pane.x + (pane.width * index) / count));
	return refine(refine(points, at), at);
};

const levelOf = (pane: Pane, gain: number): number =>
	pane.y + ((pane.gainTo - gain) / (pane.gainTo - pane.gainFrom)) * pane.height;

/** By harmonic: n = 1 plain, 2 dashed, 3 dotted. */
const DASHES: readonly (readonly number[])[] = [[], [2.4, 1], [0.7, 0.7]];

const strokeOfCurve = ({ board }: Below, { source, line }: BenefitCurve): Stroke => {
	const { design, ink } = board.input;
	const first = source === design?.sources[0];
	const stroke = penOf(board, 'benefit');
	const dash = DASHES[Math.min(line.harmonic, DASHES.length) - 1] ?? [];
	const own = first ? dash : [4, 0.8, 0.7, 0.8];
	return {
		...stroke,
		colour: first ? ink.ink : ink.source,
		join: 'round',
		...(own.length === 0 ? {} : { dash: own.map((length) => length * board.k) })
	};
};

const sourceNumber = ({ board }: Below, { source }: BenefitCurve): string =>
	`4.${String(1 + (board.input.design?.sources.indexOf(source) ?? 0))}`;

const curveName = (below: Below, curve: BenefitCurve): string => {
	const { design } = below.board.input;
	const order = `n = ${String(curve.line.harmonic)}`;
	const several = (design?.switching.length ?? 1) > 1;
	const entry = several ? ` 2.${String(1 + (design?.switching.indexOf(curve.line.switching) ?? 0))}` : '';
	return curve.line.harmonic === 1 ? `${sourceNumber(below, curve)}${entry} ${order}` : order;
};

const labelOf = ({ board }: Below, text: string, curve: BenefitCurve): Label => ({
	text,
	cap: capOf(board),
	face: 'regular',
	fill: curve.source === board.input.design?.sources[0] ? board.input.ink.ink : board.input.ink.source,
	of: `source:${curve.source.id}`
});

/** On the curve, where its own piece is nearly level, from the left. */
function* alongCurve(
	pane: Pane,
	points: readonly Point[],
	preferred: number
): Generator<Place, void, undefined> {
	const count = points.length;
	for (let step = 0; step <= 2 * count; step += 1) {
		const away = Math.ceil(step / 2);
		const point = points[Math.round(preferred * count) + (step % 2 === 0 ? -away : away)];
		if (point === undefined) continue;
		yield { x: point.x, y: levelOf(pane, point.gain), angle: 0, cost: (40 * away) / count };
	}
}

const settleName = (below: Below, curve: BenefitCurve, points: readonly Point[], preferred: number): void => {
	const label = labelOf(below, curveName(below, curve), curve);
	const placed = placeLabel(below.field, label, alongCurve(below.pane, points, preferred));
	if (placed !== null) below.texts.push(placed.item);
};

const settleAt = (below: Below, label: Label, point: Point): void => {
	const y = levelOf(below.pane, point.gain);
	const near = aroundPoint(point.x, y, roomOf(label), 0.8 * below.board.k);
	const places = [...near].filter(({ cost }) => cost < FAR);
	const placed = placeLabel(below.field, label, places);
	if (placed !== null) below.texts.push(placed.item);
};

/** Places that cost more stand too far from what they name. */
const FAR = 20;

/** The gain of the choice at the fundamental, beside the choice's line. */
const settleChosen = (below: Below, curve: BenefitCurve): void => {
	const { choice, input } = below.board;
	if (choice === null) return;
	const gain = curve.gain(choice);
	const text = `${fixed(gain, 1, input.decimalMark, true)}\u00a0dB`;
	settleAt(
		below,
		{ ...labelOf(below, text, curve), face: 'semibold' },
		{ x: footOf(input.plot, choice), gain }
	);
};

const settleWorst = (below: Below, curve: BenefitCurve, points: readonly Point[]): void => {
	const { plot, decimalMark } = below.board.input;
	const worst = points.reduce((least, point) => (point.gain < least.gain ? point : least));
	if (worst.gain > -1 || worst.gain < below.pane.gainFrom) return;
	const capacitance = capacitanceOfFall(plot, plot.y + plot.height - worst.x);
	const value = formatQuantity(capacitance, 'capacitance', { digits: 2, decimalMark });
	const text = `${fixed(worst.gain, 1, decimalMark)}\u00a0dB, ${value}`;
	settleAt(below, labelOf(below, text, curve), worst);
};

/** The pane's own name, in whichever corner is free. */
const settleTitle = (below: Below): void => {
	const { board, pane } = below;
	const label: Label = {
		text: board.input.words.chart.paneTitle,
		cap: capOf(board),
		face: 'regular',
		fill: board.input.ink.ink
	};
	const [along, across] = roomOf(label);
	const left = pane.x + along + 0.6;
	const right = pane.x + pane.width - along - 0.6;
	const top = pane.y + across + 0.6;
	const foot = pane.y + pane.height - across - 0.6;
	const steps = Array.from({ length: 41 }, (_, index) => index / 40);
	const places = steps.flatMap((t) => [
		{ x: right + t * (left - right), y: top, angle: 0, cost: 20 * t },
		{ x: left + t * (right - left), y: foot, angle: 0, cost: 5 + 20 * t }
	]);
	const placed = placeLabel(
		below.field,
		label,
		places.sort((a, b) => a.cost - b.cost)
	);
	if (placed !== null) below.texts.push(placed.item);
};

/**
 * Traces the curves and places their names.
 * @param below the pane; choice and edges reserved
 * @returns curves inside the pane
 * @example settleBenefit(below).length
 * Source: nodal analysis of the ladder.
 */
export function settleBenefit(below: Below): DrawnCurve[] {
	const { board, pane, field } = below;
	const { design } = board.input;
	const traced = (design === null ? [] : benefitCurves(design)).map((curve) => {
		const points = pointsOf(below, curve);
		const segments = points.slice(1).flatMap((point, index) => {
			const before = points[index] ?? point;
			return [before.x, levelOf(pane, before.gain), point.x, levelOf(pane, point.gain)];
		});
		return { curve, points, segments: keepInside(segments, pane) };
	});
	for (const { segments } of traced) field.curves.push({ segments, cost: 60 });
	const [first] = traced;
	if (first !== undefined) {
		settleChosen(below, first.curve);
		settleWorst(below, first.curve, first.points);
	}
	settleTitle(below);
	for (const [index, { curve, points }] of traced.entries()) {
		field.curves.splice(0, 1);
		settleName(below, curve, points, 0.28 - 0.05 * index);
		field.curves.push({ segments: traced[index]?.segments ?? [], cost: 60 });
	}
	return traced.map(({ curve, segments }) => ({ curve, segments, stroke: strokeOfCurve(below, curve) }));
}

/**
 * Draws the curves, broken at lettering.
 * @param below the pane, all labels placed
 * @param curves what settleBenefit gave
 * @returns one path per curve
 * @example benefitItems(below, curves)[0]?.role // 'benefit'
 * Source: sheet design.
 */
export function benefitItems(below: Below, curves: readonly DrawnCurve[]): Item[] {
	return curves.flatMap(({ curve, segments, stroke }): Item[] => {
		const clear = cutAtBoxes(segments, below.field.boxes);
		if (clear.length === 0) return [];
		const label = `${curve.source.label}, n = ${String(curve.line.harmonic)}`;
		const of = `source:${curve.source.id}`;
		return [{ type: 'path', role: 'benefit', of, label, d: curvePath(clear), stroke }];
	});
}
