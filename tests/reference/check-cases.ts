/** The check values, case by case. */
import checks from './check-values.json';

interface Case {
	readonly id: string;
	readonly input: Readonly<Record<string, unknown>>;
	readonly expected: Readonly<Record<string, unknown>>;
	readonly source: string;
}

export const checkOf = (id: string): Case => {
	const found = (checks.cases as readonly Case[]).find((entry) => entry.id === id);
	if (found === undefined) throw new RangeError(`no check case ${id}`);
	return found;
};

const numbersOf = (record: Readonly<Record<string, unknown>>): Readonly<Record<string, number>> =>
	Object.fromEntries(
		Object.entries(record).flatMap(([key, value]) => (typeof value === 'number' ? [[key, value]] : []))
	);

/** The values of a check case, each of which must be there. */
export const valuesOf = (id: string, keys: readonly string[]): number[] => {
	const { input, expected } = checkOf(id);
	const numbers = { ...numbersOf(input), ...numbersOf(expected) };
	return keys.map((key) => {
		const value = numbers[key];
		if (value === undefined) throw new RangeError(`check case ${id} has no number ${key}`);
		return value;
	});
};

/** Forbidden or allowed intervals of a check case; null for no end. */
export const bandsIn = (id: string): (number | null)[][] => {
	const { forbidden, allowed } = checkOf(id).expected;
	return (forbidden ?? allowed) as (number | null)[][];
};

/** What a check case is about, in the shape its reader knows. */
export const inputOf = (id: string): unknown => checkOf(id).input;
