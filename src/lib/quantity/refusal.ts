/** The sentences that say what to enter instead. */
import { ownerOf } from './symbol';
import type { Quantity } from './unit';

/** A value as it could stand in each field, for the sentences that say what to enter. */
export const EXAMPLE: Readonly<Record<Quantity, string>> = {
	capacitance: '4.7 µF',
	inductance: '33 µH',
	resistance: '50 Ω',
	frequency: '145 kHz',
	voltage: '230 V',
	current: '35 mA',
	power: '45 W',
	time: '2 s',
	gain: '6 dB',
	level: '56 dBµV',
	fraction: '10 %',
	number: '5'
};

/** What a quantity is called in a sentence. */
const NAME: Readonly<Record<Quantity, string>> = {
	capacitance: 'a capacitance',
	inductance: 'an inductance',
	resistance: 'a resistance',
	frequency: 'a frequency',
	voltage: 'a voltage',
	current: 'a current',
	power: 'a power',
	time: 'a time',
	gain: 'a gain',
	level: 'an emission level',
	fraction: 'a share',
	number: 'a plain number'
};

export interface Refusal {
	readonly ok: false;
	readonly detail: string;
}

/** @returns the refusal with its sentence */
export const refuse = (detail: string): Refusal => ({ ok: false, detail });

/** @returns the refusal of a number that countries read differently, such as "1,000" */
export function refuseAmbiguous(number: string, symbol: string, quantity: Quantity): Refusal {
	const [whole = '', places = ''] = number.split(/[.,]/);
	const fraction = places.replace(/0+$/, '');
	const unit = symbol === '' ? EXAMPLE[quantity].replace(/^\d+(\.\d+)?/, '') : ` ${symbol}`;
	const readings = [fraction === '' ? whole : `${whole}.${fraction}`, whole + places];
	const [one, other] = readings.map((reading) => reading + unit);
	return refuse(`“${number}” can be read in two ways: write ${one ?? ''} or ${other ?? ''}.`);
}

/** @returns the refusal of a symbol that does not belong to the quantity */
export function refuseSymbol(symbol: string, quantity: Quantity): Refusal {
	const example = EXAMPLE[quantity];
	if (quantity === 'number') return refuse(`Write a plain number without a unit, such as ${example}.`);
	if (quantity === 'capacitance' && /^(M|MF|mfd|MFD)$/.test(symbol)) {
		return refuse(`“${symbol}” could be mega or micro: write µF for microfarad, such as ${example}.`);
	}
	const owner = ownerOf(symbol);
	const wrong =
		owner === undefined
			? `“${symbol}” is not a unit of ${NAME[quantity]}`
			: `“${symbol}” is a unit of ${NAME[owner]}, and this is ${NAME[quantity]}`;
	return refuse(`${wrong}: write it as ${example}.`);
}

/** Two spellings to choose from where a unit is missing. */
const UNITS_TO_OFFER: Readonly<Record<Quantity, readonly string[]>> = {
	capacitance: ['µF', 'nF'],
	inductance: ['µH', 'mH'],
	resistance: ['Ω', 'kΩ'],
	frequency: ['kHz', 'Hz'],
	voltage: ['V', 'mV'],
	current: ['A', 'mA'],
	power: ['W', 'mW'],
	time: ['s', 'ms'],
	gain: ['dB'],
	level: ['dBµV'],
	fraction: ['%'],
	number: []
};

/** @returns the refusal of a number whose unit is missing */
export function refuseBare(number: string, quantity: Quantity): Refusal {
	const shown = number.replace(',', '.');
	const offers = UNITS_TO_OFFER[quantity].map((unit) => `${shown} ${unit}`);
	return refuse(`Write a unit: ${offers.join(' or ')}?`);
}

/** @returns the refusal of text that does not start as a number */
export function refuseText(text: string, quantity: Quantity): Refusal {
	const example = EXAMPLE[quantity];
	if (/^-?[.,]\d/.test(text)) {
		return refuse(`Write a digit before the decimal mark, such as 0.5: a value such as ${example}.`);
	}
	if (/^-?(nan|inf|infinity|∞)/i.test(text)) return refuse(`Write a finite number, such as ${example}.`);
	return refuse(`Write a number${quantity === 'number' ? '' : ' and a unit'}, such as ${example}.`);
}

/** @returns the refusal of a value that is read well but is out of bounds */
export function refuseValue(reason: string, quantity: Quantity): Refusal {
	return refuse(`The value ${reason}: write it as ${EXAMPLE[quantity]}.`);
}
