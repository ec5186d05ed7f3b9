import { layoutJsonSchema } from '$lib/design/layout';
import { allowPublic } from '$lib/server/access';
import type { RequestHandler } from './$types';

const schema = JSON.stringify(layoutJsonSchema());

export const GET: RequestHandler = (event) => {
	allowPublic(event, { rate: true });
	return new Response(schema, {
		headers: { 'content-type': 'application/json', 'cache-control': 'public, max-age=3600' }
	});
};
