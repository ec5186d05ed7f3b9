import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium } from './chromium';
import { openDesk, write } from './desk';
import { startApplication, type Application } from './server';

let application: Application;
let browser: Browser;

beforeAll(async () => {
	application = await startApplication();
	browser = await launchChromium();
});
afterAll(async () => {
	await browser.close();
	await application.stop();
});

describe('the front page', () => {
	it('answers four numbers as they are typed', async () => {
		const { page, complaints, close } = await openDesk(browser);
		await page.goto(application.url, { waitUntil: 'networkidle' });
		await page.getByText('319–660 nF').first().waitFor();
		await write(page, 'Switching', '132 kHz');
		await write(page, 'Capacitor C', '2u2');
		await page.getByText('reads 2.2 µF').waitFor();
		// 1/(2π · 132 kHz · 5 Ω) = 241.1 nF and 2.2 µF / 5 = 440 nF
		await page.getByText('242–440 nF').first().waitFor();
		expect(await page.locator('[data-role="choice"]').count()).toBeGreaterThan(0);
		expect(complaints).toEqual([]);
		await close();
	});

	it('keeps a text that cannot be read, asks beside it, and goes on counting', async () => {
		const { page, close } = await openDesk(browser);
		await page.goto(application.url, { waitUntil: 'networkidle' });
		await write(page, 'Inductor L', '2,200');
		const field = page.getByLabel('Inductor L', { exact: true });
		await page.getByText('Counting on with').waitFor();
		expect(await field.inputValue()).toBe('2,200');
		expect(await field.getAttribute('aria-invalid')).toBe('true');
		await write(page, 'Capacitor C', '10 µF');
		await page.getByText('319 nF – 2.00 µF').first().waitFor();
		await page.keyboard.press('Escape');
		await page.getByText('319–660 nF').first().waitFor();
		await close();
	});

	it('carries the numbers to the scratch sheet', async () => {
		const { page, close } = await openDesk(browser);
		await page.goto(application.url, { waitUntil: 'networkidle' });
		await write(page, 'Inductor L', '100u');
		await page.getByRole('link', { name: 'Start a worksheet from this' }).filter({ visible: true }).click();
		await page.waitForURL('**/scratch');
		await expect.poll(() => page.getByLabel('Inductor L at full current').inputValue()).toContain('100');
		await close();
	});

	it('works without JavaScript, printing included', async () => {
		const { page, close } = await openDesk(browser, { javaScriptEnabled: false });
		await page.goto(application.url);
		await page.getByLabel('Switching').fill('132 kHz');
		await page.getByLabel('Capacitor C').fill('2u2');
		await page.getByRole('button', { name: 'Draw it' }).click();
		expect(await page.getByText('242–440 nF').count()).toBeGreaterThan(0);
		expect(await page.locator('svg [data-role="window"]').count()).toBeGreaterThan(0);
		await page.getByLabel('Inductor L').fill('100');
		await page.getByRole('button', { name: 'Draw it' }).click();
		expect(await page.getByLabel('Inductor L').inputValue()).toBe('100');
		expect(await page.getByText('Counting on with 150 µH').count()).toBe(1);
		await close();
		const printed = await fetch(`${application.url}/four.pdf`, {
			method: 'POST',
			headers: { 'content-type': 'application/x-www-form-urlencoded', origin: application.url },
			body: 'f=132+kHz&L=150+uH&C=2u2&source=2x50uH'
		});
		expect(printed.headers.get('content-type')).toBe('application/pdf');
		expect((await printed.text()).slice(0, 8)).toBe('%PDF-1.4');
	});

	it.each([
		['f', '1e400 Hz'],
		['L', '-1 µH'],
		['C', `${'9'.repeat(3000)} F`],
		['source', '../../etc']
	])('answers nonsense in %s too', async (key, text) => {
		const address = `${application.url}/?${new URLSearchParams({ [key]: text }).toString()}`;
		expect((await fetch(address)).status).toBe(200);
	});
});
