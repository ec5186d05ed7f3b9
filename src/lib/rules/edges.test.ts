import { describe, expect, it } from 'vitest';
import type { Design, Rule } from '$lib/design/design';
import { avionicsConverter } from '$lib/design/examples';
import { worstBenefit } from '$lib/network/benefit';
import { peakSourceCurrent } from '$lib/network/transient';
import { cornersOf, filterOf, sourceModel } from './circuit';
import { outputPeak } from './output-peak';
import { peakVoltage } from './series-circuit';
import { findingOf } from './table';

/** 28 V with a source of 2 … 5 µH and 0.1 Ω, 10 % on C. */
const design: Design = {
	...avionicsConverter,
	capacitor: { capacitance_F: 33e-6, toleranceMinus: 0.1, tolerancePlus: 0.1 },
	damping: { resistance_ohm: 0.2, capacitance_F: 66e-6 },
	sources: avionicsConverter.sources.map((source) =>
		source.kind === 'impedance' ? { ...source, inductanceMax_H: 5e-6 } : source
	)
};

const edgesOf = (rule: Rule, of: Design = design): number[] =>
	findingOf(of, rule)
		.bands.flatMap(({ from, to }) => [from, to])
		.filter((edge) => edge > 0 && edge < Infinity);

const bus = { class: 'design', source: 'bus' } as const;

const expectRatio = (value: number, limit: number): void => {
	expect(Math.abs(value / limit - 1)).toBeLessThan(1e-6);
};

describe('at every edge the quantity is at its limit', () => {
	it.each([40, 50, 60])('ringing to %i V, at the largest source inductance', (limit) => {
		const [edge = NaN, ...more] = edgesOf({ id: 'r', kind: 'voltage-rating', ...bus, limit_V: limit });
		expect(more).toEqual([]);
		const circuit = { voltage: 32, inductance: 5e-6, resistance: 0.1 };
		expectRatio(peakVoltage({ ...circuit, capacitance: edge }), limit);
		expect(peakVoltage({ ...circuit, capacitance: edge / 2 })).toBeGreaterThan(limit);
	});

	it('has no limit from twice the voltage on, and no way under the voltage itself', () => {
		const bandsAt = (limit: number) =>
			findingOf(design, { id: 'r', kind: 'voltage-rating', ...bus, limit_V: limit }).bands;
		expect(bandsAt(64)).toEqual([]);
		expect(bandsAt(31)).toMatchObject([{ from: 0, to: Infinity }]);
	});

	it.each([120, 150, 200])('inrush with the capacitor, %i A', (limit) => {
		const rule: Rule = { id: 'r', kind: 'inrush-current', ...bus, limit_A: limit, includeCapacitor: true };
		const edges = edgesOf(rule);
		expect(edges.length).toBeGreaterThan(0);
		const nominal = filterOf(design);
		const filter = {
			...nominal,
			inductor: { ...nominal.inductor, inductance: 0.68e-6 * 0.8 },
			capacitor: { ...nominal.capacitor, capacitance: 33e-6 * 1.1 }
		};
		for (const capacitance of edges) {
			const step = { voltage: 32, inductance: 2e-6, resistance: 0.1 };
			expectRatio(peakSourceCurrent(step, { capacitance }, filter), limit);
		}
	});

	it.each([
		['an', 10],
		['bus', 10],
		['an', -6],
		['bus', -20]
	] as const)('benefit on %s of %f dB', (source, minimum) => {
		const rule: Rule = {
			id: 'r',
			kind: 'minimum-benefit',
			class: 'design',
			source,
			minimum_dB: minimum,
			frequencyFrom_Hz: 300e3
		};
		const edges = edgesOf(rule);
		expect(edges.length).toBeGreaterThan(0);
		const named = design.sources.find(({ id }) => id === source);
		if (named === undefined) throw new RangeError('the design has the source');
		for (const capacitance of edges) {
			const gains = [2, 3, 4, 5].map(
				(n) =>
					worstBenefit(
						filterOf(design),
						sourceModel(design, named),
						{ from: n * 210e3, to: n * 210e3 },
						{ capacitance }
					).gain_dB
			);
			expect(Math.abs(Math.min(...gains) - minimum)).toBeLessThan(1e-3);
		}
	});

	it('output impedance at the worst corner', () => {
		const load = { power_W: 60, voltageMin_V: 18 };
		const corners = cornersOf(design).flatMap((filter) =>
			[2e-6, 5e-6].map((inductance) => ({ filter, resistance: 0.1, inductance }))
		);
		const peak = (limit: number) => outputPeak(corners, { from: 10, to: 210e3 }, limit);
		const limit = peak(0.5)({ capacitance: 10e-6 });
		const rule: Rule = { id: 'r', kind: 'input-stability', ...bus, margin: 18 ** 2 / 60 / limit };
		const edges = edgesOf(rule, { ...design, load });
		expect(edges.some((edge) => Math.abs(edge / 10e-6 - 1) < 1e-3)).toBe(true);
		for (const capacitance of edges) expectRatio(peak(limit)({ capacitance }), limit);
	});
});

it('names what has no damping at all', () => {
	const { damping: _, ...rest } = design;
	const lossless: Design = {
		...rest,
		load: { power_W: 60, voltageMin_V: 18 },
		sources: design.sources.map((source) =>
			source.kind === 'impedance' ? { ...source, resistance_ohm: 0 } : source
		)
	};
	const finding = findingOf(lossless, { id: 'r', kind: 'input-stability', ...bus, margin: 2 });
	expect(finding.cautions.some((text) => text.includes('no bound'))).toBe(true);
	expect(finding.bands).toMatchObject([{ from: 0, to: Infinity }]);
});
