import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Design, ManualBandRule, Rule } from '$lib/design/design';
import { chargerAuxiliary, chargerAuxiliaryFirstTry } from '$lib/design/examples';
import { conflictOf, smallestSet } from './conflict';
import { roundOutward } from './cure';
import { evaluate } from './evaluate';
import { findingsOf } from './table';
import { leavesNominal, type ClosingBand } from './windows';

const ten = { toleranceMinus: 0.1, tolerancePlus: 0.1 } as const;
const exact = { toleranceMinus: 0, tolerancePlus: 0 } as const;

const group = (from: number, to: number): ClosingBand[] => [{ from, to, rule: 'r' }];

describe('the smallest set', () => {
	it.each([
		['two that overlap', [group(0, 241e-9), group(94e-9, Infinity)], [0, 1]],
		['three in a chain', [group(0, 100e-9), group(90e-9, 200e-9), group(190e-9, Infinity)], [0, 1, 2]],
		['one alone', [group(1e-9, 2e-9), group(0, Infinity), group(0, 1e-9)], [1]],
		['the first of two pairs', [group(0, 3), group(0, 4), group(1, Infinity), group(2, Infinity)], [0, 2]],
		['a pair before a triple', [group(0, 1), group(0.5, 3), group(0, 3), group(2, Infinity)], [2, 3]]
	])('%s', (_, groups, expected) => {
		expect(smallestSet(groups, exact)).toEqual(expected);
	});

	it('counts a gap too narrow for the tolerance as none', () => {
		const groups = [group(0, 100e-9), group(120e-9, Infinity)];
		expect(smallestSet(groups, ten)).toEqual([0, 1]);
	});

	const decade = fc.integer({ min: 0, max: 12 });
	const anyGroup = fc.array(fc.tuple(decade, decade), { minLength: 1, maxLength: 2 }).map((pairs) =>
		pairs.map(([a, b]) => ({
			from: Math.min(a, b) === 0 ? 0 : 10 ** (Math.min(a, b) - 12),
			to: Math.max(a, b) === 12 ? Infinity : 10 ** (Math.max(a, b) - 12),
			rule: 'r'
		}))
	);

	it('leaves no nominal value, is smallest, and first among its equals', () => {
		fc.assert(
			fc.property(fc.array(anyGroup, { minLength: 1, maxLength: 7 }), (groups) => {
				const shuts = (set: readonly number[]): boolean =>
					!leavesNominal(
						set.flatMap((index) => groups[index] ?? []),
						ten
					);
				const all = groups.map((__, index) => index);
				fc.pre(shuts(all));
				const subsets = Array.from({ length: 2 ** groups.length }, (__, mask) =>
					all.filter((index) => (mask >> index) % 2 === 1)
				);
				const [best] = subsets.filter(shuts).sort((a, b) => {
					const at = a.findIndex((index, place) => index !== b[place]);
					return a.length - b.length || (at < 0 ? 0 : (a[at] ?? 0) - (b[at] ?? 0));
				});
				expect(smallestSet(groups, ten)).toEqual(best);
			}),
			{ numRuns: 300 }
		);
	});
});

describe('rounding outward', () => {
	it.each([
		[1.7154e-6, 'up', 1.72e-6],
		[1.72e-6, 'up', 1.72e-6],
		[9.996, 'up', 10],
		[1.7154e-6, 'down', 1.71e-6],
		[1.0004, 'down', 1],
		[1.001e3, 'down', 1e3],
		[0.99999, 'down', 0.999]
	] as const)('%f %s', (value, direction, expected) => {
		expect(roundOutward(value, direction)).toBe(expected);
	});
});

const manual = (id: string, from: number | null, to: number | null): ManualBandRule => ({
	id,
	kind: 'manual-band',
	class: 'design',
	from_F: from,
	to_F: to,
	reason: 'test'
});

const withRules = (rules: readonly Rule[]): Design => ({ ...chargerAuxiliary, rules });

const pointed = (design: Design, pointer: string, value: number): Design => {
	const [, top = '', key = '', last] = pointer.split('/');
	if (top === 'rules') {
		return {
			...design,
			rules: design.rules.map((rule, index) =>
				String(index) === key ? { ...rule, [last ?? '']: value } : rule
			)
		};
	}
	return top === 'capacitor'
		? { ...design, capacitor: { ...design.capacitor, [key]: value } }
		: { ...design, inductor: { ...design.inductor, [key]: value } };
};

describe('a conflict', () => {
	it('is none while a nominal window remains', () => {
		expect(conflictOf(chargerAuxiliary, findingsOf(chargerAuxiliary))).toBeNull();
	});

	it('says when what is left is too narrow', () => {
		const design = withRules([manual('a', null, 1e-7), manual('b', 1.1e-7, null)]);
		expect(evaluate(design).conflict).toMatchObject({ rules: ['a', 'b'], cure: null });
		expect(evaluate(design).conflict?.explanation).toMatch(
			/100–110\snF, is too narrow for a tolerance of −10\/\+10 %/u
		);
	});

	it('never eases a mandatory limit', () => {
		const mandatory = chargerAuxiliaryFirstTry.rules.map((rule): Rule => ({ ...rule, class: 'mandatory' }));
		const { conflict } = evaluate({ ...chargerAuxiliaryFirstTry, rules: mandatory });
		expect(conflict?.cure?.pointer).toBe('/capacitor/capacitance_F');
		const bound: Rule = { id: 'x', kind: 'reactive-current', class: 'mandatory', limit_A: 5e-3 };
		const reactance: Rule = {
			id: 'y',
			kind: 'reactance-limit',
			class: 'mandatory',
			reference_ohm: 50,
			divisor: 10
		};
		expect(evaluate(withRules([bound, reactance])).conflict?.cure).toBeNull();
		expect(evaluate(withRules([bound, { ...reactance, class: 'design' }])).conflict?.cure?.pointer).toBe(
			'/rules/1/divisor'
		);
	});

	it('comes with a cure that cures, and loses it when any one rule goes', () => {
		const ratio = (min: number, max: number) =>
			fc.double({ min: Math.log(min), max: Math.log(max), noNaN: true }).map(Math.exp);
		fc.assert(
			fc.property(
				ratio(1e-8, 3e-6),
				ratio(1e-5, 1e-3),
				ratio(1, 20),
				ratio(1, 4),
				ratio(1e-3, 0.1),
				(c, l, divisor, guard, limit) => {
					const rules: Rule[] = [
						{ id: 'share', kind: 'capacitor-share', class: 'design', divisor },
						{
							id: 'guard',
							kind: 'resonance-guard',
							class: 'design',
							source: 'amn',
							guard,
							harmonicGuard: 1.1,
							method: 'exact'
						},
						{ id: 'reactance', kind: 'reactance-limit', class: 'design', reference_ohm: 50, divisor: 10 },
						{ id: 'reactive', kind: 'reactive-current', class: 'mandatory', limit_A: limit }
					];
					const design: Design = {
						...withRules(rules),
						capacitor: { ...chargerAuxiliary.capacitor, capacitance_F: c },
						inductor: { ...chargerAuxiliary.inductor, inductance_H: l }
					};
					const { conflict, windows } = evaluate(design);
					expect(conflict === null).toBe(windows.some(({ nominalEmpty }) => !nominalEmpty));
					if (conflict === null) return;
					for (const left of conflict.rules) {
						const fewer = rules.filter(({ id }) => id !== left && conflict.rules.includes(id));
						expect(evaluate({ ...design, rules: fewer }).conflict).toBeNull();
					}
					if (conflict.cure === null) return;
					const cured = evaluate(pointed(design, conflict.cure.pointer, conflict.cure.value));
					expect(cured.conflict).toBeNull();
				}
			),
			{ numRuns: 60 }
		);
	}, 60_000);
});
