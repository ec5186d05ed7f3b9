import { answerFour, fourOfQuery, fourTitle } from '$lib/components/four';
import { toPdf } from '$lib/render/pdf';
import { allowPublic } from '$lib/server/access';
import { readText } from '$lib/server/body';
import { sheetFonts } from '$lib/server/fonts';
import { composeSheet } from '$lib/sheet/compose';
import type { RequestHandler } from './$types';

const LIMIT = 4096;

/** The front page's sheet as a file. Its strip stays off: it would print a supply that nobody stated. */
export const POST: RequestHandler = async (event) => {
	allowPublic(event, { rate: true });
	const body = await readText(event.request, { limit: LIMIT, types: ['application/x-www-form-urlencoded'] });
	if (!body.ok) return body.response;
	const answer = answerFour(fourOfQuery(new URLSearchParams(body.text)));
	const scene = composeSheet({
		design: answer.design,
		evaluation: answer.evaluation,
		layout: { paper: 'A4', orientation: 'landscape', strip: false },
		kind: 'worked',
		titleBlock: { title: answer.design.title, supplementaryTitle: fourTitle(answer) }
	});
	const pdf = await toPdf(scene, sheetFonts());
	return new Response(Buffer.from(pdf), {
		headers: {
			'content-type': 'application/pdf',
			'content-disposition': 'inline; filename="herringbone.pdf"'
		}
	});
};
