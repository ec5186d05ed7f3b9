/** The two rules of exactly 100 mm that show whether a print is true to scale, one along each axis. */
import type { Item } from '$lib/scene/scene';
import type { Ink } from './ink';
import { group, lettered, ruled } from './pen';
import type { Plot } from './plot';
import type { Words } from './words';

export const CHECK_RULE_LENGTH = 100;
const STEP = 10;
const LINE = 0.25;

/** Distances at k = 1 [mm]. */
const UNDER_FOOT = 10.6;
/** Close to the frame, so that the longest numeral, such as 100 mΩ, ends before the ticks. */
const FROM_FRAME = 1.2;
const ABOVE_FOOT = 5;
const TICK = 0.7;
const END_TICK = 1.4;
const GAP = 2;
/** The sentence stands on the rule, between its end ticks, clear of what the chart says at its foot. */
const TEXT_RISE = 1.3;

export interface CheckRulesInput {
	readonly plot: Plot;
	/** Lower edge of the chart: the pane's where there is one [mm]. */
	readonly foot: number;
	/** Inner edge of the frame at the left [mm]. */
	readonly left: number;
	readonly k: number;
	readonly ink: Ink;
	readonly words: Words;
}

const steps = (): { at: number; length: number }[] =>
	Array.from({ length: CHECK_RULE_LENGTH / STEP + 1 }, (_, index) => ({
		at: index * STEP,
		length: index % 10 === 0 ? END_TICK : TICK
	}));

/**
 * Draws both check rules and the sentence beside the lower one.
 * @param input plot, foot of the chart, frame, scale, palette, words
 * @returns one group with role `scale`
 * @example checkRuleItems(input)[0].label // '100 mm, both ways, at 100 %'
 * Source: common practice; domain of the sheet: print at 100 % and measure.
 */
export function checkRuleItems({ plot, foot, left, k, ink, words }: CheckRulesInput): Item[] {
	const stroke = { colour: ink.ink, width: LINE };
	const y = foot + UNDER_FOOT * k;
	const x = left + FROM_FRAME * k;
	const start = foot - ABOVE_FOOT * k;
	const text = words.check.rulesText;
	const level = steps().flatMap(({ at, length }) => [plot.x + at, y - length * k, plot.x + at, y]);
	const upright = steps().flatMap(({ at, length }) => [x, start - at, x + length * k, start - at]);
	const lettering = { cap: 2.5 * k, fill: ink.graphite };
	return [
		group(
			[
				ruled([plot.x, y, plot.x + CHECK_RULE_LENGTH, y], stroke, { id: 'check-rule-frequency' }),
				ruled(level, stroke),
				ruled([x, start, x, start - CHECK_RULE_LENGTH], stroke, { id: 'check-rule-impedance' }),
				ruled(upright, stroke),
				lettered(text, plot.x + GAP * k, y - TEXT_RISE * k, lettering)
			],
			{ role: 'scale', label: text }
		)
	];
}
