import { problem, reasonPhrase } from './problem';

/** Headers that every answer carries. The pages' content policy is Kit's (svelte.config.js). */
const always: Readonly<Record<string, string>> = {
	'x-content-type-options': 'nosniff',
	'x-frame-options': 'DENY',
	'referrer-policy': 'same-origin',
	'cross-origin-opener-policy': 'same-origin',
	'cross-origin-resource-policy': 'same-origin',
	'permissions-policy': 'camera=(), microphone=(), geolocation=(), payment=(), usb=()'
};

/** A sheet opened by itself runs nothing and fetches nothing; its letters and rules are in the file. */
const drawingPolicy =
	"default-src 'none'; style-src 'unsafe-inline'; font-src data:; img-src data:; frame-ancestors 'none'";

/** Adds the headers of the house to an answer. */
export function secureHeaders(headers: Headers, origin: URL): void {
	for (const [name, value] of Object.entries(always)) headers.set(name, value);
	if (origin.protocol === 'https:') headers.set('strict-transport-security', 'max-age=31536000');
	if (headers.get('content-type')?.startsWith('image/svg+xml') && !headers.has('content-security-policy')) {
		headers.set('content-security-policy', drawingPolicy);
	}
}

async function messageOf(response: Response): Promise<string> {
	if (!response.headers.get('content-type')?.startsWith('application/json')) return '';
	const body: unknown = await response.json();
	const message = typeof body === 'object' && body && 'message' in body ? body.message : '';
	return typeof message === 'string' ? message : '';
}

const kept = ['allow', 'retry-after', 'set-cookie', 'www-authenticate'];

/**
 * Turns a refusal below /api into problem details, whatever the client said it accepts; other answers,
 * and problems that an endpoint made itself, pass as they are.
 */
export async function asProblem(pathname: string, response: Response): Promise<Response> {
	if (!pathname.startsWith('/api/') || response.status < 400) return response;
	if (response.headers.get('content-type')?.startsWith('application/problem+json')) return response;
	const title = (await messageOf(response)) || reasonPhrase(response.status);
	const answer = problem(response.status, title);
	for (const name of kept) {
		const value = response.headers.get(name);
		if (value !== null) answer.headers.set(name, value);
	}
	return answer;
}
