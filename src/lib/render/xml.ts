/** Text made safe for XML. */

const entities: Readonly<Record<string, string>> = {
	'&': '&amp;',
	'<': '&lt;',
	'>': '&gt;',
	'"': '&quot;',
	'\t': '&#9;',
	'\n': '&#10;',
	'\r': '&#13;'
};

/** What XML 1.0 cannot hold even as a reference: most controls, lone surrogates and two non-characters. */
// eslint-disable-next-line no-control-regex -- naming the control characters is the purpose
const UNLAWFUL = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]|\p{Surrogate}/gu;

/**
 * Escapes text for XML content and attributes; characters that XML cannot hold are left out.
 * @param text any text
 * @returns the escaped text
 * @example escapeXml('R < 5 & L') // 'R &lt; 5 &amp; L'
 * Source: XML 1.0, production 2 (Char) and section 2.4.
 */
export function escapeXml(text: string): string {
	return text.replace(UNLAWFUL, '').replace(/[&<>"\t\n\r]/g, (character) => entities[character] ?? '');
}
