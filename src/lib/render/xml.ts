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

// eslint-disable-next-line no-control-regex -- naming the control characters is the purpose
const UNLAWFUL = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]|\p{Surrogate}/gu;

/**
 * Leaves out what XML 1.0 cannot hold even as a reference: most controls, lone surrogates and two non-characters.
 * @param text any text
 * @returns the text without them
 * @example lawfulText('a\u0000b') // 'ab'
 * Source: XML 1.0, production 2 (Char).
 */
export function lawfulText(text: string): string {
	return text.replace(UNLAWFUL, '');
}

/** What neither needs escaping nor is unlawful; nearly all that is written is of this kind. */
const PLAIN = /^[ !#-%'-;=?-~\u00a0-\ud7ff]*$/;

/**
 * Escapes text for XML content and attributes; characters that XML cannot hold are left out.
 * @param text any text
 * @returns the escaped text
 * @example escapeXml('R < 5 & L') // 'R &lt; 5 &amp; L'
 * Source: XML 1.0, section 2.4.
 */
export function escapeXml(text: string): string {
	if (PLAIN.test(text)) return text;
	return lawfulText(text).replace(/[&<>"\t\n\r]/g, (character) => entities[character] ?? '');
}
