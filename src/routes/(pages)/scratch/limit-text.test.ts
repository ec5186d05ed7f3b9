import { describe, expect, it } from 'vitest';
import { readLimitTable } from './limit-text';
import { textAt } from './tree';

const numbers = (text: string): string[] => {
	const table = readLimitTable(text);
	if (!table.ok) throw new Error(table.detail);
	return table.points.map((point) =>
		['/frequency_Hz', '/quasiPeak_dBuV', '/average_dBuV']
			.map((at) => textAt(point, at).replaceAll('\u00a0', ' '))
			.join(' | ')
	);
};

describe('readLimitTable', () => {
	it.each([
		['150 kHz,66,56\n30 MHz,60,50', ['150 kHz | 66 dBµV | 56 dBµV', '30 MHz | 60 dBµV | 50 dBµV']],
		[
			'f (MHz);QP;AV\n0,15;66,5;56\n30;60;50\n',
			['150 kHz | 66.5 dBµV | 56 dBµV', '30 MHz | 60 dBµV | 50 dBµV']
		],
		[
			'Frequency (kHz)\tQP (dBµV)\tAV (dBµV)\r\n9\t110\t97\r\n150\t0\t-3',
			['9 kHz | 110 dBµV | 97 dBµV', '150 kHz | 0 dBµV | −3 dBµV']
		]
	])('reads %j', (text, expected) => {
		expect(numbers(text)).toEqual(expected);
	});
	it.each([
		['', 'Nothing'],
		['150 kHz,66,56', 'two rows'],
		['150,66,56\n30 MHz,60,50', 'Row 1: “150” has no unit'],
		['f (kHz),QP,AV\n150,66,56\n200,60', 'Row 3 has 2 of 3 columns'],
		['f (kHz),QP,AV\n150,66,56\n200,x,50', 'Row 3, “x”'],
		['f (kHz),QP,AV\n150,66,56\n\n150,60,50', 'Row 4: the frequency does not increase'],
		[Array.from({ length: 41 }, (_, n) => `${n + 1} MHz,1,1`).join('\n'), '40 rows at most']
	])('refuses %j', (text, word) => {
		const table = readLimitTable(text);
		expect(table.ok ? '' : table.detail).toContain(word);
	});
});
