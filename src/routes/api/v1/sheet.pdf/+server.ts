import { toPdf } from '$lib/render/pdf';
import { allowPublic, charged } from '$lib/server/access';
import { readJson } from '$lib/server/body';
import { sheetFonts } from '$lib/server/fonts';
import { problem } from '$lib/server/problem';
import { draw } from '$lib/server/sheets';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = async (event) => {
	allowPublic(event, { rate: true });
	const body = await readJson(event.request);
	if (!body.ok) return body.response;
	const scene = charged(event, () => draw(body.value));
	if (!scene.ok) return problem(400, 'The sheet cannot be drawn from this.', scene.issues);
	const pdf = await toPdf(scene.value, sheetFonts());
	return new Response(Buffer.from(pdf), {
		headers: { 'content-type': 'application/pdf', 'content-disposition': 'inline; filename="worksheet.pdf"' }
	});
};
