import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatQuantity, formatRkm } from './format';
import { parseQuantity } from './parse';
import type { Quantity } from './unit';

const NB = '\u00a0';

const accepted: [text: string, quantity: Quantity, value: number, reading: string][] = [
	// Prefix and unit, with and without space; every micro and every ohm is the same.
	['2.2 µF', 'capacitance', 2.2e-6, `2.2${NB}µF`],
	['2.2 μF', 'capacitance', 2.2e-6, `2.2${NB}µF`],
	['2.2uF', 'capacitance', 2.2e-6, `2.2${NB}µF`],
	['4,7 µF', 'capacitance', 4.7e-6, `4.7${NB}µF`],
	['4700 n', 'capacitance', 4.7e-6, `4.7${NB}µF`],
	['4 700 n', 'capacitance', 4.7e-6, `4.7${NB}µF`],
	['4\u00a0700\u00a0nF', 'capacitance', 4.7e-6, `4.7${NB}µF`],
	['4\u202f700 pF', 'capacitance', 4.7e-9, `4.7${NB}nF`],
	[' 330 nF ', 'capacitance', 330e-9, `330${NB}nF`],
	['1e-6 F', 'capacitance', 1e-6, `1${NB}µF`],
	['2.200 µF', 'capacitance', 2.2e-6, `2.2${NB}µF`],
	['0,125 µF', 'capacitance', 125e-9, `125${NB}nF`],
	['1.5 mF', 'capacitance', 1.5e-3, `1.5${NB}mF (millifarad)`],
	['1500 mF', 'capacitance', 1.5, `1.5${NB}F`],
	['+33 uH', 'inductance', 33e-6, `33${NB}µH`],
	['50 Ω', 'resistance', 50, `50${NB}Ω`],
	['50 \u2126', 'resistance', 50, `50${NB}Ω`],
	['4.7 kohm', 'resistance', 4700, `4.7${NB}kΩ`],
	['940 kΩ', 'resistance', 940e3, `940${NB}kΩ`],
	['12 mΩ', 'resistance', 0.012, `12${NB}mΩ`],
	['145 kHz', 'frequency', 145e3, `145${NB}kHz`],
	['145k', 'frequency', 145e3, `145${NB}kHz`],
	['1.1 MHz', 'frequency', 1.1e6, `1.1${NB}MHz`],
	['230 V', 'voltage', 230, `230${NB}V`],
	['35 mA', 'current', 0.035, `35${NB}mA`],
	['1.5 kW', 'power', 1500, `1.5${NB}kW`],
	['250 ms', 'time', 0.25, `250${NB}ms`],
	['56 dBµV', 'level', 56, `56${NB}dBµV`],
	['56 dBuV', 'level', 56, `56${NB}dBµV`],
	['6 dB', 'gain', 6, `6${NB}dB`],
	['10 %', 'fraction', 0.1, `10${NB}%`],
	['7.5%', 'fraction', 0.075, `7.5${NB}%`],
	['1.155', 'number', 1.155, '1.155'],
	['1 000', 'number', 1000, '1000'],
	// Letter code: the letter stands for the decimal mark (IEC 60062).
	['4u7', 'capacitance', 4.7e-6, `4.7${NB}µF`],
	['4µ7', 'capacitance', 4.7e-6, `4.7${NB}µF`],
	['4n7', 'capacitance', 4.7e-9, `4.7${NB}nF`],
	['p33', 'capacitance', 0.33e-12, `0.33${NB}pF`],
	['470n', 'capacitance', 470e-9, `470${NB}nF`],
	['1m5', 'capacitance', 1.5e-3, `1.5${NB}mF (millifarad)`],
	['4n7K', 'capacitance', 4.7e-9, `4.7${NB}nF ±10${NB}%`],
	['4n7M', 'capacitance', 4.7e-9, `4.7${NB}nF ±20${NB}%`],
	['4n7F', 'capacitance', 4.7e-9, `4.7${NB}nF`],
	['R47', 'resistance', 0.47, `470${NB}mΩ`],
	['4R7', 'resistance', 4.7, `4.7${NB}Ω`],
	['470R', 'resistance', 470, `470${NB}Ω`],
	['4K7', 'resistance', 4700, `4.7${NB}kΩ`],
	['47K3', 'resistance', 47300, `47.3${NB}kΩ`],
	['2M2', 'resistance', 2.2e6, `2.2${NB}MΩ`],
	['4L7', 'resistance', 4.7e-3, `4.7${NB}mΩ`],
	['4u7', 'inductance', 4.7e-6, `4.7${NB}µH`]
];

const refused: [text: string, quantity: Quantity, says: RegExp][] = [
	['100', 'capacitance', /^Write a unit: 100 µF or 100 nF\?$/],
	['100', 'inductance', /^Write a unit: 100 µH or 100 mH\?$/],
	['1e-6', 'capacitance', /Write a unit/],
	['10', 'fraction', /^Write a unit: 10 %\?$/],
	['1,000', 'capacitance', /two ways: write 1 µF or 1000 µF/],
	['1.000', 'capacitance', /two ways/],
	['1,000 nF', 'capacitance', /^“1,000” can be read in two ways: write 1 nF or 1000 nF\.$/],
	['1,250 nF', 'capacitance', /write 1\.25 nF or 1250 nF/],
	['1,000', 'number', /write 1 or 1000\.$/],
	['1,000.5 nF', 'capacitance', /more than one number/],
	['1 2 nF', 'capacitance', /more than one number/],
	['4 70 nF', 'capacitance', /more than one number/],
	['100 nF', 'inductance', /“nF” is a unit of a capacitance, and this is an inductance: write it as 33 µH/],
	['4R7', 'capacitance', /4\.7 µF/],
	['10 R', 'capacitance', /unit of a resistance/],
	['4.7 M', 'capacitance', /mega or micro/],
	['4.7 MF', 'capacitance', /mega or micro/],
	['4.7 mfd', 'capacitance', /mega or micro/],
	['5 kHz', 'time', /unit of a frequency/],
	['2 m', 'time', /not a unit/],
	['5 V', 'number', /plain number without a unit/],
	['-3 µF', 'capacitance', /must not be below zero/],
	['\u22123 µF', 'capacitance', /must not be below zero/],
	['0 µF', 'capacitance', /must be above zero/],
	['NaN', 'capacitance', /finite number/],
	['Infinity', 'resistance', /finite number/],
	['inf', 'resistance', /finite number/],
	['1e400 F', 'capacitance', /too large/],
	['1e99999999999999999999999 F', 'capacitance', /too large/],
	['1e-400 F', 'capacitance', /too small/],
	['', 'capacitance', /^Enter a value, such as 4\.7 µF\.$/],
	['   ', 'voltage', /Enter a value/],
	['µF', 'capacitance', /Write a number and a unit/],
	['.33 µF', 'capacitance', /digit before the decimal mark/],
	['😀', 'capacitance', /Write a number and a unit/],
	['4.7 😀', 'capacitance', /is not a unit/],
	['4.7 µF\n4.7 µF', 'capacitance', /Write a number/],
	['9'.repeat(10_000), 'capacitance', /at most 64 characters/],
	['4.7 °C', 'capacitance', /is not a unit/],
	['٣ µF', 'capacitance', /Write a number/]
];

describe('parseQuantity', () => {
	it.each(accepted)('reads %j as a %s of %d', (text, quantity, value, reading) => {
		expect(parseQuantity(text, quantity)).toEqual({ ok: true, value, reading });
	});

	it.each(refused)('refuses %j as a %s', (text, quantity, says) => {
		const parsed = parseQuantity(text, quantity);
		expect(parsed).toEqual({ ok: false, detail: expect.stringMatching(says) as string });
	});

	it.each([
		['0 Ω', { zero: true }, 0],
		['-3 Ω', { negative: true }, -3],
		['0 Ω', { negative: true }, 0],
		['-0 Ω', { zero: true }, 0]
	] as const)('reads %j where %j', (text, options, value) => {
		const parsed = parseQuantity(text, 'resistance', options);
		expect(parsed).toMatchObject({ ok: true });
		expect(parsed.ok && Object.is(parsed.value, value)).toBe(true);
	});

	it('never throws and always says something', () => {
		fc.assert(
			fc.property(fc.string({ unit: 'binary', maxLength: 80 }), (text) => {
				const parsed = parseQuantity(text, 'capacitance');
				expect(parsed.ok ? parsed.reading : parsed.detail).not.toBe('');
			})
		);
	});
});

/** Values with up to six digits, over all that worksheets hold. */
const values = fc
	.tuple(fc.integer({ min: 1, max: 999_999 }), fc.integer({ min: -17, max: 3 }))
	.map(([whole, exponent]) => Number(`${String(whole)}e${String(exponent)}`));

const quantities: Quantity[] = [
	'capacitance',
	'inductance',
	'resistance',
	'frequency',
	'voltage',
	'current',
	'power',
	'time',
	'gain',
	'level',
	'fraction',
	'number'
];

describe('parse and format', () => {
	it.each(quantities)('give back a %s', (quantity) => {
		fc.assert(
			fc.property(values, (value) => {
				expect(parseQuantity(formatQuantity(value, quantity), quantity)).toMatchObject({ ok: true, value });
			})
		);
	});

	it.each(['capacitance', 'inductance', 'resistance'] as const)(
		'give back the letter code of a %s',
		(quantity) => {
			fc.assert(
				fc.property(values, (value) => {
					expect(parseQuantity(formatRkm(value, quantity), quantity)).toMatchObject({ ok: true, value });
				})
			);
		}
	);

	it('move the prefix with the scale', () => {
		fc.assert(
			fc.property(fc.integer({ min: 1, max: 999 }), (whole) => {
				const texts = ['pF', 'nF', 'µF', 'mF'].map((unit) => `${String(whole)} ${unit}`);
				const read = texts.map((text) => parseQuantity(text, 'capacitance'));
				expect(read.map((parsed) => parsed.ok && parsed.value)).toEqual([
					Number(`${String(whole)}e-12`),
					Number(`${String(whole)}e-9`),
					Number(`${String(whole)}e-6`),
					Number(`${String(whole)}e-3`)
				]);
			})
		);
	});
});
