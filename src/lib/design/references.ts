/** Ids and what refers to them: each id once, each reference to something that exists and suits. */
import type { Design, Rule } from './design';
import { issue, type Issue, type Path } from './issue';

const checkIds = (design: Design): Issue[] =>
	(['switching', 'sources', 'rules', 'curves', 'pins'] as const).flatMap((key) => {
		const seen = new Set<string>();
		return (design[key] ?? []).flatMap(({ id }, index) => {
			if (!seen.has(id)) {
				seen.add(id);
				return [];
			}
			return [issue([key, index, 'id'], `Enter another id: “${id}” is already in use in this list.`)];
		});
	});

/** These step the supply voltage, or close a loop, through R and L; a network or a curve does not give them. */
const NEEDS_IMPEDANCE: readonly Rule['kind'][] = ['inrush-current', 'voltage-rating', 'input-stability'];

const checkRule = (rule: Rule, index: number, { sources }: Design): Issue[] => {
	if (!('source' in rule)) return [];
	const source = sources.find(({ id }) => id === rule.source);
	const path = ['rules', index, 'source'];
	if (source === undefined) {
		const ids = sources.map(({ id }) => id).join(', ');
		return [issue(path, `Enter a source of this design (${ids}): “${rule.source}” is not one.`)];
	}
	if (NEEDS_IMPEDANCE.includes(rule.kind) && source.kind !== 'impedance') {
		return [
			issue(
				path,
				`Enter a source of kind impedance: the rule ${rule.kind} needs its inductance and resistance.`
			)
		];
	}
	return [];
};

const checkRules = (design: Design): Issue[] =>
	design.rules.flatMap((rule, index) => checkRule(rule, index, design));

const checkCurveIds = (design: Design): Issue[] => {
	const ids = new Set((design.curves ?? []).map(({ id }) => id));
	const users: [Path, string | undefined][] = [
		[['inductor', 'curve'], design.inductor.curve],
		[['capacitor', 'curve'], design.capacitor.curve],
		[['choice', 'curve'], design.choice.curve],
		...design.sources.map((source, index): [Path, string | undefined] => [
			['sources', index, 'curve'],
			source.kind === 'measured' ? source.curve : undefined
		])
	];
	return users.flatMap(([path, id]) =>
		id === undefined || ids.has(id)
			? []
			: [issue(path, `Enter the id of a measured curve of this design: “${id}” is not one.`)]
	);
};

const DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];

const isCalendarDate = (date: string): boolean => {
	const [year = 0, month = 0, day = 0] = date.split('-').map(Number);
	const isLeap = year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0);
	return day >= 1 && day <= (month === 2 && isLeap ? 29 : (DAYS[month - 1] ?? 0));
};

const checkOverrides = ({ overrides = [], rules }: Design): Issue[] =>
	overrides.flatMap((override, index) => {
		const issues: Issue[] = [];
		const rule = rules.find(({ id }) => id === override.rule);
		const path = ['overrides', index, 'rule'];
		if (rule === undefined) {
			issues.push(issue(path, `Enter a rule of this design: “${override.rule}” is not one.`));
		} else if (rule.class === 'mandatory') {
			issues.push(
				issue(path, `Leave this override out: “${override.rule}” is mandatory and cannot be overridden.`)
			);
		}
		if (overrides.findIndex(({ rule: id }) => id === override.rule) < index) {
			issues.push(issue(path, `Enter one override for “${override.rule}”, not two.`));
		}
		if (!isCalendarDate(override.date)) {
			issues.push(issue(['overrides', index, 'date'], 'Enter a day of the calendar, such as 2024-05-31.'));
		}
		return issues;
	});

/**
 * Lists ids that are not unique and references that lead nowhere or where they must not.
 * @param design a design of the right shape
 * @returns issues; empty where all holds
 * @example checkReferences(chargerAuxiliary) // []
 */
export function checkReferences(design: Design): Issue[] {
	return [checkIds, checkRules, checkCurveIds, checkOverrides].flatMap((check) => check(design));
}
