/** What a start says and does when something is in its way, and what it leaves behind. */
import { existsSync, readFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ensureBuild } from '../../drizzle/local/checkout.mjs';
import { freePort } from '../../drizzle/local/cluster.mjs';
import { freshDatabase } from '../database/fresh';
import { makeCheckout, type Checkout, type Start } from './checkout';

let checkout: Checkout;
beforeAll(async () => {
	await ensureBuild();
	checkout = makeCheckout();
});
afterAll(() => checkout.remove());

const postmasterFile = () => join(checkout.database(), 'data/postmaster.pid');
const postmaster = () => Number(readFileSync(postmasterFile(), 'utf8').split('\n')[0]);
const health = async (port: number) => (await fetch(`http://127.0.0.1:${port}/healthz`)).status;

function alive(pid: number): boolean {
	return existsSync(`/proc/${pid}/stat`) && !/\) Z /.test(readFileSync(`/proc/${pid}/stat`, 'utf8'));
}

async function stopped(start: Start, signal: NodeJS.Signals): Promise<void> {
	const server = postmaster();
	start.child.kill(signal);
	expect(await start.ended(), start.log()).toBe(0);
	expect(existsSync(postmasterFile())).toBe(false);
	expect(alive(server)).toBe(false);
}

describe('a start', () => {
	it.each(['SIGTERM', 'SIGINT', 'SIGHUP'] as const)(
		'stops its server and its database on %s',
		async (signal) => {
			const port = await freePort();
			const start = checkout.start(port);
			await start.served();
			expect(start.log()).toContain(`Herringbone is served at http://127.0.0.1:${port}`);
			expect(await health(port)).toBe(200);
			await stopped(start, signal);
			await expect(health(port)).rejects.toThrow();
		}
	);

	it('ends at once, and with the database stopped, when told so before it serves', async () => {
		const start = checkout.start(await freePort());
		while (!existsSync(postmasterFile())) await new Promise((resolve) => setTimeout(resolve, 20));
		start.child.kill('SIGTERM');
		expect(await start.ended(), start.log()).toBe(0);
		expect(existsSync(postmasterFile())).toBe(false);
	});

	it('names PORT when the port is taken', async () => {
		const port = await freePort();
		const other = createServer().listen(port, '127.0.0.1');
		const start = checkout.start(port);
		expect(await start.ended()).toBe(1);
		expect(start.log()).toMatch(new RegExp(`Port ${port} .* taken.*PORT=${port + 1} npm start`));
		other.close();
	});

	it.each([
		[{ PORT: 'http' }, 'PORT must be a whole number'],
		[{ PORT: '70000' }, 'PORT must be a whole number'],
		[{ DEMO: 'no' }, 'DEMO must be 0 or 1'],
		[{ DATABASE_URL: 'postgres://a:b@127.0.0.1:1/none' }, 'The database cannot be used']
	])('with %o says what is wrong', async (env, sentence) => {
		const start = checkout.start(await freePort(), env);
		expect(await start.ended()).toBe(1);
		expect(start.log()).toContain(sentence);
		expect(start.log()).not.toMatch(/\n {4}at /);
	});

	it('refuses a second one of the same checkout, and the first goes on', async () => {
		const port = await freePort();
		const first = checkout.start(port);
		await first.served();
		const second = checkout.start(await freePort());
		expect(await second.ended()).toBe(1);
		expect(second.log()).toContain(`already being started or served, by process ${first.child.pid}`);
		expect(await health(port)).toBe(200);
		await stopped(first, 'SIGTERM');
	});

	it('recovers the port and the database of one that was killed', async () => {
		const port = await freePort();
		const killed = checkout.start(port);
		await killed.served();
		killed.child.kill('SIGKILL');
		await new Promise((resolve) => killed.child.once('exit', resolve));
		const next = checkout.start(port);
		await next.served();
		expect(await health(port)).toBe(200);
		await stopped(next, 'SIGTERM');
	});

	it('answers 503 while the database is away, keeps its pages, and recovers at the next start', async () => {
		const port = await freePort();
		const start = checkout.start(port);
		await start.served();
		process.kill(postmaster(), 'SIGKILL');
		await expect.poll(() => health(port), { timeout: 10_000 }).toBe(503);
		expect((await fetch(`http://127.0.0.1:${port}/`)).status).toBe(200);
		start.child.kill('SIGTERM');
		expect(await start.ended(), start.log()).toBe(0);
		const next = checkout.start(port);
		await next.served();
		expect(await health(port)).toBe(200);
		await stopped(next, 'SIGTERM');
	});

	it('uses the database of DATABASE_URL and starts none', async () => {
		const { ownerUrl } = await freshDatabase();
		const port = await freePort();
		const start = checkout.start(port, { DATABASE_URL: ownerUrl, DEMO: '0' });
		await start.served();
		expect(existsSync(postmasterFile())).toBe(false);
		expect(start.log()).not.toContain('demo');
		expect(await health(port)).toBe(200);
		start.child.kill('SIGTERM');
		expect(await start.ended()).toBe(0);
	});
});
