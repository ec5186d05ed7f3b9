/** The two inks of a sheet: one table of pens and fills each. Line type carries the meaning, colour repeats it. */
import type { Stroke } from '$lib/scene/scene';

/** ISO 128-2 line widths at k = 1; A3 and Tabloid take the next one up [mm]. */
export type LineWidth = 0.13 | 0.18 | 0.25 | 0.35 | 0.5 | 0.7 | 1;

export type Pen =
	| 'frame'
	| 'border'
	| 'head'
	| 'tick'
	| 'rule'
	| 'choice'
	| 'windowEdge'
	| 'nominalEdge'
	| 'reading'
	| 'inductor'
	| 'capacitor'
	| 'source'
	| 'inductorTolerance'
	| 'capacitorTolerance'
	| 'sourceRange'
	| 'curve'
	| 'mandatoryEdge'
	| 'designEdge'
	| 'advisoryEdge'
	| 'mandatoryBank'
	| 'designBank'
	| 'mandatoryField'
	| 'designField'
	| 'thumbEdge'
	| 'worst'
	| 'switching'
	| 'gridDecade'
	| 'gridMiddle'
	| 'gridFine'
	| 'inductanceDecade'
	| 'capacitanceDecade'
	| 'inductanceFine'
	| 'capacitanceFine'
	| 'benefit';

export interface Ink {
	readonly name: 'colour' | 'mono';
	/** All text that must survive a copier, frame, edges. */
	readonly ink: string;
	/** Captions and notes. */
	readonly graphite: string;
	readonly capacitance: string;
	readonly inductance: string;
	readonly source: string;
	readonly mandatory: string;
	readonly design: string;
	readonly advisory: string;
	readonly paper: string;
	/** Fills; white in mono. */
	readonly window: string;
	readonly nominal: string;
	readonly switching: string;
	readonly pens: Readonly<Record<Pen, Stroke & { readonly width: LineWidth }>>;
}

type Table = Readonly<Record<Pen, readonly [colour: string, width: LineWidth, dash?: readonly number[]]>>;

const LONG_DASH = [8, 1.6];
const DASH_DOT = [8.5, 1.2, 0.7, 1.2];
const DASH_DOUBLE_DOT = [6, 1, 0.7, 1, 0.7, 1];
const THIN_DASH_DOT = [4, 0.8, 0.45, 0.8];
const SHORT_DASH = [2, 1];
const DOTTED = [0.5, 0.8];

const INK = '#13233F';
const GRAPHITE = '#353F4E';
const CAPACITANCE = '#2B5C9B';
const INDUCTANCE = '#1F7466';
const SOURCE = '#6D4A91';
const MANDATORY = '#96231C';
const DESIGN = '#4C5A70';

const COLOUR: Table = {
	frame: [INK, 0.7],
	border: [INK, 0.5],
	head: [INK, 0.35],
	tick: [INK, 0.35],
	rule: ['#A3AFBE', 0.18],
	choice: [INK, 1],
	windowEdge: [INK, 0.35],
	nominalEdge: [INK, 0.18, SHORT_DASH],
	reading: [INK, 0.5],
	inductor: [INDUCTANCE, 0.5, LONG_DASH],
	capacitor: [CAPACITANCE, 0.5, DASH_DOT],
	source: [SOURCE, 0.5, DASH_DOUBLE_DOT],
	inductorTolerance: [INDUCTANCE, 0.18, LONG_DASH],
	capacitorTolerance: [CAPACITANCE, 0.18, DASH_DOT],
	sourceRange: [SOURCE, 0.25, DASH_DOUBLE_DOT],
	curve: [GRAPHITE, 0.35],
	mandatoryEdge: [MANDATORY, 0.25],
	designEdge: [DESIGN, 0.25],
	advisoryEdge: [DESIGN, 0.25, DOTTED],
	mandatoryBank: [MANDATORY, 0.25],
	designBank: [DESIGN, 0.25],
	mandatoryField: ['#C4756E', 0.18],
	designField: ['#98A3B3', 0.18],
	thumbEdge: [GRAPHITE, 0.18, [1.2, 0.8]],
	worst: [MANDATORY, 0.5],
	switching: [INK, 0.25],
	gridDecade: ['#76869B', 0.25],
	gridMiddle: ['#A3AFBE', 0.18],
	gridFine: ['#C3CCD7', 0.13],
	inductanceDecade: [INDUCTANCE, 0.18, THIN_DASH_DOT],
	capacitanceDecade: [CAPACITANCE, 0.18],
	inductanceFine: ['#8FB9B2', 0.13, THIN_DASH_DOT],
	capacitanceFine: ['#95AECD', 0.13],
	benefit: [INK, 0.35]
};

const BLACK = '#000000';
const WHITE = '#FFFFFF';

/** What mono changes: tone comes from the dash, never from grey. */
const MONO: Partial<Record<Pen, readonly [LineWidth, (readonly number[])?]>> = {
	rule: [0.13, [0.25, 0.75]],
	mandatoryBank: [0.18],
	designBank: [0.18],
	mandatoryEdge: [0.18],
	designEdge: [0.18],
	gridDecade: [0.18],
	gridMiddle: [0.13, [0.5, 0.5]],
	gridFine: [0.13, [0.25, 0.75]],
	inductanceDecade: [0.13, THIN_DASH_DOT],
	capacitanceDecade: [0.13],
	inductanceFine: [0.13, [1.2, 1.6]],
	capacitanceFine: [0.13, [0.5, 1]]
};

const pens = (row: (pen: Pen) => Table[Pen]): Ink['pens'] => {
	const entries = (Object.keys(COLOUR) as Pen[]).map((pen) => {
		const [colour, width, dash] = row(pen);
		return [pen, { colour, width, ...(dash === undefined ? {} : { dash }) }] as const;
	});
	return Object.fromEntries(entries) as Ink['pens'];
};

const monoRow = (pen: Pen): Table[Pen] => {
	const [, width, dash] = COLOUR[pen];
	const [monoWidth, monoDash] = MONO[pen] ?? [width, dash];
	return monoDash === undefined ? [BLACK, monoWidth] : [BLACK, monoWidth, monoDash];
};

export const INKS: Readonly<Record<Ink['name'], Ink>> = {
	colour: {
		name: 'colour',
		ink: INK,
		graphite: GRAPHITE,
		capacitance: CAPACITANCE,
		inductance: INDUCTANCE,
		source: SOURCE,
		mandatory: MANDATORY,
		design: DESIGN,
		advisory: DESIGN,
		paper: WHITE,
		window: '#FFF0B8',
		nominal: '#FFD65C',
		switching: '#DCE6F3',
		pens: pens((pen) => COLOUR[pen])
	},
	mono: {
		name: 'mono',
		ink: BLACK,
		graphite: BLACK,
		capacitance: BLACK,
		inductance: BLACK,
		source: BLACK,
		mandatory: BLACK,
		design: BLACK,
		advisory: BLACK,
		paper: WHITE,
		window: WHITE,
		nominal: WHITE,
		switching: WHITE,
		pens: pens(monoRow)
	}
};

const NEXT_WIDTH: Readonly<Record<LineWidth, number>> = {
	0.13: 0.18,
	0.18: 0.25,
	0.25: 0.35,
	0.35: 0.5,
	0.5: 0.7,
	0.7: 1,
	1: 1.4
};

const steppedStrokes = new Map<string, Stroke>();

/**
 * Gives the stroke of a pen; on papers with k > 1 one ISO width wider and its dashes k times as long.
 * @param ink colour or mono
 * @param pen what is drawn
 * @param k factor of the paper, 1 or √2
 * @returns the stroke [mm]
 * @example strokeOf(INKS.colour, 'choice', 1).width // 1
 * Source: ISO 128-2 line widths.
 */
export function strokeOf(ink: Ink, pen: Pen, k: number): Stroke {
	const stroke = ink.pens[pen];
	if (k <= 1) return stroke;
	const key = `${ink.name} ${pen} ${String(k)}`;
	const known = steppedStrokes.get(key);
	if (known !== undefined) return known;
	const dash = stroke.dash?.map((length) => Math.round(length * k * 100) / 100);
	const stepped = {
		...stroke,
		width: NEXT_WIDTH[stroke.width],
		...(dash === undefined ? {} : { dash })
	};
	steppedStrokes.set(key, stepped);
	return stepped;
}
