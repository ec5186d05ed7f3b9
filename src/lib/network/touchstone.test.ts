import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { doubtfulPoints, impedanceFromScattering } from './fixture';
import { readImpedanceTable } from './impedance-table';
import type { Fixture, Measurement, Unreadable } from './measurement';
import { readTouchstone } from './touchstone';

const read = (answer: Measurement | Unreadable): Measurement => {
	if (!answer.ok) throw new Error(`line ${answer.line}: ${answer.detail}`);
	return answer;
};
const refused = (answer: Measurement | Unreadable): Unreadable => {
	if (answer.ok) throw new Error('was read');
	return answer;
};

describe('impedanceFromScattering', () => {
	it.each<[Fixture, [number, number], [number, number], string]>([
		[
			'shunt-through',
			[0.00056102822186, -0.009011821292],
			[0.012, -0.2255302],
			'ngspice 39.3: 470 nF, 18 nH, 12 mΩ'
		],
		[
			'series-through',
			[0.026723869396, -0.1182960249],
			[81.6947, 804.2909],
			'ngspice 39.3: inductor in series'
		],
		['reflection', [0, 0], [50, 0], 'a matched load'],
		['reflection', [-1, 0], [0, 0], 'a short']
	])('%s %j gives %j (%s)', (fixture, [re, im], [r, x]) => {
		const z = impedanceFromScattering(fixture, { re, im }, 50);
		expect(z.re).toBeCloseTo(r, r > 10 ? 2 : 6);
		expect(z.im).toBeCloseTo(x, x > 10 ? 2 : 6);
	});
	it('inverts the formulas of a shunt and of a series element', () => {
		fc.assert(
			fc.property(
				fc.double({ min: 0.01, max: 1e4, noNaN: true }),
				fc.double({ min: -1e4, max: 1e4, noNaN: true }),
				(r, x) => {
					const size = (a: { re: number; im: number }) => Math.hypot(a.re, a.im);
					const over = (n: { re: number; im: number }, d: { re: number; im: number }) => {
						const q = d.re ** 2 + d.im ** 2;
						return { re: (n.re * d.re + n.im * d.im) / q, im: (n.im * d.re - n.re * d.im) / q };
					};
					const shunt = over({ re: 2 * r, im: 2 * x }, { re: 2 * r + 50, im: 2 * x });
					const series = over({ re: 100, im: 0 }, { re: 100 + r, im: x });
					for (const [fixture, s] of [
						['shunt-through', shunt],
						['series-through', series]
					] as const) {
						const z = impedanceFromScattering(fixture, s, 50);
						expect(size({ re: z.re - r, im: z.im - x }) / size({ re: r, im: x })).toBeLessThan(1e-6);
					}
				}
			)
		);
	});
});

const first = (answer: Measurement | Unreadable) => read(answer).points[0];

describe('readTouchstone', () => {
	it('takes GHz S MA R 50 where the option line is bare', () => {
		const point = first(readTouchstone('#\n1 0.5 0 ! half\n', 'a.S1P', 'reflection'));
		expect(point?.frequency).toBe(1e9);
		expect(point?.impedance.re).toBeCloseTo(150, 9);
	});
	it('reads 11 21 12 22 in version 1 and the declared order in version 2', () => {
		const row = '1000 0.1 0 0.5 0 0.25 0 0.2 0\n';
		const one = first(readTouchstone(`# Hz S RI R 50\n${row}`, 'a.s2p', 'shunt-through'));
		expect(one?.impedance.re).toBeCloseTo(25, 9);
		const two = (order: string) =>
			`[Version] 2.0\n# Hz S RI R 50\n[Number of Ports] 2\n[Two-Port Data Order] ${order}\n[Number of Frequencies] 1\n[Network Data]\n${row}[End]\n`;
		expect(first(readTouchstone(two('21_12'), 'a.ts', 'shunt-through'))?.impedance.re).toBeCloseTo(25, 9);
		expect(first(readTouchstone(two('12_21'), 'a.ts', 'shunt-through'))?.impedance.re).toBeCloseTo(25 / 3, 9);
	});
	it('scales Z by the reference in version 1 only, and takes the reference over two lines', () => {
		expect(first(readTouchstone('# Hz Z RI R 20\n1e3 2 1\n', 'a.s1p', 'reflection'))?.impedance).toEqual({
			re: 40,
			im: 20
		});
		const text =
			'[Version] 2.0\n# Hz Z RI\n[Number of Ports] 1\n[Reference]\n20\n[Network Data]\n1e3 2 1\n[End]';
		expect(first(readTouchstone(text, 'a.ts', 'reflection'))?.impedance).toEqual({ re: 2, im: 1 });
	});
	it('stops where noise rows begin', () => {
		const text = '# Hz S RI R 50\n1 .1 0 .5 0 .5 0 .1 0\n2 .1 0 .5 0 .5 0 .1 0\n1.5 1 .2 10 .3\n';
		expect(read(readTouchstone(text, 'a.s2p', 'reflection')).points).toHaveLength(2);
	});
	it.each([
		['', 'a.s1p', 1, 'no data'],
		['1 2 3', 'a.s1p', 1, 'option line'],
		['# Hz S RI R 50\n1 2', 'a.s1p', 2, 'incomplete'],
		['# Hz S RI R 50\n1 0 0\n1 0 0', 'a.s1p', 3, 'increase'],
		['# Hz S RI R 50\n1 0 NaN', 'a.s1p', 2, 'finite'],
		['# Hz S RI R 50\n1 0 1e400', 'a.s1p', 2, 'finite'],
		['# Hz Y RI R 50\n1 0 0', 'a.s1p', 1, 'Y parameters'],
		['# Hz S RI R 50 75\n1 0 0', 'a.s1p', 1, 'different reference'],
		['# Hz S RI R 50\n1 0 0', 'a.s3p', 1, '.s1p or .s2p'],
		['# Hz S RI R 50\n1 1 0', 'a.s1p', 2, 'without end'],
		['# furlong S', 'a.s1p', 1, 'FURLONG'],
		['[Version] 2.0\n# Hz S RI\n[Number of Ports] 3\n[Network Data]\n', 'a.ts', 4, '3 ports'],
		['[Version] 2.0\n# Hz S RI\n[Number of Ports] 2\n[Network Data]\n', 'a.ts', 4, 'Two-Port Data Order'],
		[
			'[Version] 2.0\n# Hz S RI\n[Number of Ports] 1\n[Number of Frequencies] 2\n[Network Data]\n1 0 0',
			'a.ts',
			6,
			'announced'
		]
	])('refuses %j (%s)', (text, name, line, word) => {
		const answer = refused(readTouchstone(text, name, 'reflection'));
		expect(answer.line).toBe(line);
		expect(answer.detail).toContain(word);
	});
	it('answers any text with points or a named line', () => {
		const piece = fc.oneof(
			fc.constantFrom(
				'#',
				'[',
				']',
				'!',
				'\n',
				' ',
				'Hz',
				'S',
				'RI',
				'MA',
				'R',
				'50',
				'[Version] 2.0',
				'[Network Data]',
				'1e9',
				'-',
				'NaN'
			),
			fc.double().map(String),
			fc.string()
		);
		fc.assert(
			fc.property(
				fc.array(piece, { maxLength: 30 }),
				fc.constantFrom('a.s1p', 'a.s2p', 'a.ts'),
				(pieces, name) => {
					const answer = readTouchstone(pieces.join(' '), name, 'reflection');
					expect(answer.ok ? answer.points.length > 0 : answer.line > 0 && answer.detail !== '').toBe(true);
				}
			),
			{ numRuns: 2000 }
		);
	});
});

describe('readImpedanceTable', () => {
	it.each([
		['Frequency (Hz), Impedance Magnitude (Ohms), Impedance Phase Degrees\n1000,10,90\n', 1000, 0, 10],
		['Analyser 7\n\nf (kHz);R (ohm);X (ohm)\n1,5;2,25;-3\n', 1500, 2.25, -3],
		['DUT,Frequency_Hz,Magnitude_Ohms,Phase_Deg\nC1,100,5,-90\n', 100, 0, -5],
		['Frequency (MHz)\t|Z| (kΩ)\tθ (rad)\n1\t2\t0\nEND\n', 1e6, 2000, 0]
	])('reads %j', (text, f, re, im) => {
		const point = first(readImpedanceTable(text));
		expect(point?.frequency).toBeCloseTo(f, 6);
		expect(point?.impedance.re).toBeCloseTo(re, 9);
		expect(point?.impedance.im).toBeCloseTo(im, 9);
	});
	it.each([
		['', 1, 'heading row'],
		['Frequencies, Z_real, Z_imag\n1,2,3', 1, 'no unit'],
		['f (Hz),|Z| (ohm)\n1,2', 1, 'are needed'],
		['log10(f Hz),|Z| (ohm),phase (deg)\n1,2,3', 1, 'logarithm'],
		['f (Hz),R (ohm),X (ohm)\n2,1,1\n1,1,1', 3, 'increase'],
		['f (Hz),R (ohm),X (ohm)\n2,1,', 2, 'empty'],
		['f (Hz),R (ohm),X (ohm)\n0,1,1', 2, 'above 0 Hz'],
		['f (Hz),R (ohm),X (ohm),R (ohm)\n1,1,1,1', 1, 'two columns']
	])('refuses %j', (text, line, word) => {
		const answer = refused(readImpedanceTable(text));
		expect(answer.line).toBe(line);
		expect(answer.detail).toContain(word);
	});
	it('answers any text with points or a named line', () => {
		fc.assert(
			fc.property(fc.string({ maxLength: 400 }), (text) => {
				const answer = readImpedanceTable(`f (Hz),R (ohm),X (ohm)\n${text}`);
				expect(answer.ok ? answer.points.length > 0 : answer.line > 0).toBe(true);
			}),
			{ numRuns: 2000 }
		);
	});
});

describe('doubtfulPoints', () => {
	it.each([
		['shunt-through', 3e-4, 0, 'near-floor'],
		['shunt-through', 6e-4, 0, undefined],
		['series-through', 6e6, 0, 'near-ceiling'],
		['reflection', -1, 5, 'negative-resistance']
	] as const)('%s %d + j%d: %s', (fixture, re, im, reason) => {
		expect(doubtfulPoints([{ frequency: 1e6, impedance: { re, im } }], fixture)[0]?.reason).toBe(reason);
	});
});
