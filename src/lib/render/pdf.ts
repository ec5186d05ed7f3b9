/** Writes scenes as one PDF file, a page each, fit for the archive (PDF/A-1b) and the same to the byte each time. */
import { PDFContext, PDFHexString, PDFString, PDFWriter, type PDFRawStream, type PDFRef } from 'pdf-lib';
import type { Face, Scene } from '$lib/scene/scene';
import { fileIdentifier, writeFacts, writeOutputIntent, type DocumentFacts } from './pdf-archive';
import { faceNames, gatherCharacters, pageContent, POINTS_PER_MM, type Encode } from './pdf-content';
import { embedSubset, packSubset, type FontSet, type PackedSubset } from './pdf-font';

const faces = ['regular', 'medium', 'semibold', 'bold'] as const;

type Subsets = Partial<Record<Face, PackedSubset>>;

const subsetsOf = (scenes: readonly Scene[], fonts: FontSet): Subsets => {
	const characters = {
		regular: new Set<number>(),
		medium: new Set<number>(),
		semibold: new Set<number>(),
		bold: new Set<number>()
	};
	for (const scene of scenes) gatherCharacters(scene.items, characters);
	const subsets: Subsets = {};
	for (const face of faces) {
		const codes = [...characters[face]].sort((a, b) => a - b);
		if (codes.length > 0) subsets[face] = packSubset(fonts[face], codes);
	}
	return subsets;
};

const encoderOf =
	(subsets: Subsets): Encode =>
	(text, face) => {
		let codes = '';
		for (const character of text) {
			const glyph = subsets[face]?.subset.characters.get(character.codePointAt(0) ?? 0) ?? 0;
			codes += glyph.toString(16).padStart(4, '0');
		}
		return codes;
	};

const points = (length: number): number => Number((length * POINTS_PER_MM).toFixed(4));

interface Pages {
	readonly context: PDFContext;
	readonly parent: PDFRef;
	readonly resources: PDFRef;
}

const writePage = ({ context, parent, resources }: Pages, scene: Scene, content: PDFRawStream): PDFRef =>
	context.register(
		context.obj({
			Type: 'Page',
			Parent: parent,
			MediaBox: [0, 0, points(scene.width), points(scene.height)],
			Resources: resources,
			Contents: context.register(content)
		})
	);

const writeResources = (context: PDFContext, subsets: Subsets, fonts: FontSet): PDFRef => {
	const dictionary: Record<string, PDFRef> = {};
	for (const face of faces) {
		const subset = subsets[face];
		if (subset !== undefined) dictionary[faceNames[face]] = embedSubset(context, fonts[face], subset);
	}
	return context.register(context.obj({ Font: dictionary }));
};

/**
 * Writes scenes as a PDF file: real text in embedded subsets, paper at its exact size, no scaling when printed.
 * @param scenes one drawing, or one for each page
 * @param fonts the four faces
 * @param options title (else the first scene's), author, creation date in UTC (else 2000-01-01T00:00:00Z)
 * @returns the bytes of the file; the same input gives the same bytes
 * @throws RangeError without a scene, or for a character that no face has
 * @example await toPdf(scene, fonts) // starts with '%PDF-1.4'
 * Source: PDF Reference 1.4; ISO 19005-1:2005, level B.
 */
export async function toPdf(
	scenes: Scene | readonly Scene[],
	fonts: FontSet,
	options: Partial<DocumentFacts> = {}
): Promise<Uint8Array> {
	const all = 'items' in scenes ? [scenes] : scenes;
	const [first] = all;
	if (first === undefined) throw new RangeError('a PDF file needs at least one scene');
	const facts = { title: first.title, author: '', creationDate: '2000-01-01T00:00:00Z', ...options };
	const context = PDFContext.create();
	const subsets = subsetsOf(all, fonts);
	const encode = encoderOf(subsets);
	const text = new TextEncoder();
	const contents = all.map((scene) => context.flateStream(text.encode(pageContent(scene, encode))));
	const parent = context.nextRef();
	const pages = { context, parent, resources: writeResources(context, subsets, fonts) };
	const kids = contents.map((content, index) => writePage(pages, all[index] ?? first, content));
	context.assign(parent, context.obj({ Type: 'Pages', Kids: kids, Count: kids.length }));
	const { info, metadata } = writeFacts(context, facts);
	const catalogue = context.obj({
		Type: 'Catalog',
		Pages: parent,
		Lang: PDFString.of(first.language),
		Metadata: metadata,
		OutputIntents: [writeOutputIntent(context)],
		ViewerPreferences: { PrintScaling: 'None', PickTrayByPDFSize: true, DisplayDocTitle: true }
	});
	const identifier = PDFHexString.of(
		fileIdentifier([
			...contents.map(({ contents: bytes }) => bytes),
			...all.map(({ width, height, language }) => `${String(width)} ${String(height)} ${language}`),
			JSON.stringify(facts)
		])
	);
	context.trailerInfo = {
		Root: context.register(catalogue),
		Info: info,
		ID: context.obj([identifier, identifier])
	};
	const bytes = await PDFWriter.forContext(context, Infinity).serializeToBuffer();
	// pdf-lib writes %PDF-1.7 whatever the file needs; only the last figure differs.
	bytes[7] = 0x34;
	return bytes;
}
