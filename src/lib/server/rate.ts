export interface RateOptions {
	/** Requests that a rested address may send at once. */
	readonly burst: number;
	/** Requests per second that come back. */
	readonly perSecond: number;
	/** Addresses remembered; the one that was quiet longest is forgotten first. */
	readonly capacity?: number;
	/** Milliseconds that never run backwards. */
	readonly clock?: () => number;
}

export interface Rate {
	/** Takes one token: 0 when there was one, else the whole seconds to wait [s]. */
	take(address: string): number;
	/** Takes tokens for work that an answered request turned out to need; the bucket may go below zero. */
	charge(address: string, tokens: number): void;
	readonly size: number;
}

interface Bucket {
	tokens: number;
	at: number;
}

/** An IPv6 site has a whole /64 to itself, so its addresses share one bucket; an IPv4 address has its own. */
export function rateKey(address: string): string {
	const mapped = /^::ffff:(\d+\.\d+\.\d+\.\d+)$/i.exec(address);
	if (mapped?.[1]) return mapped[1];
	if (!address.includes(':')) return address;
	const [head = '', tail] = address.split('::');
	const left = head === '' ? [] : head.split(':');
	const right = tail ? tail.split(':') : [];
	const zeros = tail === undefined ? 0 : Math.max(0, 8 - left.length - right.length);
	const groups = [...left, ...Array<string>(zeros).fill('0'), ...right];
	return groups
		.slice(0, 4)
		.map((group) => group.toLowerCase().replace(/^0+(?=.)/, ''))
		.join(':');
}

/** Keeps a bucket of tokens for each address, in bounded memory. */
export function createRate(options: RateOptions): Rate {
	const { burst, perSecond, capacity = 10_000, clock = () => performance.now() } = options;
	const buckets = new Map<string, Bucket>();

	function forgetQuietest() {
		const [oldest] = buckets.keys();
		if (oldest !== undefined) buckets.delete(oldest);
	}

	return {
		take(address) {
			const key = rateKey(address);
			const now = clock();
			const known = buckets.get(key);
			const refilled = known ? known.tokens + ((now - known.at) / 1000) * perSecond : burst;
			const tokens = Math.min(burst, refilled);
			// A Map keeps the order of insertion: taken out and put back, the key is the youngest.
			buckets.delete(key);
			if (buckets.size >= capacity) forgetQuietest();
			buckets.set(key, { tokens: tokens >= 1 ? tokens - 1 : tokens, at: now });
			return tokens >= 1 ? 0 : Math.ceil((1 - tokens) / perSecond);
		},
		charge(address, tokens) {
			const bucket = buckets.get(rateKey(address));
			if (bucket) bucket.tokens -= tokens;
		},
		get size() {
			return buckets.size;
		}
	};
}
