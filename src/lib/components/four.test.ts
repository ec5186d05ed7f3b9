import { describe, expect, it } from 'vitest';
import { answerFour, fourOfQuery, queryOfFour, START, worksheetOfFour } from './four';

describe('four numbers', () => {
	it('finds the window of the nominal rules: 50 Ω/10 at 100 kHz, 3.3 µF/5', () => {
		const { evaluation } = answerFour(START);
		expect(evaluation.windows[0]?.from).toBeCloseTo(318.31e-9, 11);
		expect(evaluation.windows[0]?.to).toBeCloseTo(660e-9, 12);
		expect(evaluation.recommended).toBe(470e-9);
	});

	it('counts on with the last good value and asks at the bad one', () => {
		const good = answerFour({ ...START, L: '100u' }).good;
		const answer = answerFour({ ...START, L: '2,200', C: '2u2' }, good);
		expect(answer.design.inductor.inductance_H).toBe(1e-4);
		expect(answer.design.capacitor.capacitance_F).toBe(2.2e-6);
		expect(Object.keys(answer.issues)).toEqual(['L']);
		expect(answer.readings.C.replace('\u00a0', ' ')).toBe('2.2 µF');
		expect(answer.good.L).toBe('100u');
	});

	it.each([
		['f', '1 Hz'],
		['f', '100'],
		['L', '0 H'],
		['L', '-1 µH'],
		['C', '1e400 F'],
		['C', '😀'],
		['C', '3.3 MF'],
		['C', '']
	] as const)('refuses %s = %s and still answers', (key, text) => {
		const answer = answerFour({ ...START, [key]: text });
		expect(answer.issues[key]).toMatch(/\S/);
		expect(answer.evaluation.recommended).toBe(470e-9);
	});

	it('goes through an address and back', () => {
		const four = { ...START, f: '132 kHz', source: '2x5uH' };
		expect(fourOfQuery(new URLSearchParams(queryOfFour(four)))).toEqual(four);
		expect(fourOfQuery(new URLSearchParams())).toEqual(START);
	});

	it('carries the numbers into a whole worksheet', () => {
		const design = worksheetOfFour({ ...START, f: '132 kHz', source: '2x5uH' });
		expect(design.switching[0]?.frequencyMax_Hz).toBe(132e3);
		expect(design.supply.kind).toBe('dc');
		expect(design.sources[0]).toMatchObject({ kind: 'an-5uH', networks: 2 });
	});
});
