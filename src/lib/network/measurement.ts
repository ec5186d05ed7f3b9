/** What a reader of measured files answers: points and what was understood, or the line that could not be read. */
import type { Complex } from './complex';

/** How the part sat between the analyser's ports; only the person who measured knows. */
export type Fixture = 'reflection' | 'shunt-through' | 'series-through';

export interface MeasuredPoint {
	/** [Hz] */
	readonly frequency: number;
	/** [Ω] */
	readonly impedance: Complex;
}

export interface Measurement {
	readonly ok: true;
	readonly points: readonly MeasuredPoint[];
	/** Sentences that say how the file was read, to be shown before it is taken. */
	readonly understood: readonly string[];
}

export interface Unreadable {
	readonly ok: false;
	/** Line of the file, from 1. */
	readonly line: number;
	readonly detail: string;
}

/** Longest file taken [characters] and most points taken. */
export const MOST_CHARACTERS = 5_000_000;
export const MOST_POINTS = 20_000;

/** Thrown inside a reader and answered as `Unreadable`; never leaves this room. */
export class LineError extends Error {
	constructor(
		readonly line: number,
		detail: string
	) {
		super(detail);
		this.name = 'LineError';
	}
}

/**
 * Runs a reader and turns the line it stumbled over into an answer.
 * @param read the reader, which throws LineError
 * @returns its measurement, or the line and the reason
 * @throws whatever else the reader throws: that is a bug
 * @example answered(() => { throw new LineError(3, 'no number'); }) // { ok: false, line: 3, detail: 'no number' }
 */
export function answered(read: () => Omit<Measurement, 'ok'>): Measurement | Unreadable {
	try {
		return { ok: true, ...read() };
	} catch (error) {
		if (error instanceof LineError) return { ok: false, line: error.line, detail: error.message };
		throw error;
	}
}

/**
 * Reads one number of a data row, with `D` taken for the exponent as Fortran writes it.
 * @param token text without spaces
 * @param line where it stands, from 1
 * @returns the number
 * @throws LineError when it is not a finite number
 * @example numberAt('1.5D3', 7) // 1500
 */
export function numberAt(token: string, line: number): number {
	const plain = /^[+-]?(\d+\.?\d*|\.\d+)([eEdD][+-]?\d+)?$/.test(token);
	const value = plain ? Number(token.replace(/[dD]/, 'e')) : NaN;
	if (!Number.isFinite(value))
		throw new LineError(line, `“${token.slice(0, 24)}” is not a finite number; write 0.0123 or 1.23e-2`);
	return value;
}
