import {
	avionicsConverter,
	chargerAuxiliary,
	chargerAuxiliaryFirstTry,
	servoControl
} from '$lib/design/examples';
import type { Design } from '$lib/design/design';
import { evaluate } from '$lib/rules/evaluate';
import { describe, expect, it } from 'vitest';
import { fitChart, LayoutError, type Fit } from './fit';
import type { Layout } from './layout';
import { dividePaper } from './paper';
import { capacitanceLine, inductanceLine, PLOT_ROOM, xOf, yOf } from './plot';

const fit = (layout: Partial<Layout>, design: Design | null = chargerAuxiliary, pane = true): Fit => {
	const whole: Layout = { paper: 'A4', orientation: 'landscape', ...layout };
	const evaluation = design === null ? null : evaluate(design);
	return fitChart({ paper: dividePaper(whole), layout: whole, design, evaluation, pane });
};

const decades = ({ plot }: Fit): number[] => [plot.width / plot.decade, plot.height / plot.decade];

describe('decades', () => {
	it.each([
		['A4', 'landscape', true, 28, [5, 4], 28],
		['A3', 'landscape', true, 40, [5, 4], 40],
		['A4', 'landscape', false, 35, [4, 4], null],
		['A3', 'landscape', false, 50, [4, 4], null],
		['Letter', 'landscape', false, 30, [4, 4], null],
		['Tabloid', 'landscape', false, 49, [4, 4], null],
		['A4', 'portrait', false, 33, [4, 4], null],
		['A4', 'portrait', true, 25, [5, 4], 25]
	] as const)('%s %s pane %s: %d mm', (paper, orientation, pane, decade, count, paneHeight) => {
		const found = fit({ paper, orientation }, chargerAuxiliary, pane);
		expect(found.plot.decade).toBe(decade);
		expect(decades(found)).toEqual(count);
		expect(found.pane?.height ?? null).toBe(paneHeight);
	});

	it('starts A4 at 36, 21', () => {
		const { plot } = fit({});
		expect([plot.x, plot.y]).toEqual([36, 21]);
	});

	it.each(
		(['A4', 'A3', 'Letter', 'Tabloid'] as const).flatMap((paper) =>
			(['landscape', 'portrait'] as const).flatMap((orientation) =>
				[true, false].map((strip) => ({ paper, orientation, strip }))
			)
		)
	)('$paper $orientation strip $strip: whole millimetres inside the room, at least 4 × 4', (layout) => {
		for (const wanted of [true, false]) {
			const paper = dividePaper(layout);
			const found = fit(layout, chargerAuxiliary, wanted);
			const { plot, pane } = found;
			expect(Number.isInteger(plot.decade)).toBe(true);
			expect(Math.min(...decades(found))).toBeGreaterThanOrEqual(4);
			const { chart, k } = paper;
			expect(plot.x).toBeGreaterThanOrEqual(chart.x + PLOT_ROOM.left * k - 0.06);
			expect(plot.y).toBeGreaterThanOrEqual(chart.y + PLOT_ROOM.top * k - 0.06);
			expect(plot.x + plot.width).toBeLessThanOrEqual(chart.x + chart.width - PLOT_ROOM.right * k + 0.06);
			const foot = plot.y + plot.height + (pane?.height ?? 0);
			expect(foot).toBeLessThanOrEqual(chart.y + chart.height - PLOT_ROOM.bottom * k + 0.06);
		}
	});
});

describe('what the layout fixes', () => {
	it('keeps a given decade length and drops a pane that was not asked for when room is short', () => {
		expect(decades(fit({ decade_mm: 35 }))).toEqual([4, 3]);
		expect(fit({ decade_mm: 70 }).pane).toBeNull();
		expect(decades(fit({ decade_mm: 70 }))).toEqual([2, 2]);
	});

	it('shows no more than eight decades of a short decade', () => {
		expect(decades(fit({ decade_mm: 5 }))).toEqual([8, 8]);
	});

	it.each([{ decade_mm: 71 }, { decade_mm: 500 }, { decade_mm: 70, benefitPane: true }])(
		'refuses %o, which leaves fewer than 2 × 2 decades',
		(layout) => {
			expect(() => fit(layout)).toThrow(LayoutError);
			expect(() => fit(layout)).toThrow(expect.objectContaining({ pointer: '/layout/decade_mm' }));
		}
	);

	it('keeps given ends of the axes', () => {
		const { plot } = fit({ frequencyFrom_Hz: 100, impedanceFrom_ohm: 10 });
		expect([plot.frequencyFrom, plot.frequencyTo, plot.impedanceFrom, plot.impedanceTo]).toEqual([
			100, 1e7, 10, 1e5
		]);
	});
});

describe('ranges', () => {
	it('starts a sheet without a design at 1 kHz and 100 mΩ', () => {
		const { plot } = fit({}, null, false);
		expect([plot.frequencyFrom, plot.impedanceFrom, plot.frequencyTo, plot.impedanceTo]).toEqual([
			1e3, 0.1, 1e7, 1e3
		]);
	});

	it.each([chargerAuxiliary, avionicsConverter, servoControl])(
		'$title: what matters falls inside, the choice well inside',
		(design) => {
			for (const paper of ['A4', 'A3', 'Letter', 'Tabloid'] as const) {
				const { plot } = fit({ paper }, design);
				const frequency = design.switching[0]?.frequencyMin_Hz ?? 1;
				const chosen = design.choice.capacitance_F ?? 1;
				const across = (xOf(plot, frequency) - plot.x) / plot.width;
				const up = (yOf(plot, 1 / (2 * Math.PI * frequency * chosen)) - plot.y) / plot.height;
				for (const part of [across, up]) {
					expect(part).toBeGreaterThanOrEqual(0.2);
					expect(part).toBeLessThanOrEqual(0.8);
				}
				expect(plot.frequencyTo).toBeGreaterThan(5 * frequency);
				expect(capacitanceLine(plot, design.capacitor.capacitance_F)).not.toBeNull();
				expect(inductanceLine(plot, design.inductor.inductance_H)).not.toBeNull();
				for (const { from, to } of evaluate(design).windows) {
					for (const edge of [from, to]) {
						const y = yOf(plot, 1 / (2 * Math.PI * frequency * edge));
						expect(y).toBeGreaterThan(plot.y);
						expect(y).toBeLessThan(plot.y + plot.height);
					}
				}
			}
		}
	);

	it('holds every edge of a design that leaves no window', () => {
		const { plot } = fit({}, chargerAuxiliaryFirstTry);
		expect(plot.frequencyFrom).toBe(1e3);
		expect(plot.impedanceFrom).toBeLessThanOrEqual(1);
	});
});
