import { sql } from 'drizzle-orm';
import { drizzle, type PostgresJsDatabase } from 'drizzle-orm/postgres-js';
import postgres from 'postgres';
import * as schema from './schema';

export type Database = PostgresJsDatabase<typeof schema>;
/** What a team's work is done with. Using the outer database inside it would wait for a second connection. */
export type TeamTransaction = Parameters<Parameters<Database['transaction']>[0]>[0];

export interface Connection {
	readonly db: Database;
	/** Does work in one transaction in which the rows of that team, and no others, exist. */
	withTeam<T>(team: schema.TeamId, work: (tx: TeamTransaction) => Promise<T>): Promise<T>;
	close(): Promise<void>;
}

/** Opens a pool to the database; connections are made when they are first needed. */
export function connect(url: string, { max = 10 }: { max?: number } = {}): Connection {
	// Notices are the server's chatter; what fails comes back as an error.
	const client = postgres(url, { max, connect_timeout: 5, idle_timeout: 300, onnotice: () => undefined });
	const db = drizzle(client, { schema });
	return {
		db,
		withTeam(team, work) {
			return db.transaction(async (tx) => {
				// Local to the transaction, so that the pool hands on no team with the connection.
				await tx.execute(sql`select set_config('app.team_id', ${team}, true)`);
				return work(tx);
			});
		},
		close: () => client.end({ timeout: 5 })
	};
}
