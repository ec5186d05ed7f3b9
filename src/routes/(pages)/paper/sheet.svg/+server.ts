import { drawPaper, paperOfQuery } from '$lib/components/blank-paper';
import { toSvg } from '$lib/render/svg';
import { allowPublic } from '$lib/server/access';
import { embeddedFontCss } from '$lib/server/fonts';
import { problem } from '$lib/server/problem';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = (event) => {
	allowPublic(event, { rate: true });
	const { scene, issues } = drawPaper(paperOfQuery(event.url.searchParams));
	if (issues.length > 0) return problem(400, 'The paper cannot be drawn like this.', issues);
	return new Response(toSvg(scene, { fontCss: embeddedFontCss(scene) }), {
		headers: {
			'content-type': 'image/svg+xml',
			'content-disposition': 'attachment; filename="reactance-paper.svg"'
		}
	});
};
