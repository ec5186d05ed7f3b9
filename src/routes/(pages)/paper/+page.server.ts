import { paperOfQuery } from '$lib/components/blank-paper';
import { allowPublic } from '$lib/server/access';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = (event) => {
	allowPublic(event, { rate: true });
	return { text: paperOfQuery(event.url.searchParams) };
};
