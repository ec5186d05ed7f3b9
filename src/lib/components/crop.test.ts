import { describe, expect, it } from 'vitest';
import { chartBox, cropSvg } from './crop';

const margins = { left: 10, right: 20, top: 5, bottom: 6 };
const plot = { x_mm: 36, y_mm: 21, width_mm: 140, height_mm: 112 };

describe('cutting a sheet to its chart', () => {
	it('holds the plot and the pane below it', () => {
		const pane = { x_mm: 36, y_mm: 133, width_mm: 140, height_mm: 28 };
		expect(chartBox({ plot, pane }, margins)).toEqual({ x: 26, y: 16, width: 170, height: 151 });
		expect(chartBox({ plot }, margins)).toEqual({ x: 26, y: 16, width: 170, height: 123 });
		expect(chartBox({}, margins)).toBeNull();
	});

	it('changes the head of the file only', () => {
		const svg =
			'<svg xmlns="x" width="297mm" height="210mm" viewBox="0 0 297 210"><rect width="3" height="2"/></svg>';
		expect(cropSvg(svg, { x: 1.004, y: 2, width: 3, height: 4 })).toBe(
			'<svg xmlns="x" viewBox="1 2 3 4"><rect width="3" height="2"/></svg>'
		);
	});
});
