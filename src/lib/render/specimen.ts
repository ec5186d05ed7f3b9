/** Drawings of every kind of item, made from numbers: what the tests of both writers draw. */
import type { Face, Item, Scene } from '$lib/scene/scene';

const faces: readonly Face[] = ['regular', 'medium', 'semibold', 'bold'];
const texts = ['10 kΩ', '2.2 µF ±10 %', 'Größe', '≤ 126 kHz', 'π·√(L·C)', '−14.9 %'] as const;
const anchors = ['start', 'middle', 'end'] as const;
const colours = ['#13233f', '#96231c', '#000000', '#ffd65c'] as const;

const pick = <Value>(values: readonly [Value, ...Value[]] | readonly Value[], seed: number): Value =>
	values[seed % values.length] as Value;

const makers: readonly ((seed: number, x: number, y: number) => Item)[] = [
	(seed, x, y) => ({
		type: 'text',
		role: 'text',
		text: pick(texts, seed),
		x,
		y,
		cap: 2.5,
		face: pick(faces, seed),
		fill: pick(colours, seed),
		anchor: pick(anchors, seed),
		...(seed % 2 === 0 ? {} : { angle: (seed * 37) % 360 })
	}),
	(seed, x, y) => ({
		type: 'path',
		role: 'grid',
		d: { ops: 'MLML', at: [x, y, x + 20, y + 3, x, y + 5, x + 17, y - (seed % 9)] },
		stroke: { colour: pick(colours, seed), width: 0.35, dash: seed % 2 === 0 ? [] : [2, 1] }
	}),
	(seed, x, y) => ({
		type: 'path',
		role: 'window',
		d: { ops: 'MLCZ', at: [x, y, x + 9, y, x + 9, y + 4, x + 5, y + 8, x, y + 8] },
		fill: pick(colours, seed),
		...(seed % 2 === 0 ? {} : { fillRule: 'evenodd' as const, stroke: { colour: '#13233f', width: 0.5 } })
	}),
	(seed, x, y) => ({
		type: 'group',
		role: 'band',
		of: 'share',
		label: 'Share of C',
		items: [
			{
				type: 'path',
				d: { ops: 'ML', at: [x, y, x + (seed % 30), y + 2] },
				stroke: { colour: pick(colours, seed), width: 0.18, cap: 'round', join: 'round' }
			}
		]
	})
];

/**
 * Makes a drawing on A4 with one item, or one group, for each number.
 * @param seeds whole numbers ≥ 0, which choose kind, text, colour and place
 * @returns the drawing
 * @example specimen([0, 1, 2, 3]).items.length // 4
 */
export function specimen(seeds: readonly number[]): Scene {
	return {
		width: 297,
		height: 210,
		title: 'Ω and µ, Größe',
		description: 'A drawing of every kind of item.',
		language: 'en',
		metadata: { kind: 'worked' },
		items: seeds.map((seed, index) =>
			pick(makers, seed)(seed >> 2, 20 + ((index * 61 + seed) % 240), 20 + ((index * 37 + seed) % 170))
		)
	};
}
