import { toSvg } from '$lib/render/svg';
import { allowPublic, charged } from '$lib/server/access';
import { readJson } from '$lib/server/body';
import { embeddedFontCss } from '$lib/server/fonts';
import { problem } from '$lib/server/problem';
import { draw } from '$lib/server/sheets';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = async (event) => {
	allowPublic(event, { rate: true });
	const body = await readJson(event.request);
	if (!body.ok) return body.response;
	const scene = charged(event, () => draw(body.value));
	if (!scene.ok) return problem(400, 'The sheet cannot be drawn from this.', scene.issues);
	const svg = toSvg(scene.value, { fontCss: embeddedFontCss(scene.value) });
	return new Response(svg, {
		headers: { 'content-type': 'image/svg+xml', 'content-disposition': 'inline; filename="worksheet.svg"' }
	});
};
