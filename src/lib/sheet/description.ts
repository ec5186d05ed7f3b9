/** The sheet in one paragraph, for people who hear it instead of seeing it. */
import type { Design } from '$lib/design/design';
import { formatQuantity } from '$lib/quantity/format';
import type { Evaluation, Finding } from '$lib/rules/finding';
import { fixed, formatEdge, type DecimalMark } from './edge';
import { limitText, windowText } from './limit';
import type { Plot } from './plot';
import { findingOf, ruleNumber } from './strip-block';
import { fill, type Words } from './words';

export interface DescriptionInput {
	readonly design: Design | null;
	readonly evaluation: Evaluation | null;
	readonly plot: Plot;
	/** null on a worked or blank sheet. */
	readonly step: number | null;
	readonly steps: number;
	/** How many rules are filled in, and whether the result is. */
	readonly rulesShown: number;
	readonly resultShown: boolean;
	readonly mark: DecimalMark;
	readonly words: Words;
}

const chartSentence = ({ plot, words, mark }: DescriptionInput): string =>
	fill(words.description.chart, {
		f0: formatQuantity(plot.frequencyFrom, 'frequency', { decimalMark: mark }),
		f1: formatQuantity(plot.frequencyTo, 'frequency', { decimalMark: mark }),
		z0: formatQuantity(plot.impedanceFrom, 'resistance', { decimalMark: mark }),
		z1: formatQuantity(plot.impedanceTo, 'resistance', { decimalMark: mark }),
		decade: String(plot.decade)
	});

const ruleSentence = (finding: Finding, number: string, { words, mark }: DescriptionInput): string =>
	fill(words.description.forbids, {
		name: `${number} ${words.rule[finding.kind]}`,
		class: words.class[finding.class],
		limit: limitText(finding, words, mark)
	});

const windowSentences = (input: DescriptionInput, design: Design, evaluation: Evaluation): string[] => {
	const { words, mark } = input;
	const number = (id: string | null): string => (id === null ? '–' : ruleNumber(design.rules, id));
	if (evaluation.windows.length === 0) {
		const explanation = evaluation.conflict?.explanation ?? '';
		return [fill(words.description.noWindow, { explanation }).trim()];
	}
	return evaluation.windows.map((window) =>
		fill(words.description.window, {
			range: windowText(window, words, mark),
			from: number(window.limitedBy.from),
			to: number(window.limitedBy.to)
		})
	);
};

const choiceSentences = (input: DescriptionInput, design: Design, evaluation: Evaluation): string[] => {
	const { words, mark } = input;
	const chosen = design.choice.capacitance_F;
	if (chosen === null || evaluation.choice === null) return [words.description.noChoice];
	const { forbidden, allowed, nominalOnly } = words.description;
	const states = { forbidden, allowed, 'nominal-only': nominalOnly };
	const value = formatQuantity(chosen, 'capacitance', { decimalMark: mark });
	const said = fill(words.description.choice, { value, state: states[evaluation.choice.state] });
	const [first, ...others] = evaluation.benefit;
	if (first === undefined) return [said];
	const least = others.reduce((a, b) => (b.gain_dB < a.gain_dB ? b : a), first);
	return [
		said,
		fill(words.description.benefit, {
			gain: `${fixed(least.gain_dB, 1, mark, true)}\u00a0dB`,
			frequency: formatEdge(least.frequency, 'nearest', mark, 'frequency')
		})
	];
};

/**
 * Says what a sheet shows: axes, what each rule forbids, windows, choice.
 * @param input design and evaluation, axes, how much is filled in, words
 * @returns one paragraph in the sheet's language
 * @example describeSheet({ ...input, design: null }) // 'Reactance chart from 1 kHz to 10 MHz … by hand.'
 */
export function describeSheet(input: DescriptionInput): string {
	const { design, evaluation, words, step, steps, rulesShown, resultShown } = input;
	const sentences = [chartSentence(input)];
	if (design === null || evaluation === null) return [...sentences, words.description.plain].join(' ');
	if (step !== null) {
		sentences.push(fill(words.description.step, { step: String(step), steps: String(steps) }));
	}
	for (const rule of design.rules.slice(0, rulesShown)) {
		const finding = findingOf(evaluation, rule.id);
		if (finding !== null) sentences.push(ruleSentence(finding, ruleNumber(design.rules, rule.id), input));
	}
	if (!resultShown) return sentences.join(' ');
	return [
		...sentences,
		...windowSentences(input, design, evaluation),
		...choiceSentences(input, design, evaluation)
	].join(' ');
}
