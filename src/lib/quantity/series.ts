/** Preferred values E3 to E192 of IEC 60063. */

/** The series, coarse to fine. */
export const SERIES_NAMES = ['E3', 'E6', 'E12', 'E24', 'E48', 'E96', 'E192'] as const;

export type SeriesName = (typeof SERIES_NAMES)[number];

/** E3 to E24 are older than the formula and depart from it in eight places, so they are a list [tenths]. */
const E24 = [10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91];

const everyNth = (step: number): number[] => E24.filter((_, index) => index % step === 0);

/** round(100 · 10^(k/m)) but for 9.20 of E192, where the formula gives 9.19 [hundredths]. */
const byFormula = (size: number): number[] =>
	Array.from({ length: size }, (_, k) => {
		const rounded = Math.round(100 * 10 ** (k / size));
		return rounded === 919 ? 920 : rounded;
	});

interface Steps {
	readonly whole: readonly number[];
	/** Decimal places that make the whole numbers mantissas. */
	readonly places: number;
}

const STEPS: Readonly<Record<SeriesName, Steps>> = {
	E3: { whole: everyNth(8), places: 1 },
	E6: { whole: everyNth(4), places: 1 },
	E12: { whole: everyNth(2), places: 1 },
	E24: { whole: E24, places: 1 },
	E48: { whole: byFormula(48), places: 2 },
	E96: { whole: byFormula(96), places: 2 },
	E192: { whole: byFormula(192), places: 2 }
};

/** A decimal string read as a whole is the nearest double to it; a product of two doubles need not be. */
const decimal = (whole: number, exponent: number): number => Number(`${String(whole)}e${String(exponent)}`);

const mantissas = (name: SeriesName): readonly number[] =>
	STEPS[name].whole.map((whole) => decimal(whole, -STEPS[name].places));

/** Mantissas 1 ≤ m < 10 of each series, rising. */
export const SERIES: Readonly<Record<SeriesName, readonly number[]>> = {
	E3: mantissas('E3'),
	E6: mantissas('E6'),
	E12: mantissas('E12'),
	E24: mantissas('E24'),
	E48: mantissas('E48'),
	E96: mantissas('E96'),
	E192: mantissas('E192')
};

/** Edges that were computed may miss a preferred value by the last few bits. */
const SAME = 1e-12;

const assertPositive = (value: number, name: string): void => {
	if (!(value > 0) || !Number.isFinite(value)) {
		throw new RangeError(`${name} must be > 0 and finite, got ${String(value)}`);
	}
};

/** Values of a series are counted along the axis: index 0 is 1.0, index `length` is 10. */
const valueAt = (series: SeriesName, index: number): number => {
	const { whole, places } = STEPS[series];
	const decade = Math.floor(index / whole.length);
	return decimal(whole[index - decade * whole.length] ?? NaN, decade - places);
};

/** Index of the largest value that is at most `value`, within the tolerance for ties. */
const indexAtMost = (series: SeriesName, value: number): number => {
	let index = Math.floor(Math.log10(value) * STEPS[series].whole.length) - 2;
	while (valueAt(series, index + 1) <= value * (1 + SAME)) index += 1;
	return index;
};

/**
 * Lists the preferred values of a series between two values, both included.
 * @param series name of the series
 * @param from lower end, > 0 [any unit]
 * @param to upper end, finite [as `from`]
 * @returns rising values, each the nearest double to its decimal; empty where `to` < `from`
 * @throws RangeError when an end is not positive and finite
 * @example preferredValues('E6', 2.807e-7, 3.6e-7) // [3.3e-7]
 * Source: IEC 60063, series E3 to E192.
 */
export function preferredValues(series: SeriesName, from: number, to: number): number[] {
	assertPositive(from, 'from');
	assertPositive(to, 'to');
	const values: number[] = [];
	for (let index = indexAtMost(series, from); valueAt(series, index) <= to * (1 + SAME); index += 1) {
		const value = valueAt(series, index);
		if (value >= from * (1 - SAME)) values.push(value);
	}
	return values;
}

/**
 * Finds the preferred value whose ratio to a value is nearest to one; of two equally near, the smaller.
 * @param value value, > 0 [any unit]
 * @param series name of the series
 * @returns the preferred value [as `value`]
 * @throws RangeError when the value is not positive and finite
 * @example nearestPreferred(3.18e-7, 'E6') // 3.3e-7
 * Source: IEC 60063; nearness by ratio is common practice, because the series are geometric.
 */
export function nearestPreferred(value: number, series: SeriesName): number {
	assertPositive(value, 'value');
	const index = indexAtMost(series, value);
	const below = valueAt(series, index);
	const above = valueAt(series, index + 1);
	return above / value < (value / below) * (1 - SAME) ? above : below;
}

/**
 * Goes a number of preferred values up or down from any start; a start between two values reaches
 * its neighbour with the first step.
 * @param value start, > 0 [any unit]
 * @param series name of the series
 * @param steps whole number of values, negative for down; 0 leaves the value as it is
 * @returns the value arrived at [as `value`]
 * @throws RangeError when the value is not positive and finite, or the steps are not whole
 * @example stepPreferred(3.5e-7, 'E12', 1) // 3.9e-7
 * Source: IEC 60063.
 */
export function stepPreferred(value: number, series: SeriesName, steps: number): number {
	assertPositive(value, 'value');
	if (!Number.isSafeInteger(steps)) throw new RangeError(`steps must be whole, got ${String(steps)}`);
	if (steps === 0) return value;
	const index = indexAtMost(series, value);
	const onValue = valueAt(series, index) >= value * (1 - SAME);
	return valueAt(series, index + steps + (steps < 0 && !onValue ? 1 : 0));
}

/**
 * Names the coarsest series that contains a value.
 * @param value value [any unit]
 * @returns the name, or null where no series contains it
 * @example coarsestSeries(4.7e-6) // 'E3'
 * Source: IEC 60063; E48 and finer do not contain all of E24.
 */
export function coarsestSeries(value: number): SeriesName | null {
	if (!(value > 0) || !Number.isFinite(value)) return null;
	const mantissa = Number(value.toExponential(11).split('e')[0]);
	return SERIES_NAMES.find((name) => SERIES[name].includes(mantissa)) ?? null;
}
