import { isHttpError } from '@sveltejs/kit';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { allowPublic, charged, isCrossSite, isOtherName } from './access';

function visitor(address: string) {
	const headers: Record<string, string> = {};
	return {
		headers,
		getClientAddress: () => address,
		setHeaders: (more: Record<string, string>) => void Object.assign(headers, more)
	};
}

describe('allowPublic', () => {
	it('counts nothing where no rate is asked for', () => {
		const event = visitor('192.0.2.10');
		for (let i = 0; i < 1000; i += 1) allowPublic(event);
		expect(() => allowPublic(event, { rate: true })).not.toThrow();
	});

	it('refuses with 429 and Retry-After once the burst is used up', () => {
		const event = visitor('192.0.2.11');
		const refused: unknown[] = [];
		for (let i = 0; i < 1000; i += 1) {
			try {
				allowPublic(event, { rate: true });
			} catch (refusal) {
				refused.push(refusal);
			}
		}
		expect(refused.length).toBeGreaterThan(0);
		expect(refused.every((refusal) => isHttpError(refusal, 429))).toBe(true);
		expect(event.headers['retry-after']).toBe('1');
	});
});

describe('charged', () => {
	afterEach(() => vi.restoreAllMocks());

	/** The processor's clock, told to have run for so long. */
	const working = (milliseconds: number) =>
		vi.spyOn(process, 'cpuUsage').mockReturnValue({ user: milliseconds * 1000, system: 0 });
	const taken = (address: string) => {
		let count = 0;
		try {
			for (; count < 2000; count += 1) allowPublic(visitor(address), { rate: true });
		} catch (refusal) {
			if (!isHttpError(refusal, 429)) throw refusal;
		}
		return count;
	};

	it('charges nothing for ordinary work and returns what it gave', () => {
		working(49);
		allowPublic(visitor('192.0.2.21'), { rate: true });
		expect(charged(visitor('192.0.2.21'), () => 42)).toBe(42);
		expect(taken('192.0.2.21')).toBeGreaterThanOrEqual(599);
	});

	it('charges heavy work, whether it ends well or throws', () => {
		allowPublic(visitor('192.0.2.22'), { rate: true });
		working(10_050);
		expect(charged(visitor('192.0.2.22'), () => 'done')).toBe('done');
		expect(() =>
			charged(visitor('192.0.2.22'), () => {
				throw new RangeError('no');
			})
		).toThrow('no');
		// 2 × 2000 tokens are owed; at 60 a second no busy machine gives them back in between.
		expect(taken('192.0.2.22')).toBe(0);
	});

	it('lets the next request wait for what is owed', () => {
		working(10_050);
		const event = visitor('192.0.2.23');
		allowPublic(event, { rate: true });
		charged(event, () => null);
		expect(() => allowPublic(event, { rate: true })).toThrow();
		expect(Number(event.headers['retry-after'])).toBeGreaterThan(10);
	});
});

describe('isCrossSite', () => {
	const here = 'http://127.0.0.1:4600';
	const form = 'application/x-www-form-urlencoded';

	it.each([
		['GET', '/', 'https://elsewhere.test', '', false, 'reading changes nothing'],
		['POST', '/scratch', here, form, false, 'our own form'],
		['POST', '/scratch', 'https://elsewhere.test', form, true, 'a form of another site'],
		['POST', '/scratch', 'http://localhost:4600', form, true, 'another name is another origin'],
		['POST', '/scratch', 'null', form, true, 'a sandboxed page'],
		['POST', '/scratch', null, form, true, 'a form whose origin was taken away'],
		['POST', '/scratch', null, 'text/plain; charset=utf-8', true, 'plain text is a form type too'],
		['POST', '/api/v1/evaluate', null, 'application/json', false, 'a program'],
		['POST', '/api/v1/evaluate', null, form, false, 'a program that the endpoint answers with 415'],
		[
			'POST',
			'/api/v1/evaluate',
			'https://elsewhere.test',
			'application/json',
			true,
			'a script of another site'
		],
		['DELETE', '/api/v1/session', 'https://elsewhere.test', '', true, 'whatever the method']
	])('%s %s from %s as "%s" → %s (%s)', (method, path, origin, type, expected, _why) => {
		const headers = new Headers();
		if (origin !== null) headers.set('origin', origin);
		if (type) headers.set('content-type', type);
		const url = new URL(path, here);
		expect(isCrossSite(new Request(url, { method, headers }), url)).toBe(expected);
	});
});

it.each([
	['GET', 'localhost:4600', 'http://127.0.0.1:4600/', true],
	['GET', '127.0.0.1:4600', 'http://127.0.0.1:4600/', false],
	['POST', 'localhost:4600', 'http://127.0.0.1:4600/', false],
	['GET', 'localhost:3000', 'http://127.0.0.1:4600/', false],
	['GET', 'localhost:4600', 'https://filters.example/', false]
])('isOtherName: %s by %s where %s is the address → %s', (method, host, address, expected) => {
	expect(isOtherName(new Request(address, { method, headers: { host } }), new URL(address))).toBe(expected);
});
