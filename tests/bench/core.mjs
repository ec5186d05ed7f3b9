/** Loads the core's TypeScript as it stands, without a build. */
import { join } from 'node:path';
import { createServer } from 'vite';

const root = join(import.meta.dirname, '../..');

/**
 * Opens the sources; close it when all that is needed has been loaded.
 *
 * @returns {Promise<{ load: (file: string) => Promise<Record<string, any>>, close: () => Promise<void> }>}
 */
export async function openCore() {
	const server = await createServer({
		configFile: false,
		root,
		appType: 'custom',
		logLevel: 'error',
		resolve: { alias: { $lib: join(root, 'src/lib') } },
		optimizeDeps: { noDiscovery: true },
		server: { middlewareMode: true, hmr: false, watch: null, ws: false }
	});
	return { load: (file) => server.ssrLoadModule(`/${file}`), close: () => server.close() };
}
