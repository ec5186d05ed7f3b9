/** Transients and the output impedance that rules rely on, against simulated circuits. */
import { describe, expect, it } from 'vitest';
import { avionicsConverter } from '$lib/design/examples';
import { outputPeak } from '$lib/network/peak';
import { peakSourceCurrent } from '$lib/network/transient';
import { dampingRatio, limitingCapacitance, peakCurrent, peakVoltage } from '$lib/rules/series-circuit';
import { findingOf } from '$lib/rules/table';
import { valuesOf } from './check-cases';

const expectNear = (actual: number | null | undefined, expected: number | undefined, rel: number): void => {
	expect(Math.abs((actual ?? NaN) / (expected ?? NaN) - 1)).toBeLessThanOrEqual(rel);
};

describe('step into a series circuit', () => {
	it.each(['C8-inrush_under', 'C8-inrush_over'])('%s against ngspice', (id) => {
		const [voltage = 0, inductance = 0, resistance = 0, capacitance = 0, current, peak, zeta] = valuesOf(id, [
			'V',
			'Ls_H',
			'Rs_ohm',
			'Cx_F',
			'i_pk_A',
			'v_pk_V',
			'zeta'
		]);
		const circuit = { voltage, inductance, resistance, capacitance };
		expectNear(peakCurrent(circuit), current, 1e-4);
		expectNear(peakVoltage(circuit), peak, 1e-4);
		expectNear(dampingRatio(circuit), zeta, 1e-9);
	});

	it('C8-crit: V/(e·Z0) at critical damping', () => {
		const [voltage = 0, inductance = 0, resistance = 0, capacitance = 0, current] = valuesOf('C8-crit', [
			'V',
			'Ls_H',
			'Rs_ohm',
			'Cx_F',
			'i_pk_A'
		]);
		expectNear(peakCurrent({ voltage, inductance, resistance, capacitance }), current, 1e-9);
	});

	it('C8-inrush_cx_only: closed form', () => {
		const [voltage = 0, inductance = 0, resistance = 0, capacitance = 0, current, peak] = valuesOf(
			'C8-inrush_cx_only',
			['V', 'Ls_H', 'Rs_ohm', 'Cx_F', 'i_pk_A', 'v_pk_Cx_V']
		);
		const circuit = { voltage, inductance, resistance, capacitance };
		expectNear(peakCurrent(circuit), current, 1e-4);
		expectNear(peakVoltage(circuit), peak, 1e-4);
		expectNear(limitingCapacitance(circuit, peakCurrent(circuit)), capacitance, 1e-9);
	});

	it('C8-inrush_pi_470n_4u7: with the capacitor behind L', () => {
		const [voltage = 0, inductance = 0, resistance = 0, coil = 0, cx = 0, c = 0, current] = valuesOf(
			'C8-inrush_pi_470n_4u7',
			['V', 'Ls_H', 'Rs_ohm', 'L_H', 'Cx_F', 'C_F', 'i_pk_A']
		);
		const filter = { inductor: { inductance: coil }, capacitor: { capacitance: c } };
		expectNear(
			peakSourceCurrent({ voltage, inductance, resistance }, { capacitance: cx }, filter),
			current,
			2e-4
		);
	});
});

describe('peak of the output impedance', () => {
	it.each([
		['C12-zo_noCx_Ls', 1e-4, 1e-13],
		['C12-zo_Cx4u7_Ls', 1e-4, 4.7e-6]
	])('%s against ngspice', (id, inductance, cx) => {
		const [coil = 0, c = 0, cd = 0, rd = 0, resistance = 0, peak] = valuesOf(id, [
			'L_H',
			'C_F',
			'Cd_F',
			'Rd_ohm',
			'Rs_ohm',
			'Zo_pk_ohm'
		]);
		const filter = {
			inductor: { inductance: coil },
			capacitor: { capacitance: c },
			damping: { resistance: rd, capacitance: cd }
		};
		const source = {
			kind: 'impedance',
			resistance,
			inductanceMin: inductance,
			inductanceMax: inductance
		} as const;
		const found = outputPeak(filter, { capacitance: cx }, source, { from: 10, to: 145e3 }).impedance;
		expectNear(found, peak, 1e-5);
	});

	it('C12-mb: 18 V and 60 W with a margin of two ask for 2.7 Ω', () => {
		const load = { power_W: 60, voltageMin_V: 18 };
		const inductor = { inductance_H: 33e-6, toleranceMinus: 0, tolerancePlus: 0 };
		const capacitor = { capacitance_F: 4.7e-6, toleranceMinus: 0, tolerancePlus: 0 };
		const supply = { kind: 'dc', voltage_V: 28, voltageMax_V: 32 } as const;
		const sources = [
			{
				id: 'bus',
				label: 'Bus',
				kind: 'impedance',
				inductanceMin_H: 1e-4,
				inductanceMax_H: 1e-4,
				resistance_ohm: 0.1
			}
		] as const;
		const rule = { id: 'r', kind: 'input-stability', class: 'design', source: 'bus', margin: 2 } as const;
		const finding = findingOf({ ...avionicsConverter, inductor, capacitor, supply, load, sources }, rule);
		const limit = valuesOf('C12-mb', ['limit_6dB_ohm'])[0];
		const printed = finding.formula?.numbers.find(
			(part) => part.type === 'quantity' && part.quantity === 'resistance'
		);
		expectNear(printed?.type === 'quantity' ? printed.value : null, limit, 1e-9);
		expect(finding.bands).toMatchObject([{ from: 0, to: Infinity }]);
	});
});
