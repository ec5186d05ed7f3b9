import { getContext, setContext } from 'svelte';

const ROW = Symbol('row');

/** The row's name goes before the captions of its fields, for those who hear them one by one. */
export function nameRow(name: () => string): void {
	setContext(ROW, name);
}

export function useRowName(): () => string {
	return getContext<(() => string) | undefined>(ROW) ?? (() => '');
}
