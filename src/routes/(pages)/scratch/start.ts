import { fourOfQuery, worksheetOfFour } from '$lib/components/four';
import type { Design } from '$lib/design/design';

/** The design that an address from the front page asks for; null where it asks for none. */
export function startOfQuery(query: URLSearchParams): Design | null {
	return ['f', 'L', 'C', 'source'].some((key) => query.has(key)) ? worksheetOfFour(fourOfQuery(query)) : null;
}
