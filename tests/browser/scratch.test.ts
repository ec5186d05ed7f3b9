import { readFile } from 'node:fs/promises';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { chargerAuxiliary, chargerAuxiliaryFirstTry } from '../../src/lib/design/examples';
import { launchChromium } from './chromium';
import { openDesk, write, type Desk } from './desk';
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

async function openScratch(options = {}): Promise<Desk> {
	const desk = await openDesk(browser, options);
	await desk.page.goto(`${application.url}/scratch`, { waitUntil: 'networkidle' });
	return desk;
}

async function download(page: Page, name: string): Promise<{ name: string; bytes: Buffer }> {
	const [file] = await Promise.all([
		page.waitForEvent('download'),
		page.getByRole('button', { name, exact: true }).press('Enter')
	]);
	return { name: file.suggestedFilename(), bytes: await readFile(await file.path()) };
}

const upload = async (page: Page, name: string, content: string): Promise<void> => {
	await page
		.getByLabel('Design file to open')
		.setInputFiles({ name, mimeType: 'application/json', buffer: Buffer.from(content) });
};

describe('the scratch sheet', () => {
	it('takes the charger from a new design to 330 nF and a PDF, by keyboard', async () => {
		const { page, complaints, close } = await openScratch();
		await write(page, '2.1 f lowest', '126 kHz');
		await page.keyboard.press('Enter');
		await page.keyboard.press('Control+A');
		await page.keyboard.type('138k');
		await write(page, 'Inductor L at full current', '220u');
		await write(page, 'Inductor L minus', '15 %');
		await write(page, 'Inductor L plus', '15 %');
		await write(page, 'Capacitor C at the converter', '2u2');
		await write(page, 'Capacitor C minus', '10 %');
		await write(page, 'Capacitor C plus', '10 %');
		await page.getByRole('button', { name: 'Add an installed source' }).press('Enter');
		await page.getByLabel('Add a rule').selectOption({ label: 'Inrush current' });
		await write(page, '5.5 Discharge Bleed resistor', '940k');
		await write(page, '5.5 Discharge its tolerance', '0 %');
		await write(page, 'Title', 'Charger auxiliary supply');
		await page.getByText('253–396 nF').first().waitFor();
		await page.getByText('281–360 nF').first().waitFor();
		await page.getByRole('button', { name: 'Take 330 nF' }).first().press('Enter');
		await page.getByText('Allowed with its whole tolerance').first().waitFor();
		expect(await page.getByText('+21.1').count()).toBeGreaterThan(0);
		const { name, bytes } = await download(page, 'Print as PDF');
		expect(name).toBe('charger-auxiliary-supply.pdf');
		expect(bytes.subarray(0, 8).toString('latin1')).toBe('%PDF-1.4');
		expect(complaints).toEqual([]);
		await close();
	});

	it('keeps what cannot be read, names its row, and loses nothing on reload', async () => {
		const { page, close } = await openScratch();
		await write(page, 'Capacitor C at the converter', '2,200');
		await page.getByRole('heading', { name: '1 entry needs another look' }).waitFor();
		await page.getByRole('link', { name: /^3\.2 Capacitor: / }).press('Enter');
		const field = page.getByLabel('Capacitor C at the converter');
		expect(await field.evaluate((input) => input === document.activeElement)).toBe(true);
		await write(page, 'Inductor L at full current', '68 µH');
		await page.getByText('68 µH').first().waitFor();
		await page.getByText('Kept in this browser').waitFor();
		await page.reload({ waitUntil: 'networkidle' });
		await expect.poll(() => field.inputValue()).toBe('2,200');
		expect(await page.getByLabel('Inductor L at full current').inputValue()).toBe('68 µH');
		expect(await field.getAttribute('aria-invalid')).toBe('true');
		await close();
	});

	it('asks again about everything that cannot be right, one question at a time', async () => {
		const { page, complaints, close } = await openScratch();
		const heading = page.getByRole('heading', { name: /need(s)? another look$/ });
		for (const [text, label] of [
			['', 'Capacitor C at the converter'],
			['100', 'Capacitor C at the converter'],
			['-1 µF', 'Capacitor C at the converter'],
			['0 H', 'Inductor L at full current'],
			['NaN', 'Inductor L at full current'],
			['1e400 H', 'Inductor L at full current'],
			['😀', 'Voltage U nominal, rms'],
			['41', '2.1 harmonics'],
			['1 V', 'Voltage U highest, rms'],
			['100 %', 'Inductor L minus']
		] as const) {
			await write(page, label, text);
			if (text === '') await page.keyboard.press('Delete');
			await heading.waitFor();
			const field = page.getByLabel(label, { exact: true });
			expect(await field.inputValue()).toBe(text);
			const echo = (await field.getAttribute('aria-describedby')) ?? '';
			expect(await page.locator(`#${echo}`).textContent(), `${label}: ${text}`).toMatch(/\w/);
			await page.keyboard.press('Escape');
			await heading.waitFor({ state: 'detached' });
		}
		expect(complaints).toEqual([]);
		await close();
	});

	it('steps through preferred values, undoes and redoes', async () => {
		const { page, close } = await openScratch();
		const field = page.getByLabel('Capacitor C at the converter');
		await field.focus();
		await page.keyboard.press('ArrowUp');
		await expect.poll(() => field.inputValue()).toMatch(/^6\.8.µF$/);
		await page.keyboard.press('PageDown');
		await expect.poll(() => field.inputValue()).toMatch(/^680.nF$/);
		await page.keyboard.press('Control+z');
		await expect.poll(() => field.inputValue()).toMatch(/^4\.7.µF$/);
		await page.keyboard.press('Control+y');
		await expect.poll(() => field.inputValue()).toMatch(/^680.nF$/);
		await close();
	});

	it('opens what it saved, and says in words what is wrong with a file', async () => {
		const { page, complaints, close } = await openScratch();
		await upload(page, 'charger.json', JSON.stringify(chargerAuxiliary));
		await page.getByText('charger.json is open').waitFor();
		await expect.poll(() => page.getByLabel('Choice Cx', { exact: true }).inputValue()).toMatch(/^330.nF$/);
		const { name, bytes } = await download(page, 'Design file');
		expect(name).toBe('charger-auxiliary-supply.herringbone.json');
		expect(JSON.parse(bytes.toString('utf8'))).toEqual(chargerAuxiliary);
		await upload(page, 'later.json', JSON.stringify({ ...chargerAuxiliary, formatVersion: 9 }));
		await page.getByText('later.json cannot be opened as it is').waitFor();
		expect(await page.getByText('/formatVersion').count()).toBe(1);
		await upload(page, 'photo.json', 'not json');
		await page.getByText('photo.json is not a design file').waitFor();
		expect(await page.getByLabel('Choice Cx', { exact: true }).inputValue()).toMatch(/^330.nF$/);
		expect(complaints).toEqual([]);
		await close();
	});

	it('names a conflict and applies its cure', async () => {
		const { page, close } = await openScratch();
		await upload(page, 'first.json', JSON.stringify(chargerAuxiliaryFirstTry));
		await page.getByText('The window is empty: 5.1 and 5.3 conflict.').waitFor();
		await page.getByRole('button', { name: /^Set it to/ }).press('Enter');
		await page.getByText('The window is empty').waitFor({ state: 'detached' });
		await page.keyboard.press('Control+z');
		await page.getByText('The window is empty').waitFor();
		await close();
	});

	it('opens a rule from its row and from its band', async () => {
		const { page, close } = await openScratch();
		await page.getByRole('button', { name: 'Share of C', exact: true }).press('Enter');
		await page.getByText('In numbers').waitFor();
		expect(await page.locator('.chosen[data-of="share"]').count()).toBeGreaterThan(0);
		await page.locator('[data-role="band"][data-of="reactance"]').first().dispatchEvent('click');
		const row = page.getByRole('button', { name: 'Reactance limit', exact: true });
		await expect.poll(() => row.getAttribute('aria-expanded')).toBe('true');
		await close();
	});

	it('refuses a title that no face can print, and names the character', async () => {
		const { page, close } = await openScratch();
		await write(page, 'Title', 'Filter 電');
		await page.getByRole('heading', { name: '1 entry needs another look' }).waitFor();
		expect(await page.getByText('電').count()).toBeGreaterThan(0);
		expect(await page.getByLabel('Title', { exact: true }).inputValue()).toBe('Filter 電');
		await close();
	});

	it('works at the width of a phone', async () => {
		const { page, complaints, close } = await openScratch({ viewport: { width: 390, height: 844 } });
		await write(page, 'Inductor L at full current', '100 µH');
		await page.getByRole('link', { name: /See the sheet$/ }).click();
		expect(await page.locator('#sheet').isVisible()).toBe(true);
		const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
		expect(overflow).toBeLessThanOrEqual(0);
		expect(complaints).toEqual([]);
		await close();
	});
});
