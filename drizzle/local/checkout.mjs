/** What belongs to this checkout: its packages, its build, its database's folder and its lock. */
import { createHash, randomUUID } from 'node:crypto';
import { existsSync, linkSync, mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { Halt, must } from './run.mjs';

export const root = join(import.meta.dirname, '../..');
const local = join(root, '.local');

/** @param {string} file @returns {Record<string, any>} */
const readJson = (file) => JSON.parse(readFileSync(file, 'utf8'));

/**
 * Whether node_modules holds just what the lock names: npm writes the list of what it installed, and
 * writes it last, so an interrupted installation has none.
 */
function packagesCurrent() {
	const written = join(root, 'node_modules/.package-lock.json');
	if (!existsSync(written)) return false;
	const there = readJson(written).packages;
	const { '': self, ...wanted } = readJson(join(root, 'package-lock.json')).packages;
	const same = (/** @type {string} */ path) =>
		there[path]?.version === wanted[path]?.version && there[path]?.integrity === wanted[path]?.integrity;
	// Packages for other kinds of machine are optional, and rightly absent.
	const complete = Object.keys(wanted).every((path) => wanted[path].optional || same(path));
	return complete && Object.keys(there).every(same);
}

/** Installs the packages of the lock where they are not installed as it says. */
export async function ensureNodePackages() {
	if (packagesCurrent()) return;
	console.log('Installing packages (npm ci) …');
	const flags = ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'];
	const npm = process.env.npm_execpath;
	const [command, parameters] = npm?.endsWith('.js') ? [process.execPath, [npm, ...flags]] : ['npm', flags];
	await must('install the packages', command, parameters, { cwd: root, show: true });
}

const sources = ['src', 'static', 'package-lock.json', 'svelte.config.js', 'vite.config.ts', 'tsconfig.json'];

/** @param {string} path @returns {string[]} the files in it, sorted, without tests */
function filesOf(path) {
	if (!existsSync(path)) return [];
	const entries = readdirSync(path, { withFileTypes: true, recursive: true });
	const files = entries.filter((entry) => entry.isFile() && !/\.test\.ts$/.test(entry.name));
	return files.map((entry) => join(entry.parentPath, entry.name)).sort();
}

function sourceHash() {
	const hash = createHash('sha256').update(process.version);
	for (const source of sources.map((name) => join(root, name))) {
		const files = /\.\w+$/.test(source) ? [source] : filesOf(source);
		for (const file of files) hash.update(`\0${relative(root, file)}\0`).update(readFileSync(file));
	}
	return hash.digest('hex');
}

/** Builds the application where its sources are not those of the last build. */
export async function ensureBuild() {
	const stamp = join(root, 'build/source-hash');
	const hash = sourceHash();
	if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return;
	console.log('Building …');
	rmSync(stamp, { force: true });
	const vite = join(root, 'node_modules/vite/bin/vite.js');
	const env = { ...process.env, NODE_ENV: 'production' };
	const quiet = ['build', '--logLevel', 'warn'];
	await must('build the application', process.execPath, [vite, ...quiet], { cwd: root, env });
	writeFileSync(stamp, hash);
}

/** @param {number | undefined} pid */
function alive(pid) {
	if (!pid) return false;
	try {
		process.kill(pid, 0);
		return true;
	} catch (error) {
		return error instanceof Error && 'code' in error && error.code === 'EPERM';
	}
}

/** @param {number} pid @returns {string} what tells a process from a later one that got its number */
function birth(pid) {
	const file = `/proc/${pid}/stat`;
	return existsSync(file) ? (readFileSync(file, 'utf8').split(') ').pop()?.split(' ')[19] ?? '') : '';
}

const lockFile = join(local, 'start.lock');

/** @returns {{ pid?: number, born?: string, server?: number, serverBorn?: string }} */
function lockHolder() {
	try {
		return readJson(lockFile);
	} catch (error) {
		if (error instanceof SyntaxError || !existsSync(lockFile)) return {}; // cut off while it was written
		throw error;
	}
}

/** @param {number | undefined} pid @param {string | undefined} born */
const stillThat = (pid, born) => pid !== undefined && alive(pid) && birth(pid) === born;

/** Ends the server that a start which was killed left behind: it would hold the port. */
function endLeftover({ server, serverBorn } = lockHolder()) {
	if (server !== undefined && stillThat(server, serverBorn)) process.kill(server, 'SIGKILL');
}

/**
 * Lets one start of this checkout at a time go on; the lock of a process that is gone counts for nothing.
 *
 * @returns {() => void} gives the lock back
 */
export function takeLock() {
	mkdirSync(local, { recursive: true });
	const mine = `${lockFile}.${process.pid}`;
	writeFileSync(mine, JSON.stringify({ pid: process.pid, born: birth(process.pid) }));
	for (let tries = 0; tries < 2; tries += 1) {
		try {
			// A link appears whole or not at all, so nobody reads half a lock.
			linkSync(mine, lockFile);
			rmSync(mine);
			return () => rmSync(lockFile, { force: true });
		} catch (error) {
			if (!(error instanceof Error && 'code' in error && error.code === 'EEXIST')) throw error;
		}
		const holder = lockHolder();
		if (stillThat(holder.pid, holder.born)) {
			rmSync(mine);
			throw new Halt(
				`This checkout is already being started or served, by process ${holder.pid}. Stop that first.`
			);
		}
		endLeftover(holder);
		rmSync(lockFile, { force: true });
	}
	throw new Halt('Another start of this checkout came first.');
}

/** Notes the server's process in the lock. @param {number} server */
export function noteServer(server) {
	const entry = { pid: process.pid, born: birth(process.pid), server, serverBorn: birth(server) };
	writeFileSync(lockFile, JSON.stringify(entry));
}

const shelf = '/var/lib/herringbone';

/**
 * Whether a folder of the shelf is this checkout's: a moved checkout keeps its database, a copied one
 * (the other is still there) does not share it.
 *
 * @param {string} folder
 */
function isOurs(folder) {
	const label = join(folder, 'checkout');
	if (!existsSync(label)) return false;
	const labelled = readFileSync(label, 'utf8');
	if (labelled === root) return true;
	if (existsSync(join(labelled, '.local/database'))) return false;
	writeFileSync(label, root);
	return true;
}

/**
 * The folder of this checkout's database. As root it lies where the postgres user can reach it, under a
 * number kept in the checkout, so that a new clone has a new database.
 */
export function clusterFolder() {
	if (process.getuid?.() !== 0) return join(local, 'postgres');
	const note = join(local, 'database');
	const kept = existsSync(note) ? join(shelf, readFileSync(note, 'utf8').trim()) : shelf;
	if (isOurs(kept)) return kept;
	const fresh = randomUUID();
	const folder = join(shelf, fresh);
	mkdirSync(folder, { recursive: true });
	writeFileSync(join(folder, 'checkout'), root);
	writeFileSync(note, `${fresh}\n`);
	return folder;
}
