/** Lines of text that change weight or carry indices: symbols, formulas, values beside each other. */
import { formatQuantity } from '$lib/quantity/format';
import type { FormulaPart } from '$lib/rules/finding';
import { textWidth } from '$lib/scene/metrics';
import type { Face, Item } from '$lib/scene/scene';
import type { DecimalMark } from './edge';
import { lettered, ruled } from './pen';

export interface Run {
	readonly text: string;
	readonly face?: Face;
	/** An index stands lower, an exponent higher, both smaller. */
	readonly shift?: 'index' | 'exponent';
}

/** Two upright strokes: the sign for "in parallel", which the lettering does not have. */
export const PARALLEL = '∥';

const INDEX_DROP = 0.22;
const INDEX_SIZE = 0.8;
const EXPONENT_RISE = 0.3;
const EXPONENT_SIZE = 0.72;
const PARALLEL_WIDTH = 0.62;
const ELLIPSIS = '…';

const SIZES = { index: INDEX_SIZE, exponent: EXPONENT_SIZE } as const;

const capOf = (run: Run, cap: number): number => (run.shift === undefined ? cap : cap * SIZES[run.shift]);

const widthOf = (run: Run, cap: number): number =>
	run.text === PARALLEL ? PARALLEL_WIDTH * cap : textWidth(run.text, run.face ?? 'regular', capOf(run, cap));

/**
 * Measures a line of runs.
 * @param runs in order
 * @param cap capital height [mm]
 * @returns width [mm]
 * @example runsWidth([{ text: 'f' }, { text: 'sw', shift: 'index' }], 2.5)
 */
export function runsWidth(runs: readonly Run[], cap: number): number {
	return runs.reduce((sum, run) => sum + widthOf(run, cap), 0);
}

const parallelSign = (x: number, y: number, cap: number, colour: string): Item => {
	const left = x + 0.19 * cap;
	const right = x + 0.43 * cap;
	const top = y - cap;
	return ruled([left, y, left, top, right, y, right, top], { colour, width: 0.08 * cap });
};

const runItem = (run: Run, x: number, line: Line): Item => {
	const { y, cap, fill } = line;
	if (run.text === PARALLEL) return parallelSign(x, y, cap, fill);
	const drop = run.shift === 'index' ? INDEX_DROP * cap : run.shift === 'exponent' ? -EXPONENT_RISE * cap : 0;
	// Writers drop a space at the start of a text, so the pen moves over it instead.
	const text = run.text.trimStart();
	const skipped = textWidth(' ', run.face ?? 'regular', capOf(run, cap)) * (run.text.length - text.length);
	return lettered(text, x + skipped, y + drop, { cap: capOf(run, cap), face: run.face ?? 'regular', fill });
};

const merged = (runs: readonly Run[]): Run[] => {
	const joined: Run[] = [];
	for (const run of runs.filter(({ text }) => text !== '')) {
		const last = joined.at(-1);
		const alike = last !== undefined && last.face === run.face && last.shift === run.shift;
		const plain = last?.text !== PARALLEL && run.text !== PARALLEL;
		if (alike && plain) joined[joined.length - 1] = { ...last, text: last.text + run.text };
		else joined.push(run);
	}
	return joined;
};

export interface Line {
	/** Where the line starts, or ends when `anchor` is `end` [mm]. */
	readonly x: number;
	/** Baseline [mm]. */
	readonly y: number;
	readonly cap: number;
	readonly fill: string;
	readonly anchor?: 'start' | 'end';
}

/**
 * Sets a line of runs.
 * @param runs in order
 * @param line place and lettering [mm]
 * @returns one item for each stretch of one weight
 * @example runItems([{ text: 'C' }, { text: 'x', shift: 'index' }], { x: 0, y: 3, cap: 2.5, fill }).length // 2
 */
export function runItems(runs: readonly Run[], line: Line): Item[] {
	const stretches = merged(runs);
	let x = line.anchor === 'end' ? line.x - runsWidth(stretches, line.cap) : line.x;
	return stretches.map((run) => {
		const item = runItem(run, x, line);
		x += widthOf(run, line.cap);
		return item;
	});
}

const EXPONENTS: Readonly<Record<string, string>> = { '2': '²', '3': '³' };

const partRuns = (part: FormulaPart, mark: DecimalMark): Run[] => {
	if (part.type === 'text') return [{ text: part.text.replace(/(?<=\d)\.(?=\d)/g, mark) }];
	if (part.type === 'quantity') {
		const { value, quantity, type: _type, ...options } = part;
		return [{ text: formatQuantity(value, quantity, { ...options, decimalMark: mark }) }];
	}
	const exponent = part.sup === undefined ? undefined : EXPONENTS[part.sup];
	return [
		{ text: part.base },
		...(part.sub === undefined ? [] : [{ text: part.sub, shift: 'index' } as const]),
		...(exponent === undefined ? [] : [{ text: exponent }]),
		...(part.sup === undefined || exponent !== undefined
			? []
			: [{ text: part.sup, shift: 'exponent' } as const])
	];
};

/**
 * Reads the parts of a formula as runs, in the layout's decimal mark.
 * @param parts in order
 * @param mark decimal mark
 * @returns the runs
 * @example formulaRuns([{ type: 'quantity', value: 0.9, quantity: 'number' }], ',')[0].text // '0,9'
 */
export function formulaRuns(parts: readonly FormulaPart[], mark: DecimalMark): Run[] {
	return parts.flatMap((part) => partRuns(part, mark));
}

/** Cuts runs after each ordinary space, so that a line can end there. */
const words = (runs: readonly Run[]): Run[][] => {
	const found: Run[][] = [[]];
	for (const run of runs) {
		const pieces = run.text.split(/(?<= )/);
		pieces.forEach((text, index) => {
			if (index > 0) found.push([]);
			found.at(-1)?.push({ ...run, text });
		});
		if (run.text.endsWith(' ')) found.push([]);
	}
	return found.filter((word) => word.length > 0);
};

const shortened = (runs: readonly Run[], width: number, cap: number): Run[] => {
	const room = width - textWidth(ELLIPSIS, 'regular', cap);
	const kept: Run[] = [];
	let used = 0;
	for (const run of runs) {
		for (const character of run.text === PARALLEL ? [run.text] : [...run.text]) {
			const piece = { ...run, text: character };
			used += widthOf(piece, cap);
			if (used > room) return [...kept, { text: ELLIPSIS }];
			kept.push(piece);
		}
	}
	return kept;
};

/**
 * Breaks a line of runs at its spaces; what is left over ends the last line in an ellipsis.
 * @param runs in order
 * @param width of a line [mm]
 * @param cap capital height [mm]
 * @param most greatest number of lines
 * @returns the lines, each no wider than the width
 * @example wrapRuns([{ text: '10/(2π · 126 kHz · 50 Ω)' }], 60, 2.5, 2).length // 1
 */
export function wrapRuns(runs: readonly Run[], width: number, cap: number, most: number): Run[][] {
	const lines: Run[][] = [];
	const space = textWidth(' ', 'regular', cap);
	let used = 0;
	for (const word of words(runs)) {
		const length = runsWidth(word, cap);
		const full = lines.length === 0 || used + length > width + space;
		if (full && lines.length < most) {
			lines.push([...word]);
			used = length;
		} else {
			lines.at(-1)?.push(...word);
			used += length;
		}
	}
	return lines.map((line) =>
		runsWidth(trimmed(line), cap) > width ? shortened(line, width, cap) : trimmed(line)
	);
}

const trimmed = (line: readonly Run[]): Run[] =>
	line.map((run, index) => (index === line.length - 1 ? { ...run, text: run.text.trimEnd() } : run));
