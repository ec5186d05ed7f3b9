import type { Design, Rule, RuleKind, Source, Switching } from '$lib/design/design';
import { evaluate } from '$lib/rules/evaluate';
import { itemBounds, overlaps, textBox } from '$lib/scene/bounds';
import type { Item, TextItem } from '$lib/scene/scene';
import fc from 'fast-check';
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

const layout = fc.record({
	paper: fc.constantFrom('A4', 'A3', 'Letter', 'Tabloid'),
	orientation: fc.constantFrom('landscape', 'portrait'),
	language: fc.constantFrom('en', 'de'),
	decimalMark: fc.constantFrom('.', ',')
});

/** Log-uniform, rounded to three digits. */
const spread = (from: number, to: number): fc.Arbitrary<number> =>
	fc
		.double({ min: Math.log10(from), max: Math.log10(to), noNaN: true })
		.map((power) => Number((10 ** power).toPrecision(3)));
const tolerance = fc.constantFrom(0, 0.05, 0.1, 0.2, 0.35);
const label = fc.string({ unit: fc.constantFrom(...'abcgjpqyWÄß 0-,('), maxLength: 40 });

const sources = fc.array(
	fc.record({
		label,
		min: spread(1e-7, 1e-4),
		ratio: spread(1, 20),
		kind: fc.constantFrom('amn-50uH', 'an-5uH', 'impedance')
	}),
	{ minLength: 1, maxLength: 6 }
);
const switching = fc.array(fc.record({ label, low: spread(2e4, 2e6), ratio: fc.constantFrom(1, 1.1, 3) }), {
	minLength: 1,
	maxLength: 8
});

const ruleOf = (kind: RuleKind, id: string, strength: Rule['class'], scale: number): Rule => {
	const base = { id, class: strength };
	switch (kind) {
		case 'capacitor-share':
			return { ...base, kind, divisor: scale };
		case 'resonance-guard':
			return {
				...base,
				kind,
				source: 's0',
				guard: 1 + scale / 10,
				harmonicGuard: 1.1,
				method: 'approximate'
			};
		case 'inrush-current':
			return { ...base, kind, source: 's0', limit_A: 10 * scale, includeCapacitor: false };
		case 'reactive-current':
			return { ...base, kind, limit_A: scale / 100 };
		case 'self-resonance':
			return { ...base, kind, frequency_Hz: 1e6 * scale, factor: 1.234 };
		case 'manual-band':
			return { ...base, kind, from_F: 1e-9 * scale, to_F: 1e-7 * scale, reason: 'no such part is in stock' };
		default:
			return { ...base, kind: 'reactance-limit', reference_ohm: 50, divisor: scale };
	}
};
const rules = fc.array(
	fc.record({
		kind: fc.constantFrom<RuleKind>(
			'capacitor-share',
			'resonance-guard',
			'inrush-current',
			'reactive-current',
			'self-resonance',
			'manual-band',
			'reactance-limit'
		),
		strength: fc.constantFrom('mandatory', 'design', 'advisory'),
		scale: spread(1, 20)
	}),
	{ maxLength: 40 }
);

const design = fc
	.record({
		sources,
		switching,
		rules,
		inductance: spread(1e-7, 1e-2),
		capacitance: spread(1e-8, 1e-3),
		chosen: fc.option(spread(1e-10, 1e-4)),
		minus: tolerance,
		plus: tolerance,
		ac: fc.boolean(),
		notes: fc.option(fc.string({ unit: fc.constantFrom(...'abcg Wy'), maxLength: 400 }), { nil: undefined })
	})
	.map((made): Design => {
		const both = { toleranceMinus: made.minus, tolerancePlus: made.plus };
		return {
			format: 'herringbone-design',
			formatVersion: 1,
			title: 'Random',
			supply: made.ac
				? { kind: 'ac', voltage_V: 230, voltageMax_V: 253, frequency_Hz: 50, frequencyMax_Hz: 60 }
				: { kind: 'dc', voltage_V: 28, voltageMax_V: 32 },
			load: { power_W: 60, voltageMin_V: 18, lightLoad_W: 7.125 },
			switching: made.switching.map((entry, index): Switching => ({
				id: `f${String(index)}`,
				label: entry.label,
				frequencyMin_Hz: entry.low,
				frequencyMax_Hz: Number((entry.low * entry.ratio).toPrecision(4)),
				harmonics: 5
			})),
			inductor: { inductance_H: made.inductance, ...both, resistance_ohm: 0.0123 },
			capacitor: { capacitance_F: made.capacitance, ...both, esr_ohm: 0.0345, esl_H: 1.75e-8 },
			damping: { resistance_ohm: 2.37, capacitance_F: 4.7e-6 },
			sources: made.sources.map((entry, index): Source =>
				entry.kind === 'impedance' || index === 0
					? {
							id: `s${String(index)}`,
							label: entry.label,
							kind: 'impedance',
							inductanceMin_H: entry.min,
							inductanceMax_H: Number((entry.min * entry.ratio).toPrecision(4)),
							resistance_ohm: 0.4
						}
					: { id: `s${String(index)}`, label: entry.label, kind: entry.kind as 'an-5uH', networks: 2 }
			),
			choice: { capacitance_F: made.chosen, ...both, series: 'E192' },
			rules: made.rules.map((rule, index) =>
				ruleOf(rule.kind, `rule-${String(index)}`, rule.strength, rule.scale)
			),
			overrides: [
				{ rule: 'rule-0', by: 'M. Brekke', reason: 'agreed with the customer', date: '2026-01-05' }
			],
			...(made.notes === undefined ? {} : { notes: made.notes })
		};
	});

/** Touching counts as clear; rounding errors must not count at all. */
const CLEARANCE = -0.01;

const clashes = (items: readonly Item[]): string[] => {
	const boxes = texts(items).map((item) => ({ text: item.text, box: textBox(item, CLEARANCE) }));
	return boxes.flatMap((a, index) =>
		boxes
			.slice(index + 1)
			.filter((b) => Math.abs(a.box.y - b.box.y) < 12 && overlaps(a.box, b.box))
			.map((b) => `${a.text} × ${b.text}`)
	);
};

const strays = (items: readonly Item[], wanted: Layout): string[] => {
	const columns = dividePaper(wanted).strip;
	return flat(items).flatMap((item) => {
		const bounds = itemBounds(item);
		if (bounds === null) return [];
		const home = columns.some(
			(box) =>
				bounds.left >= box.x - 0.01 &&
				bounds.right <= box.x + box.width + 0.01 &&
				bounds.top >= box.y - 0.01 &&
				bounds.bottom <= box.y + box.height + 0.01
		);
		return home ? [] : [item.type === 'text' ? item.text : JSON.stringify(item)];
	});
};

describe('the strip of any design', () => {
	it('neither collides nor overflows, whatever the design', () => {
		fc.assert(
			fc.property(design, layout, fc.integer({ min: 0, max: 41 }), (made, wanted, step) => {
				const shown = {
					layout: wanted as Layout,
					rulesShown: step,
					resultShown: step > 20,
					blank: step === 0
				};
				const items = draw(made, shown);
				expect(clashes(items)).toEqual([]);
				expect(strays(items, shown.layout)).toEqual([]);
				for (const { cap, text } of texts(items)) {
					expect(cap >= 2.5 || (cap >= 1.8 && /^[\p{L}\d,]{1,5}$/u.test(text)), text).toBe(true);
				}
			}),
			{ numRuns: 150 }
		);
	}, 120_000);
});
