import { describe, expect, it } from 'vitest';
import type { Layout } from './layout';
import { dividePaper, fieldBorders, type Box } from './paper';

const PAPERS = ['A4', 'A3', 'Letter', 'Tabloid'] as const;
const LAYOUTS = PAPERS.flatMap((paper) =>
	(['landscape', 'portrait'] as const).flatMap((orientation) =>
		[true, false].map((strip): Layout => ({ paper, orientation, strip }))
	)
);

const right = (box: Box): number => box.x + box.width;
const foot = (box: Box): number => box.y + box.height;
const inside = (a: Box, b: Box): boolean =>
	a.x >= b.x - 1e-9 && a.y >= b.y - 1e-9 && right(a) <= right(b) + 1e-9 && foot(a) <= foot(b) + 1e-9;
const apart = (a: Box, b: Box): boolean =>
	right(a) <= b.x + 1e-9 || right(b) <= a.x + 1e-9 || foot(a) <= b.y + 1e-9 || foot(b) <= a.y + 1e-9;

describe('dividePaper', () => {
	it.each([
		['A4', 'landscape', 297, 210, [20, 10, 267, 190], 1],
		['A3', 'landscape', 420, 297, [20, 10, 390, 277], Math.SQRT2],
		['Letter', 'landscape', 279.4, 215.9, [20, 10, 249.4, 195.9], 1],
		['Tabloid', 'landscape', 431.8, 279.4, [20, 10, 401.8, 259.4], Math.SQRT2],
		['A4', 'portrait', 210, 297, [20, 10, 180, 277], 1],
		['A3', 'portrait', 297, 420, [20, 10, 267, 400], Math.SQRT2]
	] as const)('%s %s: frame after ISO 5457', (paper, orientation, width, height, frame, k) => {
		const sheet = dividePaper({ paper, orientation });
		expect([sheet.width, sheet.height, sheet.k]).toEqual([width, height, k]);
		const { x, y, width: across, height: down } = sheet.frame;
		[x, y, across, down].forEach((value, index) => {
			expect(value).toBeCloseTo(frame[index] ?? 0, 9);
		});
	});

	it.each(LAYOUTS)(
		'$paper $orientation strip $strip: the parts lie inside the frame, clear of each other',
		(layout) => {
			const sheet = dividePaper(layout);
			const parts = [sheet.titleBlock, sheet.check, sheet.chart, ...sheet.strip];
			for (const part of parts) expect(inside(part, sheet.frame)).toBe(true);
			parts.forEach((a, index) => {
				for (const b of parts.slice(index + 1)) expect(apart(a, b)).toBe(true);
			});
			expect([sheet.titleBlock.width, sheet.titleBlock.height]).toEqual([180, 27]);
			expect(right(sheet.titleBlock)).toBeCloseTo(right(sheet.frame), 9);
			expect(foot(sheet.titleBlock)).toBeCloseTo(foot(sheet.frame), 9);
			expect(sheet.strip.length).toBe(layout.strip === false ? 0 : layout.orientation === 'portrait' ? 2 : 1);
		}
	);

	it('gives the strip 84 mm on A4 and 119 mm on A3', () => {
		expect(dividePaper({ paper: 'A4', orientation: 'landscape' }).strip[0]?.width).toBe(84);
		expect(dividePaper({ paper: 'A3', orientation: 'landscape' }).strip[0]?.width).toBe(119);
	});
});

describe('fieldBorders', () => {
	it('counts fields of 50 mm from the centre marks', () => {
		expect(fieldBorders(297, 20, 287)).toEqual([48.5, 98.5, 148.5, 198.5, 248.5]);
		expect(fieldBorders(210, 10, 200)).toEqual([55, 105, 155]);
	});
});
