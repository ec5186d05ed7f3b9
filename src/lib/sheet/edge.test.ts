import { describe, expect, it } from 'vitest';
import { fixed, formatEdge, joinRange, shortRange } from './edge';

const S = '\u00a0';

describe('formatEdge', () => {
	it.each([
		[2.52626e-7, 'up', '.', `252.7${S}nF`, 'a lower edge rounds up'],
		[2.52626e-7, 'down', '.', `252.6${S}nF`, 'an upper edge rounds down'],
		[3.96e-7, 'down', '.', `396${S}nF`, 'trailing zeros say nothing'],
		[1.1915e-6, 'down', ',', `1,191${S}µF`, 'decimal comma'],
		[9.99996e-7, 'up', '.', `1${S}µF`, 'rounding may reach the next prefix'],
		[1e-6, 'up', '.', `1${S}µF`, 'an exact value stays']
	] as const)('%d %s %s → %s (%s)', (value, round, mark, expected, _why) => {
		expect(formatEdge(value, round, mark)).toBe(expected);
	});
});

describe('ranges', () => {
	it.each([
		[`4.64${S}nF`, `97.9${S}nF`, `4.64${S}… 97.9${S}nF`],
		[`190${S}nF`, `4.45${S}µF`, `190${S}nF${S}… 4.45${S}µF`],
		[`50${S}Hz`, `50${S}Hz`, `50${S}Hz`]
	])('joins %s and %s', (from, to, expected) => {
		expect(joinRange(from, to)).toBe(expected);
	});

	it.each([
		[4.639e-9, 9.795e-8, '.', `4.63${S}… 98${S}nF`],
		[1.9031e-7, 4.4534e-6, '.', `0.19${S}… 4.46${S}µF`],
		[1.9031e-7, 4.4534e-6, ',', `0,19${S}… 4,46${S}µF`],
		[1e-9, 1e-4, '.', `1${S}nF${S}… 100${S}µF`]
	] as const)('writes the forbidden %d … %d short and rounded outward', (from, to, mark, expected) => {
		expect(shortRange(from, to, mark)).toBe(expected);
	});
});

describe('fixed', () => {
	it.each([
		[-13.66, 1, ',', false, '\u221213,7'],
		[21.84, 1, '.', true, '+21.8'],
		[-0.04, 1, '.', true, '0.0'],
		[0, 2, ',', true, '0,00']
	] as const)('%d', (value, decimals, mark, sign, expected) => {
		expect(fixed(value, decimals, mark, sign)).toBe(expected);
	});
});
