import { describe, expect, it } from 'vitest';
import { CISPR_32_A, CISPR_32_B, limitAt, limitThrough, type Detector, type LimitLine } from './limit-line';

// Corner values: public course page for EN 55022; 290 kHz: the logarithmic slope computed from them.
describe('limitAt', () => {
	it.each<[string, LimitLine, Detector, number, number | null]>([
		['A', CISPR_32_A, 'quasi-peak', 150e3, 79],
		['A', CISPR_32_A, 'average', 499e3, 66],
		['A, transition', CISPR_32_A, 'quasi-peak', 500e3, 73],
		['A', CISPR_32_A, 'average', 30e6, 60],
		['B', CISPR_32_B, 'quasi-peak', 150e3, 66],
		['B', CISPR_32_B, 'quasi-peak', 290e3, 60.524],
		['B', CISPR_32_B, 'average', 290e3, 50.524],
		['B, transition', CISPR_32_B, 'quasi-peak', 500e3, 56],
		['B, transition', CISPR_32_B, 'quasi-peak', 5e6, 56],
		['B', CISPR_32_B, 'average', 5.1e6, 50],
		['below the band', CISPR_32_B, 'average', 149e3, null],
		['above the band', CISPR_32_B, 'average', 30.1e6, null]
	])('%s %#', (_, line, detector, frequency, level) => {
		const got = limitAt(line, detector, frequency);
		if (level === null) expect(got).toBeNull();
		else expect(got).toBeCloseTo(level, 3);
	});
	it('refuses a frequency that is none', () => {
		expect(() => limitAt(CISPR_32_B, 'average', 0)).toThrow(/frequency must be > 0 Hz/);
	});
});

describe('limitThrough', () => {
	it('joins the points of a table straight against log f', () => {
		const line = limitThrough([
			{ frequency: 1e4, quasiPeak: 80, average: 70 },
			{ frequency: 1e6, quasiPeak: 60, average: 40 }
		]);
		expect(limitAt(line, 'quasi-peak', 1e5)).toBeCloseTo(70, 9);
		expect(limitAt(line, 'average', 1e5)).toBeCloseTo(55, 9);
		expect(limitAt(line, 'average', 2e6)).toBeNull();
	});
	it('takes a single point and refuses none or a falling frequency', () => {
		expect(limitAt(limitThrough([{ frequency: 1e5, quasiPeak: 60, average: 50 }]), 'average', 1e5)).toBe(50);
		expect(() => limitThrough([])).toThrow(/at least one point/);
		const falling = [2e5, 1e5].map((frequency) => ({ frequency, quasiPeak: 1, average: 1 }));
		expect(() => limitThrough(falling)).toThrow(/must increase/);
	});
});
