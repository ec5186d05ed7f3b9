/** Which powers of ten the axes start at, so that the lines that matter fall inside. */
import type { Design } from '$lib/design/design';
import type { Evaluation } from '$lib/rules/finding';

export interface Extent {
	readonly frequencyFrom: number;
	readonly impedanceFrom: number;
}

export interface ExtentInput {
	readonly design: Design | null;
	readonly evaluation: Evaluation | null;
	/** Decades across and up. */
	readonly across: number;
	readonly up: number;
	readonly pane: boolean;
	/** Ends that the layout fixes [Hz, Ω]. */
	readonly frequencyFrom?: number | undefined;
	readonly impedanceFrom?: number | undefined;
}

/** Paper for any reactance: 1 kHz and 100 mΩ at the lower left. */
const PLAIN: Extent = { frequencyFrom: 1e3, impedanceFrom: 0.1 };

/** Exponents that are tried. */
const FREQUENCIES = [-1, 10] as const;
const IMPEDANCES = [-6, 7] as const;

/** Everything in decades: u = log f, v = log |Z|. */
interface Matters {
	readonly switching: readonly number[];
	readonly harmonics: readonly number[];
	/** Where the choice, or what stands for it, crosses the switching frequency. */
	readonly crossing: readonly [number, number] | null;
	readonly corner: readonly [number, number];
	/** |Z| of the windows' edges at the switching frequency. */
	readonly edges: readonly number[];
	/** log C of the windows' edges, and of the bands' finite ends. */
	readonly windowEnds: readonly number[];
	readonly bandEnds: readonly number[];
	/** log L and log C of the parts. */
	readonly parts: readonly [number, number];
}

const TURN = Math.log10(2 * Math.PI);

const finite = (values: readonly (number | null)[]): number[] =>
	values.filter((value): value is number => value !== null && value > 0 && Number.isFinite(value));

const bandEndsOf = (evaluation: Evaluation | null): number[] =>
	finite((evaluation?.findings ?? []).flatMap(({ bands }) => bands.flatMap(({ from, to }) => [from, to])));

const windowEndsOf = (evaluation: Evaluation | null): number[] =>
	finite((evaluation?.windows ?? []).flatMap(({ from, to }) => [from, to]));

/** Without a choice: the middle of the first window, or of what the rules forbid where they leave none. */
const centreOf = (evaluation: Evaluation | null): number | null => {
	const [first] = evaluation?.windows ?? [];
	const ends = first === undefined ? bandEndsOf(evaluation) : finite([first.from, first.to]);
	return ends.length === 0 ? null : Math.sqrt(Math.min(...ends) * Math.max(...ends));
};

const standIn = (design: Design, evaluation: Evaluation | null): number | null =>
	design.choice.capacitance_F ?? evaluation?.recommended ?? centreOf(evaluation);

const gather = (design: Design, evaluation: Evaluation | null): Matters => {
	const lowest = Math.min(...design.switching.map((entry) => entry.frequencyMin_Hz));
	const switching = design.switching.flatMap((entry) => [entry.frequencyMin_Hz, entry.frequencyMax_Hz]);
	const u = Math.log10(lowest);
	const inductance = Math.log10(design.inductor.inductance_H);
	const capacitance = Math.log10(design.capacitor.capacitance_F);
	const chosen = standIn(design, evaluation);
	const bandEnds = bandEndsOf(evaluation).map(Math.log10);
	const open = windowEndsOf(evaluation).map(Math.log10);
	const windowEnds = open.length === 0 ? bandEnds : open;
	return {
		switching: switching.map(Math.log10),
		harmonics: switching.map((frequency) => Math.log10(5 * frequency)),
		crossing: chosen === null ? null : [u, -(TURN + u + Math.log10(chosen))],
		corner: [-(TURN + (inductance + capacitance) / 2), (inductance - capacitance) / 2],
		edges: windowEnds.map((end) => -(TURN + u + end)),
		windowEnds,
		bandEnds,
		parts: [inductance, capacitance]
	};
};

/** A field of decades with its lower left corner. */
interface Field {
	readonly u: number;
	readonly v: number;
	readonly across: number;
	readonly up: number;
}

/** The harmonics lie to the right of the switching frequency, so that it stands a little to the left. */
const LEFT_OF_CENTRE = 0.42;

const within = (value: number, from: number, length: number, inset = 0): boolean =>
	value >= from + inset && value <= from + length - inset;

const count = (values: readonly number[], from: number, length: number): number =>
	values.filter((value) => within(value, from, length)).length / Math.max(1, values.length);

/** How far a crossing lies from the middle half of a side, and from the middle itself. */
const offCentre = (value: number, from: number, length: number, best: number): number => {
	const part = (value - from) / length;
	return 30 * Math.max(0, Math.abs(part - 0.5) - 0.25) + Math.abs(part - best);
};

const crossingWorth = ({ crossing }: Matters, { u, v, across, up }: Field): number => {
	if (crossing === null) return 0;
	const [cu, cv] = crossing;
	const inside = within(cu, u, across, 0.1) && within(cv, v, up, 0.4);
	return (inside ? 300 : 0) - 4 * offCentre(cu, u, across, LEFT_OF_CENTRE) - 4 * offCentre(cv, v, up, 0.5);
};

const partsWorth = ({ parts: [inductance, capacitance] }: Matters, { u, v, across, up }: Field): number => {
	// An L line enters where v − u − log 2π = log L; a C line where −v − u − log 2π = log C.
	const rising = inductance + TURN;
	const falling = -(capacitance + TURN);
	const inductor = v + up - u > rising && v - u - across < rising;
	const capacitor = u + v < falling && u + across + v + up > falling;
	return (inductor ? 20 : 0) + (capacitor ? 20 : 0);
};

const paneWorth = ({ windowEnds, bandEnds }: Matters, { u, v, across }: Field): number => {
	const from = -(TURN + u + across + v);
	return 60 * count(windowEnds, from, across) + 20 * count(bandEnds, from, across);
};

const worth = (matters: Matters, field: Field, pane: boolean): number => {
	const { u, v, across, up } = field;
	const corner = within(matters.corner[0], u, across) && within(matters.corner[1], v, up);
	return (
		200 * count(matters.switching, u, across) +
		40 * count(matters.harmonics, u, across) +
		100 * count(matters.edges, v, up) +
		(corner ? 30 : 0) +
		crossingWorth(matters, field) +
		partsWorth(matters, field) +
		(pane ? paneWorth(matters, field) : 0)
	);
};

const exponents = (fixed: number | undefined, [from, to]: readonly [number, number]): number[] =>
	fixed === undefined
		? Array.from({ length: to - from + 1 }, (_, index) => from + index)
		: [Math.round(Math.log10(fixed))];

/**
 * Chooses the lower ends of both axes: whole powers of ten by which f_sw, 5·f_sw, the L–C corner, the windows'
 * edges and the choice at f_sw fall inside, the choice between a quarter and three quarters of both sides.
 * @param input design and evaluation, decades [1], and the ends that the layout fixes [Hz, Ω]
 * @returns the lower ends [Hz, Ω]
 * @example chooseExtent({ design: null, evaluation: null, across: 4, up: 4, pane: false }).frequencyFrom // 1000
 * Source: our own rule.
 */
export function chooseExtent(input: ExtentInput): Extent {
	const { design, evaluation, across, up } = input;
	if (design === null) {
		return {
			frequencyFrom: input.frequencyFrom ?? PLAIN.frequencyFrom,
			impedanceFrom: input.impedanceFrom ?? PLAIN.impedanceFrom
		};
	}
	const matters = gather(design, evaluation);
	const fields = exponents(input.frequencyFrom, FREQUENCIES).flatMap((u) =>
		exponents(input.impedanceFrom, IMPEDANCES).map((v): Field => ({ u, v, across, up }))
	);
	const ranked = fields.map((field) => ({ field, worth: worth(matters, field, input.pane) }));
	const best = ranked.reduce((first, next) => (next.worth > first.worth + 1e-9 ? next : first));
	return {
		frequencyFrom: Number(`1e${String(best.field.u)}`),
		impedanceFrom: Number(`1e${String(best.field.v)}`)
	};
}
