import { describe, expect, it } from 'vitest';
import { outputPeak as networkPeak } from '$lib/network/peak';
import { outputPeak } from './output-peak';

const damped = {
	inductor: { inductance: 33e-6 },
	capacitor: { capacitance: 4.7e-6 },
	damping: { resistance: 2.418897156926735, capacitance: 9.4e-6 }
};
const bare = {
	inductor: { inductance: 33e-6, resistance: 0.02 },
	capacitor: { capacitance: 4.7e-6, esr: 0.005 }
};
const range = { from: 10, to: 145e3 };

describe('peak of the output impedance', () => {
	// ngspice 39.3: 33 µH, 4.7 µF, 9.4 µF + 2.419 Ω, source 0.1 Ω.
	it.each([
		[1e-4, 1e-13, 9.265438],
		[1e-4, 0.94e-6, 9.502],
		[1e-4, 4.7e-6, 10.39239],
		[5e-6, 0.94e-6, 3.664],
		[5e-4, 0.94e-6, 34.92]
	])('%f H with %f F: %f Ω', (inductance, capacitance, peak) => {
		const found = outputPeak([{ filter: damped, resistance: 0.1, inductance }], range, peak)({ capacitance });
		expect(Math.abs(found / peak - 1)).toBeLessThan(2e-4);
	});

	// Two searches that share no code but the impedance of the parts.
	it.each([1e-9, 1e-7, 1e-6, 1e-5, 1e-4])(
		'agrees with the slower search at %f F, sharp peaks too',
		(capacitance) => {
			for (const filter of [damped, bare]) {
				const source = {
					kind: 'impedance',
					resistance: 0.05,
					inductanceMin: 2e-5,
					inductanceMax: 2e-5
				} as const;
				const slower = networkPeak(filter, { capacitance }, source, range).impedance;
				const corner = { filter, resistance: 0.05, inductance: 2e-5 };
				expect(Math.abs(outputPeak([corner], range, slower)({ capacitance }) / slower - 1)).toBeLessThan(
					1e-6
				);
				const estimate = outputPeak([corner], range, slower * 1e3)({ capacitance });
				expect(Math.abs(Math.log(estimate / slower))).toBeLessThan(0.25);
			}
		}
	);

	it('is that of the worst corner', () => {
		const corners = [1e-4, 5e-4].map((inductance) => ({ filter: damped, resistance: 0.1, inductance }));
		expect(outputPeak(corners, range, 34.9)({ capacitance: 0.94e-6 })).toBeCloseTo(34.92, 1);
	});
});
