import { itemBounds, type Bounds } from '$lib/scene/bounds';
import type { Item, TextItem } from '$lib/scene/scene';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { checkBlockItems } from './check-block';
import { CHECK_RULE_LENGTH, checkRuleItems } from './check-rules';
import { fitChart } from './fit';
import { frameItems } from './frame';
import { INKS } from './ink';
import type { TitleBlock } from './layout';
import { dividePaper, type Box } from './paper';
import { titleBlockItems } from './title-block';
import { wordsOf } from './words';

const ink = INKS.colour;
const flat = (items: readonly Item[]): Item[] =>
	items.flatMap((item) => (item.type === 'group' ? flat(item.items) : [item]));
const texts = (items: readonly Item[]): TextItem[] =>
	flat(items).filter((item): item is TextItem => item.type === 'text');

const boundsOf = (item: Item): Bounds => {
	const bounds = itemBounds(item);
	if (bounds === null) throw new Error('a mark without a point');
	return bounds;
};

const PAPERS = (['A4', 'A3', 'Letter', 'Tabloid'] as const).flatMap((paper) =>
	(['landscape', 'portrait'] as const).map((orientation) => ({ paper, orientation }))
);

const CELLS: readonly Box[] = [
	[0, 0, 46],
	[0, 9, 46],
	[0, 18, 46],
	[46, 0, 61.5],
	[107.5, 0, 31],
	[107.5, 9, 31],
	[107.5, 18, 31],
	[138.5, 0, 41.5]
]
	.map(([x = 0, y = 0, width = 0]) => ({ x, y, width, height: 9 }))
	.concat([
		{ x: 46, y: 9, width: 61.5, height: 18 },
		{ x: 138.5, y: 9, width: 41.5, height: 18 }
	]);

const word = fc.oneof(
	fc.constantFrom(
		'WWWWWWWW',
		'Überspannungsschutzgerät',
		'i',
		'Zürich',
		'Ångström',
		'gęś',
		'12345678901234567890'
	),
	fc.string({ unit: fc.constantFrom(...'abcdefgmwWMQÄßÇŁŒ0179-/·'), minLength: 1, maxLength: 25 })
);
const phrase = fc.array(word, { maxLength: 6 }).map((words) => words.join(' ').slice(0, 90));
const block: fc.Arbitrary<TitleBlock> = fc.record(
	{
		title: phrase,
		supplementaryTitle: phrase,
		owner: phrase,
		number: phrase,
		creator: phrase,
		department: phrase,
		reference: phrase
	},
	{ requiredKeys: [] }
);

const draw = (titleBlock: TitleBlock, language: 'en' | 'de', box: Box): Item[] =>
	titleBlockItems({
		box,
		block: titleBlock,
		kind: 'step',
		step: 41,
		steps: 42,
		language,
		paper: 'Tabloid',
		ink,
		words: wordsOf(language)
	});

describe('the title block', () => {
	it('keeps every text in one cell, 2.5 mm high or more, for 200 random blocks', () => {
		const { titleBlock: box } = dividePaper({ paper: 'A4', orientation: 'landscape' });
		fc.assert(
			fc.property(block, fc.constantFrom('en', 'de'), (titleBlock, language) => {
				for (const text of texts(draw(titleBlock, language, box))) {
					expect(text.cap).toBeGreaterThanOrEqual(2.5);
					const bounds = boundsOf({ ...text, text: text.text.replace(/\p{L}/gu, 'n') });
					const wide = boundsOf(text);
					const home = CELLS.some(
						(cell) =>
							wide.left >= box.x + cell.x &&
							wide.right <= box.x + cell.x + cell.width &&
							bounds.top >= box.y + cell.y - 0.01 &&
							bounds.bottom <= box.y + cell.y + cell.height + 0.01
					);
					expect(home, text.text).toBe(true);
				}
			}),
			{ numRuns: 200 }
		);
	});

	it.each([
		['Charger auxiliary supply, line filter', 2],
		['Line filter of the charger auxiliary supply, second source', 3]
	])('wraps %s into %d lines, never under 2.5 mm', (title, count) => {
		const box = { x: 0, y: 0, width: 180, height: 27 };
		const lines = texts(draw({ title }, 'en', box)).filter(
			({ face, x, y }) => face === 'bold' && x > 46 && x < 100 && y > 12.5
		);
		expect(lines.map(({ text }) => text).join(' ')).toBe(title);
		expect(lines.length).toBe(count);
		expect(lines.slice(0, 2).map(({ cap }) => cap)).toEqual([3.5, 3.5]);
	});

	it('says that the sheet is not issued, in the status and in the date', () => {
		const box = { x: 0, y: 0, width: 180, height: 27 };
		const said = texts(draw({}, 'en', box)).filter(({ text }) => text === 'Not issued');
		expect(said.map(({ x }) => x > 107.5 && x < 138.5)).toEqual([true, true]);
	});
});

describe('the check block', () => {
	it.each(PAPERS)('$paper $orientation: whole sentences inside its box', (layout) => {
		const { check } = dividePaper(layout);
		for (const blank of [true, false]) {
			for (const language of ['en', 'de'] as const) {
				const items = checkBlockItems({
					box: check,
					blank,
					stepText: 'This step: 5.2 Resonance guard of the second converter, not 4.64 … 97.9 nF.',
					decade: 28,
					engine: '1.0.0',
					dataHash: '0123456789abcdef0123',
					mark: '.',
					ink,
					words: wordsOf(language)
				});
				for (const item of texts(items)) {
					const bounds = boundsOf(item);
					expect(bounds.left).toBeGreaterThanOrEqual(check.x);
					expect(bounds.right).toBeLessThanOrEqual(check.x + check.width);
					expect(bounds.top).toBeGreaterThanOrEqual(check.y - 0.01);
					expect(bounds.bottom).toBeLessThanOrEqual(check.y + check.height);
				}
			}
		}
	});
});

describe('the frame', () => {
	it.each(PAPERS)(
		'$paper $orientation: 0.7 mm, 20 mm at the left, 10 mm elsewhere, all marks on the paper',
		(layout) => {
			const paper = dividePaper(layout);
			const items = frameItems(paper, ink, true);
			const outline = flat(items).find((item) => item.type === 'path' && item.d.ops === 'MLLLZ');
			expect(outline?.type === 'path' && outline.stroke?.width).toBe(0.7);
			expect(boundsOf(outline as Item).left).toBeCloseTo(20 - 0.35, 9);
			expect(boundsOf(outline as Item).right).toBeCloseTo(paper.width - 10 + 0.35, 9);
			expect(boundsOf(outline as Item).top).toBeCloseTo(10 - 0.35, 9);
			for (const item of flat(items)) {
				const bounds = boundsOf(item);
				expect(bounds.left).toBeGreaterThanOrEqual(4);
				expect(bounds.top).toBeGreaterThanOrEqual(4);
				expect(bounds.right).toBeLessThanOrEqual(paper.width - 4);
				expect(bounds.bottom).toBeLessThanOrEqual(paper.height - 4);
			}
			const letters = texts(items).map(({ text }) => text);
			expect(letters).toContain('1');
			expect(letters).toContain('A');
			expect(letters).not.toContain('I');
			expect(letters).not.toContain('O');
		}
	);

	it('leaves the zones out when asked', () => {
		const paper = dividePaper({ paper: 'A4', orientation: 'landscape' });
		expect(texts(frameItems(paper, ink, false))).toEqual([]);
	});
});

describe('the check rules', () => {
	it.each(PAPERS)('$paper $orientation: both are exactly 100 mm long', (layout) => {
		const paper = dividePaper(layout);
		const { plot, pane } = fitChart({ paper, layout, design: null, evaluation: null, pane: true });
		const foot = plot.y + plot.height + (pane?.height ?? 0);
		const items = flat(
			checkRuleItems({ plot, foot, left: paper.frame.x, k: paper.k, ink, words: wordsOf('en') })
		);
		const rule = (id: string): readonly number[] => {
			const found = items.find((item) => item.id === id);
			return found?.type === 'path' ? found.d.at : [];
		};
		const [x1 = 0, , x2 = 0] = rule('check-rule-frequency');
		const [, y1 = 0, , y2 = 0] = rule('check-rule-impedance');
		expect(x2 - x1).toBeCloseTo(CHECK_RULE_LENGTH, 12);
		expect(y1 - y2).toBeCloseTo(CHECK_RULE_LENGTH, 12);
		for (const item of items) {
			const bounds = boundsOf(item);
			expect(bounds.left).toBeGreaterThan(paper.frame.x + 0.35);
			expect(bounds.right).toBeLessThan(paper.chart.x + paper.chart.width);
			expect(bounds.bottom).toBeLessThan(paper.chart.y + paper.chart.height);
		}
	});
});
