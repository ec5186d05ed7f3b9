/** A checkout beside the real one: its own scripts and database, the real one's packages and build. */
import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { cpSync, existsSync, mkdtempSync, readFileSync, rmSync, symlinkSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { stopCluster } from '../../drizzle/local/cluster.mjs';

const root = join(import.meta.dirname, '../..');

export interface Start {
	readonly child: ChildProcess;
	log(): string;
	/** Resolves once the address is printed, rejects when the start ends before. */
	served(): Promise<void>;
	/** Resolves with the exit code. */
	ended(): Promise<number | null>;
}

export interface Checkout {
	readonly folder: string;
	start(port: number, env?: Readonly<Record<string, string>>): Start;
	/** The database's folder, once it was started. */
	database(): string;
	/** Ends what a failed test left, and removes everything. */
	remove(): Promise<void>;
}

function watch(child: ChildProcess): Start {
	let output = '';
	for (const stream of [child.stdout, child.stderr]) {
		stream?.setEncoding('utf8').on('data', (text: string) => (output += text));
	}
	const end = once(child, 'close');
	return {
		child,
		log: () => output,
		async served() {
			for (let tries = 0; tries < 600 && !output.includes('Ctrl-C stops'); tries += 1) {
				if (child.exitCode !== null) throw new Error(`the start ended with ${child.exitCode}:\n${output}`);
				await new Promise((resolve) => setTimeout(resolve, 100));
			}
		},
		async ended() {
			await end;
			return child.exitCode;
		}
	};
}

/** Makes such a checkout; remove it in afterAll. */
export function makeCheckout(): Checkout {
	const folder = mkdtempSync(join(tmpdir(), 'herringbone-checkout-'));
	cpSync(join(root, 'drizzle'), join(folder, 'drizzle'), { recursive: true });
	for (const name of ['package.json', 'package-lock.json']) cpSync(join(root, name), join(folder, name));
	for (const name of ['node_modules', 'build']) symlinkSync(join(root, name), join(folder, name));
	const starts: Start[] = [];
	const database = () => {
		const note = join(folder, '.local/database');
		const shelved = existsSync(note);
		return shelved
			? join('/var/lib/herringbone', readFileSync(note, 'utf8').trim())
			: join(folder, '.local/postgres');
	};
	return {
		folder,
		database,
		start(port, env = {}) {
			const parameters = [join(folder, 'drizzle/local.mjs'), 'serve'];
			const settings = { PATH: process.env.PATH, PORT: String(port), ...env };
			const started = watch(spawn(process.execPath, parameters, { cwd: folder, env: settings }));
			starts.push(started);
			return started;
		},
		async remove() {
			for (const { child } of starts) child.kill('SIGTERM');
			await Promise.all(starts.map((start) => start.ended()));
			await stopCluster(database());
			rmSync(database(), { recursive: true, force: true });
			rmSync(folder, { recursive: true, force: true });
		}
	};
}
