import { expect, it } from 'vitest';
import { faults } from './log';

it('keeps the statement and drops its parameters', () => {
	const error = new Error('Failed query: select $1\nparams: engineer@demo.test,secret');
	const [entry] = faults(error);
	expect(entry?.message).toBe('Failed query: select $1');
	expect(JSON.stringify(faults(error))).not.toContain('secret');
});

it('follows the causes, outermost first, and keeps the database\u2019s code', () => {
	const cause = Object.assign(new Error('duplicate key value'), {
		code: '23505',
		detail: 'Key (email)=(a@b)'
	});
	const chain = faults(new Error('Failed query: insert', { cause }));
	expect(chain.map(({ message, code }) => [message, code])).toEqual([
		['Failed query: insert', undefined],
		['duplicate key value', '23505']
	]);
	expect(JSON.stringify(chain)).not.toContain('a@b');
});

it('ends with a chain that closes on itself', () => {
	const error = new Error('round');
	error.cause = error;
	expect(faults(error)).toHaveLength(4);
});

it('says so when no Error was thrown, and does not print what it was', () => {
	expect(faults('token=abc')).toEqual([{ name: 'string', message: 'something that is no Error was thrown' }]);
});
