/** The artificial networks against the tables of CISPR 16-1-2, ngspice and a vendor's phase. */
import { describe, expect, it } from 'vitest';
import { magnitude, phase, type Complex } from '$lib/network/complex';
import { sourceImpedance, type NetworkKind } from '$lib/network/source';
import { given, relative } from './check-case';

const degrees = (z: Complex): number => (phase(z) * 180) / Math.PI;
const twoNetworks = { kind: 'amn-50uH-5ohm', networks: 2 } as const;

/**
 * Impedance tables of CISPR 16-1-2: f [kHz], |Z| [Ω], phase [°], ±20 % [Ω]. The rows are recalled, not read in the
 * standard; that each follows from the network's elements to the printed digit is what is tested.
 */
const LOW_TABLE = [
	[9, 5.22, 26.55, 4.18, 6.26],
	[15, 6.22, 38.41, 4.98, 7.46],
	[20, 7.25, 44.97, 5.8, 8.7],
	[25, 8.38, 49.39, 6.7, 10.06],
	[30, 9.56, 52.33, 7.65, 11.47],
	[40, 11.99, 55.43, 9.59, 14.39],
	[50, 14.41, 56.4, 11.53, 17.29],
	[60, 16.77, 56.23, 13.42, 20.12],
	[70, 19.04, 55.4, 15.23, 22.85],
	[80, 21.19, 54.19, 16.95, 25.43],
	[90, 23.22, 52.77, 18.58, 27.86],
	[100, 25.11, 51.22, 20.09, 30.13],
	[150, 32.72, 43.35, 26.18, 39.26]
] as const;
const HIGH_TABLE = [
	[150, 34.29, 46.7, 27.43, 41.15],
	[170, 36.5, 43.11, 29.2, 43.8],
	[200, 39.12, 38.51, 31.3, 46.94],
	[250, 42.18, 32.48, 33.74, 50.62],
	[300, 44.17, 27.95, 35.34, 53],
	[350, 45.52, 24.45, 36.42, 54.62],
	[400, 46.46, 21.7, 37.17, 55.75],
	[500, 47.65, 17.66, 38.12, 57.18],
	[600, 48.33, 14.86, 38.66, 58],
	[700, 48.76, 12.81, 39.01, 58.51],
	[800, 49.04, 11.25, 39.23, 58.85],
	[900, 49.24, 10.03, 39.39, 59.09],
	[1000, 49.38, 9.04, 39.5, 59.26],
	[1200, 49.57, 7.56, 39.66, 59.48],
	[1500, 49.72, 6.06, 39.78, 59.66],
	[2000, 49.84, 4.55, 39.87, 59.81],
	[2500, 49.9, 3.64, 39.92, 59.88],
	[3000, 49.93, 3.04, 39.94, 59.92],
	[4000, 49.96, 2.28, 39.97, 59.95],
	[5000, 49.98, 1.82, 39.98, 59.98],
	[7000, 49.99, 1.3, 39.99, 59.99],
	[10000, 49.99, 0.91, 39.99, 59.99],
	[15000, 50, 0.61, 40, 60],
	[20000, 50, 0.46, 40, 60],
	[30000, 50, 0.3, 40, 60]
] as const;

describe('artificial networks', () => {
	const printed = (kind: NetworkKind, [kHz, size, angle, low, high]: readonly number[]) => {
		const z = sourceImpedance({ kind, networks: 1 }, (kHz ?? NaN) * 1e3);
		// Half a unit of the last printed digit; the rows of 9 kHz (5.2150 Ω) and 500 kHz (47.6445 Ω) round the other way.
		expect(Math.abs(magnitude(z) - (size ?? NaN))).toBeLessThan(0.0056);
		expect(Math.abs(degrees(z) - (angle ?? NaN))).toBeLessThan(0.0056);
		// The limits are ±20 % of the printed magnitude.
		expect(Math.abs(0.8 * (size ?? NaN) - (low ?? NaN))).toBeLessThan(0.0051);
		expect(Math.abs(1.2 * (size ?? NaN) - (high ?? NaN))).toBeLessThan(0.0051);
	};
	it.each(LOW_TABLE)('50 Ω ∥ (50 µH + 5 Ω) at %f kHz', (...row) => {
		printed('amn-50uH-5ohm', row);
	});
	it.each(HIGH_TABLE)('50 Ω ∥ 50 µH at %f kHz', (...row) => {
		printed('amn-50uH', row);
	});

	it.each([
		['an-5uH', 150e3, 4.692, 84.62],
		['an-5uH', 1e6, 26.6, 57.86],
		['an-5uH', 10e6, 49.38, 9.04],
		['amn-5uH-1ohm', 150e3, 4.703, 72.74],
		['amn-5uH-1ohm', 1e6, 26.24, 56.54]
	] as const)('%s at %f Hz', (kind, f, size, angle) => {
		const z = sourceImpedance({ kind, networks: 1 }, f);
		expect(Math.abs(magnitude(z) - size)).toBeLessThan(0.005);
		expect(Math.abs(degrees(z) - angle)).toBeLessThan(0.005);
	});

	it.each(['B-ng9', 'B-ng50'])('agrees with ngspice: %s', (id) => {
		const z = sourceImpedance({ kind: 'amn-50uH-5ohm', networks: 1 }, given(id).number('f_Hz'));
		expect(relative(magnitude(z), given(id).number('Z_ohm'))).toBeLessThan(1e-6);
		expect(relative(degrees(z), given(id).number('phase_deg'))).toBeLessThan(1e-6);
	});

	it('differs by the phase that a vendor quotes between 5 µH and 5 µH + 1 Ω', () => {
		const angle = (kind: NetworkKind) => degrees(sourceImpedance({ kind, networks: 1 }, 150e3));
		const expected = given('B-5u1-phase').number('phase_difference_deg');
		expect(Math.abs(angle('an-5uH') - angle('amn-5uH-1ohm') - expected)).toBeLessThan(0.01);
	});

	it.each([
		[65e3, 35.8],
		[145e3, 64.2],
		[350e3, 89.5]
	])('two in series are not 100 Ω at %f Hz', (f, size) => {
		expect(magnitude(sourceImpedance(twoNetworks, f))).toBeCloseTo(size, 1);
	});
});
