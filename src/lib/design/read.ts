/** One way from zod's findings to issues that people can act on. */
import * as z from 'zod/mini';
import { toPointer, type Issue } from './issue';

export type Read<Value> =
	{ readonly ok: true; readonly value: Value } | { readonly ok: false; readonly issues: Issue[] };

/** A body of one wrong array could otherwise answer with more text than it sent. */
const MOST_ISSUES = 100;

const shorten = (key: string): string => {
	const characters = [...key];
	return characters.length > 40 ? `${characters.slice(0, 39).join('')}…` : key;
};

const explain = (found: z.core.$ZodIssue): Issue[] => {
	if (found.code !== 'unrecognized_keys') {
		return [{ pointer: toPointer(found.path), detail: found.message }];
	}
	return found.keys.map((key) => ({
		pointer: toPointer([...found.path, key]),
		detail: `“${shorten(key)}” ${found.message}`
	}));
};

/** @returns the first issue at each pointer, as many as are worth reading */
export function firstOfEach(issues: readonly Issue[]): Issue[] {
	const seen = new Map<string, Issue>();
	for (const one of issues) {
		if (!seen.has(one.pointer)) seen.set(one.pointer, one);
	}
	return [...seen.values()].slice(0, MOST_ISSUES);
}

/** @returns the value that a schema reads, or what is wrong with the input */
export function read<Value>(schema: z.ZodMiniType<Value>, input: unknown): Read<Value> {
	const result = z.safeParse(schema, input);
	if (result.success) return { ok: true, value: result.data };
	return { ok: false, issues: firstOfEach(result.error.issues.flatMap(explain)) };
}
