import js from '@eslint/js';
import svelte from 'eslint-plugin-svelte';
import { defineConfig } from 'eslint/config';
import globals from 'globals';
import ts from 'typescript-eslint';
import svelteConfig from './svelte.config.js';

/** The one table of the house: what each room may import, besides its own modules as `./module`. */
const core = ['quantity', 'network', 'design', 'rules', 'scene', 'sheet', 'render'];
const rooms = {
	quantity: { rooms: [], packages: [] },
	network: { rooms: ['quantity'], packages: [] },
	design: { rooms: ['quantity', 'network'], packages: ['zod'] },
	rules: { rooms: ['quantity', 'network', 'design'], packages: [] },
	scene: { rooms: [], packages: [] },
	sheet: {
		rooms: ['quantity', 'network', 'design', 'rules', 'scene'],
		packages: ['d3-scale', 'd3-shape', 'zod']
	},
	render: { rooms: ['scene'], packages: ['pdf-lib', '@pdf-lib/fontkit'] },
	components: {
		rooms: core,
		packages: ['svelte', '$app', 'd3-axis', 'd3-selection', 'd3-scale', 'd3-shape']
	},
	server: {
		rooms: core,
		packages: ['node:', '$app', '$env', '@sveltejs/kit', 'drizzle-orm', 'postgres', 'zod', 'svelte', 'lucia'],
		within: 'server'
	}
};

/** Tests of a room may also compose what lies before and after it in the core; they never touch a disk. */
const testPackages = ['vitest', 'fast-check'];
const testExtras = { render: ['node:', 'pdf-lib', 'pdfjs-dist', 'pngjs'], server: ['node:'] };

const escape = (text) => text.replaceAll(/[$/.]/g, '\\$&');
const either = (parts) => (parts.length > 0 ? `(?:${parts.map(escape).join('|')})` : '(?!)');

/** Everything is refused that is not the own room, an allowed room or an allowed package. */
function onlyImports(room, { rooms: allowed, packages, within }) {
	const allow = [
		'\\./',
		...(within ? [`\\$lib/${within}/`] : []),
		`\\$lib/${either(allowed)}/[\\w.-]+(?:\\?\\w+)?$`,
		`${either(packages.filter((name) => !name.endsWith(':')))}(?:/|$)`,
		...packages.filter((name) => name.endsWith(':'))
	];
	const reach = [...allowed.map((name) => `$lib/${name}`), ...packages].join(', ') || 'nothing';
	return {
		'no-restricted-imports': [
			'error',
			{
				patterns: [
					{
						regex: `^(?!${allow.join('|')})`,
						message: `The room ${room} imports its own modules as './module' and else only: ${reach}.`
					}
				]
			}
		]
	};
}

const roomRules = Object.entries(rooms).flatMap(([room, table]) => [
	{
		files: [`src/lib/${room}/**/*.{ts,js,svelte}`],
		ignores: ['**/*.test.ts'],
		rules: onlyImports(room, table)
	},
	{
		files: [`src/lib/${room}/**/*.test.ts`],
		rules: onlyImports(`${room} (tests)`, {
			...table,
			rooms: core.filter((name) => name !== room),
			packages: [...table.packages, ...testPackages, ...(testExtras[room] ?? [])]
		})
	}
]);

const noSkippedTests = {
	selector:
		'MemberExpression[object.name=/^(it|test|describe)$/][property.name=/^(skip|skipIf|only|todo|runIf|fails)$/]',
	message: 'A test runs or it is not there.'
};
const libSyntax = [
	{ selector: 'ExportDefaultDeclaration', message: 'Modules export by name.' },
	{ selector: 'TSEnumDeclaration', message: 'Use a union of strings.' },
	{ selector: 'ExportAllDeclaration', message: 'No barrels: import the module that has it.' }
];
const pureSyntax = [
	...libSyntax,
	{ selector: 'ImportExpression', message: 'The core is loaded at once: import at the head.' },
	{
		selector: "CallExpression[callee.object.name='Math'][callee.property.name='random']",
		message: 'No chance in the core.'
	}
];
const noAsync = [
	{ selector: ':function[async=true]', message: 'The core is synchronous (only toPdf waits).' },
	{ selector: 'AwaitExpression', message: 'The core is synchronous (only toPdf waits).' }
];
const outsideWorld = [
	...['Date', 'performance', 'crypto', 'setTimeout', 'setInterval', 'setImmediate', 'queueMicrotask'],
	...['window', 'document', 'navigator', 'location', 'localStorage', 'sessionStorage', 'fetch'],
	...['process', 'Buffer', 'globalThis', 'self', 'console']
].map((name) => ({ name, message: 'The core knows no DOM, no Node, no clock and no chance.' }));

export default defineConfig(
	{ ignores: ['build/', '.svelte-kit/', '.local/', 'node_modules/', 'static/', 'coverage/'] },
	js.configs.recommended,
	ts.configs.strict,
	svelte.configs.recommended,
	{
		linterOptions: { reportUnusedDisableDirectives: 'error' },
		languageOptions: { globals: { ...globals.browser, ...globals.node } },
		rules: {
			'no-undef': 'off', // the compiler does it, and knows the types of Kit's modules
			eqeqeq: 'error',
			complexity: ['error', 10],
			'max-depth': ['error', 3],
			'max-params': ['error', 4],
			'max-lines': ['error', { max: 250, skipBlankLines: true, skipComments: true }],
			'max-lines-per-function': ['error', { max: 60, skipBlankLines: true, skipComments: true }],
			'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx', 'hack'], location: 'anywhere' }],
			'no-restricted-syntax': ['error', noSkippedTests],
			'@typescript-eslint/consistent-type-imports': 'error',
			'@typescript-eslint/no-unused-vars': ['error', { ignoreRestSiblings: true, argsIgnorePattern: '^_' }],
			'svelte/no-navigation-without-resolve': 'off' // the application is always served at the root
		}
	},
	{
		files: ['**/*.svelte', '**/*.svelte.ts'],
		languageOptions: { parserOptions: { parser: ts.parser, extraFileExtensions: ['.svelte'], svelteConfig } }
	},
	{
		files: ['src/lib/**/*.ts'],
		rules: { 'no-restricted-syntax': ['error', noSkippedTests, ...libSyntax] }
	},
	{
		files: core.map((room) => `src/lib/${room}/**/*.ts`),
		ignores: ['**/*.test.ts'],
		rules: {
			'no-restricted-syntax': ['error', noSkippedTests, ...pureSyntax, ...noAsync],
			'no-restricted-globals': ['error', ...outsideWorld]
		}
	},
	{
		files: ['src/lib/render/pdf*.ts'],
		ignores: ['**/*.test.ts'],
		rules: { 'no-restricted-syntax': ['error', noSkippedTests, ...pureSyntax] }
	},
	...roomRules,
	{
		// 548 KB of PDF writer would reach the browser: sheets become PDF on the server.
		files: ['src/routes/**/*.svelte', 'src/routes/**/+{page,layout}.ts', 'src/routes/**/*.svelte.ts'],
		rules: {
			'no-restricted-imports': [
				'error',
				{
					patterns: [
						{
							regex: '^\\$lib/(?:render/pdf|server)',
							message: 'The browser gets no PDF writer and no server.'
						},
						{ regex: '^(?:pdf-lib|@pdf-lib)', message: 'The browser gets no PDF writer.' }
					]
				}
			]
		}
	},
	{
		files: ['src/routes/**/*.ts', 'src/hooks.server.ts'],
		rules: {
			'no-restricted-syntax': [
				'error',
				noSkippedTests,
				{ selector: 'TSEnumDeclaration', message: 'Use a union of strings.' }
			]
		}
	},
	{
		// A describe block wraps its whole table, so its length says nothing about a function's; and the
		// parameters of a table's function are the table's columns.
		files: ['**/*.test.ts', 'tests/**/*.{ts,mjs}'],
		rules: { 'max-lines-per-function': 'off', 'max-params': 'off' }
	}
);
