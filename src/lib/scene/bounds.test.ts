import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cornersOfBox, itemBounds, overlaps, textBox, type OrientedBox } from './bounds';
import { textWidth } from './metrics';
import type { Item, TextItem } from './scene';

const text = (more: Partial<TextItem> = {}): TextItem => ({
	type: 'text',
	text: '2.2 µF',
	x: 50,
	y: 40,
	cap: 2.5,
	face: 'bold',
	fill: '#000000',
	anchor: 'start',
	...more
});
const box = (more: Partial<OrientedBox> = {}): OrientedBox => ({
	x: 0,
	y: 0,
	along: 2,
	across: 1,
	cos: 1,
	sin: 0,
	...more
});
const turned = (degrees: number) => ({
	cos: Math.cos((degrees * Math.PI) / 180),
	sin: Math.sin((degrees * Math.PI) / 180)
});

describe('textBox', () => {
	const width = textWidth('2.2 µF', 'bold', 2.5);
	it.each([
		['start', 50 + width / 2],
		['middle', 50],
		['end', 50 - width / 2]
	] as const)('is centred for the anchor %s', (anchor, x) => {
		const { x: centre, y, along, across } = textBox(text({ anchor }));
		expect(centre).toBeCloseTo(x, 9);
		expect(along).toBeCloseTo(width / 2, 9);
		expect(y + across).toBeCloseTo(40 + 0.32 * 2.5, 9);
		expect(y - across).toBeCloseTo(40 - 1.15 * 2.5, 9);
	});

	it('turns clockwise about the anchor', () => {
		const { x, y } = textBox(text({ angle: 90 }));
		expect(y).toBeCloseTo(40 + width / 2, 9);
		expect(x).toBeGreaterThan(50);
	});

	it('adds its clearance on all sides', () => {
		expect(textBox(text(), 0.55).along - textBox(text()).along).toBeCloseTo(0.55, 9);
		expect(textBox(text(), 0.55).across - textBox(text()).across).toBeCloseTo(0.55, 9);
	});
});

describe('overlaps', () => {
	it.each([
		['one on the other', box(), box({ x: 1 }), true],
		['edge to edge', box(), box({ x: 4 }), false],
		['a hair inside', box(), box({ x: 3.999 }), true],
		[
			'upright bounds touch but corners do not',
			box({ along: 5 }),
			box({ x: 5, y: 5, along: 5, ...turned(45) }),
			true
		],
		[
			'long ones side by side at 45°',
			box({ along: 9, ...turned(45) }),
			box({ x: 2.5, along: 9, ...turned(45) }),
			true
		],
		[
			'clear of each other at 45°',
			box({ along: 9, ...turned(45) }),
			box({ x: 3, y: -1, along: 9, ...turned(45) }),
			false
		]
	])('tells %s', (_, a, b, expected) => {
		expect(overlaps(a, b)).toBe(expected);
		expect(overlaps(b, a)).toBe(expected);
	});

	it('holds wherever a corner of one lies within the other', () => {
		const value = fc.double({ min: -10, max: 10, noNaN: true });
		const size = fc.double({ min: 0.1, max: 10, noNaN: true });
		const any = fc
			.record({ x: value, y: value, along: size, across: size, turn: fc.integer({ min: 0, max: 359 }) })
			.map(({ turn, ...rest }) => ({ ...rest, ...turned(turn) }));
		fc.assert(
			fc.property(any, any, (a, b) => {
				const corners = cornersOfBox(b);
				const inside = [0, 2, 4, 6].some((i) => {
					const [x, y] = [(corners[i] ?? 0) - a.x, (corners[i + 1] ?? 0) - a.y];
					const [u, v] = [x * a.cos + y * a.sin, y * a.cos - x * a.sin];
					return Math.abs(u) < a.along - 1e-9 && Math.abs(v) < a.across - 1e-9;
				});
				expect(inside && !overlaps(a, b)).toBe(false);
			})
		);
	});
});

describe('itemBounds', () => {
	const path = (width?: number): Item => ({
		type: 'path',
		d: { ops: 'MC', at: [1, 2, 0, 3, 8, 4, 5, 6] },
		...(width === undefined ? {} : { stroke: { colour: '#000000', width } })
	});
	it.each<[string, Item, unknown]>([
		['a path without a pen', path(), { left: 0, top: 2, right: 8, bottom: 6 }],
		['a path with one', path(1), { left: -0.5, top: 1.5, right: 8.5, bottom: 6.5 }],
		['an empty path', { type: 'path', d: { ops: '', at: [] } }, null],
		['an empty group', { type: 'group', items: [] }, null],
		[
			'a group',
			{
				type: 'group',
				items: [
					path(),
					{ type: 'path', d: { ops: 'ML', at: [20, -5, 21, -4] } },
					{ type: 'group', items: [] }
				]
			},
			{ left: 0, top: -5, right: 21, bottom: 6 }
		]
	])('holds %s', (_, item, expected) => {
		expect(itemBounds(item)).toEqual(expected);
	});

	it('holds a turned text', () => {
		const bounds = itemBounds(text({ angle: -90 }));
		expect(bounds?.bottom).toBeCloseTo(40, 9);
		expect(bounds?.right).toBeCloseTo(50 + 0.32 * 2.5, 9);
	});
});
