import { expect, it } from 'vitest';
import { benefitFinder } from './benefit';
import { benefitCurve } from './benefit-curve';
import type { Filter } from './filter';
import { exactWorstCapacitance } from './resonance';
import { sourceImpedance } from './source';

const filter: Filter = { inductor: { inductance: 33e-6 }, capacitor: { capacitance: 4.7e-6 } };
const network = { kind: 'amn-50uH-5ohm', networks: 2 } as const;
const values = Array.from({ length: 61 }, (_, index) => 1e-9 * 10 ** (index / 20));

it('breaks even at twice the worst value and is deepest at it', () => {
	const curve = benefitCurve(benefitFinder(filter, network, { from: 145e3, to: 145e3 }), values);
	const worst = exactWorstCapacitance(filter, sourceImpedance(network, 145e3), 145e3);
	expect(curve.points).toHaveLength(61);
	expect(curve.breakEven).toHaveLength(1);
	expect((curve.breakEven[0] ?? 0) / (2 * worst)).toBeCloseTo(1, 9);
	// Deepest in decibels is where |Y_p + jωCx| is least.
	expect((curve.worst[0]?.capacitance ?? 0) / worst).toBeCloseTo(1, 3);
	expect(curve.worst[0]?.gain_dB).toBeCloseTo(-12.232, 3);
});

it('gains nothing from more capacitance above the self-resonance', () => {
	const finder = benefitFinder(filter, network, { from: 10e6, to: 10e6 });
	const real = benefitCurve(finder, [1e-7, 1e-6], { esl: 18e-9, esr: 0.012 }).points;
	expect(Math.abs((real[1]?.gain_dB ?? 0) - (real[0]?.gain_dB ?? 9))).toBeLessThan(1.5);
});

it('has no valley where there is none', () => {
	const finder = benefitFinder(filter, network, { from: 145e3, to: 145e3 });
	expect(benefitCurve(finder, [1e-6, 2e-6, 4e-6])).toMatchObject({ breakEven: [], worst: [] });
});
