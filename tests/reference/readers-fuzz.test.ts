/** Any bytes give points or a named line, never a fault; READERS_FUZZ=1000000 in the environment tries more. */
import { describe, expect, it } from 'vitest';
import { readImpedanceTable } from '../../src/lib/network/impedance-table';
import type { Fixture, MeasuredPoint, Measurement, Unreadable } from '../../src/lib/network/measurement';
import { readTouchstone } from '../../src/lib/network/touchstone';
import { decode } from '../../src/routes/(pages)/scratch/measured';

const CASES = Number(process.env.READERS_FUZZ ?? 100_000);
const SEED = 20_260_301;
const FIXTURES: readonly Fixture[] = ['reflection', 'shunt-through', 'series-through'];

/** mulberry32 (recalled): the same cases every time. */
const generator = (seed: number) => {
	let state = seed;
	return (below: number): number => {
		state = (state + 0x6d2b79f5) | 0;
		let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
		mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
		return ((mixed ^ (mixed >>> 14)) >>> 0) % below;
	};
};

const STARTS: readonly (readonly [name: string, text: string])[] = [
	['a.s1p', '! part\n# kHz S MA R 50\n1 0.5 20\n2 0.5 10\n3 0.4 5\n'],
	['a.s2p', '# Hz S RI R 50\n1 .1 0 .5 0 .5 0 .1 0\n2 .1 0 .5 0 .5 0 .1 0\n1.5 1 .2 10 .3\n'],
	['a.s2p', '# MHz Z DB R 75\r\n1 1 2 3 4 5 6 7 8\r\n2 1 2 3 4 5 6 7 8\r\n'],
	[
		'a.ts',
		'[Version] 2.0\n# Hz S RI R 50\n[Number of Ports] 2\n[Two-Port Data Order] 21_12\n[Number of Frequencies] 1\n[Reference]\n50 50\n[Network Data]\n1e3 .1 0 .5 0 .25 0 .2 0\n[End]\n'
	],
	['a.csv', 'Frequency (Hz),|Z| (ohm),Phase (deg)\n1000,10,90\n2000,20,89\n'],
	['a.txt', 'Analyser 7\n\nf (kHz);R (ohm);X (kΩ)\n1,5;2,25;-3\n2,5;2,25;-3\nEND\n']
];
const PIECES = [
	'#',
	'[',
	']',
	'!',
	'\n',
	'\t',
	';',
	',',
	'1e400',
	'-',
	'NaN',
	'\u0000',
	'Ω',
	'°',
	'[End]',
	'R',
	'9'
].map((piece) => new TextEncoder().encode(piece));

/** A file with a few bytes changed, doubled, cut or put in. */
const mutated = (start: Uint8Array, below: (most: number) => number): Uint8Array => {
	let bytes = [...start];
	for (let turn = below(6); turn >= 0; turn--) {
		const at = below(bytes.length + 1);
		const act = below(5);
		if (act === 0) bytes[at] = below(256);
		else if (act === 1) bytes.splice(at, 1 + below(8));
		else if (act === 2) bytes.splice(at, 0, ...(PIECES[below(PIECES.length)] ?? []));
		else if (act === 3) bytes.splice(at, 0, ...bytes.slice(below(at + 1), at));
		else bytes = bytes.slice(0, Math.max(1, at));
	}
	return Uint8Array.from(bytes, (byte) => byte ?? 0);
};

const isSound = (answer: Measurement | Unreadable): boolean => {
	if (!answer.ok) return answer.line >= 1 && Number.isInteger(answer.line) && answer.detail !== '';
	const fine = ({ frequency, impedance: { re, im } }: MeasuredPoint): boolean =>
		frequency > 0 && Number.isFinite(frequency + re + im);
	return answer.points.length > 0 && answer.points.every(fine);
};

describe('the readers of measured files', () => {
	it('answer any bytes with points or a line and a reason', () => {
		const below = generator(SEED);
		const starts = STARTS.map(([name, text]) => [name, new TextEncoder().encode(text)] as const);
		const seen = { read: 0, refused: 0 };
		for (let turn = 0; turn < CASES; turn++) {
			const [name, start] = starts[turn % starts.length] ?? ['a.csv', new Uint8Array(1)];
			const bytes = mutated(start, below);
			const text = decode(bytes);
			const answer = /\.(csv|txt)$/.test(name)
				? readImpedanceTable(text)
				: readTouchstone(text, name, FIXTURES[below(3)] ?? 'reflection');
			const sound = isSound(answer);
			if (!sound) throw new Error(`${name}, case ${turn}: ${JSON.stringify([...bytes])}`);
			seen[answer.ok ? 'read' : 'refused']++;
		}
		// Both outcomes must be common, or the cases try nothing.
		expect(Math.min(seen.read, seen.refused)).toBeGreaterThan(CASES / 20);
	});
});
