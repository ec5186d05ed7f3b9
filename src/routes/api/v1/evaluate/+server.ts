import { json } from '@sveltejs/kit';
import { evaluate } from '$lib/rules/evaluate';
import { toAnswer } from '$lib/rules/answer';
import { allowPublic, charged } from '$lib/server/access';
import { readJson } from '$lib/server/body';
import { problem } from '$lib/server/problem';
import { readDesign } from '$lib/server/sheets';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = async (event) => {
	allowPublic(event, { rate: true });
	const body = await readJson(event.request);
	if (!body.ok) return body.response;
	const design = readDesign(body.value);
	if (!design.ok) return problem(400, 'The design cannot be evaluated as it is.', design.issues);
	const evaluation = charged(event, () => evaluate(design.value));
	return json(toAnswer(evaluation));
};
