/** How long a decade is and how many of them stand on the sheet: whole millimetres, so that a ruler works. */
import type { Design } from '$lib/design/design';
import type { Evaluation } from '$lib/rules/finding';
import { chooseExtent } from './extent';
import type { Layout } from './layout';
import type { Paper } from './paper';
import { PLOT_ROOM, type Pane, type Plot } from './plot';

/** A layout that no sheet can be made of. */
export class LayoutError extends Error {
	/** JSON pointer into the request. */
	readonly pointer: string;

	constructor(pointer: string, message: string) {
		super(message);
		this.name = 'LayoutError';
		this.pointer = pointer;
	}
}

export interface Fit {
	readonly plot: Plot;
	readonly pane: Pane | null;
}

export interface FitInput {
	readonly paper: Paper;
	readonly layout: Layout;
	readonly design: Design | null;
	readonly evaluation: Evaluation | null;
	/** Whether a benefit pane is wanted. */
	readonly pane: boolean;
}

/** Decades that a sheet starts from, and the most it takes. */
const WITH_PANE = { across: 5, up: 4 } as const;
const WITHOUT_PANE = { across: 4, up: 4 } as const;
const MOST = { across: 8, up: 8 } as const;
const FEWEST = 2;
/** Beyond these a sheet grows no decades of its own accord. */
const GROWN = { across: 7, up: 6 } as const;
/** A multiple of five is taken when it costs no more than this. */
const ROUND_COST = 0.05;
/** Height of the pane at k = 1 [mm]. */
const PANE = { least: 20, most: 28 } as const;

interface Room {
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly height: number;
}

interface Division {
	readonly decade: number;
	readonly across: number;
	readonly up: number;
	readonly paneHeight: number;
}

const roomOf = ({ chart, k }: Paper): Room => ({
	x: chart.x + PLOT_ROOM.left * k,
	y: chart.y + PLOT_ROOM.top * k,
	width: chart.width - (PLOT_ROOM.left + PLOT_ROOM.right) * k,
	height: chart.height - (PLOT_ROOM.top + PLOT_ROOM.bottom) * k
});

/** A rounding error must not cost a whole millimetre. */
const whole = (length: number): number => Math.floor(length + 1e-9);

const rounded = (decade: number): number => {
	const five = Math.floor(decade / 5) * 5;
	return (decade - five) / decade <= ROUND_COST ? five : decade;
};

const chosenDivision = (room: Room, pane: boolean): Division => {
	const { across, up } = pane ? WITH_PANE : WITHOUT_PANE;
	const decade = rounded(whole(Math.min(room.width / across, room.height / (up + (pane ? 1 : 0)))));
	const paneHeight = pane ? decade : 0;
	return {
		decade,
		across: Math.min(GROWN.across, Math.max(across, whole(room.width / decade))),
		up: Math.min(GROWN.up, Math.max(up, whole((room.height - paneHeight) / decade))),
		paneHeight
	};
};

const givenDivision = (room: Room, decade: number, paneHeight: number): Division => ({
	decade,
	across: Math.min(MOST.across, whole(room.width / decade)),
	up: Math.min(MOST.up, whole((room.height - paneHeight) / decade)),
	paneHeight
});

const isEnough = ({ across, up }: Division): boolean => across >= FEWEST && up >= FEWEST;

const longestDecade = (room: Room): number => whole(Math.min(room.width, room.height) / FEWEST);

const divide = (room: Room, { layout, pane, paper }: FitInput): Division => {
	const { decade_mm: decade } = layout;
	if (decade === undefined) return chosenDivision(room, pane);
	const most = whole(PANE.most * paper.k);
	const height = Math.min(most, Math.max(whole(PANE.least * paper.k), decade));
	const withPane = givenDivision(room, decade, pane ? height : 0);
	if (isEnough(withPane)) return withPane;
	// A pane that the layout does not ask for gives way to a decade that it does ask for.
	const alone = givenDivision(room, decade, 0);
	if (isEnough(alone) && layout.benefitPane !== true) return alone;
	throw new LayoutError(
		'/layout/decade_mm',
		`A decade of ${String(decade)} mm leaves fewer than 2 × 2 decades on this paper; at most ${String(longestDecade(room))} mm fits.`
	);
};

/** Benefit from −20 to +40 dB unless the gains ask for more. */
const gainsOf = (evaluation: Evaluation | null): { gainFrom: number; gainTo: number } => {
	const gains = (evaluation?.benefit ?? []).map((benefit) => benefit.gain_dB).filter(Number.isFinite);
	const least = Math.min(-20, ...gains.map((gain) => Math.floor(gain / 20) * 20));
	const most = Math.max(40, ...gains.map((gain) => Math.ceil(gain / 20) * 20));
	return { gainFrom: Math.max(-60, least), gainTo: Math.min(80, most) };
};

/** What is left over goes to both sides alike, in whole millimetres. */
const centred = (start: number, room: number, taken: number): number =>
	Math.round((start + Math.max(0, room - taken) / 2) * 10) / 10;

/**
 * Places the plot and its benefit pane on the paper: D = ⌊min(width / decades, height / decades)⌋ whole mm on both
 * axes, a multiple of five when that costs ≤ 5 %; a decade length that the layout gives is kept.
 * @param input paper, layout, design and its evaluation
 * @returns plot and pane [mm, Hz, Ω, dB]
 * @throws LayoutError when the given decade length leaves fewer than 2 × 2 decades
 * @example fitChart({ paper, layout, design, evaluation, pane: true }).plot.decade // 28 on A4 landscape
 * Source: our own rule.
 */
export function fitChart(input: FitInput): Fit {
	const room = roomOf(input.paper);
	const { decade, across, up, paneHeight } = divide(room, input);
	const { design, evaluation, layout } = input;
	const extent = chooseExtent({
		design,
		evaluation,
		across,
		up,
		pane: paneHeight > 0,
		frequencyFrom: layout.frequencyFrom_Hz,
		impedanceFrom: layout.impedanceFrom_ohm
	});
	const size = { width: across * decade, height: up * decade };
	const x = centred(room.x, room.width, size.width);
	const y = centred(room.y, room.height, size.height + paneHeight);
	const plot = {
		x,
		y,
		...size,
		decade,
		...extent,
		frequencyTo: powerUp(extent.frequencyFrom, across),
		impedanceTo: powerUp(extent.impedanceFrom, up)
	};
	const pane = { x, y: y + size.height, width: size.width, height: paneHeight, ...gainsOf(evaluation) };
	return { plot, pane: paneHeight > 0 ? pane : null };
}

const powerUp = (from: number, decades: number): number =>
	Number(`1e${String(Math.round(Math.log10(from)) + decades)}`);
