/** `npm run bench`: medians of one run beside what they should be; says so, and fails, when one is missed. */
import { openCore } from './core.mjs';
import { inProcess } from './figures.mjs';
import { overHttp } from './http.mjs';

// As served: what is loaded for a production server.
process.env.NODE_ENV ??= 'production';

const core = await openCore();
const figures = [...(await inProcess(core.load)), ...(await overHttp(core.load))];
await core.close();

const cell = (/** @type {number} */ value) => (Number.isNaN(value) ? '' : value.toFixed(2));
const width = Math.max(...figures.map(({ what }) => what.length));
console.log(`${''.padEnd(width)} ${'median'.padStart(9)}    ${'target'.padStart(8)} ${'ratio'.padStart(7)}`);
let missed = 0;
for (const { what, value, unit, target } of figures) {
	const ratio = value / target;
	if (ratio > 1) missed += 1;
	console.log(
		`${what.padEnd(width)} ${cell(value).padStart(9)} ${unit} ${cell(target).padStart(8)} ${cell(ratio).padStart(7)}${ratio > 1 ? '  missed' : ''}`
	);
}
console.log(`\n${figures.length} figures, ${missed} of the targets missed; a busy machine misses more.`);
process.exitCode = missed === 0 ? 0 : 1;
