import { describe, expect, it } from 'vitest';
import { bestDamping, dampingRatioFor, proposeDamping } from './damping';
import type { Filter } from './filter';
import { outputPeak, peakBetween } from './peak';

const L = 33e-6;
const C = 4.7e-6;
const size = Math.sqrt(L / C);
const corner = 1 / (2 * Math.PI * Math.sqrt(L * C));
const plain: Filter = { inductor: { inductance: L }, capacitor: { capacitance: C } };
const source = (inductance: number, resistance = 0.1) =>
	({ kind: 'impedance', inductanceMin: 0, inductanceMax: inductance, resistance }) as const;
const range = { from: 10, to: 145e3 };

describe('best damping of L and C', () => {
	// n, Rd/R0, peak/R0, f/f0: from the textbook's formulas as recalled.
	it.each([
		[0.5, 2.4721, 4.4721, 0.8944],
		[1, 1.4491, 2.4495, 0.8165],
		[1.5, 1.0964, 1.7638, 0.7559],
		[2, 0.9129, 1.4142, 0.7071],
		[2.5, 0.7981, 1.2, 0.6667],
		[3, 0.7182, 1.0541, 0.6325],
		[4, 0.6124, 0.866, 0.5774],
		[6, 0.4944, 0.6667, 0.5],
		[8, 0.427, 0.559, 0.4472],
		[10, 0.3817, 0.4899, 0.4082]
	])('n = %f', (n, resistance, peak, frequency) => {
		const best = bestDamping(L, C, n);
		expect(best.resistance / size).toBeCloseTo(resistance, 4);
		expect(best.peak / size).toBeCloseTo(peak, 4);
		expect(best.frequency / corner).toBeCloseTo(frequency, 4);
		expect(dampingRatioFor(L, C, best.peak)).toBeCloseTo(n, 9);
		const damped = (by: number) => ({
			...plain,
			damping: { resistance: by * best.resistance, capacitance: best.capacitance }
		});
		const exact = outputPeak(damped(1), null, source(0, 0), range);
		expect(exact.impedance / best.peak).toBeCloseTo(1, 4);
		expect(exact.frequency / best.frequency).toBeCloseTo(1, 2);
		for (const by of [0.9, 1.1])
			expect(outputPeak(damped(by), null, source(0, 0), range).impedance).toBeGreaterThan(exact.impedance);
	});
});

it('proposes damping for L alone and with the source', () => {
	const setting = { choice: null, source: source(100e-6), range };
	const alone = proposeDamping(plain, 2, { ...setting, sourceInductance: 0 });
	expect(alone.after.impedance).toBeCloseTo(9.265, 2);
	const both = proposeDamping(plain, 2, { ...setting, sourceInductance: 100e-6 });
	expect(both.resistance).toBeCloseTo(4.856, 2);
	expect(both.after.impedance).toBeLessThan(alone.after.impedance);
	expect(both.before.impedance).toBeGreaterThan(10 * both.after.impedance);
});

describe('peak of an impedance', () => {
	it('is found at the natural frequency when far narrower than the grid', () => {
		const { impedance, frequency } = outputPeak(plain, null, source(0, 1e-6), range);
		expect(frequency / corner).toBeCloseTo(1, 9);
		// Q = R0/R, peak R0·Q.
		expect(impedance / (size ** 2 / 1e-6)).toBeCloseTo(1, 3);
	});

	it('is the end of the range where the impedance only rises', () => {
		expect(peakBetween((f) => f, { from: 10, to: 1e3 }, [])).toEqual({ impedance: 1e3, frequency: 1e3 });
	});

	it('refuses an empty range', () => {
		expect(() => peakBetween((f) => f, { from: 10, to: 1 }, [])).toThrow(RangeError);
	});
});
