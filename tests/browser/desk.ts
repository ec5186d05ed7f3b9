/** A browser page that fails its test on anything the console or the content policy has to say. */
import { readFileSync } from 'node:fs';
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';

export interface Desk {
	readonly page: Page;
	/** Errors of the console and of scripts, the browser's refusals by the content policy among them. */
	readonly complaints: string[];
	close(): Promise<void>;
}

export async function openDesk(browser: Browser, options: BrowserContextOptions = {}): Promise<Desk> {
	const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, ...options });
	const page = await context.newPage();
	const complaints: string[] = [];
	page.on('console', (message) => {
		if (message.type() === 'error') complaints.push(message.text());
	});
	page.on('pageerror', (error) => complaints.push(String(error)));
	return { page, complaints, close: () => context.close() };
}

/** Writes into a field as hands do: focus, mark all, type. */
export async function write(page: Page, label: string, text: string): Promise<void> {
	await page.getByLabel(label, { exact: true }).focus();
	await page.keyboard.press('Control+A');
	await page.keyboard.type(text);
}

const axeSource = readFileSync(new URL('../../node_modules/axe-core/axe.min.js', import.meta.url), 'utf8');

interface AxeResult {
	readonly violations: readonly {
		readonly id: string;
		readonly nodes: readonly { readonly html: string }[];
	}[];
}

/** What is against WCAG 2.2 A and AA on the page, one line for each rule and element. */
export async function violations(page: Page): Promise<string[]> {
	await page.evaluate(axeSource);
	const result = await page.evaluate<AxeResult>(
		`axe.run(document, { runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'] })`
	);
	return result.violations.flatMap(({ id, nodes }) =>
		nodes.map(({ html }) => `${id}: ${html.slice(0, 160)}`)
	);
}
