/**
 * The demo: invented people in two invented teams, and the worksheets of the scenarios. The people have
 * no password, so nobody can sign in as one of them.
 */
import { eq, sql } from 'drizzle-orm';
import type { Design } from '$lib/design/design';
import { avionicsConverter, chargerAuxiliary, servoControl } from '$lib/design/examples';
import { designToText } from '$lib/design/parse';
import type { Connection, TeamTransaction } from './connect';
import {
	installation,
	membership,
	person,
	team,
	worksheet,
	type PersonId,
	type TeamId,
	type WorksheetText
} from './schema';

type Role = (typeof membership.$inferInsert)['role'];

interface DemoTeam {
	readonly slug: string;
	readonly name: string;
	readonly people: readonly { readonly email: string; readonly name: string; readonly role: Role }[];
	readonly designs: readonly Design[];
}

const demoTeams: readonly DemoTeam[] = [
	{
		slug: 'elverholm',
		name: 'Elverholm Ladeteknikk',
		people: [
			{ email: 'engineer@demo.test', name: 'Ingrid Solvang', role: 'engineer' },
			{ email: 'lead@demo.test', name: 'Marek Halloran', role: 'lead' },
			{ email: 'second-lead@demo.test', name: 'Odile Brandt', role: 'lead' },
			{ email: 'archivist@demo.test', name: 'Tomas Reyes', role: 'archivist' }
		],
		designs: [chargerAuxiliary, servoControl]
	},
	{
		slug: 'kestrel-vane',
		name: 'Kestrel Vane Avionics',
		people: [{ email: 'outsider@demo.test', name: 'Priya Ashworth', role: 'lead' }],
		designs: [avionicsConverter]
	}
];

async function insertTeam(tx: TeamTransaction, demo: DemoTeam): Promise<void> {
	const teamId = crypto.randomUUID() as TeamId;
	await tx.execute(sql`select set_config('app.team_id', ${teamId}, true)`);
	await tx.insert(team).values({ id: teamId, slug: demo.slug, name: demo.name });
	const people = demo.people.map((one) => ({ ...one, id: crypto.randomUUID() as PersonId }));
	await tx.insert(person).values(people.map(({ id, email, name }) => ({ id, email, name })));
	await tx.insert(membership).values(people.map(({ id, role }) => ({ teamId, personId: id, role })));
	const [author] = people;
	if (!author) throw new RangeError(`the demo team ${demo.slug} needs people`);
	await tx.insert(worksheet).values(
		demo.designs.map((design, index) => ({
			teamId,
			number: `WS-${String(index + 1).padStart(4, '0')}`,
			title: design.title,
			text: designToText(design) as WorksheetText,
			createdBy: author.id
		}))
	);
}

/**
 * Loads the demo once in the life of a database, whoever starts first; what people later delete of it
 * stays deleted.
 *
 * @returns whether it was loaded now
 */
export function loadDemo({ db }: Pick<Connection, 'db'>): Promise<boolean> {
	return db.transaction(async (tx) => {
		const [row] = await tx.select().from(installation).for('update');
		if (!row || row.demoAt) return false;
		for (const demo of demoTeams) await insertTeam(tx, demo);
		await tx.update(installation).set({ demoAt: new Date() }).where(eq(installation.single, true));
		return true;
	});
}
