import { describe, expect, it } from 'vitest';
import { asProblem, secureHeaders } from './answer';
import { problem } from './problem';

const plain = new URL('http://127.0.0.1:4600');

describe('secureHeaders', () => {
	it('asks browsers for https only where the application is served so', () => {
		const [http, https] = [new Headers(), new Headers()];
		secureHeaders(http, plain);
		secureHeaders(https, new URL('https://filters.example'));
		expect(http.has('strict-transport-security')).toBe(false);
		expect(https.get('strict-transport-security')).toBe('max-age=31536000');
		expect(http.get('x-content-type-options')).toBe('nosniff');
	});

	it('lets a drawing opened by itself run nothing', () => {
		const headers = new Headers({ 'content-type': 'image/svg+xml; charset=utf-8' });
		secureHeaders(headers, plain);
		expect(headers.get('content-security-policy')).toContain("default-src 'none'");
	});

	it('leaves the pages\u2019 own policy alone', () => {
		const headers = new Headers({
			'content-type': 'text/html',
			'content-security-policy': "default-src 'self'"
		});
		secureHeaders(headers, plain);
		expect(headers.get('content-security-policy')).toBe("default-src 'self'");
	});
});

describe('asProblem', () => {
	it('turns a thrown refusal below /api into problem details and keeps what the client must obey', async () => {
		const thrown = Response.json(
			{ message: 'Too many requests.' },
			{ status: 429, headers: { 'retry-after': '3' } }
		);
		const answer = await asProblem('/api/v1/evaluate', thrown);
		expect(answer.headers.get('content-type')).toBe('application/problem+json');
		expect(answer.headers.get('retry-after')).toBe('3');
		expect(await answer.json()).toEqual({ type: 'about:blank', title: 'Too many requests.', status: 429 });
	});

	it('names the status where the answer was a page', async () => {
		const page = new Response('<h1>No</h1>', { status: 404, headers: { 'content-type': 'text/html' } });
		expect(await (await asProblem('/api/v1/nothing', page)).json()).toMatchObject({ title: 'Not Found' });
	});

	it.each([
		['/api/v1/evaluate', new Response('{}', { status: 200 })],
		['/api/v1/evaluate', problem(400, 'Made by the endpoint')],
		['/apiary', new Response('page', { status: 404 })]
	])('passes %s %o as it is', async (path, response) => {
		expect(await asProblem(path, response)).toBe(response);
	});
});
