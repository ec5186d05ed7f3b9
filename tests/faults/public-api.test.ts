/** The public routes of the built server, asked well and badly: a bad question gets 400 and says what to enter. */
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
	avionicsConverter,
	chargerAuxiliary,
	chargerAuxiliaryFirstTry,
	servoControl
} from '$lib/design/examples';
import { newDesign } from '$lib/design/start';
import { startApplication, type Application } from '../browser/server';
import { spoilt, stretched } from './designs';

const design = chargerAuxiliary;
const layout = { paper: 'A4', orientation: 'landscape' };

let application: Application;

beforeAll(async () => {
	application = await startApplication();
});

afterAll(async () => {
	await application.stop();
});

const sendText = (path: string, body: string, type = 'application/json'): Promise<Response> =>
	fetch(`${application.url}/api/v1/${path}`, { method: 'POST', headers: { 'content-type': type }, body });

const send = (path: string, body: unknown): Promise<Response> => sendText(path, JSON.stringify(body));

interface Problem {
	readonly title: string;
	readonly status: number;
	readonly errors: readonly { readonly pointer: string; readonly detail: string }[];
}

const problemOf = async (response: Response): Promise<Problem> => {
	expect(response.headers.get('content-type')).toBe('application/problem+json');
	const problem = (await response.json()) as Problem;
	expect(problem.status).toBe(response.status);
	return problem;
};

describe('a good question', () => {
	it.each([
		design,
		chargerAuxiliaryFirstTry,
		avionicsConverter,
		servoControl,
		newDesign('ac'),
		newDesign('dc')
	])('evaluates $title', async (asked) => {
		const response = await send('evaluate', asked);
		expect(response.status).toBe(200);
		expect(response.headers.get('content-type')).toBe('application/json');
		const answer = (await response.json()) as Record<string, unknown[]>;
		expect(answer.findings).toHaveLength(asked.rules.length);
	});

	it.each([
		['the worked sheet', { design }, 'worked', 297, 210],
		['a step', { design, layout, kind: 'step', step: 3 }, 'step', 297, 210],
		['the last step', { design, kind: 'step', step: 8 }, 'step', 297, 210],
		['blank paper', {}, 'blank', 297, 210],
		[
			'blank A3 upright',
			{ layout: { paper: 'A3', orientation: 'portrait' }, kind: 'blank' },
			'blank',
			297,
			420
		]
	])('draws %s as SVG, PDF and JSON', async (_, asked, kind, width, height) => {
		const svg = await send('sheet.svg', asked);
		expect([svg.status, svg.headers.get('content-type')]).toEqual([200, 'image/svg+xml']);
		expect(await svg.text()).toContain(`viewBox="0 0 ${String(width)} ${String(height)}"`);
		const pdf = await send('sheet.pdf', asked);
		expect([pdf.status, pdf.headers.get('content-type')]).toEqual([200, 'application/pdf']);
		expect(pdf.headers.get('content-disposition')).toMatch(/^inline; filename="[\w.-]+\.pdf"$/);
		expect((await pdf.text()).slice(0, 8)).toBe('%PDF-1.4');
		const json = await send('sheet.json', asked);
		expect([json.status, json.headers.get('content-type')]).toEqual([200, 'application/json']);
		expect(await json.json()).toMatchObject({ width, height, metadata: { kind } });
	});

	it('gives the same bytes again', async () => {
		const bytes = async (path: string) => Buffer.from(await (await send(path, { design })).arrayBuffer());
		for (const path of ['sheet.svg', 'sheet.pdf'])
			expect((await bytes(path)).equals(await bytes(path))).toBe(true);
	});

	it.each(['design', 'layout'])('publishes the schema of the %s', async (name) => {
		const response = await fetch(`${application.url}/api/v1/schema/${name}.json`);
		expect(response.status).toBe(200);
		expect(await response.json()).toMatchObject({ $schema: 'https://json-schema.org/draft/2020-12/schema' });
	});
});

describe('a bad question', () => {
	it.each<[what: string, body: unknown, pointer: string]>([
		['null', null, ''],
		['a list', [], ''],
		['an unknown key', { ...design, colour: 1 }, '/colour'],
		[
			'a harmonic too many',
			{ ...design, switching: [{ ...design.switching[0], harmonics: 41 }] },
			'/switching/0/harmonics'
		],
		[
			'a tolerance of one',
			{ ...design, inductor: { inductance_H: 1e-4, tolerance: 1 } },
			'/inductor/tolerance'
		],
		['a title that cannot be printed', { ...design, title: 'Filter 😀' }, '/title']
	])('to evaluate: %s', async (_, body, pointer) => {
		const response = await send('evaluate', body);
		expect(response.status).toBe(400);
		expect((await problemOf(response)).errors).toEqual([
			{ pointer, detail: expect.stringMatching(/\.$/) as string }
		]);
	});

	it.each<[what: string, body: unknown, pointer: string]>([
		['a worked sheet without a design', { kind: 'worked' }, '/design'],
		['a step without a design', { kind: 'step', step: 1 }, '/design'],
		['a step without its number', { design, kind: 'step' }, '/step'],
		['a step past the last', { design, kind: 'step', step: 9 }, '/step'],
		['step nought', { design, kind: 'step', step: 0 }, '/step'],
		['an unknown kind', { design, kind: 'poster' }, '/kind'],
		['an unknown paper', { layout: { ...layout, paper: 'B5' } }, '/layout/paper'],
		['decades too long for the paper', { layout: { ...layout, decade_mm: 150 } }, '/layout/decade_mm'],
		[
			'an axis that starts between decades',
			{ layout: { ...layout, frequencyFrom_Hz: 2e3 } },
			'/layout/frequencyFrom_Hz'
		],
		['a bad design', { design: { ...design, notes: 1 } }, '/design/notes'],
		['a title that cannot be printed', { titleBlock: { title: '電源' } }, '/titleBlock/title'],
		['a state', { design, titleBlock: { state: 'Issued' } }, '/titleBlock/state'],
		['a mark', { design, titleBlock: { mark: 'A' } }, '/titleBlock/mark'],
		['an approver', { design, titleBlock: { approver: 'A. Person' } }, '/titleBlock/approver'],
		['a date of issue', { design, titleBlock: { dateOfIssue: '2024-01-01' } }, '/titleBlock/dateOfIssue'],
		['a check code', { design, titleBlock: { checkCode: 'ABCD' } }, '/titleBlock/checkCode']
	])('for a sheet: %s', async (_, body, pointer) => {
		for (const path of ['sheet.svg', 'sheet.pdf', 'sheet.json']) {
			const response = await send(path, body);
			expect(response.status).toBe(400);
			expect((await problemOf(response)).errors).toEqual([
				{ pointer, detail: expect.stringMatching(/\.$/) as string }
			]);
		}
	});

	it.each(['evaluate', 'sheet.svg', 'sheet.pdf', 'sheet.json'])(
		'%s: bodies that are no JSON',
		async (path) => {
			for (const body of ['', '{', 'NaN', '{"title":}', '\u0000']) {
				const response = await sendText(path, body);
				expect([body, response.status]).toEqual([body, 400]);
				await problemOf(response);
			}
		}
	);

	it.each(['evaluate', 'sheet.svg', 'sheet.pdf', 'sheet.json'])('%s: other types and sizes', async (path) => {
		const typed = await sendText(path, '{}', 'text/plain');
		expect(typed.status).toBe(415);
		await problemOf(typed);
		for (const kilobytes of [256, 400, 600, 3000]) {
			const large = await sendText(path, JSON.stringify({ notes: 'x'.repeat(kilobytes * 1024) }));
			expect([kilobytes, large.status]).toEqual([kilobytes, 413]);
			await problemOf(large);
		}
	});

	it('a number past the range of a double', async () => {
		const body = JSON.stringify(design).replace('"inductance_H":0.00022', '"inductance_H":1e400');
		const { errors } = await problemOf(await sendText('evaluate', body));
		expect(errors.map(({ pointer }) => pointer)).toEqual(['/inductor/inductance_H']);
	});

	it('a tree made to exhaust the stack', async () => {
		const deep = '['.repeat(100_000) + ']'.repeat(100_000);
		const body = JSON.stringify({ ...design, notes: 0 }).replace('"notes":0', `"notes":${deep}`);
		expect((await sendText('evaluate', body)).status).toBe(400);
	});

	it('another method', async () => {
		for (const path of ['evaluate', 'sheet.svg', 'sheet.pdf', 'sheet.json']) {
			const response = await fetch(`${application.url}/api/v1/${path}`);
			expect(response.status).toBe(405);
			await problemOf(response);
		}
	});
});

describe('whatever is asked', () => {
	const papers = fc.constantFrom('A4', 'A3', 'Letter', 'Tabloid', 'A5');
	const layouts = fc.record(
		{
			paper: papers,
			orientation: fc.constantFrom('landscape', 'portrait'),
			decade_mm: fc.oneof(fc.integer({ min: 1, max: 120 }), fc.double()),
			frequencyFrom_Hz: fc.constantFrom(1e-3, 0.1, 1, 1e3, 1e9, 1e10, 5),
			impedanceFrom_ohm: fc.constantFrom(1e-9, 1e-3, 1, 1e6, 1e9, -1),
			ink: fc.constantFrom('colour', 'mono'),
			strip: fc.boolean(),
			benefitPane: fc.boolean(),
			zones: fc.boolean(),
			decimalMark: fc.constantFrom('.', ','),
			language: fc.constantFrom('en', 'de')
		},
		{ requiredKeys: ['paper', 'orientation'] }
	);
	const sheets = fc.record(
		{
			design: fc.oneof(stretched(), stretched(chargerAuxiliary), spoilt()),
			layout: layouts,
			kind: fc.constantFrom('blank', 'step', 'worked'),
			step: fc.integer({ min: -1, max: 18 }),
			titleBlock: fc.record(
				{ title: fc.string(), number: fc.string({ maxLength: 20 }) },
				{ requiredKeys: [] }
			)
		},
		{ requiredKeys: [] }
	);

	const answers = async (path: string, body: unknown): Promise<void> => {
		const response = await send(path, body);
		if (response.status === 200) {
			// The letters of an embedded face may spell anything.
			const text = (await response.text()).replace(/base64,[\w+/=]+/g, '');
			expect(path === 'sheet.pdf' || !/\b(NaN|Infinity|undefined)\b/.test(text)).toBe(true);
			return;
		}
		expect(response.status).toBe(400);
		const { errors } = await problemOf(response);
		expect(errors.length).toBeGreaterThan(0);
		for (const { pointer, detail } of errors) {
			expect(pointer).toMatch(/^(\/|$)/);
			expect(detail).toMatch(/[.?]$/);
		}
	};

	it('evaluate answers 200 or says what to enter', async () => {
		const designs = fc.oneof(stretched(), stretched(chargerAuxiliary), spoilt(), spoilt(avionicsConverter));
		await fc.assert(
			fc.asyncProperty(designs, (asked) => answers('evaluate', asked)),
			{ numRuns: 100 }
		);
	});

	it.each(['sheet.svg', 'sheet.pdf', 'sheet.json'])('%s answers 200 or says what to enter', async (path) => {
		await fc.assert(
			fc.asyncProperty(sheets, (asked) => answers(path, asked)),
			{ numRuns: 40 }
		);
	});

	it('nothing of this is a fault in the log', () => {
		expect(application.log()).not.toMatch(/"status":5\d\d| 5\d\d /);
	});
});
