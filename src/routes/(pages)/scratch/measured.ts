/** Measured files: bytes to text, text to points, points to a curve of the design file. */
import type { Curve } from '$lib/design/design';
import { doubtfulPoints } from '$lib/network/fixture';
import { readImpedanceTable } from '$lib/network/impedance-table';
import type { Fixture, MeasuredPoint, Measurement, Unreadable } from '$lib/network/measurement';
import { thin } from '$lib/network/thin';
import { readTouchstone } from '$lib/network/touchstone';

/** A file as it came, with the hash of its bytes. */
export interface MeasuredFile {
	readonly name: string;
	readonly text: string;
	readonly sha256: string;
	/** Day of the file, ISO 8601; empty where the browser does not tell. */
	readonly date: string;
}

export const LARGEST_BYTES = 5_000_000;
const ENDINGS = /\.(s[12]p|ts|csv|txt)$/i;

export const isMeasured = (fileName: string): boolean => ENDINGS.test(fileName);
export const isTouchstone = (fileName: string): boolean => /\.(s[12]p|ts)$/i.test(fileName);

/** Reads bytes as UTF-8, and as Latin-1 where they are not: analysers write ° and Ω in either. */
export function decode(bytes: Uint8Array): string {
	try {
		return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
	} catch (cause) {
		if (!(cause instanceof TypeError)) throw cause;
		return new TextDecoder('windows-1252').decode(bytes);
	}
}

/** A digest as 64 digits. */
export function hexOf(digest: ArrayBuffer): string {
	return [...new Uint8Array(digest)].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}

/** Reads a file by its ending; a table holds impedances and needs no fixture. */
export function readMeasured(text: string, name: string, fixture: Fixture): Measurement | Unreadable {
	const answer = isTouchstone(name) ? readTouchstone(text, name, fixture) : readImpedanceTable(text);
	if (answer.ok && answer.points.length < 2) {
		return { ok: false, line: 1, detail: 'only one point is there; a curve needs two or more' };
	}
	return answer;
}

/** Counts what the fixture or the physics casts doubt on, in words; empty where nothing is doubtful. */
export function doubtWords(points: readonly MeasuredPoint[], fixture: Fixture, floor_dB: number): string[] {
	const doubts = doubtfulPoints(points, fixture, floor_dB);
	const count = (wanted: string): number => doubts.filter(({ reason }) => reason === wanted).length;
	const said = (number: number, words: string): string[] =>
		number === 0 ? [] : [`${String(number)} of ${String(points.length)} points ${words}`];
	return [
		...said(count('near-floor'), 'lie within 6 dB of the fixture’s floor'),
		...said(count('near-ceiling'), 'lie within 6 dB of the fixture’s ceiling'),
		...said(count('negative-resistance'), 'have a negative resistance')
	];
}

/** So many points of several curves still fit the body of one request for a sheet. */
const MOST_KEPT = 1000;
const rounded = (value: number, digits: number): number => Number(value.toPrecision(digits));

/** A first label from the file's name, the fixture and the day: what the design file has no other place for. */
export function labelOf(file: MeasuredFile, fixture: Fixture): string {
	const stem = file.name.replace(ENDINGS, '');
	const rest = [...(isTouchstone(file.name) ? [fixture] : []), ...(file.date ? [file.date] : [])]
		.map((word) => `, ${word}`)
		.join('');
	return `${stem.slice(0, 60 - rest.length)}${rest}`;
}

/** A curve for the design file, and what was done to make it fit. */
export interface Taken {
	readonly curve: Omit<Curve, 'id'>;
	readonly said: string | null;
}

/** Makes the curve of a file that was read; a long one is thinned to the points that carry its shape. */
export function curveOf(file: MeasuredFile, points: readonly MeasuredPoint[], fixture: Fixture): Taken {
	const { points: kept, deviation } = thin(points, MOST_KEPT);
	const said =
		kept.length === points.length
			? null
			: `${String(kept.length)} of ${String(points.length)} points are kept, those that carry the shape; between them Z departs from the file by ${rounded(deviation * 100, 2).toString()} % at most.`;
	return {
		curve: {
			label: labelOf(file, fixture),
			fileName: file.name.slice(-120),
			sha256: file.sha256,
			frequency_Hz: kept.map(({ frequency }) => rounded(frequency, 12)),
			real_ohm: kept.map(({ impedance }) => rounded(impedance.re, 7)),
			imaginary_ohm: kept.map(({ impedance }) => rounded(impedance.im, 7))
		},
		said
	};
}
