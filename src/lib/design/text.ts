/** A design as a form holds it: the same keys, every number written with its prefix and unit. */
import { formatQuantity } from '$lib/quantity/format';
import { parseQuantity } from '$lib/quantity/parse';
import type { Quantity } from '$lib/quantity/unit';
import type { Curve, Design } from './design';
import { toPointer, type Issue, type Path } from './issue';

type Texts<Value> = Value extends number | null
	? string
	: Value extends string | boolean | undefined
		? Value
		: Value extends readonly (infer Item)[]
			? Texts<Item>[]
			: { -readonly [Key in keyof Value]: Texts<Value[Key]> };

type Plain<Value> = { [Key in keyof Value]: Value[Key] };

/** Curves are measured, not typed, and keep their numbers. */
export type DesignText = Texts<Omit<Design, 'curves' | 'formatVersion'>> & {
	formatVersion: 1;
	curves?: Plain<Curve>[];
};

const BY_SUFFIX: readonly (readonly [RegExp, Quantity])[] = [
	[/_F$/, 'capacitance'],
	[/_H$/, 'inductance'],
	[/_ohm$/, 'resistance'],
	[/_Hz$/, 'frequency'],
	[/_V$/, 'voltage'],
	[/_A$/, 'current'],
	[/_W$/, 'power'],
	[/_dB$/, 'gain'],
	[/_dBuV$/, 'level'],
	[/^seconds$/, 'time'],
	[/^(tolerance(Minus|Plus)?|resistorTolerance)$/, 'fraction'],
	[/^(divisor|guard|harmonicGuard|margin|factor|minimum|harmonics|networks|formatVersion)$/, 'number']
];

/**
 * Tells which quantity a key of the design file holds.
 * @param key the last key of a pointer
 * @returns the quantity, or undefined where the key holds words
 * @example quantityOf('inductance_H') // 'inductance'
 */
export function quantityOf(key: string): Quantity | undefined {
	return BY_SUFFIX.find(([pattern]) => pattern.test(key))?.[1];
}

/** As many digits as tell the value from every other double, so that a form loses nothing. */
const writeExactly = (value: number, quantity: Quantity): string => {
	const digits = (String(Math.abs(value)).split('e')[0] ?? '')
		.replace('.', '')
		.replace(/^0+|0+$/g, '').length;
	return formatQuantity(value, quantity, { digits: Math.min(17, Math.max(1, digits)) });
};

const write = (value: unknown, key: string): unknown => {
	if (key === 'curves' || key === 'formatVersion') return value;
	const quantity = quantityOf(key);
	if (value === null) return '';
	if (typeof value === 'number' && quantity !== undefined) return writeExactly(value, quantity);
	if (Array.isArray(value)) return value.map((item: unknown) => write(item, key));
	if (typeof value !== 'object') return value;
	return Object.fromEntries(Object.entries(value).map(([name, item]) => [name, write(item, name)]));
};

/**
 * Writes a design as the texts of a form; `parseDesignText` reads it back to the same design.
 * @param design the design
 * @returns the same keys, numbers as texts, null as the empty text
 * @example designToText(chargerAuxiliary).inductor.inductance_H // '220 µH'
 */
export function designToText(design: Design): DesignText {
	return write(design, '') as DesignText;
}

/** Deeper than any design; a tree made to exhaust the stack is refused by the schema instead. */
const DEEPEST = 8;

/** Parts that a form shows always and a design has only where something was entered. */
const OPTIONAL_PARTS = /^\/(load|damping)$/;
const NULLABLE = /^\/(choice\/capacitance_F|rules\/\d+\/(from|to)_F)$/;

const readLeaf = (text: string, path: Path, issues: Issue[]): unknown => {
	const pointer = toPointer(path);
	const key = String(path.findLast((step) => typeof step === 'string') ?? '');
	if (key === 'includeCapacitor') return text === 'true' || text === 'on';
	if (key === 'curve' && text.trim() === '') return undefined;
	const quantity = quantityOf(key);
	if (quantity === undefined) return text;
	if (text.trim() === '') return NULLABLE.test(pointer) ? null : undefined;
	const parsed = parseQuantity(text, quantity, { zero: true, negative: true });
	if (parsed.ok) return parsed.value;
	issues.push({ pointer, detail: parsed.detail });
	return undefined;
};

const readNode = (node: unknown, path: Path, issues: Issue[]): unknown => {
	if (typeof node === 'string') return readLeaf(node, path, issues);
	if (typeof node !== 'object' || node === null || path.length > DEEPEST) return node;
	if (Array.isArray(node)) {
		const items = node.map((item: unknown, index) => readNode(item, [...path, index], issues));
		const isBlank = node.length > 0 && node.every((item) => typeof item === 'string' && item.trim() === '');
		return isBlank ? undefined : items;
	}
	const entries = Object.entries(node)
		.map(([key, item]) => [key, readNode(item, [...path, key], issues)] as const)
		.filter(([, item]) => item !== undefined);
	const wasBlank = Object.values(node).every((item) => item === '');
	return wasBlank && OPTIONAL_PARTS.test(toPointer(path)) ? undefined : Object.fromEntries(entries);
};

/**
 * Turns a form's texts into the values of a design file, with what cannot be read.
 * @param text a tree of texts
 * @returns the tree with numbers in SI units, and an issue for each text that is no value
 * @example readText({ inductance_H: '33 µH' }).value // { inductance_H: 3.3e-5 }
 */
export function readText(text: unknown): { value: unknown; issues: Issue[] } {
	const issues: Issue[] = [];
	return { value: readNode(text, [], issues), issues };
}
