import { describe, expect, it } from 'vitest';
import type { Design } from '$lib/design/design';
import { emissionOf, receiverLevel } from './emission';

const design: Design = {
	format: 'herringbone-design',
	formatVersion: 1,
	title: 'Level',
	supply: { kind: 'dc', voltage_V: 48, voltageMax_V: 60 },
	switching: [
		{
			id: 'a',
			label: 'A',
			frequencyMin_Hz: 145e3,
			frequencyMax_Hz: 145e3,
			harmonics: 3,
			current_A: [1e-3, 1e-3, 0]
		},
		{ id: 'b', label: 'B', frequencyMin_Hz: 65e3, frequencyMax_Hz: 65e3, harmonics: 3 }
	],
	inductor: { inductance_H: 33e-6, toleranceMinus: 0, tolerancePlus: 0 },
	capacitor: { capacitance_F: 4.7e-6, toleranceMinus: 0, tolerancePlus: 0 },
	sources: [
		{ id: 'amn', label: 'Test network', kind: 'amn-50uH-5ohm', networks: 2 },
		{
			id: 'mains',
			label: 'Mains',
			kind: 'impedance',
			inductanceMin_H: 1e-5,
			inductanceMax_H: 1e-4,
			resistance_ohm: 0.4
		}
	],
	choice: { capacitance_F: 1.9422357834368784e-7, toleranceMinus: 0, tolerancePlus: 0, series: 'E6' },
	rules: [],
	emission: { limit: 'cispr-32-b', margin_dB: 6 }
};

describe('emissionOf', () => {
	const emission = emissionOf(design);
	const at = (harmonic: number) => emission?.lines.find((line) => line.harmonic === harmonic);
	// ngspice: 0.17109 V/A without Cx, 0.058837101734 V/A with 4·C0; half of it at each port.
	it('gives the level at the receiver with and without Cx', () => {
		expect(at(1)?.levelWithout).toBeCloseTo(38.644, 2);
		expect(at(1)?.levelWith).toBeCloseTo(20 * Math.log10((1e-3 * 0.058837101734) / 2 / 1e-6), 3);
	});
	it('asks for nothing below the band and for level − limit + margin inside', () => {
		expect(at(1)).toMatchObject({ required_dB: null, reserve_dB: null });
		const second = at(2);
		// 290 kHz, class B: 50.524 dBµV average.
		expect(second?.limit.average).toBeCloseTo(50.524, 3);
		expect(second?.required_dB).toBeCloseTo((second?.levelWithout ?? 0) - 50.524 + 6, 3);
		expect(second?.reserve_dB).toBeCloseTo(50.524 - 6 - (second?.levelWith ?? 0), 3);
	});
	it('names the first harmonic in the band and what it leaves out', () => {
		expect(emission?.firstInBand).toEqual([
			{ switching: 'a', harmonic: 2 },
			{ switching: 'b', harmonic: 3 }
		]);
		expect(emission?.lines).toHaveLength(2);
		expect(emission?.remarks.join(' ')).toMatch(/No level for B.*No level on Mains/);
	});
	it('says nothing where no limit is asked for', () => {
		const { emission: _, ...silent } = design;
		expect(emissionOf(silent)).toBeNull();
	});
	it('takes the tighter limit of a line that straddles a step', () => {
		const [first] = design.switching;
		if (!first) throw new Error('no switching');
		const wide = { ...first, frequencyMin_Hz: 240e3, frequencyMax_Hz: 260e3 };
		const lines = emissionOf({ ...design, switching: [wide] })?.lines ?? [];
		expect(lines[1]?.limit['quasi-peak']).toBe(56);
	});
});

describe('receiverLevel', () => {
	it('is 44.66 dBµV for 1 mA over 0.17109 V/A in the loop', () => {
		expect(receiverLevel(1e-3, { re: 0.17109, im: 0 }, 1)).toBeCloseTo(44.66, 2);
	});
});
