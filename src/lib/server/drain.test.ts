import { describe, expect, it } from 'vitest';
import { drained } from './drain';

const answer = new Response('no', { status: 413 });

const requestOf = (body: ReadableStream<Uint8Array>): Request =>
	new Request('http://127.0.0.1/', { method: 'POST', body, duplex: 'half' } as RequestInit);

/** A body of so many pieces of a megabyte, and how many were taken. */
const megabytes = (count: number): { stream: ReadableStream<Uint8Array>; taken: () => number } => {
	let taken = 0;
	const stream = new ReadableStream<Uint8Array>(
		{
			pull(controller) {
				if (taken === count) controller.close();
				else {
					taken += 1;
					controller.enqueue(new Uint8Array(1024 * 1024));
				}
			}
		},
		{ highWaterMark: 0 }
	);
	return { stream, taken: () => taken };
};

describe('drained', () => {
	it('reads a body to its end before it answers', async () => {
		const body = megabytes(5);
		expect(await drained(requestOf(body.stream), answer)).toBe(answer);
		expect(body.taken()).toBe(5);
	});

	it('loses patience with a body that does not end', async () => {
		const body = megabytes(1000);
		expect(await drained(requestOf(body.stream), answer)).toBe(answer);
		expect(body.taken()).toBe(9);
	});

	it('leaves a body that was read to its end as a form', async () => {
		const form = new URLSearchParams({ title: 'Filter' });
		const request = new Request('http://127.0.0.1/', { method: 'POST', body: form });
		await request.formData();
		expect(await drained(request, answer)).toBe(answer);
	});

	it('answers where there is no body, or a broken one', async () => {
		expect(await drained(new Request('http://127.0.0.1/'), answer)).toBe(answer);
		const broken = new ReadableStream<Uint8Array>({
			start(controller) {
				controller.error(new Error('gone'));
			}
		});
		expect(await drained(requestOf(broken), answer)).toBe(answer);
	});
});
