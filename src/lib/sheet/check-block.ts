/** The check block: beside the title block, the sign and what the sheet says of itself until it is issued. */
import type { Item } from '$lib/scene/scene';
import { fixed, type DecimalMark } from './edge';
import { shorten, wrap } from './fitting';
import { strokeOf, type Ink } from './ink';
import { signPath } from './mark';
import type { Box } from './paper';
import { group, lettered, rectangle } from './pen';
import { fill, type Words } from './words';

const CAP = 2.5;
const HEAD_CAP = 3.5;
const LEADING = 4;
const SIGN = 15;
const PAD = 3;
/** From the top of the head's letters to the foot of the fourth line. */
const CONTENT = 20.2;

export interface CheckBlockInput {
	readonly box: Box;
	/** Whether the sheet is to be filled in by hand. */
	readonly blank: boolean;
	/** What this build-up step adds, or null. */
	readonly stepText: string | null;
	/** Length of a decade [mm]. */
	readonly decade: number;
	readonly engine: string | null;
	/** SHA-256 of the design data in hexadecimal digits, if known. */
	readonly dataHash: string | null;
	readonly mark: DecimalMark;
	readonly ink: Ink;
	readonly words: Words;
}

/** Sixteen digits in groups of four, as people compare them. */
const grouped = (hash: string): string =>
	hash
		.slice(0, 16)
		.replace(/(.{4})(?=.)/g, '$1\u00a0')
		.toLowerCase();

const sentences = (input: CheckBlockInput): string[] => {
	const { blank, stepText, decade, engine, dataHash, words, mark } = input;
	if (blank) {
		const factor = fixed(10 ** (10 / decade), 2, mark);
		return [
			words.check.equalDecades,
			fill(words.check.reading, { decade: String(decade), factor }),
			words.check.cautions
		];
	}
	const length = fill(words.check.decade, { decade: String(decade) });
	const made = engine === null ? length : `${length} · ${fill(words.check.engine, { engine })}`;
	return [
		...(stepText === null ? [] : [stepText]),
		made,
		...(dataHash === null ? [] : [fill(words.check.data, { hash: grouped(dataHash) })]),
		words.check.codeLater,
		words.check.cautions
	];
};

/** Sentences in order of weight, each with all its lines or not at all. */
const wholeSentences = (input: CheckBlockInput, width: number, most: number): string[] =>
	sentences(input).reduce<string[]>((kept, sentence) => {
		const lines = wrap(sentence, { width, cap: CAP }, 2);
		return kept.length + lines.length <= most ? [...kept, ...lines] : kept;
	}, []);

/**
 * Draws the check block of a sheet that is not issued.
 * @param input its box, what it says, palette, words
 * @returns one group
 * @example checkBlockItems(input).length // 1
 * Source: our own rule.
 */
export function checkBlockItems(input: CheckBlockInput): Item[] {
	const { box, ink, words } = input;
	const left = box.x + 2 * PAD + SIGN;
	const width = box.x + box.width - PAD / 2 - left;
	const head = box.y + (box.height - CONTENT) / 2 + HEAD_CAP;
	const lines = Math.floor((box.y + box.height - 0.8 - head) / LEADING);
	const text = wholeSentences(input, width, lines);
	const frame = { x: box.x + PAD, y: box.y + (box.height - SIGN) / 2, width: SIGN, height: SIGN };
	const sign = signPath(frame.x + 3, frame.y + 3, SIGN - 6);
	const notIssued = shorten(words.block.notIssued, { width, cap: HEAD_CAP, face: 'bold' });
	return [
		group(
			[
				rectangle(frame, { stroke: strokeOf(ink, 'gridDecade', 1) }),
				{ type: 'path', d: sign, fill: ink.pens.gridDecade.colour },
				lettered(notIssued, left, head, { cap: HEAD_CAP, face: 'bold', fill: ink.ink }),
				...text.map((line, index) =>
					lettered(line, left, head + (index + 1) * LEADING + 0.1, { cap: CAP, fill: ink.ink })
				)
			],
			{ role: 'title-block' }
		)
	];
}
