/** The last section of the strip: open points of this design first, then what every sheet must say. */
import { formatQuantity } from '$lib/quantity/format';
import type { Benefit, Window } from '$lib/rules/finding';
import { fixed, formatEdge } from './edge';
import { wrap } from './fitting';
import { lettered } from './pen';
import { CAP, heading, ruleNumber, type Block, type StripContext } from './strip-block';
import { windowHarm } from './window-harm';
import { fill } from './words';

const LEADING = 3.75;

const worst = (benefits: readonly Benefit[]): Benefit | null =>
	benefits.reduce<Benefit | null>((a, b) => (a === null || b.gain_dB < a.gain_dB ? b : a), null);

const harm = ({ mark }: StripContext, at: number, gain: number): { frequency: string; gain: string } => ({
	frequency: formatEdge(at, 'nearest', mark, 'frequency'),
	gain: `${fixed(Math.abs(gain), 1, mark)}\u00a0dB`
});

/** A window all of whose values make some line worse must not look inviting. */
const harmfulWindow = (context: StripContext, window: Window, index: number): string[] => {
	const { evaluation, words, design } = context;
	const chosen = design.choice.capacitance_F;
	const home = chosen !== null && window.from <= chosen && chosen <= window.to;
	const found = home || window.degenerate ? null : windowHarm(design, evaluation, index);
	if (found === null) return [];
	const name =
		evaluation.windows.length > 1 ? `${words.strip.window} ${String(index + 1)}` : words.strip.window;
	return [fill(words.caution.windowHarms, { window: name, ...harm(context, found.frequency, found.gain) })];
};

const choiceHarm = (context: StripContext): string[] => {
	const { design, evaluation, words, mark } = context;
	const chosen = design.choice.capacitance_F;
	const least = worst(evaluation.benefit);
	if (chosen === null || least === null || least.gain_dB >= 0) return [];
	const value = formatQuantity(chosen, 'capacitance', { decimalMark: mark });
	const source = design.sources.find(({ id }) => id === least.source)?.label ?? least.source;
	return [
		fill(words.caution.choiceHarms, { value, source, ...harm(context, least.frequency, least.gain_dB) })
	];
};

const advisory = ({ design, evaluation, words }: StripContext): string[] => {
	const broken = (evaluation.choice?.warnings ?? []).filter((id) =>
		design.rules.some((rule) => rule.id === id)
	);
	if (broken.length === 0) return [];
	const rules = broken.map((id) => ruleNumber(design.rules, id)).join(', ');
	return [fill(words.caution.advisory, { rules })];
};

/** Nothing here may give the choice away before its step. */
const openPoints = (context: StripContext): string[] => {
	const { design, evaluation, words, resultShown } = context;
	if (!resultShown) return [];
	const notes = design.notes?.trim() ?? '';
	return [
		...(notes === '' ? [] : [fill(words.caution.open, { text: notes })]),
		...choiceHarm(context),
		...evaluation.windows.flatMap((window, index) => harmfulWindow(context, window, index)),
		...advisory(context)
	];
};

const always = ({ design, words }: StripContext): string[] => [
	words.caution.mode,
	design.supply.kind === 'ac' ? words.caution.classX : words.caution.hotPlug,
	words.caution.approval,
	words.caution.standards
];

/**
 * The rows of the cautions.
 * @param context design, evaluation, palette, scale
 * @param most lines that each open point may take
 * @returns the blocks
 * @example cautionBlocks(context, 3)[0].heading // true
 */
export function cautionBlocks(context: StripContext, most: number): Block[] {
	const { ink, k, width, words } = context;
	const measure = { width, cap: CAP * k };
	const open = openPoints(context).flatMap((text) => wrap(text, measure, most));
	const lines = [...open, ...always(context).flatMap((text) => wrap(text, measure, 2))];
	return [
		heading(context, '', words.strip.cautions),
		...lines.map((line): Block => ({
			height: LEADING * k,
			draw: (x, y) => [lettered(line, x, y + 2.95 * k, { cap: CAP * k, fill: ink.ink })]
		}))
	];
}
