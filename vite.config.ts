import { sveltekit } from '@sveltejs/kit/vite';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'vitest/config';

export default defineConfig({
	plugins: [tailwindcss(), sveltekit()],
	server: { host: '127.0.0.1' },
	test: {
		projects: [
			{
				extends: true,
				test: {
					name: 'unit',
					environment: 'node',
					include: ['src/**/*.test.ts', 'tests/house.test.ts'],
					testTimeout: 60_000
				}
			},
			{
				extends: true,
				test: {
					name: 'reference',
					environment: 'node',
					include: ['tests/reference/**/*.test.ts', 'tests/golden/**/*.test.ts'],
					testTimeout: 120_000,
					hookTimeout: 120_000
				}
			},
			{
				extends: true,
				test: {
					name: 'served',
					environment: 'node',
					include: ['tests/database/**/*.test.ts', 'tests/browser/**/*.test.ts', 'tests/faults/**/*.test.ts'],
					globalSetup: 'tests/served.ts',
					fileParallelism: false,
					testTimeout: 120_000,
					hookTimeout: 300_000
				}
			}
		]
	}
});
