/** Crosses where Cx would resonate with L and the source at the switching frequency, and the corner of L and C. */
import type { Design, ResonanceGuardRule, Source } from '$lib/design/design';
import { cornerFrequency, exactWorstCapacitance } from '$lib/network/resonance';
import { sourceImpedance } from '$lib/network/source';
import { formatQuantity } from '$lib/quantity/format';
import { filterOf, partCurves, sourceCurves, sourceModel, uncovered } from '$lib/rules/circuit';
import type { Item } from '$lib/scene/scene';
import { capOf, penOf, settle, type Board } from './board';
import { roundDots } from './hatch';
import { aroundPoint, roomOf, type Label } from './label';
import { orientedAt } from './oriented';
import { ruled } from './pen';
import { xOf, yOf } from './plot';

/** Half of a cross at k = 1, and the radius of a crossing's ring [mm]. */
const ARM = 1.4;
const RING = 0.8;

const guards = (board: Board): ResonanceGuardRule[] => {
	const shown = new Set(board.findings.filter(({ bands }) => bands.length > 0).map(({ rule }) => rule));
	return (board.input.design?.rules ?? []).filter(
		(rule): rule is ResonanceGuardRule => rule.kind === 'resonance-guard' && shown.has(rule.id)
	);
};

/** C0 at the nominal parts and the middle of the source's range; null where a measurement does not reach. */
const worstAt = (design: Design, source: Source, frequency: number): number | null => {
	const filter = filterOf(design);
	const model = sourceModel(design, source);
	const range = { from: frequency, to: frequency };
	if (uncovered([...partCurves(filter), ...sourceCurves(model)], range) !== null) return null;
	const middle =
		source.kind === 'impedance'
			? Math.sqrt(Math.max(source.inductanceMin_H, source.inductanceMax_H / 100) * source.inductanceMax_H)
			: undefined;
	const worst = exactWorstCapacitance(filter, sourceImpedance(model, frequency, middle), frequency);
	return worst > 0 && Number.isFinite(worst) ? worst : null;
};

const insidePlot = ({ input: { plot } }: Board, x: number, y: number): boolean =>
	x > plot.x + ARM && x < plot.x + plot.width - ARM && y > plot.y + ARM && y < plot.y + plot.height - ARM;

const settleWorst = (board: Board, design: Design, source: Source, frequency: number): Item[] => {
	const { plot, ink, decimalMark } = board.input;
	const capacitance = worstAt(design, source, frequency);
	if (capacitance === null) return [];
	const x = xOf(plot, frequency);
	const y = yOf(plot, 1 / (2 * Math.PI * frequency * capacitance));
	if (!insidePlot(board, x, y)) return [];
	const arm = ARM * board.k;
	const text = `C0 ${formatQuantity(capacitance, 'capacitance', { digits: 3, decimalMark })}`;
	const label: Label = { text, cap: capOf(board), face: 'regular', fill: ink.mandatory };
	board.field.boxes.push(orientedAt(x, y, [arm, arm], 0));
	settle(board, label, aroundPoint(x, y, roomOf(label), 1.6 * board.k));
	return [
		ruled([x - arm, y - arm, x + arm, y + arm, x - arm, y + arm, x + arm, y - arm], penOf(board, 'worst'), {
			label: text
		})
	];
};

/**
 * Places the crosses of the resonance guards at the lowest switching frequency.
 * @param board the chart; flag and switching band reserved
 * @returns one cross per guarded source
 * @example settleWorsts(board).length
 * Source: C0 = −Im(Y_p)/ω.
 */
export function settleWorsts(board: Board): Item[] {
	const { design } = board.input;
	const { readAt } = board;
	if (design === null || readAt === null) return [];
	const ids = [...new Set(guards(board).map(({ source }) => source))];
	return design.sources
		.filter(({ id }) => ids.includes(id))
		.flatMap((source) => settleWorst(board, design, source, readAt));
}

/**
 * Marks where L and C cross, with frequency and impedance.
 * @param board the chart; parts placed
 * @returns a ring, or nothing where they cross outside
 * @example settleCorner(board).length
 * Source: f0 = 1/(2π√(LC)), Z0 = √(L/C).
 */
export function settleCorner(board: Board): Item[] {
	const { plot, design, ink, decimalMark } = board.input;
	if (design === null) return [];
	const { inductor, capacitor } = design;
	const frequency = cornerFrequency(inductor.inductance_H, capacitor.capacitance_F);
	const impedance = Math.sqrt(inductor.inductance_H / capacitor.capacitance_F);
	const x = xOf(plot, frequency);
	const y = yOf(plot, impedance);
	if (!insidePlot(board, x, y)) return [];
	const options = { digits: 3, decimalMark } as const;
	const text = `${formatQuantity(frequency, 'frequency', options)}, ${formatQuantity(impedance, 'resistance', options)}`;
	const label: Label = { text, cap: capOf(board), face: 'regular', fill: ink.ink };
	const half = [RING * board.k, RING * board.k] as const;
	const found = settle(board, label, aroundPoint(x, y, roomOf(label), 1 * board.k));
	if (!found) return [];
	board.field.boxes.push(orientedAt(x, y, half, 0));
	const d = roundDots([x, y], RING * board.k);
	return [{ type: 'path', label: text, d, stroke: penOf(board, 'head') }];
}
