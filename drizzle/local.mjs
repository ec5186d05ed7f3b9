/**
 * The local server: npm's scripts call it, and it needs nothing but Node.
 *
 *   prepare   installs what is missing and builds
 *   serve     starts the database, migrates, serves, and stops both when told to
 *   dev       the same with the development server
 *   migrate   brings the database up to date and ends
 *   tools     installs what the tests need
 */
import { clusterFolder, ensureBuild, ensureNodePackages, startLock } from './local/checkout.mjs';
import { startCluster } from './local/cluster.mjs';
import { ensurePackages, toServe, toTest } from './local/debian.mjs';
import { takeLock } from './local/lock.mjs';
import { createDatabase, migrateDatabase } from './local/migrate.mjs';
import { Halt, endWithChildren } from './local/run.mjs';
import { builtServer, developmentServer, ensurePortFree, settings, startServer } from './local/serve.mjs';

const ownDatabase = !process.env.DATABASE_URL;

/** Lets one start of this checkout at a time go on. @param {() => Promise<void>} work */
async function alone(work) {
	const outcome = await takeLock(startLock);
	if ('heldBy' in outcome) {
		throw new Halt(
			`This checkout is already being started or served, by process ${outcome.heldBy}. Stop that first.`
		);
	}
	process.once('exit', outcome.release);
	await work();
}

async function prepare() {
	endWithChildren();
	const chosen = settings(process.env);
	await alone(async () => {
		await ensurePortFree(chosen);
		await Promise.all([ownDatabase && ensurePackages(toServe), ensureNodePackages()]);
		await ensureBuild();
	});
}

/** @returns {Promise<{ ownerUrl: string, stop: () => Promise<void> }>} */
async function openDatabase() {
	if (!ownDatabase) return { ownerUrl: process.env.DATABASE_URL ?? '', stop: async () => undefined };
	const { superuserUrl, stop } = await startCluster(clusterFolder());
	try {
		return { ownerUrl: await createDatabase(superuserUrl), stop };
	} catch (error) {
		await stop();
		throw error;
	}
}

/** Resolves with the first of the signals that ask for the end. */
function askedToStop() {
	return new Promise((resolve) => {
		for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => resolve(signal));
	});
}

/** @param {ReturnType<typeof settings>} chosen */
function announce({ origin, here, demo }) {
	console.log(`\nHerringbone is served at ${origin}${origin === here ? '' : ` (here ${here})`}`);
	if (demo === '1') {
		console.log('The demo teams elverholm and kestrel-vane are loaded, with people who cannot sign in:');
		console.log('this version has no accounts yet, and all its pages are open to everybody.');
	}
	console.log('Ctrl-C stops the server and its database.\n');
}

/** @param {(chosen: ReturnType<typeof settings>) => readonly string[]} command */
async function serve(command) {
	const stopping = askedToStop();
	const chosen = settings(process.env);
	await alone(async () => {
		await ensurePortFree(chosen);
		const database = await openDatabase();
		try {
			const applicationUrl = await migrateDatabase(database.ownerUrl);
			const server = await startServer(chosen, applicationUrl, command(chosen));
			const outcome = await Promise.race([stopping, server.ended, server.ready()]);
			if (outcome === true) announce(chosen);
			const last = outcome === true ? await Promise.race([stopping, server.ended]) : outcome;
			await server.stop();
			if (typeof last !== 'string') throw new Halt('The server ended by itself; its last lines say why.');
			console.log('Stopped.');
		} finally {
			await database.stop();
		}
	});
}

async function development() {
	await Promise.all([ownDatabase && ensurePackages(toServe), ensureNodePackages()]);
	await serve(developmentServer);
}

async function migrate() {
	await alone(async () => {
		const database = await openDatabase();
		try {
			await migrateDatabase(database.ownerUrl);
			console.log('The database is up to date.');
		} finally {
			await database.stop();
		}
	});
}

async function tools() {
	endWithChildren();
	await Promise.all([ensurePackages(toTest), ensureNodePackages()]);
}

/** @type {Readonly<Record<string, () => Promise<void>>>} */
const commands = { prepare, serve: () => serve(() => builtServer), dev: development, migrate, tools };

try {
	const command = commands[process.argv[2] ?? ''];
	if (!command) throw new Halt(`Say one of: ${Object.keys(commands).join(', ')}.`);
	await command();
	process.exit(0);
} catch (error) {
	if (!(error instanceof Halt)) throw error;
	console.error(`\n${error.message}\n`);
	if (process.argv[2] === 'tools') console.log('0 passed, 1 failed');
	process.exit(1);
}
