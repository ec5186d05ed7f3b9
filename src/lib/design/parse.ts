/** The door to the core: stored JSON or a form's text becomes a Design, or issues that say what to enter. */
import { checkConsistency } from './consistency';
import type { Design } from './design';
import type { Issue } from './issue';
import { firstOfEach, read } from './read';
import { designSchema } from './schema';
import { readText } from './text';
import { upgrade } from './upgrade';

export type { Issue } from './issue';
export { designToText, type DesignText } from './text';

export type ParsedDesign =
	{ readonly ok: true; readonly design: Design } | { readonly ok: false; readonly issues: Issue[] };

const notADesign: Issue = {
	pointer: '',
	detail: 'Enter a design: a JSON object that starts with "format": "herringbone-design".'
};

/**
 * Reads a design file's content: shape, ranges, and what must hold across its fields.
 * @param input any JSON value
 * @returns the design in SI units, or issues, each with a JSON pointer and what to enter
 * @example parseDesign({}).ok // false
 */
export function parseDesign(input: unknown): ParsedDesign {
	if (typeof input !== 'object' || input === null || Array.isArray(input)) {
		return { ok: false, issues: [notADesign] };
	}
	const upgraded = upgrade(input);
	const shaped = read(designSchema, upgraded.ok ? upgraded.design : input);
	if (!shaped.ok)
		return { ok: false, issues: firstOfEach([...(upgraded.ok ? [] : upgraded.issues), ...shaped.issues]) };
	const issues = checkConsistency(shaped.value);
	return issues.length === 0
		? { ok: true, design: shaped.value }
		: { ok: false, issues: firstOfEach(issues) };
}

/**
 * Reads a design as a form holds it: the design file's keys, every number a text such as "220 µH" or "15 %".
 * @param text a tree of texts; numbers and booleans are taken as they are, empty texts as not given
 * @returns the design in SI units, or issues, each with a JSON pointer and what to enter
 * @example parseDesignText(designToText(chargerAuxiliary)).ok // true
 */
export function parseDesignText(text: unknown): ParsedDesign {
	const { value, issues } = readText(text);
	const parsed = parseDesign(value);
	if (issues.length === 0) return parsed;
	return { ok: false, issues: firstOfEach([...issues, ...(parsed.ok ? [] : parsed.issues)]) };
}
