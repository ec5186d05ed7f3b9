/** A short fingerprint for identifiers inside a file; it names content and protects nothing. */

const PRIME = 0x01000193;
const SEEDS = [0x811c9dc5, 0x9e3779b9, 0x85ebca6b, 0xc2b2ae35] as const;

const mixed = (hash: number): number => {
	const once = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
	const twice = Math.imul(once ^ (once >>> 13), 0xc2b2ae35);
	return (twice ^ (twice >>> 16)) >>> 0;
};

/**
 * Gives a fingerprint of 128 bits: four runs of FNV-1a from different starts, each finished by mixing.
 * @param parts texts or bytes in order
 * @returns four words of 32 bits, ≥ 0
 * @example digest(['a']).length // 4
 * Source: G. Fowler, L. C. Noll, K.-P. Vo, FNV-1a; the finish after A. Appleby, MurmurHash3; recalled.
 */
export function digest(parts: readonly (string | Uint8Array)[]): [number, number, number, number] {
	let [a, b, c, d] = SEEDS as readonly number[] as [number, number, number, number];
	const take = (value: number): void => {
		a = Math.imul(a ^ value, PRIME);
		b = Math.imul(b ^ value, PRIME);
		c = Math.imul(c ^ value, PRIME);
		d = Math.imul(d ^ value, PRIME);
	};
	for (const part of parts) {
		if (typeof part === 'string') {
			for (let index = 0; index < part.length; index += 1) take(part.charCodeAt(index));
		} else {
			for (const byte of part) take(byte);
		}
		// Keeps ['ab', 'c'] apart from ['a', 'bc'].
		take(0x1ffff);
	}
	return [mixed(a), mixed(b), mixed(c), mixed(d)];
}
