/** Leaves and branches of the schemas: each names itself in words and says what to enter. */
import * as z from 'zod/mini';
import { formatQuantity } from '$lib/quantity/format';
import type { Quantity } from '$lib/quantity/unit';

// The probe for `new Function` would break a strict content security policy.
z.config({ jitless: true });

interface RawIssue {
	readonly code?: string | undefined;
	readonly input?: unknown;
}

const UNIT_WORD: Readonly<Record<Quantity, string>> = {
	capacitance: 'a number in farad',
	inductance: 'a number in henry',
	resistance: 'a number in ohm',
	frequency: 'a number in hertz',
	voltage: 'a number in volt',
	current: 'a number in ampere',
	power: 'a number in watt',
	time: 'a number in seconds',
	gain: 'a number in dB',
	level: 'a number in dBµV',
	fraction: 'a fraction (0.1 for 10 %)',
	number: 'a number'
};

export interface Range {
	readonly from: number;
	readonly to: number;
	/** The upper end itself is too much. */
	readonly under?: boolean;
}

const written = (value: number, quantity: Quantity): string =>
	formatQuantity(value, quantity).replaceAll('\u00a0', ' ');

const given = (input: unknown, quantity: Quantity): string =>
	typeof input === 'number' && Number.isFinite(input) ? `, not ${written(input, quantity)}` : '';

/** @returns the schema of a number within a range, in SI base units */
export function quantity(words: string, kind: Quantity, range: Range): z.ZodMiniNumber {
	const { from, to, under = false } = range;
	const span = `from ${written(from, kind)} to ${under ? 'under ' : ''}${written(to, kind)}`;
	const error = ({ input }: RawIssue): string => {
		if (input === undefined || typeof input === 'number')
			return `Enter ${words} ${span}${given(input, kind)}.`;
		return `Enter ${words} as ${UNIT_WORD[kind]}, ${span}.`;
	};
	return z
		.number({ error })
		.check(z.gte(from, { error }), under ? z.lt(to, { error }) : z.lte(to, { error }), z.describe(words));
}

/** @returns the schema of a whole number within a range */
export function whole(words: string, from: number, to: number): z.ZodMiniNumber {
	const error = ({ input }: RawIssue): string =>
		`Enter ${words} as a whole number from ${String(from)} to ${String(to)}${given(input, 'number')}.`;
	return z.int({ error }).check(z.gte(from, { error }), z.lte(to, { error }), z.describe(words));
}

// eslint-disable-next-line no-control-regex -- control characters are what these refuse
const ONE_LINE = /^[^\u0000-\u001f\u007f-\u009f]*$/;
// eslint-disable-next-line no-control-regex -- as above, but for tab and line ends
const LINES = /^[^\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f-\u009f]*$/;

export interface TextRule {
	readonly most: number;
	readonly least?: number;
	readonly lines?: boolean;
}

/** @returns the schema of a text of limited length without control characters */
export function text(words: string, { most, least = 1, lines = false }: TextRule): z.ZodMiniString {
	const length = `${String(least)} to ${String(most)} characters`;
	const error = `Enter ${words}: ${length}${lines ? '' : ' on one line'}, without control characters.`;
	return z.string({ error }).check(
		z.minLength(least, { error }),
		z.maxLength(most, { error }),
		z.regex(lines ? LINES : ONE_LINE, { error }),
		// Half a surrogate pair is no character and cannot be printed.
		z.refine((value) => !/\p{Cs}/u.test(value), { error }),
		z.describe(words)
	);
}

/** @returns the schema of an id within the design */
export function id(words: string): z.ZodMiniString {
	const error = `Enter ${words}: 1 to 40 letters, digits, dots, hyphens or underscores, a letter or digit first.`;
	return z
		.string({ error })
		.check(z.regex(/^[A-Za-z0-9][A-Za-z0-9._-]{0,39}$/, { error }), z.describe(words));
}

/** @returns the schema of one word out of several */
export function oneOf<const Words extends readonly [string, ...string[]]>(
	words: string,
	values: Words
): z.ZodMiniEnum<{ [Word in Words[number]]: Word }> {
	return z.enum(values, { error: `Enter ${words}: ${values.join(', ')}.` });
}

/** @returns the schema of a yes or no */
export function flag(words: string): z.ZodMiniBoolean {
	return z.boolean({ error: `Enter ${words}: true or false.` }).check(z.describe(words));
}

/** What follows a key that is not known; the key itself is put before it where the issue is told. */
const branchError =
	(words: string) =>
	({ code }: RawIssue): string =>
		code === 'unrecognized_keys'
			? `is not a field of ${words}: leave it out.`
			: `Enter ${words} as an object.`;

/** @returns the schema of an object that refuses keys it does not know */
export function branch<Shape extends z.core.$ZodLooseShape>(
	words: string,
	shape: Shape
): z.ZodMiniObject<Shape, z.core.$strict> {
	return z.strictObject(shape, { error: branchError(words) });
}

/** @returns the schema of an object whose kind decides its other keys */
export function byKind<
	const Options extends readonly [z.core.$ZodTypeDiscriminable, ...z.core.$ZodTypeDiscriminable[]]
>(words: string, kinds: readonly string[], options: Options): z.ZodMiniDiscriminatedUnion<Options, 'kind'> {
	const error = ({ code }: RawIssue): string =>
		code === 'invalid_union'
			? `Enter the kind of ${words}: ${kinds.join(', ')}.`
			: `Enter ${words} as an object with its kind.`;
	return z.discriminatedUnion('kind', options, { error });
}

/** @returns the schema of a list of limited length */
export function list<Item extends z.core.SomeType>(
	words: string,
	item: Item,
	least: number,
	most: number
): z.ZodMiniArray<Item> {
	const error = ({ input }: RawIssue): string => {
		const count = Array.isArray(input) ? `, not ${String(input.length)}` : '';
		return `Enter a list of ${String(least)} to ${String(most)} ${words}${count}.`;
	};
	return z.array(item, { error }).check(z.minLength(least, { error }), z.maxLength(most, { error }));
}

const tolerance = (words: string): z.ZodMiniNumber =>
	quantity(words, 'fraction', { from: 0, to: 1, under: true });

/** The two directions of a part's tolerance, or one figure for both. */
export const toleranceShape = (part: string) => ({
	toleranceMinus: z.optional(tolerance(`the tolerance of ${part} downward`)),
	tolerancePlus: z.optional(tolerance(`the tolerance of ${part} upward`)),
	tolerance: z.optional(tolerance(`the tolerance of ${part} in both directions`))
});

interface TypedTolerance {
	readonly toleranceMinus?: number | undefined;
	readonly tolerancePlus?: number | undefined;
	readonly tolerance?: number | undefined;
}

/** Refuses a part that states both ways of giving its tolerance, or neither. */
export const checkTolerance: z.core.CheckFn<TypedTolerance> = ({ value, issues }) => {
	const { tolerance: both, toleranceMinus, tolerancePlus } = value;
	const add = (key: keyof TypedTolerance, message: string): void => {
		issues.push({ code: 'custom', path: [key], input: value[key], message });
	};
	if (both !== undefined && (toleranceMinus ?? tolerancePlus) !== undefined) {
		add('tolerance', 'Enter either one tolerance for both directions, or one downward and one upward.');
	}
	if (both !== undefined) return;
	if (toleranceMinus === undefined)
		add('toleranceMinus', 'Enter the tolerance downward, from 0 % to under 100 %.');
	if (tolerancePlus === undefined)
		add('tolerancePlus', 'Enter the tolerance upward, from 0 % to under 100 %.');
};

/** @returns the part with a tolerance for each direction */
export function spreadTolerance<Part extends TypedTolerance>(
	part: Part
): Omit<Part, keyof TypedTolerance> & { toleranceMinus: number; tolerancePlus: number } {
	const { tolerance: both = 0, toleranceMinus = both, tolerancePlus = both, ...rest } = part;
	return { ...rest, toleranceMinus, tolerancePlus };
}
