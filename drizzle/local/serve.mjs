/** Serves the application with its database until it is told to stop. */
import { spawn } from 'node:child_process';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { root, startLock } from './checkout.mjs';
import { noteServer } from './lock.mjs';
import { Halt, pause } from './run.mjs';

/** @param {string} host @param {number} port */
function addressOf(host, port) {
	if (host === '0.0.0.0' || host === '::') return `http://127.0.0.1:${port}`;
	return host.includes(':') ? `http://[${host}]:${port}` : `http://${host}:${port}`;
}

/**
 * What the environment asks for. An empty variable is one that is not set.
 *
 * @param {NodeJS.ProcessEnv} env
 */
export function settings({ PORT, HOST, ORIGIN, DEMO }) {
	const port = Number(PORT || 4600);
	if (!Number.isInteger(port) || port < 1 || port > 65_535) {
		throw new Halt(`PORT must be a whole number from 1 to 65535, not "${PORT}".`);
	}
	const demo = DEMO || '1';
	if (!/^[01]$/.test(demo)) throw new Halt(`DEMO must be 0 or 1, not "${DEMO}".`);
	const host = HOST || '127.0.0.1';
	const here = addressOf(host, port);
	return { port, host, demo, here, origin: ORIGIN || here };
}

/** @typedef {ReturnType<typeof settings>} Settings */

/** @param {Settings} settings */
export function ensurePortFree({ port, host }) {
	return new Promise((resolve, reject) => {
		const probe = createServer();
		probe.once('error', (error) => {
			const code = 'code' in error ? error.code : '';
			const reason =
				code === 'EADDRINUSE' ? 'is taken by another program' : `cannot be used (${error.message})`;
			reject(
				new Halt(`Port ${port} of ${host} ${reason}. Choose another, for example: PORT=${port + 1} npm start`)
			);
		});
		probe.listen(port, host, () => probe.close(resolve));
	});
}

/** @param {string} url */
async function answers(url) {
	try {
		return (await fetch(`${url}/healthz`, { signal: AbortSignal.timeout(2000) })).status;
	} catch {
		return 0; // not listening yet
	}
}

/**
 * Starts the server's process and waits until it answers.
 *
 * @param {Settings} settings
 * @param {string} databaseUrl as the application's role
 * @param {readonly string[]} command
 */
export async function startServer({ port, host, demo, here, origin }, databaseUrl, command) {
	const { DATABASE_URL: owner, ...rest } = process.env;
	const env = {
		...rest,
		PORT: String(port),
		HOST: host,
		ORIGIN: origin,
		DEMO: demo,
		DATABASE_APP_URL: databaseUrl,
		SHUTDOWN_TIMEOUT: process.env.SHUTDOWN_TIMEOUT || '4'
	};
	const child = spawn(process.execPath, [...command], {
		cwd: root,
		env,
		stdio: ['ignore', 'inherit', 'inherit']
	});
	/** @type {Promise<number>} */
	const ended = new Promise((resolve) => {
		child.once('error', () => resolve(1));
		child.once('exit', (code, signal) => resolve(signal ? 1 : (code ?? 1)));
	});
	if (child.pid) noteServer(startLock, child.pid);
	let over = false;
	void ended.then(() => (over = true));
	const ready = async () => {
		for (let tries = 0; tries < 600 && !over; tries += 1) {
			if ((await answers(here)) !== 0) return true;
			await pause(100);
		}
		return false;
	};
	const stop = async () => {
		child.kill('SIGTERM');
		await Promise.race([ended, pause(8000)]);
		if (!over) child.kill('SIGKILL');
		await ended;
	};
	return { ended, ready, stop };
}

export const builtServer = [join(root, 'build/index.js')];

/** @param {Settings} settings */
export function developmentServer({ port, host }) {
	const vite = join(root, 'node_modules/vite/bin/vite.js');
	return [vite, 'dev', '--strictPort', '--port', String(port), '--host', host];
}
