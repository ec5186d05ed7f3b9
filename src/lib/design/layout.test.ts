import { describe, expect, it } from 'vitest';
import type { Layout, TitleBlock } from '$lib/sheet/layout';
import { layoutJsonSchema, parseLayout, parseTitleBlock } from './layout';

const plain = { paper: 'A4', orientation: 'landscape' };

describe('parseLayout', () => {
	it('takes a whole layout as it is', () => {
		const layout: Layout = {
			paper: 'Tabloid',
			orientation: 'portrait',
			decade_mm: 40,
			frequencyFrom_Hz: 1e3,
			impedanceFrom_ohm: 0.01,
			ink: 'mono',
			strip: true,
			benefitPane: false,
			zones: true,
			decimalMark: ',',
			language: 'de'
		};
		const parsed = parseLayout(layout);
		expect(parsed).toEqual({ ok: true, layout });
		if (parsed.ok) parsed.layout satisfies Layout;
	});

	it.each<[pointer: string, value: unknown, says: RegExp]>([
		['/paper', 'A5', /A4, A3, Letter, Tabloid/],
		['/paper', undefined, /Enter the paper/],
		['/orientation', 'askew', /landscape, portrait/],
		['/decade_mm', 0, /whole number from 5 to 200/],
		['/decade_mm', -40, /whole number from 5 to 200/],
		['/decade_mm', 40.5, /whole number/],
		['/decade_mm', Infinity, /whole number/],
		['/decade_mm', '40 mm', /whole number/],
		['/frequencyFrom_Hz', 2000, /power of ten/],
		['/frequencyFrom_Hz', 0, /from 1 mHz/],
		['/frequencyFrom_Hz', -10, /from 1 mHz/],
		['/impedanceFrom_ohm', 0.5, /power of ten/],
		['/ink', 'red', /colour, mono/],
		['/strip', 'yes', /true or false/],
		['/decimalMark', ';', /decimal mark/],
		['/language', 'fr', /en, de/],
		['/scale', 1, /“scale” is not a field of the layout/],
		['/__proto__', {}, /not a field of the layout/]
	])('refuses %s %j', (pointer, value, says) => {
		const layout: object = { ...plain };
		Object.defineProperty(layout, pointer.slice(1), { value, enumerable: true });
		expect(parseLayout(layout)).toEqual({
			ok: false,
			issues: [{ pointer, detail: expect.stringMatching(says) as string }]
		});
	});

	it.each([-3, -2, -1, 0, 1, 2, 3, 4, 5, 6, 9])('takes 10^%d as a power of ten', (exponent) => {
		expect(parseLayout({ ...plain, frequencyFrom_Hz: Number(`1e${String(exponent)}`) }).ok).toBe(true);
		expect(parseLayout({ ...plain, impedanceFrom_ohm: Number(`1e${String(exponent)}`) }).ok).toBe(true);
	});

	it.each([null, [], 'A4', undefined, 4])('refuses %j', (input) => {
		expect(parseLayout(input)).toMatchObject({ ok: false, issues: [{ pointer: '' }] });
	});
});

describe('parseTitleBlock', () => {
	it('takes the seven cells', () => {
		const titleBlock: TitleBlock = {
			title: 'Line-side capacitor',
			supplementaryTitle: '',
			owner: 'Elverholm Ladeteknikk',
			number: 'EL-2217',
			creator: 'A. Person',
			department: 'Power',
			reference: 'R-1'
		};
		const parsed = parseTitleBlock(titleBlock);
		expect(parsed).toEqual({ ok: true, titleBlock });
		if (parsed.ok) parsed.titleBlock satisfies TitleBlock;
	});

	it.each(['state', 'mark', 'approver', 'approvedBy', 'dateOfIssue', 'checkCode', 'status'])(
		'cannot set %s',
		(key) => {
			expect(parseTitleBlock({ [key]: 'Issued' })).toMatchObject({
				ok: false,
				issues: [{ pointer: `/${key}` }]
			});
		}
	);

	it.each([
		['/title', 'x'.repeat(201)],
		['/title', 5],
		['/number', 'x'.repeat(31)],
		['/owner', 'a\u0007'],
		['/creator', 'a\nb']
	])('refuses %s %j', (pointer, value) => {
		expect(parseTitleBlock({ [pointer.slice(1)]: value })).toMatchObject({
			ok: false,
			issues: [{ pointer }]
		});
	});
});

describe('layoutJsonSchema', () => {
	it('lists every key and refuses others', () => {
		expect(layoutJsonSchema()).toMatchObject({
			$schema: 'https://json-schema.org/draft/2020-12/schema',
			type: 'object',
			required: ['paper', 'orientation'],
			additionalProperties: false,
			properties: { decade_mm: { type: 'integer', minimum: 5, maximum: 200 } }
		});
	});

	it('lists the powers of ten that an axis may start at', () => {
		const { properties } = layoutJsonSchema();
		const listed = (key: string) => (properties?.[key] as { enum?: number[] }).enum;
		expect(listed('frequencyFrom_Hz')).toEqual(expect.arrayContaining([1e-3, 1, 1e3, 1e10]));
		expect(listed('frequencyFrom_Hz')).toHaveLength(14);
		expect(listed('impedanceFrom_ohm')).toHaveLength(19);
		expect(properties?.frequencyFrom_Hz).toMatchObject({
			description: 'the lower end of the frequency axis'
		});
	});
});
