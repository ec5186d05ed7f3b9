/** What a line of the log says. No body, no query, no cookie and no parameter of a statement gets in. */
export interface LogEntry {
	readonly id: string;
	readonly status: number;
	readonly method: string;
	/** The route's pattern, not the address: addresses carry codes and tokens. */
	readonly route: string | null;
	/** What was thrown. */
	readonly cause: unknown;
}

interface Fault {
	readonly name: string;
	readonly message: string;
	readonly code?: string;
	readonly at?: readonly string[];
}

/** A failed statement's message ends with its parameters, which are people's data. */
function withoutParameters(message: string): string {
	const cut = message.indexOf('\nparams:');
	return (cut === -1 ? message : message.slice(0, cut)).slice(0, 2000);
}

function frames(error: Error): string[] {
	return (error.stack ?? '')
		.split('\n')
		.filter((line) => /^\s+at /.test(line))
		.slice(0, 12)
		.map((line) => line.trim());
}

function fault(error: unknown): Fault {
	if (!(error instanceof Error))
		return { name: typeof error, message: 'something that is no Error was thrown' };
	const code = 'code' in error && typeof error.code === 'string' ? { code: error.code } : {};
	return { name: error.name, message: withoutParameters(error.message), ...code, at: frames(error) };
}

/** An error and what caused it, outermost first, at most four. */
export function faults(error: unknown): Fault[] {
	const chain: Fault[] = [];
	for (let next = error; next !== undefined && next !== null && chain.length < 4;) {
		chain.push(fault(next));
		next = next instanceof Error ? next.cause : undefined;
	}
	return chain;
}

/** Writes one line of JSON to standard error. */
export function logFault({ cause, ...entry }: LogEntry): void {
	const time = new Date().toISOString();
	console.error(JSON.stringify({ time, level: 'error', ...entry, error: faults(cause) }));
}
