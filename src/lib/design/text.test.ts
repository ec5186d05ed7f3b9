import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Design } from './design';
import { avionicsConverter, chargerAuxiliary, chargerAuxiliaryFirstTry, servoControl } from './examples';
import { designToText, parseDesignText } from './parse';
import { complete, edited } from './specimen';
import { newDesign } from './start';

const examples = [avionicsConverter, chargerAuxiliary, chargerAuxiliaryFirstTry, servoControl];

describe('designToText and parseDesignText', () => {
	it.each([...examples, complete, newDesign('ac'), newDesign('dc')])('give $title back', (design) => {
		expect(parseDesignText(designToText(design))).toEqual({ ok: true, design });
	});

	it('give any value back to the last bit', () => {
		fc.assert(
			fc.property(fc.double({ min: 1e-12, max: 100, noNaN: true }), (inductance_H) => {
				const design = { ...chargerAuxiliary, inductor: { ...chargerAuxiliary.inductor, inductance_H } };
				expect(parseDesignText(designToText(design))).toEqual({ ok: true, design });
			})
		);
	});

	it('writes what a person would', () => {
		const text = designToText(chargerAuxiliary);
		expect(text.inductor).toEqual({
			inductance_H: '220\u00a0µH',
			toleranceMinus: '15\u00a0%',
			tolerancePlus: '15\u00a0%'
		});
		expect(text.switching[0]).toMatchObject({ frequencyMin_Hz: '126\u00a0kHz', harmonics: '5' });
		expect(designToText(chargerAuxiliaryFirstTry).choice.capacitance_F).toBe('');
	});

	const text = JSON.parse(JSON.stringify(designToText(chargerAuxiliary))) as Design;

	it.each<[typed: string, pointer: string, says: RegExp]>([
		['100', '/inductor/inductance_H', /^Write a unit: 100 µH or 100 mH\?$/],
		['1,000', '/inductor/inductance_H', /two ways/],
		['1,000 nF', '/capacitor/capacitance_F', /write 1 nF or 1000 nF/],
		['100 nF', '/inductor/inductance_H', /unit of a capacitance/],
		['-33 µH', '/inductor/inductance_H', /not −33 µH/],
		['0 µH', '/inductor/inductance_H', /not 0 H/],
		['NaN', '/inductor/inductance_H', /finite number/],
		['1e400 H', '/inductor/inductance_H', /too large/],
		['', '/inductor/inductance_H', /^Enter the inductance L from 1 pH to 100 H\.$/],
		['  ', '/inductor/inductance_H', /^Enter the inductance L/],
		['9'.repeat(10_000), '/inductor/inductance_H', /at most 64 characters/],
		['😀', '/inductor/inductance_H', /Write a number and a unit/],
		['15', '/inductor/toleranceMinus', /^Write a unit: 15 %\?$/],
		['100 %', '/inductor/toleranceMinus', /under 100 %/],
		['41', '/switching/0/harmonics', /whole number from 1 to 40/],
		['5 Hz', '/switching/0/harmonics', /plain number/],
		['lisn', '/rules/1/source', /Enter a source of this design/],
		['230', '/supply/voltage_V', /^Write a unit: 230 V or 230 mV\?$/],
		['2 m', '/rules/5/seconds', /not a unit of a time/]
	])('refuses %j at %s', (typed, pointer, says) => {
		expect(parseDesignText(edited(text, pointer, typed))).toEqual({
			ok: false,
			issues: [{ pointer, detail: expect.stringMatching(says) as string }]
		});
	});

	it('takes empty fields of optional values as not given', () => {
		const typed = {
			...text,
			load: { power_W: '', voltageMin_V: '', lightLoad_W: '' },
			damping: { resistance_ohm: '', capacitance_F: '' },
			inductor: { ...text.inductor, resistance_ohm: '', curve: '' },
			switching: [{ ...text.switching[0], current_A: ['', '', '', '', ''] }]
		};
		expect(parseDesignText(typed)).toEqual({ ok: true, design: chargerAuxiliary });
	});

	it.each([
		['true', true],
		['on', true],
		['false', false],
		['', false]
	])('reads %j as %s', (typed, value) => {
		const parsed = parseDesignText(edited(text, '/rules/4/includeCapacitor', typed));
		expect(parsed.ok && parsed.design.rules[4]).toMatchObject({ includeCapacitor: value });
	});
});
