/** Inrush, output impedance and damping against published, recalled and simulated values. */
import { describe, expect, it } from 'vitest';
import { bestDamping } from '$lib/network/damping';
import type { Filter } from '$lib/network/filter';
import { outputPeak } from '$lib/network/peak';
import { jouleIntegral, peakCapacitorVoltage, peakSourceCurrent } from '$lib/network/transient';
import { given, relative } from './check-case';

const baseFilter: Filter = { inductor: { inductance: 33e-6 }, capacitor: { capacitance: 4.7e-6 } };

describe('inrush', () => {
	it.each(['C8-inrush_under', 'C8-inrush_over', 'C8-inrush_cx_only', 'C8-crit'])('%s', (id) => {
		const { number } = given(id);
		const step = { voltage: number('V'), inductance: number('Ls_H'), resistance: number('Rs_ohm') };
		const choice = { capacitance: number('Cx_F') };
		expect(relative(peakSourceCurrent(step, choice, null), number('i_pk_A'))).toBeLessThan(1e-4);
		const key = { 'C8-inrush_cx_only': 'v_pk_Cx_V', 'C8-crit': 'V' }[id] ?? 'v_pk_V';
		expect(relative(peakCapacitorVoltage(step, choice, null), number(key))).toBeLessThan(1e-4);
	});
	it('with the capacitor behind L', () => {
		const { number } = given('C8-inrush_pi_470n_4u7');
		const step = { voltage: number('V'), inductance: number('Ls_H'), resistance: number('Rs_ohm') };
		const of = [step, { capacitance: number('Cx_F') }, baseFilter] as const;
		expect(relative(peakSourceCurrent(...of), number('i_pk_A'))).toBeLessThan(2e-4);
		expect(relative(peakCapacitorVoltage(...of), number('v_pk_Cx_V'))).toBeLessThan(2e-4);
	});
	it.each([
		['C8-inrush_mains-i2t', 1e-9],
		['C8-i2t-ng', 1e-3]
	])('%s', (id, tolerance) => {
		const { number } = given(id);
		const step = { voltage: number('V'), inductance: 1e-4, resistance: number('Rs_ohm') };
		expect(relative(jouleIntegral(step, number('Cx_F')), number('I2t_A2s'))).toBeLessThan(tolerance);
	});
});

describe('output impedance', () => {
	const damping = { resistance: 2.418897156926735, capacitance: 9.4e-6 };
	const damped: Filter = { ...baseFilter, damping };
	const source = (inductanceMax: number) =>
		({ kind: 'impedance', resistance: 0.1, inductanceMin: 0, inductanceMax }) as const;
	// Ls, Cx, peak, where (ngspice 39.3).
	it.each([
		[0, 0, 3.403, 9.18e3],
		[5e-6, 0.94e-6, 3.664, 8.27e3],
		[100e-6, 0, 9.265, 3.82e3],
		[100e-6, 0.47e-6, 9.384, 0],
		[100e-6, 0.94e-6, 9.502, 3.75e3],
		[100e-6, 4.7e-6, 10.39, 3.47e3],
		[500e-6, 0.94e-6, 34.92, 0]
	])('Ls %f H, Cx %f F: %f Ω', (inductance, capacitance, expected, where) => {
		const choice = capacitance > 0 ? { capacitance } : null;
		const peak = outputPeak(damped, choice, source(inductance), { from: 10, to: 145e3 });
		expect(relative(peak.impedance, expected)).toBeLessThan(1e-3);
		if (where > 0) expect(relative(peak.frequency, where)).toBeLessThan(5e-3);
	});
	it.each([
		['C12-zo_noCx_Ls', null],
		['C12-zo_Cx4u7_Ls', { capacitance: 4.7e-6 }]
	])('%s', (id, choice) => {
		const { number } = given(id);
		const peak = outputPeak(damped, choice, source(100e-6), { from: 10, to: 145e3 });
		expect(relative(peak.impedance, number('Zo_pk_ohm'))).toBeLessThan(1e-3);
		expect(relative(peak.frequency, number('f_pk_Hz'))).toBeLessThan(5e-3);
	});
	it.each(['C13-n2', 'C13-n3', 'C13-n4', 'C13-n6'])('%s', (id) => {
		const { number } = given(id);
		const best = bestDamping(1, 1, number('n'));
		expect(relative(best.resistance, number('Rd_over_R0'))).toBeLessThan(1e-9);
		expect(relative(best.peak, number('Zpk_over_R0'))).toBeLessThan(1e-9);
		expect(relative(2 * Math.PI * best.frequency, number('fm_over_f0'))).toBeLessThan(1e-9);
	});
	it.each([
		['C13-book', 0.015],
		['C13-book-ng', 1e-3]
	])('%s', (id, tolerance) => {
		const { number } = given(id);
		const filter: Filter = {
			inductor: { inductance: number('L_H') },
			capacitor: { capacitance: number('C_F') },
			damping: { resistance: number('Rd_ohm'), capacitance: number('Cd_F') }
		};
		const short = { kind: 'impedance', resistance: 0, inductanceMin: 0, inductanceMax: 0 } as const;
		const peak = outputPeak(filter, null, short, { from: 1, to: 1e5 });
		expect(relative(peak.impedance, number('Zpk_ohm'))).toBeLessThan(tolerance);
	});
});
