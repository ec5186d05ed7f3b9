/** SI prefixes: which each quantity is written with, and how they are read. */
import type { Quantity } from './unit';

/** Power of ten of each prefix that is written. */
export const EXPONENT: Readonly<Record<string, number>> = {
	p: -12,
	n: -9,
	µ: -6,
	m: -3,
	'': 0,
	k: 3,
	M: 6,
	G: 9
};

/** Prefixes of each quantity, rising; quantities without any are written as they are. */
export const PREFIXES: Readonly<Record<Quantity, readonly string[]>> = {
	capacitance: ['p', 'n', 'µ', 'm', ''],
	inductance: ['p', 'n', 'µ', 'm', ''],
	resistance: ['µ', 'm', '', 'k', 'M', 'G'],
	frequency: ['m', '', 'k', 'M', 'G'],
	voltage: ['n', 'µ', 'm', '', 'k', 'M'],
	current: ['p', 'n', 'µ', 'm', '', 'k', 'M'],
	power: ['n', 'µ', 'm', '', 'k', 'M', 'G'],
	time: ['n', 'µ', 'm', ''],
	gain: [''],
	level: [''],
	fraction: [''],
	number: ['']
};

/** Power of ten that a unit carries by itself: 1 % is 10⁻². */
export const unitExponent = (quantity: Quantity): number => (quantity === 'fraction' ? -2 : 0);
