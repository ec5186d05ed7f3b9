/** scikit-rf from Debian's package python3-scikit-rf reads the same files, and gives the same impedances. */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
	add,
	divide,
	magnitude,
	multiply,
	phase,
	subtract,
	type Complex
} from '../../src/lib/network/complex';
import type { Fixture } from '../../src/lib/network/measurement';
import { readTouchstone } from '../../src/lib/network/touchstone';

type Format = 'RI' | 'MA' | 'DB';
type Kind = 'one' | 'shunt' | 'series' | 'unequal';
interface Case {
	readonly name: string;
	readonly text: string;
	/** What scikit-rf is given, where it does not know a keyword. */
	readonly plain: string;
	readonly kind: Kind;
}

const UNITS = { Hz: 1, kHz: 1e3, MHz: 1e6, GHz: 1e9 } as const;
const FORMATS: readonly Format[] = ['RI', 'MA', 'DB'];
const POINTS = 12;
const real = (re: number): Complex => ({ re, im: 0 });

/** 330 nF, 18 nH and 20 mΩ across the line; 33 µH and 80 mΩ in it. */
const part = (kind: Kind, f: number): Complex => {
	const w = 2 * Math.PI * f;
	if (kind === 'series') return { re: 0.08, im: w * 33e-6 };
	return { re: 0.02, im: w * 18e-9 - 1 / (w * 330e-9) };
};

/** S11, S21, S12, S22 of a part between ports of R; `unequal` takes S12 away from S21, so that their places show. */
const scattering = (kind: Kind, z: Complex, r: number): Complex[] => {
	if (kind === 'one') return [divide(subtract(z, real(r)), add(z, real(r)))];
	if (kind === 'series') {
		const whole = add(z, real(2 * r));
		const through = divide(real(2 * r), whole);
		return [divide(z, whole), through, through, divide(z, whole)];
	}
	const whole = add(multiply(real(2), z), real(r));
	const through = divide(multiply(real(2), z), whole);
	const back = divide(real(-r), whole);
	return [back, through, kind === 'unequal' ? multiply(through, real(0.5)) : through, back];
};

const written = (format: Format, { re, im }: Complex): string => {
	if (format === 'RI') return `${re} ${im}`;
	const size = magnitude({ re, im });
	const angle = (phase({ re, im }) * 180) / Math.PI;
	return `${format === 'DB' ? 20 * Math.log10(size) : size} ${angle}`;
};

const rowsOf = (kind: Kind, unit: keyof typeof UNITS, format: Format, r: number, swapped = false): string[] =>
	Array.from({ length: POINTS }, (_, n) => {
		const f = 1e4 * 1e4 ** (n / (POINTS - 1));
		const values = scattering(kind, part(kind, f), r);
		const order = swapped ? [0, 2, 1, 3] : [0, 1, 2, 3];
		const pairs = order.flatMap((index) => values[index] ?? []).map((value) => written(format, value));
		return `${f / UNITS[unit]} ${pairs.join(' ')}`;
	});

const version1: Case[] = (['one', 'shunt', 'series', 'unequal'] as const).flatMap((kind) =>
	(Object.keys(UNITS) as (keyof typeof UNITS)[]).flatMap((unit) =>
		FORMATS.flatMap((format) =>
			[50, 75].map((r): Case => {
				const head = ['! a part', `# ${unit} S ${format} R ${r}`];
				const noise = kind === 'shunt' && r === 50 ? [`${1e3 / UNITS[unit]} 1 0.2 10 0.3`] : [];
				const text = [...head, ...rowsOf(kind, unit, format, r), ...noise, ''].join('\r\n');
				return {
					name: `${kind}-${unit}-${format}-${r}.${kind === 'one' ? 's1p' : 's2p'}`,
					text,
					plain: text,
					kind
				};
			})
		)
	)
);

/** scikit-rf 0.15 knows no order keyword and takes the rows of a version 2 file as 11 21 12 22. */
const version2: Case[] = (['one', 'shunt', 'unequal'] as const).flatMap((kind) =>
	FORMATS.flatMap((format) =>
		['12_21', '21_12'].map((order): Case => {
			const file = (swapped: boolean, keyword: string[]): string =>
				[
					'[Version] 2.0',
					`# kHz S ${format} R 50`,
					`[Number of Ports] ${kind === 'one' ? 1 : 2}`,
					...keyword,
					`[Number of Frequencies] ${POINTS}`,
					'[Reference]',
					kind === 'one' ? '50' : '50 50',
					'[Network Data]',
					...rowsOf(kind, 'kHz', format, 50, swapped),
					'[End]',
					''
				].join('\n');
			return {
				name: `${kind}-${format}-${order}.ts`,
				text: file(order === '12_21', kind === 'one' ? [] : [`[Two-Port Data Order] ${order}`]),
				plain: file(false, []),
				kind
			};
		})
	)
);

const cases = [...version1, ...version2];
type Answer = Readonly<Record<string, readonly (readonly [number, number])[]>> & {
	readonly f: readonly number[];
};
let folder = '';
let answers: readonly Answer[] = [];

beforeAll(() => {
	folder = mkdtempSync(join(tmpdir(), 'herringbone-touchstone-'));
	const paths = cases.map(({ name, plain }) => {
		const path = join(folder, name);
		writeFileSync(path, plain);
		return path;
	});
	const script = join(import.meta.dirname, 'touchstone.py');
	const output = execFileSync('/usr/bin/python3', [script, ...paths], {
		encoding: 'utf8',
		maxBuffer: 1e8,
		stdio: ['ignore', 'pipe', 'ignore']
	});
	// Before its answer it may say that it does without matplotlib.
	answers = JSON.parse(output.trim().split('\n').at(-1) ?? '') as Answer[];
});
afterAll(() => {
	rmSync(folder, { recursive: true, force: true });
});

const fixturesOf = (kind: Kind): readonly Fixture[] =>
	kind === 'one' ? ['reflection'] : ['reflection', 'shunt-through', 'series-through'];

/** Greatest relative distance between what we read and what scikit-rf read. */
const distance = (text: string, name: string, fixture: Fixture, other: Answer, key: string): number => {
	const read = readTouchstone(text, name, fixture);
	if (!read.ok) throw new Error(`line ${read.line}: ${read.detail}`);
	expect(read.points).toHaveLength(POINTS);
	return Math.max(
		...read.points.flatMap(({ frequency, impedance }, n) => {
			const [re, im] = other[key]?.[n] ?? [NaN, NaN];
			const apart = magnitude(subtract(impedance, { re, im })) / magnitude(impedance);
			return [apart, Math.abs(frequency / (other.f[n] ?? NaN) - 1)];
		})
	);
};

describe('the Touchstone reader beside scikit-rf', () => {
	it.each(cases.map(({ name }, index) => [name, index] as const))('%s', (_, index) => {
		const { text, name, kind } = cases[index] ?? { text: '', name: '', kind: 'one' as const };
		const other = answers[index] ?? { f: [] };
		for (const fixture of fixturesOf(kind)) {
			// 1 − S21 loses digits where S21 is near 1.
			expect(distance(text, name, fixture, other, fixture)).toBeLessThan(1e-7);
		}
		if (kind === 'shunt') {
			expect(distance(text, name, 'shunt-through', other, 'shunt-chain')).toBeLessThan(1e-7);
		}
		if (kind === 'series') {
			expect(distance(text, name, 'series-through', other, 'series-chain')).toBeLessThan(1e-7);
		}
	});
});
