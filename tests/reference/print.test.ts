/** The sheets as other programs read them: Apache PDFBox Preflight, qpdf, poppler, resvg's XML reader, Chromium. */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Resvg } from '@resvg/resvg-js';
import { arc, line, type CanvasPath_D3Shape } from 'd3-shape';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { chargerAuxiliary } from '../../src/lib/design/examples';
import { toPdf } from '../../src/lib/render/pdf';
import { toSvg } from '../../src/lib/render/svg';
import { normaliseText, textWidth } from '../../src/lib/scene/metrics';
import { PathBuilder } from '../../src/lib/scene/path';
import type { Item, PathItem, Scene, TextItem } from '../../src/lib/scene/scene';
import { embeddedFontCss, sheetFonts } from '../../src/lib/server/fonts';
import { composeSheet } from '../../src/lib/sheet/compose';
import { launchChromium } from '../browser/chromium';
import { composeCase, findCase, sheetCases, TITLE } from './print-sheets';

const jars = [
	'preflight',
	'pdfbox2',
	'fontbox2',
	'xmpbox',
	'commons-logging',
	'javax.activation',
	'jaxb-api'
];
const classPath = jars.map((jar) => `/usr/share/java/${jar}.jar`).join(':');

let folder = '';
const file = (name: string): string => join(folder, `${name}.pdf`);
const pdfOf = (scene: Scene, author = ''): Promise<Uint8Array> => toPdf(scene, sheetFonts(), { author });

/** One run of Java for all files of the folder: a verdict is written beside each. */
const preflight = (): Map<string, string> => {
	const validator = 'org.apache.pdfbox.preflight.Validator_A1b';
	execFileSync('java', ['-cp', classPath, validator, 'xml', 'batch', folder], { stdio: 'pipe' });
	const verdicts = readdirSync(folder).filter((name) => name.endsWith('.preflight.xml'));
	return new Map(
		verdicts.map((name) => {
			const verdict = readFileSync(join(folder, name), 'utf8');
			const valid = verdict.includes('<isValid type="PDF/A1-b">true</isValid>');
			return [name.replace('.pdf.preflight.xml', ''), valid ? 'valid' : verdict];
		})
	);
};

const leaves = (items: readonly Item[]): (PathItem | TextItem)[] =>
	items.flatMap((item) => (item.type === 'group' ? leaves(item.items) : [item]));
const textsOf = (items: readonly Item[]): string[] =>
	leaves(items).flatMap((item) => (item.type === 'text' ? [normaliseText(item.text)] : []));

describe('the sheet of every paper, orientation, kind and ink', () => {
	let verdicts = new Map<string, string>();
	beforeAll(async () => {
		folder = mkdtempSync(join(tmpdir(), 'herringbone-print-'));
		for (const sheet of sheetCases)
			writeFileSync(file(sheet.name), await pdfOf(composeCase(sheet), 'Å. Ødegård'));
		const good = readFileSync(file('A4-landscape-blank-colour-charger'), 'latin1');
		writeFileSync(file('broken'), good.replaceAll('/CIDToGIDMap', '/CIDToGIDMop'), 'latin1');
		verdicts = preflight();
	});
	afterAll(() => rmSync(folder, { recursive: true, force: true }));

	it.each(sheetCases.map(({ name }) => name))('%s is PDF/A-1b to PDFBox Preflight', (name) => {
		expect(verdicts.get(name)).toBe('valid');
	});

	it('is told from a broken one', () => {
		expect(verdicts.get('broken')).toContain('mandatory CIDToGIDMap missing');
	});

	it('has sound syntax to qpdf', () => {
		for (const { name } of sheetCases) {
			const report = execFileSync('qpdf', ['--check', file(name)], { encoding: 'utf8' });
			expect(report, name).toContain('PDF Version: 1.4');
			expect(report, name).toContain('No syntax or stream encoding errors found');
		}
	});

	it.each([
		'A4-landscape-worked-colour-charger',
		'A3-portrait-worked-mono-servo',
		'A4-landscape-blank-mono-avionics'
	])('%s gives back all its text to pdftotext', (name) => {
		const squeeze = (text: string): string => text.normalize('NFC').replaceAll(/\s/g, '');
		const text = squeeze(execFileSync('pdftotext', ['-raw', file(name), '-'], { encoding: 'utf8' }));
		expect(text).toContain('Ω');
		expect(text).toContain('µ');
		const scene = composeCase(findCase(name));
		const count = (characters: string): Map<string, number> => {
			const counts = new Map<string, number>();
			for (const character of characters) counts.set(character, (counts.get(character) ?? 0) + 1);
			return counts;
		};
		// Turned lettering comes letter by letter, so letters are counted, and level lines are looked for.
		expect(count(text)).toEqual(count(squeeze(textsOf(scene.items).join(''))));
		expect(text).toContain(squeeze('Elverholm Ladeteknikk'));
	});

	it('names itself by its title', () => {
		const facts = execFileSync('pdfinfo', [file('A4-landscape-worked-colour-charger')], { encoding: 'utf8' });
		expect(facts).toContain(composeCase(findCase('A4-landscape-worked-colour-charger')).title);
		expect(facts).toMatch(/Page size: +841\.89 x 595\.276 pts \(A4\)/);
		const text = execFileSync('pdftotext', [file('A4-landscape-worked-colour-charger'), '-'], {
			encoding: 'utf8'
		});
		expect(text.replaceAll(/\s+/g, ' ')).toContain(TITLE);
	});

	it('holds an A4 sheet in 40 KB', async () => {
		const layout = { paper: 'A4', orientation: 'landscape' } as const;
		const scene = composeSheet({ design: chargerAuxiliary, layout, kind: 'worked' });
		expect((await pdfOf(scene)).length).toBeLessThanOrEqual(40 * 1024);
	});

	it('is the same to the byte in Tokyo', async () => {
		const before = process.env['TZ'];
		process.env['TZ'] = 'Asia/Tokyo';
		try {
			expect(new Date(2000, 0, 1).getTimezoneOffset()).toBe(-540);
			const name = 'A4-landscape-worked-colour-charger';
			const again = await pdfOf(composeCase(findCase(name)), 'Å. Ødegård');
			expect(Buffer.compare(again, readFileSync(file(name)))).toBe(0);
		} finally {
			if (before === undefined) delete process.env['TZ'];
			else process.env['TZ'] = before;
		}
	});
});

describe('SVG', () => {
	it('stays well formed whatever the texts are', () => {
		const hostile = fc.oneof(
			fc.string({ unit: 'binary' }),
			fc.string({ unit: 'grapheme' }),
			fc.constantFrom(']]>', '<script>', '"\'&#0;', '</text>', '\u0000\ud800', '&amp;', '<!--')
		);
		const page: Scene = { ...composeCase(findCase('A4-landscape-blank-colour-charger')), items: [] };
		fc.assert(
			fc.property(hostile, hostile, hostile, (title, text, of) => {
				const svg = toSvg({
					...page,
					title,
					description: text,
					metadata: { [of]: text },
					items: [
						{ type: 'group', of, label: title, id: text, items: [] },
						{ type: 'text', text, x: 1, y: 2, cap: 2.5, face: 'bold', fill: '#000000', anchor: 'start' }
					]
				});
				// resvg reads XML strictly and refuses a document that is not well formed.
				expect(() => new Resvg(svg, { font: { loadSystemFonts: false } })).not.toThrow();
			}),
			{ numRuns: 150 }
		);
		expect(() => new Resvg('<svg xmlns="http://www.w3.org/2000/svg" a="<"/>')).toThrow();
	});

	it('stands alone: its faces are in it, and nothing is fetched', () => {
		const scene = composeCase(findCase('A4-landscape-worked-colour-charger'));
		const svg = toSvg(scene, { fontCss: embeddedFontCss(scene) });
		expect(svg.match(/@font-face/g)?.length).toBeGreaterThanOrEqual(3);
		expect(svg.replaceAll('http://www.w3.org/2000/svg', '')).not.toMatch(/https?:/);
		expect(toSvg(scene, { fontCss: embeddedFontCss(scene) })).toBe(svg);
	});
});

describe('Chromium', () => {
	it('sets every text of the sheet as wide as the table of widths says', async () => {
		const scene = composeCase(findCase('A4-landscape-worked-colour-charger'));
		const svg = toSvg(scene, { fontCss: embeddedFontCss(scene) });
		const browser = await launchChromium();
		try {
			const page = await browser.newPage();
			await page.setContent(`<!doctype html>${svg}`);
			const found = await page.evaluate(async () => {
				await document.fonts.ready;
				const faces = [...document.fonts].filter((face) => face.status === 'loaded').length;
				const texts = [...document.querySelectorAll('text')];
				return { faces, lengths: texts.map((text) => text.getComputedTextLength()) };
			});
			const items = leaves(scene.items).filter((item) => item.type === 'text');
			expect(found.faces).toBe(new Set(items.map(({ face }) => face)).size);
			expect(found.lengths).toHaveLength(items.length);
			items.forEach(({ text, face, cap }, index) => {
				const width = textWidth(text, face, cap);
				expect(Math.abs((found.lengths[index] ?? NaN) - width), text).toBeLessThan(0.01 + 0.001 * width);
			});
		} finally {
			await browser.close();
		}
	});
});

describe('PathBuilder', () => {
	it('serves as the context of d3-shape', () => {
		const path = new PathBuilder();
		const context: CanvasPath_D3Shape = path;
		line().context(context as CanvasRenderingContext2D)([
			[0, 0],
			[5, 1]
		]);
		arc().context(context as CanvasRenderingContext2D)({
			innerRadius: 1,
			outerRadius: 2,
			startAngle: 0,
			endAngle: 1
		});
		expect(path.data().ops).toBe('MLMCLCZ');
	});
});
