import { textWidth } from '$lib/scene/metrics';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { shorten, wrap } from './fitting';
import { runsWidth, wrapRuns } from './runs';

const measure = { width: 30, cap: 2.5 };

describe('text within a width', () => {
	it('keeps what fits and cuts what does not, with an ellipsis', () => {
		expect(shorten('series', measure)).toBe('series');
		expect(shorten('series inductor at the line side', measure)).toMatch(/^series induct.*…$/);
		expect(shorten('WWW', { width: 1, cap: 2.5 })).toBe('');
	});

	it('breaks between words, cuts a word wider than the line, and ends the last line in an ellipsis', () => {
		expect(wrap('Charger auxiliary supply', { width: 30, cap: 3.5, face: 'bold' })).toEqual([
			'Charger',
			'auxiliary',
			'supply'
		]);
		expect(wrap('  \n ', measure)).toEqual([]);
		expect(wrap('Donaudampfschifffahrtsgesellschaft', measure).length).toBe(2);
		expect(wrap('one two three four five six seven eight nine ten', measure, 2)[1]).toMatch(/…$/);
	});

	it('never passes the width', () => {
		fc.assert(
			fc.property(
				fc.string({ maxLength: 200 }),
				fc.double({ min: 8, max: 90, noNaN: true }),
				(text, width) => {
					const lines = wrap(text, { width, cap: 2.5 }, 3);
					expect(lines.length).toBeLessThanOrEqual(3);
					for (const line of [...lines, shorten(text, { width, cap: 2.5 })]) {
						expect(textWidth(line, 'regular', 2.5)).toBeLessThanOrEqual(width + 1e-9);
					}
				}
			)
		);
	});

	it('keeps every letter of a text that has room', () => {
		fc.assert(
			fc.property(fc.string({ maxLength: 80 }), (text) => {
				const letters = (value: string): string => value.replace(/[ \t\n\r]/g, '');
				expect(letters(wrap(text, measure).join(''))).toBe(letters(text));
			})
		);
	});

	it('holds for lines of changing weight', () => {
		const word = fc.record({
			text: fc.string({ maxLength: 30 }),
			face: fc.constantFrom('regular', 'bold'),
			shift: fc.constantFrom(undefined, 'index', 'exponent')
		});
		fc.assert(
			fc.property(fc.array(word, { maxLength: 8 }), (runs) => {
				for (const line of wrapRuns(runs as never, 40, 2.5, 2)) {
					expect(runsWidth(line, 2.5)).toBeLessThanOrEqual(40 + 1e-9);
				}
			})
		);
	});
});
