import { describe, expect, it } from 'vitest';
import { signPath } from './mark';

const pieces = (): number[][] => {
	const { ops, at } = signPath(0, 0, 1);
	let start = 0;
	return ops
		.split('Z')
		.filter((piece) => piece !== '')
		.map((piece) => {
			const corners = at.slice(start, start + 2 * piece.length);
			start += 2 * piece.length;
			return corners;
		});
};

const area = (corners: readonly number[]): number => {
	let sum = 0;
	for (let index = 0; index < corners.length; index += 2) {
		const next = (index + 2) % corners.length;
		sum +=
			(corners[index] ?? 0) * (corners[next + 1] ?? 0) - (corners[next] ?? 0) * (corners[index + 1] ?? 0);
	}
	return Math.abs(sum) / 2;
};

describe('the sign', () => {
	it('stays inside its square at any place and size', () => {
		const { at } = signPath(10, 20, 9);
		at.forEach((value, index) => {
			const from = index % 2 === 0 ? 10 : 20;
			expect(value).toBeGreaterThanOrEqual(from - 1e-9);
			expect(value).toBeLessThanOrEqual(from + 9 + 1e-9);
		});
	});

	it('has no speck and keeps a gap down the middle', () => {
		for (const corners of pieces()) {
			expect(area(corners)).toBeGreaterThanOrEqual(0.012);
			const across = corners.filter((_, index) => index % 2 === 0);
			expect(Math.max(...across) < 0.5 || Math.min(...across) > 0.5).toBe(true);
		}
	});

	it('has bones at 45° that rise on the left and fall on the right', () => {
		const slopes = pieces().flatMap((corners) => {
			const left = (corners[0] ?? 0) < 0.5 && Math.max(...corners.filter((_, i) => i % 2 === 0)) < 0.5;
			return corners.flatMap((x, index) => {
				if (index % 2 === 1) return [];
				const next = (index + 2) % corners.length;
				const dx = (corners[next] ?? 0) - x;
				const dy = (corners[next + 1] ?? 0) - (corners[index + 1] ?? 0);
				return Math.abs(dx) < 1e-9 || Math.abs(dy) < 1e-9 ? [] : [(left ? -1 : 1) * (dy / dx)];
			});
		});
		expect(slopes.length).toBeGreaterThan(10);
		for (const slope of slopes) expect(slope).toBeCloseTo(1, 9);
	});
});
