import { json } from '@sveltejs/kit';
import { allowPublic, charged } from '$lib/server/access';
import { readJson } from '$lib/server/body';
import { problem } from '$lib/server/problem';
import { draw } from '$lib/server/sheets';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = async (event) => {
	allowPublic(event, { rate: true });
	const body = await readJson(event.request);
	if (!body.ok) return body.response;
	const scene = charged(event, () => draw(body.value));
	return scene.ok ? json(scene.value) : problem(400, 'The sheet cannot be drawn from this.', scene.issues);
};
