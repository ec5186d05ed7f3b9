/** One thing that is wrong with what was sent: where (a JSON pointer) and what to do about it. */
export interface ProblemDetail {
	readonly pointer: string;
	readonly detail: string;
}

const reasons: Readonly<Record<number, string>> = {
	400: 'Bad Request',
	401: 'Unauthorized',
	403: 'Forbidden',
	404: 'Not Found',
	405: 'Method Not Allowed',
	409: 'Conflict',
	412: 'Precondition Failed',
	413: 'Payload Too Large',
	415: 'Unsupported Media Type',
	422: 'Unprocessable Content',
	428: 'Precondition Required',
	429: 'Too Many Requests',
	500: 'Internal Server Error',
	503: 'Service Unavailable'
};

/** The reason phrase of a status (RFC 9110), for answers that have nothing better to say. */
export function reasonPhrase(status: number): string {
	return reasons[status] ?? 'Error';
}

/**
 * Answers problem details (RFC 9457): a status, a sentence for people, and a pointer for each fault.
 *
 * @example problem(400, 'The design cannot be read.', [{ pointer: '/title', detail: 'Enter a title.' }])
 */
export function problem(status: number, title: string, errors?: readonly ProblemDetail[]): Response {
	const body = { type: 'about:blank', title, status, ...(errors ? { errors } : {}) };
	return new Response(JSON.stringify(body), {
		status,
		headers: { 'content-type': 'application/problem+json', 'cache-control': 'no-store' }
	});
}
