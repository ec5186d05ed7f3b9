import { describe, expect, it } from 'vitest';
import { beginning, close, redo, step, undo } from './past';

describe('past', () => {
	it('undoes and redoes', () => {
		const written = step(step(beginning('a'), 'b'), 'c');
		expect(undo(written).now).toBe('b');
		expect(undo(undo(undo(written))).now).toBe('a');
		expect(redo(undo(written)).now).toBe('c');
		expect(redo(written)).toBe(written);
	});

	it('takes typing at one place as one step until it is closed', () => {
		const typed = step(step(beginning('1'), '12', '/c'), '123', '/c');
		expect(undo(typed).now).toBe('1');
		const again = step(close(typed), '1234', '/c');
		expect(undo(again).now).toBe('123');
		expect(undo(step(typed, 'x', '/l')).now).toBe('123');
	});

	it('forgets what was undone once something new is written', () => {
		expect(redo(step(undo(step(beginning('a'), 'b')), 'c')).now).toBe('c');
	});

	it('does not count a change that changes nothing', () => {
		const start = beginning('a');
		expect(step(start, 'a')).toBe(start);
	});
});
