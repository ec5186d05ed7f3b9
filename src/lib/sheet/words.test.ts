import { missingCharacters } from '$lib/scene/metrics';
import { describe, expect, it } from 'vitest';
import { fill, wordsOf } from './words';

type Table = { readonly [key: string]: string | Table };

const leaves = (table: Table, path = ''): [string, string][] =>
	Object.entries(table).flatMap(([key, value]) =>
		typeof value === 'string' ? [[`${path}/${key}`, value]] : leaves(value, `${path}/${key}`)
	);

const english = leaves(wordsOf('en') as unknown as Table);
const german = new Map(leaves(wordsOf('de') as unknown as Table));
const places = (phrase: string): string[] => (phrase.match(/\{\w+\}/g) ?? []).sort();

describe('the fixed words', () => {
	it('has the same words in both languages', () => {
		expect([...german.keys()].sort()).toEqual(english.map(([path]) => path).sort());
	});

	it.each(english)('%s is not empty, drawable, and has the same places in both', (path, phrase) => {
		const other = german.get(path) ?? '';
		expect(phrase.trim()).toBe(phrase);
		expect(phrase).not.toBe('');
		expect(other.trim()).toBe(other);
		expect(other).not.toBe('');
		expect(missingCharacters(phrase + other)).toEqual([]);
		expect(places(other)).toEqual(places(phrase));
	});

	it('speaks English unless told otherwise', () => {
		expect(wordsOf()).toBe(wordsOf('en'));
	});
});

describe('fill', () => {
	it.each([
		['not {range}', { range: '1 … 2 nF' }, 'not 1 … 2 nF'],
		['{a} and {a}', { a: 'x' }, 'x and x'],
		['{a} of {b}', { a: '1' }, '1 of {b}'],
		['{by}', { by: '$& {by}' }, '$& {by}']
	])('%s', (phrase, values, expected) => {
		expect(fill(phrase, values as unknown as Record<string, string>)).toBe(expected);
	});
});
