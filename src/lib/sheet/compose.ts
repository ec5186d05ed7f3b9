/** One sheet: frame, chart, check rules, strip, check block and title block, from a design and its evaluation. */
import type { Design } from '$lib/design/design';
import { evaluate } from '$lib/rules/evaluate';
import type { Evaluation } from '$lib/rules/finding';
import type { Item, Scene } from '$lib/scene/scene';
import { chartItems } from './chart';
import { checkBlockItems } from './check-block';
import { checkRuleItems } from './check-rules';
import { describeSheet } from './description';
import { fitChart, LayoutError, type Fit } from './fit';
import { frameItems } from './frame';
import { INKS, type Ink } from './ink';
import type { Layout, SheetKind, TitleBlock } from './layout';
import { limitText } from './limit';
import { dividePaper, type Paper } from './paper';
import { stripItems } from './strip';
import { findingOf } from './strip-block';
import { titleBlockItems } from './title-block';
import { fill, wordsOf, type Words } from './words';

export { LayoutError } from './fit';

export interface SheetInput {
	/** Absent only on a blank sheet. */
	readonly design?: Design | undefined;
	/** Of this design; worked out here when absent. */
	readonly evaluation?: Evaluation | undefined;
	readonly layout: Layout;
	readonly kind: SheetKind;
	/** 1 … sheetSteps(design), for the kind `step`. */
	readonly step?: number | undefined;
	readonly titleBlock?: TitleBlock | undefined;
	/** SHA-256 of the design data, hexadecimal; its first 16 digits print. */
	readonly dataHash?: string | undefined;
}

/**
 * Counts a design's build-up steps: parts and sources, one for each rule, windows and choice.
 * @param design the worksheet's design
 * @returns rules + 2
 * @example sheetSteps(chargerAuxiliary) // 8
 */
export function sheetSteps(design: Design): number {
	return design.rules.length + 2;
}

/** All that the parts of one sheet read. */
interface Setting extends Fit {
	readonly input: SheetInput;
	readonly design: Design | null;
	readonly evaluation: Evaluation | null;
	readonly paper: Paper;
	readonly ink: Ink;
	readonly words: Words;
	readonly mark: '.' | ',';
	readonly step: number | null;
	readonly steps: number;
	readonly rulesShown: number;
	readonly resultShown: boolean;
}

const checkedStep = (input: SheetInput, steps: number): number | null => {
	if (input.kind !== 'step') return null;
	const step = input.step ?? 1;
	if (Number.isInteger(step) && step >= 1 && step <= steps) return step;
	throw new LayoutError('/step', `A step from 1 to ${String(steps)} is wanted, got ${String(step)}.`);
};

const checkedDesign = ({ design, kind }: SheetInput): Design | null => {
	if (design !== undefined || kind === 'blank') return design ?? null;
	throw new LayoutError(
		'/design',
		`A sheet of the kind ${kind} needs a design; only a blank sheet has none.`
	);
};

const settle = (input: SheetInput): Setting => {
	const { layout, kind } = input;
	const design = checkedDesign(input);
	const evaluation = design === null ? null : (input.evaluation ?? evaluate(design));
	const paper = dividePaper(layout);
	const steps = design === null ? 0 : sheetSteps(design);
	const step = checkedStep(input, steps);
	const pane = layout.benefitPane ?? kind !== 'blank';
	const rulesShown = (step ?? steps) - 1;
	return {
		input,
		design,
		evaluation,
		paper,
		...fitChart({ paper, layout, design, evaluation, pane }),
		ink: INKS[layout.ink ?? 'colour'],
		words: wordsOf(layout.language),
		mark: layout.decimalMark ?? '.',
		step,
		steps,
		rulesShown: Math.max(0, rulesShown),
		resultShown: step === null || step === steps
	};
};

const isBlank = ({ input }: Setting): boolean => input.kind === 'blank';

const drawChart = (setting: Setting): Item[] => {
	const { plot, pane, design, evaluation, ink, words, mark, step, paper } = setting;
	const blank = isBlank(setting);
	return chartItems({
		plot,
		pane,
		design: blank ? null : design,
		evaluation: blank ? null : evaluation,
		ink,
		words,
		decimalMark: mark,
		step,
		k: paper.k
	});
};

const drawStrip = (setting: Setting): Item[] => {
	const { design, evaluation, ink, words, mark, paper, rulesShown, resultShown } = setting;
	const filled =
		isBlank(setting) || design === null || evaluation === null
			? null
			: { design, evaluation, mark, rulesShown, resultShown };
	return stripItems({ columns: paper.strip, context: filled, blank: design, ink, words, k: paper.k });
};

const stepText = ({ step, design, evaluation, words, mark, resultShown }: Setting): string | null => {
	if (step === null || design === null || evaluation === null) return null;
	if (resultShown) return words.check.stepChoice;
	const rule = design.rules[step - 2];
	const finding = rule === undefined ? null : findingOf(evaluation, rule.id);
	if (rule === undefined || finding === null) return words.check.stepParts;
	const name = `5.${String(step - 1)} ${words.rule[rule.kind]}`;
	return fill(words.check.stepRule, { rule: name, limit: limitText(finding, words, mark) });
};

const drawBlocks = (setting: Setting): Item[] => {
	const { input, paper, ink, words, step, steps, plot, evaluation, mark, design } = setting;
	const title = input.titleBlock?.title ?? design?.title;
	return [
		...checkBlockItems({
			box: paper.check,
			blank: isBlank(setting),
			stepText: stepText(setting),
			decade: plot.decade,
			engine: evaluation?.engine ?? null,
			dataHash: input.dataHash ?? null,
			mark,
			ink,
			words
		}),
		...titleBlockItems({
			box: paper.titleBlock,
			block: { ...input.titleBlock, ...(title === undefined ? {} : { title }) },
			kind: input.kind,
			step,
			steps,
			language: input.layout.language ?? 'en',
			paper: input.layout.paper,
			ink,
			words
		})
	];
};

const metadataOf = ({ plot, pane, input, step, steps }: Setting): Scene['metadata'] => ({
	plot: {
		x_mm: plot.x,
		y_mm: plot.y,
		width_mm: plot.width,
		height_mm: plot.height,
		decade_mm: plot.decade,
		frequencyFrom_Hz: plot.frequencyFrom,
		frequencyTo_Hz: plot.frequencyTo,
		impedanceFrom_ohm: plot.impedanceFrom,
		impedanceTo_ohm: plot.impedanceTo
	},
	...(pane === null
		? {}
		: {
				pane: {
					x_mm: pane.x,
					y_mm: pane.y,
					width_mm: pane.width,
					height_mm: pane.height,
					gainFrom_dB: pane.gainFrom,
					gainTo_dB: pane.gainTo
				}
			}),
	kind: input.kind,
	step,
	steps
});

/**
 * Composes one sheet as a drawing in millimetres.
 * @param input design and evaluation, layout, kind and step, title block
 * @returns the scene: paper size, title, description, metadata, items
 * @throws LayoutError when the layout's decade length leaves fewer than 2 × 2 decades, a step is out of range, or a
 * sheet other than a blank one has no design
 * @example composeSheet({ layout: { paper: 'A4', orientation: 'landscape' }, kind: 'blank' }).width // 297
 * Source: our own rule; frame after ISO 5457, title block after ISO 7200.
 */
export function composeSheet(input: SheetInput): Scene {
	const setting = settle(input);
	const { paper, plot, pane, ink, words, design } = setting;
	const rules = {
		plot,
		foot: plot.y + plot.height + (pane?.height ?? 0),
		left: paper.frame.x,
		k: paper.k,
		ink,
		words
	};
	const title = input.titleBlock?.title ?? design?.title ?? '';
	return {
		width: paper.width,
		height: paper.height,
		title: title === '' ? words.document.type : title,
		description: describeSheet({
			...setting,
			design: isBlank(setting) ? null : design
		}),
		language: input.layout.language ?? 'en',
		metadata: metadataOf(setting),
		items: [
			...frameItems(paper, ink, input.layout.zones !== false),
			...drawChart(setting),
			...checkRuleItems(rules),
			...drawStrip(setting),
			...drawBlocks(setting)
		]
	};
}
