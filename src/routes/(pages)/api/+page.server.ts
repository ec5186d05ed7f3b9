import { chargerAuxiliary } from '$lib/design/examples';
import { toAnswer } from '$lib/rules/answer';
import { evaluate } from '$lib/rules/evaluate';
import { allowPublic } from '$lib/server/access';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = (event) => {
	allowPublic(event);
	const { windows, recommended_F } = toAnswer(evaluate(chargerAuxiliary));
	return {
		origin: event.url.origin,
		design: JSON.stringify(chargerAuxiliary, null, 2),
		answer: JSON.stringify({ windows, recommended_F }, null, 2)
	};
};
