/** The strip: the sheet's calculation column. Rows are packed into one column or two; what is too long gives way. */
import type { Item } from '$lib/scene/scene';
import type { Ink } from './ink';
import type { Box } from './paper';
import { group, lettered } from './pen';
import { chooseAxis } from './strip-bar';
import { benefitBlocks } from './strip-benefit';
import { blankBlocks, blankRules, type BlankContext } from './strip-blank';
import { BASE, CAP, NUMBER_WIDTH, ROW, type Block, type StripContext } from './strip-block';
import { cautionBlocks } from './strip-cautions';
import { choiceBlock } from './strip-choice';
import { givenBlocks } from './strip-given';
import { ruleBlocks } from './strip-rules';
import { windowSection } from './strip-window';
import { fill, type Words } from './words';

/** Room between the strip's border and its rows at k = 1 [mm]. */
const PAD = { side: 1.8, top: 1, foot: 0.6 } as const;
/** The most that is put before a head when there is room to spare [mm]. */
const SPREAD = 2.4;

/** How a strip gives way, from roomy to dense: never by smaller letters. */
interface Density {
	/** Sections 1 to 4 with a head each. */
	readonly heads: boolean;
	readonly formulas: boolean;
	readonly harmonics: number;
	/** Lines of each open point. */
	readonly open: number;
}

const DENSEST: Density = { heads: false, formulas: false, harmonics: 1, open: 1 };

const DENSITIES: readonly Density[] = [
	{ heads: true, formulas: true, harmonics: 5, open: 3 },
	{ heads: false, formulas: true, harmonics: 5, open: 3 },
	{ heads: false, formulas: true, harmonics: 4, open: 2 },
	{ heads: false, formulas: true, harmonics: 3, open: 2 },
	{ heads: false, formulas: false, harmonics: 5, open: 2 },
	{ heads: false, formulas: false, harmonics: 3, open: 2 },
	DENSEST
];

/** Remembers what was made for a key: the densities share most of their rows. */
const once = <Key, Made>(make: (key: Key) => Made): ((key: Key) => Made) => {
	const made = new Map<Key, Made>();
	return (key) => {
		const known = made.get(key) ?? make(key);
		made.set(key, known);
		return known;
	};
};

const rowsOf = (context: StripContext): ((density: Density) => Block[]) => {
	const axis = chooseAxis(context);
	const given = once((heads: boolean) => givenBlocks(context, heads));
	const rules = once((formulas: boolean) => ruleBlocks(context, axis, formulas));
	const benefit = once((harmonics: number) => benefitBlocks(context, harmonics));
	const cautions = once((open: number) => cautionBlocks(context, open));
	const result = [...windowSection(context, axis), choiceBlock(context)];
	return (density) => [
		...given(density.heads),
		...rules(density.formulas),
		...result,
		...benefit(density.harmonics),
		...cautions(density.open)
	];
};

interface Placed {
	readonly block: Block;
	readonly column: number;
}

/** A head must not stand alone at a column's foot: it moves with what follows it. */
const headsBefore = (blocks: readonly Block[], index: number): number => {
	let first = index;
	while (first > 0 && blocks[first - 1]?.heading === true) first -= 1;
	return first;
};

/** Fills the columns in order; null when something is left over. */
const pack = (blocks: readonly Block[], rooms: readonly number[]): Placed[] | null => {
	const placed: Placed[] = [];
	let column = 0;
	let used = 0;
	for (let index = 0; index < blocks.length; index += 1) {
		const block = blocks[index];
		if (block === undefined) break;
		if (used + block.height <= (rooms[column] ?? 0) + 1e-9) {
			placed.push({ block, column });
			used += block.height;
			continue;
		}
		const first = headsBefore(blocks, index);
		if (column + 1 >= rooms.length || (used === 0 && first === index)) return null;
		placed.splice(first);
		column += 1;
		used = 0;
		index = first - 1;
	}
	return placed;
};

const heightOf = (blocks: readonly Block[]): number => blocks.reduce((sum, block) => sum + block.height, 0);

/** Two columns parted before a section's head, the left one as full as it goes; null when that leaves something over. */
const packSections = (blocks: readonly Block[], rooms: readonly number[]): Placed[] | null => {
	const [left = 0, right] = rooms;
	if (right === undefined) return pack(blocks, rooms);
	for (let at = blocks.length - 1; at > 0; at -= 1) {
		const starts = blocks[at]?.heading === true && blocks[at - 1]?.heading !== true;
		if (!starts) continue;
		if (heightOf(blocks.slice(0, at)) > left + 1e-9 || heightOf(blocks.slice(at)) > right + 1e-9) continue;
		return blocks.map((block, index) => ({ block, column: index < at ? 0 : 1 }));
	}
	return null;
};

const moreBlock = (count: number, context: Dress): Block => {
	const { ink, k, words } = context;
	return {
		height: ROW * k,
		draw: (x, y) => [
			lettered(fill(words.strip.moreRows, { n: String(count) }), x + NUMBER_WIDTH * k, y + BASE * k, {
				cap: CAP * k,
				fill: ink.ink
			})
		]
	};
};

type Dress = Pick<BlankContext, 'ink' | 'k' | 'words'>;

/** Leaves out the last rows that may give way, until the rest fits, and says how many. */
const cutToFit = (blocks: readonly Block[], rooms: readonly number[], dress: Dress): Placed[] => {
	const optional = blocks.flatMap((block, index) => (block.optional === true ? [index] : []));
	for (let count = 1; count <= optional.length; count += 1) {
		const dropped = new Set(optional.slice(-count));
		const first = Math.min(...dropped);
		const kept = blocks.flatMap((block, index) => {
			if (index === first) return [moreBlock(count, dress)];
			return dropped.has(index) ? [] : [block];
		});
		const placed = pack(kept, rooms);
		if (placed !== null) return placed;
	}
	return packSome(
		blocks.filter((block) => block.optional !== true),
		rooms
	);
};

/** The last resort on a very small strip: whole blocks from the top, as many as fit. */
const packSome = (blocks: readonly Block[], rooms: readonly number[]): Placed[] => {
	for (let count = blocks.length; count > 0; count -= 1) {
		const placed = pack(blocks.slice(0, count), rooms);
		if (placed !== null) return placed;
	}
	return [];
};

const drawn = (
	placed: readonly Placed[],
	columns: readonly Box[],
	rooms: readonly number[],
	k: number
): Item[] =>
	columns.flatMap((box, column) => {
		const blocks = placed.filter((entry) => entry.column === column).map(({ block }) => block);
		const taken = blocks.reduce((sum, block) => sum + block.height, 0);
		const startsSection = (index: number): boolean =>
			index > 0 && blocks[index]?.heading === true && blocks[index - 1]?.heading !== true;
		const breaks = blocks.filter((_, index) => startsSection(index)).length;
		const spare = Math.max(0, (rooms[column] ?? 0) - taken);
		const spread = breaks === 0 ? 0 : Math.min(SPREAD * k, spare / breaks);
		let y = box.y + PAD.top * k;
		return blocks.flatMap((block, index) => {
			if (startsSection(index)) y += spread;
			const items = block.draw(box.x + PAD.side * k, y);
			y += block.height;
			return items;
		});
	});

export interface StripInput {
	readonly columns: readonly Box[];
	/** Rows that are filled in; null draws a blank strip. */
	readonly context: Omit<StripContext, 'width' | 'k' | 'ink' | 'words'> | null;
	readonly blank: BlankContext['design'];
	readonly ink: Ink;
	readonly words: Words;
	readonly k: number;
}

/**
 * Draws the strip.
 * @param input its columns [mm], what fills the rows, palette, words, scale
 * @returns one group with role `strip`; nothing without columns
 * @example stripItems({ ...input, columns: [] }) // []
 * Source: our own rule.
 */
export function stripItems(input: StripInput): Item[] {
	const { columns, context, blank, ink, words, k } = input;
	const [first] = columns;
	if (first === undefined) return [];
	const width = first.width - 2 * PAD.side * k;
	const rooms = columns.map(({ height }) => height - (PAD.top + PAD.foot) * k);
	const dress = { ink, words, k, width };
	if (context === null) {
		const placed = placeBlank({ ...dress, design: blank }, rooms);
		return [group(drawn(placed, columns, rooms, k), { role: 'strip' })];
	}
	const rows = rowsOf({ ...context, ...dress });
	return [group(drawn(placeBlocks(rows, rooms, dress), columns, rooms, k), { role: 'strip' })];
}

/** A section torn apart is better than one without its formulas, but worse than one with fewer harmonics. */
const placeBlocks = (
	rows: (density: Density) => Block[],
	rooms: readonly number[],
	dress: Dress
): Placed[] => {
	const roomy = DENSITIES.filter(({ formulas }) => formulas);
	for (const [densities, fits] of [
		[roomy, packSections],
		[DENSITIES, pack]
	] as const) {
		for (const density of densities) {
			const placed = fits(rows(density), rooms);
			if (placed !== null) return placed;
		}
	}
	return cutToFit(rows(DENSEST), rooms, dress);
};

/** A blank strip gives up its notes, then height of its rows, then rules; it never says so, since it states nothing. */
const placeBlank = (context: BlankContext, rooms: readonly number[]): Placed[] => {
	const rules = blankRules(context.design);
	const ways = [
		...[1, 0.88, 0.76].flatMap((scale) => [true, false].map((notes) => ({ scale, notes, rules }))),
		...Array.from({ length: rules }, (_, index) => ({ scale: 0.76, notes: false, rules: rules - 1 - index }))
	];
	for (const way of ways) {
		const blocks = blankBlocks(context, way);
		const placed = packSections(blocks, rooms) ?? pack(blocks, rooms);
		if (placed !== null) return placed;
	}
	return [];
};
