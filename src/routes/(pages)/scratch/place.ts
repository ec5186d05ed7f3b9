/** The row that a pointer leads to, as the form numbers it. */
const ROWS: readonly (readonly [RegExp, string])[] = [
	[/^\/design\/supply/, '1.1 Supply'],
	[/^\/design\/load/, '1.2 Load'],
	[/^\/design\/switching\/(\d+)/, '2.# Switching'],
	[/^\/design\/switching/, '2 Converter'],
	[/^\/design\/inductor/, '3.1 Inductor'],
	[/^\/design\/capacitor/, '3.2 Capacitor'],
	[/^\/design\/damping/, '3.3 Damping'],
	[/^\/design\/curves/, '3.4 Measured curves'],
	[/^\/design\/sources\/(\d+)/, '4.# Source'],
	[/^\/design\/sources/, '4 Sources'],
	[/^\/design\/rules\/(\d+)/, '5.# Rule'],
	[/^\/design\/rules/, '5 Rules'],
	[/^\/design\/choice/, '6 Choice'],
	[/^\/design\/emission/, '7 Emission limit'],
	[/^\/design\/(overrides|pins|notes)/, '8 Overrides and notes'],
	[/^\/(design\/title|titleBlock)/, '9 Title block'],
	[/^\/layout/, 'Sheet']
];

/**
 * Names the row of a pointer.
 * @example rowName('/design/rules/2/divisor') // '5.3 Rule'
 */
export function rowName(pointer: string): string {
	for (const [pattern, name] of ROWS) {
		const match = pattern.exec(pointer);
		if (match !== null) return name.replace('#', String(Number(match[1] ?? 0) + 1));
	}
	return 'Design';
}

/** Ids of the fields that may show a pointer's issue, the nearest first. */
export function fieldIds(pointer: string): string[] {
	const steps = pointer.split('/').slice(1);
	return steps.map((_, n) => `at-${steps.slice(0, steps.length - n).join('-')}`);
}
