/** Blank reactance paper as an address asks for it. */
import type { Issue } from '$lib/design/parse';
import type { Scene } from '$lib/scene/scene';
import { composeAnyway, LAYOUT_KEYS, readLayoutText, type LayoutText } from './layout-text';

export const PAPER_START: LayoutText = { paper: 'A4', orientation: 'landscape', ink: 'colour', strip: 'no' };

const LONGEST = 60;

/** Takes the settings from an address; what is missing starts as usual. */
export function paperOfQuery(query: URLSearchParams): LayoutText {
	return Object.fromEntries(
		LAYOUT_KEYS.map((key) => [key, (query.get(key) ?? PAPER_START[key] ?? '').slice(0, LONGEST)])
	);
}

/** The settings as an address; what is left to be chosen is left out. */
export function queryOfPaper(text: LayoutText): string {
	return new URLSearchParams(Object.entries(text).filter(([, value]) => value !== '')).toString();
}

export interface PaperAnswer {
	readonly scene: Scene;
	/** Pointers into the layout. */
	readonly issues: readonly Issue[];
}

/** Draws blank paper; settings that cannot be read stand as they start. */
export function drawPaper(text: LayoutText): PaperAnswer {
	const read = readLayoutText(text);
	if (read.ok) {
		const { scene, issues } = composeAnyway({ layout: read.value, kind: 'blank' });
		return {
			scene,
			issues: issues.map(({ pointer, detail }) => ({ pointer: pointer.replace(/^\/layout/, ''), detail }))
		};
	}
	const wrong = new Set(read.issues.map(({ pointer }) => pointer.slice(1)));
	const mended = Object.fromEntries(
		Object.entries(text).map(([key, value]) => [key, wrong.has(key) ? (PAPER_START[key] ?? '') : value])
	);
	const again = readLayoutText(mended);
	const layout = again.ok ? again.value : ({ paper: 'A4', orientation: 'landscape' } as const);
	return { scene: composeAnyway({ layout, kind: 'blank' }).scene, issues: read.issues };
}
