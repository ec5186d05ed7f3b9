/** From what was typed to the sheet: parse, evaluate, compose, draw. What cannot be read counts on as it last was. */
import { composeAnyway, type Read } from '$lib/components/layout-text';
import type { Design } from '$lib/design/design';
import { parseDesignText, type Issue } from '$lib/design/parse';
import type { Evaluation } from '$lib/rules/finding';
import { evaluate } from '$lib/rules/evaluate';
import { toSvg } from '$lib/render/svg';
import { sheetSteps } from '$lib/sheet/compose';
import type { Layout, SheetKind, TitleBlock } from '$lib/sheet/layout';
import { unprintableInDesign } from '$lib/sheet/printable';
import { readLayout, readTitleBlock } from './settings';
import { readAt, removeAt, textAt, writeAt, type Tree } from './tree';

export interface Sheet {
	readonly design: Design;
	readonly layout: Layout;
	readonly titleBlock: TitleBlock;
	readonly kind: SheetKind;
	readonly step: number;
	readonly steps: number;
	readonly evaluation: Evaluation;
	readonly svg: string;
	/** Where the chart stands on the paper, from the drawing's metadata. */
	readonly metadata: Readonly<Record<string, unknown>>;
}

export interface Drawn {
	readonly sheet: Sheet;
	/** Pointers into the whole tree. */
	readonly issues: readonly Issue[];
	/** The tree with unreadable places as they last were. */
	readonly good: Tree;
}

type Reader<Value> = (tree: Tree) => Read<Value>;

const ROUNDS = 4;

const readDesign: Reader<Design> = (tree) => {
	const parsed = parseDesignText(tree);
	if (!parsed.ok) return parsed;
	const issues = unprintableInDesign(parsed.design);
	return issues.length === 0 ? { ok: true, value: parsed.design } : { ok: false, issues };
};

const mend = (tree: Tree, good: Tree, issues: readonly Issue[]): Tree =>
	issues.reduce((mended, { pointer }) => {
		const before = readAt(good, pointer);
		return before === undefined ? removeAt(mended, pointer) : writeAt(mended, pointer, before);
	}, tree);

interface Part<Value> {
	readonly value: Value;
	readonly issues: readonly Issue[];
	readonly good: Tree;
}

/** Reads one part of the tree; places that cannot be read take their last good text, then all of it does. */
const readPart = <Value>(place: string, tree: Tree, good: Tree, read: Reader<Value>): Part<Value> => {
	const typed = readAt(tree, place) ?? {};
	const before = readAt(good, place) ?? {};
	const first = read(typed);
	if (first.ok) return { value: first.value, issues: [], good: typed };
	const issues = first.issues.map((issue) => ({ ...issue, pointer: place + issue.pointer }));
	let mended: Tree = typed;
	let refused: readonly Issue[] = first.issues;
	for (let round = 0; round < ROUNDS; round += 1) {
		mended = mend(mended, before, refused);
		const again = read(mended);
		if (again.ok) return { value: again.value, issues, good: mended };
		refused = again.issues;
	}
	const last = read(before);
	if (!last.ok) throw new RangeError(`the last good state cannot be read at ${place}`);
	return { value: last.value, issues, good: before };
};

const readKind = (text: string): SheetKind => (text === 'blank' || text === 'step' ? text : 'worked');

/** Draws the sheet of a tree; `good` is the tree of the last drawing. */
export function draw(tree: Tree, good: Tree): Drawn {
	const design = readPart('/design', tree, good, readDesign);
	const layout = readPart('/layout', tree, good, readLayout);
	const titleBlock = readPart('/titleBlock', tree, good, readTitleBlock);
	const kind = readKind(textAt(tree, '/kind'));
	const steps = sheetSteps(design.value);
	const step = Math.max(1, Math.min(steps, Number(textAt(tree, '/step')) || 1));
	const evaluation = evaluate(design.value);
	const { scene, issues } = composeAnyway({
		design: design.value,
		evaluation,
		layout: layout.value,
		titleBlock: titleBlock.value,
		kind,
		...(kind === 'step' ? { step } : {})
	});
	return {
		sheet: {
			design: design.value,
			layout: layout.value,
			titleBlock: titleBlock.value,
			kind,
			step,
			steps,
			evaluation,
			svg: toSvg(scene),
			metadata: scene.metadata
		},
		issues: [...design.issues, ...layout.issues, ...titleBlock.issues, ...issues],
		good: { design: design.good, layout: layout.good, titleBlock: titleBlock.good }
	};
}
