/** Section 6 of the strip, second part: the value chosen, in large letters, and how far it stands from both edges. */
import type { Window } from '$lib/rules/finding';
import { textWidth } from '$lib/scene/metrics';
import type { Item } from '$lib/scene/scene';
import { formatQuantity } from '$lib/quantity/format';
import { fixed, formatEdge } from './edge';
import { shorten, wrap } from './fitting';
import { hatchLines } from './hatch';
import { strokeOf } from './ink';
import { lettered, rectangle, ruled } from './pen';
import { cornersOf } from './polygon';
import {
	BASE,
	CAP,
	NUMBER_WIDTH,
	rowLine,
	rowNumber,
	ruleNumber,
	type Block,
	type StripContext
} from './strip-block';
import { toleranceText } from './strip-given';
import { homeWindow, windowRows } from './strip-window';
import { fill } from './words';

const HEIGHT = 14.1;
const VALUE_CAPS = [7, 5, 3.5, 2.5] as const;
const VALUE_WIDTH = 31;
const GAUGE_WIDTH = 39;
const GAUGE_TOP = 5;
const GAUGE_HEIGHT = 4.2;
/** Forbidden stubs at both ends of the gauge. */
const STUB = 3.6;
const VALUE_BASE = 8;
const NOTE_BASE = 13.15;

interface Gauge {
	readonly x: number;
	readonly y: number;
	readonly context: StripContext;
	readonly window: Window;
	readonly nominalFrom: number;
	readonly nominalTo: number;
	readonly chosen: number;
}

const placeOn = ({ x, context, window }: Gauge, value: number): number => {
	const left = x + STUB * context.k;
	const span = Math.log(window.to / window.from);
	const part = span === 0 ? 0.5 : Math.log(value / window.from) / span;
	return left + (GAUGE_WIDTH - 2 * STUB) * context.k * Math.min(1, Math.max(0, part));
};

const classOf = ({ evaluation }: StripContext, id: string | null): 'mandatory' | 'design' => {
	const found = evaluation.findings.find(({ rule }) => rule === id)?.class;
	return found === 'mandatory' ? 'mandatory' : 'design';
};

const stubItems = (gauge: Gauge): Item[] => {
	const { x, y, context, window } = gauge;
	const { ink, k } = context;
	const size = { y: y + GAUGE_TOP * k, width: STUB * k, height: GAUGE_HEIGHT * k };
	const right = x + (GAUGE_WIDTH - STUB) * k;
	return [
		{ box: { ...size, x }, ruleClass: classOf(context, window.limitedBy.from) },
		{ box: { ...size, x: right }, ruleClass: classOf(context, window.limitedBy.to) }
	].map(({ box, ruleClass }) => {
		const pen = strokeOf(ink, ruleClass === 'mandatory' ? 'mandatoryEdge' : 'designEdge', k);
		return ruled(hatchLines(cornersOf(box), ruleClass, 'bank', k), { ...pen, width: 0.18 * k });
	});
};

const gaugeMarks = (gauge: Gauge): Item[] => {
	const { x, y, context, chosen } = gauge;
	const { ink, k } = context;
	const top = y + GAUGE_TOP * k;
	const height = GAUGE_HEIGHT * k;
	const left = x + STUB * k;
	const width = (GAUGE_WIDTH - 2 * STUB) * k;
	const from = placeOn(gauge, gauge.nominalFrom);
	const to = placeOn(gauge, gauge.nominalTo);
	const at = placeOn(gauge, chosen);
	const edges = [left, top - 0.5 * k, left, top + height + 0.5 * k];
	const ends = [...edges, ...edges.map((value, index) => (index % 2 === 0 ? value + width : value))];
	return [
		...stubItems(gauge),
		rectangle(
			{ x: left, y: top, width, height },
			{ fill: ink.window, stroke: strokeOf(ink, 'windowEdge', k) }
		),
		rectangle(
			{ x: from, y: top, width: to - from, height },
			{ fill: ink.nominal, stroke: strokeOf(ink, 'switching', k) }
		),
		ruled(ends, { colour: ink.ink, width: 0.7 * k }),
		ruled([at, top - 0.8 * k, at, top + height + 0.8 * k], { colour: ink.ink, width: 1 * k })
	];
};

/**
 * How far the value may fall and rise inside the nominal window, in per cent of itself.
 * @param chosen value [F]
 * @param nominalFrom lower edge [F]
 * @param nominalTo upper edge [F]
 * @param mark decimal mark
 * @returns e.g. ['−14.9 %', '+9.1 %']
 * @example marginTexts(3.3e-7, 2.807e-7, 3.6e-7, '.') // ['−14.9 %', '+9.1 %']
 */
export function marginTexts(
	chosen: number,
	nominalFrom: number,
	nominalTo: number,
	mark: '.' | ','
): readonly [string, string] {
	const text = (ratio: number): string => `${fixed(100 * ratio, 1, mark, true)}\u00a0%`;
	return [text(nominalFrom / chosen - 1), text(nominalTo / chosen - 1)];
}

const gaugeTexts = (gauge: Gauge): Item[] => {
	const { x, y, context, window, chosen } = gauge;
	const { ink, k, mark, design } = context;
	const cap = CAP * k;
	const right = x + GAUGE_WIDTH * k;
	const [down, up] = marginTexts(chosen, gauge.nominalFrom, gauge.nominalTo, mark);
	const widths = [textWidth(down, 'bold', cap), textWidth(up, 'bold', cap)] as const;
	const gap = 2.4 * k;
	const wanted = placeOn(gauge, chosen) - widths[0] - gap / 2;
	const start = Math.max(x, Math.min(wanted, right - widths[0] - gap - widths[1]));
	const bold = { cap, face: 'bold', fill: ink.ink } as const;
	const base = y + 3.4 * k;
	const foot = y + NOTE_BASE * k;
	const number = (id: string | null): string => (id === null ? '' : ruleNumber(design.rules, id));
	const low = formatEdge(gauge.nominalFrom, 'up', mark);
	const high = formatEdge(gauge.nominalTo, 'down', mark);
	const indent = textWidth(`${number(window.limitedBy.from)} `, 'bold', cap);
	const outdent = textWidth(` ${number(window.limitedBy.to)}`, 'bold', cap);
	return [
		lettered(down, start, base, bold),
		lettered(up, start + widths[0] + gap, base, bold),
		lettered(number(window.limitedBy.from), x, foot, bold),
		lettered(low.split('\u00a0')[0] ?? low, x + indent, foot, { cap, fill: ink.ink }),
		lettered(high, right - outdent, foot, { cap, fill: ink.ink, anchor: 'end' }),
		lettered(number(window.limitedBy.to), right, foot, { ...bold, anchor: 'end' })
	].filter((item) => item.text !== '');
};

/** There is a gauge where the choice stands in a window closed at both ends, with a nominal part. */
const gaugeOf = (context: StripContext, x: number, y: number): Gauge | null => {
	const chosen = context.design.choice.capacitance_F;
	const window = homeWindow(context);
	if (chosen === null || window === null || context.evaluation.choice?.state !== 'allowed') return null;
	const { nominalFrom, nominalTo } = window;
	const open = nominalFrom === null || nominalTo === null || window.nominalEmpty;
	if (open || window.from <= 0 || window.to === Infinity) return null;
	return { x, y, context, window, nominalFrom, nominalTo, chosen };
};

const stateText = (context: StripContext): string => {
	const { evaluation, words, design, mark } = context;
	if (design.choice.capacitance_F === null) {
		const best = evaluation.recommended;
		const value = best === null ? '' : formatQuantity(best, 'capacitance', { decimalMark: mark });
		return best === null ? '' : fill(words.verdict.recommended, { value });
	}
	if (evaluation.choice?.state === 'nominal-only') return words.verdict.nominalOnly;
	if (evaluation.choice?.state !== 'forbidden') return '';
	const rules = evaluation.choice.breaks.map((id) => ruleNumber(design.rules, id)).join(', ');
	return fill(words.verdict.forbidden, { rules });
};

const valueItem = (context: StripContext, x: number, y: number, width: number): Item => {
	const { design, words, ink, k, mark } = context;
	const chosen = design.choice.capacitance_F;
	const text =
		chosen === null ? words.verdict.noChoice : formatQuantity(chosen, 'capacitance', { decimalMark: mark });
	const caps = chosen === null ? [3.5, 2.5] : VALUE_CAPS;
	const fits = (cap: number): boolean => textWidth(text, 'bold', cap * k) <= width;
	const cap = (caps.find(fits) ?? CAP) * k;
	const shown = shorten(text, { width, cap, face: 'bold' });
	return lettered(shown, x, y + VALUE_BASE * k, { cap, face: 'bold', fill: ink.ink });
};

const noteLine = ({ design, mark }: StripContext): string =>
	[design.choice.series, toleranceText(design.choice, mark)].filter((text) => text !== '').join(' · ');

const filled = (context: StripContext, x: number, y: number): Item[] => {
	const { ink, k, width } = context;
	const gauge = gaugeOf(context, x + width - GAUGE_WIDTH * k, y);
	const cap = CAP * k;
	const left = x + NUMBER_WIDTH * k;
	const note = lettered(noteLine(context), left, y + NOTE_BASE * k, { cap, fill: ink.ink });
	if (gauge !== null) {
		const value = valueItem(context, left, y, VALUE_WIDTH * k);
		return [value, note, ...gaugeMarks(gauge), ...gaugeTexts(gauge)];
	}
	const state = stateText(context);
	const room = width - (NUMBER_WIDTH + VALUE_WIDTH + 2) * k;
	const lines = wrap(state, { width: room, cap, face: 'bold' }, 3);
	return [
		valueItem(context, left, y, VALUE_WIDTH * k),
		note,
		...lines.map((line, index) =>
			lettered(line, x + width - room, y + (BASE + 1 + index * 3.7) * k, { cap, face: 'bold', fill: ink.ink })
		)
	];
};

/**
 * The row of the choice.
 * @param context design, evaluation, palette, scale
 * @returns the block; empty but for its number while no result is shown
 * @example choiceBlock(context).height // 14.1 on A4
 */
export function choiceBlock(context: StripContext): Block {
	const { k, ink, words, resultShown } = context;
	const number = `6.${String(windowRows(context) + 2)}`;
	const height = HEIGHT * k;
	return {
		height,
		draw: (x, y) => {
			const name = lettered(words.strip.choice, x + NUMBER_WIDTH * k, y + BASE * k, {
				cap: CAP * k,
				face: 'semibold',
				fill: ink.ink
			});
			return [
				rowNumber(context, number, x, y + (resultShown ? VALUE_BASE - BASE : 0) * k),
				...(resultShown ? filled(context, x, y) : [name]),
				rowLine(context, x, y + height)
			];
		}
	};
}
