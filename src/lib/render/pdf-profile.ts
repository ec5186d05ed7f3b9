/** The colour profile that says what the file's red, green and blue are: sRGB, made here from its published numbers. */

/** Colourants adapted to D50 by Bradford: X, Y, Z of red, green, blue and of the white. */
const colourants = {
	rXYZ: [0.43607, 0.22249, 0.01392],
	gXYZ: [0.38515, 0.71687, 0.09708],
	bXYZ: [0.14307, 0.06061, 0.7141],
	wtpt: [0.9642, 1, 0.8249]
} as const;

/** Points of the transfer curve; between them programs interpolate, off by under 0.0001 of full light. */
const STEPS = 64;

/** IEC 61966-2-1: from the signal to light, both 0 to 1. */
const toLight = (signal: number): number =>
	signal <= 0.04045 ? signal / 12.92 : ((signal + 0.055) / 1.055) ** 2.4;

const text = (letters: string): number[] => Array.from(letters, (letter) => letter.charCodeAt(0));
const word16 = (value: number): number[] => [(value >> 8) & 255, value & 255];
const word32 = (value: number): number[] => [...word16(value >>> 16), ...word16(value)];
const fixed = (value: number): number[] => word32(Math.round(value * 65536));

const padded = (bytes: readonly number[]): number[] => [
	...bytes,
	...new Array<number>((4 - (bytes.length % 4)) % 4).fill(0)
];

const NAME = 'sRGB IEC61966-2.1';

const tagBodies = (): [string[], number[]][] => [
	[
		['desc'],
		[
			...text('desc'),
			...word32(0),
			...word32(NAME.length + 1),
			...text(NAME),
			...new Array<number>(79).fill(0)
		]
	],
	[['cprt'], [...text('text'), ...word32(0), ...text('No copyright, use freely'), 0]],
	...Object.entries(colourants).map(([tag, xyz]): [string[], number[]] => [
		[tag],
		[...text('XYZ '), ...word32(0), ...xyz.flatMap(fixed)]
	]),
	[
		['rTRC', 'gTRC', 'bTRC'],
		[
			...text('curv'),
			...word32(0),
			...word32(STEPS),
			...Array.from({ length: STEPS }, (_, step) => Math.round(toLight(step / (STEPS - 1)) * 65535)).flatMap(
				word16
			)
		]
	]
];

const heading = (size: number): number[] => [
	...word32(size),
	...word32(0),
	...word32(0x02100000),
	...text('mntrRGB XYZ '),
	...[2000, 1, 1, 0, 0, 0].flatMap(word16),
	...text('acsp'),
	...new Array<number>(28).fill(0),
	...colourants.wtpt.flatMap(fixed),
	...new Array<number>(48).fill(0)
];

/**
 * Makes an sRGB profile of ICC version 2, which is what PDF 1.4 can hold.
 * @returns the bytes of the profile
 * @example colourProfile().length // 604
 * Source: IEC 61966-2-1 (primaries and transfer curve); ICC.1:1998-09 (format).
 */
export function colourProfile(): Uint8Array {
	const bodies = tagBodies();
	const count = bodies.reduce((sum, [tags]) => sum + tags.length, 0);
	const table: number[] = word32(count);
	const data: number[] = [];
	const start = 128 + 4 + 12 * count;
	for (const [tags, body] of bodies) {
		for (const tag of tags) table.push(...text(tag), ...word32(start + data.length), ...word32(body.length));
		data.push(...padded(body));
	}
	return new Uint8Array([...heading(start + data.length), ...table, ...data]);
}

/** The profile's name, as the output intent repeats it. */
export const PROFILE_NAME = NAME;
