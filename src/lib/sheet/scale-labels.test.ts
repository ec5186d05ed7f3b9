import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import { spread, type Reading } from './scale-labels';

const reading = (y: number, weight: number): Reading => ({
	y,
	weight,
	text: String(y),
	numbers: [],
	face: 'regular',
	fill: '#000000'
});

const span = { from: 0, to: 112, pitch: 4.05 };

describe('spread', () => {
	it('opens a pair to both sides', () => {
		const places = spread([reading(50, 2), reading(51, 2)], span).map(({ at }) => at);
		expect(places[0]).toBeCloseTo(48.475, 9);
		expect(places[1]).toBeCloseTo(52.525, 9);
	});

	it('leaves the choice where it is read and lets decades give way', () => {
		const placed = spread([reading(50, 4), reading(51, 3), reading(49, 3), reading(52, 0)], span);
		expect(placed.map(({ reading: { y }, at }) => [y, at])).toEqual([
			[49, 45.95],
			[50, 50],
			[51, 54.05]
		]);
	});

	it('never sets two labels nearer than the pitch, and none outside the scale', () => {
		const one = fc.tuple(fc.double({ min: 0, max: 112, noNaN: true }), fc.constantFrom(0, 1, 2, 3));
		const chosen = fc.option(fc.double({ min: 0, max: 112, noNaN: true }), { nil: undefined });
		fc.assert(
			fc.property(fc.array(one, { maxLength: 60 }), chosen, (others, choice) => {
				const readings = others.map(([y, weight]) => reading(y, weight));
				if (choice !== undefined) readings.push(reading(choice, 4));
				const places = spread(readings, span).map(({ at }) => at);
				for (const [index, at] of places.slice(1).entries())
					expect(at - (places[index] ?? 0)).toBeGreaterThan(span.pitch - 1e-6);
				for (const at of places) {
					expect(at).toBeGreaterThan(-1e-6);
					expect(at).toBeLessThan(112 + 1e-6);
				}
			})
		);
	});
});
