/** What stands before a Touchstone file's numbers: the option line and, from version 2 on, the keywords. */
import { LineError, numberAt } from './measurement';

export interface Heading {
	readonly version: 1 | 2;
	readonly ports: 1 | 2;
	/** Factor to Hz. */
	readonly unit: number;
	readonly parameter: 'S' | 'Z';
	readonly format: 'MA' | 'DB' | 'RI';
	/** [Ω] */
	readonly reference: number;
	/** Matrix element of each pair of a row, in order. */
	readonly order: readonly string[];
	/** Declared number of frequencies, where version 2 says it. */
	readonly count: number | null;
}

/** A line without its comment, with its number from 1. */
export interface Row {
	readonly line: number;
	readonly text: string;
}

const UNITS: Readonly<Record<string, number>> = { HZ: 1, KHZ: 1e3, MHZ: 1e6, GHZ: 1e9 };

interface Options {
	unit: number;
	parameter: 'S' | 'Z';
	format: 'MA' | 'DB' | 'RI';
	reference: number;
}

const parameterOf = (word: string, line: number): 'S' | 'Z' => {
	if (word === 'S' || word === 'Z') return word;
	throw new LineError(line, `${word} parameters are not read; export S or Z parameters`);
};

const referenceOf = (words: readonly string[], line: number): number => {
	const values = words.map((word) => numberAt(word, line));
	const first = values[0];
	if (first === undefined || !(first > 0))
		throw new LineError(line, 'after R a reference resistance above 0 Ω is needed, such as R 50');
	if (values.some((value) => value !== first))
		throw new LineError(line, 'the ports have different reference resistances; export with one for both');
	return first;
};

/** One word of the option line; false when it is none that we know. */
const takeWord = (options: Options, word: string, line: number): boolean => {
	const unit = UNITS[word];
	if (unit !== undefined) options.unit = unit;
	else if (/^[SYZHG]$/.test(word)) options.parameter = parameterOf(word, line);
	else if (word === 'MA' || word === 'DB' || word === 'RI') options.format = word;
	else return false;
	return true;
};

/**
 * Reads an option line; what is left out is GHz, S, MA, R 50.
 * @param row the line that begins with #
 * @returns unit [factor to Hz], parameter, format and reference [Ω]
 * @throws LineError when a word is unknown
 * @example readOptions({ line: 1, text: '# kHz S RI R 50' }).unit // 1000
 * @see Touchstone file format, IBIS Open Forum (defaults read on public pages that describe it)
 */
export function readOptions({ line, text }: Row): Options {
	const options: Options = { unit: 1e9, parameter: 'S', format: 'MA', reference: 50 };
	const words = text.slice(1).trim().toUpperCase().split(/\s+/).filter(Boolean);
	for (let index = 0; index < words.length; index++) {
		const word = words[index] ?? '';
		if (word === 'R') {
			let end = index + 1;
			while (end < words.length && /^[+-.\d]/.test(words[end] ?? '')) end++;
			options.reference = referenceOf(words.slice(index + 1, end), line);
			index = end - 1;
		} else if (!takeWord(options, word, line)) {
			throw new LineError(line, `“${word.slice(0, 24)}” in the option line is not known`);
		}
	}
	return options;
}

const keywordOf = (text: string): { name: string; rest: string } | null => {
	const match = /^\[([^\]]*)\]\s*(.*)$/.exec(text);
	return match
		? { name: (match[1] ?? '').trim().toLowerCase().replace(/\s+/g, ' '), rest: match[2] ?? '' }
		: null;
};

/** Keywords that may stand before the data and change nothing for us. */
const PASSED = new Set(['number of noise frequencies', 'begin information', 'end information']);

interface Keywords {
	ports: number;
	order: string | null;
	matrix: string;
	count: number | null;
	reference: string[];
}

const whole = (text: string, line: number): number => {
	const value = numberAt(text.trim(), line);
	if (!Number.isInteger(value) || value < 1)
		throw new LineError(line, `a whole number from 1 on is needed, got ${value}`);
	return value;
};

const takeKeyword = (seen: Keywords, name: string, rest: string, line: number): void => {
	const word = rest.trim().toLowerCase();
	if (name === 'number of ports') seen.ports = whole(word, line);
	else if (name === 'number of frequencies') seen.count = whole(word, line);
	else if (name === 'two-port data order' || name === 'two-port order') seen.order = word;
	else if (name === 'matrix format') seen.matrix = word;
	else if (name === 'reference') seen.reference.push(...rest.split(/\s+/).filter(Boolean));
	else if (!PASSED.has(name)) throw new LineError(line, `[${name.slice(0, 40)}] is not read`);
};

const elements = (seen: Keywords, line: number): string[] => {
	if (seen.ports === 1) return ['11'];
	if (seen.matrix === 'lower') return ['11', '21', '22'];
	if (seen.matrix === 'upper') return ['11', '12', '22'];
	if (seen.order === '21_12') return ['11', '21', '12', '22'];
	if (seen.order === '12_21') return ['11', '12', '21', '22'];
	throw new LineError(line, 'for two ports [Two-Port Data Order] must say 21_12 or 12_21');
};

const portsOf = (ports: number, line: number): 1 | 2 => {
	if (ports === 1 || ports === 2) return ports;
	throw new LineError(line, `${ports} ports; one-port and two-port files are read`);
};

/**
 * Reads the heading of a version 2 file, down to [Network Data].
 * @param rows lines without comments, the first being [Version]
 * @returns the heading and the index of the first data row
 * @throws LineError naming the keyword that is missing or unknown
 * @example // [Version] 2.0, # Hz S RI R 50, [Number of Ports] 1, [Network Data]
 * readKeywords(rows).heading.ports // 1
 * @see Touchstone file format 2.0, IBIS Open Forum (read in public readers)
 */
export function readKeywords(rows: readonly Row[]): { heading: Heading; next: number } {
	const seen: Keywords = { ports: 0, order: null, matrix: 'full', count: null, reference: [] };
	let options: Options | null = null;
	let last = '';
	for (const [index, row] of rows.entries()) {
		const keyword = keywordOf(row.text);
		if (keyword?.name === 'network data')
			return { heading: complete(seen, options, row.line), next: index + 1 };
		if (keyword) {
			if (index > 0) takeKeyword(seen, keyword.name, keyword.rest, row.line);
			last = keyword.name;
		} else if (row.text.startsWith('#')) options ??= readOptions(row);
		else continueKeyword(seen, last, row);
	}
	throw new LineError(rows[rows.length - 1]?.line ?? 1, '[Network Data] is missing');
}

/** A line of no keyword of its own: reference resistances may run over lines, and information is free text. */
const continueKeyword = (seen: Keywords, last: string, { line, text }: Row): void => {
	if (last === 'reference') seen.reference.push(...text.split(/\s+/));
	else if (last !== 'begin information') throw new LineError(line, 'a keyword in brackets is expected here');
};

const complete = (seen: Keywords, options: Options | null, line: number): Heading => {
	if (!options) throw new LineError(line, 'the option line, such as # Hz S RI R 50, is missing');
	const ports = portsOf(seen.ports, line);
	const reference = seen.reference.length > 0 ? referenceOf(seen.reference, line) : options.reference;
	return { version: 2, ports, ...options, reference, order: elements(seen, line), count: seen.count };
};

/** Heading of a version 1 file: the port count comes from the file name's ending. */
export function headingOfVersion1(option: Row, ports: 1 | 2): Heading {
	const order = ports === 1 ? ['11'] : ['11', '21', '12', '22'];
	return { version: 1, ports, ...readOptions(option), order, count: null };
}
