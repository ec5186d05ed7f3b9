import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { simulateYield, wilson, yieldOf, type Lot } from './yield';

const lot = (spread: 'uniform' | 'normal'): Lot => ({
	nominal: 330e-9,
	toleranceMinus: 0.1,
	tolerancePlus: 0.1,
	spread
});
const zone = [{ from: 300e-9, to: 310e-9 }];

describe('yieldOf', () => {
	it.each([
		['uniform', 10 / 66],
		['normal', 0.03132516235585401]
	] as const)('330 nF ±10 % in 300–310 nF, %s: %d', (spread, probability) => {
		expect(Math.abs(yieldOf(lot(spread), zone) / probability - 1)).toBeLessThan(1e-9);
	});
	it('counts an exact part as in or out', () => {
		const exact: Lot = { nominal: 8e-9, toleranceMinus: 0, tolerancePlus: 0, spread: 'normal' };
		expect(yieldOf(exact, [{ from: 8e-9, to: 8e-9 }])).toBe(1);
		expect(yieldOf(exact, [{ from: 9e-9, to: Infinity }])).toBe(0);
	});
	it('sums to one over the whole axis', () => {
		fc.assert(
			fc.property(
				fc.double({ min: 1e-9, max: 1e-3, noNaN: true }),
				fc.double({ min: 0.001, max: 0.9, noNaN: true }),
				fc.double({ min: 0.001, max: 2, noNaN: true }),
				fc.constantFrom<'uniform' | 'normal'>('uniform', 'normal'),
				(nominal, toleranceMinus, tolerancePlus, spread) => {
					const part = { nominal, toleranceMinus, tolerancePlus, spread };
					const halves = [
						{ from: -Infinity, to: nominal },
						{ from: nominal, to: Infinity }
					];
					expect(yieldOf(part, halves)).toBeCloseTo(1, 9);
				}
			)
		);
	});
});

describe('simulateYield', () => {
	it.each(['uniform', 'normal'] as const)(
		'agrees with the formula within four standard deviations: %s',
		(spread) => {
			const exact = yieldOf(lot(spread), zone);
			const count = 400_000;
			const got = simulateYield(lot(spread), zone, { count, seed: 20240611 });
			expect(Math.abs(got.probability - exact)).toBeLessThan(4 * Math.sqrt((exact * (1 - exact)) / count));
			expect(got.from).toBeLessThan(got.probability);
			expect(got.to).toBeGreaterThan(got.probability);
		}
	);
	it('repeats with the seed and differs without it', () => {
		const draw = (seed: number) => simulateYield(lot('uniform'), zone, { count: 5000, seed }).probability;
		expect(draw(7)).toBe(draw(7));
		expect(draw(7)).not.toBe(draw(8));
	});
});

describe('wilson', () => {
	it.each([
		[0, 100, 0, 0.03699],
		[100, 100, 0.96301, 1],
		[50, 100, 0.40383, 0.59617]
	])('%d of %d: %d to %d', (hits, count, from, to) => {
		const share = wilson(hits, count);
		expect(share.from).toBeCloseTo(from, 4);
		expect(share.to).toBeCloseTo(to, 4);
	});
	it('refuses an empty draw', () => {
		expect(() => wilson(0, 0)).toThrow(/count must be/);
	});
});
