import { problem } from './problem';

/** The largest body that a public route reads: 256 KB. */
export const BODY_LIMIT = 256 * 1024;

export type Body = { ok: true; value: unknown } | { ok: false; response: Response };
export type BodyText = { ok: true; text: string } | { ok: false; response: Response };

export interface BodyOptions {
	/** Bytes, BODY_LIMIT unless given. */
	readonly limit?: number;
	/** Media types that are read, without parameters; `application/json` unless given. */
	readonly types?: readonly string[];
}

function mediaType(request: Request): string {
	const [type = ''] = (request.headers.get('content-type') ?? '').split(';');
	return type.trim().toLowerCase();
}

/** Unpacking what a stranger packed would need a limit of its own. */
function isCoded(request: Request): boolean {
	return (request.headers.get('content-encoding') ?? 'identity').toLowerCase() !== 'identity';
}

function tooLarge(limit: number): BodyText {
	const title = `The body is larger than ${limit / 1024} KB.`;
	return { ok: false, response: problem(413, title) };
}

const brokenOff = (): BodyText => ({
	ok: false,
	response: problem(400, 'The body broke off before its end.')
});

/** What Kit's server tells by an error in the stream: its own limit, or a client that hung up. */
function refuseStream(cause: unknown, limit: number): BodyText {
	if (cause instanceof Error && 'status' in cause && cause.status === 413) return tooLarge(limit);
	if (cause instanceof Error && 'code' in cause && cause.code === 'ECONNRESET') return brokenOff();
	throw cause;
}

async function collect(stream: ReadableStream<Uint8Array>, limit: number): Promise<BodyText> {
	const chunks: Uint8Array[] = [];
	let length = 0;
	const reader = stream.getReader();
	try {
		for (let part = await reader.read(); !part.done; part = await reader.read()) {
			length += part.value.byteLength;
			if (length > limit) return tooLarge(limit);
			chunks.push(part.value);
		}
	} catch (cause) {
		return refuseStream(cause, limit);
	} finally {
		reader.releaseLock();
	}
	return decode(Buffer.concat(chunks, length));
}

/** Reads a request's text up to a limit: 415 for another media type or packed, 413 for too much, 400 for broken UTF-8. */
export async function readText(request: Request, options: BodyOptions = {}): Promise<BodyText> {
	const { limit = BODY_LIMIT, types = ['application/json'] } = options;
	if (!types.includes(mediaType(request))) {
		return { ok: false, response: problem(415, `Send the body as ${types.join(' or ')}.`) };
	}
	if (isCoded(request)) {
		return { ok: false, response: problem(415, 'Send the body as it is, without a content coding.') };
	}
	if (Number(request.headers.get('content-length')) > limit) return tooLarge(limit);
	if (!request.body) return { ok: true, text: '' };
	return collect(request.body, limit);
}

function decode(bytes: Uint8Array): BodyText {
	try {
		return { ok: true, text: new TextDecoder('utf-8', { fatal: true }).decode(bytes) };
	} catch (cause) {
		if (!(cause instanceof TypeError)) throw cause;
		return { ok: false, response: problem(400, 'The body is not valid UTF-8.') };
	}
}

/** Reads a request's JSON up to a limit: 415, 413, or 400 where it is not JSON. */
export async function readJson(request: Request, options: BodyOptions = {}): Promise<Body> {
	const body = await readText(request, options);
	if (!body.ok) return body;
	try {
		const value: unknown = JSON.parse(body.text);
		return { ok: true, value };
	} catch (cause) {
		if (!(cause instanceof SyntaxError)) throw cause;
		const detail = 'Send one JSON value; see the schemas under /api/v1/schema.';
		return { ok: false, response: problem(400, 'The body is not JSON.', [{ pointer: '', detail }]) };
	}
}
