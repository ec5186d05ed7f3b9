/** The heading row of an impedance table: which column holds what, in which unit. */
import { LineError } from './measurement';

export type ColumnMeaning = 'frequency' | 'magnitude' | 'phase' | 'real' | 'imaginary';

export interface Column {
	readonly index: number;
	readonly meaning: ColumnMeaning;
	/** Factor to Hz, Ω or rad. */
	readonly unit: number;
	readonly heading: string;
}

const MEANINGS: readonly (readonly [ColumnMeaning, RegExp])[] = [
	['frequency', /freq|^f\b|^f[_ (/[]|log10\(f/],
	['phase', /phase|theta|θ|∠|angle/],
	['imaginary', /imag|\bim\b|im\(|reactance|^x\b|^x[_ (/[]/],
	['real', /real|\bre\b|re\(|resistance|^r\b|^r[_ (/[]/],
	['magnitude', /\|z\||magnitude|\babs\b|\bmod\b|impedance|^z\b|^z[_ (/[]/]
];

const UNITS: Readonly<Record<'frequency' | 'impedance' | 'angle', readonly (readonly [RegExp, number])[]>> = {
	frequency: [
		[/ghz/, 1e9],
		[/mhz/, 1e6],
		[/khz/, 1e3],
		[/hz|hertz/, 1]
	],
	impedance: [
		[/mohm|mω|milliohm/, 1e-3],
		[/kohm|kω|kiloohm/, 1e3],
		[/ohm|ω/, 1]
	],
	angle: [
		[/deg|°/, Math.PI / 180],
		[/rad/, 1]
	]
};

const kindOf = (meaning: ColumnMeaning) =>
	meaning === 'frequency' ? 'frequency' : meaning === 'phase' ? 'angle' : 'impedance';

const EXAMPLE = { frequency: 'Frequency (Hz)', impedance: '|Z| (ohm)', angle: 'Phase (deg)' } as const;

const plain = (cell: string): string =>
	cell
		.trim()
		.replace(/^"|"$/g, '')
		.replace(/\u2126/g, 'Ω')
		.toLowerCase();

const columnOf = (cell: string, index: number, line: number): Column | null => {
	const heading = plain(cell);
	const meaning = MEANINGS.find(([, pattern]) => pattern.test(heading))?.[0];
	if (!meaning) return null;
	if (/log/.test(heading))
		throw new LineError(line, `column ${index + 1} is a logarithm; export plain values`);
	const kind = kindOf(meaning);
	const unit = UNITS[kind].find(([pattern]) => pattern.test(heading))?.[1];
	if (unit === undefined)
		throw new LineError(
			line,
			`column ${index + 1} has no unit; write it in its heading, such as ${EXAMPLE[kind]}`
		);
	return { index, meaning, unit, heading: cell.trim() };
};

/** Whether a row names a frequency and an impedance. */
export const isHeading = (cells: readonly string[]): boolean => {
	const words = cells.map(plain);
	const meant = words.map((word) => MEANINGS.find(([, pattern]) => pattern.test(word))?.[0]);
	return meant.includes('frequency') && meant.some((meaning) => meaning && meaning !== 'frequency');
};

/** The columns that make an impedance: frequency with |Z| and phase, or with real and imaginary part. */
export interface Columns {
	readonly frequency: Column;
	readonly first: Column;
	readonly second: Column;
}

/**
 * Finds the columns of an impedance table from its heading row.
 * @param cells cells of the heading row
 * @param line its line, from 1
 * @returns frequency with magnitude and phase, or with real and imaginary part
 * @throws LineError when a column is missing, named twice, a logarithm, or has no unit
 * @example readHeading(['Frequency (kHz)', '|Z| (ohm)', 'Phase (deg)'], 1).frequency.unit // 1000
 * @see common practice
 */
export function readHeading(cells: readonly string[], line: number): Columns {
	const found = new Map<ColumnMeaning, Column>();
	cells.forEach((cell, index) => {
		const column = columnOf(cell, index, line);
		if (!column) return;
		if (found.has(column.meaning))
			throw new LineError(line, `two columns hold the ${column.meaning}; keep one trace in the file`);
		found.set(column.meaning, column);
	});
	const of = (meaning: ColumnMeaning) => found.get(meaning);
	const frequency = of('frequency');
	const polar = [of('magnitude'), of('phase')] as const;
	const cartesian = [of('real'), of('imaginary')] as const;
	const [first, second] = polar[0] && polar[1] ? polar : cartesian;
	if (frequency && first && second) return { frequency, first, second };
	throw new LineError(
		line,
		'columns for frequency with |Z| and phase, or with real and imaginary part, are needed'
	);
}
