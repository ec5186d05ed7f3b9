/** Netlists made from the product's own filter, capacitor and source, solved by ngspice in batch mode. */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Complex } from '$lib/network/complex';
import type { CapacitorPart, Filter } from '$lib/network/filter';
import type { ImpedanceModel, NetworkKind, NetworkModel } from '$lib/network/source';

/** A source that a netlist can be made of. */
export type SpiceSource = NetworkModel | ImpedanceModel;

export interface Circuit {
	readonly filter: Filter;
	readonly choice: CapacitorPart | null;
	readonly source: SpiceSource;
	/** Ls of an `impedance` source [H]. */
	readonly inductance: number;
	/** [Hz] */
	readonly frequency: number;
}

/** Values per line as the standards draw them, written here a second time. */
const NETWORK: Record<NetworkKind, readonly [coil: string, resistor: string]> = {
	'amn-50uH-5ohm': ['50u', '5'],
	'amn-50uH': ['50u', '0'],
	'amn-5uH-1ohm': ['5u', '1'],
	'an-5uH': ['5u', '0']
};

/** Names every element apart, so that many circuits stand in one netlist. */
class Netlist {
	readonly lines: string[] = [];
	private count = 0;

	element(letter: 'R' | 'L' | 'C' | 'I' | 'V', nodes: readonly [string, string], value: string): string {
		this.count += 1;
		const name = `${letter}${this.count}`;
		this.lines.push(`${name} ${nodes.join(' ')} ${value}`);
		return name;
	}

	/** Elements in a chain from one node to another; those of value 0 are left out. */
	chain(from: string, to: string, elements: readonly (readonly ['R' | 'L' | 'C', number])[]): void {
		const present = elements.filter(([, value]) => value !== 0);
		let at = from;
		present.forEach(([letter, value], index) => {
			this.count += 1;
			const next = index === present.length - 1 ? to : `m${this.count}`;
			this.element(letter, [at, next], value.toExponential(15));
			at = next;
		});
	}

	capacitor(from: string, to: string, part: CapacitorPart): void {
		this.chain(from, to, [
			['R', part.esr ?? 0],
			['L', part.esl ?? 0],
			['C', part.capacitance]
		]);
	}

	/** The filter between nodes c and x. */
	filter(c: string, x: string, { inductor, capacitor, damping }: Filter): void {
		this.capacitor(c, '0', capacitor);
		if (damping)
			this.chain(c, '0', [
				['R', damping.resistance],
				['C', damping.capacitance]
			]);
		this.chain(c, x, [
			['R', inductor.resistance ?? 0],
			['L', inductor.inductance]
		]);
		if (inductor.parallelCapacitance) this.chain(c, x, [['C', inductor.parallelCapacitance]]);
	}

	source(x: string, source: SpiceSource, inductance: number): void {
		if (source.kind === 'impedance') {
			this.chain(x, '0', [
				['R', source.resistance],
				['L', inductance]
			]);
			return;
		}
		const [coil, resistor] = NETWORK[source.kind];
		const nodes = source.networks === 1 ? [x, '0'] : [x, `${x}m`, '0'];
		nodes.slice(1).forEach((to, index) => {
			const from = nodes[index] ?? x;
			this.element('R', [from, to], '50');
			if (resistor === '0') this.element('L', [from, to], coil);
			else {
				this.element('L', [from, `${from}r`], coil);
				this.element('R', [`${from}r`, to], resistor);
			}
		});
	}
}

const run = (title: string, lines: readonly string[], control: readonly string[]): string => {
	const directory = mkdtempSync(join(tmpdir(), 'herringbone-spice-'));
	try {
		const file = join(directory, 'circuit.cir');
		const text = [
			`* ${title}`,
			...lines,
			'.control',
			'set numdgt=12',
			...control,
			'quit 0',
			'.endc',
			'.end',
			''
		];
		writeFileSync(file, text.join('\n'));
		const { stdout, stderr, status, error } = spawnSync('ngspice', ['-b', file], {
			encoding: 'utf8',
			timeout: 60_000
		});
		if (error) throw error;
		if (status !== 0 || /error|singular/i.test(stderr)) throw new Error(`ngspice: ${stderr}\n${stdout}`);
		return stdout;
	} finally {
		rmSync(directory, { recursive: true });
	}
};

/** Per ampere of noise current: voltage at x without and with Cx, at c with it, and the current in Cx. */
export interface Solved {
	readonly bare: Complex;
	readonly line: Complex;
	readonly output: Complex;
	readonly ripple: Complex;
}

/**
 * Solves circuits at their own frequencies, all in one process.
 * @param circuits n circuits
 * @returns n solutions [V/A], [A/A]
 */
export function solveCircuits(circuits: readonly Circuit[]): Solved[] {
	const netlist = new Netlist();
	const control: string[] = [];
	circuits.forEach(({ filter, choice, source, inductance, frequency }, index) => {
		for (const copy of ['a', 'b']) {
			const [c, x] = [`c${copy}${index}`, `x${copy}${index}`];
			netlist.element('I', ['0', c], 'DC 0 AC 1');
			netlist.filter(c, x, filter);
			netlist.source(x, source, inductance);
			if (copy === 'a') continue;
			const meter = netlist.element('V', [x, `y${index}`], 'DC 0');
			if (choice) netlist.capacitor(`y${index}`, '0', choice);
			else netlist.element('R', [`y${index}`, '0'], '1e30');
			control.push(`ac lin 1 ${frequency} ${frequency}`);
			control.push(`print v(xa${index}) v(xb${index}) v(cb${index}) i(${meter})`);
		}
	});
	const output = run('alternating current', netlist.lines, control);
	const numbers = [...output.matchAll(/^[vi]\([^)]*\) = ([-+.\de]+),\s*([-+.\de]+)/gim)].map(
		([, re, im]): Complex => ({ re: Number(re), im: Number(im) })
	);
	if (numbers.length !== 4 * circuits.length) throw new Error(`unexpected output of ngspice: ${output}`);
	const at = (index: number): Complex => numbers[index] ?? { re: NaN, im: NaN };
	return circuits.map((_, index) => ({
		bare: at(4 * index),
		line: at(4 * index + 1),
		output: at(4 * index + 2),
		ripple: at(4 * index + 3)
	}));
}

/** A step into the discharged network. */
export interface SwitchOn {
	readonly voltage: number;
	readonly inductance: number;
	readonly resistance: number;
	readonly choice: CapacitorPart;
	readonly filter: Filter | null;
	/** Length of the run and longest step [s]. */
	readonly stop: number;
	readonly step: number;
}

const measured = (output: string, name: string): number => {
	const found = new RegExp(`^${name}\\s*=\\s*([-+.\\de]+)`, 'im').exec(output);
	if (!found) throw new Error(`ngspice did not measure ${name}: ${output}`);
	return Number(found[1]);
};

/**
 * Peaks of source current [A] and voltage across Cx [V], and ∫i²dt [A²s], by small time steps.
 * @param of the step and its network
 */
export function solveSwitchOn(of: SwitchOn): { current: number; voltage: number; joule: number } {
	const netlist = new Netlist();
	const supply = netlist.element('V', ['s', '0'], `DC ${of.voltage}`);
	netlist.chain('s', 'x', [
		['R', of.resistance],
		['L', of.inductance]
	]);
	netlist.capacitor('x', '0', of.choice);
	if (of.filter) netlist.filter('c', 'x', of.filter);
	const output = run(
		'switching on',
		[...netlist.lines, '.options reltol=1e-6 abstol=1e-9 vntol=1e-6'],
		[
			`tran ${of.step} ${of.stop} 0 ${of.step} uic`,
			`let current = abs(i(${supply}))`,
			'let square = current*current',
			'let voltage = abs(v(x))',
			'meas tran ipeak max current',
			'meas tran vpeak max voltage',
			'meas tran joule integ square'
		]
	);
	return {
		current: measured(output, 'ipeak'),
		voltage: measured(output, 'vpeak'),
		joule: measured(output, 'joule')
	};
}

/**
 * How an oscillation at the converter's terminals goes on with a constant-power load, a negative resistance.
 * @param circuit the network; its frequency is not used
 * @param negative magnitude of the negative resistance [Ω]
 * @returns amplitude late over amplitude early: above 1 it grows
 */
export function growth(circuit: Circuit, negative: number): number {
	const netlist = new Netlist();
	netlist.filter('c', 'x', circuit.filter);
	netlist.source('x', circuit.source, circuit.inductance);
	if (circuit.choice) netlist.capacitor('x', '0', circuit.choice);
	netlist.element('R', ['c', '0'], String(-negative));
	const output = run(
		'negative resistance',
		[...netlist.lines, 'I0 0 c PULSE(0 1 0 1u 1u 20u 1)'],
		[
			'tran 1u 12m 0 1u uic',
			'let size = abs(v(c))',
			'meas tran early max size from=1m to=2m',
			'meas tran late max size from=11m to=12m'
		]
	);
	return measured(output, 'late') / measured(output, 'early');
}
