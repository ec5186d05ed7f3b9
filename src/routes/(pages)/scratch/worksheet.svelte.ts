/** The scratch sheet: what was typed, its past, and the drawing that follows it. */
import { designToText } from '$lib/design/parse';
import type { Design, Rule } from '$lib/design/design';
import { newDesign } from '$lib/design/start';
import { draw, type Drawn } from './draw';
import { beginning, close, redo, step, undo, type Past } from './past';
import { listAt, moveAt, readAt, removeAt, textAt, writeAt, type Tree } from './tree';

const START_LAYOUT: Tree = { paper: 'A4', orientation: 'landscape' };

/** The whole state that belongs to a design: the sheet's settings at their defaults. */
export function treeOf(design: Design, layout: Tree = START_LAYOUT, titleBlock: Tree = {}): Tree {
	return { design: designToText(design) as Tree, layout, titleBlock, kind: 'worked', step: '1' };
}

/** A rule as a form holds it. */
export function textOf(rule: Rule): Tree {
	const { rules } = designToText({ ...newDesign('dc'), rules: [rule] });
	return (rules[0] ?? {}) as Tree;
}

export class Worksheet {
	#past: Past<Tree> = $state.raw(beginning<Tree>(treeOf(newDesign('ac'))));
	#drawn: Drawn = $state.raw(draw(this.#past.now, this.#past.now));
	#frame: number | null = null;
	/** The drawing has not yet caught up with what was typed. */
	behind = $state(false);
	/** The rule whose row is open. */
	opened: string | null = $state(null);
	/** Called with every new state, to keep it. */
	onchange: (tree: Tree) => void = () => undefined;

	readonly tree = $derived(this.#past.now);
	readonly canUndo = $derived(this.#past.before.length > 0);
	readonly canRedo = $derived(this.#past.after.length > 0);
	readonly sheet = $derived(this.#drawn.sheet);
	readonly issues = $derived(this.#drawn.issues);
	readonly #issueAt = $derived(
		Object.fromEntries(this.issues.map(({ pointer, detail }) => [pointer, detail]))
	);

	text(at: string): string {
		return textAt(this.tree, at);
	}

	has(at: string): boolean {
		return readAt(this.tree, at) !== undefined;
	}

	issue(at: string): string | undefined {
		return this.#issueAt[at];
	}

	/** The text that counts while what stands at a place cannot be read. */
	lastGood(at: string): string {
		return textAt(this.#drawn.good, at);
	}

	/** Writes at a place; typing on at the same place is one step of undo. An empty optional place goes. */
	write(at: string, value: Tree, optional = false): void {
		const tree = optional && value === '' ? removeAt(this.tree, at) : writeAt(this.tree, at, value);
		this.#take(step(this.#past, tree, at));
	}

	/** A change that is a step of undo by itself. */
	change(turn: (tree: Tree) => Tree): void {
		this.#take(close(step(this.#past, turn(this.tree))));
	}

	/** Sets a place as a step of its own. */
	set(at: string, value: Tree): void {
		this.change((tree) => writeAt(tree, at, value));
	}

	list(at: string): readonly Tree[] {
		return listAt(this.tree, at);
	}

	add(at: string, item: Tree): void {
		this.change((tree) => writeAt(tree, at, [...listAt(tree, at), item]));
	}

	move(at: string, index: number, by: number): void {
		this.change((tree) => moveAt(tree, at, index, by));
	}

	remove(at: string): void {
		this.change((tree) => removeAt(tree, at));
	}

	/** Leaving a field closes its step. */
	settle(): void {
		this.#past = close(this.#past);
	}

	undo(): void {
		this.#take(undo(this.#past));
	}

	redo(): void {
		this.#take(redo(this.#past));
	}

	/** Takes up a state that was kept, without a past. */
	restore(tree: Tree): void {
		const drawn = draw(tree, this.#past.now);
		this.#past = beginning(tree);
		this.#drawn = drawn;
	}

	#take(past: Past<Tree>): void {
		if (past === this.#past) return;
		this.#past = past;
		this.behind = true;
		this.onchange(past.now);
		if (this.#frame !== null) return;
		this.#frame = requestAnimationFrame(() => {
			this.#frame = null;
			this.#drawn = draw(this.tree, this.#drawn.good);
			this.behind = false;
		});
	}
}
