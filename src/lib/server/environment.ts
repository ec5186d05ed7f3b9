import { env } from '$env/dynamic/private';
import { z } from 'zod';

const databaseUrl = z
	.string({ error: 'is missing: start the application by npm start' })
	.regex(/^postgres(?:ql)?:\/\//, 'must begin with postgres://');

const schema = z.object({
	/** The database as the role that owns nothing; the start script makes it from DATABASE_URL. */
	DATABASE_APP_URL: databaseUrl,
	ORIGIN: z
		.url({ protocol: /^https?$/, error: 'must be an address such as http://127.0.0.1:4600' })
		.optional(),
	DEMO: z.enum(['0', '1'], { error: 'must be 0 or 1' }).default('1')
});

export type Environment = Readonly<z.infer<typeof schema>>;

/**
 * Checks the environment before the first request.
 *
 * @throws Error that names each variable that is wrong, and no value: values may be secret
 */
export function parseEnvironment(variables: Readonly<Record<string, string | undefined>>): Environment {
	// An empty variable is how many shells and service files say "not set".
	const set = Object.fromEntries(Object.entries(variables).filter(([, value]) => value !== ''));
	const result = schema.safeParse(set);
	if (result.success) return result.data;
	const faults = result.error.issues.map((issue) => `${issue.path.join('.')} ${issue.message}`);
	throw new Error(`The environment is not usable: ${faults.join('; ')}.`);
}

let parsed: Environment | undefined;

/** The checked environment of this process. */
export function environment(): Environment {
	parsed ??= parseEnvironment(env);
	return parsed;
}
