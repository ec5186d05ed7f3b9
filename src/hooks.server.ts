import type { Handle, HandleServerError, ServerInit } from '@sveltejs/kit';
import { building } from '$app/environment';
import { isCrossSite } from '$lib/server/access';
import { asProblem, secureHeaders } from '$lib/server/answer';
import { closeDatabase, database } from '$lib/server/db';
import { loadDemo } from '$lib/server/db/demo';
import { environment } from '$lib/server/environment';
import { logFault } from '$lib/server/log';

export const init: ServerInit = async () => {
	if (building) return;
	const { DEMO } = environment();
	// Kit's server emits it once the last connection is closed.
	process.once('sveltekit:shutdown', () => void closeDatabase());
	if (DEMO === '1') await loadDemo(database());
};

export const handle: Handle = async ({ event, resolve }) => {
	const { pathname, origin } = event.url;
	// A refusal below /api is for programs: without this Kit would send those that accept all a page.
	if (pathname.startsWith('/api/')) event.request.headers.set('accept', 'application/json');
	const response = isCrossSite(event.request, event.url)
		? Response.json(
				{ message: `This was sent from another site. Open ${origin} and send it from there.` },
				{ status: 403 }
			)
		: await resolve(event);
	const answer = await asProblem(pathname, response);
	secureHeaders(answer.headers, event.url);
	return answer;
};

export const handleError: HandleServerError = ({ error: cause, event, status, message }) => {
	const id = crypto.randomUUID().slice(0, 8);
	logFault({ id, status, method: event.request.method, route: event.route.id, cause });
	return { message, id };
};
