import { describe, expect, it } from 'vitest';
import { servoControl } from './examples';
import { parseDesign } from './parse';
import { RULE_KINDS } from './rule-schema';
import { newDesign, newRule } from './start';

describe('newDesign', () => {
	it.each([
		['ac', ['capacitor-share', 'resonance-guard', 'reactance-limit', 'reactive-current', 'discharge']],
		['dc', ['capacitor-share', 'resonance-guard', 'reactance-limit']]
	] as const)('of %s starts with its rules', (supply, kinds) => {
		const design = newDesign(supply);
		expect(design.rules.map(({ kind }) => kind)).toEqual(kinds);
		expect(design.rules).toContainEqual(expect.objectContaining({ kind: 'capacitor-share', divisor: 5 }));
		expect(design.rules).toContainEqual(
			expect.objectContaining({ guard: 2, harmonicGuard: 1.15, method: 'exact', source: 'amn' })
		);
		expect(design.rules).toContainEqual(expect.objectContaining({ reference_ohm: 50, divisor: 10 }));
		expect(design.sources).toEqual([expect.objectContaining({ kind: 'amn-50uH-5ohm', networks: 2 })]);
		const mandatory = design.rules.filter((rule) => rule.class === 'mandatory').map(({ kind }) => kind);
		expect(mandatory).toEqual(supply === 'ac' ? ['reactive-current', 'discharge'] : []);
		expect(parseDesign(design)).toEqual({ ok: true, design });
	});
});

describe('newRule', () => {
	it.each(RULE_KINDS)('%s fits a design with a source of every need', (kind) => {
		const rule = newRule(kind, 'new', servoControl);
		expect(rule).toMatchObject({ id: 'new', kind });
		const design = { ...servoControl, rules: [...servoControl.rules, rule] };
		expect(parseDesign(design)).toEqual({ ok: true, design });
	});

	it('names a source for the user to change where none suits', () => {
		const design = newDesign('ac');
		const rules = [newRule('inrush-current', 'inrush', design)];
		expect(parseDesign({ ...design, rules })).toMatchObject({
			ok: false,
			issues: [{ pointer: '/rules/0/source' }]
		});
	});
});
