import { chargerAuxiliary, chargerAuxiliaryFirstTry, avionicsConverter } from '$lib/design/examples';
import { evaluate } from '$lib/rules/evaluate';
import { itemBounds } from '$lib/scene/bounds';
import type { Item, Scene, TextItem } from '$lib/scene/scene';
import { describe, expect, it } from 'vitest';
import { composeSheet, LayoutError, sheetSteps, type SheetInput } from './compose';
import type { Layout } from './layout';

const layout: Layout = { paper: 'A4', orientation: 'landscape' };
const flat = (items: readonly Item[]): Item[] =>
	items.flatMap((item) => (item.type === 'group' ? flat(item.items) : [item]));
const texts = ({ items }: Scene): TextItem[] =>
	flat(items).filter((item): item is TextItem => item.type === 'text');
const words = (scene: Scene): string =>
	texts(scene)
		.map(({ text }) => text)
		.join('\n');

const LAYOUTS = (['A4', 'A3', 'Letter', 'Tabloid'] as const).flatMap((paper) =>
	(['landscape', 'portrait'] as const).flatMap((orientation) =>
		(['colour', 'mono'] as const).map((ink): Layout => ({ paper, orientation, ink }))
	)
);

describe('composeSheet', () => {
	it.each(LAYOUTS)(
		'$paper $orientation $ink: everything on the paper, lettering 2.5 mm or more but indices',
		(wanted) => {
			for (const kind of ['blank', 'step', 'worked'] as const) {
				const scene = composeSheet({ design: avionicsConverter, layout: wanted, kind, step: 3 });
				for (const item of flat(scene.items)) {
					const bounds = itemBounds(item);
					if (bounds === null) continue;
					expect(bounds.left).toBeGreaterThanOrEqual(4);
					expect(bounds.top).toBeGreaterThanOrEqual(4);
					expect(bounds.right).toBeLessThanOrEqual(scene.width - 4);
					expect(bounds.bottom).toBeLessThanOrEqual(scene.height - 4);
				}
				for (const { cap, text } of texts(scene)) {
					expect(cap >= 2.5 || (cap >= 1.8 && text.length <= 5), text).toBe(true);
				}
			}
		}
	);

	it('says where its axes are, exactly as clients rely on', () => {
		const { metadata } = composeSheet({ design: chargerAuxiliary, layout, kind: 'step', step: 2 });
		expect(metadata).toEqual({
			plot: {
				x_mm: 36,
				y_mm: 21,
				width_mm: 140,
				height_mm: 112,
				decade_mm: 28,
				frequencyFrom_Hz: 1e3,
				frequencyTo_Hz: 1e8,
				impedanceFrom_ohm: 0.1,
				impedanceTo_ohm: 1e3
			},
			pane: {
				x_mm: 36,
				y_mm: 133,
				width_mm: 140,
				height_mm: 28,
				gainFrom_dB: -20,
				gainTo_dB: 60
			},
			kind: 'step',
			step: 2,
			steps: 8
		});
	});

	it('counts one step for the parts, one for each rule, one for window and choice', () => {
		expect(sheetSteps(chargerAuxiliary)).toBe(8);
		expect(sheetSteps({ ...chargerAuxiliary, rules: [] })).toBe(2);
	});

	it('fills the strip step by step', () => {
		const step = (n: number): string =>
			words(composeSheet({ design: chargerAuxiliary, layout, kind: 'step', step: n }));
		expect(step(1)).not.toContain('396');
		expect(step(2)).toContain('This step: 5.1 Share of C, ≤\u00a0396\u00a0nF.');
		expect(step(7)).not.toContain('280.7');
		expect(step(8)).toContain('280.7');
	});

	it('needs no design for a blank sheet, and no pane unless asked', () => {
		const scene = composeSheet({ layout, kind: 'blank' });
		expect(scene.metadata).toMatchObject({ kind: 'blank', step: null, steps: 0, plot: { decade_mm: 35 } });
		expect(scene.metadata).not.toHaveProperty('pane');
		expect(composeSheet({ layout: { ...layout, benefitPane: true }, kind: 'blank' }).metadata).toHaveProperty(
			'pane'
		);
		expect(scene.title).toBe('Reactance worksheet');
	});

	it.each<[SheetInput, string]>([
		[{ layout, kind: 'worked' }, '/design'],
		[{ layout, kind: 'step', design: chargerAuxiliary, step: 9 }, '/step'],
		[{ layout, kind: 'step', design: chargerAuxiliary, step: 0.5 }, '/step'],
		[{ layout: { ...layout, decade_mm: 90 }, kind: 'blank' }, '/layout/decade_mm']
	])('refuses what cannot be drawn, with a pointer: case %#', (input, pointer) => {
		expect(() => composeSheet(input)).toThrow(LayoutError);
		expect(() => composeSheet(input)).toThrow(expect.objectContaining({ pointer }));
	});

	it('writes the decimal comma everywhere when the layout asks for it', () => {
		for (const design of [chargerAuxiliary, avionicsConverter]) {
			const scene = composeSheet({
				design,
				layout: { ...layout, decimalMark: ',', language: 'de' },
				kind: 'worked'
			});
			const rows = /^\d\.\d+$|^[45]\.\d+ /;
			const points = texts(scene).filter(({ text }) => /\d\.\d/.test(text) && !rows.test(text));
			expect(points.map(({ text }) => text).filter((text) => !/Rechenkern|Open:|Offen:/.test(text))).toEqual(
				[]
			);
		}
	});

	it('describes bands, windows and choice for people who hear the sheet', () => {
		const { description, language } = composeSheet({ design: chargerAuxiliary, layout, kind: 'worked' });
		expect(language).toBe('en');
		expect(description).toContain('5.2 Resonance (design): not 4.63\u00a0… 98\u00a0nF.');
		expect(description).toContain('Window 252.7\u00a0… 396\u00a0nF, limited by 5.3 and 5.1.');
		expect(description).toContain('Choice 330\u00a0nF: allowed with its whole tolerance.');
		const empty = composeSheet({ design: chargerAuxiliaryFirstTry, layout, kind: 'worked' }).description;
		expect(empty).toContain('No window is left.');
	});

	it('is the same drawing whether the evaluation is given or not, and twice over', () => {
		const input: SheetInput = { design: chargerAuxiliary, layout, kind: 'worked' };
		const once = JSON.stringify(composeSheet(input));
		expect(JSON.stringify(composeSheet({ ...input, evaluation: evaluate(chargerAuxiliary) }))).toBe(once);
		expect(JSON.stringify(composeSheet(input))).toBe(once);
	});

	it('prints the first sixteen digits of the design data hash when it is given', () => {
		const dataHash = '9F2C41D8A077BE1C0011223344556677';
		const scene = composeSheet({ design: chargerAuxiliary, layout, kind: 'worked', dataHash });
		expect(words(scene)).toContain('Data 9f2c\u00a041d8\u00a0a077\u00a0be1c');
		expect(words(composeSheet({ design: chargerAuxiliary, layout, kind: 'worked' }))).not.toContain('Data ');
	});

	it('uses the whole width without a strip', () => {
		const { metadata } = composeSheet({
			design: chargerAuxiliary,
			layout: { ...layout, strip: false },
			kind: 'worked'
		});
		const { width_mm: width } = metadata['plot'] as { width_mm: number };
		expect(width).toBeGreaterThan(140);
	});
});
