/** The chart with its C scale and benefit pane; frame, strip and check rules belong to the sheet around it. */
import type { Design } from '$lib/design/design';
import type { Evaluation } from '$lib/rules/finding';
import type { Item } from '$lib/scene/scene';
import { axisItems } from './axes';
import { settleEdges } from './band-edge';
import { edgeItems, hatchItems } from './bands';
import { boardOf } from './board';
import { choiceItems, reserveFlag } from './choice';
import { measuredItems, settleMeasured } from './curve';
import { gridItems } from './grid';
import { settleHarms } from './harm';
import { headerItems, switchingBands } from './header';
import type { Ink } from './ink';
import { decadeItems, settleDecades } from './lines';
import { paneItems } from './pane';
import { partItems, settleParts } from './parts';
import { pinItems } from './pins';
import type { Pane, Plot } from './plot';
import { scaleItems } from './scale';
import { reserveWindows, windowFills, windowLines } from './windows';
import type { Words } from './words';
import { settleCorner, settleWorsts } from './worst';

export interface ChartInput {
	readonly plot: Plot;
	readonly pane: Pane | null;
	/** null draws a blank chart. */
	readonly design: Design | null;
	readonly evaluation: Evaluation | null;
	readonly ink: Ink;
	readonly words: Words;
	readonly decimalMark: '.' | ',';
	/** null is worked; 1 = parts and sources; 1 + i adds rule i; the last adds windows and choice. */
	readonly step: number | null;
	/** 1 on A4 and Letter, √2 on A3 and Tabloid. */
	readonly k: number;
}

/**
 * Draws the chart. What must stand somewhere reserves its room first, then lettering is placed from the weightiest to
 * the lightest, and only then lines and hatches are drawn, each stopping at the lettering.
 * @param input plot, design with its evaluation, ink, words, step
 * @returns items in absolute millimetres, in the order they are painted
 * @example chartItems({ plot, pane: null, design: null, evaluation: null, … }).length
 * Source: sheet design.
 */
export function chartItems(input: ChartInput): Item[] {
	const board = boardOf(input);
	reserveWindows(board);
	const flag = reserveFlag(board);
	const switching = switchingBands(board);
	const pins = pinItems(board);
	const crosses = settleWorsts(board);
	const parts = settleParts(board);
	const measured = settleMeasured(board);
	settleHarms(board);
	const edges = settleEdges(board);
	const corner = settleCorner(board);
	const decades = settleDecades(board);
	return [
		...windowFills(board, false),
		...gridItems(board),
		...windowFills(board, true),
		...switching,
		...hatchItems(board, edges),
		...decadeItems(board, decades),
		...edgeItems(board, edges),
		...windowLines(board),
		...partItems(board, parts),
		...measuredItems(board, measured),
		...corner,
		...crosses,
		...axisItems(board),
		...headerItems(board),
		...scaleItems(board, edges),
		...paneItems(board, edges),
		...choiceItems(board, flag),
		...pins,
		...board.texts
	];
}
