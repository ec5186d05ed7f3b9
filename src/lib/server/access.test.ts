import { isHttpError } from '@sveltejs/kit';
import { describe, expect, it } from 'vitest';
import { allowPublic, isCrossSite, isOtherName } from './access';

function visitor(address: string) {
	const headers: Record<string, string> = {};
	return {
		headers,
		getClientAddress: () => address,
		setHeaders: (more: Record<string, string>) => void Object.assign(headers, more)
	};
}

describe('allowPublic', () => {
	it('counts nothing where no rate is asked for', () => {
		const event = visitor('192.0.2.10');
		for (let i = 0; i < 1000; i += 1) allowPublic(event);
		expect(() => allowPublic(event, { rate: true })).not.toThrow();
	});

	it('refuses with 429 and Retry-After once the burst is used up', () => {
		const event = visitor('192.0.2.11');
		const refused: unknown[] = [];
		for (let i = 0; i < 1000; i += 1) {
			try {
				allowPublic(event, { rate: true });
			} catch (refusal) {
				refused.push(refusal);
			}
		}
		expect(refused.length).toBeGreaterThan(0);
		expect(refused.every((refusal) => isHttpError(refusal, 429))).toBe(true);
		expect(event.headers['retry-after']).toBe('1');
	});
});

describe('isCrossSite', () => {
	const here = 'http://127.0.0.1:4600';
	const form = 'application/x-www-form-urlencoded';

	it.each([
		['GET', '/', 'https://elsewhere.test', '', false, 'reading changes nothing'],
		['POST', '/scratch', here, form, false, 'our own form'],
		['POST', '/scratch', 'https://elsewhere.test', form, true, 'a form of another site'],
		['POST', '/scratch', 'http://localhost:4600', form, true, 'another name is another origin'],
		['POST', '/scratch', 'null', form, true, 'a sandboxed page'],
		['POST', '/scratch', null, form, true, 'a form whose origin was taken away'],
		['POST', '/scratch', null, 'text/plain; charset=utf-8', true, 'plain text is a form type too'],
		['POST', '/api/v1/evaluate', null, 'application/json', false, 'a program'],
		['POST', '/api/v1/evaluate', null, form, false, 'a program that the endpoint answers with 415'],
		[
			'POST',
			'/api/v1/evaluate',
			'https://elsewhere.test',
			'application/json',
			true,
			'a script of another site'
		],
		['DELETE', '/api/v1/session', 'https://elsewhere.test', '', true, 'whatever the method']
	])('%s %s from %s as "%s" → %s (%s)', (method, path, origin, type, expected, _why) => {
		const headers = new Headers();
		if (origin !== null) headers.set('origin', origin);
		if (type) headers.set('content-type', type);
		const url = new URL(path, here);
		expect(isCrossSite(new Request(url, { method, headers }), url)).toBe(expected);
	});
});

it.each([
	['GET', 'localhost:4600', 'http://127.0.0.1:4600/', true],
	['GET', '127.0.0.1:4600', 'http://127.0.0.1:4600/', false],
	['POST', 'localhost:4600', 'http://127.0.0.1:4600/', false],
	['GET', 'localhost:3000', 'http://127.0.0.1:4600/', false],
	['GET', 'localhost:4600', 'https://filters.example/', false]
])('isOtherName: %s by %s where %s is the address → %s', (method, host, address, expected) => {
	expect(isOtherName(new Request(address, { method, headers: { host } }), new URL(address))).toBe(expected);
});
