import type { Handle, HandleServerError, RequestEvent, ServerInit } from '@sveltejs/kit';
import { building } from '$app/environment';
import { isCrossSite, isOtherName } from '$lib/server/access';
import { asProblem, secureHeaders } from '$lib/server/answer';
import { closeDatabase, database } from '$lib/server/db';
import { loadDemo } from '$lib/server/db/demo';
import { drained } from '$lib/server/drain';
import { environment } from '$lib/server/environment';
import { logFault } from '$lib/server/log';

export const init: ServerInit = async () => {
	if (building) return;
	const { DEMO } = environment();
	// Kit's server emits it once the last connection is closed.
	process.once('sveltekit:shutdown', () => void closeDatabase());
	if (DEMO === '1') await loadDemo(database());
};

async function answer(event: RequestEvent, resolve: () => Response | Promise<Response>): Promise<Response> {
	const { origin } = event.url;
	if (isOtherName(event.request, event.url)) {
		return new Response(null, { status: 307, headers: { location: event.url.href } });
	}
	if (isCrossSite(event.request, event.url)) {
		const message = `This was sent from another site. Open ${origin} and send it from there.`;
		return Response.json({ message }, { status: 403 });
	}
	return resolve();
}

export const handle: Handle = async ({ event, resolve }) => {
	const { pathname } = event.url;
	// A refusal below /api is for programs: without this Kit would send those that accept all a page.
	if (pathname.startsWith('/api/')) event.request.headers.set('accept', 'application/json');
	const response = await asProblem(pathname, await answer(event, () => resolve(event)));
	secureHeaders(response.headers, event.url);
	return drained(event.request, response);
};

export const handleError: HandleServerError = ({ error: cause, event, status, message }) => {
	const id = crypto.randomUUID().slice(0, 8);
	// Below 500 nothing broke, and the message repeats the address, which may carry a code.
	const fault = status < 500 ? undefined : cause;
	logFault({ id, status, method: event.request.method, route: event.route.id, cause: fault });
	return { message, id };
};
