/** Design files in and out, and sheets fetched from the server. */
import type { Design } from '$lib/design/design';
import { parseDesign, type Issue } from '$lib/design/parse';
import type { Layout, SheetKind, TitleBlock } from '$lib/sheet/layout';

export type Opened =
	| { readonly ok: true; readonly design: Design }
	| { readonly ok: false; readonly message: string; readonly issues: readonly Issue[] };

const LARGEST = 4 * 1024 * 1024;

/** Reads a design file, or says in words why it cannot be one. */
export function openDesign(text: string, name: string): Opened {
	if (text.length > LARGEST) {
		return { ok: false, message: `${name} is larger than a design file can be.`, issues: [] };
	}
	let value: unknown;
	try {
		value = JSON.parse(text);
	} catch (cause) {
		if (!(cause instanceof SyntaxError)) throw cause;
		return { ok: false, message: `${name} is not a design file: it is not JSON.`, issues: [] };
	}
	const parsed = parseDesign(value);
	if (parsed.ok) return parsed;
	return {
		ok: false,
		message: `${name} cannot be opened as it is. Nothing was changed.`,
		issues: parsed.issues
	};
}

/** A file name from a title: what a disk takes, in lower case. */
export function fileName(title: string, ending: string): string {
	const stem = title
		.normalize('NFKD')
		.replace(/\p{Diacritic}/gu, '')
		.toLowerCase()
		.replace(/[^a-z0-9]+/g, '-')
		.replace(/^-+|-+$/g, '')
		.slice(0, 60);
	return `${stem === '' ? 'worksheet' : stem}.${ending}`;
}

export interface SheetRequest {
	readonly design: Design;
	readonly layout: Layout;
	readonly titleBlock: TitleBlock;
	readonly kind: SheetKind;
	readonly step?: number;
}

export type Fetched =
	{ readonly ok: true; readonly file: Blob } | { readonly ok: false; readonly message: string };

const refusal = async (response: Response): Promise<string> => {
	if (response.status === 429) {
		return `Too many sheets were asked for from here. Try again in ${response.headers.get('retry-after') ?? '60'} s.`;
	}
	if (response.headers.get('content-type')?.includes('json') !== true) return '';
	const body = (await response.json()) as { title?: string; errors?: readonly Issue[] };
	const details = body.errors?.map(({ pointer, detail }) => `${pointer}: ${detail}`) ?? [];
	return [body.title ?? '', ...details].join(' ').trim();
};

/** Asks the server for the sheet as a file. */
export async function fetchSheet(address: string, request: SheetRequest): Promise<Fetched> {
	let response: Response;
	try {
		response = await fetch(address, {
			method: 'POST',
			headers: { 'content-type': 'application/json' },
			body: JSON.stringify(request)
		});
	} catch (cause) {
		if (!(cause instanceof TypeError)) throw cause;
		return { ok: false, message: 'The server could not be reached. What you wrote is kept here; try again.' };
	}
	if (response.ok) return { ok: true, file: await response.blob() };
	const words = await refusal(response);
	return { ok: false, message: words === '' ? `The server answered ${String(response.status)}.` : words };
}

/** Hands a file to the browser's downloads. */
export function save(file: Blob, name: string): void {
	const link = document.createElement('a');
	link.href = URL.createObjectURL(file);
	link.download = name;
	link.click();
	setTimeout(() => {
		URL.revokeObjectURL(link.href);
	}, 60_000);
}
