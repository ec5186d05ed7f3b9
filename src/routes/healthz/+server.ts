import { json } from '@sveltejs/kit';
import { version } from '$app/environment';
import { allowPublic } from '$lib/server/access';
import { ping } from '$lib/server/db';
import { logFault } from '$lib/server/log';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async (event) => {
	allowPublic(event);
	const headers = { 'cache-control': 'no-store' };
	try {
		await ping();
		return json({ status: 'ok', database: 'ok', version }, { headers });
	} catch (cause) {
		logFault({ id: 'healthz', status: 503, method: 'GET', route: event.route.id, cause });
		return json({ status: 'unavailable', database: 'away', version }, { status: 503, headers });
	}
};
