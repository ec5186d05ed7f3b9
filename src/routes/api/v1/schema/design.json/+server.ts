import { designJsonSchema } from '$lib/design/schema';
import { allowPublic } from '$lib/server/access';
import type { RequestHandler } from './$types';

const schema = JSON.stringify(designJsonSchema());

export const GET: RequestHandler = (event) => {
	allowPublic(event, { rate: true });
	return new Response(schema, {
		headers: { 'content-type': 'application/json', 'cache-control': 'public, max-age=3600' }
	});
};
