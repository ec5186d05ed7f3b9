import { describe, expect, it } from 'vitest';
import { benefitAt } from './benefit';
import { magnitude } from './complex';
import { nodeAdmittance, transferImpedance, type Filter } from './filter';
import { approximateWorstCapacitance, exactWorstCapacitance } from './resonance';
import { sourceImpedance } from './source';

const filter: Filter = { inductor: { inductance: 33e-6 }, capacitor: { capacitance: 4.7e-6 } };
const f = 145e3;
const network = sourceImpedance({ kind: 'amn-50uH-5ohm', networks: 2 }, f);
const thumb = approximateWorstCapacitance(f, 33e-6, 100e-6);

describe('gain at one frequency', () => {
	// Cx as a multiple of the rule-of-thumb value; dB from ngspice 39.3, 33 µH, 4.7 µF, two 50 µH networks, 145 kHz.
	it.each([
		[0.01, -0.08],
		[0.1, -0.85],
		[0.25, -2.29],
		[0.5, -5.28],
		[0.75, -9.22],
		[1, -12.23],
		[1.25, -9.32],
		[1.5, -5.37],
		[2, -0.05],
		[3, 5.78],
		[4, 9.27],
		[6, 13.69],
		[10, 18.79],
		[20, 25.28]
	])('%f × C0 gains %f dB', (ratio, gain) => {
		const difference = benefitAt(filter, network, { capacitance: ratio * thumb }, f) - gain;
		expect(Math.abs(difference)).toBeLessThan(0.01);
	});

	it('never reports less than the floor', () => {
		const lossless = { re: 0, im: 2 * Math.PI * f * 100e-6 };
		const worst = exactWorstCapacitance(filter, lossless, f);
		const gain = benefitAt(filter, lossless, { capacitance: worst }, f);
		expect(gain).toBeGreaterThanOrEqual(-200);
		expect(gain).toBeLessThan(-180);
	});

	it('is nil on a source without impedance', () => {
		expect(benefitAt(filter, { re: 0, im: 0 }, { capacitance: 1e-6 }, f)).toBe(0);
	});
});

it('gives the line-side voltage of the base case', () => {
	expect(magnitude(transferImpedance(filter, { re: 0, im: 0 }, network, f))).toBeCloseTo(0.17109, 5);
	expect(exactWorstCapacitance(filter, network, f)).toBeCloseTo(48.7e-9, 11);
	expect(nodeAdmittance(filter, network, f).re).toBeGreaterThan(0);
});
