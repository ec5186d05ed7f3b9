import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import type { Design } from '$lib/design/design';
import {
	avionicsConverter,
	chargerAuxiliary,
	chargerAuxiliaryFirstTry,
	servoControl
} from '$lib/design/examples';
import { evaluate } from '$lib/rules/evaluate';
import { overlaps, textBox } from '$lib/scene/bounds';
import type { Item, PathItem, TextItem } from '$lib/scene/scene';
import { chartItems, type ChartInput } from './chart';
import { fitChart } from './fit';
import { INKS } from './ink';
import type { Layout } from './layout';
import { crosses, orientedAt } from './oriented';
import { dividePaper } from './paper';
import { capacitanceOfFall, fallOf, footOf } from './plot';
import { wordsOf } from './words';

const A4: Layout = { paper: 'A4', orientation: 'landscape' };

const inputOf = (design: Design | null, layout: Layout = A4, step: number | null = null): ChartInput => {
	const evaluation = design === null ? null : evaluate(design);
	const paper = dividePaper(layout);
	const pane = layout.benefitPane ?? design !== null;
	return {
		...fitChart({ paper, layout, design, evaluation, pane }),
		design,
		evaluation,
		ink: INKS[layout.ink ?? 'colour'],
		words: wordsOf(layout.language),
		decimalMark: '.',
		step,
		k: paper.k
	};
};

const flat = (items: readonly Item[]): Item[] =>
	items.flatMap((item) => (item.type === 'group' ? [item, ...flat(item.items)] : [item]));

const pathsOf = (items: readonly Item[], role: string, of?: string): PathItem[] =>
	flat(items).filter(
		(item): item is PathItem =>
			item.type === 'path' && item.role === role && (of === undefined || item.of === of)
	);

const textsOf = (items: readonly Item[]): TextItem[] =>
	flat(items).filter((item): item is TextItem => item.type === 'text');

/** Straight pieces of a path. */
const segmentsOf = ({ d }: PathItem): number[] => {
	const segments: number[] = [];
	let next = 0;
	let [x, y] = [0, 0];
	for (const op of d.ops) {
		if (op !== 'M' && op !== 'L') continue;
		const [toX = 0, toY = 0] = d.at.slice(next, next + 2);
		if (op === 'L') segments.push(x, y, toX, toY);
		[x, y] = [toX, toY];
		next += 2;
	}
	return segments;
};

const EXAMPLES = [chargerAuxiliary, chargerAuxiliaryFirstTry, avionicsConverter, servoControl];

describe('the scene agrees with the evaluation', () => {
	it.each(EXAMPLES.map((design) => [design.title, design] as const))('%s', (_, design) => {
		const input = inputOf(design);
		const items = chartItems(input);
		for (const [index, window] of (input.evaluation?.windows ?? []).entries()) {
			const [field] = pathsOf(items, 'window', String(index));
			const falls = (field?.d.at ?? []).flatMap((value, at, all) =>
				at % 2 === 0 ? [(all[at + 1] ?? 0) - value] : []
			);
			for (const edge of [window.from, window.to]) {
				const nearest = Math.min(...falls.map((fall) => Math.abs(fall - fallOf(input.plot, edge))));
				expect(nearest).toBeLessThan(0.01);
			}
		}
	});

	it('draws every rule that forbids something as a band at its real edges', () => {
		const input = inputOf(chargerAuxiliary);
		const items = chartItems(input);
		for (const finding of input.evaluation?.findings ?? []) {
			const marks = pathsOf(items, 'band', finding.rule).flatMap(segmentsOf);
			const read: number[] = [];
			for (let index = 0; index < marks.length; index += 4) {
				const [x1 = 0, y1 = 0, x2 = 0] = marks.slice(index, index + 4);
				read.push(x1 === x2 ? input.plot.y + input.plot.height - x1 : y1 - x1);
			}
			const edges = finding.bands.flatMap(({ from, to }) => [from, to]).filter((c) => c > 0 && c < Infinity);
			expect(edges.length).toBeGreaterThan(0);
			for (const edge of edges) {
				const found = read.map((fall) => Math.abs(capacitanceOfFall(input.plot, fall) / edge - 1));
				expect(Math.min(...found)).toBeLessThan(1e-9);
			}
		}
	});

	it('runs the choice down the chart and straight on through the pane', () => {
		const input = inputOf(chargerAuxiliary);
		const wide = pathsOf(chartItems(input), 'choice', 'choice').filter(({ stroke }) => stroke?.width === 1);
		const lines = wide.map(segmentsOf).filter((line) => Math.abs((line[3] ?? 0) - (line[1] ?? 0)) > 1);
		const foot = footOf(input.plot, 330e-9);
		expect(lines).toHaveLength(2);
		expect(lines[1]?.slice(2)).toEqual([expect.closeTo(foot, 9), expect.closeTo(input.pane?.y ?? 0, 9)]);
		const [, , , end] = lines[0] ?? [];
		expect(lines[0]).toEqual([foot, input.pane?.y, foot, end].map((value) => expect.closeTo(value ?? 0, 9)));
		expect(end).toBeCloseTo((input.pane?.y ?? 0) + (input.pane?.height ?? 0), 9);
	});
});

describe('steps', () => {
	const count = (step: number | null, role: string): number =>
		pathsOf(chartItems(inputOf(chargerAuxiliary, A4, step)), role).length;

	it('start with parts alone, add one rule each, and end with windows and choice', () => {
		expect(count(1, 'component-line')).toBeGreaterThan(3);
		expect(count(1, 'band')).toBe(0);
		expect(count(2, 'band')).toBeGreaterThan(0);
		expect(count(7, 'window')).toBe(0);
		expect(count(7, 'choice')).toBe(0);
		expect(count(8, 'window')).toBe(count(null, 'window'));
		expect(count(8, 'choice')).toBe(count(null, 'choice'));
	});

	it('show the rules in their order', () => {
		for (const step of [1, 2, 3, 4, 5, 6, 7]) {
			const items = flat(chartItems(inputOf(chargerAuxiliary, A4, step)));
			const named = new Set(items.filter(({ role, of }) => role === 'band' && of).map(({ of }) => of));
			expect([...named]).toEqual(chargerAuxiliary.rules.slice(0, step - 1).map(({ id }) => id));
		}
	});
});

describe('a blank chart', () => {
	it('has grid, both families and their labels, and no scale readings', () => {
		const items = chartItems(inputOf(null));
		expect(pathsOf(items, 'grid')).toHaveLength(3);
		expect(pathsOf(items, 'inductance-line').length).toBeGreaterThan(0);
		expect(pathsOf(items, 'capacitance-line').length).toBeGreaterThan(0);
		expect(textsOf(items).map(({ text }) => text)).toContain('100\u00a0nF');
	});
});

const log = (from: number, to: number): fc.Arbitrary<number> =>
	fc
		.double({ min: Math.log10(from), max: Math.log10(to), noNaN: true })
		.map((exponent) => Number((10 ** exponent).toPrecision(2)));

const designs: fc.Arbitrary<Design> = fc
	.record({
		base: fc.constantFrom(...EXAMPLES),
		inductance: log(1e-6, 2e-3),
		capacitance: log(1e-7, 1e-4),
		frequency: log(2e4, 2e6),
		spread: fc.double({ min: 1, max: 2, noNaN: true }),
		choice: fc.option(log(1e-9, 1e-5), { nil: null }),
		harmonicGuard: fc.constantFrom(1, 1.15),
		rules: fc.integer({ min: 0, max: 6 })
	})
	.map(({ base, inductance, capacitance, frequency, spread, choice, harmonicGuard, rules }) => ({
		...base,
		switching: base.switching.map((entry) => ({
			...entry,
			frequencyMin_Hz: frequency,
			frequencyMax_Hz: frequency * spread
		})),
		inductor: { ...base.inductor, inductance_H: inductance },
		capacitor: { ...base.capacitor, capacitance_F: capacitance },
		choice: { ...base.choice, capacitance_F: choice },
		rules: base.rules
			.slice(0, rules)
			.map((rule) => (rule.kind === 'resonance-guard' ? { ...rule, harmonicGuard } : rule))
	}));

const layouts: fc.Arbitrary<Layout> = fc.record({
	paper: fc.constantFrom('A4', 'A3', 'Letter', 'Tabloid'),
	orientation: fc.constantFrom('landscape', 'portrait'),
	benefitPane: fc.boolean(),
	language: fc.constantFrom('en', 'de')
});

/** Pairs of texts that overlap, and texts that a heavy line runs through. */
const collisions = (items: readonly Item[]): string[] => {
	const texts = textsOf(items);
	const boxes = texts.map((text) => textBox(text));
	const pairs = boxes.flatMap((box, index) =>
		boxes
			.slice(index + 1)
			.map((other, next) => [other, texts[index + 1 + next]] as const)
			.filter(([other]) => overlaps(box, other))
			.map(([, text]) => `${texts[index]?.text ?? ''} | ${text?.text ?? ''}`)
	);
	const heavy = [...pathsOf(items, 'component-line'), ...pathsOf(items, 'choice')]
		.filter(({ stroke, fill }) => fill === undefined && (stroke?.width ?? 0) >= 0.5)
		.flatMap(segmentsOf);
	const crossed = boxes.flatMap(({ x, y, along, across, cos, sin }, index) => {
		const room = orientedAt(x, y, [along, across], (Math.atan2(sin, cos) * 180) / Math.PI);
		return crosses(room, heavy) ? [`line through ${texts[index]?.text ?? ''}`] : [];
	});
	return [...pairs, ...crossed];
};

describe('lettering', () => {
	it('never meets other lettering or a heavy line, and keeps its height, whatever the design', () => {
		fc.assert(
			fc.property(designs, layouts, (design, layout) => {
				const items = chartItems(inputOf(design, layout));
				expect(Math.min(...textsOf(items).map(({ cap }) => cap))).toBeGreaterThanOrEqual(2.5);
				expect(collisions(items)).toEqual([]);
			}),
			{ numRuns: 100, seed: 20261201 }
		);
	}, 60_000);
});

describe('ink', () => {
	it('is black and white alone in mono', () => {
		const items = flat(chartItems(inputOf(avionicsConverter, { ...A4, ink: 'mono' })));
		const colours = items.flatMap((item) => {
			if (item.type === 'group') return [];
			return item.type === 'text' ? [item.fill] : [item.fill, item.stroke?.colour];
		});
		expect([...new Set(colours)].filter((colour) => colour !== undefined).sort()).toEqual([
			'#000000',
			'#FFFFFF'
		]);
	});

	it('draws one line of 1.0 mm, the choice, and nothing else over 0.5', () => {
		const items = flat(chartItems(inputOf(chargerAuxiliary)));
		const wide = items.filter((item) => item.type === 'path' && (item.stroke?.width ?? 0) > 0.5);
		expect(new Set(wide.map(({ role }) => role))).toEqual(new Set(['choice']));
	});
});
