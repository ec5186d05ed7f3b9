import { drawPaper, paperOfQuery } from '$lib/components/blank-paper';
import { toPdf } from '$lib/render/pdf';
import { allowPublic } from '$lib/server/access';
import { sheetFonts } from '$lib/server/fonts';
import { problem } from '$lib/server/problem';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async (event) => {
	allowPublic(event, { rate: true });
	const { scene, issues } = drawPaper(paperOfQuery(event.url.searchParams));
	if (issues.length > 0) return problem(400, 'The paper cannot be drawn like this.', issues);
	const pdf = await toPdf(scene, sheetFonts());
	return new Response(Buffer.from(pdf), {
		headers: {
			'content-type': 'application/pdf',
			'content-disposition': 'inline; filename="reactance-paper.pdf"'
		}
	});
};
