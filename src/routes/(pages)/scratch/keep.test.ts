import { describe, expect, it } from 'vitest';
import { keep, readKept } from './keep';

const shelf = (start: string | null = null): Storage => {
	let text = start;
	return {
		length: 0,
		clear: () => undefined,
		key: () => null,
		removeItem: () => undefined,
		getItem: () => text,
		setItem: (_, value) => {
			text = value;
		}
	};
};
const refusing = (): Storage => {
	throw new DOMException('no storage', 'SecurityError');
};

describe('kept state', () => {
	it('comes back as it was kept', () => {
		const storage = shelf();
		const tree = { design: { title: 'half ty' }, step: '2' };
		expect(keep(() => storage, tree)).toBe(true);
		expect(readKept(() => storage)).toEqual(tree);
	});

	it.each([null, 'not json', '3', 'null', '{}', '{"design":"x"}'])('ignores %s', (text) => {
		expect(readKept(() => shelf(text))).toBeNull();
	});

	it('says so when the browser keeps nothing', () => {
		expect(readKept(refusing)).toBeNull();
		expect(keep(refusing, {})).toBe(false);
	});
});
