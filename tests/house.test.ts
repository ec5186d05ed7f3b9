/** The rules of the house that lint cannot see, and proof that lint sees the others. */
import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { ESLint } from 'eslint';
import { beforeAll, describe, expect, it } from 'vitest';
import manifest from '../package.json';
import * as access from '../src/lib/server/access';
import { handlersOf, withoutDocstring } from './handlers';

const root = join(import.meta.dirname, '..');
const core = ['quantity', 'network', 'design', 'rules', 'scene', 'sheet', 'render'];

function filesBelow(folder: string): string[] {
	return readdirSync(join(root, folder), { recursive: true, withFileTypes: true })
		.filter((entry) => entry.isFile())
		.map((entry) => relative(root, join(entry.parentPath, entry.name)));
}

const read = (file: string) => readFileSync(join(root, file), 'utf8');
const sources = ['src', 'tests', 'drizzle']
	.flatMap(filesBelow)
	.filter((file) => /\.(?:ts|js|mjs|svelte)$/.test(file));

describe('the top of the tree', () => {
	const made = ['.git', 'node_modules', 'build', 'coverage', '.svelte-kit', '.local'];
	const entries = readdirSync(root, { withFileTypes: true }).filter((entry) => !made.includes(entry.name));

	it('has the folders of the house and no other', () => {
		const folders = entries.filter((entry) => entry.isDirectory()).map((entry) => entry.name);
		expect(folders.sort()).toEqual(['.ci', 'drizzle', 'src', 'static', 'tests']);
	});

	it('has the usual files and no other', () => {
		const files = entries.filter((entry) => entry.isFile() && !entry.name.startsWith('.'));
		expect(files.map((entry) => entry.name).sort()).toEqual([
			'DEVELOPERS.md',
			'README.md',
			'drizzle.config.ts',
			'eslint.config.js',
			'package-lock.json',
			'package.json',
			'svelte.config.js',
			'tsconfig.json',
			'vite.config.ts'
		]);
	});
});

describe('guards', () => {
	const guards = Object.keys(access).filter((name) => /^(?:allow|require)[A-Z]/.test(name));
	const routes = filesBelow('src/routes').filter((file) => /\.ts$/.test(file));
	const ofServer = routes.filter((file) => /\/\+(?:server|(?:page|layout)\.server)\.ts$/.test(file));
	const universal = routes.filter((file) => /\/\+(?:page|layout)\.ts$/.test(file));

	it('exist', () => {
		expect(guards).toContain('allowPublic');
		expect(ofServer.length).toBeGreaterThan(0);
	});

	it.each(ofServer)('are the first statement of each handler in %s', (file) => {
		const handlers = handlersOf(read(file));
		const open = handlers.filter(({ first }) => first === null || !guards.includes(first));
		expect(open).toEqual([]);
	});

	it('cannot stand in a load that runs in the browser too, so there is none', () => {
		const loads = universal.filter((file) => handlersOf(read(file)).length > 0);
		expect(loads).toEqual([]);
	});

	it.each([
		['export const GET: RequestHandler = (event) => { allowPublic(event); };', ['GET', 'allowPublic']],
		[
			'export const load = async (event) => { const x = await requireMember(event); };',
			['load', 'requireMember']
		],
		['export function POST(event) { return json(1); }', ['POST', null]],
		['export const GET = (event) => json(1);', ['GET', null]],
		['export const GET = handler;', ['GET', null]],
		['export { GET } from "./other";', ['GET', null]],
		[
			'export const actions = { save: async (event) => { allowPublic(event); } };',
			['actions.save', 'allowPublic']
		],
		['export const actions = { async save() { return 1; } } satisfies Actions;', ['actions.save', null]],
		['export const actions = made();', ['actions', null]]
	])('are found, or missed, in %s', (text, [name, first]) => {
		expect(handlersOf(text)).toEqual([{ name, first }]);
	});
});

describe('packages', () => {
	/** For accounts and for plots on the screen, which come later; whoever imports one takes it out of this list. */
	const waiting = ['@lucia-auth/adapter-drizzle', 'lucia', 'd3-axis', 'd3-selection'];
	const text = sources.map(read).join('\n') + read('src/app.css');
	const imports = (name: string) =>
		new RegExp(`(?:from |import |import\\(|@import |require\\(|url\\()\\s*['"]${name}(?:/[^'"]*)?['"]`).test(
			text
		);

	it.each(Object.keys(manifest.dependencies))('%s is imported, or is waiting', (name) => {
		expect([name, imports(name)]).toEqual([name, !waiting.includes(name)]);
	});

	it('have exact versions', () => {
		const all = Object.entries({ ...manifest.dependencies, ...manifest.devDependencies });
		expect(all.filter(([, version]) => !/^\d+\.\d+\.\d+$/.test(version))).toEqual([]);
	});
});

describe('modules', () => {
	it('are named by what they are about', () => {
		const vague = /(?:^|\/)(?:utils?|helpers?|types|misc|common|shared)(?:\/|\.\w+$)/;
		const barrel = /^src\/lib\/(?!server\/db\/index\.ts).*\/index\.ts$/;
		expect(sources.filter((file) => vague.test(file) || barrel.test(file))).toEqual([]);
	});

	it('say at the same line why a rule is switched off', () => {
		const lines = sources.flatMap((file) =>
			read(file)
				.split('\n')
				.map((line) => `${file}: ${line.trim()}`)
		);
		const off = lines.filter((line) =>
			/\beslint-disable\b|svelte-ignore/.test(line.replace(/^tests\/house.*$/, ''))
		);
		expect(off.filter((line) => !/eslint-disable.* -- \S|svelte-ignore \w+ \S/.test(line))).toEqual([]);
	});

	it('of the core explain each exported function', () => {
		const modules = core
			.flatMap((room) => filesBelow(`src/lib/${room}`))
			.filter((file) => /(?<!\.test)\.ts$/.test(file));
		const bare = modules.flatMap((file) => withoutDocstring(read(file)).map((name) => `${file}: ${name}`));
		expect(bare).toEqual([]);
	});

	it('count as unexplained when they are', () => {
		expect(withoutDocstring('export function bare() {}\n/** Said. */\nexport function said() {}')).toEqual([
			'bare'
		]);
	});
});

describe('lint', () => {
	const eslint = new ESLint({ cwd: root });

	async function complaints(file: string, code: string): Promise<(string | null)[]> {
		const [result] = await eslint.lintText(code, { filePath: join(root, file) });
		return (result?.messages ?? []).map((message) => message.ruleId);
	}

	// The first text loads the whole configuration.
	beforeAll(() => complaints('src/lib/scene/sample.ts', ''), 60_000);

	it.each([
		['quantity', "import { a } from '$lib/network/complex';"],
		['quantity', "import { a } from 'zod';"],
		['network', "import { a } from '$lib/design/design';"],
		['network', "import { a } from '../quantity/unit';"],
		['design', "import { a } from '$lib/design/design';"],
		['design', "import { a } from 'node:fs';"],
		['rules', "import type { Scene } from '$lib/scene/scene';"],
		['scene', "import { a } from '$lib/sheet/compose';"],
		['scene', "import { scaleLog } from 'd3-scale';"],
		['sheet', "import { a } from 'pdf-lib';"],
		['render', "import { a } from '$lib/sheet/compose';"],
		['render', "import { a } from '$lib/server/fonts';"],
		['components', "import { a } from '$lib/server/db';"],
		['server', "import { a } from '$lib/components/Sign.svelte';"]
	])('keeps the room %s from: %s', async (room, code) => {
		expect(await complaints(`src/lib/${room}/sample.ts`, `${code}\nexport const b = a;`)).toContain(
			'no-restricted-imports'
		);
	});

	it.each([
		['network', "import { a } from '$lib/quantity/unit';"],
		['sheet', "import { a } from 'd3-shape';"],
		['render', "import { a } from '@pdf-lib/fontkit';"],
		['render', "import { a } from './svg';"],
		['server', "import { a } from 'node:crypto';"],
		['server', "import { a } from '$lib/server/db';"]
	])('lets the room %s have: %s', async (room, code) => {
		expect(await complaints(`src/lib/${room}/sample.ts`, `${code}\nexport const b = a;`)).toEqual([]);
	});

	it.each([
		['src/lib/rules/sample.ts', 'export const now = () => new Date();', 'no-restricted-globals'],
		['src/lib/rules/sample.ts', 'export const chance = () => Math.random();', 'no-restricted-syntax'],
		['src/lib/render/svg.ts', 'export const later = async () => 1;', 'no-restricted-syntax'],
		['src/lib/scene/sample.ts', 'export const width = () => document.body;', 'no-restricted-globals'],
		['src/lib/sheet/sample.ts', 'export default 1;', 'no-restricted-syntax'],
		['src/lib/server/sample.ts', 'export enum State { Open }', 'no-restricted-syntax'],
		[
			'src/routes/+page.svelte',
			"<script>import { a } from '$lib/render/pdf'; a();</script>",
			'no-restricted-imports'
		],
		[
			'src/lib/rules/sample.test.ts',
			"import { it } from 'vitest'; it.skip('x', () => 1);",
			'no-restricted-syntax'
		]
	])('refuses in %s: %s', async (file, code, rule) => {
		expect(await complaints(file, code)).toContain(rule);
	});

	it('lets only the PDF writer wait', async () => {
		expect(await complaints('src/lib/render/pdf.ts', 'export const later = async () => 1;')).toEqual([]);
	});
});
