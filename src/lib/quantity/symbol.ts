/** Unit and prefix as people spell them. */
import { PREFIXES } from './prefix';
import type { Quantity } from './unit';

/** Spellings of each unit beside its symbol. */
export const UNITS: Readonly<Record<Quantity, readonly string[]>> = {
	capacitance: ['F'],
	inductance: ['H'],
	resistance: ['Ω', 'ohm', 'Ohm', 'ohms', 'R'],
	frequency: ['Hz', 'hz', 'HZ'],
	voltage: ['V'],
	current: ['A'],
	power: ['W'],
	time: ['s'],
	gain: ['dB', 'db'],
	level: ['dBµV', 'dBuV'],
	fraction: ['%'],
	number: ['']
};

const PREFIX_SPELLINGS: Readonly<Record<string, string>> = { u: 'µ', K: 'k' };

/** No prefix alone says enough here; "2 m" could as well be two minutes. */
const NEEDS_UNIT: readonly Quantity[] = ['time', 'gain', 'level', 'fraction'];

/**
 * Takes a symbol apart into prefix and unit, of which one may be missing.
 * @param symbol what follows the number
 * @param quantity what it is a value of
 * @returns the prefix as it is written and the unit as it was spelled, or null where it is no symbol of the quantity
 * @example splitUnit('uF', 'capacitance') // { prefix: 'µ', unit: 'F' }
 * Source: ISO 80000-1 (recalled); u for µ is common practice.
 */
export function splitUnit(symbol: string, quantity: Quantity): { prefix: string; unit: string } | null {
	const candidates = NEEDS_UNIT.includes(quantity) ? UNITS[quantity] : [...UNITS[quantity], ''];
	for (const unit of candidates) {
		if (!symbol.endsWith(unit)) continue;
		const spelled = symbol.slice(0, symbol.length - unit.length).trimEnd();
		const prefix = PREFIX_SPELLINGS[spelled] ?? spelled;
		if (PREFIXES[quantity].includes(prefix) && prefix + unit !== '') return { prefix, unit };
	}
	return symbol === '' && quantity === 'number' ? { prefix: '', unit: '' } : null;
}

/**
 * Names the quantity that a symbol belongs to.
 * @param symbol what follows the number
 * @returns the first quantity with such a unit, or undefined
 * @example ownerOf('nF') // 'capacitance'
 */
export function ownerOf(symbol: string): Quantity | undefined {
	const quantities = Object.keys(UNITS) as Quantity[];
	return quantities.find((quantity) => (splitUnit(symbol, quantity)?.unit ?? '') !== '');
}
