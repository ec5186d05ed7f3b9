import { describe, expect, it } from 'vitest';
import type { Band, Finding, Window } from '$lib/rules/finding';
import { gainText, limitText, marginText, nominalText, windowText } from './reading';

const plain = (text: string): string => text.replaceAll('\u00a0', ' ');
const finding = (bands: readonly Band[], state: Finding['state'] = 'evaluated'): Finding => ({
	rule: 'r',
	kind: 'capacitor-share',
	class: 'design',
	state,
	reason: null,
	bands,
	formula: null,
	rationale: '',
	assumptions: [],
	cautions: []
});
const band = (from: number, to: number): Band => ({ from, to, cause: '' });
const window = (change: Partial<Window>): Window => ({
	from: 2.5263e-7,
	to: 3.9604e-7,
	limitedBy: { from: null, to: null },
	nominalFrom: 2.807e-7,
	nominalTo: 3.6004e-7,
	nominalEmpty: false,
	target: null,
	widthDecades: null,
	degenerate: false,
	...change
});

describe('rows of rules', () => {
	it.each([
		[[band(3.9604e-7, Infinity)], '≤ 396 nF'],
		[[band(0, 2.5263e-7)], '≥ 253 nF'],
		[[band(4.6449e-9, 9.7851e-8)], 'not 4.64–97.9 nF'],
		[[band(2.2e-7, 3.6e-6)], 'not 220 nF – 3.60 µF'],
		[[band(1e-9, 2e-9), band(4e-9, 8e-9)], '2 bands: not 1.00–8.00 nF'],
		[[], 'forbids nothing'],
		[[band(0, Infinity)], 'no value']
	])('%j reads %s', (bands, expected) => {
		expect(plain(limitText(finding(bands)))).toBe(expected);
	});

	it('says so where a rule has no answer', () => {
		expect(limitText(finding([], 'not-evaluated'))).toBe('not evaluated');
		expect(limitText(finding([], 'not-applicable'))).toBe('does not apply');
	});
});

describe('windows', () => {
	it.each([
		[{}, '253–396 nF', '281–360 nF'],
		[{ to: Infinity, nominalTo: null }, 'from 253 nF', 'from 281 nF'],
		[{ from: 0, nominalFrom: null }, 'up to 396 nF', 'up to 360 nF'],
		[{ nominalEmpty: true }, '253–396 nF', 'none: narrower than the tolerance']
	])('%j', (change, whole, nominal) => {
		expect(plain(windowText(window(change)))).toBe(whole);
		expect(plain(nominalText(window(change)))).toBe(nominal);
	});
});

describe('signs', () => {
	it.each([
		[21.84, '+21.8'],
		[-13.71, '\u221213.7'],
		[0, '0.0']
	])('gain %f is %s', (gain, expected) => {
		expect(gainText(gain)).toBe(expected);
	});
	it.each([
		[0.1756, '+17.6\u00a0%'],
		[-0.083, '\u22128.3\u00a0%']
	])('margin %f is %s', (margin, expected) => {
		expect(marginText(margin)).toBe(expected);
	});
});
