/** The built application on a free port with a database of its own, as a user's own start would serve it. */
import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { ensureBuild } from '../../drizzle/local/checkout.mjs';
import { freePort } from '../../drizzle/local/cluster.mjs';
import { freshDatabase } from '../database/fresh';

export interface Application {
	/** Such as http://127.0.0.1:43211, without a slash at the end. */
	readonly url: string;
	readonly databaseUrl: string;
	/** What the server wrote to its two streams so far. */
	log(): string;
	stop(): Promise<void>;
}

export interface ApplicationOptions {
	/** Load the demo; false unless asked for. */
	readonly demo?: boolean;
	readonly env?: Readonly<Record<string, string>>;
	/** Another database than a fresh one. */
	readonly databaseUrl?: string;
}

async function ready(url: string, child: ChildProcess, log: () => string): Promise<void> {
	for (let tries = 0; tries < 300; tries += 1) {
		if (child.exitCode !== null) throw new Error(`the server ended with ${child.exitCode}:\n${log()}`);
		try {
			await fetch(`${url}/healthz`, { signal: AbortSignal.timeout(10_000) });
			return;
		} catch {
			await new Promise((resolve) => setTimeout(resolve, 50)); // not listening yet
		}
	}
	throw new Error(`the server does not answer:\n${log()}`);
}

/** Builds the application where its sources changed, and starts it; stop it in afterAll. */
export async function startApplication(options: ApplicationOptions = {}): Promise<Application> {
	await ensureBuild();
	const port = await freePort();
	const url = `http://127.0.0.1:${port}`;
	const databaseUrl = options.databaseUrl ?? (await freshDatabase()).applicationUrl;
	const child = spawn(process.execPath, [join(import.meta.dirname, '../../build/index.js')], {
		env: {
			PATH: process.env.PATH,
			HOST: '127.0.0.1',
			PORT: String(port),
			ORIGIN: url,
			DATABASE_APP_URL: databaseUrl,
			DEMO: options.demo ? '1' : '0',
			SHUTDOWN_TIMEOUT: '2',
			...options.env
		}
	});
	// A test that runs out of time never gets to stop().
	process.once('exit', () => child.kill('SIGKILL'));
	let output = '';
	for (const stream of [child.stdout, child.stderr]) {
		stream.setEncoding('utf8').on('data', (text: string) => (output += text));
	}
	const log = () => output;
	await ready(url, child, log);
	return {
		url,
		databaseUrl,
		log,
		async stop() {
			if (child.exitCode !== null || child.signalCode !== null) return;
			const ended = once(child, 'exit');
			child.kill('SIGTERM');
			await ended;
		}
	};
}
