/** Cuts a drawing to its chart: the viewBox that holds plot and pane with the lettering around them. */

interface Area {
	readonly x_mm: number;
	readonly y_mm: number;
	readonly width_mm: number;
	readonly height_mm: number;
}

/** Lettering and scales around the plot [mm]. */
export interface Margins {
	readonly left: number;
	readonly right: number;
	readonly top: number;
	readonly bottom: number;
}

export interface ViewBox {
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly height: number;
}

const isArea = (value: unknown): value is Area =>
	typeof value === 'object' &&
	value !== null &&
	['x_mm', 'y_mm', 'width_mm', 'height_mm'].every((key) =>
		Number.isFinite((value as Record<string, unknown>)[key])
	);

/**
 * The part of a sheet that holds the chart and the pane below it.
 * @param metadata the scene's metadata
 * @param margins lettering around the plot [mm]
 * @returns the view box [mm], or null where the drawing has no chart
 */
export function chartBox(metadata: Readonly<Record<string, unknown>>, margins: Margins): ViewBox | null {
	const { plot, pane } = metadata;
	if (!isArea(plot)) return null;
	const foot = isArea(pane) ? pane.y_mm + pane.height_mm : plot.y_mm + plot.height_mm;
	return {
		x: plot.x_mm - margins.left,
		y: plot.y_mm - margins.top,
		width: plot.width_mm + margins.left + margins.right,
		height: foot - plot.y_mm + margins.top + margins.bottom
	};
}

/**
 * Shows a part of a drawing only, at the width its place gives it.
 * @param svg text of the drawing
 * @param box what to show [mm]
 * @returns the same drawing with that view box and without a size of its own
 */
export function cropSvg(svg: string, box: ViewBox): string {
	const end = svg.indexOf('>', svg.indexOf('<svg'));
	const view = [box.x, box.y, box.width, box.height].map((n) => String(Math.round(n * 100) / 100)).join(' ');
	const head = svg
		.slice(0, end)
		.replace(/\s(?:width|height)="[^"]*"/g, '')
		.replace(/viewBox="[^"]*"/, `viewBox="${view}"`);
	return head + svg.slice(end);
}
