import { allowPublic } from '$lib/server/access';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = (event) => {
	allowPublic(event, { rate: true });
};
