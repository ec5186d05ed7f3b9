/** Draws the lots beside the page, which stays free for typing. */
import { simulateYield, type Lot, type Share } from '$lib/rules/yield';
import type { Interval } from '$lib/quantity/interval';

export interface YieldRequest {
	readonly ticket: number;
	readonly lot: Lot;
	readonly windows: readonly Interval[];
	readonly count: number;
	readonly seed: number;
}

export interface YieldAnswer {
	readonly ticket: number;
	readonly share: Share;
}

self.addEventListener('message', ({ data }: MessageEvent<YieldRequest>) => {
	const { ticket, lot, windows, count, seed } = data;
	const answer: YieldAnswer = { ticket, share: simulateYield(lot, windows, { count, seed }) };
	self.postMessage(answer);
});
