import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium } from './chromium';
import { openDesk, violations } from './desk';
import { startApplication, type Application } from './server';

const places = ['/', '/scratch', '/paper', '/method', '/api', '/nowhere'];
const looks = [
	{ colorScheme: 'light', width: 1440 },
	{ colorScheme: 'dark', width: 1440 },
	{ colorScheme: 'light', width: 1024 },
	{ colorScheme: 'light', width: 390 },
	{ colorScheme: 'dark', width: 390 }
] as const;
const cases = places.flatMap((place) => looks.map((look) => ({ place, ...look })));

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

describe('every page', () => {
	it.each(cases)('$place, $colorScheme, at $width px', async ({ place, colorScheme, width }) => {
		const { page, complaints, close } = await openDesk(browser, {
			colorScheme,
			viewport: { width, height: width < 500 ? 844 : 900 }
		});
		const response = await page.goto(application.url + place, { waitUntil: 'networkidle' });
		const status = response?.status() ?? 0;
		expect(status).toBe(place === '/nowhere' ? 404 : 200);
		expect(await violations(page)).toEqual([]);
		expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBe(0);
		// A page that is not there is itself a complaint of the browser.
		expect(complaints.filter((words) => !words.includes('status of 404'))).toEqual([]);
		await close();
	});

	it('loads no writer of PDF into the browser', async () => {
		const { page, close } = await openDesk(browser);
		const scripts: string[] = [];
		page.on('response', async (response) => {
			if (response.url().endsWith('.js')) scripts.push(await response.text());
		});
		await page.goto(`${application.url}/scratch`, { waitUntil: 'networkidle' });
		await page.waitForTimeout(300);
		expect(scripts.length).toBeGreaterThan(0);
		expect(scripts.join('').includes('GTS_PDFA1')).toBe(false);
		await close();
	});

	it('shows the rule that an address of the method page names', async () => {
		const { page, close } = await openDesk(browser);
		await page.goto(`${application.url}/method#discharge`, { waitUntil: 'networkidle' });
		const top = await page.locator('#discharge').evaluate((heading) => heading.getBoundingClientRect().top);
		expect(top).toBeGreaterThanOrEqual(0);
		expect(top).toBeLessThan(300);
		await close();
	});
});
