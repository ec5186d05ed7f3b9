/** SVG and PDF are one picture: both drawn at 150 dpi by programs of different make, blurred alike and compared. */
import { Resvg } from '@resvg/resvg-js';
import pixelmatch from 'pixelmatch';
import { getDocument, type PDFPageProxy } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { describe, expect, it } from 'vitest';
import { toPdf } from '../../src/lib/render/pdf';
import { toSvg } from '../../src/lib/render/svg';
import type { Item, PathItem, Scene } from '../../src/lib/scene/scene';
import { sheetFonts } from '../../src/lib/server/fonts';
import { composeCase, findCase } from './print-sheets';

const DPI = 150;
/** Pixels that may differ in all, and in any square of 32. */
const GATE = { all: 60, square: 20 } as const;

interface Picture {
	readonly width: number;
	readonly height: number;
	readonly data: Uint8ClampedArray;
}

const faces = ['regular', 'medium', 'semibold', 'bold'].map(
	(face) => `static/fonts/barlow-sheet-${face}.ttf`
);

const drawSvg = (scene: Scene, width: number): Picture => {
	const image = new Resvg(toSvg(scene), {
		font: { fontFiles: faces, loadSystemFonts: false, defaultFontFamily: 'Barlow Sheet' },
		fitTo: { mode: 'width', value: width }
	}).render();
	return { width: image.width, height: image.height, data: new Uint8ClampedArray(image.pixels) };
};

interface Surface {
	readonly canvas: { readonly width: number; readonly height: number };
	readonly context: CanvasRenderingContext2D;
}

const drawPage = async (page: PDFPageProxy, create: (w: number, h: number) => Surface): Promise<Picture> => {
	const viewport = page.getViewport({ scale: DPI / 72 });
	const { context } = create(Math.round(viewport.width), Math.round(viewport.height));
	await page.render({ canvas: null, canvasContext: context, viewport }).promise;
	const { width, height } = context.canvas;
	return { width, height, data: context.getImageData(0, 0, width, height).data };
};

const drawPdf = async (scene: Scene): Promise<Picture> => {
	const data = await toPdf(scene, sheetFonts());
	const task = getDocument({ data, verbosity: 0, disableFontFace: true });
	try {
		const document = await task.promise;
		const factory = document.canvasFactory as { create(w: number, h: number): Surface };
		return await drawPage(await document.getPage(1), (w, h) => factory.create(w, h));
	} finally {
		await task.destroy();
	}
};

/** Mean of 3 × 3 pixels: evens out how programs treat edges, which is not the drawing. */
const blurred = ({ width, height, data }: Picture): Picture => {
	const row = 4 * width;
	const around = [-row, 0, row].flatMap((down) => [down - 4, down, down + 4]);
	const soft = new Uint8ClampedArray(data.length);
	for (let at = 0; at < data.length; at += 1) {
		let sum = 0;
		for (const step of around) sum += data[at + step] ?? 255;
		soft[at] = sum / 9;
	}
	return { width, height, data: soft };
};

interface Difference {
	readonly all: number;
	readonly square: number;
}

const compare = (one: Picture, other: Picture): Difference => {
	expect([other.width, other.height]).toEqual([one.width, one.height]);
	const [a, b] = [blurred(one), blurred(other)];
	const differ = (windowSize: number): number =>
		pixelmatch(a.data, b.data, undefined, a.width, a.height, { threshold: 0.2, windowSize });
	return { all: differ(Infinity), square: differ(32) };
};

const isWithin = ({ all, square }: Difference): boolean => all <= GATE.all && square <= GATE.square;

/** The same drawing with one item changed. */
const changed = (scene: Scene, find: (item: Item) => boolean, change: (item: Item) => Item): Scene => {
	let done = false;
	const walk = (item: Item): Item => {
		if (!done && find(item)) {
			done = true;
			return change(item);
		}
		return item.type === 'group' ? { ...item, items: item.items.map(walk) } : item;
	};
	const items = scene.items.map(walk);
	expect(done).toBe(true);
	return { ...scene, items };
};

/** Moved to the right and down by so much [mm]. */
const moved = (item: PathItem, by: number): PathItem => ({
	...item,
	d: { ...item.d, at: item.d.at.map((value) => value + by) }
});

const sheets = [
	'A4-landscape-worked-colour-charger',
	'A4-landscape-worked-mono-avionics',
	'A4-landscape-blank-colour-charger',
	'A3-landscape-step-colour-avionics',
	'Letter-portrait-worked-colour-servo',
	'Tabloid-portrait-worked-mono-avionics'
];

describe('SVG by resvg and PDF by pdf.js', () => {
	it.each(sheets)('are the same picture: %s', async (name) => {
		const scene = composeCase(findCase(name));
		const pdf = await drawPdf(scene);
		const difference = compare(drawSvg(scene, pdf.width), pdf);
		expect(difference, JSON.stringify(difference)).toSatisfy(isWithin);
	});

	const spoilt: [string, (item: Item) => boolean, (item: Item) => Item][] = [
		[
			'the line of L moved by 0.1 mm to the right and down',
			(item) => item.type === 'path' && item.of === 'inductor' && item.stroke?.width === 0.5,
			(item) => (item.type === 'path' ? moved(item, 0.1) : item)
		],
		[
			'one changed label',
			(item) => item.type === 'text' && item.text.includes('Ω'),
			(item) => (item.type === 'text' ? { ...item, text: item.text.replace('Ω', 'F') } : item)
		]
	];
	it.each(spoilt)('are told apart by %s', async (_, find, change) => {
		const scene = composeCase(findCase('A4-landscape-worked-colour-charger'));
		const pdf = await drawPdf(scene);
		const difference = compare(drawSvg(changed(scene, find, change), pdf.width), pdf);
		expect(difference, JSON.stringify(difference)).not.toSatisfy(isWithin);
	});
});
