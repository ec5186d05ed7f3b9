/** What every answer has in common, asked of the built application. */
import { request } from 'node:http';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { startApplication, type Application } from '../browser/server';

let application: Application;
beforeAll(async () => {
	application = await startApplication();
});
afterAll(() => application.stop());

const get = (path: string, init: RequestInit = {}) =>
	fetch(`${application.url}${path}`, { redirect: 'manual', ...init });

/** fetch() sets the Host header itself. */
function getByName(host: string): Promise<[number | undefined, string | undefined]> {
	return new Promise((resolve, reject) => {
		const { port } = new URL(application.url);
		const asked = request({
			host: '127.0.0.1',
			port,
			path: '/paper?x=1',
			headers: { host: `${host}:${port}` }
		});
		asked.once('response', (response) => {
			response.resume();
			resolve([response.statusCode, response.headers.location]);
		});
		asked.once('error', reject).end();
	});
}

it('tells of its health as agreed', async () => {
	const response = await get('/healthz');
	expect(response.headers.get('cache-control')).toBe('no-store');
	expect(await response.json()).toEqual({
		status: 'ok',
		database: 'ok',
		version: expect.stringMatching(/^\d+\./)
	});
});

it('sends pages with a policy that lets nothing of others in', async () => {
	const { headers } = await get('/');
	const policy = headers.get('content-security-policy') ?? '';
	for (const part of [
		"default-src 'self'",
		"object-src 'none'",
		"base-uri 'none'",
		"frame-ancestors 'none'"
	]) {
		expect(policy).toContain(part);
	}
	expect(policy).not.toMatch(/unsafe-(?:inline|eval)/);
	expect(headers.get('x-content-type-options')).toBe('nosniff');
	expect(headers.get('x-frame-options')).toBe('DENY');
});

it.each([
	['/api/v1/nothing', 404],
	['/api/v1/%ff', 400]
])('answers %s by problem details with %i', async (path, status) => {
	const response = await get(path, { headers: { accept: 'text/html' } });
	expect(response.status).toBe(status);
	expect(response.headers.get('content-type')).toBe('application/problem+json');
	expect(await response.json()).toMatchObject({ status, type: 'about:blank' });
});

it('answers a missing page by a page', async () => {
	const response = await get('/nothing', { headers: { accept: 'text/html' } });
	expect(response.status).toBe(404);
	expect(response.headers.get('content-type')).toBe('text/html');
	expect(response.headers.get('content-security-policy')).toContain("default-src 'self'");
});

it('refuses what another site\u2019s page sends', async () => {
	const headers = { origin: 'https://elsewhere.test', 'content-type': 'application/x-www-form-urlencoded' };
	const response = await get('/scratch', { method: 'POST', body: 'a=b', headers });
	expect(response.status).toBe(403);
	expect((await response.json()).message).toContain(application.url);
});

it.each([
	['/api/v1/nothing', 404],
	['/api/v1/schema/design.json', 405],
	['/nothing', 404]
])('refuses a body that %s does not read, and answers the next request', async (path, status) => {
	const headers = { 'content-type': 'application/json' };
	for (const kilobytes of [300, 600, 3000]) {
		const response = await get(path, { method: 'POST', body: 'x'.repeat(kilobytes * 1024), headers });
		await response.text();
		expect([kilobytes, response.status]).toEqual([kilobytes, status]);
	}
});

it('leads from localhost to the address that forms are accepted from', async () => {
	expect(await getByName('localhost')).toEqual([307, `${application.url}/paper?x=1`]);
	expect((await getByName('127.0.0.1'))[0]).toBe(200);
});

it('logs a line with an id, and no address', async () => {
	await get('/secret-code-in-the-address');
	const lines = application
		.log()
		.split('\n')
		.filter((line) => line.startsWith('{'));
	const last = JSON.parse(lines.at(-1) ?? '{}');
	expect(last).toMatchObject({ status: 404, method: 'GET', id: expect.stringMatching(/^[0-9a-f]{8}$/) });
	expect(application.log()).not.toContain('secret-code');
});

it('asks an address that sends too much to wait', async () => {
	const design = { method: 'POST', body: '{}', headers: { 'content-type': 'application/json' } };
	const statuses: number[] = [];
	let last: Response | undefined;
	for (let round = 0; round < 200 && last?.status !== 429; round += 1) {
		const answers = await Promise.all(Array.from({ length: 50 }, () => get('/api/v1/evaluate', design)));
		statuses.push(...answers.map((answer) => answer.status));
		last = answers.find((answer) => answer.status === 429) ?? last;
	}
	expect(statuses.filter((status) => status === 400).length).toBeGreaterThanOrEqual(600);
	expect(last?.status).toBe(429);
	expect(Number(last?.headers.get('retry-after'))).toBeGreaterThan(0);
	expect(last?.headers.get('content-type')).toBe('application/problem+json');
	expect((await get('/healthz')).status).toBe(200);
});
