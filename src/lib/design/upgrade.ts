/** Design files of every format version that was ever written, brought to the present one. */
import type { Issue } from './issue';

export const FORMAT_VERSION = 1;

/** From each older version, the step to the next; version 1 is the first. */
const STEPS: ReadonlyMap<number, (design: object) => object> = new Map();

const versionOf = (design: object): unknown => ('formatVersion' in design ? design.formatVersion : undefined);

/**
 * Brings a design file to the present format version, step by step.
 * @param design the file's content
 * @returns the content of the present version, or why it cannot be read
 * @example upgrade({ formatVersion: 1 }) // { ok: true, design: { formatVersion: 1 } }
 */
export function upgrade(design: object): { ok: true; design: object } | { ok: false; issues: Issue[] } {
	let current = design;
	for (;;) {
		const version = versionOf(current);
		if (version === FORMAT_VERSION) return { ok: true, design: current };
		const step = typeof version === 'number' ? STEPS.get(version) : undefined;
		if (step === undefined) {
			const detail = `Enter ${String(FORMAT_VERSION)} as the format version: this program reads no other.`;
			return { ok: false, issues: [{ pointer: '/formatVersion', detail }] };
		}
		current = step(current);
	}
}
