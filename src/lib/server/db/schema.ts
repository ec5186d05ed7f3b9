import { sql } from 'drizzle-orm';
import {
	boolean,
	check,
	integer,
	jsonb,
	pgEnum,
	pgPolicy,
	pgRole,
	pgTable,
	primaryKey,
	text,
	timestamp,
	unique,
	uuid
} from 'drizzle-orm/pg-core';

export type PersonId = string & { readonly __id: 'person' };
export type TeamId = string & { readonly __id: 'team' };
export type WorksheetId = string & { readonly __id: 'worksheet' };

/** What was typed, by the form's keys: the Design is parsed from it, so half-typed values survive. */
export type WorksheetText = Readonly<Record<string, unknown>>;

/** The role that the application connects as: it owns nothing, so every policy below binds it. */
const application = pgRole('herringbone_app').existing();

/** Unset, the setting is null or an empty text, and then no row is the team's. */
const currentTeam = sql`nullif(current_setting('app.team_id', true), '')::uuid`;

function ofCurrentTeam(column: string) {
	const own = sql`${sql.identifier(column)} = ${currentTeam}`;
	return pgPolicy('of_current_team', { for: 'all', to: application, using: own, withCheck: own });
}

const moment = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' });

/** One row: what this installation as a whole remembers. */
export const installation = pgTable(
	'installation',
	{
		single: boolean().primaryKey().default(true),
		demoAt: moment('demo_at')
	},
	(table) => [
		check('installation_single', sql`${table.single}`),
		pgPolicy('for_all_teams', { for: 'select', to: application, using: sql`true` }),
		pgPolicy('noted_by_application', { for: 'update', to: application, using: sql`true` })
	]
);

export const person = pgTable(
	'person',
	{
		id: uuid().$type<PersonId>().primaryKey().defaultRandom(),
		email: text().notNull().unique(),
		name: text().notNull(),
		/** Null: this person cannot sign in by password. */
		passwordHash: text('password_hash'),
		createdAt: moment('created_at').notNull().defaultNow()
	},
	(table) => {
		const member = sql`exists (select 1 from membership where membership.person_id = person.id)`;
		return [
			check('person_email_lower', sql`${table.email} = lower(${table.email})`),
			// The members' own policy narrows the inner query to the current team.
			pgPolicy('member_read', { for: 'select', to: application, using: member }),
			pgPolicy('member_change', { for: 'update', to: application, using: member, withCheck: member }),
			pgPolicy('anybody_joins', { for: 'insert', to: application, withCheck: sql`true` })
		];
	}
);

export const team = pgTable(
	'team',
	{
		id: uuid().$type<TeamId>().primaryKey().defaultRandom(),
		slug: text().notNull().unique(),
		name: text().notNull(),
		createdAt: moment('created_at').notNull().defaultNow()
	},
	(table) => [check('team_slug_shape', sql`${table.slug} ~ '^[a-z0-9]+(-[a-z0-9]+)*$'`), ofCurrentTeam('id')]
);

export const role = pgEnum('role', ['engineer', 'lead', 'archivist']);

export const membership = pgTable(
	'membership',
	{
		teamId: uuid('team_id')
			.$type<TeamId>()
			.notNull()
			.references(() => team.id, { onDelete: 'cascade' }),
		personId: uuid('person_id')
			.$type<PersonId>()
			.notNull()
			.references(() => person.id),
		role: role().notNull(),
		createdAt: moment('created_at').notNull().defaultNow()
	},
	(table) => [primaryKey({ columns: [table.teamId, table.personId] }), ofCurrentTeam('team_id')]
);

export const worksheet = pgTable(
	'worksheet',
	{
		id: uuid().$type<WorksheetId>().primaryKey().defaultRandom(),
		teamId: uuid('team_id')
			.$type<TeamId>()
			.notNull()
			.references(() => team.id, { onDelete: 'cascade' }),
		number: text().notNull(),
		title: text().notNull(),
		text: jsonb().$type<WorksheetText>().notNull(),
		/** Counts saves; a save that names an older one is stale. */
		version: integer().notNull().default(1),
		createdBy: uuid('created_by')
			.$type<PersonId>()
			.notNull()
			.references(() => person.id),
		createdAt: moment('created_at').notNull().defaultNow(),
		changedAt: moment('changed_at').notNull().defaultNow()
	},
	(table) => [
		unique('worksheet_team_number').on(table.teamId, table.number),
		check('worksheet_version_positive', sql`${table.version} > 0`),
		ofCurrentTeam('team_id')
	]
);
