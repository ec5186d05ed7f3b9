import { describe, expect, it } from 'vitest';
import { parseDesign, parseDesignText } from '$lib/design/parse';
import { chargerAuxiliary } from '$lib/design/examples';
import { curveOf, decode, doubtWords, hexOf, isMeasured, labelOf, readMeasured } from './measured';
import { removalWords, usesOf, withCurve, withoutCurve } from './curve-uses';
import { listAt, textAt, writeAt, type Tree } from './tree';
import { treeOf } from './worksheet.svelte';

const file = (name: string, text = '') => ({ name, text, sha256: 'a'.repeat(64), date: '2026-03-02' });
const points = (count: number) =>
	Array.from({ length: count }, (_, n) => {
		const frequency = 1e3 * 1e5 ** (n / (count - 1));
		const w = 2 * Math.PI * frequency;
		return { frequency, impedance: { re: 0.012, im: w * 18e-9 - 1 / (w * 330e-9) } };
	});
const curve = curveOf(file('x2.s2p'), points(50), 'shunt-through').curve as unknown as Record<string, Tree>;

describe('measured files', () => {
	it.each([
		['a.s1p', true],
		['A.S2P', true],
		['a.ts', true],
		['a.csv', true],
		['a.txt', true],
		['a.s3p', false],
		['a.json', false]
	])('%s is one: %s', (name, expected) => {
		expect(isMeasured(name)).toBe(expected);
	});
	it('reads UTF-8, and Latin-1 where the bytes are none', () => {
		expect(decode(new TextEncoder().encode('Ω °'))).toBe('Ω °');
		expect(decode(Uint8Array.of(0x33, 0xb0))).toBe('3°');
		expect(hexOf(Uint8Array.of(0, 255).buffer)).toBe('00ff');
	});
	it('refuses a single point, and gives the line of what it cannot read', () => {
		expect(readMeasured('# Hz S RI R 50\n1 0 0\n', 'a.s1p', 'reflection')).toMatchObject({ ok: false });
		expect(readMeasured('f (Hz),R (ohm),X (ohm)\n1,1,1\n2,x,1', 'a.csv', 'reflection')).toMatchObject({
			ok: false,
			line: 3
		});
	});
	it('counts doubtful points by reason', () => {
		const few = [
			{ frequency: 1e3, impedance: { re: 1e-4, im: 0 } },
			{ frequency: 2e3, impedance: { re: -1, im: 5 } }
		];
		expect(doubtWords(few, 'shunt-through', -100)).toEqual([
			'1 of 2 points lie within 6 dB of the fixture’s floor',
			'1 of 2 points have a negative resistance'
		]);
	});
	it('thins what is long, says so, and the design file takes it', () => {
		const { curve, said } = curveOf(file('long.s2p'), points(5000), 'shunt-through');
		expect(curve.frequency_Hz).toHaveLength(1000);
		expect(said).toMatch(/^1000 of 5000 points are kept/);
		const parsed = parseDesign({ ...chargerAuxiliary, curves: [{ id: 'c', ...curve }] });
		expect(parsed.ok).toBe(true);
		expect(JSON.stringify(curve).length).toBeLessThan(50_000);
	});
	it('labels by name, fixture and day within 60 characters', () => {
		expect(labelOf(file('x2.s2p'), 'shunt-through')).toBe('x2, shunt-through, 2026-03-02');
		expect(labelOf(file('x2.csv'), 'reflection')).toBe('x2, 2026-03-02');
		expect(labelOf(file(`${'n'.repeat(90)}.s2p`), 'shunt-through')).toHaveLength(60);
	});
});

describe('uses of a curve', () => {
	const start = treeOf(chargerAuxiliary);
	const design = (tree: Tree) => parseDesignText((tree as { design: unknown }).design);

	it.each([
		['inductor', ['L']],
		['capacitor', ['C']],
		['choice', ['Cx']],
		['source', ['source “Measured source”']],
		['none', []]
	] as const)('stands for %s', (use, expected) => {
		const tree = withCurve(start, curve, use);
		expect(usesOf(tree, 'curve')).toEqual(expected);
		expect(design(tree).ok).toBe(true);
		expect(usesOf(withoutCurve(tree, 0), 'curve')).toEqual([]);
		expect(design(withoutCurve(tree, 0)).ok).toBe(true);
	});
	it('lets go of every reference at once and keeps the source for its rules', () => {
		const twice = withCurve(withCurve(start, curve, 'choice'), curve, 'none');
		const tree = writeAt(twice, '/design/sources/0', {
			id: 'amn',
			label: 'Bus',
			kind: 'measured',
			curve: 'curve'
		});
		const left = withoutCurve(tree, 0);
		expect(listAt(left, '/design/curves').map((item) => textAt(item, '/id'))).toEqual(['curve-2']);
		expect(textAt(left, '/design/sources/0/id')).toBe('amn');
		expect(textAt(left, '/design/sources/0/kind')).toBe('amn-50uH-5ohm');
		expect(removalWords('X', usesOf(tree, 'curve'))).toContain('Cx, source “Bus”');
	});
});
