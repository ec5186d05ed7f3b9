import { describe, expect, it } from 'vitest';
import { chargerAuxiliary } from '$lib/design/examples';
import type { Design, Source } from '$lib/design/design';
import { dampingBranches } from './damping-aid';

const mains: Source = {
	id: 'mains',
	label: 'Mains',
	kind: 'impedance',
	inductanceMin_H: 50e-6,
	inductanceMax_H: 100e-6,
	resistance_ohm: 0.1
};
const design: Design = {
	...chargerAuxiliary,
	switching: [{ id: 's', label: 'S', frequencyMin_Hz: 145e3, frequencyMax_Hz: 145e3, harmonics: 3 }],
	inductor: { inductance_H: 33e-6, toleranceMinus: 0, tolerancePlus: 0 },
	capacitor: { capacitance_F: 4.7e-6, toleranceMinus: 0, tolerancePlus: 0 },
	choice: { capacitance_F: null, toleranceMinus: 0, tolerancePlus: 0, series: 'E6' }
};

describe('dampingBranches', () => {
	it('proposes for L alone and for L with the source', () => {
		const proposal = dampingBranches(design, mains, 2);
		if (!proposal.ok) throw new Error(proposal.reason);
		const [alone, both] = proposal.branches;
		// 33 µH, 4.7 µF, n = 2: Rd 0.9129·R0 = 2.419 Ω; on 100 µH + 0.1 Ω the peak is 9.265 Ω (ngspice).
		expect(alone?.best.resistance).toBeCloseTo(2.419, 3);
		expect(alone?.best.after.impedance).toBeCloseTo(9.265, 2);
		expect(alone?.resistance).toBe(2.2);
		expect(alone?.capacitance).toBe(1e-5);
		expect(both?.best.resistance).toBeCloseTo(4.856, 3);
	});
	it('leaves a lower peak where the source is designed for too', () => {
		const proposal = dampingBranches(design, mains, 2);
		const peaks = proposal.ok ? proposal.branches.map(({ bought }) => bought.impedance) : [];
		const [alone = 0, both = Infinity] = peaks;
		expect(both).toBeLessThan(alone);
	});
	it('seeks where a curve was measured, and says where it does not reach', () => {
		const curve = { id: 'c', label: 'c', fileName: 'c.csv', sha256: 'a'.repeat(64) };
		const points = { frequency_Hz: [1e5, 1e6], real_ohm: [0, 0], imaginary_ohm: [20, 200] };
		const measured = {
			...design,
			curves: [{ ...curve, ...points }],
			inductor: { ...design.inductor, curve: 'c' }
		};
		const proposal = dampingBranches(measured, mains, 2);
		expect(proposal.ok && proposal.range).toEqual({ from: 1e5, to: 145e3 });
		const high = { ...measured, curves: [{ ...curve, ...points, frequency_Hz: [2e5, 1e6] }] };
		const refused = dampingBranches(high, mains, 2);
		expect(refused.ok ? '' : refused.reason).toContain('A measured curve covers');
	});
});
