/** What belongs to this checkout: its packages, its build, its database's folder and its lock. */
import { createHash, randomUUID } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { waitForLock } from './lock.mjs';
import { must } from './run.mjs';

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
	const release = await waitForLock(join(local, 'build.lock'));
	try {
		await build();
	} finally {
		release();
	}
}

async function build() {
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

/** Held while this checkout is started or served. */
export const startLock = join(local, 'start.lock');

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
