/** The most that is read of a body only to throw it away: 8 MB. */
const PATIENCE = 8 * 1024 * 1024;

/**
 * Answers a request after what nobody read of its body is read and dropped. Kit's server leaves such a
 * rest in the socket, where it would stand before the connection's next request: that one waits for
 * seconds and is then reset instead of answered.
 *
 * @example return drained(event.request, await resolve(event));
 */
export async function drained(request: Request, response: Response): Promise<Response> {
	const { body } = request;
	// What reads a body to its end through formData() or json() keeps it locked.
	if (body === null || body.locked) return response;
	const reader = body.getReader();
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
