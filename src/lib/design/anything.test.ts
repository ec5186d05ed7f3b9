import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Design } from './design';
import { parseDesign, parseDesignText } from './parse';
import { complete } from './specimen';

describe('whatever comes', () => {
	const numbers = fc.oneof(fc.double(), fc.constantFrom(0, -1, NaN, Infinity, 1e308, 5e-324));
	const leaf = fc.oneof(fc.string(), numbers, fc.boolean(), fc.constant(null), fc.constant('1,000'));
	const anything = fc.oneof(leaf, fc.jsonValue({ maxDepth: 4 }) as fc.Arbitrary<unknown>);

	/** Every pointer into a value. */
	const places = (node: unknown, at = ''): string[] =>
		typeof node === 'object' && node !== null
			? Object.entries(node).flatMap(([key, item]) => [`${at}/${key}`, ...places(item, `${at}/${key}`)])
			: [];
	const mutations = (design: Design) =>
		fc.array(fc.tuple(fc.constantFrom(...places(design)), anything), { minLength: 1, maxLength: 4 });

	const mutate = (design: Design, changes: (readonly [string, unknown])[]): unknown =>
		changes.reduce<unknown>(
			(node, [pointer, value]) => {
				const keys = pointer.split('/').slice(1);
				const parent = keys
					.slice(0, -1)
					.reduce<unknown>((at, key) => (at as Record<string, unknown> | null)?.[key], node);
				if (typeof parent === 'object' && parent !== null) Reflect.set(parent, keys.at(-1) ?? '', value);
				return node;
			},
			JSON.parse(JSON.stringify(design))
		);

	it.each([
		['parseDesign', parseDesign],
		['parseDesignText', parseDesignText]
	])('%s answers with a design or with issues', (_, parse) => {
		fc.assert(
			fc.property(
				fc.oneof(
					anything,
					mutations(complete).map((changes) => mutate(complete, changes))
				),
				(input) => {
					const parsed = parse(input);
					if (parsed.ok) {
						expect(parseDesign(parsed.design)).toEqual(parsed);
						return;
					}
					expect(parsed.issues.length).toBeGreaterThan(0);
					for (const { pointer, detail } of parsed.issues) {
						expect(pointer).toMatch(/^(\/.*)*$/s);
						expect(detail).toMatch(/[.?]$/);
						expect(detail).not.toMatch(/invalid/i);
					}
				}
			),
			{ numRuns: 400 }
		);
	});

	it('a tree made to exhaust the stack', () => {
		let deep: unknown = '1 µF';
		for (let level = 0; level < 50_000; level += 1) deep = [deep];
		expect(parseDesignText({ ...complete, damping: deep }).ok).toBe(false);
		expect(parseDesign({ ...complete, damping: deep }).ok).toBe(false);
	});
});
