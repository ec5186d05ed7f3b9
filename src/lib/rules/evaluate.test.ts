import { describe, expect, it } from 'vitest';
import type { Design, Rule } from '$lib/design/design';
import { avionicsConverter, chargerAuxiliary, servoControl } from '$lib/design/examples';
import { toAnswer } from './answer';
import { evaluate } from './evaluate';

const without = (design: Design, ...ids: readonly string[]): Design => ({
	...design,
	rules: design.rules.filter(({ id }) => !ids.includes(id))
});

const classed = (design: Design, id: string, to: Rule['class']): Design => ({
	...design,
	rules: design.rules.map((rule) => (rule.id === id ? { ...rule, class: to } : rule))
});

const chosen = (design: Design, capacitance: number | null): Design => ({
	...design,
	choice: { ...design.choice, capacitance_F: capacitance }
});

const override = { rule: 'share', by: 'Ada', reason: 'Cut-off is uncritical', date: '2026-01-31' } as const;

describe('classes and overrides', () => {
	it('lets an advisory rule close nothing but warn', () => {
		const { windows, choice } = evaluate(chosen(classed(chargerAuxiliary, 'share', 'advisory'), 380e-9));
		expect(windows[0]?.limitedBy.to).toBe('reactive');
		expect(choice).toMatchObject({ state: 'allowed', breaks: [], warnings: ['share'] });
	});

	it('puts an overridden rule aside by name, and still warns', () => {
		const { windows, findings, choice } = evaluate({
			...chosen(chargerAuxiliary, 380e-9),
			overrides: [override]
		});
		expect(windows[0]?.limitedBy.to).toBe('reactive');
		expect(findings.find(({ rule }) => rule === 'share')?.override).toEqual(override);
		expect(choice).toMatchObject({ state: 'allowed', breaks: [], warnings: ['share'] });
	});

	it('never overrides a mandatory rule', () => {
		const { findings } = evaluate({ ...chargerAuxiliary, overrides: [{ ...override, rule: 'reactive' }] });
		expect(findings.every((finding) => finding.override === undefined)).toBe(true);
	});
});

describe('the verdict on the choice', () => {
	it.each([
		[330e-9, 'allowed', []],
		[360e-9, 'allowed', []],
		[270e-9, 'nominal-only', ['reactance']],
		[390e-9, 'nominal-only', ['share']],
		[100e-9, 'forbidden', ['guard', 'reactance']],
		[470e-9, 'forbidden', ['share', 'reactive']]
	])('%f F', (capacitance, state, breaks) => {
		expect(evaluate(chosen(chargerAuxiliary, capacitance)).choice).toMatchObject({ state, breaks });
	});

	it('is none without a choice, and then there is no benefit of it', () => {
		const { choice, benefit } = evaluate(chosen(chargerAuxiliary, null));
		expect([choice, benefit]).toEqual([null, []]);
	});
});

describe('candidates', () => {
	it('are at most 50, ranked by nearness, coarser series first among equals', () => {
		const wide = without(
			{ ...chargerAuxiliary, choice: { ...chargerAuxiliary.choice, series: 'E192' } },
			'share'
		);
		const { candidates, windows } = evaluate(wide);
		expect(candidates.length).toBeGreaterThan(20);
		expect(candidates.length).toBeLessThanOrEqual(50);
		const target = windows[0]?.target ?? NaN;
		const distances = candidates.map(({ capacitance }) => Math.abs(Math.log(capacitance / target)));
		expect(distances).toEqual([...distances].sort((a, b) => a - b));
		for (const { capacitance, marginFrom, marginTo } of candidates) {
			expect(capacitance / (1 + marginFrom)).toBeCloseTo(windows[0]?.nominalFrom ?? NaN, 18);
			expect(capacitance * (1 + marginTo)).toBeCloseTo(windows[0]?.nominalTo ?? NaN, 18);
		}
	});

	it('come only from windows closed at both ends', () => {
		const { candidates, recommended, conflict, windows } = evaluate(
			without(chargerAuxiliary, 'share', 'reactive', 'inrush', 'discharge')
		);
		expect(windows).toMatchObject([{ nominalTo: null }]);
		expect([candidates, recommended, conflict]).toEqual([[], null, null]);
	});

	it('are not recommended while a mandatory rule is not evaluated', () => {
		const unknown: Rule = {
			id: 'srf',
			kind: 'self-resonance',
			class: 'mandatory',
			frequency_Hz: 1e6,
			factor: 1
		};
		const asked = { ...chargerAuxiliary, rules: [...chargerAuxiliary.rules, unknown] };
		expect(evaluate(asked)).toMatchObject({ recommended: null, candidates: [{ capacitance: 330e-9 }] });
		expect(evaluate(classed(asked, 'srf', 'design')).recommended).toBe(330e-9);
	});
});

it('tells not applicable from not evaluated', () => {
	const rules: Rule[] = [
		{ id: 'a', kind: 'reactive-current', class: 'design', limit_A: 0.035 },
		{ id: 'b', kind: 'self-resonance', class: 'design', frequency_Hz: 1e6, factor: 1 },
		{ id: 'c', kind: 'displacement-factor', class: 'design', minimum: 0.9, otherCapacitance_F: 0 },
		{ id: 'd', kind: 'ripple-current', class: 'design', source: 'an', limit_A: 1 },
		{ id: 'e', kind: 'inrush-current', class: 'design', source: 'an', limit_A: 1, includeCapacitor: true },
		{ id: 'f', kind: 'minimum-benefit', class: 'design', source: 'an', minimum_dB: 3, frequencyFrom_Hz: 30e6 }
	];
	const { findings } = evaluate({ ...avionicsConverter, rules });
	expect(findings.map(({ state }) => state)).toEqual([
		'not-applicable',
		'not-evaluated',
		'not-applicable',
		'not-evaluated',
		'not-evaluated',
		'not-evaluated'
	]);
	expect(findings.every(({ bands, reason }) => bands.length === 0 && reason !== null)).toBe(true);
	const factor = {
		...servoControl,
		rules: rules.filter(({ id }) => id === 'c'),
		load: { power_W: 1, voltageMin_V: 1 }
	};
	expect(evaluate(factor).findings[0]?.state).toBe('not-evaluated');
});

it('answers with units in the keys, null for no end, and the formula as a line', () => {
	const answer = toAnswer(evaluate(chargerAuxiliary));
	const share = answer.findings.find(({ rule }) => rule === 'share');
	expect(share?.formula.replace(/\s/gu, ' ')).toBe('Cx ≤ C_min/k = 0.9 · 2.2 µF / 5 = 396 nF');
	expect(share?.bands).toMatchObject([{ from_F: 396e-9, to_F: null }]);
	expect(answer.findings.find(({ rule }) => rule === 'reactance')?.bands).toMatchObject([{ from_F: null }]);
	expect(answer).toMatchObject({ engine: '1.0.0', recommended_F: 330e-9, conflict: null });
	expect(answer.benefit[0]).toMatchObject({
		source: 'amn',
		harmonic: 1,
		frequency_Hz: 126e3,
		inductance_H: null
	});
	expect(answer.benefit[5]).toMatchObject({ source: 'mains', inductance_H: 50e-6 });
	expect(JSON.parse(JSON.stringify(answer))).toEqual(answer);
});
