/** The design file, format version 1: shape and ranges; what holds across fields is in `consistency`. */
import * as z from 'zod/mini';
import { SERIES_NAMES } from '$lib/quantity/series';
import type { Design } from './design';
import {
	branch,
	byKind,
	checkTolerance,
	id,
	list,
	oneOf,
	quantity,
	spreadTolerance,
	text,
	toleranceShape,
	whole
} from './field';
import { ruleSchema } from './rule-schema';

const label = text('the label', { most: 60 });
const voltage = (words: string) => quantity(words, 'voltage', { from: 1e-3, to: 1e6 });
const power = (words: string) => quantity(words, 'power', { from: 1e-6, to: 1e9 });
const lineFrequency = (words: string) => quantity(words, 'frequency', { from: 1, to: 1e5 });
const switchingFrequency = (words: string) => quantity(words, 'frequency', { from: 100, to: 1e9 });
const inductance = (words: string) => quantity(words, 'inductance', { from: 1e-12, to: 100 });
const capacitance = (words: string) => quantity(words, 'capacitance', { from: 1e-15, to: 10 });
const loss = (words: string) => quantity(words, 'resistance', { from: 0, to: 1e9 });
const curve = id('the id of the measured curve');

const supply = branch('the supply', {
	kind: oneOf('the kind of supply', ['ac', 'dc']),
	voltage_V: voltage('the supply voltage'),
	voltageMax_V: voltage('the highest supply voltage'),
	frequency_Hz: z.optional(lineFrequency('the line frequency')),
	frequencyMax_Hz: z.optional(lineFrequency('the highest line frequency'))
});

const load = branch('the load', {
	power_W: power('the power of the load'),
	voltageMin_V: voltage('the lowest supply voltage'),
	lightLoad_W: z.optional(power('the power at light load'))
});

const switching = branch('the switching frequency', {
	id: id('the id of the switching frequency'),
	label,
	frequencyMin_Hz: switchingFrequency('the lowest switching frequency'),
	frequencyMax_Hz: switchingFrequency('the highest switching frequency'),
	harmonics: whole('the number of harmonics', 1, 40),
	current_A: z.optional(
		list('harmonic currents', quantity('the current of the harmonic', 'current', { from: 0, to: 1e6 }), 1, 40)
	)
});

const inductor = z.pipe(
	branch('the inductor', {
		inductance_H: inductance('the inductance L'),
		...toleranceShape('L'),
		resistance_ohm: z.optional(loss('the series resistance of L')),
		parallelCapacitance_F: z.optional(
			quantity('the parallel capacitance of L', 'capacitance', { from: 0, to: 10 })
		),
		curve: z.optional(curve)
	}).check(checkTolerance),
	z.transform(spreadTolerance)
);

const parasitics = (part: string) => ({
	...toleranceShape(part),
	esr_ohm: z.optional(loss(`the series resistance of ${part}`)),
	esl_H: z.optional(quantity(`the series inductance of ${part}`, 'inductance', { from: 0, to: 100 })),
	curve: z.optional(curve)
});

const capacitor = z.pipe(
	branch('the capacitor', { capacitance_F: capacitance('the capacitance C'), ...parasitics('C') }).check(
		checkTolerance
	),
	z.transform(spreadTolerance)
);

const choice = z.pipe(
	branch('the choice', {
		capacitance_F: z.nullable(capacitance('the chosen capacitance Cx')),
		...parasitics('Cx'),
		series: oneOf('the series of preferred values', SERIES_NAMES)
	}).check(checkTolerance),
	z.transform(spreadTolerance)
);

const damping = branch('the damping branch', {
	resistance_ohm: quantity('the damping resistance Rd', 'resistance', { from: 1e-6, to: 1e9 }),
	capacitance_F: capacitance('the damping capacitance Cd')
});

const NETWORK_KINDS = ['amn-50uH-5ohm', 'amn-50uH', 'amn-5uH-1ohm', 'an-5uH'] as const;

const named = { id: id('the id of the source'), label };

const source = byKind(
	'the source',
	[...NETWORK_KINDS, 'impedance', 'measured'],
	[
		branch('the network', {
			...named,
			kind: z.enum(NETWORK_KINDS),
			networks: z.literal([1, 2], { error: 'Enter the number of networks in the loop: 1 or 2.' })
		}),
		branch('the source impedance', {
			...named,
			kind: z.literal('impedance'),
			inductanceMin_H: inductance('the lowest source inductance'),
			inductanceMax_H: inductance('the highest source inductance'),
			resistance_ohm: loss('the source resistance')
		}),
		branch('the measured source', { ...named, kind: z.literal('measured'), curve })
	]
);

const reading = (words: string) => quantity(words, 'resistance', { from: -1e12, to: 1e12 });
const POINTS = 5000;
const DIGEST = 'Enter the SHA-256 of the measured file: 64 digits 0–9 and a–f.';

const measured = branch('the measured curve', {
	id: curve,
	label,
	fileName: text('the name of the measured file', { most: 120 }),
	sha256: z.string({ error: DIGEST }).check(z.regex(/^[0-9a-f]{64}$/, { error: DIGEST })),
	frequency_Hz: list(
		'frequencies',
		quantity('the frequency', 'frequency', { from: 1e-3, to: 1e12 }),
		2,
		POINTS
	),
	real_ohm: list('real parts', reading('the real part'), 2, POINTS),
	imaginary_ohm: list('imaginary parts', reading('the imaginary part'), 2, POINTS)
});

const level = (words: string) => quantity(words, 'level', { from: -200, to: 300 });

const emission = branch('the emission limit', {
	limit: oneOf('the emission limit', ['cispr-32-a', 'cispr-32-b', 'table']),
	table: z.optional(
		list(
			'points of the limit line',
			branch('the point of the limit line', {
				frequency_Hz: quantity('the frequency of the point', 'frequency', { from: 1, to: 1e10 }),
				quasiPeak_dBuV: level('the quasi-peak limit'),
				average_dBuV: level('the average limit')
			}),
			2,
			40
		)
	),
	margin_dB: quantity('the margin to the limit', 'gain', { from: 0, to: 60 })
});

const pin = branch('the pinned note', {
	id: id('the id of the pinned note'),
	text: text('the text of the note', { most: 200 }),
	frequency_Hz: quantity('the frequency of the note', 'frequency', { from: 1e-3, to: 1e12 }),
	impedance_ohm: quantity('the impedance of the note', 'resistance', { from: 1e-9, to: 1e12 })
});

const DATE = 'Enter the date of the override as year-month-day, such as 2024-05-31.';

const override = branch('the override', {
	rule: id('the id of the rule that is overridden'),
	by: text('the name of the person who overrides the rule', { most: 60 }),
	reason: text('the reason for overriding the rule', { most: 300 }),
	date: z.string({ error: DATE }).check(z.regex(/^\d{4}-\d{2}-\d{2}$/, { error: DATE }))
});

const design = branch('the design', {
	format: z.literal('herringbone-design', { error: 'Enter herringbone-design as the format.' }),
	formatVersion: z.literal(1, { error: 'Enter 1 as the format version.' }),
	title: text('the title', { most: 200 }),
	supply,
	load: z.optional(load),
	switching: list('switching frequencies', switching, 1, 8),
	inductor,
	capacitor,
	damping: z.optional(damping),
	sources: list('sources', source, 1, 6),
	choice,
	rules: list('rules', ruleSchema, 0, 40),
	curves: z.optional(list('measured curves', measured, 0, 12)),
	emission: z.optional(emission),
	pins: z.optional(list('pinned notes', pin, 0, 40)),
	overrides: z.optional(list('overrides', override, 0, 40)),
	notes: z.optional(text('the notes', { most: 4000, least: 0, lines: true }))
});

export const designSchema: z.ZodMiniType<Design> = design;

/** What a part's checks hold beyond its shape, by a key that only such a part has. */
const CONDITIONS: Readonly<Record<string, z.core.JSONSchema.BaseSchema>> = {
	tolerance: {
		oneOf: [
			{ required: ['tolerance'], properties: { toleranceMinus: false, tolerancePlus: false } },
			{ required: ['toleranceMinus', 'tolerancePlus'], properties: { tolerance: false } }
		]
	},
	voltageMax_V: {
		if: { properties: { kind: { const: 'ac' } } },
		then: { required: ['frequency_Hz', 'frequencyMax_Hz'] },
		else: { properties: { frequency_Hz: false, frequencyMax_Hz: false } }
	},
	limit: { if: { properties: { limit: { const: 'table' } } }, then: { required: ['table'] } }
};

/**
 * Writes the design file's shape as JSON Schema; what holds across fields is told in words only.
 * @returns a schema of draft 2020-12
 * @example designJsonSchema().type // 'object'
 * Source: JSON Schema, draft 2020-12.
 */
export function designJsonSchema(): z.core.JSONSchema.BaseSchema {
	return {
		title: 'Herringbone design, format version 1',
		description:
			'SI base units, the unit in the key; tolerances are fractions; ac voltages are rms. Beyond this schema: lowest values are not above highest ones, ids are unique and references exist, sources × switching × harmonics is at most 240.',
		...z.toJSONSchema(design, {
			io: 'input',
			override: ({ jsonSchema }) => {
				for (const [key, condition] of Object.entries(CONDITIONS)) {
					if (key in (jsonSchema.properties ?? {})) Object.assign(jsonSchema, condition);
				}
			}
		})
	};
}
