/** Impedance tables that analysers write as separated text, read into points. */
import type { Complex } from './complex';
import { isHeading, readHeading, type Column, type Columns } from './impedance-heading';
import {
	answered,
	LineError,
	MOST_CHARACTERS,
	MOST_POINTS,
	numberAt,
	type MeasuredPoint,
	type Measurement,
	type Unreadable
} from './measurement';

/** Free text before the heading row is passed over up to here. */
const MOST_PREAMBLE = 200;

const separatorOf = (line: string): string => ['\t', ';', ','].find((mark) => line.includes(mark)) ?? ' ';

const split = (line: string, separator: string): string[] =>
	(separator === ' ' ? line.trim().split(/\s+/) : line.split(separator)).map((cell) =>
		cell.trim().replace(/^"(.*)"$/, '$1')
	);

const headingRow = (lines: readonly string[]): { index: number; separator: string; cells: string[] } => {
	for (const [index, line] of lines.slice(0, MOST_PREAMBLE).entries()) {
		const separator = separatorOf(line);
		const cells = split(line, separator);
		if (line.length < 2000 && isHeading(cells)) return { index, separator, cells };
	}
	throw new LineError(
		1,
		'no heading row names a frequency and an impedance, such as Frequency (Hz),|Z| (ohm),Phase (deg)'
	);
};

const impedanceOf = ({ first, second }: Columns, a: number, b: number): Complex =>
	first.meaning === 'magnitude'
		? { re: a * first.unit * Math.cos(b * second.unit), im: a * first.unit * Math.sin(b * second.unit) }
		: { re: a * first.unit, im: b * second.unit };

/** Decimal commas stand only where the comma does not separate. */
const reader = (cells: readonly string[], line: number, comma: boolean) => (column: Column) => {
	const cell = cells[column.index];
	if (cell === undefined || cell === '')
		throw new LineError(line, `column ${column.index + 1}, ${column.heading.slice(0, 40)}, is empty here`);
	return numberAt(comma ? cell.replace(',', '.') : cell, line);
};

const pointOf = (columns: Columns, read: (column: Column) => number, line: number): MeasuredPoint => {
	const frequency = read(columns.frequency) * columns.frequency.unit;
	if (!(frequency > 0)) throw new LineError(line, `a frequency above 0 Hz is needed, got ${frequency} Hz`);
	const impedance = impedanceOf(columns, read(columns.first), read(columns.second));
	if (!(Math.hypot(impedance.re, impedance.im) > 0) || !Number.isFinite(impedance.re + impedance.im))
		throw new LineError(line, 'an impedance that is finite and not zero is needed');
	return { frequency, impedance };
};

/** Data rows end at a line that begins no number after data has begun, such as END. */
const beginsNumber = (cell: string | undefined): boolean => /^[+-]?[.\d]/.test(cell ?? '');

const rowsAfter = (
	lines: readonly string[],
	start: number,
	columns: Columns,
	separator: string
): MeasuredPoint[] => {
	const points: MeasuredPoint[] = [];
	for (let index = start; index < lines.length; index++) {
		const text = lines[index] ?? '';
		if (text.trim() === '') continue;
		const cells = split(text, separator);
		if (points.length > 0 && !beginsNumber(cells[columns.frequency.index])) break;
		const point = pointOf(columns, reader(cells, index + 1, separator !== ','), index + 1);
		if (!(point.frequency > (points[points.length - 1]?.frequency ?? 0)))
			throw new LineError(index + 1, 'the frequency does not increase here');
		if (points.length === MOST_POINTS)
			throw new LineError(index + 1, `more than ${MOST_POINTS} points; export fewer`);
		points.push(point);
	}
	return points;
};

/**
 * Reads a table of impedance over frequency: a heading row with units, then rows of numbers.
 * @param text the whole file; comma, semicolon or tab between cells, decimal comma where a comma does not separate
 * @returns the points, or the line that could not be read and why
 * @example readImpedanceTable('f (kHz),R (ohm),X (ohm)\n1,2,3\n').points[0] // { frequency: 1000, impedance: { re: 2, im: 3 } }
 * @see common practice
 */
export function readImpedanceTable(text: string): Measurement | Unreadable {
	return answered(() => {
		if (text.length > MOST_CHARACTERS) throw new LineError(1, 'the file is longer than 5 MB');
		const lines = text.replace(/^\uFEFF/, '').split(/\r\n|\n|\r/);
		const { index, separator, cells } = headingRow(lines);
		const columns = readHeading(cells, index + 1);
		const points = rowsAfter(lines, index + 1, columns, separator);
		if (points.length === 0) throw new LineError(index + 1, 'no data rows follow the heading');
		const { frequency, first, second } = columns;
		const named = [frequency, first, second].map(({ heading }) => `“${heading}”`).join(', ');
		return { points, understood: [`Columns ${named} from line ${index + 1}, ${points.length} points`] };
	});
}
