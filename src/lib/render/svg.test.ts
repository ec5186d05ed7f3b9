import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Item, Scene } from '$lib/scene/scene';
import { specimen } from './specimen';
import { toSvg } from './svg';

const scene = (items: readonly Item[], more: Partial<Scene> = {}): Scene => ({
	...specimen([]),
	items,
	...more
});
const marks = (svg: string): string[] => svg.split('\n').filter((line) => /^<(?:path|text|g)\b/.test(line));

describe('toSvg', () => {
	it('has the paper in millimetres, its name, its description and its metadata', () => {
		const svg = toSvg(scene([], { metadata: { kind: 'worked', text: '</metadata> & ]]>' } }));
		expect(svg).toContain('width="297mm" height="210mm" viewBox="0 0 297 210"');
		expect(svg).toContain('role="img" aria-labelledby="sheet-title" aria-describedby="sheet-description"');
		expect(svg).toContain('<title id="sheet-title">Ω and µ, Größe</title>');
		const metadata = /<metadata>(.*)<\/metadata>/.exec(svg)?.[1] ?? '';
		const plain = metadata.replaceAll('&lt;', '<').replaceAll('&gt;', '>').replaceAll('&quot;', '"');
		expect(JSON.parse(plain.replaceAll('&amp;', '&'))).toEqual({ kind: 'worked', text: '</metadata> & ]]>' });
	});

	it.each<[string, Item, string]>([
		[
			'a stroked path',
			{
				type: 'path',
				role: 'band',
				of: 'share',
				d: { ops: 'MLCZ', at: [1, 2, 3.00049, -0.0001, 1e-9, 5, 6, 7, 8.12345, 9] },
				stroke: { colour: '#96231c', width: 0.18, dash: [8, 1.6], cap: 'round', join: 'bevel' }
			},
			'<path data-role="band" data-of="share" d="M1 2L3 0C0 5 6 7 8.123 9Z" fill="none" stroke="#96231c" stroke-width="0.18" stroke-dasharray="8 1.6" stroke-linecap="round" stroke-linejoin="bevel"/>'
		],
		[
			'a filled path',
			{ type: 'path', id: 'w0', d: { ops: 'MLZ', at: [1, 2, 3, 4] }, fill: '#fff0b8', fillRule: 'evenodd' },
			'<path id="w0" d="M1 2L3 4Z" fill="#fff0b8" fill-rule="evenodd"/>'
		],
		[
			'a turned text',
			{
				type: 'text',
				role: 'text',
				text: '10 k\u2126 <&>',
				x: 10,
				y: 20,
				cap: 2.5,
				face: 'semibold',
				fill: '#13233f',
				anchor: 'middle',
				angle: -45
			},
			'<text data-role="text" x="10" y="20" font-size="3.571" font-weight="600" fill="#13233f" text-anchor="middle" transform="rotate(-45 10 20)">10 kΩ &lt;&amp;&gt;</text>'
		],
		[
			'a labelled group',
			{ type: 'group', role: 'choice', label: 'Choice "330 nF"', items: [] },
			'<g data-role="choice" role="img" aria-label="Choice &quot;330 nF&quot;">'
		]
	])('writes %s', (_, item, expected) => {
		expect(marks(toSvg(scene([item])))).toEqual([expected]);
	});

	it('keeps spaces that SVG would drop or join', () => {
		const text: Item = {
			type: 'text',
			text: ' a  b c ',
			x: 0,
			y: 0,
			cap: 1,
			face: 'bold',
			fill: '#000000',
			anchor: 'end'
		};
		expect(toSvg(scene([text]))).toContain('>\u00a0a \u00a0b c\u00a0</text>');
	});

	it('refuses a place that is no number', () => {
		const path: Item = { type: 'path', d: { ops: 'ML', at: [0, 0, NaN, 1] } };
		expect(() => toSvg(scene([path]))).toThrow(RangeError);
	});

	it('writes one mark for each item, and no style attribute', () => {
		fc.assert(
			fc.property(fc.array(fc.nat(), { maxLength: 20 }), (seeds) => {
				const drawing = specimen(seeds);
				const count = (items: readonly Item[]): number =>
					items.reduce((sum, item) => sum + 1 + (item.type === 'group' ? count(item.items) : 0), 0);
				const svg = toSvg(drawing);
				expect(marks(svg)).toHaveLength(count(drawing.items));
				expect(svg).not.toMatch(/\sstyle=/);
				expect(toSvg(structuredClone(drawing))).toBe(svg);
			})
		);
	});

	it('embeds rules for faces only when it is given them', () => {
		expect(toSvg(specimen([]))).not.toContain('<style>');
		expect(toSvg(specimen([]), { fontCss: '@font-face{}' })).toContain('<style>@font-face{}</style>');
	});
});
