/** The whole check: lint, types, format, then all tests; closes with one line of totals. */
import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

const root = join(import.meta.dirname, '..');
const scratch = mkdtempSync(join(tmpdir(), 'herringbone-run-'));
const totalsFile = join(scratch, 'totals.json');

/**
 * Runs one of the project's own programs and shows what it says.
 *
 * @param {string} name
 * @param {readonly string[]} parameters
 * @returns {Promise<boolean>} whether it succeeded
 */
function succeeds(name, parameters) {
	const env = { ...process.env, HERRINGBONE_TOTALS: totalsFile };
	const program = join(root, 'node_modules/.bin', name);
	const child = spawn(program, [...parameters], { cwd: root, env, stdio: ['ignore', 'inherit', 'inherit'] });
	const forward = (/** @type {NodeJS.Signals} */ signal) => child.kill(signal);
	process.on('SIGTERM', forward).on('SIGINT', forward);
	return new Promise((resolve, reject) => {
		child.once('error', reject);
		child.once('exit', (code) => resolve(code === 0));
	});
}

/** @returns {import('./totals.mjs').Totals | null} null where the test run did not get to its end */
function testTotals() {
	try {
		return JSON.parse(readFileSync(totalsFile, 'utf8'));
	} catch (error) {
		console.error('The test run ended before its end:', error);
		return null;
	}
}

/** @type {readonly (readonly [string, () => Promise<boolean>])[]} */
const checks = [
	['Lint', () => succeeds('eslint', ['.', '--max-warnings', '0'])],
	[
		'Types',
		async () =>
			(await succeeds('svelte-kit', ['sync'])) &&
			(await succeeds('svelte-check', ['--tsconfig', './tsconfig.json', '--fail-on-warnings']))
	],
	['Format', () => succeeds('prettier', ['--check', '.', '--log-level', 'warn'])]
];

const totals = { passed: 0, failed: 0 };
for (const [name, check] of checks) {
	const passed = await check();
	console.log(`${name}: ${passed ? 'passed' : 'FAILED'}`);
	totals[passed ? 'passed' : 'failed'] += 1;
}
const reporters = ['--reporter=default', '--reporter=./tests/totals.mjs'];
const green = await succeeds('vitest', ['run', ...reporters, ...process.argv.slice(2)]);
const tests = testTotals() ?? { passed: 0, failed: 1 };
totals.passed += tests.passed;
totals.failed += tests.failed;
// The runner may fail without a failed test, for example in what it sets up.
if (!green && tests.failed === 0) totals.failed += 1;
rmSync(scratch, { recursive: true, force: true });
console.log(`\n${totals.passed} passed, ${totals.failed} failed`);
process.exitCode = totals.failed === 0 && tests.passed > 0 ? 0 : 1;
