import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { PDFArray, PDFDict, PDFDocument, PDFName, PDFRawStream, decodePDFRawStream } from 'pdf-lib';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Item } from '$lib/scene/scene';
import { toPdf } from './pdf';
import { cidSet, toUnicode, type FontSet } from './pdf-font';
import { specimen } from './specimen';
import { readTrueType, viewOf } from './truetype';

let fonts: FontSet;
beforeAll(() => {
	const face = (name: string) => readTrueType(readFileSync(`static/fonts/barlow-sheet-${name}.ttf`));
	fonts = {
		regular: face('regular'),
		medium: face('medium'),
		semibold: face('semibold'),
		bold: face('bold')
	};
});

const streams = async (bytes: Uint8Array): Promise<PDFRawStream[]> => {
	const document = await PDFDocument.load(bytes, { updateMetadata: false });
	return document.context
		.enumerateIndirectObjects()
		.flatMap(([, object]) => (object instanceof PDFRawStream ? [object] : []));
};
const decoded = (stream: PDFRawStream): Uint8Array => decodePDFRawStream(stream).decode();
const latin = (bytes: Uint8Array): string => Buffer.from(bytes).toString('latin1');
const content = async (bytes: Uint8Array): Promise<string> => {
	const texts = (await streams(bytes)).map((stream) => latin(decoded(stream)));
	return texts.find((text) => text.startsWith('.0283465')) ?? '';
};
const programOf = (descriptor: PDFDict): Uint8Array =>
	decoded(descriptor.lookup(PDFName.of('FontFile2')) as PDFRawStream);
const leaves = (items: readonly Item[]): Item[] =>
	items.flatMap((item) => (item.type === 'group' ? leaves(item.items) : [item]));

const all = [...Array(48).keys()];

describe('toPdf', () => {
	it('is PDF 1.4 with a binary comment, of the exact paper', async () => {
		const bytes = await toPdf(specimen(all), fonts);
		expect(latin(bytes.subarray(0, 9))).toBe('%PDF-1.4\n');
		expect([...bytes.subarray(10, 14)].every((byte) => byte >= 128)).toBe(true);
		expect(latin(bytes)).toContain('/MediaBox [ 0 0 841.8898 595.2756 ]');
		expect(latin(bytes)).not.toContain('/ObjStm');
	});

	it.each([
		[297, 210, '841.8898 595.2756'],
		[420, 297, '1190.5512 841.8898'],
		[279.4, 215.9, '792 612'],
		[431.8, 279.4, '1224 792'],
		[210, 297, '595.2756 841.8898']
	])('gives %d × %d mm its size in points', async (width, height, box) => {
		const bytes = await toPdf({ ...specimen([1]), width, height }, fonts);
		expect(latin(bytes)).toContain(`/MediaBox [ 0 0 ${box} ]`);
		expect(await content(bytes)).toContain(` 0 ${box.split(' ')[1] ?? ''} cm\n`);
	});

	it('paints once for each path and shows once for each text', async () => {
		await fc.assert(
			fc.asyncProperty(fc.array(fc.nat(), { maxLength: 20 }), async (seeds) => {
				const drawing = specimen(seeds);
				const items = leaves(drawing.items);
				const commands = (await content(await toPdf(drawing, fonts))).split('\n');
				const painted = commands.filter((command) => /^(?:S|f\*?|B\*?)$/.test(command));
				expect(painted).toHaveLength(items.filter(({ type }) => type === 'path').length);
				const shown = commands.filter((command) => command.endsWith(' Tj'));
				expect(shown).toHaveLength(items.filter(({ type }) => type === 'text').length);
			}),
			{ numRuns: 30 }
		);
	});

	it('gives the same bytes for the same drawing, and others for another', async () => {
		const bytes = await toPdf(specimen(all), fonts, { author: 'A. Person' });
		const again = await toPdf(structuredClone(specimen(all)), { ...fonts }, { author: 'A. Person' });
		expect(Buffer.compare(bytes, again)).toBe(0);
		const identifier = (file: Uint8Array) => /\/ID \[ <(\w{32})> <\1> \]/.exec(latin(file))?.[1];
		expect(identifier(bytes)).toMatch(/^[0-9a-f]{32}$/);
		expect(identifier(await toPdf(specimen(all), fonts))).not.toBe(identifier(bytes));
	});

	it('puts several drawings in one file and shares their faces', async () => {
		const bytes = await toPdf([specimen(all), { ...specimen([1, 2]), width: 420, height: 297 }], fonts);
		const document = await PDFDocument.load(bytes, { updateMetadata: false });
		expect(document.getPages().map((page) => Math.round(page.getWidth()))).toEqual([842, 1191]);
		expect(latin(bytes).match(/\/FontFile2/g)).toHaveLength(4);
	});

	it('says the same in its information and in XMP', async () => {
		const title = 'Ω & <µ>';
		const bytes = await toPdf(specimen([0]), fonts, {
			title,
			author: 'Ä',
			creationDate: '2026-03-04T05:06:07Z'
		});
		const document = await PDFDocument.load(bytes, { updateMetadata: false });
		expect(document.getTitle()).toBe(title);
		expect(document.getAuthor()).toBe('Ä');
		expect(latin(bytes)).toContain('/CreationDate (D:20260304050607Z)');
		const packet = (await streams(bytes)).map((stream) => Buffer.from(decoded(stream)).toString('utf8'));
		const xmp = packet.find((text) => text.startsWith('<?xpacket')) ?? '';
		expect(xmp).toContain('Ω &amp; &lt;µ&gt;');
		expect(xmp).toContain('<xmp:CreateDate>2026-03-04T05:06:07Z</xmp:CreateDate>');
	});

	it('embeds each face with a matching set of glyphs, widths and a map back to Unicode', async () => {
		const bytes = await toPdf(specimen(all), fonts);
		const document = await PDFDocument.load(bytes, { updateMetadata: false });
		const dictionaries = document.context
			.enumerateIndirectObjects()
			.flatMap(([, object]) => (object instanceof PDFDict ? [object] : []));
		const ofType = (type: string) =>
			dictionaries.filter((entry) => entry.get(PDFName.of('Type')) === PDFName.of(type));
		const descriptors = ofType('FontDescriptor');
		expect(descriptors).toHaveLength(4);
		for (const descriptor of descriptors) {
			const glyphs = viewOf(readTables(programOf(descriptor), 'maxp')).getUint16(4);
			const set = (descriptor.lookup(PDFName.of('CIDSet')) as PDFRawStream).contents;
			expect([...set]).toEqual([...cidSet(glyphs)]);
			expect(String(descriptor.get(PDFName.of('FontName')))).toMatch(/^\/[A-Z]{6}\+BarlowSheet-/);
		}
		const descendants = dictionaries.filter((entry) => entry.has(PDFName.of('CIDToGIDMap')));
		expect(descendants).toHaveLength(4);
		for (const descendant of descendants) {
			const descriptor = descendant.lookup(PDFName.of('FontDescriptor'), PDFDict);
			const metrics = viewOf(readTables(programOf(descriptor), 'hmtx'));
			const [first, list] = descendant.lookup(PDFName.of('W'), PDFArray).asArray();
			expect(String(first)).toBe('0');
			const widths = String(list).replace(/[[\]]/g, '').trim().split(' ').map(Number);
			expect(widths).toEqual(widths.map((_, glyph) => metrics.getUint16(4 * glyph)));
		}
	});

	it('refuses a character that no face has, by its number', async () => {
		const drawing = specimen([0]);
		const [item] = drawing.items;
		const items = item?.type === 'text' ? [{ ...item, text: 'R ∥ C' }] : [];
		await expect(toPdf({ ...drawing, items }, fonts)).rejects.toThrow('U+2225');
	});

	it('refuses no drawings, a colour it cannot read, and a date in another form', async () => {
		await expect(toPdf([], fonts)).rejects.toThrow(RangeError);
		await expect(toPdf(specimen([]), fonts, { creationDate: 'today' })).rejects.toThrow('today');
		const items: Item[] = [{ type: 'path', d: { ops: 'ML', at: [0, 0, 1, 1] }, fill: 'red' }];
		await expect(toPdf({ ...specimen([]), items }, fonts)).rejects.toThrow('red');
	});
});

/** A table of a TrueType file. */
function readTables(file: Uint8Array, tag: string): Uint8Array {
	const view = viewOf(file);
	for (let entry = 12; entry < 12 + 16 * view.getUint16(4); entry += 16) {
		if (latin(file.subarray(entry, entry + 4)) !== tag) continue;
		const offset = view.getUint32(entry + 8);
		return file.subarray(offset, offset + view.getUint32(entry + 12));
	}
	throw new RangeError(`no table ${tag}`);
}

describe('toUnicode', () => {
	it('joins runs, never across the last byte', () => {
		const map = toUnicode(
			new Map([
				[0x41, 1],
				[0x42, 2],
				[0x43, 3],
				[0x3a9, 4],
				[0xff, 5],
				[0x100, 6],
				[0x1f44d, 7]
			])
		);
		expect(map).toContain(
			'5 beginbfrange\n<0001><0003><0041>\n<0004><0004><03A9>\n<0005><0005><00FF>\n<0006><0006><0100>\n<0007><0007><D83DDC4D>\nendbfrange'
		);
	});
});

describe('cidSet', () => {
	it.each([
		[1, [0b10000000]],
		[3, [0b11100000]],
		[8, [0xff]],
		[11, [0xff, 0b11100000]]
	])('marks %d glyphs', (count, bytes) => {
		expect([...cidSet(count)]).toEqual(bytes);
	});
});
