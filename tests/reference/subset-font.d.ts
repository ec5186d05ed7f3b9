declare module 'subset-font' {
	export default function subsetFont(
		font: Buffer,
		characters: string,
		options: { readonly targetFormat: 'truetype' | 'woff' | 'woff2' }
	): Promise<Buffer>;
}
