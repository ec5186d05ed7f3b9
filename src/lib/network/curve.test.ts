import { describe, expect, it } from 'vitest';
import { covers, impedanceAt, impedanceCurve, measuredBetween, OutsideCurveError } from './curve';
import { benefitAt } from './benefit';
import { capacitorImpedance, inductorImpedance, type Filter } from './filter';
import { worstBenefit } from './benefit';
import { sourceImpedance } from './source';

const inductive = impedanceCurve({ frequency_Hz: [1e3, 1e5], real_ohm: [0, 0], imaginary_ohm: [10, 1e3] });

describe('reading a curve', () => {
	it('is linear in log |Z| and phase over log f', () => {
		const z = impedanceAt(inductive, 1e4);
		expect(z.re).toBeCloseTo(0, 12);
		expect(z.im).toBeCloseTo(100, 10);
	});
	it('gives back the measured points', () => {
		const points = { frequency_Hz: [1e3, 2e3, 5e3], real_ohm: [1, -2, 3], imaginary_ohm: [-4, 5, -6] };
		const curve = impedanceCurve(points);
		points.frequency_Hz.forEach((f, index) => {
			expect(impedanceAt(curve, f).re).toBeCloseTo(points.real_ohm[index] ?? NaN, 12);
			expect(impedanceAt(curve, f).im).toBeCloseTo(points.imaginary_ohm[index] ?? NaN, 12);
		});
	});
	it('unwraps the phase the short way round', () => {
		const angle = (170 * Math.PI) / 180;
		const curve = impedanceCurve({
			frequency_Hz: [1e3, 4e3],
			real_ohm: [Math.cos(angle), Math.cos(-angle)],
			imaginary_ohm: [Math.sin(angle), Math.sin(-angle)]
		});
		expect(impedanceAt(curve, 2e3).re).toBeCloseTo(-1, 12);
	});
	it.each([999.9, 100000.1, 0, -1, NaN])('refuses %f Hz, where nothing was measured', (f) => {
		expect(covers(inductive, f)).toBe(false);
		expect(() => impedanceAt(inductive, f)).toThrow(OutsideCurveError);
	});
	it('says what it covers', () => {
		expect(covers(inductive, 1e3) && covers(inductive, 1e5)).toBe(true);
		expect(() => impedanceAt(inductive, 1e6)).toThrow('covers 1000 Hz to 100000 Hz, asked for 1000000 Hz');
	});
	it('lists the measured points inside a range', () => {
		const frequency_Hz = [1e3, 2e3, 5e3, 1e4];
		const ones = frequency_Hz.map(() => 1);
		const curve = impedanceCurve({ frequency_Hz, real_ohm: ones, imaginary_ohm: ones });
		expect(measuredBetween(curve, 1.5e3, 6e3)).toEqual([2e3, 5e3]);
	});
});

it.each([
	['nothing', [], [], []],
	['lengths that differ', [1, 2], [1], [1, 1]],
	['a frequency that falls', [2, 1], [1, 1], [0, 0]],
	['a frequency twice', [1, 1], [1, 1], [0, 0]],
	['a frequency of 0', [0, 1], [1, 1], [0, 0]],
	['a short', [1, 2], [1, 0], [0, 0]],
	['a value that is not finite', [1, 2], [1, Infinity], [0, 0]]
])('refuses %s', (_, frequency_Hz, real_ohm, imaginary_ohm) => {
	expect(() => impedanceCurve({ frequency_Hz, real_ohm, imaginary_ohm })).toThrow(RangeError);
});

describe('curves in place of parts', () => {
	const filter: Filter = { inductor: { inductance: 33e-6 }, capacitor: { capacitance: 4.7e-6 } };
	const choice = { capacitance: 470e-9, esr: 0.05, esl: 18e-9 };
	const source = { kind: 'amn-50uH-5ohm', networks: 2 } as const;
	const frequency_Hz = Array.from({ length: 2001 }, (_, index) => 1e5 * 100 ** (index / 2000));
	const curveOf = (impedance: (f: number) => { re: number; im: number }) =>
		impedanceCurve({
			frequency_Hz,
			real_ohm: frequency_Hz.map((f) => impedance(f).re),
			imaginary_ohm: frequency_Hz.map((f) => impedance(f).im)
		});
	const measured: Filter = {
		inductor: { inductance: 1, curve: curveOf((f) => inductorImpedance(filter.inductor, f)) },
		capacitor: { capacitance: 1, curve: curveOf((f) => capacitorImpedance(filter.capacitor, f)) }
	};
	const measuredChoice = { capacitance: 1, curve: curveOf((f) => capacitorImpedance(choice, f)) };
	const measuredSource = { kind: 'measured', curve: curveOf((f) => sourceImpedance(source, f)) } as const;

	it.each([145e3, 290.3e3, 1.7304e6, 9e6])('gain the same at %f Hz', (f) => {
		const expected = benefitAt(filter, sourceImpedance(source, f), choice, f);
		expect(benefitAt(measured, sourceImpedance(measuredSource, f), measuredChoice, f)).toBeCloseTo(
			expected,
			2
		);
	});
	it('gain the same over a range', () => {
		const range = { from: 126e3, to: 500e3 };
		const expected = worstBenefit(filter, source, range, choice);
		const found = worstBenefit(measured, measuredSource, range, measuredChoice);
		expect(found.gain_dB).toBeCloseTo(expected.gain_dB, 2);
		expect(found.inductance).toBeNull();
	});
	it('are not read beyond their ends', () => {
		expect(() => worstBenefit(measured, source, { from: 9e4, to: 2e5 }, choice)).toThrow(OutsideCurveError);
		expect(() => worstBenefit(filter, measuredSource, { from: 2e5, to: 2e7 }, choice)).toThrow(
			OutsideCurveError
		);
		expect(() => worstBenefit(filter, source, { from: 5e6, to: 2e7 }, measuredChoice)).toThrow(
			OutsideCurveError
		);
	});
});
