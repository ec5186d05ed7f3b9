import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatQuantity, formatRkm, type FormatOptions } from './format';
import { parseQuantity } from './parse';
import type { Quantity } from './unit';

const rows: [value: number, quantity: Quantity, options: FormatOptions, text: string][] = [
	[4.7e-6, 'capacitance', {}, '4.7 µF'],
	[3.3e-7, 'capacitance', {}, '330 nF'],
	[0, 'capacitance', {}, '0 F'],
	[0, 'capacitance', { digits: 3 }, '0.00 F'],
	[5e-15, 'capacitance', {}, '0.005 pF'],
	[0.1 + 0.2, 'resistance', {}, '300 mΩ'],
	[1 / 3, 'resistance', {}, '333.333333333 mΩ'],
	[1234.5, 'frequency', { decimalMark: ',' }, '1,2345 kHz'],
	[0.15, 'fraction', {}, '15 %'],
	[1, 'fraction', {}, '100 %'],
	[-13.7, 'gain', {}, '−13.7 dB'],
	[0.05, 'gain', { digits: 1 }, '0.05 dB'],
	[1.15, 'number', {}, '1.15'],
	[1e6, 'number', {}, '1000000'],
	// The mantissa stays under 1000 after rounding.
	[999.6, 'resistance', { digits: 3 }, '1.00 kΩ'],
	[999.4, 'resistance', { digits: 3 }, '999 Ω'],
	[999.96e-9, 'capacitance', { digits: 4 }, '1.000 µF'],
	[470e-9, 'capacitance', { digits: 1 }, '500 nF'],
	// Edges go inward; an edge that float noise moved by 1e-16 stays.
	[252.61e-9, 'capacitance', { digits: 3, round: 'up' }, '253 nF'],
	[252.61e-9, 'capacitance', { digits: 3, round: 'down' }, '252 nF'],
	[252.31e-9, 'capacitance', { digits: 3, round: 'nearest' }, '252 nF'],
	[252.31e-9, 'capacitance', { digits: 3, round: 'up' }, '253 nF'],
	[(2.2e-6 * 0.9) / 5, 'capacitance', { digits: 3, round: 'up' }, '396 nF'],
	[(2.2e-6 * 0.9) / 5, 'capacitance', { digits: 3, round: 'down' }, '396 nF'],
	[999.1e-9, 'capacitance', { digits: 3, round: 'up' }, '1.00 µF'],
	[1.0004e-6, 'capacitance', { digits: 3, round: 'down' }, '1.00 µF'],
	[0.9996, 'resistance', { digits: 3, round: 'down' }, '999 mΩ'],
	[-2.55, 'gain', { digits: 2, round: 'up' }, '−2.5 dB'],
	[-2.55, 'gain', { digits: 2, round: 'down' }, '−2.6 dB']
];

describe('formatQuantity', () => {
	it.each(rows)('writes %d as a %s %j', (value, quantity, options, text) => {
		expect(formatQuantity(value, quantity, options)).toBe(text.replace(' ', '\u00a0'));
	});

	it.each([NaN, Infinity, -Infinity])('refuses %d', (value) => {
		expect(() => formatQuantity(value, 'capacitance')).toThrow(RangeError);
	});

	it.each([0, 18, 2.5])('refuses %d digits', (digits) => {
		expect(() => formatQuantity(1, 'capacitance', { digits })).toThrow(RangeError);
	});

	it('rounds to the side that was asked for, and no further than one step', () => {
		const positive = fc.double({ min: 1e-12, max: 0.1, noNaN: true });
		fc.assert(
			fc.property(positive, fc.integer({ min: 1, max: 6 }), (value, digits) => {
				const read = (round: 'up' | 'down'): number => {
					const parsed = parseQuantity(
						formatQuantity(value, 'capacitance', { digits, round }),
						'capacitance'
					);
					return parsed.ok ? parsed.value : NaN;
				};
				expect(read('up')).toBeGreaterThanOrEqual(value * (1 - 1e-12));
				expect(read('down')).toBeLessThanOrEqual(value * (1 + 1e-12));
				expect(read('up') - read('down')).toBeLessThanOrEqual(value * 10 ** (1 - digits) * 1.001);
			})
		);
	});

	it('keeps the mantissa from 1 to under 1000', () => {
		fc.assert(
			fc.property(
				fc.double({ min: 1e-12, max: 94, noNaN: true }),
				fc.integer({ min: 1, max: 6 }),
				(value, digits) => {
					const mantissa = Number.parseFloat(formatQuantity(value, 'capacitance', { digits }));
					expect(mantissa).toBeGreaterThanOrEqual(1);
					expect(mantissa).toBeLessThan(1000);
				}
			)
		);
	});
});

describe('formatRkm', () => {
	it.each([
		[0.47, 'resistance', 'R47'],
		[4.7, 'resistance', '4R7'],
		[470, 'resistance', '470R'],
		[4700, 'resistance', '4K7'],
		[47300, 'resistance', '47K3'],
		[4.7e6, 'resistance', '4M7'],
		[0.047, 'resistance', '47m'],
		[0.33e-12, 'capacitance', 'p33'],
		[4.7e-9, 'capacitance', '4n7'],
		[470e-9, 'capacitance', '470n'],
		[4.7e-6, 'capacitance', '4µ7'],
		[1.5e-3, 'capacitance', '1m5'],
		[1.5, 'inductance', '1H5']
	] as const)('writes %d as a %s %s', (value, quantity, code) => {
		expect(formatRkm(value, quantity)).toBe(code);
	});

	it('refuses a quantity without a code and a value that is not positive', () => {
		expect(() => formatRkm(1, 'voltage')).toThrow(RangeError);
		expect(() => formatRkm(0, 'resistance')).toThrow(RangeError);
	});
});
