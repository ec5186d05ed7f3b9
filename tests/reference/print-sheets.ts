/** Real sheets for the tests of print: every paper, orientation, kind and ink. */
import { avionicsConverter, chargerAuxiliary, servoControl } from '../../src/lib/design/examples';
import { evaluate } from '../../src/lib/rules/evaluate';
import type { Scene } from '../../src/lib/scene/scene';
import { composeSheet, sheetSteps } from '../../src/lib/sheet/compose';
import type { Layout, PaperName, SheetKind } from '../../src/lib/sheet/layout';

const designs = { charger: chargerAuxiliary, avionics: avionicsConverter, servo: servoControl } as const;
const evaluations = {
	charger: evaluate(chargerAuxiliary),
	avionics: evaluate(avionicsConverter),
	servo: evaluate(servoControl)
} as const;
export type DesignName = keyof typeof designs;

const papers: readonly PaperName[] = ['A4', 'A3', 'Letter', 'Tabloid'];
const orientations = ['landscape', 'portrait'] as const;
const kinds: readonly SheetKind[] = ['blank', 'step', 'worked'];
const inks = ['colour', 'mono'] as const;

export interface SheetCase {
	readonly name: string;
	readonly design: DesignName;
	readonly kind: SheetKind;
	readonly layout: Layout;
}

/** The 48 combinations, the designs in turn. */
export const sheetCases: readonly SheetCase[] = papers.flatMap((paper, index) =>
	orientations.flatMap((orientation) =>
		kinds.flatMap((kind) =>
			inks.map((ink) => {
				const design =
					(['charger', 'avionics', 'servo'] as const)[(index + (ink === 'mono' ? 1 : 0)) % 3] ?? 'charger';
				const name = [paper, orientation, kind, ink, design].join('-');
				return { name, design, kind, layout: { paper, orientation, ink } };
			})
		)
	)
);

/** Title with what fonts and encodings lose first. */
export const TITLE = 'Größe µ and Ω, Łódź';

export function composeCase({ design, kind, layout }: SheetCase): Scene {
	const steps = sheetSteps(designs[design]);
	return composeSheet({
		design: designs[design],
		evaluation: evaluations[design],
		layout,
		kind,
		...(kind === 'step' ? { step: steps } : {}),
		titleBlock: { title: TITLE, owner: 'Elverholm Ladeteknikk', number: 'EL-0042', creator: 'Å. Ødegård' }
	});
}

export function findCase(name: string): SheetCase {
	const found = sheetCases.find((sheet) => sheet.name === name);
	if (found === undefined) throw new RangeError(`no sheet ${name}`);
	return found;
}
