import { describe, expect, it } from 'vitest';
import { summaryHeading } from '$lib/components/summary';
import { fieldIds, rowName } from './place';

describe('rows of pointers', () => {
	it.each([
		['/design/supply/voltage_V', '1.1 Supply'],
		['/design/switching/1/harmonics', '2.2 Switching'],
		['/design/switching', '2 Converter'],
		['/design/inductor/inductance_H', '3.1 Inductor'],
		['/design/rules/2/divisor', '5.3 Rule'],
		['/design/title', '9 Title block'],
		['/layout/decade_mm', 'Sheet'],
		['', 'Design']
	])('%s is in %s', (pointer, name) => {
		expect(rowName(pointer)).toBe(name);
	});

	it('counts', () => {
		expect([1, 2].map(summaryHeading)).toEqual(['1 entry needs another look', '2 entries need another look']);
	});

	it('lists the nearest field first', () => {
		expect(fieldIds('/design/rules/2')).toEqual(['at-design-rules-2', 'at-design-rules', 'at-design']);
	});
});
