/**
 * Makes the sheet's own faces from Barlow as published: figures of equal width in place of the proportional ones,
 * no hinting, no kerning, no ligatures, so that every program that draws them agrees with the table of widths.
 * Barlow reserves no font name; its licence, OFL 1.1, lies beside the files.
 */
import { readFileSync } from 'node:fs';
import fontkit from '@pdf-lib/fontkit';
import { subsetFace } from '../../src/lib/render/subset';
import { readTrueType } from '../../src/lib/render/truetype';
import { webTables } from '../../src/lib/render/webface';
import { CHARACTERS } from '../../src/lib/scene/barlow';
import type { Face } from '../../src/lib/scene/scene';

const package_ = 'node_modules/@expo-google-fonts/barlow';
const sources: Readonly<Record<Face, { file: string; style: string; standard: boolean }>> = {
	regular: { file: '400Regular/Barlow_400Regular.ttf', style: 'Regular', standard: true },
	medium: { file: '500Medium/Barlow_500Medium.ttf', style: 'Medium', standard: false },
	semibold: { file: '600SemiBold/Barlow_600SemiBold.ttf', style: 'SemiBold', standard: false },
	bold: { file: '700Bold/Barlow_700Bold.ttf', style: 'Bold', standard: true }
};

/** Spellings that are drawn as another character. */
const twins: readonly (readonly [number, number])[] = [
	[0x2126, 0x3a9],
	[0x3bc, 0xb5],
	[0x2011, 0x2d],
	[0x2009, 0xa0],
	[0x202f, 0xa0]
];

const namesOf = (face: Face): [number, string][] => {
	const { style, standard } = sources[face];
	const names: [number, string][] = [
		[0, 'Copyright 2017 The Barlow Project Authors (https://github.com/jpt/barlow)'],
		[1, standard ? 'Barlow Sheet' : `Barlow Sheet ${style}`],
		[2, standard ? style : 'Regular'],
		[3, `1.408;herringbone;BarlowSheet-${style}`],
		[4, `Barlow Sheet ${style}`],
		[5, 'Version 1.408'],
		[6, `BarlowSheet-${style}`],
		[13, 'This Font Software is licensed under the SIL Open Font License, Version 1.1.'],
		[14, 'https://openfontlicense.org']
	];
	return standard ? names : [...names, [16, 'Barlow Sheet'], [17, style]];
};

interface Laid {
	readonly glyphs: readonly { readonly id: number; readonly advanceWidth: number }[];
}

/** The published face, as another reader of fonts sees it. */
export function publishedFace(face: Face) {
	const bytes = readFileSync(`${package_}/${sources[face].file}`);
	const reader = fontkit.create(bytes) as unknown as {
		layout(text: string, features: readonly string[]): Laid;
		readonly characterSet: readonly number[];
	};
	return { bytes: new Uint8Array(bytes), reader };
}

/** @returns advance widths of the characters in the published face, figures of equal width [1/1000 of the font size] */
export function widthsOf(face: Face): number[] {
	const { reader } = publishedFace(face);
	return [...CHARACTERS].map(
		(character) => reader.layout(character, /\d/.test(character) ? ['tnum'] : []).glyphs[0]?.advanceWidth ?? 0
	);
}

/** @returns the sheet's cut of a face, a TrueType file */
export function makeFace(face: Face): Uint8Array {
	const { bytes, reader } = publishedFace(face);
	const font = readTrueType(bytes);
	const characters = new Map<number, number>();
	for (const character of CHARACTERS) {
		const code = character.codePointAt(0) ?? 0;
		const features = /\d/.test(character) ? ['tnum'] : [];
		characters.set(code, reader.layout(character, features).glyphs[0]?.id ?? 0);
	}
	for (const [code, twin] of twins) characters.set(code, characters.get(twin) ?? 0);
	return subsetFace(font, characters, webTables(font, namesOf(face))).bytes;
}
