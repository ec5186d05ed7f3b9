/** What is wrong with an input: where, and a sentence that says what to enter. */

export interface Issue {
	/** JSON pointer (RFC 6901) into the input. */
	readonly pointer: string;
	readonly detail: string;
}

export type Path = readonly PropertyKey[];

/**
 * Writes a path as a JSON pointer.
 * @param path keys and indices from the root
 * @returns the pointer; the root is the empty string
 * @example toPointer(['rules', 0, 'divisor']) // '/rules/0/divisor'
 * Source: RFC 6901.
 */
export function toPointer(path: Path): string {
	return path.map((key) => `/${String(key).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
}

/** @returns the issue at a path */
export function issue(path: Path, detail: string): Issue {
	return { pointer: toPointer(path), detail };
}
