/** The texts of the layout and the title block, read as their values. */
import { LAYOUT_KEYS, readLayoutText, type Read } from '$lib/components/layout-text';
import { parseTitleBlock } from '$lib/design/layout';
import type { Layout, TitleBlock } from '$lib/sheet/layout';
import { unprintableInTitleBlock } from '$lib/sheet/printable';
import { textAt, type Tree } from './tree';

/** Reads the sheet's settings; what is empty is left to be chosen. */
export function readLayout(tree: Tree): Read<Layout> {
	return readLayoutText(Object.fromEntries(LAYOUT_KEYS.map((key) => [key, textAt(tree, `/${key}`)])));
}

/** Reads the cells of the title block; an empty cell is left out. */
export function readTitleBlock(tree: Tree): Read<TitleBlock> {
	const entries =
		typeof tree === 'object' && tree !== null && !Array.isArray(tree) ? Object.entries(tree) : [];
	const parsed = parseTitleBlock(Object.fromEntries(entries.filter(([, cell]) => cell !== '')));
	if (!parsed.ok) return parsed;
	const issues = unprintableInTitleBlock(parsed.titleBlock);
	return issues.length === 0 ? { ok: true, value: parsed.titleBlock } : { ok: false, issues };
}
