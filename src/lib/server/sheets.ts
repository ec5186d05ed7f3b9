/** The public sheets: what a client asks for, read and drawn. Nothing here can say that a sheet is issued. */
import { createHash } from 'node:crypto';
import * as z from 'zod/mini';
import type { Design } from '$lib/design/design';
import { branch, oneOf, whole } from '$lib/design/field';
import { parseLayout, parseTitleBlock } from '$lib/design/layout';
import { parseDesign, type Issue } from '$lib/design/parse';
import { read as readShape } from '$lib/design/read';
import type { Scene } from '$lib/scene/scene';
import { composeSheet, LayoutError, type SheetInput } from '$lib/sheet/compose';
import type { Layout, SheetKind, TitleBlock } from '$lib/sheet/layout';
import { unprintableInDesign, unprintableInTitleBlock } from '$lib/sheet/printable';

export type Reading<Value> =
	{ readonly ok: true; readonly value: Value } | { readonly ok: false; readonly issues: readonly Issue[] };

const request = branch('the sheet', {
	design: z.optional(z.unknown()),
	layout: z.optional(z.unknown()),
	kind: z.optional(oneOf('the kind of sheet', ['blank', 'step', 'worked'])),
	step: z.optional(whole('the step', 1, 42)),
	titleBlock: z.optional(z.unknown())
});

const DEFAULT_LAYOUT: Layout = { paper: 'A4', orientation: 'landscape' };

/** Reads a design that is to be evaluated or printed. */
export function readDesign(input: unknown): Reading<Design> {
	const parsed = parseDesign(input);
	if (!parsed.ok) return parsed;
	const issues = unprintableInDesign(parsed.design);
	return issues.length > 0 ? { ok: false, issues } : { ok: true, value: parsed.design };
}

function readLayout(input: unknown): Reading<Layout> {
	const parsed = parseLayout(input);
	return parsed.ok ? { ok: true, value: parsed.layout } : parsed;
}

function readTitleBlock(input: unknown): Reading<TitleBlock> {
	const parsed = parseTitleBlock(input);
	if (!parsed.ok) return parsed;
	const issues = unprintableInTitleBlock(parsed.titleBlock);
	return issues.length > 0 ? { ok: false, issues } : { ok: true, value: parsed.titleBlock };
}

/** Reads a part that may be left out; its issues point into the whole. */
function readPart<Value>(
	key: string,
	input: unknown,
	reader: (input: unknown) => Reading<Value>
): Reading<Value | undefined> {
	if (input === undefined) return { ok: true, value: undefined };
	const reading = reader(input);
	if (reading.ok) return reading;
	return {
		ok: false,
		issues: reading.issues.map(({ pointer, detail }) => ({ pointer: `/${key}${pointer}`, detail }))
	};
}

const noStep: Issue = { pointer: '/step', detail: 'Enter the step, a whole number from 1.' };
const noDesign: Issue = { pointer: '/design', detail: 'Enter the design, or blank as the kind of sheet.' };

/** The printed fingerprint of the data; the door puts the keys of every design in one order. */
const fingerprint = (design: Design): string =>
	createHash('sha256').update(JSON.stringify(design)).digest('hex');

type Asked = z.output<typeof request>;

const kindOf = ({ kind, design }: Asked): SheetKind => kind ?? (design === undefined ? 'blank' : 'worked');

/** What a kind of sheet cannot do without. */
function missingParts(asked: Asked): Issue[] {
	const kind = kindOf(asked);
	return [
		...(kind !== 'blank' && asked.design === undefined ? [noDesign] : []),
		...(kind === 'step' && asked.step === undefined ? [noStep] : [])
	];
}

/** Reads what a sheet is asked for with. */
export function read(input: unknown): Reading<SheetInput> {
	const shaped = readShape(request, input);
	if (!shaped.ok) return shaped;
	const asked = shaped.value;
	const design = readPart('design', asked.design, readDesign);
	const layout = readPart('layout', asked.layout, readLayout);
	const titleBlock = readPart('titleBlock', asked.titleBlock, readTitleBlock);
	const issues = [
		...[design, layout, titleBlock].flatMap((part) => (part.ok ? [] : part.issues)),
		...missingParts(asked)
	];
	if (!design.ok || !layout.ok || !titleBlock.ok || issues.length > 0) return { ok: false, issues };
	const kind = kindOf(asked);
	return {
		ok: true,
		value: {
			kind,
			design: design.value,
			dataHash: design.value && fingerprint(design.value),
			layout: layout.value ?? DEFAULT_LAYOUT,
			titleBlock: titleBlock.value,
			step: kind === 'step' ? asked.step : undefined
		}
	};
}

/** Draws the sheet that a client asks for. */
export function draw(input: unknown): Reading<Scene> {
	const asked = read(input);
	if (!asked.ok) return asked;
	try {
		return { ok: true, value: composeSheet(asked.value) };
	} catch (cause) {
		if (!(cause instanceof LayoutError)) throw cause;
		return { ok: false, issues: [{ pointer: cause.pointer, detail: cause.message }] };
	}
}
