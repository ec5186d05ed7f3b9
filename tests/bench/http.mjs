/** Over HTTP: a whole PDF from the built server, against rsvg-convert on the same SVG in the same run. */
import { execFileSync, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { ensureBuild } from '../../drizzle/local/checkout.mjs';
import { freePort, startCluster } from '../../drizzle/local/cluster.mjs';
import { createDatabase, migrateDatabase } from '../../drizzle/local/migrate.mjs';
import { median, medianTime } from './figures.mjs';

const root = join(import.meta.dirname, '../..');
const PAGES = 20;

/** @param {string} url @param {import('node:child_process').ChildProcess} child */
async function answers(url, child) {
	for (let tries = 0; tries < 300; tries += 1) {
		if (child.exitCode !== null) throw new Error(`the server ended with ${child.exitCode}`);
		try {
			await fetch(`${url}/healthz`);
			return;
		} catch {
			await new Promise((resolve) => setTimeout(resolve, 100)); // not listening yet
		}
	}
	throw new Error('the server does not answer');
}

/** The built application with a database of its own, both gone afterwards. */
async function startBuild() {
	await ensureBuild();
	const folder = mkdtempSync(join(tmpdir(), 'herringbone-bench-'));
	const cluster = await startCluster(folder, ['fsync=off']);
	const applicationUrl = await migrateDatabase(await createDatabase(cluster.superuserUrl));
	const port = await freePort();
	const url = `http://127.0.0.1:${port}`;
	const { DATABASE_URL: _owner, ...rest } = process.env;
	const env = {
		...rest,
		HOST: '127.0.0.1',
		PORT: String(port),
		ORIGIN: url,
		DEMO: '0',
		DATABASE_APP_URL: applicationUrl,
		SHUTDOWN_TIMEOUT: '2'
	};
	const child = spawn(process.execPath, [join(root, 'build/index.js')], {
		cwd: root,
		env,
		stdio: ['ignore', 'ignore', 'inherit']
	});
	const stop = async () => {
		child.kill('SIGTERM');
		if (child.exitCode === null) await once(child, 'exit');
		await cluster.stop();
		rmSync(folder, { recursive: true, force: true });
	};
	try {
		await answers(url, child);
	} catch (error) {
		await stop();
		throw error;
	}
	return { url, stop };
}

/** @param {string} url @param {string} body */
async function post(url, body) {
	const answer = await fetch(url, { method: 'POST', body, headers: { 'content-type': 'application/json' } });
	if (!answer.ok) throw new Error(`${url} answered ${answer.status}: ${await answer.text()}`);
	return Buffer.from(await answer.arrayBuffer());
}

/** Time per page in one run of many pages, and of a run for one page [ms]. @param {Buffer} svg */
function rsvgTimes(svg) {
	const folder = mkdtempSync(join(tmpdir(), 'herringbone-bench-'));
	const file = join(folder, 'sheet.svg');
	writeFileSync(file, svg);
	const fonts = join(folder, 'fonts.conf');
	writeFileSync(
		fonts,
		`<fontconfig><dir>${join(root, 'static/fonts')}</dir><cachedir>${folder}</cachedir></fontconfig>`
	);
	const env = { ...process.env, FONTCONFIG_FILE: fonts };
	const time = (/** @type {number} */ pages) => {
		const files = Array.from({ length: pages }, () => file);
		const start = performance.now();
		execFileSync('rsvg-convert', ['-f', 'pdf', '-o', join(folder, 'sheet.pdf'), ...files], { env });
		return performance.now() - start;
	};
	time(1);
	const one = median(Array.from({ length: 5 }, () => time(1)));
	const many = median(Array.from({ length: 5 }, () => time(PAGES)));
	rmSync(folder, { recursive: true });
	return { perPage: (many - one) / (PAGES - 1), single: one };
}

/**
 * @param {(file: string) => Promise<Record<string, any>>} load
 * @returns {Promise<import('./figures.mjs').Figure[]>}
 */
export async function overHttp(load) {
	const { chargerAuxiliary: design } = await load('src/lib/design/examples.ts');
	const body = JSON.stringify({ design, layout: { paper: 'A4', orientation: 'landscape' }, kind: 'worked' });
	const { url, stop } = await startBuild();
	try {
		const whole = await medianTime(() => post(`${url}/api/v1/sheet.pdf`, body));
		const { perPage, single } = rsvgTimes(await post(`${url}/api/v1/sheet.svg`, body));
		const figure = (
			/** @type {string} */ what,
			/** @type {number} */ value,
			/** @type {number} */ target
		) => ({
			what,
			value,
			unit: 'ms',
			target
		});
		return [
			figure('whole PDF over HTTP (target: half of the next line)', whole, perPage / 2),
			figure('rsvg-convert, a further page of the same SVG', perPage, Number.NaN),
			figure('rsvg-convert, a run for one page', single, Number.NaN)
		];
	} finally {
		await stop();
	}
}
