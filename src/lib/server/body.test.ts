import { describe, expect, it } from 'vitest';
import { BODY_LIMIT, readJson, readText } from './body';

const json = { 'content-type': 'application/json' };

function post(body: BodyInit | null, headers: Record<string, string> = json): Request {
	return new Request('http://127.0.0.1/api', { method: 'POST', body, headers });
}

function streamOf(...chunks: Uint8Array[]): Request {
	const stream = new ReadableStream<Uint8Array>({
		start(controller) {
			for (const chunk of chunks) controller.enqueue(chunk);
			controller.close();
		}
	});
	const init = { method: 'POST', body: stream, headers: json, duplex: 'half' };
	return new Request('http://127.0.0.1/api', init as RequestInit);
}

async function refusal(outcome: Awaited<ReturnType<typeof readJson>>): Promise<[number, string | null]> {
	if (outcome.ok) throw new Error('expected a refusal');
	return [outcome.response.status, outcome.response.headers.get('content-type')];
}

describe('readJson', () => {
	it.each([
		['{"a":1}', { a: 1 }],
		['[]', []],
		['null', null],
		['"µ"', 'µ']
	])('reads %s', async (text, value) => {
		expect(await readJson(post(text))).toEqual({ ok: true, value });
	});

	it('reads JSON whose type has a charset and another case', async () => {
		const request = post('1', { 'content-type': 'Application/JSON; charset=utf-8' });
		expect(await readJson(request)).toEqual({ ok: true, value: 1 });
	});

	it.each([
		['nothing', '', 400],
		['half an object', '{"a":', 400],
		['a number beyond JSON', 'NaN', 400],
		['broken UTF-8', new Uint8Array([0x22, 0xc3, 0x28, 0x22]), 400]
	])('refuses %s', async (_, body, status) => {
		expect(await refusal(await readJson(post(body)))).toEqual([status, 'application/problem+json']);
	});

	it.each(['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data', ''])(
		'refuses the media type "%s" with 415',
		async (type) => {
			const outcome = await readJson(post('{}', type ? { 'content-type': type } : {}));
			expect(await refusal(outcome)).toEqual([415, 'application/problem+json']);
		}
	);
});

it('refuses a packed body with 415, and takes one that says it is not', async () => {
	expect(await refusal(await readJson(post('{}', { ...json, 'content-encoding': 'gzip' })))).toEqual([
		415,
		'application/problem+json'
	]);
	expect((await readJson(post('{}', { ...json, 'content-encoding': 'identity' }))).ok).toBe(true);
});

describe('the limit', () => {
	const exactly = new Uint8Array(BODY_LIMIT).fill(0x20);

	it('is 256 KB, and a body of just that is read', async () => {
		expect(BODY_LIMIT).toBe(262_144);
		expect(await readText(streamOf(exactly))).toEqual({ ok: true, text: ' '.repeat(BODY_LIMIT) });
	});

	it('holds for a body that does not declare its length', async () => {
		const outcome = await readJson(streamOf(exactly, new Uint8Array([0x31])));
		expect(await refusal(outcome)).toEqual([413, 'application/problem+json']);
	});

	it('refuses a declared length without reading', async () => {
		const request = post('{}', { ...json, 'content-length': String(BODY_LIMIT + 1) });
		expect((await refusal(await readJson(request)))[0]).toBe(413);
		expect(request.bodyUsed).toBe(false);
	});

	const failing = (cause: Error): Request => {
		const stream = new ReadableStream({ start: (controller) => controller.error(cause) });
		const init = { method: 'POST', body: stream, headers: json, duplex: 'half' } as RequestInit;
		return new Request('http://127.0.0.1/', init);
	};

	it('turns the server\u2019s own refusal into the same answer', async () => {
		const outcome = await readJson(failing(Object.assign(new Error('too large'), { status: 413 })));
		expect((await refusal(outcome))[0]).toBe(413);
	});

	it('takes a client that hangs up for no fault of the server', async () => {
		const outcome = await readJson(failing(Object.assign(new Error('aborted'), { code: 'ECONNRESET' })));
		expect((await refusal(outcome))[0]).toBe(400);
	});

	it('does not hide another fault of the stream', async () => {
		await expect(readJson(failing(new Error('broken')))).rejects.toThrow('broken');
	});
});
