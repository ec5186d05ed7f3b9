import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Filter } from './filter';
import { jouleIntegral, peakCapacitorVoltage, peakSourceCurrent, type Step } from './transient';

const filter: Filter = { inductor: { inductance: 33e-6 }, capacitor: { capacitance: 4.7e-6 } };
const switchOn = (...of: Parameters<typeof peakSourceCurrent>) => ({
	current: peakSourceCurrent(...of),
	voltage: peakCapacitorVoltage(...of)
});
const mains: Step = { voltage: 325.27, inductance: 100e-6, resistance: 0.4 };

/** Closed form of one series circuit: V/Z0·exp(−ζ·acos ζ/√(1 − ζ²)), acosh above ζ = 1, 1/e at ζ = 1. */
const closed = ({ voltage, inductance, resistance }: Step, capacitance: number): number => {
	const zeta = (resistance / 2) * Math.sqrt(capacitance / inductance);
	const lossless = voltage / Math.sqrt(inductance / capacitance);
	if (zeta === 1) return lossless / Math.E;
	const arc =
		zeta < 1 ? Math.acos(zeta) / Math.sqrt(1 - zeta ** 2) : Math.acosh(zeta) / Math.sqrt(zeta ** 2 - 1);
	return lossless * Math.exp(-zeta * arc);
};

describe('the line-side capacitor alone', () => {
	it.each([
		// V, Ls, Rs, Cx, A, V on Cx, source
		[325.27, 100e-6, 0.5, 1e-6, 31.2936, 625.9634, 'ngspice 39.3'],
		[28, 2e-6, 4, 10e-6, 6.699715, 28, 'ngspice 39.3'],
		[325.27, 100e-6, 0.4, 470e-9, 21.8283, 636.825, 'closed form'],
		[100, 1e-3, 20, 10e-6, 3.6787944, 100, 'closed form, ζ = 1'],
		[100, 1e-3, 0, 10e-6, 10, 200, 'lossless'],
		[100, 0, 20, 10e-6, 5, 100, 'no inductance']
	])('%f V, %f H, %f Ω, %f F: %f A, %f V', (voltage, inductance, resistance, capacitance, current, on) => {
		const peaks = switchOn({ voltage, inductance, resistance }, { capacitance }, null);
		expect(peaks.current / current).toBeCloseTo(1, 4);
		expect(peaks.voltage / on).toBeCloseTo(1, 4);
	});

	it('follows the closed form from lossless to creeping', () => {
		const logs = (from: number, to: number) =>
			fc.double({ min: Math.log(from), max: Math.log(to), noNaN: true }).map(Math.exp);
		fc.assert(
			fc.property(
				logs(1e-7, 1e-2),
				logs(1e-3, 1e2),
				logs(1e-9, 1e-3),
				(inductance, resistance, capacitance) => {
					const step = { voltage: 100, inductance, resistance };
					const { current } = switchOn(step, { capacitance }, null);
					expect(current / closed(step, capacitance)).toBeGreaterThan(1 - 1e-5);
					expect(current / closed(step, capacitance)).toBeLessThan(1 + 1e-7);
				}
			)
		);
	});

	it('draws a current without bound where nothing limits it', () => {
		expect(switchOn({ voltage: 1, inductance: 0, resistance: 0 }, { capacitance: 1e-6 }, null)).toEqual({
			current: Infinity,
			voltage: 1
		});
	});
});

/** Fine steps of the fourth-order Runge–Kutta rule over the five states, independent of modes and polynomials. */
const stepped = (step: Step, cx: number, { inductor, capacitor, damping }: Filter) => {
	const { voltage, inductance, resistance } = step;
	const rate = ([i = 0, x = 0, l = 0, c = 0, d = 0]: readonly number[]): number[] => {
		const into = damping ? (c - d) / damping.resistance : 0;
		return [
			(voltage - resistance * i - x) / inductance,
			(i - l) / cx,
			(x - c - (inductor.resistance ?? 0) * l) / inductor.inductance,
			(l - into) / capacitor.capacitance,
			damping ? into / damping.capacitance : 0
		];
	};
	const moved = (state: readonly number[], by: readonly number[], h: number) =>
		state.map((value, index) => value + h * (by[index] ?? 0));
	const fastest = Math.sqrt(cx * Math.min(inductance, inductor.inductance));
	const slowest = Math.sqrt(
		(inductance + inductor.inductance) * (cx + capacitor.capacitance + (damping?.capacitance ?? 0))
	);
	const h = fastest / 60;
	let state: readonly number[] = [0, 0, 0, 0, 0];
	let [current, on] = [0, 0];
	for (let t = 0; t < 20 * slowest; t += h) {
		const a = rate(state);
		const b = rate(moved(state, a, h / 2));
		const c = rate(moved(state, b, h / 2));
		const d = rate(moved(state, c, h));
		state = state.map(
			(value, i) => value + (h / 6) * ((a[i] ?? 0) + 2 * (b[i] ?? 0) + 2 * (c[i] ?? 0) + (d[i] ?? 0))
		);
		current = Math.max(current, Math.abs(state[0] ?? 0));
		on = Math.max(on, Math.abs(state[1] ?? 0));
	}
	return { current, voltage: on };
};

describe('with the filter behind it', () => {
	it('gives the values of a modal solution made elsewhere', () => {
		const peaks = switchOn(mains, { capacitance: 470e-9 }, filter);
		expect(peaks.current / 61.806).toBeCloseTo(1, 4);
		expect(peaks.voltage / 606.92).toBeCloseTo(1, 4);
	});

	it.each([
		['plain', filter, 470e-9],
		['large Cx', filter, 10e-6],
		['damped', { ...filter, damping: { resistance: 5, capacitance: 10e-6 } }, 1e-6],
		[
			'winding resistance',
			{ inductor: { inductance: 100e-6, resistance: 2 }, capacitor: filter.capacitor },
			330e-9
		],
		['small Cx', filter, 20e-9]
	] as const)('agrees with small time steps: %s', (_, of, capacitance) => {
		const peaks = switchOn(mains, { capacitance }, of);
		const seen = stepped(mains, capacitance, of);
		expect(peaks.current).toBeGreaterThan(seen.current * (1 - 1e-5));
		expect(peaks.voltage).toBeGreaterThan(seen.voltage * (1 - 1e-5));
		// The steps may miss a top between them, and a later one.
		expect(peaks.current).toBeLessThan(seen.current * (1 + 1e-3));
		expect(peaks.voltage).toBeLessThan(seen.voltage * (1 + 1e-3));
	});

	it('tends to the capacitor C alone as Cx vanishes', () => {
		const alone = switchOn({ ...mains, inductance: 133e-6 }, { capacitance: 4.7e-6 }, null);
		expect(switchOn(mains, { capacitance: 0 }, filter).current / alone.current).toBeCloseTo(1, 5);
		expect(alone.current).toBeCloseTo(57.7, 1);
	});
});

it('integrates the square of the current', () => {
	expect(jouleIntegral(mains, 470e-9)).toBeCloseTo(0.062157836578749986, 12);
	expect(() => jouleIntegral({ ...mains, resistance: 0 }, 470e-9)).toThrow(RangeError);
});
