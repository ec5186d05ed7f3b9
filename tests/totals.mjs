/** A reporter that only counts, for the closing line of the whole run (tests/run.mjs). */
import { writeFileSync } from 'node:fs';

/** @typedef {{ passed: number, failed: number }} Totals */

/**
 * Everything that did not pass counts as failed: a skipped test is one whose tool was missing.
 *
 * @param {Iterable<import('vitest/node').TestModule>} modules
 * @param {number} errors that belong to no test
 * @returns {Totals}
 */
export function count(modules, errors) {
	const totals = { passed: 0, failed: errors };
	for (const module of modules) {
		const states = [...module.children.allTests()].map((test) => test.result().state);
		const passed = states.filter((state) => state === 'passed').length;
		totals.passed += passed;
		totals.failed += states.length - passed;
		// A file that could not be loaded, or has nothing in it, has no test that could fail.
		const failedByItself = module.errors().length > 0 || states.length === 0;
		if (failedByItself) totals.failed += 1;
	}
	return totals;
}

/** @implements {import('vitest/node').Reporter} */
export default class TotalsReporter {
	/**
	 * @param {readonly import('vitest/node').TestModule[]} modules
	 * @param {readonly unknown[]} errors
	 */
	onTestRunEnd(modules, errors) {
		const file = process.env.HERRINGBONE_TOTALS;
		if (file) writeFileSync(file, JSON.stringify(count(modules, errors.length)));
	}
}
