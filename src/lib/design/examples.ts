/** Three worked designs of invented companies: the demo, the examples to start from, and the scenarios of the tests. */
import type { Design } from './design';

const tenPercent = { toleranceMinus: 0.1, tolerancePlus: 0.1 } as const;

/** Elverholm Ladeteknikk (invented): 45 W auxiliary supply of an onboard charger. */
export const chargerAuxiliary: Design = {
	format: 'herringbone-design',
	formatVersion: 1,
	title: 'Charger auxiliary supply',
	supply: { kind: 'ac', voltage_V: 230, voltageMax_V: 253, frequency_Hz: 50, frequencyMax_Hz: 50 },
	switching: [
		{
			id: 'flyback',
			label: 'Flyback, dithered',
			frequencyMin_Hz: 126e3,
			frequencyMax_Hz: 138e3,
			harmonics: 5
		}
	],
	inductor: { inductance_H: 220e-6, toleranceMinus: 0.15, tolerancePlus: 0.15 },
	capacitor: { capacitance_F: 2.2e-6, ...tenPercent },
	sources: [
		{ id: 'amn', label: 'Test network', kind: 'amn-50uH-5ohm', networks: 2 },
		{
			id: 'mains',
			label: 'Installed mains',
			kind: 'impedance',
			inductanceMin_H: 50e-6,
			inductanceMax_H: 800e-6,
			resistance_ohm: 0.4
		}
	],
	choice: { capacitance_F: 330e-9, ...tenPercent, series: 'E6' },
	rules: [
		{ id: 'share', kind: 'capacitor-share', class: 'design', divisor: 5 },
		{
			id: 'guard',
			kind: 'resonance-guard',
			class: 'design',
			source: 'amn',
			guard: 2,
			harmonicGuard: 1,
			method: 'approximate'
		},
		{ id: 'reactance', kind: 'reactance-limit', class: 'design', reference_ohm: 50, divisor: 10 },
		{ id: 'reactive', kind: 'reactive-current', class: 'mandatory', limit_A: 0.035 },
		{
			id: 'inrush',
			kind: 'inrush-current',
			class: 'design',
			source: 'mains',
			limit_A: 40,
			includeCapacitor: false
		},
		{
			id: 'discharge',
			kind: 'discharge',
			class: 'mandatory',
			resistance_ohm: 940e3,
			resistorTolerance: 0,
			seconds: 2,
			safeVoltage_V: 60,
			otherCapacitance_F: 0
		}
	],
	notes: '4.5 µH of cable would put 330 nF on 132 kHz in the installation.'
};

/** The same supply as first drawn, with a 470 nF capacitor: no window is left. */
export const chargerAuxiliaryFirstTry: Design = {
	...chargerAuxiliary,
	title: 'Charger auxiliary supply, first try',
	capacitor: { capacitance_F: 470e-9, ...tenPercent },
	choice: { ...chargerAuxiliary.choice, capacitance_F: null }
};

/** Kestrel Vane Avionics (invented): 28 V converter with two windows, of which the lower one harms. */
export const avionicsConverter: Design = {
	format: 'herringbone-design',
	formatVersion: 1,
	title: '28 V converter input filter',
	supply: { kind: 'dc', voltage_V: 28, voltageMax_V: 32 },
	load: { power_W: 60, voltageMin_V: 18 },
	switching: [
		{ id: 'converter', label: 'Synchronised', frequencyMin_Hz: 210e3, frequencyMax_Hz: 210e3, harmonics: 5 }
	],
	inductor: { inductance_H: 0.68e-6, toleranceMinus: 0.2, tolerancePlus: 0.2 },
	capacitor: { capacitance_F: 33e-6, toleranceMinus: 0, tolerancePlus: 0 },
	sources: [
		{ id: 'an', label: 'Test network', kind: 'an-5uH', networks: 2 },
		{
			id: 'bus',
			label: 'Aircraft bus',
			kind: 'impedance',
			inductanceMin_H: 2e-6,
			inductanceMax_H: 2e-6,
			resistance_ohm: 0.1
		}
	],
	choice: { capacitance_F: 5.6e-6, ...tenPercent, series: 'E12' },
	rules: [
		{ id: 'share', kind: 'capacitor-share', class: 'design', divisor: 5 },
		{
			id: 'guard',
			kind: 'resonance-guard',
			class: 'design',
			source: 'an',
			guard: 2,
			harmonicGuard: 1,
			method: 'approximate'
		},
		{ id: 'reactance', kind: 'reactance-limit', class: 'design', reference_ohm: 50, divisor: 10 },
		{
			id: 'inrush',
			kind: 'inrush-current',
			class: 'mandatory',
			source: 'bus',
			limit_A: 60,
			includeCapacitor: false
		}
	]
};

/** Thalfeld Achsbau (invented): control supply of a servo drive on real mains. */
export const servoControl: Design = {
	format: 'herringbone-design',
	formatVersion: 1,
	title: 'Servo drive control supply',
	supply: { kind: 'ac', voltage_V: 230, voltageMax_V: 253, frequency_Hz: 50, frequencyMax_Hz: 50 },
	load: { power_W: 150, voltageMin_V: 207, lightLoad_W: 30 },
	switching: [
		{ id: 'psu', label: 'Control supply', frequencyMin_Hz: 92e3, frequencyMax_Hz: 108e3, harmonics: 5 }
	],
	inductor: { inductance_H: 150e-6, toleranceMinus: 0, tolerancePlus: 0 },
	capacitor: { capacitance_F: 3.3e-6, toleranceMinus: 0, tolerancePlus: 0 },
	sources: [
		{
			id: 'mains',
			label: 'Real mains',
			kind: 'impedance',
			inductanceMin_H: 50e-6,
			inductanceMax_H: 800e-6,
			resistance_ohm: 0.4
		},
		{ id: 'amn', label: 'Test network', kind: 'amn-50uH-5ohm', networks: 2 }
	],
	choice: { capacitance_F: 470e-9, toleranceMinus: 0.2, tolerancePlus: 0.2, series: 'E6' },
	rules: [
		{ id: 'share', kind: 'capacitor-share', class: 'design', divisor: 5 },
		{
			id: 'guard',
			kind: 'resonance-guard',
			class: 'design',
			source: 'mains',
			guard: 2,
			harmonicGuard: 1,
			method: 'approximate'
		},
		{ id: 'reactance', kind: 'reactance-limit', class: 'design', reference_ohm: 50, divisor: 10 },
		{
			id: 'factor',
			kind: 'displacement-factor',
			class: 'design',
			minimum: 0.9,
			otherCapacitance_F: 0
		},
		{ id: 'reactive', kind: 'reactive-current', class: 'mandatory', limit_A: 0.08 },
		{
			id: 'discharge',
			kind: 'discharge',
			class: 'mandatory',
			resistance_ohm: 1e6,
			resistorTolerance: 0,
			seconds: 5,
			safeVoltage_V: 60,
			otherCapacitance_F: 0
		}
	]
};
