/** What makes a file fit for the archive: metadata said twice alike, a colour profile, an identity from its content. */
import { PDFHexString, PDFRawStream, PDFString, type PDFContext, type PDFRef } from 'pdf-lib';
import { digest } from './digest';
import { colourProfile, PROFILE_NAME } from './pdf-profile';
import { escapeXml, lawfulText } from './xml';

export interface DocumentFacts {
	readonly title: string;
	readonly author: string;
	/** UTC as `2000-01-01T00:00:00Z`. */
	readonly creationDate: string;
}

let packedProfile: Uint8Array | undefined;

const PRODUCER = 'Herringbone';

const packetOf = ({ title, author, creationDate }: DocumentFacts): string => {
	const creator =
		author === '' ? '' : `<dc:creator><rdf:Seq><rdf:li>${escapeXml(author)}</rdf:li></rdf:Seq></dc:creator>`;
	return `<?xpacket begin="\ufeff" id="W5M0MpCehiHzreSzNTczkc9d"?>
<x:xmpmeta xmlns:x="adobe:ns:meta/">
<rdf:RDF xmlns:rdf="http://www.w3.org/1999/02/22-rdf-syntax-ns#">
<rdf:Description rdf:about="" xmlns:dc="http://purl.org/dc/elements/1.1/" xmlns:xmp="http://ns.adobe.com/xap/1.0/" xmlns:pdf="http://ns.adobe.com/pdf/1.3/" xmlns:pdfaid="http://www.aiim.org/pdfa/ns/id/">
<pdfaid:part>1</pdfaid:part><pdfaid:conformance>B</pdfaid:conformance>
<dc:format>application/pdf</dc:format>
<dc:title><rdf:Alt><rdf:li xml:lang="x-default">${escapeXml(title)}</rdf:li></rdf:Alt></dc:title>
${creator}<xmp:CreatorTool>${PRODUCER}</xmp:CreatorTool><xmp:CreateDate>${creationDate}</xmp:CreateDate><xmp:ModifyDate>${creationDate}</xmp:ModifyDate>
<pdf:Producer>${PRODUCER}</pdf:Producer>
</rdf:Description>
</rdf:RDF>
</x:xmpmeta>
<?xpacket end="r"?>`;
};

const infoDate = (date: string): PDFString => {
	const parts = /^(\d{4})-(\d\d)-(\d\d)T(\d\d):(\d\d):(\d\d)Z$/.exec(date);
	if (parts === null) throw new RangeError(`date must be like 2000-01-01T00:00:00Z, got ${date}`);
	return PDFString.of(`D:${parts.slice(1).join('')}Z`);
};

/**
 * Registers the document information and its twin in XMP.
 * @param context the file under construction
 * @param facts title, author and date
 * @returns references of the information dictionary and of the XMP stream
 * @throws RangeError for a date in another form
 * @example writeFacts(context, { title: 'Sheet', author: '', creationDate: '2000-01-01T00:00:00Z' })
 * Source: ISO 19005-1, 6.7.
 */
export function writeFacts(context: PDFContext, facts: DocumentFacts): { info: PDFRef; metadata: PDFRef } {
	const title = lawfulText(facts.title);
	const author = lawfulText(facts.author);
	const date = infoDate(facts.creationDate);
	const info = context.obj({
		Title: PDFHexString.fromText(title),
		...(author === '' ? {} : { Author: PDFHexString.fromText(author) }),
		Creator: PDFString.of(PRODUCER),
		Producer: PDFString.of(PRODUCER),
		CreationDate: date,
		ModDate: date
	});
	const bytes = new TextEncoder().encode(packetOf({ ...facts, title, author }));
	const dictionary = context.obj({ Type: 'Metadata', Subtype: 'XML', Length: bytes.length });
	return { info: context.register(info), metadata: context.register(PDFRawStream.of(dictionary, bytes)) };
}

/**
 * Registers the output intent that gives the file's colours their meaning.
 * @param context the file under construction
 * @returns its reference, for the catalogue
 * @example writeOutputIntent(context)
 * Source: ISO 19005-1, 6.2.2.
 */
export function writeOutputIntent(context: PDFContext): PDFRef {
	packedProfile ??= context.flateStream(colourProfile()).contents;
	const entries = { N: 3, Filter: 'FlateDecode', Length: packedProfile.length };
	const profile = context.register(PDFRawStream.of(context.obj(entries), packedProfile));
	return context.register(
		context.obj({
			Type: 'OutputIntent',
			S: 'GTS_PDFA1',
			OutputConditionIdentifier: PDFString.of(PROFILE_NAME),
			Info: PDFString.of(PROFILE_NAME),
			DestOutputProfile: profile
		})
	);
}

/**
 * Makes the file's identifier from its content, so that equal files are equal to the byte.
 * @param parts all that differs between files
 * @returns 32 hexadecimal digits
 * @example fileIdentifier(['a']).length // 32
 * Source: PDF Reference 1.4, 9.3.
 */
export function fileIdentifier(parts: readonly (string | Uint8Array)[]): string {
	return digest(parts)
		.map((word) => word.toString(16).padStart(8, '0'))
		.join('');
}
