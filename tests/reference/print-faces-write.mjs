/** Writes the sheet's faces: `node tests/reference/print-faces-write.mjs`. */
import { writeFileSync } from 'node:fs';
import subsetFont from 'subset-font';
import { openCore } from '../bench/core.mjs';

const core = await openCore();
const { makeFace } = await core.load('tests/reference/print-faces.ts');
const { CHARACTERS } = await core.load('src/lib/scene/barlow.ts');
for (const face of ['regular', 'medium', 'semibold', 'bold']) {
	const bytes = Buffer.from(makeFace(face));
	const packed = await subsetFont(bytes, CHARACTERS, { targetFormat: 'woff2' });
	writeFileSync(`static/fonts/barlow-sheet-${face}.ttf`, bytes);
	writeFileSync(`static/fonts/barlow-sheet-${face}.woff2`, packed);
	console.log(face, bytes.length, packed.length);
}
await core.close();
