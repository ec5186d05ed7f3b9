/** Designs to try the doors with: any that the schema takes, out to the ends of its ranges, and spoilt ones. */
import fc from 'fast-check';
import type { Design } from '$lib/design/design';
import { designJsonSchema } from '$lib/design/schema';
import { complete } from '$lib/design/specimen';

interface Node {
	readonly type?: string;
	readonly const?: unknown;
	readonly enum?: readonly unknown[];
	readonly minimum?: number;
	readonly maximum?: number;
	readonly exclusiveMaximum?: number;
}

/** The published shape at a place, through lists and unions, by the value that stands there. */
const schema = designJsonSchema() as Record<string, unknown>;

type Tree = Record<string, unknown>;

const isTree = (value: unknown): value is Tree => typeof value === 'object' && value !== null;

const branches = (node: Tree): Tree[] =>
	[node, ...[node.oneOf, node.anyOf].flatMap((list) => (Array.isArray(list) ? (list as Tree[]) : []))].filter(
		isTree
	);

const fits = (node: Tree, value: unknown): boolean => {
	const properties = node.properties as Record<string, Node> | undefined;
	const kind = properties?.kind;
	if (kind === undefined || !isTree(value)) return true;
	return kind.const === value.kind || (kind.enum ?? []).includes(value.kind);
};

const childOf = (node: Tree | undefined, key: string, value: unknown): Tree | undefined => {
	if (node === undefined) return undefined;
	for (const branch of branches(node)) {
		if (!fits(branch, value)) continue;
		const properties = branch.properties as Record<string, Tree> | undefined;
		if (properties?.[key] !== undefined) return properties[key];
		if (isTree(branch.items) && /^\d+$/.test(key)) return branch.items;
	}
	return undefined;
};

interface Place {
	readonly path: readonly string[];
	readonly least: number;
	readonly most: number;
	readonly whole: boolean;
}

/** Every number of a design that has a range. */
const rangedPlaces = (value: unknown, node: Tree | undefined, path: readonly string[] = []): Place[] => {
	if (typeof value === 'number' && node !== undefined) {
		const limits = branches(node).find(({ minimum }) => minimum !== undefined) as Node | undefined;
		if (limits?.minimum === undefined) return [];
		const most = limits.maximum ?? (limits.exclusiveMaximum ?? 1) * (1 - 1e-9);
		return [{ path, least: limits.minimum, most, whole: limits.type === 'integer' }];
	}
	if (!isTree(value)) return [];
	return Object.entries(value).flatMap(([key, item]) =>
		rangedPlaces(item, childOf(node, key, value), [...path, key])
	);
};

const within = ({ least, most, whole }: Place): fc.Arbitrary<number> => {
	if (whole) return fc.integer({ min: least, max: most });
	const floor = Math.max(least, most * 1e-18, 1e-18);
	const spread = fc.double({ min: Math.log10(floor), max: Math.log10(most), noNaN: true });
	return fc.oneof(
		fc.constantFrom(least, most),
		spread.map((power) => Math.min(most, Math.max(least, 10 ** power)))
	);
};

const put = (design: unknown, path: readonly string[], value: unknown): unknown => {
	const copy: unknown = JSON.parse(JSON.stringify(design));
	const parent = path
		.slice(0, -1)
		.reduce<unknown>((node, key) => (isTree(node) ? node[key] : undefined), copy);
	if (isTree(parent)) Reflect.set(parent, path.at(-1) ?? '', value);
	return copy;
};

const apply = (design: Design, changes: readonly (readonly [readonly string[], unknown])[]): unknown =>
	changes.reduce<unknown>((tree, [path, value]) => put(tree, path, value), design);

/** A design whose numbers lie anywhere in their ranges; contradictions between fields make some of them bad. */
export const stretched = (base: Design = complete): fc.Arbitrary<unknown> => {
	const places = rangedPlaces(base, schema);
	const change = fc
		.constantFrom(...places)
		.chain((place) => within(place).map((value) => [place.path, value] as const));
	return fc.array(change, { minLength: 1, maxLength: 12 }).map((changes) => apply(base, changes));
};

const everyPath = (value: unknown, path: readonly string[] = []): (readonly string[])[] =>
	isTree(value)
		? Object.entries(value).flatMap(([key, item]) => [[...path, key], ...everyPath(item, [...path, key])])
		: [];

const rubbish = fc.oneof(
	fc.constantFrom<unknown>(
		0,
		-1,
		1e308,
		5e-324,
		null,
		'',
		'100',
		'1,000',
		'😀',
		[],
		{},
		true,
		'x'.repeat(10_000)
	),
	fc.double({ noNaN: true, noDefaultInfinity: true }),
	fc.jsonValue({ maxDepth: 3 })
);

/** A design with some places overwritten by anything that JSON can say. */
export const spoilt = (base: Design = complete): fc.Arbitrary<unknown> =>
	fc
		.array(fc.tuple(fc.constantFrom(...everyPath(base)), rubbish), { minLength: 1, maxLength: 4 })
		.map((changes) => apply(base, changes));
