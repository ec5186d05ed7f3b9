import { sql } from 'drizzle-orm';
import { environment } from '$lib/server/environment';
import { connect, type Connection, type TeamTransaction } from './connect';
import type { TeamId } from './schema';

let connection: Connection | undefined;

/** The process's one pool, opened at its first use (the build loads this module and has no database). */
export function database(): Connection {
	connection ??= connect(environment().DATABASE_APP_URL);
	return connection;
}

/** Does work in one transaction in which the rows of that team, and no others, exist. */
export function withTeam<T>(team: TeamId, work: (tx: TeamTransaction) => Promise<T>): Promise<T> {
	return database().withTeam(team, work);
}

/** Asks the database for a sign of life; rejects when there is none within the given time [ms]. */
export async function ping(within = 3000): Promise<void> {
	let timer: NodeJS.Timeout | undefined;
	const late = new Promise<never>((_, reject) => {
		timer = setTimeout(() => reject(new Error(`the database did not answer in ${within} ms`)), within);
	});
	try {
		await Promise.race([database().db.execute(sql`select 1`), late]);
	} finally {
		clearTimeout(timer);
	}
}

/** Closes the pool; the process is about to end. */
export async function closeDatabase(): Promise<void> {
	await connection?.close();
	connection = undefined;
}
