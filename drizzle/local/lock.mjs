/** Locks between processes of one checkout. The lock of a process that is gone counts for nothing. */
import { randomUUID } from 'node:crypto';
import { existsSync, linkSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { pause } from './run.mjs';

/** @typedef {{ pid?: number, born?: string, server?: number, serverBorn?: string }} Holder */

/** @param {number} pid */
function alive(pid) {
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

/** @param {number | undefined} pid @param {string | undefined} born */
const stillThat = (pid, born) => pid !== undefined && alive(pid) && birth(pid) === born;

/** @param {string} file @returns {Holder} */
function holderOf(file) {
	try {
		return JSON.parse(readFileSync(file, 'utf8'));
	} catch (error) {
		if (error instanceof SyntaxError || !existsSync(file)) return {}; // given back, or cut off, just now
		throw error;
	}
}

/** @param {string} file @param {Holder} entry */
const write = (file, entry) => writeFileSync(file, JSON.stringify(entry));

const self = () => ({ pid: process.pid, born: birth(process.pid) });

/** Ends the server that a start which was killed left behind: it would hold the port. @param {Holder} holder */
async function endLeftover({ server, serverBorn }) {
	if (server === undefined || !stillThat(server, serverBorn)) return;
	process.kill(server, 'SIGKILL');
	while (stillThat(server, serverBorn)) await pause(50);
}

/** A link appears whole or not at all, so nobody reads half a lock. @param {string} from @param {string} to */
function linked(from, to) {
	try {
		linkSync(from, to);
		return true;
	} catch (error) {
		if (error instanceof Error && 'code' in error && error.code === 'EEXIST') return false;
		throw error;
	}
}

/**
 * Takes a lock, or tells who has it.
 *
 * @param {string} file
 * @returns {Promise<{ release: () => void } | { heldBy: number }>}
 */
export async function takeLock(file) {
	mkdirSync(dirname(file), { recursive: true });
	const mine = `${file}.${randomUUID()}`;
	write(mine, self());
	try {
		while (!linked(mine, file)) {
			const holder = holderOf(file);
			if (holder.pid !== undefined && stillThat(holder.pid, holder.born)) return { heldBy: holder.pid };
			await endLeftover(holder);
			rmSync(file, { force: true });
		}
	} finally {
		rmSync(mine, { force: true });
	}
	return { release: () => holderOf(file).pid === process.pid && rmSync(file, { force: true }) };
}

/** Takes a lock as soon as whoever has it gives it back. @param {string} file @returns {Promise<() => void>} */
export async function waitForLock(file) {
	for (;;) {
		const outcome = await takeLock(file);
		if ('release' in outcome) return outcome.release;
		await pause(200);
	}
}

/** Notes the server's process in our lock. @param {string} file @param {number} server */
export function noteServer(file, server) {
	write(file, { ...self(), server, serverBorn: birth(server) });
}
