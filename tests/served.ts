/** Set up once for all tests that need a server: a database server whose data may be lost. */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { TestProject } from 'vitest/node';
import { startCluster } from '../drizzle/local/cluster.mjs';

declare module 'vitest' {
	interface ProvidedContext {
		/** The superuser's address of the test server. */
		superuserUrl: string;
	}
}

export async function setup(project: TestProject): Promise<() => Promise<void>> {
	const folder = mkdtempSync(join(tmpdir(), 'herringbone-tests-'));
	const cluster = await startCluster(folder, ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off']);
	project.provide('superuserUrl', cluster.superuserUrl);
	return async () => {
		await cluster.stop();
		rmSync(folder, { recursive: true, force: true });
	};
}
