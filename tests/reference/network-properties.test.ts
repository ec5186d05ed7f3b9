/** The closed forms of the network against nodal analysis of any network, and what must hold for all of them. */
import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { benefitAt } from '$lib/network/benefit';
import { divide, magnitude, reciprocal, type Complex } from '$lib/network/complex';
import {
	capacitorImpedance,
	nodeAdmittance,
	outputImpedance,
	transferImpedance,
	type CapacitorPart,
	type Filter
} from '$lib/network/filter';
import { exactWorstCapacitance } from '$lib/network/resonance';
import { relative } from './check-case';
import { nodeVoltages, type Branch } from './nodal';

const none: Complex = { re: 0, im: 0 };

describe('any network', () => {
	const logs = (from: number, to: number) =>
		fc.double({ min: Math.log(from), max: Math.log(to), noNaN: true }).map(Math.exp);
	const filters: fc.Arbitrary<Filter> = fc.record({
		inductor: fc.record({
			inductance: logs(1e-6, 1e-3),
			resistance: logs(1e-3, 1),
			parallelCapacitance: logs(1e-12, 1e-9)
		}),
		capacitor: fc.record({ capacitance: logs(1e-8, 1e-4), esr: logs(1e-3, 1), esl: logs(1e-9, 1e-7) }),
		damping: fc.option(fc.record({ resistance: logs(0.1, 100), capacitance: logs(1e-8, 1e-4) }), {
			nil: undefined
		})
	});
	const sources: fc.Arbitrary<Complex> = fc.record({ re: logs(0.01, 100), im: logs(0.01, 1e3) });
	const frequencies = logs(1e3, 3e7);
	const choices = fc.record({ capacitance: logs(1e-11, 1e-3), esr: logs(1e-3, 1), esl: logs(1e-9, 1e-7) });

	/**
	 * c is node 1, x node 2. Elements in series are one branch: as nodes of their own, microohms beside kilohms would
	 * cost the elimination more digits than are compared.
	 */
	const branches = (filter: Filter, z: Complex, choice: CapacitorPart | null, f: number): Branch[] => {
		const w = 2 * Math.PI * f;
		const branch = (from: number, to: number, re: number, im: number): Branch => ({
			from,
			to,
			impedance: { re, im }
		});
		const shunt = (node: number, { esr = 0, esl = 0, capacitance }: CapacitorPart): Branch =>
			branch(node, 0, esr, w * esl - 1 / (w * capacitance));
		const { inductor, capacitor, damping } = filter;
		return [
			shunt(1, capacitor),
			branch(1, 2, inductor.resistance ?? 0, w * inductor.inductance),
			branch(1, 2, 0, -1 / (w * (inductor.parallelCapacitance ?? 0))),
			branch(2, 0, z.re, z.im),
			...(choice ? [shunt(2, choice)] : []),
			...(damping ? [branch(1, 0, damping.resistance, -1 / (w * damping.capacitance))] : [])
		];
	};

	it('has the voltages of nodal analysis to 1e-9', () => {
		fc.assert(
			fc.property(filters, sources, choices, frequencies, (filter, z, choice, f) => {
				const shunt = reciprocal(capacitorImpedance(choice, f));
				const without = nodeVoltages(branches(filter, z, null, f), 1);
				const loaded = nodeVoltages(branches(filter, z, choice, f), 1);
				const near = (a: Complex, b: Complex | undefined) => {
					expect(relative(magnitude(a), magnitude(b ?? none))).toBeLessThan(1e-9);
				};
				near(transferImpedance(filter, none, z, f), without[2]);
				near(transferImpedance(filter, shunt, z, f), loaded[2]);
				near(outputImpedance(filter, shunt, z, f), loaded[1]);
				const gain = 20 * Math.log10(magnitude(divide(without[2] ?? none, loaded[2] ?? none)));
				expect(Math.abs(benefitAt(filter, z, choice, f) - gain)).toBeLessThan(1e-7);
			}),
			{ numRuns: 400 }
		);
	});

	it('gains from an ideal Cx exactly when ωCx > 2B, Y_p = G − jB', () => {
		fc.assert(
			fc.property(filters, sources, logs(1e-12, 1e-2), frequencies, (filter, z, capacitance, f) => {
				const twice = -2 * nodeAdmittance(filter, z, f).im;
				const own = 2 * Math.PI * f * capacitance;
				fc.pre(Math.abs(own - twice) > 1e-9 * own);
				expect(benefitAt(filter, z, { capacitance }, f) > 0).toBe(own > twice);
			}),
			{ numRuns: 400 }
		);
	});

	it('is worst at C0 whatever the losses', () => {
		fc.assert(
			fc.property(filters, sources, frequencies, (filter, z, f) => {
				const capacitance = exactWorstCapacitance(filter, z, f);
				fc.pre(capacitance > 0);
				const gain = (by: number) => benefitAt(filter, z, { capacitance: by * capacitance }, f);
				for (const by of [0.5, 0.99, 1.01, 2]) expect(gain(by)).toBeGreaterThanOrEqual(gain(1) - 1e-9);
			})
		);
	});
});
