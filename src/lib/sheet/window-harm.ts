/** Whether a window that looks inviting makes some line worse, whatever value is taken from it. */
import type { Design } from '$lib/design/design';
import type { Evaluation, Window } from '$lib/rules/finding';
import { worstHarm, type Harm } from './benefit-curve';

/** A value that stands for the whole window: its target, or the edge it has. */
const standIn = ({ from, to, target }: Window): number | null => {
	if (target !== null) return target;
	if (from > 0 && to < Infinity) return Math.sqrt(from * to);
	if (from > 0) return from;
	return to < Infinity ? to : null;
};

const workOut = (design: Design, evaluation: Evaluation, index: number): Harm | null => {
	const window = evaluation.windows[index];
	if (window === undefined) return null;
	const candidates = evaluation.candidates.filter((candidate) => candidate.window === index);
	const values = candidates.length > 0 ? candidates.map(({ capacitance }) => capacitance) : [standIn(window)];
	const harms = values.map((value) => (value === null ? null : worstHarm(design, value)));
	if (harms.some((harm) => harm === null)) return null;
	return harms.reduce(
		(least, harm) => (least === null || (harm?.gain ?? 0) > least.gain ? harm : least),
		null
	);
};

/** What is worse by less than this is not worth a warning [dB]. */
const LEAST_HARM = -0.5;

const known = new WeakMap<Evaluation, Map<number, Harm | null>>();

/**
 * Gives the least harm that one can have in a window that does not hold the choice: at its candidates, since only
 * they can be taken, or at its target where it has none.
 * @param design the worksheet's design
 * @param evaluation of this design
 * @param index of the window
 * @returns the harm, or null where some value harms no line by more than half a decibel
 * @example windowHarm(avionicsConverter, evaluation, 0)?.gain // −12.1 dB
 * Source: nodal analysis of the ladder.
 */
export function windowHarm(design: Design, evaluation: Evaluation, index: number): Harm | null {
	const found = known.get(evaluation) ?? new Map<number, Harm | null>();
	known.set(evaluation, found);
	const harm = found.has(index) ? (found.get(index) ?? null) : workOut(design, evaluation, index);
	found.set(index, harm);
	return harm === null || harm.gain > LEAST_HARM ? null : harm;
}
