/** The product's network against ngspice, on netlists made from the same filters, capacitors and sources. */
import { beforeAll, describe, expect, it } from 'vitest';
import { benefitAt } from '$lib/network/benefit';
import { divide, magnitude, reciprocal } from '$lib/network/complex';
import { capacitorImpedance, outputImpedance, transferImpedance, type Filter } from '$lib/network/filter';
import { outputPeak } from '$lib/network/peak';
import { capacitorCurrent } from '$lib/network/ripple';
import { exactWorstCapacitance } from '$lib/network/resonance';
import { sourceImpedance } from '$lib/network/source';
import { jouleIntegral, peakCapacitorVoltage, peakSourceCurrent } from '$lib/network/transient';
import {
	growth,
	solveCircuits,
	solveSwitchOn,
	type Circuit,
	type Solved,
	type SpiceSource,
	type SwitchOn
} from './ngspice';

/** Numbers that look like chance and are the same in every run (Lehmer's rule, modulus 2³¹ − 1). */
const draws = (seed: number) => {
	let state = seed;
	return (from: number, to: number): number => {
		state = (state * 48271) % 2147483647;
		return from * (to / from) ** (state / 2147483647);
	};
};

const NETWORKS = ['amn-50uH-5ohm', 'amn-50uH', 'amn-5uH-1ohm', 'an-5uH'] as const;

/** The 18 first have network sources, one and two of each kind; every third is damped, every second has real parts. */
const drawn = (index: number): Circuit => {
	const draw = draws(1000 + index);
	draw(1, 2);
	const real = index % 2 === 1;
	const parasitic = (from: number, to: number) => (real ? draw(from, to) : 0);
	const inductance = draw(1e-6, 1e-3);
	const capacitance = draw(1e-7, 5e-5);
	const filter: Filter = {
		inductor: {
			inductance,
			resistance: parasitic(1e-3, 0.5),
			parallelCapacitance: parasitic(5e-12, 2e-10)
		},
		capacitor: { capacitance, esr: parasitic(1e-3, 0.2), esl: parasitic(1e-9, 5e-8) },
		...(index % 3 === 0
			? {
					damping: {
						resistance: Math.sqrt(inductance / capacitance) * draw(0.5, 3),
						capacitance: capacitance * draw(1, 5)
					}
				}
			: {})
	};
	const source: SpiceSource =
		index < 18
			? { kind: NETWORKS[index % 4] ?? 'an-5uH', networks: index % 8 < 4 ? 2 : 1 }
			: { kind: 'impedance', resistance: draw(0.02, 2), inductanceMin: 0, inductanceMax: 1 };
	const sourceInductance = draw(1e-6, 1e-3);
	const frequency = Math.round(draw(3e4, 3e6));
	const worst = exactWorstCapacitance(
		filter,
		sourceImpedance(source, frequency, sourceInductance),
		frequency
	);
	const choice = {
		capacitance: Math.max(1e-11, Math.abs(worst)) * draw(0.1, 10),
		esr: parasitic(1e-3, 0.2),
		esl: parasitic(1e-9, 3e-8)
	};
	return { filter, choice, source, inductance: sourceInductance, frequency };
};

/** 33 µH, 4.7 µF, two 50 µH networks at 145 kHz with 194.2 nF. */
const base: Circuit = {
	filter: { inductor: { inductance: 33e-6 }, capacitor: { capacitance: 4.7e-6 } },
	choice: { capacitance: 194.2e-9 },
	source: { kind: 'amn-50uH-5ohm', networks: 2 },
	inductance: 0,
	frequency: 145e3
};
const circuits: Circuit[] = [base, ...Array.from({ length: 35 }, (_, index) => drawn(index))];
const described = circuits.map((circuit, index) => {
	const parts = [circuit.filter.damping && 'damped', circuit.choice?.esl && 'real parts'].filter(Boolean);
	const name =
		circuit.source.kind === 'impedance' ? 'mains' : `${circuit.source.networks} × ${circuit.source.kind}`;
	return { index, circuit, name: [name, ...parts].join(', ') };
});

describe('alternating current', () => {
	let solved: Solved[] = [];
	beforeAll(() => {
		solved = solveCircuits(circuits);
	});
	const setting = ({ source, inductance, frequency, choice }: Circuit) => ({
		sourceZ: sourceImpedance(source, frequency, inductance),
		choice: choice ?? { capacitance: 0 },
		shunt: choice ? reciprocal(capacitorImpedance(choice, frequency)) : { re: 0, im: 0 }
	});

	it.each(described)('$index $name: gain to 0.01 dB', ({ index, circuit }) => {
		const { sourceZ, choice } = setting(circuit);
		const { bare, line } = solved[index] as Solved;
		const seen = 20 * Math.log10(magnitude(divide(bare, line)));
		expect(Math.abs(benefitAt(circuit.filter, sourceZ, choice, circuit.frequency) - seen)).toBeLessThan(0.01);
	});

	it.each(described)('$index $name: line voltage and output impedance', ({ index, circuit }) => {
		const { sourceZ, shunt } = setting(circuit);
		const { line, output } = solved[index] as Solved;
		const of = [circuit.filter, shunt, sourceZ, circuit.frequency] as const;
		expect(magnitude(transferImpedance(...of)) / magnitude(line)).toBeCloseTo(1, 6);
		expect(magnitude(outputImpedance(...of)) / magnitude(output)).toBeCloseTo(1, 6);
	});

	it.each(described)('$index $name: current in Cx', ({ index, circuit }) => {
		const { sourceZ, choice } = setting(circuit);
		const { ripple } = solved[index] as Solved;
		const share = capacitorCurrent(circuit.filter, sourceZ, choice, circuit.frequency);
		expect(share / magnitude(ripple)).toBeCloseTo(1, 6);
	});

	it('would notice a part that is one per cent off', () => {
		const off = { ...base, choice: { capacitance: 194.2e-9 * 1.01 } };
		const { sourceZ, choice } = setting(off);
		const { bare, line } = solved[0] as Solved;
		const seen = 20 * Math.log10(magnitude(divide(bare, line)));
		expect(Math.abs(benefitAt(off.filter, sourceZ, choice, off.frequency) - seen)).toBeGreaterThan(0.01);
	});
});

const plain: Filter = base.filter;
const mains = { voltage: 325.27, inductance: 100e-6, resistance: 0.4 };
const steps: (SwitchOn & { readonly name: string })[] = [
	{
		name: 'Cx alone, ringing',
		...mains,
		choice: { capacitance: 470e-9 },
		filter: null,
		stop: 1e-4,
		step: 2e-8
	},
	{
		name: 'Cx alone, creeping',
		voltage: 28,
		inductance: 2e-6,
		resistance: 4,
		choice: { capacitance: 10e-6 },
		filter: null,
		stop: 4.5e-4,
		step: 2e-8
	},
	{ name: 'with C', ...mains, choice: { capacitance: 470e-9 }, filter: plain, stop: 4e-4, step: 2e-8 },
	{
		name: 'with C, large Cx',
		...mains,
		choice: { capacitance: 10e-6 },
		filter: plain,
		stop: 6e-4,
		step: 3e-8
	},
	{
		name: 'with C, damped',
		...mains,
		choice: { capacitance: 1e-6 },
		filter: { ...plain, damping: { resistance: 5, capacitance: 10e-6 } },
		stop: 6e-4,
		step: 3e-8
	},
	{
		name: 'with C, winding and series resistance',
		...mains,
		inductance: 50e-6,
		choice: { capacitance: 330e-9, esr: 0.05 },
		filter: {
			inductor: { inductance: 220e-6, resistance: 0.3 },
			capacitor: { capacitance: 2.2e-6, esr: 0.1 }
		},
		stop: 5e-4,
		step: 2e-8
	},
	{
		name: 'direct current bus',
		voltage: 32,
		inductance: 2e-6,
		resistance: 0.1,
		choice: { capacitance: 5.6e-6 },
		filter: { inductor: { inductance: 0.68e-6 }, capacitor: { capacitance: 33e-6 } },
		stop: 2e-4,
		step: 8e-9
	}
];

describe('switching on', () => {
	it.each(steps)('$name: peaks to 0.1 %', (of) => {
		const seen = solveSwitchOn(of);
		expect(Math.abs(peakSourceCurrent(of, of.choice, of.filter) / seen.current - 1)).toBeLessThan(1e-3);
		expect(Math.abs(peakCapacitorVoltage(of, of.choice, of.filter) / seen.voltage - 1)).toBeLessThan(1e-3);
	});

	it('integrates the square of the current of Cx alone', () => {
		const of = {
			...mains,
			resistance: 0.5,
			choice: { capacitance: 1e-6 },
			filter: null,
			stop: 4e-3,
			step: 2e-7
		};
		expect(jouleIntegral(of, 1e-6) / solveSwitchOn(of).joule).toBeCloseTo(1, 3);
	});
});

describe('a load of constant power', () => {
	// n = 2, damped for L alone; source 0.1 Ω and 100 µH; Cx = C/5. Threshold by eigenvalues: 9.242 Ω.
	const damping = { resistance: 2.418897156926735, capacitance: 9.4e-6 };
	const circuit: Circuit = {
		filter: { ...plain, damping },
		choice: { capacitance: 0.94e-6 },
		source: { kind: 'impedance', resistance: 0.1, inductanceMin: 100e-6, inductanceMax: 100e-6 },
		inductance: 100e-6,
		frequency: 1
	};

	it('lets an oscillation decay above the threshold and grow below it', () => {
		expect(growth(circuit, 10.5)).toBeLessThan(0.5);
		expect(growth(circuit, 8.5)).toBeGreaterThan(2);
	});

	it('is stable wherever it stays above the peak of the output impedance', () => {
		const peak = outputPeak(circuit.filter, circuit.choice, circuit.source, { from: 10, to: 145e3 });
		expect(peak.impedance).toBeCloseTo(9.502, 2);
		expect(growth(circuit, peak.impedance)).toBeLessThan(1);
	});
});
