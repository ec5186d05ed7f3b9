/** A team's own limit line, pasted or read from separated text. */
import { formatQuantity } from '$lib/quantity/format';
import { parseQuantity } from '$lib/quantity/parse';
import type { Quantity } from '$lib/quantity/unit';
import type { Tree } from './tree';

export type LimitTable =
	{ readonly ok: true; readonly points: readonly Tree[] } | { readonly ok: false; readonly detail: string };

const MOST = 40;

/** A comma separates only where neither tab nor semicolon does, so that decimal commas can stand. */
const separatorOf = (text: string): string => ['\t', ';', ','].find((mark) => text.includes(mark)) ?? ',';

const FREQUENCY_UNIT = /\b([kMG]?Hz)\b/i;
const UNITS: Readonly<Record<string, string>> = { hz: 'Hz', khz: 'kHz', mhz: 'MHz', ghz: 'GHz' };

interface Row {
	readonly line: number;
	readonly cells: readonly string[];
}

class RowError extends Error {}

const rowsOf = (text: string): Row[] => {
	const separator = separatorOf(text);
	return text.split(/\r\n|\n|\r/).flatMap((raw, index) => {
		if (raw.trim() === '') return [];
		return [
			{ line: index + 1, cells: raw.split(separator).map((cell) => cell.trim().replace(/^"(.*)"$/, '$1')) }
		];
	});
};

const isNumber = (cell: string): boolean => /^[+-]?[.,\d]+(e[+-]?\d+)?$/i.test(cell);

const read = (cell: string, unit: string, quantity: Quantity, line: number): number => {
	const text = isNumber(cell) ? `${cell} ${unit}` : cell;
	const parsed = parseQuantity(text, quantity, { zero: true, negative: quantity === 'level' });
	if (!parsed.ok) throw new RowError(`Row ${String(line)}, “${cell.slice(0, 24)}”: ${parsed.detail}`);
	return parsed.value;
};

interface Point {
	readonly frequency: number;
	readonly quasiPeak: number;
	readonly average: number;
}

const pointOf = ({ line, cells }: Row, unit: string | null): Point => {
	const [frequency = '', quasiPeak = '', average = ''] = cells;
	if (cells.length < 3) {
		throw new RowError(
			`Row ${String(line)} has ${String(cells.length)} of 3 columns: frequency, quasi-peak, average.`
		);
	}
	if (isNumber(frequency) && unit === null) {
		throw new RowError(
			`Row ${String(line)}: “${frequency}” has no unit; write 150 kHz, or the unit in the heading.`
		);
	}
	return {
		frequency: read(frequency, unit ?? '', 'frequency', line),
		quasiPeak: read(quasiPeak, 'dBµV', 'level', line),
		average: read(average, 'dBµV', 'level', line)
	};
};

const beginsNumber = ({ cells }: Row): boolean => /^[+-]?[.,\d]/.test(cells[0] ?? '');

const tableOf = (text: string): Tree[] => {
	const rows = rowsOf(text);
	const [first] = rows;
	if (first === undefined) throw new RowError('Nothing is there to read.');
	const heading = beginsNumber(first) ? null : first;
	const unit = heading === null ? undefined : FREQUENCY_UNIT.exec(heading.cells[0] ?? '')?.[1];
	const data = heading === null ? rows : rows.slice(1);
	if (data.length < 2) throw new RowError('A limit line needs two rows or more.');
	if (data.length > MOST)
		throw new RowError(`A limit line has ${String(MOST)} rows at most; these are ${String(data.length)}.`);
	let before = 0;
	return data.map((row) => {
		const point = pointOf(row, unit ? (UNITS[unit.toLowerCase()] ?? null) : null);
		if (!(point.frequency > before)) {
			throw new RowError(`Row ${String(row.line)}: the frequency does not increase here.`);
		}
		before = point.frequency;
		return {
			frequency_Hz: formatQuantity(point.frequency, 'frequency'),
			quasiPeak_dBuV: formatQuantity(point.quasiPeak, 'level'),
			average_dBuV: formatQuantity(point.average, 'level')
		};
	});
};

/**
 * Reads a limit line: frequency with unit, quasi-peak and average level in dBµV; the first row may be a heading.
 * @returns points as the form holds them, or a sentence that names the row
 */
export function readLimitTable(text: string): LimitTable {
	try {
		return { ok: true, points: tableOf(text) };
	} catch (cause) {
		if (!(cause instanceof RowError)) throw cause;
		return { ok: false, detail: cause.message };
	}
}
