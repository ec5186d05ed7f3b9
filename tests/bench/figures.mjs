/** In process: what a sheet costs from the design to its file. */
import { performance } from 'node:perf_hooks';

/** @param {number[]} values */
export function median(values) {
	const sorted = [...values].sort((a, b) => a - b);
	return sorted[sorted.length >> 1] ?? Number.NaN;
}

/**
 * @param {() => unknown} work
 * @param {{ warm?: number, runs?: number }} [options]
 * @returns {Promise<number>} median [ms], after runs that do not count
 */
export async function medianTime(work, { warm = 20, runs = 60 } = {}) {
	const times = [];
	for (let run = 0; run < warm + runs; run += 1) {
		const start = performance.now();
		await work();
		if (run >= warm) times.push(performance.now() - start);
	}
	return median(times);
}

/**
 * @typedef {{ what: string, value: number, unit: string, target: number }} Figure
 * @param {(file: string) => Promise<Record<string, any>>} load
 * @returns {Promise<Figure[]>}
 */
export async function inProcess(load) {
	const { chargerAuxiliary: design } = await load('src/lib/design/examples.ts');
	const { evaluate } = await load('src/lib/rules/evaluate.ts');
	const { composeSheet } = await load('src/lib/sheet/compose.ts');
	const { toSvg } = await load('src/lib/render/svg.ts');
	const { toPdf } = await load('src/lib/render/pdf.ts');
	const { sheetFonts } = await load('src/lib/server/fonts.ts');
	const layout = { paper: 'A4', orientation: 'landscape' };
	const evaluation = evaluate(design);
	const compose = () => composeSheet({ design, evaluation, layout, kind: 'worked' });
	const scene = compose();
	const fonts = sheetFonts();
	const ms = (/** @type {string} */ what, /** @type {number} */ value, /** @type {number} */ target) => ({
		what,
		value,
		unit: 'ms',
		target
	});
	return [
		ms('evaluate, exact guard and five harmonics', await medianTime(() => evaluate(design)), 1),
		ms('compose, worked A4', await medianTime(compose), 3),
		ms('SVG, worked A4', await medianTime(() => toSvg(scene)), 2),
		ms('PDF, worked A4, warm', await medianTime(() => toPdf(scene, fonts)), 5),
		{ what: 'PDF, worked A4', value: (await toPdf(scene, fonts)).length / 1024, unit: 'KB', target: 40 }
	];
}
