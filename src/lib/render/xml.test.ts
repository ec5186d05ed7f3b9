import { describe, expect, it } from 'vitest';
import { escapeXml, lawfulText } from './xml';

describe('escapeXml', () => {
	it.each([
		['R < 5 & L > 1', 'R &lt; 5 &amp; L &gt; 1'],
		['"a"\'b\'', "&quot;a&quot;'b'"],
		['a\tb\nc\rd', 'a&#9;b&#10;c&#13;d'],
		['\u0000\u0008\u001bx\ufffe\uffff', 'x'],
		['\ud800x\udc00', 'x'],
		['👍 Ω µ ü', '👍 Ω µ ü'],
		[']]>', ']]&gt;'],
		['', '']
	])('writes %j as %j', (text, expected) => {
		expect(escapeXml(text)).toBe(expected);
	});
});

describe('lawfulText', () => {
	it('leaves out what XML cannot hold', () => {
		expect(lawfulText('a\u0000b\u000bc\ud800<')).toBe('abc<');
	});
});
