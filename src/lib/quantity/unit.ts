/** The kinds of value that a worksheet holds. */
export type Quantity =
	| 'capacitance'
	| 'inductance'
	| 'resistance'
	| 'frequency'
	| 'voltage'
	| 'current'
	| 'power'
	| 'time'
	| 'gain'
	| 'level'
	| 'fraction'
	| 'number';

/** Unit symbol of each; a fraction is written in per cent, a plain number has none. */
export const UNIT: Readonly<Record<Quantity, string>> = {
	capacitance: 'F',
	inductance: 'H',
	resistance: 'Ω',
	frequency: 'Hz',
	voltage: 'V',
	current: 'A',
	power: 'W',
	time: 's',
	gain: 'dB',
	level: 'dBµV',
	fraction: '%',
	number: ''
};
