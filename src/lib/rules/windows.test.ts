import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { leavesNominal, windowsOf, type ClosingBand } from './windows';

const ten = { toleranceMinus: 0.1, tolerancePlus: 0.1 } as const;
const exact = { toleranceMinus: 0, tolerancePlus: 0 } as const;

const band = (from: number, to: number, rule = 'r'): ClosingBand => ({ from, to, rule });

describe('windows', () => {
	it('keeps the tolerance of the choice inside, and names the rule at each edge', () => {
		const [window] = windowsOf([band(0, 252e-9, 'low'), band(396e-9, Infinity, 'high')], ten);
		expect(window).toMatchObject({
			from: 252e-9,
			to: 396e-9,
			limitedBy: { from: 'low', to: 'high' },
			nominalEmpty: false,
			degenerate: false
		});
		expect(window?.nominalFrom).toBeCloseTo(280e-9, 18);
		expect(window?.nominalTo).toBeCloseTo(360e-9, 18);
		expect(window?.target).toBeCloseTo(Math.sqrt(280e-9 * 360e-9), 18);
		expect(window?.widthDecades).toBeCloseTo(Math.log10(396 / 252), 12);
	});

	// At ±20 % the ends of the interval stand 1.5 apart, so a window of that ratio has one nominal value.
	it.each([
		[1.5, false],
		[1.5 * (1 - 1e-13), false],
		[1.5 * (1 - 1e-11), true]
	])('of ratio %f is empty at ±20 %%: %s', (ratio, empty) => {
		const twenty = { toleranceMinus: 0.2, tolerancePlus: 0.2 };
		const [window] = windowsOf([band(0, 1e-7), band(ratio * 1e-7, Infinity)], twenty);
		expect(window?.nominalEmpty).toBe(empty);
	});

	it('leaves an open end without nominal edge, target and width', () => {
		const open = { nominalTo: null, target: null, widthDecades: null, nominalEmpty: false };
		expect(windowsOf([band(0, 1e-7)], ten)).toMatchObject([{ to: Infinity, ...open }]);
		expect(windowsOf([], ten)).toMatchObject([{ from: 0, nominalFrom: null, ...open }]);
	});

	it('shows the point between bands that touch, which a tolerance empties', () => {
		const touching = [band(0, 8e-9), band(8e-9, Infinity)];
		expect(windowsOf(touching, exact)).toMatchObject([
			{ from: 8e-9, to: 8e-9, degenerate: true, nominalEmpty: false }
		]);
		expect(windowsOf(touching, ten)).toMatchObject([{ degenerate: true, nominalEmpty: true }]);
		expect(leavesNominal(touching, ten)).toBe(false);
	});

	const edge = fc.double({ min: -12, max: -1, noNaN: true }).map((exponent) => 10 ** exponent);
	const anyBand = fc.tuple(edge, edge).map(([a, b]) => band(Math.min(a, b), Math.max(a, b)));

	it('are, with the bands, the whole axis, and lie outside every band', () => {
		fc.assert(
			fc.property(fc.array(anyBand, { maxLength: 8 }), edge, (bands, value) => {
				const inBand = bands.some(({ from, to }) => from < value && value < to);
				const inWindow = windowsOf(bands, ten).some(({ from, to }) => from <= value && value <= to);
				const onEdge = bands.some(({ from, to }) =>
					[from, to].some((end) => Math.abs(end / value - 1) < 1e-9)
				);
				expect(onEdge || inBand !== inWindow).toBe(true);
			})
		);
	});

	it('hold the whole tolerance interval of every nominal value', () => {
		fc.assert(
			fc.property(
				fc.array(anyBand, { maxLength: 8 }),
				fc.double({ min: 0, max: 1, noNaN: true }),
				(bands, share) => {
					for (const { from, to, nominalFrom, nominalTo, nominalEmpty } of windowsOf(bands, ten)) {
						if (nominalFrom === null || nominalTo === null || nominalEmpty) continue;
						const nominal = nominalFrom * (nominalTo / nominalFrom) ** share;
						expect(nominal * 0.9).toBeGreaterThanOrEqual(from * (1 - 1e-12));
						expect(nominal * 1.1).toBeLessThanOrEqual(to * (1 + 1e-12));
					}
				}
			)
		);
	});
});
