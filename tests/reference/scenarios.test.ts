/** The three worked designs against the bands, windows and values computed for them beforehand. */
import { describe, expect, it } from 'vitest';
import type { Design } from '$lib/design/design';
import {
	avionicsConverter,
	chargerAuxiliary,
	chargerAuxiliaryFirstTry,
	servoControl
} from '$lib/design/examples';
import { benefitAt } from '$lib/network/benefit';
import { sourceImpedance } from '$lib/network/source';
import { preferredValues } from '$lib/quantity/series';
import { toAnswer } from '$lib/rules/answer';
import { filterOf } from '$lib/rules/circuit';
import { evaluate } from '$lib/rules/evaluate';
import { checkOf } from './check-cases';

type Ends = readonly (number | null)[];

const exact = { toleranceMinus: 0, tolerancePlus: 0 } as const;

/** The cases were computed with a peak of 357.8 V, rounded from √2 · 253 V. */
const peak = { voltageMax_V: 357.8 / Math.SQRT2 } as const;

/** Reactive current and displacement factor take the rms voltage: 253 V, or for the third design's factor 230 V. */
const stepped = (design: Design): Design => ({ ...design, supply: { ...design.supply, ...peak } });

const withoutTolerance: Design = {
	...avionicsConverter,
	inductor: { ...avionicsConverter.inductor, ...exact },
	choice: { ...avionicsConverter.choice, ...exact }
};

const toThirdHarmonic: Design = {
	...avionicsConverter,
	switching: avionicsConverter.switching.map((entry) => ({ ...entry, harmonics: 3 })),
	rules: avionicsConverter.rules.map((rule) =>
		rule.kind === 'resonance-guard' ? { ...rule, harmonicGuard: 2 } : rule
	)
};

const scenarios: readonly (readonly [string, string, Design])[] = [
	['J1', 'charger, first try', stepped(chargerAuxiliaryFirstTry)],
	['J2', 'charger, revised', stepped(chargerAuxiliary)],
	['J3', 'avionics, no tolerance', withoutTolerance],
	['J4', 'avionics, Cx ±10 %', { ...withoutTolerance, choice: avionicsConverter.choice }],
	['J5', 'avionics, L ±20 % too', avionicsConverter],
	['J6', 'avionics, harmonics to 3', toThirdHarmonic],
	['J7', 'servo', stepped(servoControl)]
];

const expectEnds = (found: readonly Ends[], expected: readonly Ends[], rel: number): void => {
	expect(found).toHaveLength(expected.length);
	expected.forEach((ends, index) => {
		ends.forEach((end, side) => {
			const actual = found[index]?.[side];
			if (typeof actual === 'number' && typeof end === 'number' && end !== 0) {
				expect(Math.abs(actual / end - 1)).toBeLessThanOrEqual(rel);
			} else {
				expect(actual ?? 0).toBe(end ?? 0);
			}
		});
	});
};

/** Kinds whose rms voltage the rounded peak would shift: judged apart, at 253 V. */
const byRms: readonly string[] = ['reactive-current', 'displacement-factor'];

describe.each(scenarios)('%s %s', (id, _, design) => {
	const answer = toAnswer(evaluate(design));
	const { input, expected } = checkOf(id);
	const rules = input['rules'] as { rule: string; forbidden: Ends[] }[];

	it('forbids what was computed', () => {
		const findings = design.rules.flatMap(({ id: rule, kind }) => {
			if (byRms.includes(kind)) return [];
			const found = answer.findings.find((entry) => entry.rule === rule);
			return found === undefined ? [] : [found.bands.map(({ from_F, to_F }) => [from_F, to_F])];
		});
		const kept = rules.filter(({ rule }) => !/^(reactive|DPF)/u.test(rule)).map(({ forbidden }) => forbidden);
		// One band each; the lists name the rules in different orders.
		const rising = (bands: readonly Ends[][]): Ends[] =>
			bands.flat().sort(([a, b], [c, d]) => (a ?? 0) - (c ?? 0) || (b ?? Infinity) - (d ?? Infinity));
		expectEnds(rising(findings), rising(kept), 1e-6);
	});

	it('leaves the windows that were computed', () => {
		const windows = answer.windows.map(({ from_F, to_F }) => [from_F, to_F]);
		expectEnds(windows, expected['allowed'] as Ends[], 1e-6);
		const nominal = answer.windows
			.filter(({ nominalEmpty }) => !nominalEmpty)
			.map(({ nominalFrom_F, nominalTo_F }) => [nominalFrom_F, nominalTo_F]);
		expectEnds(nominal, expected['nominal_allowed'] as Ends[], 1e-6);
	});

	it('leaves the values of E12 that were computed', () => {
		const values = answer.windows.map(({ nominalFrom_F, nominalTo_F }) =>
			preferredValues('E12', nominalFrom_F ?? 1e-12, nominalTo_F ?? 0.1)
		);
		expectEnds(values, expected['E12'] as Ends[], 1e-9);
	});
});

describe('the charger', () => {
	it('has no window at first, names share and reactance, and asks for 1.72 µF', () => {
		const { windows, conflict, recommended, candidates } = evaluate(chargerAuxiliaryFirstTry);
		expect([windows, candidates, recommended]).toEqual([[], [], null]);
		expect(conflict?.rules).toEqual(['share', 'reactance']);
		expect(conflict?.cure).toMatchObject({ pointer: '/capacitor/capacitance_F', value: 1.72e-6 });
		expect(conflict?.cure?.text).toMatch(/^C ≥ 1\.72\sµF would open a window$/u);
		expect(conflict?.explanation).toMatch(/above 84\.6\snF.*below 253\snF/u);
	});

	it('takes 330 nF, revised', () => {
		const { recommended, candidates, choice, windows } = evaluate(chargerAuxiliary);
		expect(recommended).toBe(330e-9);
		expect(candidates.map(({ capacitance, series }) => [capacitance, series])).toEqual([[330e-9, 'E6']]);
		expect(choice).toMatchObject({ state: 'allowed', breaks: [], warnings: [] });
		expect(windows[0]?.limitedBy).toEqual({ from: 'reactance', to: 'share' });
	});

	// Exact gain of 330 nF on two 50 µH networks at 132 kHz and its harmonics, computed with numpy.
	it.each([
		[1, 21.8],
		[2, 32.0],
		[3, 36.85],
		[4, 39.9],
		[5, 42.2]
	])('gains at harmonic %i: %f dB', (harmonic, gain) => {
		const frequency = harmonic * 132e3;
		const source = sourceImpedance({ kind: 'amn-50uH-5ohm', networks: 2 }, frequency);
		const found = benefitAt(filterOf(chargerAuxiliary), source, { capacitance: 330e-9 }, frequency);
		expect(Math.abs(found - gain)).toBeLessThan(0.06);
		const least = evaluate(chargerAuxiliary).benefit.find(
			(entry) => entry.source === 'amn' && entry.harmonic === harmonic
		);
		expect(least?.frequency).toBe(harmonic * 126e3);
		expect(least?.gain_dB).toBeLessThan(found);
		expect(least?.gain_dB).toBeGreaterThan(found - 1);
	});
});

describe('the avionics converter', () => {
	it('takes 5.6 µF', () => {
		expect(evaluate(avionicsConverter).recommended).toBe(5.6e-6);
	});

	// Exact gain on two 5 µH networks at 210 kHz and its harmonics, computed with numpy.
	it.each([
		[180e-9, [-1.9, -13.7, -2.0, 6.8, 12.0]],
		[5.6e-6, [14.1, 27.5, 34.8, 39.8, 43.7]]
	])('gains with %f F', (capacitance, gains) => {
		const choice = { ...avionicsConverter.choice, capacitance_F: capacitance };
		const { benefit } = evaluate({ ...avionicsConverter, choice });
		gains.forEach((gain, index) => {
			const found = benefit.find(({ source, harmonic }) => source === 'an' && harmonic === index + 1);
			expect(Math.abs((found?.gain_dB ?? NaN) - gain)).toBeLessThan(0.06);
		});
	});

	it('never recommends the lower window, and warns of what it does', () => {
		const rules = withoutTolerance.rules.map((rule) =>
			rule.kind === 'capacitor-share' ? { ...rule, divisor: 9 } : rule
		);
		const { windows, candidates, recommended } = evaluate({ ...withoutTolerance, rules });
		expect(windows).toHaveLength(2);
		expect(windows[0]?.widthDecades).toBeGreaterThan(windows[1]?.widthDecades ?? 1);
		expect(candidates.some(({ window }) => window === 0)).toBe(true);
		expect(recommended === null || recommended > 1e-6).toBe(true);
		const low = candidates.find(({ capacitance }) => capacitance === 180e-9);
		expect(low?.warnings.some((text) => /^−13\.7 dB at 420\skHz on Test network$/u.test(text))).toBe(true);
	});
});

it('the servo takes 470 nF', () => {
	const { recommended, findings } = evaluate(servoControl);
	expect(recommended).toBe(470e-9);
	const factor = findings.find(({ rule }) => rule === 'factor')?.bands[0]?.from ?? 0;
	expect(Math.abs(factor / 722e-9 - 1)).toBeLessThan(1e-3);
});

// Reactive current by the rms voltage of 253 V, computed with numpy.
it.each([
	['charger', chargerAuxiliary, 4.4034964491828756e-7],
	['servo', servoControl, 1.006513474098943e-6]
])('limits the reactive current of the %s', (_, design, limit) => {
	const found =
		evaluate(design).findings.find(({ kind }) => kind === 'reactive-current')?.bands[0]?.from ?? 0;
	expect(Math.abs(found / limit - 1)).toBeLessThan(1e-9);
});
