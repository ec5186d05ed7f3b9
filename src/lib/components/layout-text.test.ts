import { describe, expect, it } from 'vitest';
import { composeAnyway, readLayoutText } from './layout-text';

const base = { paper: 'A4', orientation: 'landscape' } as const;

describe('a layout as text', () => {
	it('reads every key', () => {
		const read = readLayoutText({
			...base,
			ink: 'mono',
			zones: 'no',
			strip: 'yes',
			decade_mm: '25 mm',
			frequencyFrom_Hz: '1 kHz',
			impedanceFrom_ohm: '100 mΩ'
		});
		expect(read.ok && read.value).toEqual({
			...base,
			ink: 'mono',
			zones: false,
			strip: true,
			decade_mm: 25,
			frequencyFrom_Hz: 1000,
			impedanceFrom_ohm: 0.1
		});
	});

	it.each([
		[{ ...base, decade_mm: 'wide' }, '/decade_mm'],
		[{ ...base, decade_mm: '2000' }, '/decade_mm'],
		[{ ...base, frequencyFrom_Hz: '2 kHz' }, '/frequencyFrom_Hz'],
		[{ ...base, impedanceFrom_ohm: 'x' }, '/impedanceFrom_ohm'],
		[{ ...base, paper: 'A0' }, '/paper'],
		[{ ...base, ink: 'blue' }, '/ink']
	])('asks again at %j', (text, pointer) => {
		const read = readLayoutText(text);
		expect(read.ok ? [] : read.issues.map((issue) => issue.pointer)).toContain(pointer);
	});

	it('draws with its own decade where the asked one leaves too few', () => {
		const { scene, issues } = composeAnyway({ layout: { ...base, decade_mm: 150 }, kind: 'blank' });
		expect(scene.width).toBe(297);
		expect(issues.map(({ pointer }) => pointer)).toEqual(['/layout/decade_mm']);
	});
});
