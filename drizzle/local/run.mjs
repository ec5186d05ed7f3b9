/** Child processes: started one way, and ended together when this process is told to end. */
import { spawn } from 'node:child_process';

/** A reason that the person at the terminal can act on; printed without a stack. */
export class Halt extends Error {}

/** @type {Set<import('node:child_process').ChildProcess>} */
const running = new Set();

/** Ends what is running with the signal that this process got, and then this process. */
export function endWithChildren() {
	for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
		process.once(signal, () => {
			for (const child of running) child.kill('SIGTERM');
			process.exit(signal === 'SIGINT' ? 130 : 143);
		});
	}
}

/**
 * Runs a program to its end.
 *
 * @param {string} command
 * @param {readonly string[]} parameters
 * @param {{ cwd?: string, env?: NodeJS.ProcessEnv, uid?: number, gid?: number, show?: boolean, discard?: boolean }} [options]
 *   show: to this terminal; discard: to nowhere, for a program that leaves a daemon holding its pipes
 * @returns {Promise<{ code: number, output: string }>}
 */
export function run(command, parameters, options = {}) {
	const { show = false, discard = false, ...rest } = options;
	const sink = show ? 'inherit' : discard ? 'ignore' : 'pipe';
	return new Promise((resolve, reject) => {
		const child = spawn(command, parameters, { ...rest, stdio: ['ignore', sink, sink] });
		running.add(child);
		let output = '';
		for (const stream of [child.stdout, child.stderr]) {
			stream?.setEncoding('utf8').on('data', (text) => (output += text));
		}
		child.once('error', (error) => {
			running.delete(child);
			reject(error);
		});
		child.once('close', (code) => {
			running.delete(child);
			resolve({ code: code ?? 1, output });
		});
	});
}

/**
 * Runs a program that has to succeed.
 *
 * @param {string} what the work, as the end of the sentence "could not …"
 * @param {string} command
 * @param {readonly string[]} parameters
 * @param {Parameters<typeof run>[2]} [options]
 */
export async function must(what, command, parameters, options) {
	const { code, output } = await run(command, parameters, options);
	if (code === 0) return output;
	throw new Halt(`Could not ${what} (${command} ended with ${code}).\n${output.trim()}`.trim());
}

/** @param {number} ms */
export const pause = (ms) => new Promise((resolve) => setTimeout(resolve, ms));
