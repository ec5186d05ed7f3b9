import { describe, expect, it } from 'vitest';
import { chargerAuxiliary } from '$lib/design/examples';
import { complete } from '$lib/design/specimen';
import { unprintableInDesign, unprintableInTitleBlock } from './printable';

describe('unprintableInDesign', () => {
	it('lets through what the faces have', () => {
		const title = 'Zażółć ½ Ω \u2126 µ μ ± ≤ √2 · Lädeström İstanbul';
		expect(unprintableInDesign({ ...complete, title, notes: 'a\n\tb' })).toEqual([]);
	});

	it.each([
		['😀', '“😀” (U+1F600)'],
		['電源', '“電” (U+96FB), “源” (U+6E90)'],
		['L ∥ C', '“∥” (U+2225)'],
		['a\u202eb', '“\u202e” (U+202E)'],
		['日月火水', '“日” (U+65E5), “月” (U+6708), “火” (U+706B) and others']
	])('names what %s holds', (title, named) => {
		expect(unprintableInDesign({ ...chargerAuxiliary, title })).toEqual([
			{
				pointer: '/title',
				detail: `Enter the title without ${named}: the sheet’s lettering does not have it.`
			}
		]);
	});

	it('points at each text', () => {
		const spoilt = JSON.parse(
			JSON.stringify(complete)
				.replaceAll(/"(label|reason|by|text|notes)":"/g, '"$1":"電')
				.replace('"title":"', '"title":"電')
		) as typeof complete;
		expect(unprintableInDesign(spoilt).map(({ pointer }) => pointer)).toEqual([
			...[
				'/title',
				'/notes',
				'/switching/0/label',
				'/sources/0/label',
				'/sources/1/label',
				'/sources/2/label'
			],
			...['/curves/0/label', '/rules/12/reason', '/rules/13/reason', '/pins/0/text'],
			...['/overrides/0/by', '/overrides/0/reason']
		]);
	});
});

describe('unprintableInTitleBlock', () => {
	it('points at each cell', () => {
		const block = {
			...{ title: '電', supplementaryTitle: '電', owner: '電', number: '電' },
			...{ creator: '電', department: '電', reference: '電' }
		};
		expect(unprintableInTitleBlock(block).map(({ pointer }) => pointer)).toEqual(
			Object.keys(block).map((key) => `/${key}`)
		);
		expect(unprintableInTitleBlock({ title: 'Filter', owner: '' })).toEqual([]);
	});
});
