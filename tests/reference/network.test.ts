/** Resonance, gain and current of the base case (33 µH, 4.7 µF, 145 kHz) against hand-computed and simulated values. */
import { describe, expect, it } from 'vitest';
import { benefitAt } from '$lib/network/benefit';
import { divide, magnitude, parallel } from '$lib/network/complex';
import {
	capacitorImpedance,
	inductorImpedance,
	nodeAdmittance,
	transferImpedance,
	type CapacitorPart,
	type Filter
} from '$lib/network/filter';
import { approximateWorstCapacitance, cornerFrequency, exactWorstCapacitance } from '$lib/network/resonance';
import { capacitorCurrent, injectedShare, overloadBand } from '$lib/network/ripple';
import { sourceImpedance, type SourceModel } from '$lib/network/source';
import { given, relative } from './check-case';

const none = { re: 0, im: 0 };
const baseFilter: Filter = { inductor: { inductance: 33e-6 }, capacitor: { capacitance: 4.7e-6 } };
const twoNetworks: SourceModel = { kind: 'amn-50uH-5ohm', networks: 2 };
const baseZ = sourceImpedance(twoNetworks, 145e3);

describe('lines of the chart', () => {
	it('meet at the corner and its impedance', () => {
		const { number } = given('A1');
		const [L, C] = [number('L_H'), number('C_F')];
		const f = cornerFrequency(L, C);
		expect(relative(f, number('f0_Hz'))).toBeLessThan(1e-9);
		expect(relative(inductorImpedance({ inductance: L }, f).im, number('Z0_ohm'))).toBeLessThan(1e-9);
		expect(relative(-capacitorImpedance({ capacitance: C }, f).im, number('Z0_ohm'))).toBeLessThan(1e-9);
	});
	it('pass through the points of A2 and A3', () => {
		const two = given('A2');
		const part = { capacitance: two.number('C_F') };
		expect(relative(-capacitorImpedance(part, two.number('f_Hz')).im, two.number('X_ohm'))).toBeLessThan(
			1e-9
		);
		const { number } = given('A3');
		const z = inductorImpedance({ inductance: number('L_H') }, number('f_Hz')).im;
		expect(relative(z, number('X_ohm'))).toBeLessThan(1e-9);
	});
});

describe('resonance', () => {
	it('is near the rule of thumb', () => {
		const { number, list } = given('C2-C0');
		const rule = approximateWorstCapacitance(number('f_sw_Hz'), number('L_H'), number('Ls_H'));
		expect(relative(rule, number('C0_F'))).toBeLessThan(1e-9);
		expect(relative(rule / 4, list('forbidden')[0] ?? 0)).toBeLessThan(1e-9);
		expect(exactWorstCapacitance(baseFilter, baseZ, 145e3)).toBeCloseTo(48.7e-9, 11);
	});

	// f/f0, error of the rule of thumb in C0 with an endless source inductance: 1/(1 − (f0/f)²) − 1.
	it.each([
		[2, 0.333],
		[3, 0.125],
		[4, 0.0667],
		[5, 0.0417],
		[6, 0.0286],
		[8, 0.0159],
		[10, 0.0101],
		[20, 0.0025]
	])('at %f times the corner the rule of thumb is off by %f', (ratio, error) => {
		const f = ratio * cornerFrequency(33e-6, 4.7e-6);
		const exact = exactWorstCapacitance(baseFilter, { re: 0, im: 1e12 }, f);
		expect(exact / approximateWorstCapacitance(f, 33e-6, Infinity) - 1).toBeCloseTo(error, 3);
	});

	// Harmonics n = 1 … 7 for C0/4, C0/9 and 4·C0 (ngspice 39.3).
	it.each([
		[1 / 4, [-2.29, -7.5, 1.4, 7.3, 11.0, 13.6, 15.7]],
		[1 / 9, [-0.95, -3.65, -4.94, -1.06, 2.89, 5.8, 8.02]],
		[4, [9.27, 22.7, 29.2, 33.4, 36.3, 38.6, 40.3]]
	])('%f × C0 on the harmonics', (share, gains) => {
		const capacitance = share * approximateWorstCapacitance(145e3, 33e-6, 100e-6);
		gains.forEach((gain, index) => {
			const f = 145e3 * (index + 1);
			const exact = benefitAt(baseFilter, sourceImpedance(twoNetworks, f), { capacitance }, f);
			expect(Math.abs(exact - gain)).toBeLessThan(0.06);
		});
	});

	it('is delivered by the reactance limit alone, or not', () => {
		const { number, list } = given('C3-delivered');
		list('L_H').forEach((inductance, index) => {
			const filter = { ...baseFilter, inductor: { inductance } };
			const gain = benefitAt(filter, baseZ, { capacitance: number('Cx_F') }, number('f_Hz'));
			expect(Math.abs(gain - (list('delta_IL_dB')[index] ?? NaN))).toBeLessThan(1e-6);
		});
		const cx = capacitorImpedance({ capacitance: number('Cx_F') }, 145e3);
		const share = magnitude(divide(parallel(cx, baseZ), baseZ));
		expect(Math.abs(share - number('share_of_IL_in_AMN'))).toBeLessThan(2e-4);
	});
});

describe('current in Cx', () => {
	it('C11-49n', () => {
		const { number } = given('C11-49n');
		const share = capacitorCurrent(baseFilter, baseZ, { capacitance: number('Cx_F') }, number('f_Hz'));
		expect(relative(share, number('I_Cx_A'))).toBeLessThan(1e-6);
	});
	// nF, mA per ampere (ngspice 39.3).
	it.each([
		[12, 2.43],
		[49, 31.2],
		[100, 14.8],
		[220, 10],
		[470, 8.73],
		[1000, 8.23]
	])('%f nF carries %f mA', (nF, mA) => {
		const share = capacitorCurrent(baseFilter, baseZ, { capacitance: nF * 1e-9 }, 145e3);
		expect(relative(share * 1e3, mA)).toBeLessThan(5e-3);
	});
	it('C11-forbid', () => {
		const { number, list } = given('C11-forbid');
		const injected = injectedShare(baseFilter, 145e3);
		expect(relative(injected, number('I_N_A'))).toBeLessThan(1e-9);
		const node = nodeAdmittance(baseFilter, baseZ, 145e3);
		const band = overloadBand(injected, node, number('I_rating_A'), 145e3);
		expect(relative(band?.from ?? 0, list('forbidden')[0] ?? 0)).toBeLessThan(1e-6);
		expect(relative(band?.to ?? 0, list('forbidden')[1] ?? 0)).toBeLessThan(1e-6);
	});
	it('is at its rating on both edges of the band, and over it between', () => {
		const node = nodeAdmittance(baseFilter, baseZ, 145e3);
		const injected = injectedShare(baseFilter, 145e3);
		for (const rating of [0.001, 0.007, injected, 0.0079, 0.012, 0.03]) {
			const band = overloadBand(injected, node, rating, 145e3);
			if (!band) throw new Error('a band was expected');
			const share = (capacitance: number) => capacitorCurrent(baseFilter, baseZ, { capacitance }, 145e3);
			expect(relative(share(band.from), rating)).toBeLessThan(1e-9);
			if (Number.isFinite(band.to)) expect(relative(share(band.to), rating)).toBeLessThan(1e-9);
			expect(share(band.from * 0.99)).toBeLessThan(rating);
			expect(share(Math.sqrt(band.from * Math.min(band.to, 10 * band.from)))).toBeGreaterThan(rating);
		}
		expect(overloadBand(injected, node, 0.04, 145e3)).toBeNull();
	});
});

describe('real capacitors', () => {
	it('turn inductive above their self-resonance', () => {
		const part = { capacitance: 470e-9, esl: 18e-9, esr: 0.012 };
		expect(magnitude(capacitorImpedance(part, 10e6))).toBeCloseTo(1.0972, 4);
		expect(cornerFrequency(18e-9, 470e-9)).toBeCloseTo(1.7304e6, -2);
		const { number } = given('C14-Cmax');
		expect(relative(cornerFrequency(number('ESL_H'), number('Cx_max_F')), number('f_Hz'))).toBeLessThan(1e-9);
	});
	// f [MHz], gain of 470 nF ideal and with 18 nH and 12 mΩ [dB].
	it.each([
		[0.145, 18.5, 18.5],
		[0.435, 37, 37.6],
		[1.45, 51.8, 62.2],
		[3, 58.7, 52.7],
		[10, 69.4, 39.2],
		[30, 78.9, 29.4]
	])('at %f MHz gain %f dB ideal and %f dB real', (MHz, ideal, real) => {
		const z = sourceImpedance(twoNetworks, MHz * 1e6);
		const gain = (part: CapacitorPart) => benefitAt(baseFilter, z, part, MHz * 1e6);
		expect(gain({ capacitance: 470e-9 })).toBeCloseTo(ideal, 0);
		expect(gain({ capacitance: 470e-9, esl: 18e-9, esr: 0.012 })).toBeCloseTo(real, 0);
	});
});

it('gives the receiver half of the line voltage', () => {
	const volts = magnitude(transferImpedance(baseFilter, none, baseZ, 145e3));
	expect(volts).toBeCloseTo(0.17109, 5);
	const level = 20 * Math.log10((volts * 1e-3) / 1e-6);
	expect(level).toBeCloseTo(44.66, 2);
	expect(level - 20 * Math.log10(2)).toBeCloseTo(38.64, 2);
});
