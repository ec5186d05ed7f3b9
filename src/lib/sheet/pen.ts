/** Strokes and letters that every part of the sheet draws with. */
import type { Face, Item, PathData, PathItem, Role, Stroke, TextItem } from '$lib/scene/scene';
import type { Box } from './paper';

export interface MarkOptions {
	readonly role?: Role;
	readonly of?: string;
	readonly id?: string;
	readonly label?: string;
}

/**
 * Draws straight segments as one path.
 * @param segments x1, y1, x2, y2 of each, one after the other [mm]
 * @param stroke line
 * @returns the path
 * @example ruled([0, 0, 10, 0], { colour: '#13233F', width: 0.25 }).d.ops // 'ML'
 */
export function ruled(segments: readonly number[], stroke: Stroke, options: MarkOptions = {}): PathItem {
	return { type: 'path', d: { ops: 'ML'.repeat(segments.length / 4), at: segments }, stroke, ...options };
}

/**
 * The outline of a rectangle.
 * @param box the rectangle [mm]
 * @returns a closed path
 * @example outline({ x: 0, y: 0, width: 2, height: 1 }).ops // 'MLLLZ'
 */
export function outline(box: Box): PathData {
	const right = box.x + box.width;
	const foot = box.y + box.height;
	return { ops: 'MLLLZ', at: [box.x, box.y, right, box.y, right, foot, box.x, foot] };
}

/**
 * Draws a rectangle, stroked or filled.
 * @param box the rectangle [mm]
 * @param paint its stroke, its fill, or both
 * @returns the path
 * @example rectangle({ x: 0, y: 0, width: 2, height: 1 }, { fill: '#FFF0B8' }).fill // '#FFF0B8'
 */
export function rectangle(
	box: Box,
	paint: { readonly stroke?: Stroke; readonly fill?: string },
	options: MarkOptions = {}
): PathItem {
	return { type: 'path', d: outline(box), ...paint, ...options };
}

export interface Lettering {
	readonly cap: number;
	readonly face?: Face;
	readonly fill: string;
	readonly anchor?: TextItem['anchor'];
	readonly angle?: number;
}

/**
 * Sets one line of text on its baseline.
 * @param text what it says
 * @param x anchor [mm]
 * @param y baseline [mm]
 * @param lettering height, weight, colour, anchor
 * @returns the text item
 * @example lettered('Title', 10, 20, { cap: 2.5, fill: '#13233F' }).anchor // 'start'
 */
export function lettered(text: string, x: number, y: number, lettering: Lettering): TextItem {
	const { cap, face = 'regular', fill, anchor = 'start', angle } = lettering;
	return { type: 'text', text, x, y, cap, face, fill, anchor, ...(angle === undefined ? {} : { angle }) };
}

/**
 * Gathers items under one role.
 * @param items what belongs together
 * @param options role, data-of, label
 * @returns the group
 * @example group([], { role: 'strip' }).type // 'group'
 */
export function group(items: readonly Item[], options: MarkOptions): Item {
	return { type: 'group', items, ...options };
}
