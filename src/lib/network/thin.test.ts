import { describe, expect, it } from 'vitest';
import { impedanceAt, impedanceCurve } from './curve';
import type { MeasuredPoint } from './measurement';
import { thin } from './thin';

const sweep = (count: number, of: (omega: number) => { re: number; im: number }): MeasuredPoint[] =>
	Array.from({ length: count }, (_, n) => {
		const frequency = 1e3 * 1e5 ** (n / (count - 1));
		return { frequency, impedance: of(2 * Math.PI * frequency) };
	});
const capacitor = sweep(20_000, (w) => ({ re: 0.012, im: w * 18e-9 - 1 / (w * 470e-9) }));

describe('thin', () => {
	it('keeps the ends alone of a straight line', () => {
		const ideal = sweep(500, (w) => ({ re: 0, im: -1 / (w * 1e-6) }));
		expect(thin(ideal, 100).points).toHaveLength(2);
	});
	it('leaves a curve alone that is short enough', () => {
		expect(thin(capacitor, 20_000)).toEqual({ points: capacitor, deviation: 0 });
	});
	it('keeps measured points in order, and says truly how far it departs', () => {
		const { points, deviation } = thin(capacitor, 400);
		expect(points).toHaveLength(400);
		expect(points.every((point) => capacitor.includes(point))).toBe(true);
		const curve = impedanceCurve({
			frequency_Hz: points.map(({ frequency }) => frequency),
			real_ohm: points.map(({ impedance }) => impedance.re),
			imaginary_ohm: points.map(({ impedance }) => impedance.im)
		});
		const worst = Math.max(
			...capacitor.map(({ frequency, impedance }) => {
				const read = impedanceAt(curve, frequency);
				return (
					Math.hypot(read.re - impedance.re, read.im - impedance.im) / Math.hypot(impedance.re, impedance.im)
				);
			})
		);
		expect(deviation).toBeLessThan(1e-3);
		expect(worst / deviation).toBeCloseTo(1, 2);
	});
	it('refuses to keep fewer than two', () => {
		expect(() => thin(capacitor, 1)).toThrow(RangeError);
	});
});
