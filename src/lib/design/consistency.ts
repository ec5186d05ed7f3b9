/** What must hold across the fields of a design whose shape is already right. */
import type { Curve, Design } from './design';
import { issue, type Issue } from './issue';
import { checkReferences } from './references';

/** Lines are worked out for each source, switching entry and harmonic; more would take too long. */
const MOST_LINES = 240;

const checkSupply = ({ supply }: Design): Issue[] => {
	const issues: Issue[] = [];
	const keys = ['frequency_Hz', 'frequencyMax_Hz'] as const;
	for (const key of keys) {
		const isMissing = supply[key] === undefined;
		if (supply.kind === 'ac' && isMissing) {
			issues.push(
				issue(['supply', key], 'Enter the line frequency and the highest line frequency of an ac supply.')
			);
		}
		if (supply.kind === 'dc' && !isMissing) {
			issues.push(issue(['supply', key], 'Leave the line frequency out: a dc supply has none.'));
		}
	}
	if (supply.voltageMax_V < supply.voltage_V) {
		issues.push(
			issue(['supply', 'voltageMax_V'], 'Enter the highest supply voltage, at least the supply voltage.')
		);
	}
	if ((supply.frequencyMax_Hz ?? Infinity) < (supply.frequency_Hz ?? 0)) {
		issues.push(
			issue(['supply', 'frequencyMax_Hz'], 'Enter the highest line frequency, at least the line frequency.')
		);
	}
	return issues;
};

const checkLoad = ({ load, supply }: Design): Issue[] => {
	if (load === undefined) return [];
	const issues: Issue[] = [];
	if (load.voltageMin_V > supply.voltage_V) {
		issues.push(
			issue(['load', 'voltageMin_V'], 'Enter the lowest supply voltage, at most the supply voltage.')
		);
	}
	if ((load.lightLoad_W ?? 0) > load.power_W) {
		issues.push(
			issue(['load', 'lightLoad_W'], 'Enter the power at light load, at most the power of the load.')
		);
	}
	return issues;
};

const checkSwitching = ({ switching }: Design): Issue[] =>
	switching.flatMap((entry, index) => {
		const issues: Issue[] = [];
		if (entry.frequencyMax_Hz < entry.frequencyMin_Hz) {
			issues.push(
				issue(
					['switching', index, 'frequencyMax_Hz'],
					'Enter the highest switching frequency, at least the lowest one.'
				)
			);
		}
		if (entry.current_A !== undefined && entry.current_A.length !== entry.harmonics) {
			issues.push(
				issue(
					['switching', index, 'current_A'],
					`Enter one current for each of the ${String(entry.harmonics)} harmonics, not ${String(entry.current_A.length)}.`
				)
			);
		}
		return issues;
	});

const checkSources = ({ sources }: Design): Issue[] =>
	sources.flatMap((source, index) =>
		source.kind === 'impedance' && source.inductanceMax_H < source.inductanceMin_H
			? [
					issue(
						['sources', index, 'inductanceMax_H'],
						'Enter the highest source inductance, at least the lowest one.'
					)
				]
			: []
	);

const checkLines = ({ sources, switching }: Design): Issue[] => {
	const harmonics = switching.reduce((sum, entry) => sum + entry.harmonics, 0);
	const lines = sources.length * harmonics;
	if (lines <= MOST_LINES) return [];
	return [
		issue(
			['switching'],
			`Enter fewer harmonics, switching frequencies or sources: together they make ${String(lines)} lines, and ${String(MOST_LINES)} are the most.`
		)
	];
};

const checkCurve = (curve: Curve, index: number): Issue[] => {
	const issues: Issue[] = [];
	const points = curve.frequency_Hz.length;
	for (const key of ['real_ohm', 'imaginary_ohm'] as const) {
		if (curve[key].length !== points) {
			issues.push(
				issue(
					['curves', index, key],
					`Enter one value for each of the ${String(points)} frequencies of the curve.`
				)
			);
		}
	}
	const falling = curve.frequency_Hz.findIndex(
		(f, point) => point > 0 && f <= (curve.frequency_Hz[point - 1] ?? 0)
	);
	if (falling !== -1) {
		issues.push(
			issue(
				['curves', index, 'frequency_Hz', falling],
				'Enter the frequencies of the curve in rising order, each once.'
			)
		);
	}
	const dead = curve.real_ohm.findIndex((real, point) => real === 0 && curve.imaginary_ohm[point] === 0);
	if (dead !== -1) {
		issues.push(
			issue(['curves', index, 'real_ohm', dead], 'Enter an impedance other than zero at every frequency.')
		);
	}
	return issues;
};

const checkCurves = ({ curves = [] }: Design): Issue[] => curves.flatMap(checkCurve);

const checkEmission = ({ emission }: Design): Issue[] => {
	if (emission?.limit !== 'table') return [];
	if (emission.table === undefined)
		return [issue(['emission', 'table'], 'Enter the points of the limit line.')];
	const { table } = emission;
	const falling = table.findIndex(
		(point, index) => point.frequency_Hz < (table[index - 1]?.frequency_Hz ?? 0)
	);
	if (falling === -1) return [];
	return [
		issue(
			['emission', 'table', falling, 'frequency_Hz'],
			'Enter the points of the limit line in order of frequency.'
		)
	];
};

const checkManualBands = ({ rules }: Design): Issue[] =>
	rules.flatMap((rule, index) =>
		rule.kind === 'manual-band' && (rule.from_F ?? 0) >= (rule.to_F ?? Infinity)
			? [issue(['rules', index, 'to_F'], 'Enter the upper end of the band, above its lower end.')]
			: []
	);

const CHECKS = [
	checkSupply,
	checkLoad,
	checkSwitching,
	checkSources,
	checkLines,
	checkManualBands,
	checkCurves,
	checkEmission,
	checkReferences
];

/**
 * Lists what contradicts itself in a design of the right shape.
 * @param design the design
 * @returns issues, in the order of the file's parts; empty where all holds
 * @example checkConsistency(chargerAuxiliary) // []
 */
export function checkConsistency(design: Design): Issue[] {
	return CHECKS.flatMap((check) => check(design));
}
