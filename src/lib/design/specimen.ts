/** For tests: a design that uses every key of the file, and ways to spoil one. */
import type { Design } from './design';
import { servoControl } from './examples';
import { RULE_KINDS } from './rule-schema';
import { newRule } from './start';

export type Json = string | number | boolean | null | undefined | Json[] | { [key: string]: Json };

/** A design as plain JSON with another value at a pointer; undefined takes the key out. */
export const edited = (design: Design, pointer: string, value: Json): Json => {
	const copy = JSON.parse(JSON.stringify(design)) as Json;
	const keys = pointer.split('/').slice(1);
	const last = keys.pop() ?? '';
	const parent = keys.reduce<Json>((node, key) => (node as Record<string, Json>)[key], copy) as Record<
		string,
		Json
	>;
	if (value === undefined) Reflect.deleteProperty(parent, last);
	else Object.defineProperty(parent, last, { value, enumerable: true, configurable: true, writable: true });
	return copy;
};

const curve = {
	id: 'measured',
	label: 'Measured',
	fileName: 'part.s1p',
	sha256: '0'.repeat(64),
	frequency_Hz: [1e3, 1e4, 1e5],
	real_ohm: [1, 2, 3],
	imaginary_ohm: [-1, 0, 1]
};

export const complete: Design = {
	...servoControl,
	load: { power_W: 150, voltageMin_V: 207, lightLoad_W: 30 },
	inductor: {
		...servoControl.inductor,
		resistance_ohm: 0.02,
		parallelCapacitance_F: 12e-12,
		curve: 'measured'
	},
	capacitor: { ...servoControl.capacitor, esr_ohm: 0.01, esl_H: 18e-9 },
	damping: { resistance_ohm: 2.419, capacitance_F: 6.6e-6 },
	sources: [
		...servoControl.sources,
		{ id: 'vna', label: 'Measured bus', kind: 'measured', curve: 'measured' }
	],
	switching: servoControl.switching.map((entry) => ({ ...entry, current_A: [1, 0, 0.3, 0, 0.1 + 0.2] })),
	rules: [
		...RULE_KINDS.map((kind, index) => newRule(kind, `r${String(index)}`, servoControl)),
		{ id: 'all', kind: 'manual-band', class: 'advisory', from_F: 1e-6, to_F: null, reason: 'No stock' }
	],
	curves: [curve],
	emission: {
		limit: 'table',
		table: [
			{ frequency_Hz: 150e3, quasiPeak_dBuV: 66, average_dBuV: 56 },
			{ frequency_Hz: 30e6, quasiPeak_dBuV: -3, average_dBuV: 50.5 }
		],
		margin_dB: 6
	},
	pins: [{ id: 'p', text: 'Here', frequency_Hz: 1 / 3e-6, impedance_ohm: 1 }],
	overrides: [{ rule: 'r0', by: 'A. Person', reason: 'Measured', date: '2024-02-29' }],
	notes: 'Two\nlines'
};
