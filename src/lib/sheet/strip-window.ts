/** Section 6 of the strip, first part: the windows that remain, their nominal part, or the conflict that leaves none. */
import type { Window } from '$lib/rules/finding';
import type { Item } from '$lib/scene/scene';
import { shorten, wrap } from './fitting';
import { windowText } from './limit';
import { lettered } from './pen';
import { barGround, choiceLine, windowBar, type Axis, type BarRoom } from './strip-bar';
import {
	BAR_WIDTH,
	BASE,
	CAP,
	heading,
	NUMBER_WIDTH,
	ROW,
	rowLine,
	rowNumber,
	ruleNumber,
	textRoom,
	type Block,
	type StripContext
} from './strip-block';
import { toleranceText } from './strip-given';
import { fill } from './words';

const BAR_HEIGHT = 2.6;
const LEADING = 3.7;
/** More windows than this are counted, not listed. */
const WINDOWS_SHOWN = 3;

/** Rows are numbered 6.1, 6.2 … in the order in which they stand. */
export const windowRows = ({ evaluation, resultShown }: StripContext): number =>
	resultShown ? Math.min(WINDOWS_SHOWN, Math.max(1, evaluation.windows.length)) : 1;

interface Row {
	readonly number: string;
	readonly name: string;
	readonly value: string;
	readonly bar: (room: BarRoom) => Item[];
}

const rowBlock = (context: StripContext, axis: Axis, row: Row): Block => {
	const { ink, k, width } = context;
	const height = ROW * k;
	return {
		height,
		draw: (x, y) => {
			const room = { axis, context, x: x + width - BAR_WIDTH * k, y, height, barHeight: BAR_HEIGHT * k };
			const text = textRoom(context);
			const lettering = { cap: CAP * k, fill: ink.ink };
			const left = x + NUMBER_WIDTH * k;
			const base = y + BASE * k;
			const name = shorten(row.name, { width: 18 * k, cap: CAP * k, face: 'semibold' });
			const value = shorten(row.value, { width: text - 19 * k, cap: CAP * k, face: 'bold' });
			return [
				...barGround(room),
				rowNumber(context, row.number, x, y),
				lettered(name, left, base, { ...lettering, face: 'semibold' }),
				...(value === ''
					? []
					: [lettered(value, left + text, base, { ...lettering, face: 'bold', anchor: 'end' })]),
				...row.bar(room),
				...choiceLine(room),
				rowLine(context, x, y + height)
			];
		}
	};
};

const nominalText = (context: StripContext, window: Window): string => {
	const { words, mark, design } = context;
	const { nominalFrom, nominalTo } = window;
	if (window.nominalEmpty) {
		return fill(words.limit.nominalEmpty, { tolerance: toleranceText(design.choice, mark) });
	}
	if (nominalFrom === null && nominalTo === null) return words.limit.anyValue;
	return windowText({ from: nominalFrom ?? 0, to: nominalTo ?? Infinity }, words, mark);
};

/**
 * The window that holds the choice, else the widest with a nominal part, else the first.
 * @param context design and evaluation
 * @returns the window, or null when none is left
 * @example homeWindow(context)?.limitedBy.from // 'reactance'
 */
export function homeWindow({ design, evaluation }: StripContext): Window | null {
	const chosen = design.choice.capacitance_F ?? evaluation.recommended;
	const holding = evaluation.windows.find(
		(window) => chosen !== null && window.from <= chosen && chosen <= window.to
	);
	const open = evaluation.windows.filter((window) => !window.nominalEmpty);
	const widest = open.reduce<Window | null>(
		(best, next) => ((next.widthDecades ?? Infinity) > (best?.widthDecades ?? -1) ? next : best),
		null
	);
	return holding ?? widest ?? evaluation.windows[0] ?? null;
}

const windowBlocks = (context: StripContext, axis: Axis): Block[] => {
	const { evaluation, words, mark, resultShown } = context;
	const { windows } = evaluation;
	if (!resultShown || windows.length === 0) {
		const value = resultShown ? words.limit.noWindow : '';
		return [rowBlock(context, axis, { number: '6.1', name: words.strip.window, value, bar: () => [] })];
	}
	const shown = windows.slice(0, WINDOWS_SHOWN);
	return shown.map((window, index) => {
		const more = windows.length - WINDOWS_SHOWN;
		const cut = more > 0 && index === WINDOWS_SHOWN - 1;
		const text = windowText(window, words, mark);
		return rowBlock(context, axis, {
			number: `6.${String(index + 1)}`,
			name: windows.length === 1 ? words.strip.window : `${words.strip.window} ${String(index + 1)}`,
			value: cut ? `${text}, ${fill(words.limit.moreWindows, { n: String(more) })}` : text,
			bar: (room) => windowBar(room, window.from, window.to, false)
		});
	});
};

const nominalBlock = (context: StripContext, axis: Axis): Block => {
	const window = context.resultShown ? homeWindow(context) : null;
	const { nominalFrom, nominalTo, nominalEmpty } = window ?? {
		nominalFrom: null,
		nominalTo: null,
		nominalEmpty: true
	};
	const bar = (room: BarRoom): Item[] =>
		nominalEmpty ? [] : windowBar(room, nominalFrom ?? 0, nominalTo ?? Infinity, true);
	return rowBlock(context, axis, {
		number: `6.${String(windowRows(context) + 1)}`,
		name: context.words.strip.nominal,
		value: window === null ? '' : nominalText(context, window),
		bar
	});
};

const conflictBlock = (context: StripContext): Block[] => {
	const { evaluation, resultShown, ink, k, width, design } = context;
	const { conflict } = evaluation;
	if (!resultShown || conflict === null) return [];
	const measure = { width: width - NUMBER_WIDTH * k, cap: CAP * k };
	const numbers = conflict.rules.map((id) => ruleNumber(design.rules, id)).join(' × ');
	const explained = wrap(`${numbers}: ${conflict.explanation}`, measure, 3);
	const cure = conflict.cure === null ? [] : wrap(conflict.cure.text, { ...measure, face: 'bold' }, 2);
	const height = ((explained.length + cure.length) * LEADING + 0.9) * k;
	return [
		{
			height,
			draw: (x, y) => [
				...[...explained, ...cure].map((line, index) =>
					lettered(line, x + NUMBER_WIDTH * k, y + (BASE + index * LEADING) * k, {
						cap: CAP * k,
						face: index < explained.length ? 'regular' : 'bold',
						fill: ink.ink
					})
				),
				rowLine(context, x, y + height)
			]
		}
	];
};

/**
 * The rows of windows, nominal part and conflict.
 * @param context design, evaluation, palette, scale
 * @param axis shared C axis
 * @returns the blocks
 * @example windowSection(context, { from: -9, to: -5 })[0].heading // true
 */
export function windowSection(context: StripContext, axis: Axis): Block[] {
	return [
		heading(context, '6', context.words.strip.windowAndChoice),
		...windowBlocks(context, axis),
		nominalBlock(context, axis),
		...conflictBlock(context)
	];
}
