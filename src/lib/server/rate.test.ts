import { describe, expect, it } from 'vitest';
import { createRate, rateKey } from './rate';

function withClock(capacity?: number) {
	const time = { ms: 0 };
	const rate = createRate({ burst: 600, perSecond: 60, capacity, clock: () => time.ms });
	return { rate, time };
}

function takeMany(rate: ReturnType<typeof createRate>, address: string, count: number): number {
	let served = 0;
	for (let i = 0; i < count; i += 1) if (rate.take(address) === 0) served += 1;
	return served;
}

describe('createRate', () => {
	it('serves a burst of 600 and then asks to wait a second', () => {
		const { rate } = withClock();
		expect(takeMany(rate, '192.0.2.1', 601)).toBe(600);
		expect(rate.take('192.0.2.1')).toBe(1);
	});

	it('gives 60 a second back, and no more than the burst', () => {
		const { rate, time } = withClock();
		takeMany(rate, '192.0.2.1', 600);
		time.ms = 1000;
		expect(takeMany(rate, '192.0.2.1', 100)).toBe(60);
		time.ms = 3_600_000;
		expect(takeMany(rate, '192.0.2.1', 1000)).toBe(600);
	});

	it('does not charge a refused request', () => {
		const { rate, time } = withClock();
		takeMany(rate, '192.0.2.1', 5000);
		time.ms = 1000;
		expect(takeMany(rate, '192.0.2.1', 60)).toBe(60);
	});

	it('keeps addresses apart', () => {
		const { rate } = withClock();
		takeMany(rate, '192.0.2.1', 601);
		expect(rate.take('192.0.2.2')).toBe(0);
	});

	it('remembers no more addresses than its capacity, the quietest forgotten first', () => {
		const { rate } = withClock(3);
		takeMany(rate, '192.0.2.1', 600);
		for (const host of [2, 3]) rate.take(`192.0.2.${host}`);
		expect(rate.take('192.0.2.1')).toBe(1);
		for (const host of [4, 5]) rate.take(`192.0.2.${host}`);
		expect(rate.size).toBe(3);
		expect(rate.take('192.0.2.1')).toBe(1);
	});
});

describe('charge', () => {
	it('takes more than one token for work that needed more, and waits for all of them', () => {
		const { rate } = withClock(3);
		rate.take('192.0.2.9');
		rate.charge('192.0.2.9', 599 + 120);
		expect(rate.take('192.0.2.9')).toBe(3);
	});

	it('knows nothing of an address that never asked', () => {
		const { rate } = withClock(3);
		rate.charge('192.0.2.8', 1000);
		expect(rate.take('192.0.2.8')).toBe(0);
	});
});

describe('rateKey', () => {
	it.each([
		['192.0.2.1', '192.0.2.1', 'IPv4: the address'],
		['::ffff:192.0.2.1', '192.0.2.1', 'IPv4 seen through an IPv6 socket'],
		['2001:db8:1:2:3:4:5:6', '2001:db8:1:2', 'IPv6: the /64'],
		['2001:DB8:1:2::9', '2001:db8:1:2', 'the same /64, shortened'],
		['2001:db8::1', '2001:db8:0:0', 'zeros left out in front'],
		['2001:0db8:0000:0000:1::', '2001:db8:0:0', 'zeros written out'],
		['::1', '0:0:0:0', 'loopback']
	])('%s → %s (%s)', (address, key) => {
		expect(rateKey(address)).toBe(key);
	});
});
