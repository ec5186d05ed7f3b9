import { readFileSync } from 'node:fs';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { connect, type Connection } from '$lib/server/db/connect';
import { loadDemo } from '$lib/server/db/demo';
import { installation, membership, person, team, worksheet, type TeamId } from '$lib/server/db/schema';
import { migrateDatabase } from '../../drizzle/local/migrate.mjs';
import { parseDesignText } from '$lib/design/parse';
import { freshDatabase } from './fresh';

const journal: { entries: { when: number; tag: string }[] } = JSON.parse(
	readFileSync(new URL('../../drizzle/meta/_journal.json', import.meta.url), 'utf8')
);

describe('migrations', () => {
	it('apply on an empty database, and a second and third time change nothing', async () => {
		const { ownerUrl, applicationUrl } = await freshDatabase();
		const again = await Promise.all([migrateDatabase(ownerUrl), migrateDatabase(ownerUrl)]);
		expect(again).toEqual([applicationUrl, applicationUrl]);
		const owner = connect(ownerUrl, { max: 1 });
		const [row] = await owner.db.execute(
			sql`select count(*)::int as count from drizzle.__drizzle_migrations`
		);
		await owner.close();
		expect(row?.count).toBe(journal.entries.length);
	});

	it('are dated in their order: one dated before its forerunner would never be applied', () => {
		const dates = journal.entries.map(({ when }) => when);
		expect(dates).toEqual([...new Set(dates)].sort((a, b) => a - b));
	});

	it('say in words when the database cannot be used', async () => {
		const { ownerUrl } = await freshDatabase();
		const url = new URL(ownerUrl);
		url.pathname = '/missing';
		await expect(migrateDatabase(url.href)).rejects.toThrow(/cannot be used: .*does not exist/);
	});
});

describe('the demo', () => {
	let application: Connection;
	beforeAll(async () => {
		application = connect((await freshDatabase()).applicationUrl);
	});
	afterAll(() => application.close());

	it('is loaded once, however many servers start', async () => {
		const loaded = await Promise.all([loadDemo(application), loadDemo(application), loadDemo(application)]);
		expect(loaded.filter(Boolean)).toHaveLength(1);
		const [row] = await application.db.select().from(installation);
		expect(row?.demoAt).toBeInstanceOf(Date);
	});

	it.each([
		[
			'elverholm',
			['archivist@demo.test', 'engineer@demo.test', 'lead@demo.test', 'second-lead@demo.test'],
			['WS-0001 Charger auxiliary supply', 'WS-0002 Servo drive control supply']
		],
		['kestrel-vane', ['outsider@demo.test'], ['WS-0001 28 V converter input filter']]
	])('has the team %s', async (slug, emails, worksheets) => {
		// Only a superuser sees all teams, so only that one can look an id up by its slug.
		const id = await teamId(slug);
		const found = await application.withTeam(id, async (tx) => ({
			teams: await tx.select().from(team),
			people: await tx.select().from(person).orderBy(person.email),
			members: await tx.select().from(membership),
			sheets: await tx.select().from(worksheet).orderBy(worksheet.number)
		}));
		expect(found.teams.map((row) => row.slug)).toEqual([slug]);
		expect(found.people.map((row) => row.email)).toEqual(emails);
		expect(found.members).toHaveLength(emails.length);
		expect(found.sheets.map((row) => `${row.number} ${row.title}`)).toEqual(worksheets);
		expect(found.people.every((row) => row.passwordHash === null)).toBe(true);
		for (const row of found.sheets) expect(parseDesignText(row.text)).toMatchObject({ ok: true });
	});

	async function teamId(slug: string): Promise<TeamId> {
		const [row] = await application.db.execute(sql`select current_database() as name`);
		const url = new URL(inject('superuserUrl'));
		url.pathname = `/${String(row?.name)}`;
		const superuser = connect(url.href, { max: 1 });
		const [found] = await superuser.db.execute(sql`select id from team where slug = ${slug}`);
		await superuser.close();
		return String(found?.id) as TeamId;
	}
});
