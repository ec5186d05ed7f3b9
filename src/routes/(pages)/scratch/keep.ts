/** The scratch sheet in this browser's storage, so that a reload loses nothing. */
import { readAt, type Tree } from './tree';

const KEY = 'herringbone-scratch';

const isTree = (value: unknown): value is Tree => typeof value === 'object' && value !== null;

/** What was kept, or null; a browser that keeps nothing has kept nothing. */
export function readKept(storage: () => Storage): Tree | null {
	let text: string | null;
	try {
		text = storage().getItem(KEY);
	} catch (cause) {
		if (cause instanceof DOMException) return null;
		throw cause;
	}
	if (text === null) return null;
	const tree = parse(text);
	return isTree(tree) && isTree(readAt(tree, '/design')) ? tree : null;
}

const parse = (text: string): unknown => {
	try {
		return JSON.parse(text) as unknown;
	} catch (cause) {
		if (cause instanceof SyntaxError) return null;
		throw cause;
	}
};

/** Keeps a state. @returns whether the browser took it: storage may be full, or forbidden. */
export function keep(storage: () => Storage, tree: Tree): boolean {
	try {
		storage().setItem(KEY, JSON.stringify(tree));
		return true;
	} catch (cause) {
		if (cause instanceof DOMException) return false;
		throw cause;
	}
}
