/** The most that is read of a body only to throw it away: 8 MB. */
const PATIENCE = 8 * 1024 * 1024;

/**
 * Answers a request whose body was not read to its end. Kit's server leaves the rest in the socket,
 * where a client that is still sending waits for seconds and then finds its connection reset instead
 * of the answer; so the rest is read and dropped first.
 *
 * @example if (!body.ok) return drained(event.request, body.response);
 */
export async function drained(request: Request, response: Response): Promise<Response> {
	const reader = request.body?.getReader();
	if (reader === undefined) return response;
	let dropped = 0;
	try {
		for (let part = await reader.read(); !part.done; part = await reader.read()) {
			dropped += part.value.byteLength;
			if (dropped > PATIENCE) break;
		}
	} catch {
		// A stream that failed has nothing left to read, and the answer is already known.
	} finally {
		reader.releaseLock();
	}
	return response;
}
