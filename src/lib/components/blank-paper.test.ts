import { describe, expect, it } from 'vitest';
import { drawPaper, PAPER_START, paperOfQuery, queryOfPaper } from './blank-paper';

describe('blank paper', () => {
	it('comes from an address and goes back to it', () => {
		const text = paperOfQuery(new URLSearchParams('paper=A3&orientation=portrait&decade_mm=30'));
		expect(text).toMatchObject({ paper: 'A3', orientation: 'portrait', decade_mm: '30', ink: 'colour' });
		expect(paperOfQuery(new URLSearchParams(queryOfPaper(text)))).toEqual(text);
		expect(drawPaper(text).scene).toMatchObject({ width: 297, height: 420 });
	});

	it.each([
		['decade_mm', '170'],
		['decade_mm', 'x'],
		['paper', 'A0'],
		['frequencyFrom_Hz', '3 kHz'],
		['impedanceFrom_ohm', '1e400 Ω']
	])('still draws where %s is %s, and asks there', (key, value) => {
		const { scene, issues } = drawPaper({ ...PAPER_START, [key]: value });
		expect(scene.width).toBe(297);
		expect(issues.map(({ pointer }) => pointer)).toContain(`/${key}`);
	});
});
