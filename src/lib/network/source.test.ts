import { describe, expect, it } from 'vitest';
import { magnitude } from './complex';
import { asymptoticInductance, sourceImpedance } from './source';

const mains = { kind: 'impedance', resistance: 0.4, inductanceMin: 50e-6, inductanceMax: 800e-6 } as const;

describe('source impedance', () => {
	it('doubles with two networks in series', () => {
		const one = sourceImpedance({ kind: 'amn-50uH', networks: 1 }, 150e3);
		const two = sourceImpedance({ kind: 'amn-50uH', networks: 2 }, 150e3);
		expect(two).toEqual({ re: 2 * one.re, im: 2 * one.im });
		expect(magnitude(one)).toBeCloseTo(34.29, 2);
	});
	it('is Rs + jωLs, at the smallest Ls unless one is named', () => {
		expect(sourceImpedance(mains, 1e5)).toEqual({ re: 0.4, im: 2 * Math.PI * 1e5 * 50e-6 });
		expect(sourceImpedance(mains, 1e5, 800e-6).im).toBe(2 * Math.PI * 1e5 * 800e-6);
		expect(sourceImpedance(mains, 1e5, 0).im).toBe(0);
	});
	it.each([0, -1, NaN])('refuses %f Hz', (f) => {
		expect(() => sourceImpedance(mains, f)).toThrow(RangeError);
	});
});

it.each([
	['amn-50uH-5ohm', 2, 100e-6],
	['amn-50uH', 1, 50e-6],
	['amn-5uH-1ohm', 2, 10e-6],
	['an-5uH', 1, 5e-6]
] as const)('%s, %i in series: as an inductor %f H', (kind, networks, inductance) => {
	expect(asymptoticInductance({ kind, networks })).toBe(inductance);
});
