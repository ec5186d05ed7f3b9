/** Writes a scene as the drawing commands of a PDF page, in whole hundredths of a millimetre, y down. */
import { CAP_RATIO, normaliseText, textWidth } from '$lib/scene/metrics';
import type { Face, Item, PathItem, Scene, Stroke, TextItem } from '$lib/scene/scene';
import { repeatedLines } from './pdf-runs';

/** Points of 1/72 inch in a millimetre. */
export const POINTS_PER_MM = 72 / 25.4;

/** Codes of a text in a face as hexadecimal digits. */
export type Encode = (text: string, face: Face) => string;

/** Names of the faces in a page's resources. */
export const faceNames: Readonly<Record<Face, string>> = {
	regular: 'R',
	medium: 'M',
	semibold: 'S',
	bold: 'B'
};

const unit = (length: number): number => Math.round(length * 100) + 0;

const decimal = (value: number, places: number): string => {
	const power = 10 ** places;
	return String(Math.round(value * power) / power + 0);
};

/** `#rrggbb` as components from 0 to 1; one component for a grey. */
const componentsOf = (colour: string): string[] => {
	if (!/^#[0-9a-f]{6}$/i.test(colour)) throw new RangeError(`colour must be #rrggbb, got ${colour}`);
	const parts = [1, 3, 5].map((at) => decimal(parseInt(colour.slice(at, at + 2), 16) / 255, 3));
	return new Set(parts).size === 1 ? parts.slice(0, 1) : parts;
};

const fillCommand = (colour: string): string => {
	const parts = componentsOf(colour);
	return `${parts.join(' ')} ${parts.length === 1 ? 'g' : 'rg'}\n`;
};

const caps = { butt: '0', round: '1', square: '2' } as const;
const joins = { miter: '0', round: '1', bevel: '2' } as const;
const solid: readonly number[] = [];

/** Remembers the page's state, so that only changes are written; compares what is asked for before writing it out. */
class Pen {
	readonly #colours = new Map<string, string>();
	#fill = '';
	#face = '';
	readonly #stroke = { colour: '', width: -1, dash: '[] 0 d\n', cap: 'butt', join: 'miter' };

	fill(colour: string): string {
		if (colour === this.#fill) return '';
		this.#fill = colour;
		return this.#command(colour);
	}

	#command(colour: string): string {
		const command = this.#colours.get(colour) ?? fillCommand(colour);
		this.#colours.set(colour, command);
		return command;
	}

	#colour(colour: string): string {
		if (colour === this.#stroke.colour) return '';
		this.#stroke.colour = colour;
		return this.#command(colour).toUpperCase();
	}

	#width(width: number): string {
		if (width === this.#stroke.width) return '';
		this.#stroke.width = width;
		return `${decimal(width * 100, 1)} w\n`;
	}

	#dash(dash: readonly number[]): string {
		const command = `[${dash.map((length) => decimal(length * 100, 1)).join(' ')}] 0 d\n`;
		if (command === this.#stroke.dash) return '';
		this.#stroke.dash = command;
		return command;
	}

	#ends(cap: 'butt' | 'round' | 'square', join: 'miter' | 'round' | 'bevel'): string {
		let commands = '';
		if (cap !== this.#stroke.cap) commands += `${caps[cap]} J\n`;
		if (join !== this.#stroke.join) commands += `${joins[join]} j\n`;
		this.#stroke.cap = cap;
		this.#stroke.join = join;
		return commands;
	}

	stroke({ colour, width, dash = solid, cap = 'butt', join = 'miter' }: Stroke): string {
		return this.#colour(colour) + this.#width(width) + this.#dash(dash) + this.#ends(cap, join);
	}

	face(name: string, size: string): string {
		const command = `/${name} ${size} Tf\n`;
		if (command === this.#face) return '';
		this.#face = command;
		return command;
	}
}

const sizes: Readonly<Record<string, number>> = { M: 2, L: 2, C: 6, Z: 0 };
const commands: Readonly<Record<string, string>> = { M: 'm\n', L: 'l\n', C: 'c\n', Z: 'h\n' };

const outline = ({ d: { ops, at } }: PathItem): string => {
	let text = '';
	let next = 0;
	for (const op of ops) {
		const end = next + (sizes[op] ?? 0);
		for (; next < end; next += 1) text += `${String(unit(at[next] ?? 0))} `;
		text += commands[op] ?? '';
	}
	return text;
};

const paintOf = ({ stroke, fill, fillRule }: PathItem): string => {
	const rule = fillRule === 'evenodd' ? '*' : '';
	if (fill === undefined) return stroke === undefined ? 'n' : 'S';
	return (stroke === undefined ? 'f' : 'B') + rule;
};

const isLines = ({ d: { ops }, fill, stroke }: PathItem): boolean =>
	fill === undefined && stroke !== undefined && ops.length >= 8 && /^(?:ML)+$/.test(ops);

const drawn = (item: PathItem): string =>
	isLines(item) ? repeatedLines(item.d.at, unit) : `${outline(item)}${paintOf(item)}\n`;

const path = (item: PathItem, pen: Pen): string =>
	(item.fill === undefined ? '' : pen.fill(item.fill)) +
	(item.stroke === undefined ? '' : pen.stroke(item.stroke)) +
	drawn(item);

const anchors = { start: 0, middle: 0.5, end: 1 } as const;

const text = (item: TextItem, pen: Pen, encode: Encode): string => {
	const angle = ((item.angle ?? 0) * Math.PI) / 180;
	const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
	const back = textWidth(item.text, item.face, item.cap) * anchors[item.anchor];
	const [c, s] = [decimal(cos, 5), decimal(sin, 5)];
	const place = `${String(unit(item.x - back * cos))} ${String(unit(item.y - back * sin))}`;
	const size = decimal(Math.round((item.cap / CAP_RATIO) * 1000) / 10, 1);
	return (
		pen.fill(item.fill) +
		`BT\n${pen.face(faceNames[item.face], size)}${c} ${s} ${s} ${decimal(-cos, 5)} ${place} Tm\n` +
		`<${encode(normaliseText(item.text), item.face)}> Tj\nET\n`
	);
};

const mark = (item: Item, pen: Pen, encode: Encode): string => {
	switch (item.type) {
		case 'group':
			return item.items.map((inner) => mark(inner, pen, encode)).join('');
		case 'path':
			return path(item, pen);
		case 'text':
			return text(item, pen, encode);
	}
};

/**
 * Writes a scene as a page's content.
 * @param scene the drawing [mm]
 * @param encode turns a text into the codes of its face
 * @returns PDF operators; a painting operator for each path and text, or one for each line of a repeated pattern
 * @example pageContent(scene, encode).startsWith('.0283465 0 0 -.0283465 0 595.2756 cm') // true for A4 landscape
 * Source: PDF Reference 1.4, chapters 4 and 5; the limit of mitres is SVG's.
 */
export function pageContent(scene: Scene, encode: Encode): string {
	const pen = new Pen();
	const scale = (POINTS_PER_MM / 100).toFixed(7).slice(1);
	const height = decimal(scene.height * POINTS_PER_MM, 4);
	const marks = scene.items.map((item) => mark(item, pen, encode)).join('');
	return `${scale} 0 0 -${scale} 0 ${height} cm\n4 M\n${marks}`;
}

/**
 * Gathers the characters that a drawing sets in each face.
 * @param items the marks
 * @param into the sets to add to
 * @example gatherCharacters(scene.items, sets)
 * Source: scene format.
 */
export function gatherCharacters(items: readonly Item[], into: Readonly<Record<Face, Set<number>>>): void {
	for (const item of items) {
		if (item.type === 'group') gatherCharacters(item.items, into);
		if (item.type !== 'text') continue;
		for (const character of normaliseText(item.text)) into[item.face].add(character.codePointAt(0) ?? 0);
	}
}
