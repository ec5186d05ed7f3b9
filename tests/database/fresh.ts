import { randomBytes } from 'node:crypto';
import { inject } from 'vitest';
import { createDatabase, migrateDatabase } from '../../drizzle/local/migrate.mjs';

export interface FreshDatabase {
	/** As the owner, who made the tables. */
	readonly ownerUrl: string;
	/** As herringbone_app, as the application connects. */
	readonly applicationUrl: string;
}

/** A new, migrated and otherwise empty database of its own in the test server. */
export async function freshDatabase(): Promise<FreshDatabase> {
	const name = `test_${randomBytes(6).toString('hex')}`;
	const ownerUrl = await createDatabase(inject('superuserUrl'), name);
	return { ownerUrl, applicationUrl: await migrateDatabase(ownerUrl) };
}
