/** The front page's question: switching frequency, L, C and a test network; all else at its nominal start. */
import type { Design, NetworkKind } from '$lib/design/design';
import { parseDesign } from '$lib/design/parse';
import { newDesign } from '$lib/design/start';
import { formatQuantity } from '$lib/quantity/format';
import { parseQuantity } from '$lib/quantity/parse';
import type { Quantity } from '$lib/quantity/unit';
import { evaluate } from '$lib/rules/evaluate';
import type { Evaluation } from '$lib/rules/finding';

export interface FourText {
	readonly f: string;
	readonly L: string;
	readonly C: string;
	readonly source: string;
}
export type FourKey = 'f' | 'L' | 'C';

interface Network {
	readonly key: string;
	readonly name: string;
	readonly kind: NetworkKind;
	readonly networks: 1 | 2;
}

export const NETWORKS: readonly [Network, ...Network[]] = [
	{ key: '2x50uH-5ohm', name: '2 × 50 µH + 5 Ω', kind: 'amn-50uH-5ohm', networks: 2 },
	{ key: '2x50uH', name: '2 × 50 µH', kind: 'amn-50uH', networks: 2 },
	{ key: '1x50uH', name: '1 × 50 µH', kind: 'amn-50uH', networks: 1 },
	{ key: '2x5uH-1ohm', name: '2 × 5 µH + 1 Ω', kind: 'amn-5uH-1ohm', networks: 2 },
	{ key: '2x5uH', name: '2 × 5 µH', kind: 'an-5uH', networks: 2 },
	{ key: '1x5uH', name: '1 × 5 µH', kind: 'an-5uH', networks: 1 }
];

export const START: FourText = { f: '100 kHz', L: '150 µH', C: '3.3 µF', source: NETWORKS[0].key };

const QUANTITY: Readonly<Record<FourKey, Quantity>> = { f: 'frequency', L: 'inductance', C: 'capacitance' };
const POINTER: Readonly<Record<FourKey, string>> = {
	f: '/switching/0/frequencyM',
	L: '/inductor/inductance_H',
	C: '/capacitor/capacitance_F'
};
const KEYS = ['f', 'L', 'C'] as const;
const NOMINAL = { toleranceMinus: 0, tolerancePlus: 0 } as const;
const LONGEST = 200;

/** Takes the four texts from an address; what is missing starts as usual. */
export function fourOfQuery(query: URLSearchParams): FourText {
	const text = (key: keyof FourText): string => (query.get(key) ?? START[key]).slice(0, LONGEST);
	return { f: text('f'), L: text('L'), C: text('C'), source: text('source') };
}

export function queryOfFour(four: FourText): string {
	return new URLSearchParams({ ...four }).toString();
}

/** The network that a key stands for; the first where none has it. */
export function networkOf(key: string): Network {
	return NETWORKS.find((network) => network.key === key) ?? NETWORKS[0];
}

type Values = Readonly<Record<FourKey, number>>;

const designOf = (values: Values, network: Network): Design => {
	const start = newDesign('dc');
	return {
		...start,
		title: 'Line-side capacitor',
		switching: [
			{
				id: 'converter',
				label: 'Converter',
				frequencyMin_Hz: values.f,
				frequencyMax_Hz: values.f,
				harmonics: 3
			}
		],
		inductor: { inductance_H: values.L, ...NOMINAL },
		capacitor: { capacitance_F: values.C, ...NOMINAL },
		sources: [{ id: 'amn', label: 'Test network', kind: network.kind, networks: network.networks }],
		choice: { capacitance_F: null, ...NOMINAL, series: 'E6' },
		// Bands of harmonics come with a worksheet; four numbers keep to the fundamental.
		rules: start.rules.map((rule) =>
			rule.kind === 'resonance-guard' ? { ...rule, source: 'amn', harmonicGuard: 1 } : rule
		)
	};
};

export interface FourAnswer {
	readonly design: Design;
	readonly evaluation: Evaluation;
	/** How each text was read; empty where it was not. */
	readonly readings: Readonly<Record<FourKey, string>>;
	readonly issues: Readonly<Partial<Record<FourKey, string>>>;
	/** The texts that count: those that could be read, else what stood there before. */
	readonly good: FourText;
}

/** With the recommended value chosen, so that the small sheet shows it. */
const decide = (design: Design): { design: Design; evaluation: Evaluation } => {
	const evaluation = evaluate(design);
	if (evaluation.recommended === null) return { design, evaluation };
	const chosen = { ...design, choice: { ...design.choice, capacitance_F: evaluation.recommended } };
	return { design: chosen, evaluation: evaluate(chosen) };
};

/**
 * Answers four numbers; a text that cannot be read or is out of range counts as `good` has it.
 * @param four texts as typed
 * @param good texts that can be read, from the last answer
 * @returns the design with its recommended choice, what the rules leave, and a question for each bad text
 */
export function answerFour(four: FourText, good: FourText = START): FourAnswer {
	const issues: Partial<Record<FourKey, string>> = {};
	const readings: Record<FourKey, string> = { f: '', L: '', C: '' };
	const kept: Record<FourKey, string> = { f: good.f, L: good.L, C: good.C };
	const values: Record<FourKey, number> = { f: 0, L: 0, C: 0 };
	const network = networkOf(four.source);
	for (const key of KEYS) {
		const before = parseQuantity(good[key], QUANTITY[key]);
		if (before.ok) values[key] = before.value;
	}
	for (const key of KEYS) {
		const parsed = parseQuantity(four[key], QUANTITY[key]);
		if (!parsed.ok) {
			issues[key] = parsed.detail;
			continue;
		}
		readings[key] = parsed.reading;
		const tried = parseDesign(designOf({ ...values, [key]: parsed.value }, network));
		const wrong = tried.ok ? undefined : tried.issues.find(({ pointer }) => pointer.startsWith(POINTER[key]));
		if (wrong !== undefined) {
			issues[key] = wrong.detail;
			continue;
		}
		values[key] = parsed.value;
		kept[key] = four[key];
	}
	return { ...decide(designOf(values, network)), readings, issues, good: { ...kept, source: network.key } };
}

/** A whole design to go on with: the four numbers in a new worksheet, tolerances and rules as it starts. */
export function worksheetOfFour(four: FourText): Design {
	const { design } = answerFour(four);
	const network = networkOf(four.source);
	const start = newDesign(network.kind === 'an-5uH' ? 'dc' : 'ac');
	const [first] = design.switching;
	return {
		...start,
		switching: first === undefined ? start.switching : [{ ...first, harmonics: 5 }],
		inductor: { ...start.inductor, inductance_H: design.inductor.inductance_H },
		capacitor: { ...start.capacitor, capacitance_F: design.capacitor.capacitance_F },
		sources: start.sources.map((source, n) =>
			n === 0
				? { id: source.id, label: source.label, kind: network.kind, networks: network.networks }
				: source
		)
	};
}

/** The four numbers in one line, for the title block. */
export function fourTitle({ design }: FourAnswer): string {
	const [first] = design.switching;
	return [
		formatQuantity(first?.frequencyMin_Hz ?? 0, 'frequency'),
		formatQuantity(design.inductor.inductance_H, 'inductance'),
		formatQuantity(design.capacitor.capacitance_F, 'capacitance')
	].join(' · ');
}
