/** Writes a scene as SVG in millimetres: presentation attributes only, so that a strict content policy lets it pass. */
import { CAP_RATIO, normaliseText } from '$lib/scene/metrics';
import type { Face, Group, Item, PathData, PathItem, Scene, Stroke, TextItem } from '$lib/scene/scene';
import { escapeXml } from './xml';

/** The sheet's own cut of Barlow: figures of equal width, neither kerning nor ligatures. */
export const FONT_FAMILY = 'Barlow Sheet';

const weights: Readonly<Record<Face, number>> = { regular: 400, medium: 500, semibold: 600, bold: 700 };

/** Thousandths as they are written after a whole number; a double costs three times as much to write. */
const decimals: readonly string[] = Array.from({ length: 1000 }, (_, thousandths) =>
	thousandths === 0 ? '' : `.${String(thousandths).padStart(3, '0').replace(/0+$/, '')}`
);

/** Three decimals, without trailing zeros or a negative zero. */
const written = (value: number): string => {
	const thousandths = Math.round(value * 1000);
	const size = Math.abs(thousandths);
	if (!(size < 1e9)) throw new RangeError(`a length must be finite and under 1 km, got ${String(value)}`);
	const whole = Math.floor(size / 1000);
	return `${thousandths < 0 ? '-' : ''}${String(whole)}${decimals[size - 1000 * whole] ?? ''}`;
};

const attribute = (name: string, value: string | number | undefined): string =>
	value === undefined ? '' : ` ${name}="${typeof value === 'number' ? written(value) : escapeXml(value)}"`;

const numbersOf: Readonly<Record<string, number>> = { M: 2, L: 2, C: 6, Z: 0 };

const pathText = ({ ops, at }: PathData): string => {
	let text = '';
	let next = 0;
	for (const op of ops) {
		text += op;
		const end = next + (numbersOf[op] ?? 0);
		for (let separator = ''; next < end; next += 1, separator = ' ') {
			text += separator + written(at[next] ?? 0);
		}
	}
	return text;
};

const markText = ({ id, role, of, label }: Item): string =>
	attribute('id', id) +
	attribute('data-role', role) +
	attribute('data-of', of) +
	(label === undefined ? '' : ` role="img"${attribute('aria-label', label)}`);

const strokeText = ({ colour, width, dash, cap, join }: Stroke): string =>
	attribute('stroke', colour) +
	attribute('stroke-width', width) +
	(dash === undefined || dash.length === 0 ? '' : ` stroke-dasharray="${dash.map(written).join(' ')}"`) +
	attribute('stroke-linecap', cap === 'butt' ? undefined : cap) +
	attribute('stroke-linejoin', join === 'miter' ? undefined : join);

const pathElement = (item: PathItem): string =>
	`<path${markText(item)} d="${pathText(item.d)}" fill="${item.fill === undefined ? 'none' : escapeXml(item.fill)}"` +
	(item.fillRule === 'evenodd' ? ' fill-rule="evenodd"' : '') +
	(item.stroke === undefined ? '' : strokeText(item.stroke)) +
	'/>\n';

/** Spaces that SVG would drop or join become ones that do not break, which are as wide. */
const kept = (text: string): string => text.replace(/^ | $|(?<= ) /g, '\u00a0');

const textElement = (item: TextItem): string =>
	`<text${markText(item)}${attribute('x', item.x)}${attribute('y', item.y)}` +
	attribute('font-size', item.cap / CAP_RATIO) +
	(item.face === 'regular' ? '' : attribute('font-weight', weights[item.face])) +
	attribute('fill', item.fill) +
	(item.anchor === 'start' ? '' : attribute('text-anchor', item.anchor)) +
	(item.angle === undefined || item.angle === 0
		? ''
		: ` transform="rotate(${[item.angle, item.x, item.y].map(written).join(' ')})"`) +
	`>${escapeXml(kept(normaliseText(item.text)))}</text>\n`;

const groupElement = (item: Group): string =>
	`<g${markText(item)}>\n${item.items.map(element).join('')}</g>\n`;

const element = (item: Item): string => {
	switch (item.type) {
		case 'group':
			return groupElement(item);
		case 'path':
			return pathElement(item);
		case 'text':
			return textElement(item);
	}
};

/**
 * Writes a scene as SVG. Lengths are millimetres, rounded to 0.001; the same scene gives the same text.
 * @param scene the drawing
 * @param options fontCss: rules that embed the faces, for a file that stands alone
 * @returns the SVG document
 * @example toSvg(scene).startsWith('<svg xmlns="http://www.w3.org/2000/svg" width="297mm"') // true for A4 landscape
 * Source: SVG 1.1 (presentation attributes, metadata), WAI-ARIA 1.2 (role img).
 */
export function toSvg(scene: Scene, options: { readonly fontCss?: string } = {}): string {
	const [width, height] = [written(scene.width), written(scene.height)];
	const metadata = escapeXml(JSON.stringify(scene.metadata));
	return (
		`<svg xmlns="http://www.w3.org/2000/svg" width="${width}mm" height="${height}mm" viewBox="0 0 ${width} ${height}"` +
		` role="img" aria-labelledby="sheet-title" aria-describedby="sheet-description"${attribute('lang', scene.language)}${attribute('xml:lang', scene.language)}` +
		` font-family="${FONT_FAMILY}, Barlow, sans-serif" font-weight="400" font-kerning="none">\n` +
		`<title id="sheet-title">${escapeXml(scene.title)}</title>\n` +
		`<desc id="sheet-description">${escapeXml(scene.description)}</desc>\n` +
		`<metadata>${metadata}</metadata>\n` +
		(options.fontCss === undefined ? '' : `<style>${escapeXml(options.fontCss)}</style>\n`) +
		`<rect width="${width}" height="${height}" fill="#ffffff"/>\n` +
		`${scene.items.map(element).join('')}</svg>\n`
	);
}
