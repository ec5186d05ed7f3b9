import { describe, expect, it } from 'vitest';
import { chargerAuxiliary } from '$lib/design/examples';
import { draw, read } from './sheets';

const design = chargerAuxiliary;
const layout = { paper: 'A4', orientation: 'landscape' };

describe('read', () => {
	it.each([
		[{}, 'blank'],
		[{ design }, 'worked'],
		[{ design, kind: 'blank' }, 'blank'],
		[{ design, kind: 'step', step: 8 }, 'step']
	])('takes %j', (input, kind) => {
		expect(read(input)).toMatchObject({ ok: true, value: { kind, layout } });
	});

	it.each<[input: unknown, pointer: string]>([
		[null, ''],
		[[], ''],
		['sheet', ''],
		[{ kind: 'worked' }, '/design'],
		[{ kind: 'step', step: 1 }, '/design'],
		[{ design, kind: 'step' }, '/step'],
		[{ design, kind: 'step', step: 0 }, '/step'],
		[{ design, kind: 'step', step: 1.5 }, '/step'],
		[{ design, kind: 'step', step: '1' }, '/step'],
		[{ design, kind: 'drawing' }, '/kind'],
		[{ design: { ...design, title: 3 } }, '/design/title'],
		[{ design: { ...design, title: 'Filter 😀' } }, '/design/title'],
		[{ design: { ...design, extra: 3 } }, '/design/extra'],
		[{ design: null }, '/design'],
		[{ layout: { ...layout, paper: 'A5' } }, '/layout/paper'],
		[{ layout: 'A4' }, '/layout'],
		[{ titleBlock: { title: '電' } }, '/titleBlock/title'],
		[{ titleBlock: { state: 'Issued' } }, '/titleBlock/state'],
		[{ state: 'Issued' }, '/state']
	])('refuses %j', (input, pointer) => {
		expect(read(input)).toMatchObject({ ok: false, issues: [{ pointer }] });
	});

	it('fingerprints the data, not the order of its keys', () => {
		const turned = Object.fromEntries(Object.entries(design).reverse());
		const [one, other] = [read({ design }), read({ design: turned })];
		expect(one.ok && one.value.dataHash).toMatch(/^[0-9a-f]{64}$/);
		expect(other.ok && other.value.dataHash).toBe(one.ok && one.value.dataHash);
	});
});

describe('draw', () => {
	it.each([
		[{ design, kind: 'step', step: 9 }, '/step'],
		[{ layout: { ...layout, decade_mm: 200 } }, '/layout/decade_mm']
	])('refuses %j', (input, pointer) => {
		expect(draw(input)).toMatchObject({ ok: false, issues: [{ pointer }] });
	});

	it('draws the last step and a blank sheet', () => {
		expect(draw({ design, kind: 'step', step: 8 })).toMatchObject({
			ok: true,
			value: { width: 297, metadata: { kind: 'step', step: 8, steps: 8 } }
		});
		expect(draw({})).toMatchObject({ ok: true, value: { metadata: { kind: 'blank' } } });
	});
});
