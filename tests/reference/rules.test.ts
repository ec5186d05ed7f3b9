/** Rules and the algebra of bands against published, hand-computed and simulated values. */
import { describe, expect, it } from 'vitest';
import type { Design, Rule } from '$lib/design/design';
import { avionicsConverter } from '$lib/design/examples';
import { findingOf } from '$lib/rules/table';
import { windowsOf } from '$lib/rules/windows';
import { bandsIn, inputOf, valuesOf } from './check-cases';

const exact = { toleranceMinus: 0, tolerancePlus: 0 } as const;

const caseP: Design = {
	...avionicsConverter,
	supply: { kind: 'ac', voltage_V: 230, voltageMax_V: 230, frequency_Hz: 50, frequencyMax_Hz: 50 },
	switching: [
		{ id: 's', label: 'S', frequencyMin_Hz: 145e3, frequencyMax_Hz: 145e3, harmonics: 1, current_A: [1] }
	],
	inductor: { inductance_H: 33e-6, ...exact },
	capacitor: { capacitance_F: 4.7e-6, ...exact },
	sources: [{ id: 'amn', label: 'Test network', kind: 'amn-50uH-5ohm', networks: 2 }],
	choice: { capacitance_F: null, ...exact, series: 'E12', esl_H: 18e-9 },
	rules: []
};

const bandsOf = (design: Design, rule: Rule): (number | null)[][] =>
	findingOf(design, rule).bands.map(({ from, to }) => [
		from === 0 ? null : from,
		to === Infinity ? null : to
	]);

const expectNear = (
	actual: number | null | undefined,
	expected: number | null | undefined,
	rel: number
): void => {
	if (typeof actual !== 'number' || typeof expected !== 'number') expect(actual).toBe(expected);
	else expect(Math.abs(actual / expected - 1)).toBeLessThanOrEqual(rel);
};

describe('bands of one rule', () => {
	const amn = { class: 'design', source: 'amn' } as const;
	const rows: [string, Rule, number][] = [
		['C1-rule1', { id: 'r', kind: 'capacitor-share', class: 'design', divisor: 5 }, 1e-9],
		[
			'C2-C0',
			{ id: 'r', kind: 'resonance-guard', ...amn, guard: 2, harmonicGuard: 1, method: 'approximate' },
			1e-6
		],
		['C11-forbid', { id: 'r', kind: 'ripple-current', ...amn, limit_A: 0.012 }, 1e-6]
	];
	it.each(rows)('%s', (id, rule, rel) => {
		const design = id === 'C11-forbid' ? { ...caseP, choice: { ...caseP.choice, esl_H: 0 } } : caseP;
		const found = bandsOf(design, rule);
		const expected = bandsIn(id);
		expect(found).toHaveLength(expected.length);
		expected.forEach((band, index) => {
			band.forEach((edge, end) => {
				expectNear(found[index]?.[end], edge, rel);
			});
		});
	});

	it('C3-rule3: 50 Ω and 10 at 145 kHz', () => {
		const rule: Rule = { id: 'r', kind: 'reactance-limit', class: 'design', reference_ohm: 50, divisor: 10 };
		expectNear(bandsOf(caseP, rule)[0]?.[1], valuesOf('C3-rule3', ['Cx_min_F'])[0], 1e-9);
	});

	it('C9-dpf: 30 W at 230 V', () => {
		const rule: Rule = {
			id: 'r',
			kind: 'displacement-factor',
			class: 'design',
			minimum: 0.9,
			otherCapacitance_F: 0
		};
		const design = { ...caseP, load: { power_W: 150, voltageMin_V: 207, lightLoad_W: 30 } };
		expectNear(bandsOf(design, rule)[0]?.[0], valuesOf('C9-dpf', ['C_max_F'])[0], 1e-9);
	});

	// 30 W, 0.9, at 253 V instead: computed by hand, 722 nF.
	it('takes the highest voltage for the displacement factor', () => {
		const rule: Rule = {
			id: 'r',
			kind: 'displacement-factor',
			class: 'design',
			minimum: 0.9,
			otherCapacitance_F: 0
		};
		const supply = { ...caseP.supply, voltageMax_V: 253 };
		const design = { ...caseP, supply, load: { power_W: 150, voltageMin_V: 207, lightLoad_W: 30 } };
		expectNear(bandsOf(design, rule)[0]?.[0], 722e-9, 1e-3);
	});

	it('C14-Cmax: 18 nH at 1.45 MHz', () => {
		const rule: Rule = { id: 'r', kind: 'self-resonance', class: 'design', frequency_Hz: 1.45e6, factor: 1 };
		expectNear(bandsOf(caseP, rule)[0]?.[0], valuesOf('C14-Cmax', ['Cx_max_F'])[0], 1e-9);
	});

	// ngspice 39.3: 1.32 µF on 390 kΩ falls from 357.8 V to 60 V in 0.9192421 s.
	it('C10-ng: the simulated discharge is the limit', () => {
		const [start, capacitance, resistance, seconds] = valuesOf('C10-ng', [
			'V0',
			'C_F',
			'R_ohm',
			't_to_60V_s'
		]);
		const rule: Rule = {
			id: 'r',
			kind: 'discharge',
			class: 'mandatory',
			resistance_ohm: resistance ?? 0,
			resistorTolerance: 0,
			seconds: seconds ?? 0,
			safeVoltage_V: 60,
			otherCapacitance_F: 0
		};
		const supply = { ...caseP.supply, voltageMax_V: (start ?? 0) / Math.SQRT2 };
		expectNear(bandsOf({ ...caseP, supply }, rule)[0]?.[0], capacitance, 1e-4);
	});

	// 940 kΩ and 2 s to 60 V at 253 V, computed by hand: 1.192 µF.
	it('puts in the resistor at its upper tolerance and takes other capacitors off', () => {
		const rule: Rule = {
			id: 'r',
			kind: 'discharge',
			class: 'mandatory',
			resistance_ohm: 940e3 / 1.05,
			resistorTolerance: 0.05,
			seconds: 2,
			safeVoltage_V: 60,
			otherCapacitance_F: 100e-9
		};
		const supply = { ...caseP.supply, voltageMax_V: 253 };
		expectNear(bandsOf({ ...caseP, supply }, rule)[0]?.[0], 1.192e-6 - 100e-9, 1e-3);
	});

	// The published exact value of the base case, 48.70 nF.
	it('centres the exact guard on the exact worst capacitance', () => {
		const rule: Rule = {
			id: 'r',
			kind: 'resonance-guard',
			...amn,
			guard: 2,
			harmonicGuard: 1,
			method: 'exact'
		};
		const [band] = bandsOf(caseP, rule);
		expectNear(Math.sqrt((band?.[0] ?? 0) * (band?.[1] ?? 0)), 48.7e-9, 2e-4);
		expectNear((band?.[1] ?? 0) / (band?.[0] ?? 1), 16, 1e-12);
	});
});

it('C3-consistency: share and reactance limit meet where C = 1/(2πf)', () => {
	const [least] = valuesOf('C3-consistency', ['C_min_F']);
	const design = { ...caseP, capacitor: { ...caseP.capacitor, capacitance_F: least ?? 0 } };
	const share = bandsOf(design, { id: 'a', kind: 'capacitor-share', class: 'design', divisor: 5 })[0]?.[0];
	const reactance = bandsOf(design, {
		id: 'b',
		kind: 'reactance-limit',
		class: 'design',
		reference_ohm: 50,
		divisor: 10
	})[0]?.[1];
	expectNear(share, reactance, 1e-9);
});

describe('bands and windows', () => {
	it('D1: two bands that overlap leave nothing', () => {
		const { forbidden } = inputOf('D1') as { forbidden: [number, number | null][] };
		const bands = forbidden.map(([from, to]) => ({ from, to: to ?? Infinity, rule: 'r' }));
		expect(windowsOf(bands, exact)).toEqual([]);
	});

	it('D2: bands that touch leave one legal point', () => {
		const { forbidden } = inputOf('D2') as { forbidden: [number, number][] };
		const bands = forbidden.map(([from, to]) => ({ from, to, rule: 'r' }));
		const found = windowsOf(bands, exact).map(({ from, to, degenerate }) => [from, to, degenerate]);
		expect(found).toEqual([
			[0, 1e-9, false],
			[8e-9, 8e-9, true],
			[9e-9, Infinity, false]
		]);
	});
});
