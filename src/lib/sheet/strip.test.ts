import type { Design, Rule } from '$lib/design/design';
import { avionicsConverter, chargerAuxiliary, servoControl } from '$lib/design/examples';
import { evaluate } from '$lib/rules/evaluate';
import type { Item, TextItem } from '$lib/scene/scene';
import { describe, expect, it } from 'vitest';
import { INKS } from './ink';
import type { Layout } from './layout';
import { dividePaper } from './paper';
import { stripItems } from './strip';
import { wordsOf } from './words';

const flat = (items: readonly Item[]): Item[] =>
	items.flatMap((item) => (item.type === 'group' ? flat(item.items) : [item]));
const texts = (items: readonly Item[]): TextItem[] =>
	flat(items).filter((item): item is TextItem => item.type === 'text');

interface Shown {
	readonly layout: Layout;
	readonly rulesShown: number;
	readonly resultShown: boolean;
	readonly blank: boolean;
}

const draw = (design: Design, { layout, rulesShown, resultShown, blank }: Shown): Item[] => {
	const paper = dividePaper(layout);
	const context = {
		design,
		evaluation: evaluate(design),
		mark: layout.decimalMark ?? '.',
		rulesShown,
		resultShown
	} as const;
	return stripItems({
		columns: paper.strip,
		context: blank ? null : context,
		blank: design,
		ink: INKS.colour,
		words: wordsOf(layout.language),
		k: paper.k
	});
};

describe('the strip', () => {
	it.each([
		[
			chargerAuxiliary,
			[
				'≤\u00a0396\u00a0nF',
				'≥\u00a0252.7\u00a0nF',
				'252.7\u00a0… 396\u00a0nF',
				'280.7\u00a0… 360\u00a0nF',
				'330\u00a0nF'
			]
		],
		[
			avionicsConverter,
			['≤\u00a06.6\u00a0µF', '4.948\u00a0… 6\u00a0µF', '5.6\u00a0µF', '151.6\u00a0… 190.3\u00a0nF']
		],
		[servoControl, ['≤\u00a0660\u00a0nF', '≥\u00a0346\u00a0nF', '432.5\u00a0… 550\u00a0nF', '470\u00a0nF']]
	] as const)('$title: prints the windows of the worked scenario', (example, wanted) => {
		const items = draw(example, {
			layout: { paper: 'A4', orientation: 'landscape' },
			rulesShown: 40,
			resultShown: true,
			blank: false
		});
		const said = texts(items).map(({ text }) => text);
		for (const value of wanted) expect(said).toContain(value);
	});

	it('numbers its rows as the chart and the title block name them', () => {
		const items = draw(chargerAuxiliary, {
			layout: { paper: 'A4', orientation: 'landscape' },
			rulesShown: 40,
			resultShown: true,
			blank: false
		});
		const numbers = texts(items)
			.map(({ text }) => text)
			.filter((text) => /^\d\.\d+$/.test(text));
		expect(new Set(numbers)).toEqual(
			new Set([
				'1.1',
				'2.1',
				'3.1',
				'3.2',
				'4.1',
				'4.2',
				'5.1',
				'5.2',
				'5.3',
				'5.4',
				'5.5',
				'5.6',
				'6.1',
				'6.2',
				'6.3',
				'6.4'
			])
		);
	});

	it('gives nothing away before its step', () => {
		const shown = {
			layout: { paper: 'A4', orientation: 'landscape' },
			rulesShown: 2,
			resultShown: false,
			blank: false
		} as const;
		const said = texts(draw(chargerAuxiliary, shown))
			.map(({ text }) => text)
			.join('\n');
		expect(said).toContain('396');
		expect(said).toContain('Reactance limit');
		expect(said).not.toContain('252.7');
		expect(said).not.toContain('330');
	});

	it('says how many rows a very long strip leaves out', () => {
		const rules = Array.from({ length: 40 }, (_, index): Rule => ({
			id: `r${String(index)}`,
			kind: 'capacitor-share',
			class: 'design',
			divisor: 5
		}));
		const items = draw(
			{ ...chargerAuxiliary, rules },
			{ layout: { paper: 'A4', orientation: 'landscape' }, rulesShown: 40, resultShown: true, blank: false }
		);
		const said = texts(items).map(({ text }) => text);
		expect(said.some((text) => /^… \d+ more rows: see the design file$/.test(text))).toBe(true);
		expect(said).toContain('Window and choice');
		expect(said).toContain('Cautions');
	});

	it('prints the reason of a rule that is not evaluated, and an override', () => {
		const rules: Rule[] = [
			{ id: 'srf', kind: 'self-resonance', class: 'design', frequency_Hz: 1e6, factor: 1 },
			{ id: 'hand', kind: 'manual-band', class: 'design', from_F: 1e-9, to_F: 1e-8, reason: 'none in stock' }
		];
		const overrides = [{ rule: 'hand', by: 'M. Brekke', reason: 'stock found', date: '2026-01-05' }];
		const items = draw(
			{ ...chargerAuxiliary, rules, overrides },
			{ layout: { paper: 'A3', orientation: 'landscape' }, rulesShown: 40, resultShown: true, blank: false }
		);
		const said = texts(items)
			.map(({ text }) => text)
			.join(' ');
		expect(said).toContain('not evaluated');
		expect(said).toMatch(/ESL/);
		expect(said).toContain('Overridden by M. Brekke, 2026-01-05: stock found');
	});
});
