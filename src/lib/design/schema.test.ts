import { describe, expect, it } from 'vitest';
import { quantityOf } from './text';
import { designJsonSchema } from './schema';

interface Node {
	readonly type?: string;
	readonly properties?: Readonly<Record<string, Node>>;
	readonly items?: Node;
	readonly anyOf?: readonly Node[];
	readonly oneOf?: readonly Node[];
	readonly pattern?: string;
	readonly additionalProperties?: unknown;
}

const walk = (node: Node, key = ''): (readonly [key: string, node: Node])[] => [
	[key, node],
	...Object.entries(node.properties ?? {}).flatMap(([name, child]) => walk(child, name)),
	...(node.items ? walk(node.items, key) : []),
	...[...(node.anyOf ?? []), ...(node.oneOf ?? [])].flatMap((child) => walk(child, key))
];

const schema = designJsonSchema() as Node & Record<string, unknown>;

describe('designJsonSchema', () => {
	it('is draft 2020-12 without an address of its own', () => {
		expect(schema.$schema).toBe('https://json-schema.org/draft/2020-12/schema');
		expect(schema).not.toHaveProperty('$id');
		expect(JSON.stringify(schema)).not.toContain('$ref');
	});

	it('requires what the format requires', () => {
		expect(schema.required).toEqual([
			...['format', 'formatVersion', 'title', 'supply', 'switching', 'inductor', 'capacitor'],
			...['sources', 'choice', 'rules']
		]);
	});

	it('refuses unknown keys in every object', () => {
		const objects = walk(schema).filter(([, node]) => node.type === 'object');
		expect(objects.length).toBeGreaterThan(25);
		for (const [, node] of objects) expect(node.additionalProperties).toBe(false);
	});

	it('lists the thirteen kinds of rule and the three shapes of source', () => {
		expect(schema.properties?.rules?.items?.oneOf).toHaveLength(13);
		expect(schema.properties?.sources?.items?.oneOf).toHaveLength(3);
	});

	it('takes one tolerance or two, never both ways', () => {
		for (const part of ['inductor', 'capacitor', 'choice']) {
			expect(schema.properties?.[part]?.oneOf).toEqual([
				{ required: ['tolerance'], properties: { toleranceMinus: false, tolerancePlus: false } },
				{ required: ['toleranceMinus', 'tolerancePlus'], properties: { tolerance: false } }
			]);
		}
	});

	it('asks for line frequencies of an ac supply only, and for the points of a limit by table only', () => {
		expect(schema.properties?.supply).toMatchObject({
			if: { properties: { kind: { const: 'ac' } } },
			then: { required: ['frequency_Hz', 'frequencyMax_Hz'] },
			else: { properties: { frequency_Hz: false, frequencyMax_Hz: false } }
		});
		expect(schema.properties?.switching?.items).not.toHaveProperty('if');
		expect(schema.properties?.emission).toMatchObject({ then: { required: ['table'] } });
	});

	it('has patterns that any dialect of regular expressions reads', () => {
		const patterns = walk(schema).flatMap(([, { pattern }]) => (pattern === undefined ? [] : [pattern]));
		expect(patterns.length).toBeGreaterThan(0);
		for (const pattern of patterns) expect(pattern).not.toMatch(/\\[pP]\{/);
	});

	it('names the quantity of every number in its key', () => {
		const numbers = walk(schema).filter(([, { type }]) => type === 'number' || type === 'integer');
		expect(numbers.length).toBeGreaterThan(40);
		for (const [key] of numbers) expect([key, quantityOf(key)]).toEqual([key, expect.any(String)]);
	});
});
