/** Touchstone 1.x and 2.0 files with one or two ports, read into the impedance of the part that was measured. */
import type { Complex } from './complex';
import { impedanceFromScattering, pair } from './fixture';
import {
	answered,
	LineError,
	MOST_CHARACTERS,
	MOST_POINTS,
	numberAt,
	type Fixture,
	type MeasuredPoint,
	type Measurement,
	type Unreadable
} from './measurement';
import { headingOfVersion1, readKeywords, type Heading, type Row } from './touchstone-heading';

/** Lines without comments and blanks. */
const rowsOf = (text: string): Row[] => {
	const rows: Row[] = [];
	text
		.replace(/^\uFEFF/, '')
		.split(/\r\n|\n|\r/)
		.forEach((raw, index) => {
			const mark = raw.indexOf('!');
			const plain = (mark < 0 ? raw : raw.slice(0, mark)).trim();
			if (plain !== '') rows.push({ line: index + 1, text: plain });
		});
	return rows;
};

const portsFromName = (fileName: string): 1 | 2 => {
	const ports = /\.s([12])p$/i.exec(fileName)?.[1];
	if (!ports)
		throw new LineError(1, 'the file name must end in .s1p or .s2p, which gives the number of ports');
	return ports === '1' ? 1 : 2;
};

const headed = (rows: readonly Row[], fileName: string): { heading: Heading; next: number } => {
	const first = rows[0];
	if (!first) throw new LineError(1, 'the file has no data');
	if (/^\[\s*version\s*\]/i.test(first.text)) return readKeywords(rows);
	if (!first.text.startsWith('#'))
		throw new LineError(first.line, 'the option line, such as # Hz S RI R 50, must come before the data');
	return { heading: headingOfVersion1(first, portsFromName(fileName)), next: 1 };
};

/** Numbers of the data rows with the line each stands on, up to [End] or noise data. */
const numbersOf = (rows: readonly Row[], next: number): { values: number[]; lines: number[] } => {
	const values: number[] = [];
	const lines: number[] = [];
	for (const { line, text } of rows.slice(next)) {
		if (text.startsWith('[')) break;
		if (text.startsWith('#')) continue;
		for (const token of text.split(/\s+/)) {
			values.push(numberAt(token, line));
			lines.push(line);
		}
	}
	return { values, lines };
};

const elementFor = (heading: Heading, fixture: Fixture): string => {
	if (heading.ports === 1 && fixture !== 'reflection')
		throw new LineError(1, 'a one-port file holds a reflection; choose the fixture “reflection”');
	if (heading.parameter === 'Z' && fixture === 'series-through')
		throw new LineError(1, 'Z parameters of a series part do not exist; export S parameters');
	if (fixture === 'reflection') return '11';
	return heading.order.includes('21') ? '21' : '12';
};

interface Reading {
	readonly heading: Heading;
	readonly fixture: Fixture;
	/** Which pair of a row holds the value. */
	readonly column: number;
}

const impedanceOf = ({ heading, fixture }: Reading, value: Complex): Complex => {
	if (heading.parameter === 'S') return impedanceFromScattering(fixture, value, heading.reference);
	const scale = heading.version === 1 ? heading.reference : 1;
	return { re: value.re * scale, im: value.im * scale };
};

const pointAt = (reading: Reading, values: readonly number[], at: number, line: number): MeasuredPoint => {
	const { heading, column } = reading;
	const value = pair(heading.format, values[at + 1 + 2 * column] ?? NaN, values[at + 2 + 2 * column] ?? NaN);
	const impedance = impedanceOf(reading, value);
	if (
		!Number.isFinite(impedance.re) ||
		!Number.isFinite(impedance.im) ||
		(impedance.re === 0 && impedance.im === 0)
	)
		throw new LineError(line, 'here the impedance comes out as zero or without end; check the fixture');
	return { frequency: (values[at] ?? NaN) * heading.unit, impedance };
};

/** True where version 1 noise rows begin: the frequency falls. */
const noiseBegins = (heading: Heading, frequency: number, before: number): boolean =>
	heading.version === 1 && heading.ports === 2 && frequency < before;

const checkStep = (frequency: number, before: number, line: number): void => {
	if (!Number.isFinite(frequency) || frequency < 0)
		throw new LineError(line, `a frequency from 0 Hz up is needed, got ${frequency} Hz`);
	if (!(frequency > before)) throw new LineError(line, 'the frequency does not increase here');
};

const collect = (reading: Reading, { values, lines }: { values: number[]; lines: number[] }) => {
	const size = 1 + 2 * reading.heading.order.length;
	const points: MeasuredPoint[] = [];
	let before = -1;
	let blocks = 0;
	for (let at = 0; at < values.length; at += size) {
		const line = lines[at] ?? 1;
		const frequency = (values[at] ?? NaN) * reading.heading.unit;
		if (noiseBegins(reading.heading, frequency, before)) break;
		checkStep(frequency, before, line);
		if (at + size > values.length)
			throw new LineError(line, `the last block is incomplete: ${values.length - at} of ${size} numbers`);
		if (++blocks > MOST_POINTS) throw new LineError(line, `more than ${MOST_POINTS} points; export fewer`);
		if (frequency > 0) points.push(pointAt(reading, values, at, line));
		before = frequency;
	}
	return { points, blocks };
};

const sentences = (
	{ heading, fixture }: Reading,
	points: readonly MeasuredPoint[],
	blocks: number
): string[] => {
	const written = { MA: 'magnitude and degrees', DB: 'decibels and degrees', RI: 'real and imaginary part' };
	const said = [
		`Touchstone ${heading.version}, ${heading.ports === 1 ? 'one port' : 'two ports'}, ${heading.parameter} parameters as ${written[heading.format]}`,
		`Reference ${heading.reference} Ω, fixture ${fixture}, ${points.length} points`
	];
	if (blocks > points.length) said.push('The point at 0 Hz is left out');
	return said;
};

/**
 * Reads a Touchstone file of a part: S parameters by the fixture, Z parameters as they are (times R in version 1).
 * @param text the whole file
 * @param fileName gives the port count of a version 1 file by its ending .s1p or .s2p
 * @param fixture how the part was connected
 * @returns the points, or the line that could not be read and why
 * @example readTouchstone('# Hz S RI R 50\n1000 0 0\n', 'part.s1p', 'reflection').points[0].impedance // { re: 50, im: 0 }
 * @see Touchstone file format 1.1 and 2.0, IBIS Open Forum (rules read in public readers and pages that quote it)
 */
export function readTouchstone(text: string, fileName: string, fixture: Fixture): Measurement | Unreadable {
	return answered(() => {
		if (text.length > MOST_CHARACTERS) throw new LineError(1, 'the file is longer than 5 MB');
		const rows = rowsOf(text);
		const { heading, next } = headed(rows, fileName);
		const column = heading.order.indexOf(elementFor(heading, fixture));
		const reading: Reading = { heading, fixture, column };
		const { points, blocks } = collect(reading, numbersOf(rows, next));
		const last = rows[rows.length - 1]?.line ?? 1;
		if (points.length === 0) throw new LineError(last, 'the file has no data above 0 Hz');
		if (heading.count !== null && heading.count !== blocks)
			throw new LineError(last, `${heading.count} frequencies are announced, ${blocks} are there`);
		return { points, understood: sentences(reading, points, blocks) };
	});
}
