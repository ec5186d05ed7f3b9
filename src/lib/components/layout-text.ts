/** A sheet's settings as a form or an address holds them, read as a layout. */
import { parseLayout } from '$lib/design/layout';
import type { Issue } from '$lib/design/parse';
import { parseQuantity } from '$lib/quantity/parse';
import type { Quantity } from '$lib/quantity/unit';
import type { Scene } from '$lib/scene/scene';
import { composeSheet, LayoutError, type SheetInput } from '$lib/sheet/compose';
import type { Layout } from '$lib/sheet/layout';

export type LayoutText = Readonly<Record<string, string>>;

export type Read<Value> =
	{ readonly ok: true; readonly value: Value } | { readonly ok: false; readonly issues: readonly Issue[] };

const WORDS = ['paper', 'orientation', 'ink', 'decimalMark', 'language'] as const;
const SWITCHES = ['strip', 'benefitPane', 'zones'] as const;
const ENDS: readonly (readonly [key: string, quantity: Quantity])[] = [
	['frequencyFrom_Hz', 'frequency'],
	['impedanceFrom_ohm', 'resistance']
];

export const LAYOUT_KEYS: readonly string[] = [
	...WORDS,
	...SWITCHES,
	'decade_mm',
	...ENDS.map(([key]) => key)
];

const millimetres = (text: string): number | null => {
	const match = /^\s*(\d{1,4}(?:[.,]\d{1,6})?)\s*(?:mm)?\s*$/.exec(text);
	return match?.[1] === undefined ? null : Number(match[1].replace(',', '.'));
};

const readDecade = (text: string, layout: Record<string, unknown>): Issue[] => {
	if (text === '') return [];
	const value = millimetres(text);
	if (value === null) return [{ pointer: '/decade_mm', detail: 'Enter whole millimetres, such as 28 mm.' }];
	layout.decade_mm = value;
	return [];
};

const readEnds = (text: LayoutText, layout: Record<string, unknown>): Issue[] =>
	ENDS.flatMap(([key, quantity]) => {
		const typed = text[key]?.trim() ?? '';
		if (typed === '') return [];
		const parsed = parseQuantity(typed, quantity);
		if (!parsed.ok) return [{ pointer: `/${key}`, detail: parsed.detail }];
		layout[key] = parsed.value;
		return [];
	});

/**
 * Reads a sheet's settings; what is empty is left to be chosen.
 * @param text the layout's keys, each with a text; switches are `yes` or `no`
 * @returns the layout, or issues with pointers into it
 * @example readLayoutText({ paper: 'A4', orientation: 'portrait', decade_mm: '28 mm' })
 */
export function readLayoutText(text: LayoutText): Read<Layout> {
	const stated = (key: string): boolean => (text[key] ?? '') !== '';
	const layout: Record<string, unknown> = Object.fromEntries([
		...WORDS.filter(stated).map((key) => [key, text[key]] as const),
		...SWITCHES.filter(stated).map((key) => [key, text[key] === 'yes'] as const)
	]);
	const issues = [...readDecade(text.decade_mm?.trim() ?? '', layout), ...readEnds(text, layout)];
	const parsed = parseLayout(layout);
	if (parsed.ok && issues.length === 0) return { ok: true, value: parsed.layout };
	return { ok: false, issues: [...issues, ...(parsed.ok ? [] : parsed.issues)] };
}

/**
 * Composes a sheet; a layout that leaves too few decades is drawn with a decade of its own choice.
 * @param input what `composeSheet` takes
 * @returns the scene, and what was wrong with the layout
 */
export function composeAnyway(input: SheetInput): {
	readonly scene: Scene;
	readonly issues: readonly Issue[];
} {
	try {
		return { scene: composeSheet(input), issues: [] };
	} catch (cause) {
		if (!(cause instanceof LayoutError)) throw cause;
		const { decade_mm: _, ...layout } = input.layout;
		return {
			scene: composeSheet({ ...input, layout }),
			issues: [{ pointer: cause.pointer, detail: cause.message }]
		};
	}
}
