import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { chargerAuxiliary } from '../../src/lib/design/examples';
import { launchChromium } from './chromium';
import { openDesk, violations, type Desk } from './desk';
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

async function openCharger(options = {}): Promise<Desk> {
	const desk = await openDesk(browser, options);
	await desk.page.goto(`${application.url}/scratch`, { waitUntil: 'networkidle' });
	const limited = {
		...chargerAuxiliary,
		switching: chargerAuxiliary.switching.map((entry) => ({
			...entry,
			current_A: Array.from({ length: entry.harmonics }, (_, n) => 0.1 / (n + 1) ** 2)
		})),
		emission: { limit: 'cispr-32-b', margin_dB: 6 }
	};
	await desk.page.getByLabel('Design file to open').setInputFiles({
		name: 'charger.json',
		mimeType: 'application/json',
		buffer: Buffer.from(JSON.stringify(limited))
	});
	await desk.page.getByText('charger.json is open').waitFor();
	return desk;
}

/** Reflection of 330 nF with 18 nH and 20 mΩ at 50 Ω. */
const reflection = (): string => {
	const rows = Array.from({ length: 61 }, (_, n) => {
		const f = 1e3 * 1e5 ** (n / 60);
		const x = 2 * Math.PI * f * 18e-9 - 1 / (2 * Math.PI * f * 330e-9);
		const size = 50.02 ** 2 + x ** 2;
		return `${f} ${(-49.98 * 50.02 + x * x) / size} ${(100 * x) / size}`;
	});
	return ['! bench, 25 °C', '# Hz S RI R 50', ...rows].join('\n');
};

const offer = (page: Page, name: string, content: string | Buffer): Promise<void> =>
	page
		.getByLabel('Measured file', { exact: true })
		.setInputFiles({ name, mimeType: 'text/plain', buffer: Buffer.from(content) });

describe('measured curves on the scratch sheet', () => {
	it('takes a reflection for the choice, draws it, and lets it go and come back', async () => {
		const { page, complaints, close } = await openCharger();
		// Latin-1, as older analysers write the degree sign.
		await offer(page, 'x2-330n.s1p', Buffer.from(reflection(), 'latin1'));
		expect(await page.getByRole('button', { name: 'Take', exact: true }).count()).toBe(0);
		await page.getByLabel('the part was measured in').selectOption('reflection');
		await page.getByText('fixture reflection, 61 points').waitFor();
		expect(await page.getByText('482.3').count()).toBe(1);
		expect(await page.getByText(/^SHA-256 of the file [0-9a-f]{64}$/).count()).toBe(1);
		await page.getByLabel('it is for').selectOption('choice');
		await page.getByRole('button', { name: 'Take', exact: true }).press('Enter');
		await page.getByText('x2-330n.s1p is taken.').waitFor();
		const drawing = page.locator('#sheet svg').first();
		await expect.poll(() => drawing.innerHTML()).toContain('x2-330n.s1p');
		expect(await page.getByText('stands for Cx').count()).toBe(1);
		expect(await page.getByText('needs another look').count()).toBe(0);
		await page.getByRole('button', { name: /^Remove x2-330n/ }).press('Enter');
		await page.getByText('no longer stands for Cx').waitFor();
		await page.keyboard.press('Control+z');
		await page.getByText('stands for Cx', { exact: false }).first().waitFor();
		expect(await violations(page)).toEqual([]);
		expect(complaints).toEqual([]);
		await close();
	});

	it.each([
		['bad.s1p', '# Hz S RI R 50\n1e3 0 0\n1e3 x 0\n', 'Line 3: “x” is not a finite number'],
		['low.s1p', '# Hz S RI R 50\n2e3 0 0\n1e3 0 0\n', 'Line 3: the frequency does not increase'],
		['bad.csv', 'f (Hz),R (ohm),X (ohm)\n1,1,1\n2,,1\n', 'Line 3: column 2']
	])('refuses %s by its line', async (name, content, words) => {
		const { page, complaints, close } = await openCharger();
		await offer(page, name, content);
		if (name.endsWith('.s1p')) await page.getByLabel('the part was measured in').selectOption('reflection');
		await page.getByText(`${name} cannot be read. ${words}`, { exact: false }).waitFor();
		expect(await page.getByRole('button', { name: 'Take', exact: true }).count()).toBe(0);
		expect(complaints).toEqual([]);
		await close();
	});

	it('tells levels, yield and a damping branch', async () => {
		const { page, complaints, close } = await openCharger();
		await page.getByRole('region', { name: 'Levels at the receiver' }).waitFor();
		await page.getByText(/n = 2 is the first on the limit line/).waitFor();
		await page.getByText(/^Differential mode only: /).waitFor();
		await page.getByText(/of 100 000 parts drawn with seed 1, .*95 % interval/).waitFor();
		await page.getByText('Propose a damping branch').click();
		await page.getByRole('button', { name: 'Take this branch, for L and source' }).press('Enter');
		await expect.poll(() => page.getByLabel('Damping resistor Rd').inputValue()).toMatch(/Ω$/);
		await page.keyboard.press('Control+z');
		await page.getByRole('button', { name: 'Add a damping branch' }).waitFor();
		expect(complaints).toEqual([]);
		await close();
	});

	it('takes a limit line as text and names the row it cannot read', async () => {
		const { page, complaints, close } = await openCharger({ viewport: { width: 390, height: 844 } });
		await page.getByLabel('Limit line', { exact: true }).selectOption('table');
		const text = page.getByLabel(/^frequency with unit/);
		await text.fill('f (kHz);QP;AV\n150;66;56\n140;60;50');
		await page.getByRole('button', { name: 'Take these points' }).press('Enter');
		await page.getByText('Row 3: the frequency does not increase here.').waitFor();
		await text.fill('f (kHz);QP;AV\n150;66,5;56\n30000;60;50');
		await page.getByRole('button', { name: 'Take these points' }).press('Enter');
		await page.getByText('2 points are taken.').waitFor();
		await expect.poll(() => page.getByLabel('Point 1 quasi-peak').inputValue()).toMatch(/^66\.5/);
		const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
		expect(overflow).toBeLessThanOrEqual(0);
		expect(complaints).toEqual([]);
		await close();
	});
});
