import * as fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import type { Interval } from '$lib/quantity/interval';
import { impedanceCurve } from './curve';
import type { Filter } from './filter';
import { exactWorstCapacitance } from './resonance';
import { sourceImpedance, type SourceModel } from './source';
import { exactWorstRange, type FilterBox } from './worst-range';

// Many networks are sampled densely; a busy machine needs its time.
vi.setConfig({ testTimeout: 60_000 });

const logs = (from: number, to: number) =>
	fc.double({ min: Math.log(from), max: Math.log(to), noNaN: true }).map(Math.exp);
const maybe = (value: fc.Arbitrary<number>) => fc.oneof(fc.constant(0), value);
const spread = (value: fc.Arbitrary<number>, most: number) =>
	fc
		.tuple(value, fc.oneof(fc.constant(1), fc.double({ min: 1, max: most, noNaN: true })))
		.map(([from, ratio]) => ({ from, to: from * ratio }));

const boxes = (lossy: boolean): fc.Arbitrary<FilterBox> =>
	fc
		.record({
			inductance: spread(logs(1e-6, 1e-3), 2),
			capacitance: spread(logs(1e-8, 1e-4), 2),
			resistance: lossy ? logs(1e-3, 3) : fc.constant(0),
			parallelCapacitance: maybe(logs(1e-12, 1e-9)),
			esr: lossy ? logs(1e-3, 3) : fc.constant(0),
			esl: maybe(logs(1e-9, 1e-7)),
			damping: fc.option(fc.record({ resistance: logs(0.1, 100), capacitance: logs(1e-8, 1e-4) }), {
				nil: undefined
			})
		})
		.map(({ inductance, capacitance, resistance, parallelCapacitance, esr, esl, damping }) => ({
			inductance,
			capacitance,
			filter: {
				inductor: { inductance: inductance.from, resistance, parallelCapacitance },
				capacitor: { capacitance: capacitance.from, esr, esl },
				...(damping && lossy ? { damping } : {})
			}
		}));

const sources: fc.Arbitrary<SourceModel> = fc.oneof(
	fc.record({
		kind: fc.constantFrom('amn-50uH-5ohm' as const, 'amn-50uH' as const, 'an-5uH' as const),
		networks: fc.constantFrom(1 as const, 2 as const)
	}),
	fc.tuple(maybe(logs(1e-2, 30)), spread(logs(1e-7, 1e-3), 20)).map(([resistance, { from, to }]) => ({
		kind: 'impedance' as const,
		resistance,
		inductanceMin: from,
		inductanceMax: to
	}))
);

const point = ({ from, to }: Interval, share: number): number => from * (to / from) ** share;

/** C0 at a place of the box given by four shares from 0 to 1. */
const worstAt = (box: FilterBox, source: SourceModel, range: Interval, shares: readonly number[]): number => {
	const [a = 0, b = 0, c = 0, d = 0] = shares;
	const filter: Filter = {
		...box.filter,
		inductor: { ...box.filter.inductor, inductance: point(box.inductance, a) },
		capacitor: { ...box.filter.capacitor, capacitance: point(box.capacitance, b) }
	};
	const f = point(range, c);
	const inductance =
		source.kind === 'impedance'
			? point({ from: source.inductanceMin, to: source.inductanceMax }, d)
			: undefined;
	return exactWorstCapacitance(filter, sourceImpedance(source, f, inductance), f);
};

const inside = (intervals: readonly Interval[], value: number): boolean =>
	value <= 0 || intervals.some(({ from, to }) => value >= from * (1 - 1e-9) && value <= to * (1 + 1e-9));

const steps = [0, 0.07, 0.2, 0.35, 0.5, 0.65, 0.8, 0.93, 1];
const grid = steps.flatMap((a) => steps.flatMap((b) => steps.map((c) => [a, b, c])));

const moves = [0, 1, 2, 3].flatMap((index) => [-1, 1].map((sign) => ({ index, sign })));

/** Nears an edge from the best sample by ever smaller steps in all four directions. */
const climbed = (value: (shares: readonly number[]) => number, start: readonly number[]): number => {
	let place = start;
	let best = value(place);
	let step = 0.1;
	while (step > 1e-12) {
		const before = best;
		for (const { index, sign } of moves) {
			const next = place.with(index, Math.min(1, Math.max(0, (place[index] ?? 0) + sign * step)));
			const there = value(next);
			if (there > best) [best, place] = [there, next];
		}
		if (best === before) step /= 2;
	}
	return best;
};

const ranges = spread(logs(1e4, 3e6), 3);

describe.each([
	['with losses', true],
	['without losses', false]
])('worst capacitances over a box, %s', (_, lossy) => {
	it('leave no sample outside', () => {
		fc.assert(
			fc.property(boxes(lossy), sources, ranges, (box, source, range) => {
				const found = exactWorstRange(box, source, range);
				for (const shares of grid)
					for (const d of [0, 0.3, 0.7, 1])
						expect(inside(found, worstAt(box, source, range, [...shares, d]))).toBe(true);
			}),
			{ numRuns: 25, endOnFailure: true }
		);
	});

	it('are reached at every edge within 1e-6', () => {
		fc.assert(
			fc.property(boxes(lossy), sources, ranges, (box, source, range) => {
				// Nearer to a pole than this the rounding of the sampled place decides.
				const pole = 1e4 / ((2 * Math.PI * range.from) ** 2 * box.inductance.from);
				const shares = grid.flatMap((three) => [0, 0.3, 0.7, 1].map((d) => [...three, d]));
				for (const { from, to } of exactWorstRange(box, source, range))
					for (const edge of [from, to].filter((value) => value > 0 && value < pole)) {
						const miss = (place: readonly number[]): number =>
							-Math.abs(worstAt(box, source, range, place) / edge - 1);
						const start = shares.reduce((a, b) => (miss(b) > miss(a) ? b : a));
						expect(climbed(miss, start)).toBeGreaterThan(-1e-6);
					}
			}),
			{ numRuns: 25, endOnFailure: true }
		);
	});
});

const ideal = (L: Interval, C: Interval): FilterBox => ({
	filter: { inductor: { inductance: L.from }, capacitor: { capacitance: C.from } },
	inductance: L,
	capacitance: C
});

describe('worst capacitances of known boxes', () => {
	it('lie between the corners far above the resonance', () => {
		const box = ideal({ from: 187e-6, to: 253e-6 }, { from: 1.98e-6, to: 2.42e-6 });
		const source = { kind: 'amn-50uH-5ohm', networks: 2 } as const;
		const [only] = exactWorstRange(box, source, { from: 126e3, to: 138e3 });
		const corner = (L: number, C: number, f: number) =>
			exactWorstCapacitance(
				{ inductor: { inductance: L }, capacitor: { capacitance: C } },
				sourceImpedance(source, f),
				f
			);
		expect(only?.from).toBeCloseTo(corner(253e-6, 2.42e-6, 138e3), 17);
		expect(only?.to).toBeCloseTo(corner(187e-6, 1.98e-6, 126e3), 17);
	});

	it('leave a gap where lossless L and C resonate inside the box', () => {
		const box = ideal({ from: 33e-6, to: 33e-6 }, { from: 4.7e-6, to: 4.7e-6 });
		const source = { kind: 'impedance', resistance: 0, inductanceMin: 1e-6, inductanceMax: 1e-6 } as const;
		const at = (f: number) => exactWorstCapacitance(box.filter, sourceImpedance(source, f), f);
		expect(exactWorstRange(box, source, { from: 12.2e3, to: 13.4e3 })).toEqual([
			{ from: 0, to: at(12.2e3) },
			{ from: at(13.4e3), to: Infinity }
		]);
	});

	it('are none where the source is a capacitor', () => {
		const frequency_Hz = [1e3, 1e6];
		const curve = impedanceCurve({ frequency_Hz, real_ohm: [0, 0], imaginary_ohm: [-100, -0.1] });
		const box = ideal({ from: 1e-3, to: 1e-3 }, { from: 1e-6, to: 1e-6 });
		expect(exactWorstRange(box, { kind: 'measured', curve }, { from: 5e4, to: 6e4 })).toEqual([]);
	});

	it('have no upper end where the source may have no impedance', () => {
		const box = ideal({ from: 220e-6, to: 220e-6 }, { from: 2.2e-6, to: 2.2e-6 });
		const source = { kind: 'impedance', resistance: 0, inductanceMin: 0, inductanceMax: 1e-4 } as const;
		expect(exactWorstRange(box, source, { from: 132e3, to: 132e3 })[0]?.to).toBe(Infinity);
	});
});
