import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import type { Finding } from '$lib/rules/finding';
import { stripsOf, zonesOf } from './zones';

const finding = (
	rule: string,
	ruleClass: Finding['class'],
	...bands: readonly (readonly [number, number])[]
): Finding => ({
	rule,
	kind: 'manual-band',
	class: ruleClass,
	state: 'evaluated',
	reason: null,
	bands: bands.map(([from, to]) => ({ from, to, cause: '' })),
	formula: null,
	rationale: '',
	assumptions: [],
	cautions: []
});

describe('zonesOf', () => {
	it('takes the strongest class where bands overlap and leaves what none forbids', () => {
		const findings = [
			finding('share', 'design', [396e-9, Infinity]),
			finding('reactance', 'design', [0, 253e-9]),
			finding('reactive', 'mandatory', [440e-9, Infinity]),
			finding('advice', 'advisory', [0, Infinity])
		];
		expect(zonesOf(findings)).toEqual([
			{ from: 0, to: 253e-9, class: 'design' },
			{ from: 253e-9, to: 396e-9, class: null },
			{ from: 396e-9, to: 440e-9, class: 'design' },
			{ from: 440e-9, to: Infinity, class: 'mandatory' }
		]);
	});

	it('covers the whole axis with neighbours that differ', () => {
		const edge = fc.double({ min: -12, max: -2, noNaN: true }).map((exponent) => 10 ** exponent);
		const band = fc.tuple(edge, edge).map(([a, b]) => [Math.min(a, b), Math.max(a, b)] as const);
		const rule = fc.tuple(
			fc.constantFrom('mandatory', 'design', 'advisory'),
			fc.array(band, { maxLength: 4 })
		);
		fc.assert(
			fc.property(fc.array(rule, { maxLength: 6 }), (rules) => {
				const zones = zonesOf(rules.map(([kind, bands], index) => finding(String(index), kind, ...bands)));
				expect(zones[0]?.from).toBe(0);
				expect(zones.at(-1)?.to).toBe(Infinity);
				for (const [index, zone] of zones.slice(1).entries()) {
					expect(zone.from).toBe(zones[index]?.to);
					expect(zone.class).not.toBe(zones[index]?.class);
				}
			})
		);
	});
});

describe('stripsOf', () => {
	it('sets a dense bank 5 mm deep, square to the edge, beside each window edge', () => {
		const zones = zonesOf([
			finding('low', 'design', [0, 1e-9]),
			finding('high', 'mandatory', [1e-8, Infinity])
		]);
		const strips = stripsOf(zones, (value) => 40 * Math.log10(value), 1);
		const deep = 5 * Math.SQRT2;
		expect(strips.map((strip) => [strip.class, strip.density])).toEqual([
			['design', 'field'],
			['design', 'bank'],
			['mandatory', 'bank'],
			['mandatory', 'field']
		]);
		expect(strips[1]?.from).toBeCloseTo(-360 - deep, 9);
		expect(strips[1]?.to).toBeCloseTo(-360, 9);
		expect(strips[2]?.from).toBeCloseTo(-320, 9);
		expect(strips[2]?.to).toBeCloseTo(-320 + deep, 9);
	});
});
