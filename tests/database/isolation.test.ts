import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { connect, type Connection } from '$lib/server/db/connect';
import { membership, person, team, worksheet, type PersonId, type TeamId } from '$lib/server/db/schema';
import { freshDatabase } from './fresh';

let application: Connection;
let owner: Connection;
const [ours, theirs] = [crypto.randomUUID() as TeamId, crypto.randomUUID() as TeamId];
const tables = { team, person, membership, worksheet };

async function fill(id: TeamId, slug: string) {
	const personId = crypto.randomUUID() as PersonId;
	await application.withTeam(id, async (tx) => {
		await tx.insert(team).values({ id, slug, name: slug });
		await tx.insert(person).values({ id: personId, email: `${slug}@demo.test`, name: slug });
		await tx.insert(membership).values({ teamId: id, personId, role: 'lead' });
		await tx
			.insert(worksheet)
			.values({ teamId: id, number: 'WS-0001', title: slug, text: {}, createdBy: personId });
	});
}

/** The code of the database's refusal, or null where it let the work pass. */
async function refusalOf(work: Promise<unknown>): Promise<string | null> {
	try {
		await work;
		return null;
	} catch (error) {
		return String((error as { cause?: { code?: string } }).cause?.code);
	}
}

const NOT_PERMITTED = '42501';

beforeAll(async () => {
	const { applicationUrl, ownerUrl } = await freshDatabase();
	application = connect(applicationUrl, { max: 5 });
	owner = connect(ownerUrl, { max: 1 });
	await fill(ours, 'ours');
	await fill(theirs, 'theirs');
});
afterAll(() => Promise.all([application.close(), owner.close()]));

describe('rows', () => {
	it.each(Object.entries(tables))('of %s are seen by their team alone', async (_, table) => {
		for (const id of [ours, theirs]) {
			const rows = await application.withTeam(id, (tx) => tx.select().from(table));
			expect(rows).toHaveLength(1);
		}
		const [mine] = await application.withTeam(ours, (tx) => tx.select().from(table));
		const [other] = await application.withTeam(theirs, (tx) => tx.select().from(table));
		expect(mine).not.toEqual(other);
	});

	it.each(Object.entries(tables))('of %s are not there without a team', async (_, table) => {
		expect(await application.db.select().from(table)).toEqual([]);
	});

	it.each(Object.entries(tables))('of %s are hidden from the owner too', async (_, table) => {
		expect(await owner.db.select().from(table)).toEqual([]);
	});

	it('of another team are neither changed nor deleted', async () => {
		const changed = await application.withTeam(ours, async (tx) => [
			...(await tx
				.update(worksheet)
				.set({ title: 'taken' })
				.where(sql`team_id = ${theirs}`)
				.returning()),
			...(await tx
				.delete(worksheet)
				.where(sql`team_id = ${theirs}`)
				.returning())
		]);
		expect(changed).toEqual([]);
		const [kept] = await application.withTeam(theirs, (tx) => tx.select().from(worksheet));
		expect(kept?.title).toBe('theirs');
	});

	it('are not put into another team', async () => {
		const attempt = application.withTeam(ours, (tx) =>
			tx.insert(team).values({ id: crypto.randomUUID() as TeamId, slug: 'third', name: 'third' })
		);
		expect(await refusalOf(attempt)).toBe(NOT_PERMITTED);
	});

	it('do not move to another team', async () => {
		const attempt = application.withTeam(ours, (tx) => tx.update(worksheet).set({ teamId: theirs }));
		expect(await refusalOf(attempt)).toBe(NOT_PERMITTED);
	});
});

describe('the application\u2019s role', () => {
	it('owns nothing, and is no superuser', async () => {
		const [facts] = await application.db.execute(sql`
			select current_user as name, rolsuper, rolbypassrls, rolcreaterole, rolcreatedb,
				(select count(*)::int from pg_class where relowner = pg_roles.oid) as owned
			from pg_roles where rolname = current_user`);
		expect(facts).toEqual({
			name: 'herringbone_app',
			rolsuper: false,
			rolbypassrls: false,
			rolcreaterole: false,
			rolcreatedb: false,
			owned: 0
		});
	});

	it.each([
		['make a table', sql`create table intruder (id int)`],
		['empty a table', sql`truncate worksheet`],
		['switch the policies off', sql`alter table worksheet disable row level security`],
		['drop a table', sql`drop table worksheet`],
		['become the owner', sql`set role herringbone_owner`]
	])('may not %s', async (_, statement) => {
		expect(await refusalOf(application.db.execute(statement))).toBe(NOT_PERMITTED);
	});

	it('meets forced policies on each table', async () => {
		const bare = await application.db.execute(sql`
			select relname from pg_class join pg_namespace on pg_namespace.oid = relnamespace
			where relkind in ('r', 'p') and nspname = 'public' and not (relrowsecurity and relforcerowsecurity)`);
		expect([...bare]).toEqual([]);
	});
});

it('keeps 200 teams\u2019 transactions on five connections apart', async () => {
	const ids = Array.from({ length: 200 }, (_, index) => (index % 2 ? ours : theirs));
	const seen = await Promise.all(
		ids.map((id) =>
			application.withTeam(id, async (tx) => {
				const before = await tx.select().from(worksheet);
				await tx.execute(sql`select pg_sleep(0.002)`);
				const after = await tx.select().from(team);
				return [...before.map((row) => row.teamId), ...after.map((row) => row.id)];
			})
		)
	);
	expect(seen).toEqual(ids.map((id) => [id, id]));
	expect(await application.db.select().from(team)).toEqual([]);
});

it('leaves no team behind on a connection whose work failed', async () => {
	const one = connect((await freshDatabase()).applicationUrl, { max: 1 });
	await expect(one.withTeam(ours, () => Promise.reject(new Error('on purpose')))).rejects.toThrow(
		'on purpose'
	);
	const [row] = await one.db.execute(sql`select current_setting('app.team_id', true) as team`);
	await one.close();
	expect(row?.team || null).toBeNull();
});
