/** What was typed, as a tree of texts; every place in it has an RFC 6901 pointer. Nothing is changed in place. */
export type Tree = string | number | boolean | null | readonly Tree[] | { readonly [key: string]: Tree };

const steps = (pointer: string): string[] =>
	pointer === ''
		? []
		: pointer
				.slice(1)
				.split('/')
				.map((step) => step.replaceAll('~1', '/').replaceAll('~0', '~'));

const isList = (tree: Tree | undefined): tree is readonly Tree[] => Array.isArray(tree);
const isRecord = (tree: Tree | undefined): tree is Readonly<Record<string, Tree>> =>
	typeof tree === 'object' && tree !== null && !Array.isArray(tree);

const child = (tree: Tree | undefined, step: string): Tree | undefined => {
	if (isList(tree)) return tree[Number(step)];
	return isRecord(tree) && Object.hasOwn(tree, step) ? tree[step] : undefined;
};

/** The value at a place; undefined where there is none. */
export function readAt(tree: Tree, pointer: string): Tree | undefined {
	return steps(pointer).reduce<Tree | undefined>(child, tree);
}

/** The items of a list; none where there is no list. */
export function listAt(tree: Tree, pointer: string): readonly Tree[] {
	const found = readAt(tree, pointer);
	return isList(found) ? found : [];
}

/** The text at a place, empty where there is none. */
export function textAt(tree: Tree, pointer: string): string {
	const found = readAt(tree, pointer);
	return typeof found === 'string' || typeof found === 'number' ? String(found) : '';
}

const change = (
	tree: Tree | undefined,
	path: readonly string[],
	value: Tree | undefined
): Tree | undefined => {
	const [step, ...rest] = path;
	if (step === undefined) return value;
	const next = change(child(tree, step), rest, value);
	if (isList(tree)) {
		const at = Number(step);
		if (next === undefined) return tree.filter((_, n) => n !== at);
		return at < tree.length ? tree.map((item, n) => (n === at ? next : item)) : [...tree, next];
	}
	const entries = isRecord(tree) ? Object.entries(tree) : [];
	const kept = entries.filter(([key]) => key !== step || next !== undefined);
	if (next !== undefined && !kept.some(([key]) => key === step)) kept.push([step, next]);
	return Object.fromEntries(
		kept.map(([key, item]) => [key, key === step && next !== undefined ? next : item])
	);
};

/** The tree with another value at a place; parents that are missing are made. */
export function writeAt(tree: Tree, pointer: string, value: Tree): Tree {
	return change(tree, steps(pointer), value) ?? value;
}

/** The tree without what stands at a place. */
export function removeAt(tree: Tree, pointer: string): Tree {
	if (readAt(tree, pointer) === undefined) return tree;
	return change(tree, steps(pointer), undefined) ?? tree;
}

/** The tree with an item of a list moved by one place or more; past an end it stays. */
export function moveAt(tree: Tree, pointer: string, from: number, by: number): Tree {
	const items = [...listAt(tree, pointer)];
	const to = from + by;
	const item = items[from];
	if (item === undefined || to < 0 || to >= items.length) return tree;
	items.splice(from, 1);
	items.splice(to, 0, item);
	return writeAt(tree, pointer, items);
}

/** An id that no item of the list has yet: the word, then the word with 2, 3 … */
export function freshId(items: readonly Tree[], word: string): string {
	const taken = new Set(items.map((item) => textAt(item, '/id')));
	let id = word;
	for (let n = 2; taken.has(id); n += 1) id = `${word}-${String(n)}`;
	return id;
}
