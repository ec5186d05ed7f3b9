import { describe, expect, it } from 'vitest';
import { chargerAuxiliary } from '$lib/design/examples';
import { fileName, openDesign } from './files';

describe('design files', () => {
	it('opens what was saved', () => {
		const opened = openDesign(JSON.stringify(chargerAuxiliary), 'a.json');
		expect(opened.ok && opened.design).toEqual(chargerAuxiliary);
	});

	it('says what is no JSON', () => {
		expect(openDesign('{', 'a.json')).toMatchObject({
			ok: false,
			message: expect.stringContaining('not JSON')
		});
	});

	it.each([
		[{ ...chargerAuxiliary, formatVersion: 7 }, '/formatVersion'],
		[{ ...chargerAuxiliary, colour: 'red' }, '/colour'],
		[
			{ ...chargerAuxiliary, inductor: { ...chargerAuxiliary.inductor, inductance_H: -1 } },
			'/inductor/inductance_H'
		]
	])('points at what is wrong', (file, pointer) => {
		const opened = openDesign(JSON.stringify(file), 'a.json');
		expect(opened.ok ? [] : opened.issues.map((issue) => issue.pointer)).toContain(pointer);
	});

	it.each([
		['Charger auxiliary supply', 'charger-auxiliary-supply.pdf'],
		['Ærøskøbing / 3.3 kW', 'r-sk-bing-3-3-kw.pdf'],
		['Überspannung Größe', 'uberspannung-gro-e.pdf'],
		['漢字', 'worksheet.pdf'],
		['../../etc', 'etc.pdf']
	])('names %s %s', (title, name) => {
		expect(fileName(title, 'pdf')).toBe(name);
	});
});
