import { describe, expect, it } from 'vitest';
import { freshId, listAt, moveAt, readAt, removeAt, textAt, writeAt, type Tree } from './tree';

const tree: Tree = { title: 'T', switching: [{ id: 'a' }, { id: 'b' }], load: { power_W: '45 W' } };

describe('places in a tree', () => {
	it.each([
		['', tree],
		['/title', 'T'],
		['/switching/1/id', 'b'],
		['/switching/2/id', undefined],
		['/toString', undefined],
		['/title/0', undefined]
	])('reads %s', (pointer, expected) => {
		expect(readAt(tree, pointer)).toEqual(expected);
	});

	it('writes without touching the old tree, and makes missing parents', () => {
		const written = writeAt(tree, '/damping/resistance_ohm', '2 Ω');
		expect(textAt(written, '/damping/resistance_ohm')).toBe('2 Ω');
		expect(readAt(tree, '/damping')).toBeUndefined();
		expect(textAt(writeAt(tree, '/switching/0/id', 'c'), '/switching/0/id')).toBe('c');
		expect(listAt(writeAt(tree, '/switching/2', { id: 'c' }), '/switching')).toHaveLength(3);
	});

	it('keeps the order of keys when one is overwritten', () => {
		expect(Object.keys(writeAt(tree, '/title', 'U') as object)).toEqual(['title', 'switching', 'load']);
	});

	it('removes keys and items', () => {
		expect(readAt(removeAt(tree, '/load'), '/load')).toBeUndefined();
		expect(listAt(removeAt(tree, '/switching/0'), '/switching')).toEqual([{ id: 'b' }]);
		expect(removeAt(tree, '/none/such')).toBe(tree);
	});

	it.each([
		[0, 1, ['b', 'a']],
		[1, -1, ['b', 'a']],
		[0, -1, ['a', 'b']],
		[1, 1, ['a', 'b']]
	])('moves item %i by %i', (from, by, expected) => {
		const ids = listAt(moveAt(tree, '/switching', from, by), '/switching').map((item) => textAt(item, '/id'));
		expect(ids).toEqual(expected);
	});

	it('unescapes steps as RFC 6901 asks', () => {
		expect(readAt({ 'a/b': { '~': 1 } }, '/a~1b/~0')).toBe(1);
	});

	it('finds an id that is free', () => {
		expect(freshId(listAt(tree, '/switching'), 'c')).toBe('c');
		expect(freshId([{ id: 'mains' }, { id: 'mains-2' }], 'mains')).toBe('mains-3');
	});
});
