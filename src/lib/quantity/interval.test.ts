import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { closedComplement, insideOpen, relativelyEqual, uniteOpen, type Interval } from './interval';

interface Named extends Interval {
	readonly name: string;
}

const band = (name: string, from: number, to: number): Named => ({ name, from, to });

const written = (bands: readonly Named[]): (string | null)[][] =>
	closedComplement(bands).map(({ from, to, fromBand, toBand, degenerate }) => [
		`${String(from)}…${String(to)}${degenerate ? ' point' : ''}`,
		fromBand?.name ?? null,
		toBand?.name ?? null
	]);

describe('closedComplement', () => {
	it.each<[string, Named[], (string | null)[][]]>([
		['nothing is forbidden', [], [['0…Infinity', null, null]]],
		['everything is forbidden', [band('a', 0, Infinity)], []],
		['two rules conflict', [band('a', 0, 241), band('b', 94, Infinity)], []],
		['three rules conflict', [band('a', 0, 100), band('b', 90, 200), band('c', 190, Infinity)], []],
		[
			'two bands touch at 8',
			[band('a', 1, 5), band('b', 3, 8), band('c', 8, 9)],
			[
				['0…1', null, 'a'],
				['8…8 point', 'b', 'c'],
				['9…Infinity', 'c', null]
			]
		],
		[
			'they touch but a third covers the point',
			[band('a', 0, 8), band('b', 8, Infinity), band('c', 7, 9)],
			[]
		],
		[
			'they touch within rounding, from either side',
			[band('a', 0, 8), band('b', 8 * (1 - 1e-13), 20), band('c', 20 * (1 + 1e-13), Infinity)],
			[
				['8…8 point', 'a', 'b'],
				['20…20 point', 'b', 'c']
			]
		],
		[
			'the order does not matter',
			[band('c', 50, Infinity), band('a', 0, 10), band('b', 20, 30)],
			[
				['10…20', 'a', 'b'],
				['30…50', 'b', 'c']
			]
		],
		[
			'equal edges keep the band that came first',
			[band('late', 0, 5), band('a', 10, 20), band('b', 10, 20), band('first', 0, 5 * (1 + 1e-14))],
			[
				['5…10', 'late', 'a'],
				['20…Infinity', 'a', null]
			]
		],
		[
			'a band without width forbids nothing',
			[band('a', 5, 5), band('b', 9, 3)],
			[['0…Infinity', null, null]]
		],
		['a band from 0', [band('a', 0, 5)], [['5…Infinity', 'a', null]]],
		['a band without upper end', [band('a', 5, Infinity)], [['0…5', null, 'a']]]
	])('where %s', (_, bands, expected) => {
		expect(written(bands)).toEqual(expected);
	});

	it.each([band('a', -1, 2), band('a', NaN, 2), band('a', 1, NaN)])('refuses %j', (bad) => {
		expect(() => closedComplement([bad])).toThrow(RangeError);
	});
});

describe('uniteOpen', () => {
	it('keeps which band set each edge', () => {
		const [a, b, c] = [band('a', 2, 4), band('b', 1, 3), band('c', 3.5, 9)];
		expect(uniteOpen([a, b, c])).toEqual([{ from: 1, to: 9, fromBand: b, toBand: c }]);
	});
});

describe('insideOpen', () => {
	it.each([
		[1, 8, 5, true],
		[1, 8, 8, false],
		[1, 8, 1, false],
		[1, 8, 8 * (1 - 1e-13), false],
		[1, 8, 8 * (1 - 1e-11), true],
		[0, Infinity, 1e-15, true],
		[0, 8, 9, false]
	])('(%d, %d) and %d', (from, to, value, expected) => {
		expect(insideOpen({ from, to }, value)).toBe(expected);
	});
});

describe('relativelyEqual', () => {
	it.each([
		[1, 1 + 1e-13, true],
		[1, 1 + 1e-11, false],
		[0, 0, true],
		[0, 1e-300, false],
		[Infinity, Infinity, true],
		[Infinity, 1, false]
	])('%d and %d', (a, b, expected) => {
		expect(relativelyEqual(a, b)).toBe(expected);
	});
});

describe('bands and windows', () => {
	// Few distinct ends, so that bands often touch.
	const end = fc.oneof(fc.constant(0), fc.integer({ min: 1, max: 20 }), fc.constant(Infinity));
	const bands = fc.array(
		fc.tuple(end, end).map(([from, to]) => ({ from, to })),
		{ maxLength: 12 }
	);
	const finite = bands.filter((list) => list.every(({ from }) => Number.isFinite(from)));
	/** Every end and every middle between ends. */
	const probes = Array.from({ length: 42 }, (_, index) => (index + 1) / 2);

	it('are the whole axis and do not overlap', () => {
		fc.assert(
			fc.property(finite, (list) => {
				const windows = closedComplement(list);
				for (const probe of probes) {
					const forbidden = list.some((one) => insideOpen(one, probe));
					const allowed = windows.filter(({ from, to }) => from <= probe && probe <= to);
					expect(allowed.length).toBe(forbidden ? 0 : 1);
				}
			})
		);
	});

	it('meet edge to edge, in rising order', () => {
		fc.assert(
			fc.property(finite, (list) => {
				const pieces = [
					...uniteOpen(list).map(({ from, to }) => [from, to]),
					...closedComplement(list).map(({ from, to }) => [from, to])
				].sort(([a = 0, b = 0], [c = 0, d = 0]) => a - c || b - d);
				expect(pieces[0]?.[0]).toBe(0);
				expect(pieces.at(-1)?.[1]).toBe(Infinity);
				pieces.slice(1).forEach(([from], index) => {
					expect(from).toBe(pieces[index]?.[1]);
				});
			})
		);
	});

	it('scale with the axis', () => {
		fc.assert(
			fc.property(finite, fc.integer({ min: -30, max: 30 }), (list, power) => {
				const scale = ({ from, to }: Interval): Interval => ({
					from: from * 2 ** power,
					to: to * 2 ** power
				});
				const plain = ({ from, to }: Interval): Interval => ({ from, to });
				expect(closedComplement(list.map(scale)).map(plain)).toEqual(closedComplement(list).map(scale));
			})
		);
	});
});
