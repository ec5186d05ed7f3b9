import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import {
	capacitanceLine,
	capacitanceOfFall,
	capacitanceThrough,
	fallOf,
	footOf,
	frequencyAt,
	impedanceAt,
	inductanceLine,
	inductanceThrough,
	riseOf,
	xOf,
	yOf,
	type Plot
} from './plot';

const plot: Plot = {
	x: 36,
	y: 21,
	width: 140,
	height: 140,
	decade: 35,
	frequencyFrom: 1e3,
	frequencyTo: 1e7,
	impedanceFrom: 0.1,
	impedanceTo: 1e3
};

describe('axes', () => {
	it('has decades of one length on both axes', () => {
		expect(xOf(plot, 1e4) - xOf(plot, 1e3)).toBeCloseTo(35, 10);
		expect(yOf(plot, 1) - yOf(plot, 10)).toBeCloseTo(35, 10);
	});

	// 33 µH and 4.7 µF cross at 12.7795 kHz and 2.64978 Ω (computed from f0 = 1/(2π√LC), Z0 = √(L/C)).
	it.each([
		[capacitanceThrough(12.7795e3, 2.64978), 4.7e-6],
		[inductanceThrough(12.7795e3, 2.64978), 33e-6]
	])('gives the part through a point', (found, expected) => {
		expect(Math.abs(found / expected - 1)).toBeLessThan(1e-5);
	});

	it('reads back what it draws', () => {
		const frequency = fc.double({ min: 1e3, max: 1e7, noNaN: true });
		const impedance = fc.double({ min: 0.1, max: 1e3, noNaN: true });
		fc.assert(
			fc.property(frequency, impedance, (f, z) => {
				expect(Math.abs(frequencyAt(plot, xOf(plot, f)) / f - 1)).toBeLessThan(1e-9);
				expect(Math.abs(impedanceAt(plot, yOf(plot, z)) / z - 1)).toBeLessThan(1e-9);
			})
		);
	});
});

describe('lines at 45°', () => {
	const parts = fc.double({ min: -11, max: -3, noNaN: true }).map((exponent) => 10 ** exponent);

	it('lets every C fall and every L rise at exactly 45°', () => {
		fc.assert(
			fc.property(parts, (value) => {
				const falling = capacitanceLine(plot, value);
				const rising = inductanceLine(plot, value);
				if (falling !== null) expect(falling[2] - falling[0]).toBeCloseTo(falling[3] - falling[1], 9);
				if (rising !== null) expect(rising[2] - rising[0]).toBeCloseTo(rising[1] - rising[3], 9);
			})
		);
	});

	it('keeps lines inside the plot and through their own points', () => {
		fc.assert(
			fc.property(parts, (value) => {
				const line = capacitanceLine(plot, value);
				if (line === null) return;
				const [x1, y1, x2, y2] = line;
				for (const [x, y] of [
					[x1, y1],
					[x2, y2]
				] as const) {
					expect(x).toBeGreaterThanOrEqual(plot.x - 1e-9);
					expect(x).toBeLessThanOrEqual(plot.x + plot.width + 1e-9);
					expect(y).toBeGreaterThanOrEqual(plot.y - 1e-9);
					expect(y).toBeLessThanOrEqual(plot.y + plot.height + 1e-9);
					const through = capacitanceThrough(frequencyAt(plot, x), impedanceAt(plot, y));
					expect(Math.abs(through / value - 1)).toBeLessThan(1e-9);
				}
			})
		);
	});

	it('sets C lines one decade apart at D along an axis and D/√2 square to them', () => {
		expect(fallOf(plot, 1e-6) - fallOf(plot, 1e-7)).toBeCloseTo(35, 10);
		expect((fallOf(plot, 1e-6) - fallOf(plot, 1e-7)) / Math.SQRT2).toBeCloseTo(24.749, 3);
		expect(riseOf(plot, 1e-6) - riseOf(plot, 1e-5)).toBeCloseTo(35, 10);
	});

	it('needs a factor of k² in C for a factor of k in frequency', () => {
		// An octave is 0.30103 decades; its square 0.60206 decades of C.
		const octave = xOf(plot, 2e5) - xOf(plot, 1e5);
		expect(octave).toBeCloseTo(0.30103 * 35, 4);
		expect(fallOf(plot, 4e-9) - fallOf(plot, 1e-9)).toBeCloseTo(2 * octave, 9);
	});

	it('leads every C line to the foot where 1/(2π f C) is the lowest impedance', () => {
		const x = footOf(plot, 330e-9);
		expect(capacitanceThrough(frequencyAt(plot, x), plot.impedanceFrom)).toBeCloseTo(330e-9, 15);
		expect(capacitanceOfFall(plot, plot.y + plot.height - x)).toBeCloseTo(330e-9, 15);
	});
});
