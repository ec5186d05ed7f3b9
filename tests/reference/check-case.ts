/** Access to the check values: computed by hand, by simulation, published, or recalled, each with its source. */
import checks from './check-values.json';

type Fields = Readonly<Record<string, unknown>>;
interface Case {
	readonly id: string;
	readonly input: Fields;
	readonly expected: Fields;
}

/**
 * Reads a check case's input and expected values, which must be there.
 * @param id of the case
 * @returns readers of a number and of a list of numbers
 */
export const given = (id: string) => {
	const found = (checks.cases as readonly Case[]).find((entry) => entry.id === id);
	if (!found) throw new RangeError(`no check case ${id}`);
	const fields: Fields = { ...found.input, ...found.expected };
	return {
		number: (key: string): number => {
			const value = fields[key];
			if (typeof value !== 'number') throw new RangeError(`check case ${id} has no number ${key}`);
			return value;
		},
		list: (key: string): readonly number[] => {
			const value = fields[key];
			if (!Array.isArray(value)) throw new RangeError(`check case ${id} has no list ${key}`);
			return (value as readonly unknown[]).flat().map(Number);
		}
	};
};

/**
 * Distance of a value from the expected one, relative to it.
 * @param value as calculated
 * @param expected as it should be, not 0
 */
export const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);
