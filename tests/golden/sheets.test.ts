/**
 * Sheets of the three worked scenarios, kept as scene and as SVG. A drawing that differs is written beside the kept one
 * as `-changed`; look at both, and rename it when the change is meant. The commit that does so says why.
 */
import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { avionicsConverter, chargerAuxiliary, servoControl } from '$lib/design/examples';
import type { Scene } from '$lib/scene/scene';
import { toSvg } from '$lib/render/svg';
import { composeSheet } from '$lib/sheet/compose';
import type { Layout, SheetKind } from '$lib/sheet/layout';
import { describe, expect, it } from 'vitest';

const layout: Layout = { paper: 'A4', orientation: 'landscape' };

const DESIGNS = {
	'charger-auxiliary': chargerAuxiliary,
	'avionics-converter': avionicsConverter,
	'servo-control': servoControl
} as const;

const KINDS: readonly (readonly [SheetKind, number])[] = [
	['blank', 1],
	['step', 3],
	['worked', 1]
];

const CASES = Object.entries(DESIGNS).flatMap(([name, design]) =>
	KINDS.map(([kind, step]) => ({ name: `${name}-${kind}`, design, kind, step }))
);

const rounded = (_: string, value: unknown): unknown =>
	typeof value === 'number' ? Math.round(value * 1000) / 1000 + 0 : value;

/** One mark on each line, so that a difference names it. */
const sceneText = (scene: Scene): string =>
	`${JSON.stringify(scene, rounded).replace(/\{"type":/g, '\n{"type":')}\n`;

const svgText = (scene: Scene): string =>
	`${toSvg(scene)
		.replace(/-?\d+\.\d{4,}/g, (number) => String(Math.round(Number(number) * 1000) / 1000))
		.replace(/></g, '>\n<')}\n`;

const pathOf = (file: string): string => new URL(file, import.meta.url).pathname;

const compareWithKept = (name: string, extension: string, drawn: string): void => {
	const kept = pathOf(`${name}.${extension}`);
	const changed = pathOf(`${name}-changed.${extension}`);
	const same = existsSync(kept) && readFileSync(kept, 'utf8') === drawn;
	if (same) rmSync(changed, { force: true });
	else writeFileSync(changed, drawn);
	expect(same, `${name}.${extension} differs: see ${name}-changed.${extension}`).toBe(true);
};

describe('the kept sheets', () => {
	it.each(CASES)('$name: the scene is the kept one', ({ name, design, kind, step }) => {
		compareWithKept(name, 'scene.json', sceneText(composeSheet({ design, layout, kind, step })));
	});

	it.each(CASES)('$name: the SVG is the kept one', ({ name, design, kind, step }) => {
		compareWithKept(name, 'svg', svgText(composeSheet({ design, layout, kind, step })));
	});
});
