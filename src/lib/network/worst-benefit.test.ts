import * as fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { benefitAt, benefitFinder, worstBenefit } from './benefit';
import type { CapacitorPart, Filter } from './filter';
import { capacitorCurrent, currentFinder } from './ripple';
import { sourceImpedance, type SourceModel } from './source';

// Many networks are sampled densely; a busy machine needs its time.
vi.setConfig({ testTimeout: 60_000 });

/** A decade span, evenly in the logarithm. */
const logs = (from: number, to: number) =>
	fc.double({ min: Math.log(from), max: Math.log(to), noNaN: true }).map(Math.exp);
const maybe = (value: fc.Arbitrary<number>) => fc.oneof(fc.constant(0), value);

const filters: fc.Arbitrary<Filter> = fc.record({
	inductor: fc.record({
		inductance: logs(1e-6, 1e-3),
		resistance: maybe(logs(1e-3, 1)),
		parallelCapacitance: maybe(logs(1e-12, 1e-9))
	}),
	capacitor: fc.record({
		capacitance: logs(1e-8, 1e-4),
		esr: maybe(logs(1e-3, 1)),
		esl: maybe(logs(1e-9, 1e-7))
	}),
	damping: fc.option(fc.record({ resistance: logs(0.1, 100), capacitance: logs(1e-8, 1e-4) }), {
		nil: undefined
	})
});
const choices: fc.Arbitrary<CapacitorPart> = fc.record({
	capacitance: logs(1e-10, 1e-4),
	esr: maybe(logs(1e-3, 1)),
	esl: maybe(logs(1e-9, 1e-7))
});
const sources: fc.Arbitrary<SourceModel> = fc.oneof(
	fc.record({
		kind: fc.constantFrom('amn-50uH-5ohm' as const, 'amn-50uH' as const, 'amn-5uH-1ohm' as const),
		networks: fc.constantFrom(1 as const, 2 as const)
	}),
	fc
		.tuple(maybe(logs(1e-2, 10)), logs(1e-7, 1e-3), fc.double({ min: 1, max: 20, noNaN: true }))
		.map(([resistance, inductanceMin, spread]) => ({
			kind: 'impedance' as const,
			resistance,
			inductanceMin,
			inductanceMax: inductanceMin * spread
		}))
);
const ranges = fc
	.tuple(logs(1e4, 1e6), fc.double({ min: 1, max: 5, noNaN: true }))
	.map(([from, ratio]) => ({ from, to: from * ratio }));

/** Every place of a grid over the range and the source's inductance. */
const places = (source: SourceModel, range: { from: number; to: number }, count: number) =>
	Array.from({ length: count }, (_, i) => range.from * (range.to / range.from) ** (i / (count - 1))).flatMap(
		(f) =>
			source.kind === 'impedance'
				? Array.from({ length: 40 }, (_, k) =>
						sourceImpedance(
							source,
							f,
							source.inductanceMin * (source.inductanceMax / source.inductanceMin) ** (k / 39)
						)
					).map((z) => ({ f, z }))
				: [{ f, z: sourceImpedance(source, f) }]
	);

const scene = fc.tuple(filters, sources, ranges, choices);

describe('least gain over a range', () => {
	it('is not above any sampled gain by more than 0.01 dB', () => {
		fc.assert(
			fc.property(scene, ([filter, source, range, choice]) => {
				const worst = worstBenefit(filter, source, range, choice);
				const seen = places(source, range, 101).map(({ f, z }) => benefitAt(filter, z, choice, f));
				expect(worst.gain_dB).toBeLessThanOrEqual(Math.min(...seen) + 0.01);
			}),
			{ numRuns: 300 }
		);
	});

	it('is the gain at the place that it names', () => {
		fc.assert(
			fc.property(scene, ([filter, source, range, choice]) => {
				const { gain_dB, frequency, inductance } = worstBenefit(filter, source, range, choice);
				expect(frequency).toBeGreaterThanOrEqual(range.from);
				expect(frequency).toBeLessThanOrEqual(range.to);
				const z = sourceImpedance(source, frequency, inductance ?? undefined);
				const there = benefitAt(filter, z, choice, frequency);
				// Below −100 dB the last bits of the reactance decide.
				if (there > -100) expect(there).toBeCloseTo(gain_dB, 3);
				if (source.kind === 'impedance') {
					expect(inductance).toBeGreaterThanOrEqual(source.inductanceMin * (1 - 1e-12));
					expect(inductance).toBeLessThanOrEqual(source.inductanceMax * (1 + 1e-12));
				} else expect(inductance).toBeNull();
			}),
			{ numRuns: 300 }
		);
	});

	it('finds a dip far narrower than any grid', () => {
		const filter: Filter = { inductor: { inductance: 33e-6 }, capacitor: { capacitance: 4.7e-6 } };
		const source = { kind: 'impedance', resistance: 1e-4, inductanceMin: 1e-4, inductanceMax: 1e-4 } as const;
		const { gain_dB, frequency } = worstBenefit(
			filter,
			source,
			{ from: 1e5, to: 2e5 },
			{ capacitance: 48e-9 }
		);
		expect(gain_dB).toBeLessThan(-90);
		const z = sourceImpedance(source, frequency);
		for (const ratio of [1 - 3e-7, 1 + 3e-7])
			expect(benefitAt(filter, z, { capacitance: 48e-9 }, frequency * ratio)).toBeGreaterThan(gain_dB);
	});

	it('serves many capacitors from one sampling', () => {
		const filter: Filter = { inductor: { inductance: 220e-6 }, capacitor: { capacitance: 2.2e-6 } };
		const source = { kind: 'amn-50uH-5ohm', networks: 2 } as const;
		const finder = benefitFinder(filter, source, { from: 126e3, to: 138e3 });
		expect(finder.worst({ capacitance: 330e-9 })).toEqual({
			gain_dB: expect.closeTo(21.051, 3) as number,
			frequency: 126e3,
			inductance: null
		});
	});
});

it('finds the most current in the capacitor', () => {
	fc.assert(
		fc.property(scene, ([filter, source, range, choice]) => {
			const most = currentFinder(filter, source, range).worst(choice);
			const seen = places(source, range, 61).map(({ f, z }) => capacitorCurrent(filter, z, choice, f));
			expect(most.share).toBeGreaterThanOrEqual(Math.max(...seen) * (1 - 1e-3));
		}),
		{ numRuns: 200 }
	);
});
