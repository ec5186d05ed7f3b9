/**
 * The guards. Each load, action and endpoint calls one as its first statement, and only here and in
 * routes/ is a request refused.
 */
import { error, type RequestEvent } from '@sveltejs/kit';
import { createRate } from './rate';

/** The public routes' allowance for each address: a burst of 600, then 60 a second. */
const publicRate = createRate({ burst: 600, perSecond: 60 });

export interface PublicAccess {
	/** Count this request against the address's allowance. */
	readonly rate?: boolean;
}

/**
 * Lets anybody in, and says so; with `rate`, refuses an address that asks too often (429 and Retry-After).
 *
 * @example export const POST: RequestHandler = (event) => { allowPublic(event, { rate: true }); … }
 */
export function allowPublic(
	event: Pick<RequestEvent, 'getClientAddress' | 'setHeaders'>,
	{ rate = false }: PublicAccess = {}
): void {
	if (!rate) return;
	const wait = publicRate.take(event.getClientAddress());
	if (wait === 0) return;
	event.setHeaders({ 'retry-after': String(wait) });
	error(429, `Too many requests from this address. Try again in ${wait} s.`);
}

/** What an ordinary design needs on any machine is free; beyond it 5 ms of the processor cost a request [ms]. */
const FREE_TIME = 50;
const TIME_PER_TOKEN = 5;

/**
 * Does the work of a public route and charges the address for a design that takes unusually long, so that few
 * heavy requests use up the allowance of many light ones.
 *
 * @param event the request
 * @param work calculation, synchronous
 * @returns what the work returns
 * @throws what the work throws
 * @example const evaluation = charged(event, () => evaluate(design));
 */
export function charged<Result>(event: Pick<RequestEvent, 'getClientAddress'>, work: () => Result): Result {
	const before = process.cpuUsage();
	try {
		return work();
	} finally {
		const { user, system } = process.cpuUsage(before);
		const beyond = (user + system) / 1000 - FREE_TIME;
		if (beyond > 0) publicRate.charge(event.getClientAddress(), beyond / TIME_PER_TOKEN);
	}
}

const safeMethods = new Set(['GET', 'HEAD', 'OPTIONS', 'TRACE']);

/** The media types that a page of any site can send here without asking first. */
const formTypes = /^\s*(?:application\/x-www-form-urlencoded|multipart\/form-data|text\/plain)\s*(?:;|$)/i;

/**
 * Whether a changing request was sent by another site's page. Browsers name their origin in each of
 * them; programs name none, and those may talk to the API, whose endpoints read no form types.
 */
export function isCrossSite(request: Request, url: URL): boolean {
	if (safeMethods.has(request.method)) return false;
	const origin = request.headers.get('origin');
	if (origin !== null) return origin !== url.origin;
	return !url.pathname.startsWith('/api/') && formTypes.test(request.headers.get('content-type') ?? '');
}

/**
 * Whether a page was asked for by the machine's other name: a form on it would count as another site's.
 * Only on the loopback address; elsewhere names are the business of whoever set ORIGIN.
 */
export function isOtherName(request: Request, url: URL): boolean {
	if (request.method !== 'GET' || url.hostname !== '127.0.0.1') return false;
	return request.headers.get('host') === `localhost:${url.port}`;
}
