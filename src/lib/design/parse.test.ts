import { describe, expect, it } from 'vitest';
import type { Design, Rule } from './design';
import { avionicsConverter, chargerAuxiliary, chargerAuxiliaryFirstTry, servoControl } from './examples';
import { parseDesign } from './parse';
import { complete, edited, type Json } from './specimen';
import { newDesign, newRule } from './start';

const examples = [avionicsConverter, chargerAuxiliary, chargerAuxiliaryFirstTry, servoControl];

describe('parseDesign', () => {
	it.each([...examples, complete, newDesign('ac'), newDesign('dc')])('takes $title as it is', (design) => {
		expect(parseDesign(JSON.parse(JSON.stringify(design)))).toEqual({ ok: true, design });
	});

	it.each(['inductor', 'capacitor', 'choice'] as const)(
		'takes one tolerance for both directions of the %s',
		(part) => {
			const { toleranceMinus: _minus, tolerancePlus: _plus, ...rest } = chargerAuxiliary[part];
			const parsed = parseDesign({ ...chargerAuxiliary, [part]: { ...rest, tolerance: 0.2 } });
			expect(parsed.ok && parsed.design[part]).toEqual({ ...rest, toleranceMinus: 0.2, tolerancePlus: 0.2 });
		}
	);

	const sources = JSON.parse(JSON.stringify(chargerAuxiliary.sources)) as Json[];
	const switching = chargerAuxiliary.switching[0];
	const ids = (count: number): Json[] =>
		Array.from(
			{ length: count },
			(_, index) => ({ ...switching, id: `s${String(index)}` }) as unknown as Json
		);

	it.each<[what: string, pointer: string, value: Json, says: RegExp, at?: string]>([
		['nothing for L', '/inductor/inductance_H', undefined, /^Enter the inductance L from 1 pH to 100 H\.$/],
		['text for L', '/inductor/inductance_H', '33 µH', /as a number in henry/],
		['zero for L', '/inductor/inductance_H', 0, /not 0 H\.$/],
		['a negative L', '/inductor/inductance_H', -3.3e-5, /not −33 µH\.$/],
		['NaN for L', '/inductor/inductance_H', NaN, /Enter the inductance L/],
		['infinity for L', '/inductor/inductance_H', Infinity, /Enter the inductance L/],
		['null for L', '/inductor/inductance_H', null, /as a number in henry/],
		['zero for C', '/capacitor/capacitance_F', 0, /capacitance C/],
		['a kilofarad for C', '/capacitor/capacitance_F', 1000, /to 10 F/],
		['zero for Cx', '/choice/capacitance_F', 0, /chosen capacitance/],
		['zero volts', '/supply/voltage_V', 0, /supply voltage/],
		['zero harmonics', '/switching/0/harmonics', 0, /whole number from 1 to 40/],
		['41 harmonics', '/switching/0/harmonics', 41, /whole number from 1 to 40, not 41\.$/],
		['half a harmonic', '/switching/0/harmonics', 2.5, /whole number/],
		['zero hertz', '/switching/0/frequencyMin_Hz', 0, /switching frequency/],
		['zero source inductance', '/sources/1/inductanceMin_H', 0, /source inductance/],
		['three networks', '/sources/0/networks', 3, /1 or 2/],
		['an unknown network', '/sources/0/kind', 'amn-500uH', /kind of the source: amn-50uH-5ohm/],
		['an unknown rule', '/rules/0/kind', 'guess', /kind of the rule: capacitor-share/],
		['no kind of rule', '/rules/0/kind', undefined, /kind of the rule/],
		['an unknown class', '/rules/0/class', 'strict', /mandatory, design, advisory/],
		['zero divisor', '/rules/0/divisor', 0, /divisor/],
		['a guard under one', '/rules/1/guard', 0.5, /from 1 to 100/],
		['an unknown series', '/choice/series', 'E5', /E3, E6/],
		['a tolerance of one', '/inductor/toleranceMinus', 1, /from 0 % to under 100 %, not 100 %\.$/],
		['an upward tolerance of one', '/inductor/tolerancePlus', 1, /upward/],
		['a negative tolerance', '/capacitor/toleranceMinus', -0.1, /not −10 %/],
		['no tolerance', '/choice/toleranceMinus', undefined, /Enter the tolerance downward/],
		['two kinds of tolerance', '/choice/tolerance', 0.1, /either one tolerance/],
		['a resistor tolerance of one', '/rules/5/resistorTolerance', 1, /tolerance of the resistor/],
		['ac without a frequency', '/supply/frequency_Hz', undefined, /line frequency/],
		['ac without a highest frequency', '/supply/frequencyMax_Hz', undefined, /line frequency/],
		['a highest voltage under the voltage', '/supply/voltageMax_V', 200, /at least the supply voltage/],
		['a highest line frequency under it', '/supply/frequencyMax_Hz', 49, /at least the line frequency/],
		['a range upside down', '/switching/0/frequencyMax_Hz', 1e5, /at least the lowest one/],
		['a source upside down', '/sources/1/inductanceMax_H', 1e-6, /at least the lowest one/],
		['no switching frequency', '/switching', [], /1 to 8 switching frequencies, not 0/],
		['nine switching frequencies', '/switching', ids(9), /1 to 8 switching frequencies, not 9/],
		['no source', '/sources', [], /1 to 6 sources, not 0/],
		['switching as an object', '/switching', {}, /list of 1 to 8/],
		['two rules with one id', '/rules/1/id', 'share', /“share” is already in use/],
		['two sources with one id', '/sources', [...sources, sources[0]], /already in use/, '/sources/2/id'],
		['two entries with one id', '/switching', [ids(1)[0], ids(1)[0]], /already in use/, '/switching/1/id'],
		['a source that is not there', '/rules/1/source', 'lisn', /Enter a source of this design \(amn, mains\)/],
		['a network for the inrush', '/rules/4/source', 'amn', /kind impedance/],
		['an empty id', '/rules/0/id', '', /id of the rule/],
		['an id with a space', '/rules/0/id', 'a b', /id of the rule/],
		['an empty title', '/title', '', /Enter the title: 1 to 200 characters/],
		['a long title', '/title', 'x'.repeat(201), /1 to 200 characters/],
		['10 000 characters', '/title', 'x'.repeat(10_000), /1 to 200 characters/],
		['a title on two lines', '/title', 'a\nb', /on one line/],
		['half a character', '/title', 'a\ud800', /Enter the title/],
		['a number as title', '/title', 3, /Enter the title/],
		['long notes', '/notes', 'x'.repeat(4001), /Enter the notes/],
		['a null byte in the notes', '/notes', 'a\u0000', /control characters/],
		['an unknown key', '/colour', 'red', /^“colour” is not a field of the design: leave it out\.$/],
		['an unknown key of L', '/inductor/colour', 1, /not a field of the inductor/],
		['an unknown key of a rule', '/rules/0/colour', 1, /not a field of the rule capacitor-share/],
		['an unknown key of a source', '/sources/0/colour', 1, /not a field of the network/],
		['a key of another rule', '/rules/0/guard', 2, /not a field of the rule/],
		['a prototype', '/__proto__', { x: 1 }, /“__proto__” is not a field/],
		['a prototype of a rule', '/rules/0/__proto__', {}, /“__proto__” is not a field/],
		['a constructor', '/constructor', {}, /“constructor” is not a field/],
		['a key with a slash', '/a~1b', 1, /not a field/, '/a~01b'],
		['another format', '/format', 'other', /herringbone-design/],
		['a later version', '/formatVersion', 2, /Enter 1 as the format version/],
		['no version', '/formatVersion', undefined, /format version/],
		['a curve that is not there', '/inductor/curve', 'c1', /“c1” is not one/],
		['a list for an object', '/inductor', [], /Enter the inductor as an object/],
		['nothing for an object', '/inductor', undefined, /Enter the inductor/],
		['a boolean as text', '/rules/4/includeCapacitor', 'yes', /true or false/]
	])('refuses %s', (_, pointer, value, says, at = pointer) => {
		expect(parseDesign(edited(chargerAuxiliary, pointer, value))).toEqual({
			ok: false,
			issues: [{ pointer: at, detail: expect.stringMatching(says) as string }]
		});
	});

	it.each<[what: string, pointer: string, value: Json, says: RegExp, at?: string]>([
		['too few currents', '/switching/0/current_A', [1, 2], /each of the 5 harmonics, not 2/],
		['a negative current', '/switching/0/current_A/1', -1, /current of the harmonic/],
		['a lowest voltage over the voltage', '/load/voltageMin_V', 240, /at most the supply voltage/],
		['a light load over the load', '/load/lightLoad_W', 151, /at most the power/],
		['a band upside down', '/rules/13/to_F', 1e-7, /above its lower end/],
		['no reason for a band', '/rules/13/reason', '', /reason/],
		['a falling curve', '/curves/0/frequency_Hz/2', 1e4, /rising order/],
		['a curve with too few values', '/curves/0/real_ohm', [1, 2], /each of the 3 frequencies/],
		['a curve through zero', '/curves/0/real_ohm/1', 0, /other than zero/],
		['a wrong checksum', '/curves/0/sha256', 'abc', /64 digits/],
		['a table that is missing', '/emission/table', undefined, /points of the limit line/],
		['a falling table', '/emission/table/1/frequency_Hz', 1e3, /in order of frequency/],
		['a negative margin', '/emission/margin_dB', -1, /margin/],
		['an override of nothing', '/overrides/0/rule', 'x', /“x” is not one/],
		['an override of a mandatory rule', '/overrides/0/rule', 'r8', /mandatory and cannot be overridden/],
		['a day that is none', '/overrides/0/date', '2023-02-29', /day of the calendar/],
		['a month that is none', '/overrides/0/date', '2023-13-01', /day of the calendar/],
		['a date in words', '/overrides/0/date', 'yesterday', /year-month-day/],
		['a power factor of one', '/rules/7/minimum', 1, /displacement factor/],
		['a measured source for stability', '/rules/10/source', 'vna', /kind impedance/]
	])('refuses %s', (_, pointer, value, says, at = pointer) => {
		expect(parseDesign(edited(complete, pointer, value))).toEqual({
			ok: false,
			issues: [{ pointer: at, detail: expect.stringMatching(says) as string }]
		});
	});

	it('refuses more than 240 lines', () => {
		const wide = (harmonics: number): Design => ({
			...chargerAuxiliary,
			switching: [0, 1, 2].map(
				(n) => ({ ...chargerAuxiliary.switching[0], id: `s${String(n)}`, harmonics }) as never
			)
		});
		expect(parseDesign(wide(40))).toMatchObject({ ok: true });
		const three = {
			...wide(40),
			sources: [0, 1, 2].map((n) => ({ ...chargerAuxiliary.sources[0], id: `a${String(n)}` }))
		};
		const parsed = parseDesign({ ...three, rules: [] });
		expect(parsed).toMatchObject({ ok: false, issues: [{ pointer: '/switching' }] });
		expect(!parsed.ok && parsed.issues[0]?.detail).toMatch(/360 lines, and 240 are the most/);
	});

	it('refuses 41 rules', () => {
		const rules: Rule[] = Array.from({ length: 41 }, (_, n) =>
			newRule('capacitor-share', `r${String(n)}`, complete)
		);
		expect(parseDesign({ ...chargerAuxiliary, rules })).toMatchObject({
			ok: false,
			issues: [{ pointer: '/rules' }]
		});
		expect(parseDesign({ ...chargerAuxiliary, rules: rules.slice(1) })).toMatchObject({ ok: true });
	});

	it('refuses numbers past the range of a double, and their JSON', () => {
		const text = JSON.stringify(chargerAuxiliary).replace('"inductance_H":0.00022', '"inductance_H":1e400');
		expect(text).toContain('1e400');
		expect(parseDesign(JSON.parse(text))).toMatchObject({ issues: [{ pointer: '/inductor/inductance_H' }] });
	});

	it('tells every fault at once', () => {
		const parsed = parseDesign({ ...chargerAuxiliary, title: '', notes: 5, extra: 1, inductor: {} });
		expect(!parsed.ok && parsed.issues.map(({ pointer }) => pointer).sort()).toEqual([
			'/extra',
			'/inductor/inductance_H',
			'/notes',
			'/title'
		]);
	});

	it('points at a long key in full, and shortens only the sentence', () => {
		const key = `${'~/'.repeat(19)}😀${'x'.repeat(10)}`;
		expect(parseDesign({ ...chargerAuxiliary, [key]: 1, [`${key}y`]: 1 })).toMatchObject({
			issues: [
				{
					pointer: `/${'~0~1'.repeat(19)}😀${'x'.repeat(10)}`,
					detail: expect.stringContaining('😀…”') as string
				},
				{ pointer: `/${'~0~1'.repeat(19)}😀${'x'.repeat(10)}y` }
			]
		});
	});

	it('tells no more than a hundred faults', () => {
		const extra = Object.fromEntries(Array.from({ length: 5000 }, (_, n) => [`key${String(n)}`, 1]));
		const parsed = parseDesign({ ...chargerAuxiliary, ...extra });
		expect(!parsed.ok && parsed.issues.length).toBe(100);
	});

	it('refuses line frequencies of a dc supply, each at its place', () => {
		const supply = { ...avionicsConverter.supply, frequency_Hz: 400, frequencyMax_Hz: 800 };
		const detail = 'Leave the line frequency out: a dc supply has none.';
		expect(parseDesign({ ...avionicsConverter, supply })).toEqual({
			ok: false,
			issues: [
				{ pointer: '/supply/frequency_Hz', detail },
				{ pointer: '/supply/frequencyMax_Hz', detail }
			]
		});
	});

	it.each([undefined, null, 1, 'x', [], true, () => 1])('refuses %s', (input) => {
		expect(parseDesign(input)).toEqual({
			ok: false,
			issues: [{ pointer: '', detail: expect.stringMatching(/^Enter a design/) as string }]
		});
	});
});
