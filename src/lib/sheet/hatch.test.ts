import { describe, expect, it } from 'vitest';
import { dotCentres, hatchLines, roundDots } from './hatch';
import { fallStrip } from './polygon';

const room = { x: 36, y: 21, width: 140, height: 112 };
const polygon = fallStrip(room, -60, -20);

const segmentsOf = (lines: readonly number[]): number[][] =>
	Array.from({ length: lines.length / 4 }, (_, index) => lines.slice(4 * index, 4 * index + 4));

/** Turn of a segment against the level, 0 … 180 [degree]. */
const turnOf = ([x1 = 0, y1 = 0, x2 = 0, y2 = 0]: readonly number[]): number =>
	((Math.atan2(y1 - y2, x2 - x1) * 180) / Math.PI + 360) % 180;

describe('hatchLines', () => {
	it.each([
		['mandatory', 67.5],
		['design', 22.5]
	] as const)('draws %s at %d°, never within 5° of ±45°', (ruleClass, angle) => {
		const segments = segmentsOf(hatchLines(polygon, ruleClass, 'bank', 1));
		expect(segments.length).toBeGreaterThan(100);
		for (const segment of segments) {
			expect(turnOf(segment)).toBeCloseTo(angle, 6);
			expect(Math.abs(turnOf(segment) - 45)).toBeGreaterThan(5);
			expect(Math.abs(turnOf(segment) - 135)).toBeGreaterThan(5);
		}
	});

	it('stays inside its region', () => {
		for (const [x1 = 0, y1 = 0, x2 = 0, y2 = 0] of segmentsOf(hatchLines(polygon, 'design', 'bank', 1))) {
			for (const [x, y] of [
				[x1, y1],
				[x2, y2]
			] as const) {
				expect(y - x).toBeGreaterThanOrEqual(-60 - 1e-9);
				expect(y - x).toBeLessThanOrEqual(-20 + 1e-9);
				expect(x).toBeGreaterThanOrEqual(room.x - 1e-9);
				expect(x).toBeLessThanOrEqual(room.x + room.width + 1e-9);
				expect(y).toBeGreaterThanOrEqual(room.y - 1e-9);
				expect(y).toBeLessThanOrEqual(room.y + room.height + 1e-9);
			}
		}
	});

	it('runs every fifth line of a bank on through the field, anchored to the paper', () => {
		const field = new Set(
			segmentsOf(hatchLines(polygon, 'mandatory', 'field', 1)).map((line) => line.join(' '))
		);
		const bank = segmentsOf(hatchLines(polygon, 'mandatory', 'bank', 1)).map((line) => line.join(' '));
		expect(bank.filter((line) => field.has(line)).length).toBe(field.size);
		expect(bank.length / field.size).toBeGreaterThan(4.5);
		expect(bank.length / field.size).toBeLessThan(5.5);
	});

	it('widens with the paper', () => {
		const small = hatchLines(polygon, 'design', 'bank', 1).length;
		expect(hatchLines(polygon, 'design', 'bank', Math.SQRT2).length / small).toBeCloseTo(Math.SQRT1_2, 1);
	});
});

describe('dots', () => {
	it('lie wholly inside', () => {
		const centres = dotCentres(polygon, 1);
		expect(centres.length).toBeGreaterThan(200);
		for (let index = 0; index < centres.length; index += 2) {
			const fall = (centres[index + 1] ?? 0) - (centres[index] ?? 0);
			expect(fall).toBeGreaterThan(-60 + 0.27 * Math.SQRT2 - 1e-9);
			expect(fall).toBeLessThan(-20 - 0.27 * Math.SQRT2 + 1e-9);
		}
	});

	it('are round', () => {
		const { ops, at } = roundDots([10, 20], 0.5);
		expect(ops).toBe('MCCCCZ');
		expect([at[0], at[1], at[6], at[7]]).toEqual([10.5, 20, 10, 20.5]);
	});
});
