import { describe, expect, it } from 'vitest';
import { UNIT } from './unit';
describe('unit', () => {
	it('has a symbol', () => {
		expect(UNIT.capacitance).toBe('F');
	});
});
