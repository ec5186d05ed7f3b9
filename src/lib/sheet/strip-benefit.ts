/** Section 6 of the strip, third part: what the choice gains at each harmonic, on the exact network, per source. */
import { formatQuantity } from '$lib/quantity/format';
import type { Benefit } from '$lib/rules/finding';
import { textWidth } from '$lib/scene/metrics';
import type { Item } from '$lib/scene/scene';
import { fixed, formatEdge } from './edge';
import { shorten } from './fitting';
import { strokeOf } from './ink';
import { lettered, rectangle, ruled } from './pen';
import {
	BASE,
	CAP,
	NUMBER_WIDTH,
	ROW,
	rowLine,
	rowNumber,
	type Block,
	type StripContext
} from './strip-block';
import { windowRows } from './strip-window';
import { fill } from './words';

const LEADING = 3.7;
const BAR = 1.2;
/** Sources beside each other; the others are covered by the line of the least gain. */
const COLUMNS = 2;
const COLUMN_WIDTH = 13;
const ALONE_WIDTH = 17;
const LABEL_WIDTH = 5.5;
/** With several converters the label carries the number of its row too. */
const LABEL_WIDTH_SEVERAL = 10.5;
const FREQUENCY_WIDTH = 15.5;

interface Row {
	readonly label: string;
	readonly frequency: string;
	/** Gain per column; null where there is none. */
	readonly gains: readonly (Benefit | null)[];
}

const sourcesShown = ({ design }: StripContext): string[] =>
	design.sources.slice(0, COLUMNS).map(({ id }) => id);

/** Harmonic by harmonic, converter by converter, as many as fit. */
const rowsOf = (context: StripContext, harmonics: number): Row[] => {
	const { design, evaluation, mark } = context;
	const several = design.switching.length > 1;
	const most = Math.max(harmonics, Math.min(design.switching.length, 5));
	const places = Array.from({ length: harmonics }, (_, index) => index + 1).flatMap((harmonic) =>
		design.switching
			.map((entry, index) => ({ entry, index, harmonic }))
			.filter(({ entry }) => harmonic <= entry.harmonics)
	);
	return places.slice(0, most).map(({ entry, index, harmonic }) => {
		const gains = sourcesShown(context).map(
			(source) =>
				evaluation.benefit.find(
					(line) => line.source === source && line.switching === entry.id && line.harmonic === harmonic
				) ?? null
		);
		const lowest = entry.frequencyMin_Hz * harmonic;
		const frequency = gains.find((gain) => gain !== null)?.frequency ?? lowest;
		return {
			label: several ? `2.${String(index + 1)} ${String(harmonic)}×` : `${String(harmonic)}×`,
			frequency: formatEdge(frequency, 'nearest', mark, 'frequency'),
			gains
		};
	});
};

const columnsOf = ({ design }: StripContext): number => Math.min(COLUMNS, design.sources.length);

const columnEnd = (context: StripContext, x: number, index: number): number =>
	x + context.width - (columnsOf(context) - 1 - index) * COLUMN_WIDTH * context.k;

const frequencyEnd = ({ design, k }: StripContext, x: number): number => {
	const label = design.switching.length > 1 ? LABEL_WIDTH_SEVERAL : LABEL_WIDTH;
	return x + (NUMBER_WIDTH + label + FREQUENCY_WIDTH) * k;
};

const gainText = (gain: number, context: StripContext): string =>
	`${fixed(gain, 1, context.mark, true)}\u00a0dB`;

/** Zero line and length of the bars: all gains of the rows on one scale. */
interface BarScale {
	readonly zero: number;
	readonly perDecibel: number;
}

const scaleOf = (rows: readonly Row[], from: number, to: number): BarScale => {
	const gains = rows.flatMap((row) => row.gains[0]?.gain_dB ?? []);
	const most = Math.max(1, ...gains);
	const least = Math.min(0, ...gains);
	const perDecibel = (to - from) / (most - least);
	return { zero: from - least * perDecibel, perDecibel };
};

const rowItems = (context: StripContext, row: Row, at: { x: number; y: number }, scale: BarScale): Item[] => {
	const { ink, k, resultShown } = context;
	const cap = CAP * k;
	const base = at.y + 2.85 * k;
	const left = at.x + NUMBER_WIDTH * k;
	const text = { cap, fill: ink.ink };
	const end = frequencyEnd(context, at.x);
	const labelRoom = end - left - textWidth(row.frequency, 'regular', cap) - 1 * k;
	const bars: Item[] = [];
	const [first] = row.gains;
	if (resultShown && first !== null && first !== undefined && Math.abs(first.gain_dB) > 0.05) {
		const tip = scale.zero + first.gain_dB * scale.perDecibel;
		const box = {
			x: Math.min(tip, scale.zero),
			y: at.y + 0.95 * k,
			width: Math.abs(tip - scale.zero),
			height: BAR * k
		};
		bars.push(rectangle(box, { fill: ink.ink }));
	}
	const columns = row.gains.length;
	const gains = resultShown ? row.gains : [];
	return [
		lettered(shorten(row.label, { width: labelRoom, cap }), left, base, text),
		lettered(row.frequency, end, base, { ...text, anchor: 'end' }),
		...bars,
		...gains.flatMap((gain, index) => {
			if (gain === null) return [];
			const decibels =
				columns > 1 ? fixed(gain.gain_dB, 1, context.mark, true) : gainText(gain.gain_dB, context);
			const bold = { ...text, face: 'bold', anchor: 'end' } as const;
			return [lettered(decibels, columnEnd(context, at.x, index), base, bold)];
		})
	];
};

/** With several sources the columns carry the numbers of the sources' rows. */
const headBlock = (context: StripContext): Block => {
	const { design, words, mark, k, ink, width, resultShown } = context;
	const chosen = design.choice.capacitance_F;
	const value = chosen === null ? '' : formatQuantity(chosen, 'capacitance', { decimalMark: mark });
	const columns = columnsOf(context);
	const filled = columns > 1 ? words.strip.benefitColumns : words.strip.benefitOf;
	const title = resultShown ? fill(filled, { value }) : words.strip.benefit;
	const cap = CAP * k;
	const room = width - NUMBER_WIDTH * k - (columns > 1 ? columns * COLUMN_WIDTH * k : 0);
	const heads = columns > 1 && resultShown ? design.sources.slice(0, columns) : [];
	return {
		height: ROW * k,
		heading: true,
		draw: (x, y) => {
			const base = y + BASE * k;
			const shown = shorten(title, { width: room, cap, face: 'semibold' });
			return [
				rowNumber(context, `6.${String(windowRows(context) + 3)}`, x, y),
				lettered(shown, x + NUMBER_WIDTH * k, base, { cap, face: 'semibold', fill: ink.ink }),
				...heads.map((_, index) =>
					lettered(`4.${String(index + 1)}`, columnEnd(context, x, index), base, {
						cap,
						fill: ink.graphite,
						anchor: 'end'
					})
				)
			];
		}
	};
};

/** Where rows leave lines out, the least gain of all stands in a last row. */
const leastBlock = (context: StripContext, rows: readonly Row[]): Block[] => {
	const { evaluation, words, design, k, ink, width, mark, resultShown } = context;
	const count = rows.flatMap((row) => row.gains).filter((gain) => gain !== null).length;
	const [first, ...others] = evaluation.benefit;
	if (!resultShown || first === undefined || evaluation.benefit.length <= count) return [];
	const least = others.reduce((a, b) => (b.gain_dB < a.gain_dB ? b : a), first);
	if (rows.some((row) => row.gains.includes(least))) return [];
	const source = design.sources.find(({ id }) => id === least.source)?.label ?? least.source;
	const cap = CAP * k;
	const value = gainText(least.gain_dB, context);
	const room = width - NUMBER_WIDTH * k - textWidth(value, 'bold', cap) - 2 * k;
	const frequency = formatEdge(least.frequency, 'nearest', mark, 'frequency');
	const phrase = fill(words.verdict.worst, { n: String(evaluation.benefit.length) });
	const text = shorten(`${phrase}: ${frequency}, ${source}`, { width: room, cap });
	return [
		{
			height: LEADING * k,
			draw: (x, y) => [
				lettered(text, x + NUMBER_WIDTH * k, y + 2.85 * k, { cap, fill: ink.ink }),
				lettered(value, x + width, y + 2.85 * k, { cap, face: 'bold', fill: ink.ink, anchor: 'end' })
			]
		}
	];
};

/**
 * The rows of the benefit.
 * @param context design, evaluation, palette, scale
 * @param harmonics how many of them get a row
 * @returns the blocks; none without a choice
 * @example benefitBlocks(context, 5).length // 7 with one source: head, five rows, foot
 */
export function benefitBlocks(context: StripContext, harmonics: number): Block[] {
	const { design, k, width, ink } = context;
	if (design.choice.capacitance_F === null) return [];
	const rows = rowsOf(context, harmonics);
	const columns = columnsOf(context);
	const blocks = rows.map((row): Block => ({
		height: LEADING * k,
		draw: (x, y) => {
			const from = frequencyEnd(context, x) + 1.5 * k;
			const to = x + width - (columns > 1 ? columns * COLUMN_WIDTH : ALONE_WIDTH) * k;
			const scale = scaleOf(rows, from, to);
			const zero = ruled([scale.zero, y, scale.zero, y + LEADING * k], strokeOf(ink, 'switching', k));
			return [zero, ...rowItems(context, row, { x, y }, scale)];
		}
	}));
	const foot: Block = { height: 0.9 * k, draw: (x, y) => [rowLine(context, x, y + 0.9 * k)] };
	return [headBlock(context), ...blocks, ...leastBlock(context, rows), foot];
}
