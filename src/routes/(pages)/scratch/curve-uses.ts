/** What a measured curve stands for in a design that is being written, and how it is taken and let go. */
import { freshId, listAt, readAt, removeAt, textAt, writeAt, type Tree } from './tree';

const PARTS = [
	['inductor', 'L'],
	['capacitor', 'C'],
	['choice', 'Cx']
] as const;

export type Use = 'none' | (typeof PARTS)[number][0] | 'source';

const MOST_SOURCES = 6;

/** The parts and sources that a curve stands for, in words. */
export function usesOf(tree: Tree, id: string): string[] {
	const parts = PARTS.filter(([part]) => textAt(tree, `/design/${part}/curve`) === id).map(
		([, name]) => name
	);
	const sources = listAt(tree, '/design/sources')
		.filter((source) => textAt(source, '/kind') === 'measured' && textAt(source, '/curve') === id)
		.map((source) => `source “${textAt(source, '/label')}”`);
	return [...parts, ...sources];
}

/** Adds a curve, and lets it stand for a part or a new source, as one change. */
export function withCurve(tree: Tree, curve: { readonly [key: string]: Tree }, use: Use): Tree {
	const curves = listAt(tree, '/design/curves');
	const id = freshId(curves, 'curve');
	const added = writeAt(tree, '/design/curves', [...curves, { id, ...curve }]);
	if (use === 'none') return added;
	if (use !== 'source') return writeAt(added, `/design/${use}/curve`, id);
	const sources = listAt(added, '/design/sources');
	if (sources.length >= MOST_SOURCES) return added;
	const source = { id: freshId(sources, 'measured'), label: 'Measured source', kind: 'measured', curve: id };
	return writeAt(added, '/design/sources', [...sources, source]);
}

/** A source keeps its id, which rules name, and becomes a test network. */
const released = (source: Tree, id: string): Tree => {
	if (textAt(source, '/kind') !== 'measured' || textAt(source, '/curve') !== id) return source;
	const kept = { id: textAt(source, '/id'), label: textAt(source, '/label') };
	return { ...kept, kind: 'amn-50uH-5ohm', networks: '2' };
};

/** Removes a curve and every reference to it, as one change. */
export function withoutCurve(tree: Tree, index: number): Tree {
	const id = textAt(tree, `/design/curves/${String(index)}/id`);
	const freed = PARTS.reduce(
		(now, [part]) =>
			textAt(now, `/design/${part}/curve`) === id ? removeAt(now, `/design/${part}/curve`) : now,
		tree
	);
	const sources = listAt(freed, '/design/sources').map((source) => released(source, id));
	const cleared =
		readAt(freed, '/design/sources') === undefined ? freed : writeAt(freed, '/design/sources', sources);
	const left = removeAt(cleared, `/design/curves/${String(index)}`);
	return listAt(left, '/design/curves').length === 0 ? removeAt(left, '/design/curves') : left;
}

/** What removing a curve does, in a sentence. */
export function removalWords(label: string, uses: readonly string[]): string {
	if (uses.length === 0) return `${label} is removed. Undo brings it back.`;
	const sources = uses.some((use) => use.startsWith('source'));
	const network = sources ? '; a source becomes two 50 µH + 5 Ω networks' : '';
	return `${label} is removed, and no longer stands for ${uses.join(', ')}: typed values count again${network}. Undo brings all of it back.`;
}
