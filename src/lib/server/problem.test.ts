import { expect, it } from 'vitest';
import { problem, reasonPhrase } from './problem';

it('answers problem details as RFC 9457 lays them out', async () => {
	const errors = [{ pointer: '/inductor/inductance_H', detail: 'Enter an inductance such as 220 µH.' }];
	const response = problem(400, 'The design cannot be read.', errors);
	expect(response.status).toBe(400);
	expect(response.headers.get('content-type')).toBe('application/problem+json');
	expect(await response.json()).toEqual({
		type: 'about:blank',
		title: 'The design cannot be read.',
		status: 400,
		errors
	});
});

it('leaves errors out where there are none to point at', async () => {
	expect(await problem(503, 'Away').json()).not.toHaveProperty('errors');
});

it.each([
	[400, 'Bad Request'],
	[413, 'Payload Too Large'],
	[429, 'Too Many Requests'],
	[599, 'Error']
])('names status %i as RFC 9110 does: %s', (status, phrase) => {
	expect(reasonPhrase(status)).toBe(phrase);
});
