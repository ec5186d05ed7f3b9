/** The database's roles and migrations. Two starts at once take turns. */
import { createHmac, randomBytes } from 'node:crypto';
import { join } from 'node:path';
import { Halt } from './run.mjs';

const LOCK = 4600;
const migrationsFolder = join(import.meta.dirname, '..');

/**
 * Opens one connection. The packages are loaded here and not above: they may just have been installed.
 *
 * @template T
 * @param {string} url
 * @param {(client: import('postgres').Sql) => Promise<T>} work
 */
async function connected(url, work) {
	const { default: postgres } = await import('postgres');
	const client = postgres(url, { max: 1, connect_timeout: 10, onnotice: () => undefined });
	try {
		return await work(client);
	} finally {
		await client.end({ timeout: 5 });
	}
}

/**
 * Makes the owner and its database in a server of our own; the owner is no superuser, so it meets the
 * same rules as on any other server.
 *
 * @param {string} superuserUrl
 * @param {string} name of the database
 * @returns {Promise<string>} the owner's address of the database
 */
export function createDatabase(superuserUrl, name = 'herringbone') {
	const url = new URL(superuserUrl);
	const password = createHmac('sha256', url.password).update('herringbone_owner').digest('hex');
	return connected(superuserUrl, async (sql) => {
		const [role] = await sql`select 1 from pg_roles where rolname = 'herringbone_owner'`;
		const verb = role ? 'alter' : 'create';
		await sql.unsafe(`${verb} role herringbone_owner login createrole nosuperuser password '${password}'`);
		const [database] = await sql`select 1 from pg_database where datname = ${name}`;
		if (!database) await sql`create database ${sql(name)} owner herringbone_owner`;
		url.username = 'herringbone_owner';
		url.password = password;
		url.pathname = `/${name}`;
		return url.href;
	});
}

/**
 * The password of the role herringbone_app follows from the owner's, so that several servers on one
 * database agree on it without a file. An owner without a password gives none to guess from.
 *
 * @param {URL} owner
 */
function applicationPassword(owner) {
	const secret = owner.password || process.env.PGPASSWORD || randomBytes(32);
	return createHmac('sha256', secret).update('herringbone_app').digest('hex');
}

/** @param {unknown} error */
const message = (error) => (error instanceof Error ? error.message || error.name : 'no reason given');

/**
 * Applies what is not applied yet, as the owner.
 *
 * @param {string} ownerUrl
 * @returns {Promise<string>} the same database as herringbone_app, which owns nothing
 * @throws {Halt} where the database cannot be used
 */
export async function migrateDatabase(ownerUrl) {
	const application = new URL(ownerUrl);
	const password = applicationPassword(application);
	application.username = 'herringbone_app';
	application.password = password;
	const { drizzle } = await import('drizzle-orm/postgres-js');
	const { migrate } = await import('drizzle-orm/postgres-js/migrator');
	try {
		await connected(ownerUrl, async (client) => {
			await client`select pg_advisory_lock(${LOCK})`;
			const [role] = await client`
				select rolsuper or rolbypassrls as above from pg_roles where rolname = 'herringbone_app'`;
			if (role?.above) throw new Halt('herringbone_app may pass by the policies: take that right away');
			const verb = role ? 'alter' : 'create';
			await client.unsafe(`${verb} role herringbone_app login password '${password}'`);
			await migrate(drizzle(client), { migrationsFolder });
		});
	} catch (error) {
		const cause = error instanceof Error && error.cause ? `: ${message(error.cause)}` : '';
		throw new Halt(`The database cannot be used: ${message(error)}${cause}`, { cause: error });
	}
	return application.href;
}
