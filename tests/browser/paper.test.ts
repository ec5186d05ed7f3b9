import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium } from './chromium';
import { openDesk } from './desk';
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

describe('blank paper', () => {
	it('follows the settings', async () => {
		const { page, complaints, close } = await openDesk(browser);
		await page.goto(`${application.url}/paper`, { waitUntil: 'networkidle' });
		const drawing = page.locator('.drawing svg');
		expect(await drawing.getAttribute('viewBox')).toBe('0 0 297 210');
		await page.getByLabel('Paper', { exact: true }).selectOption('A3');
		await page.getByLabel('Orientation').selectOption('portrait');
		await expect.poll(() => drawing.getAttribute('viewBox')).toBe('0 0 297 420');
		await page.getByLabel('Decade, mm').fill('wide');
		await page.getByRole('heading', { name: '1 entry needs another look' }).waitFor();
		expect(await page.getByLabel('Decade, mm').inputValue()).toBe('wide');
		expect(complaints).toEqual([]);
		await close();
	});

	it('works without JavaScript', async () => {
		const { page, close } = await openDesk(browser, { javaScriptEnabled: false });
		await page.goto(`${application.url}/paper`);
		await page.getByLabel('Paper', { exact: true }).selectOption('Letter');
		await page.getByRole('button', { name: 'Draw it' }).click();
		expect(await page.locator('.drawing svg').getAttribute('viewBox')).toBe('0 0 279.4 215.9');
		expect(await page.getByLabel('Paper', { exact: true }).inputValue()).toBe('Letter');
		await close();
	});

	it('comes as PDF and SVG, and refuses what cannot be drawn', async () => {
		const pdf = await fetch(`${application.url}/paper/sheet.pdf?paper=A3&frequencyFrom_Hz=10+Hz`);
		expect((await pdf.text()).slice(0, 8)).toBe('%PDF-1.4');
		const svg = await fetch(`${application.url}/paper/sheet.svg?paper=A4&orientation=portrait`);
		expect(await svg.text()).toContain('viewBox="0 0 210 297"');
		const refused = await fetch(`${application.url}/paper/sheet.pdf?decade_mm=900`);
		expect(refused.status).toBe(400);
		expect(((await refused.json()) as { errors: { pointer: string }[] }).errors[0]?.pointer).toBe(
			'/decade_mm'
		);
	});
});
