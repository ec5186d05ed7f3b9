/** What a rule says of a design, and what the whole evaluation says of it. All values in SI base units. */
import type { Override, RuleClass, RuleKind } from '$lib/design/design';
import type { Quantity } from '$lib/quantity/unit';
import type { SeriesName } from '$lib/quantity/series';

/** One piece of a formula; the decimal mark and the language are the layout's to choose. */
export type FormulaPart =
	| { readonly type: 'text'; readonly text: string }
	| { readonly type: 'symbol'; readonly base: string; readonly sub?: string; readonly sup?: string }
	| {
			readonly type: 'quantity';
			readonly value: number;
			readonly quantity: Quantity;
			/** Significant digits; absent prints the value as it was given (up to 12). */
			readonly digits?: number;
			/** Direction that keeps a printed limit on the safe side; absent rounds to the nearest. */
			readonly round?: 'up' | 'down';
	  };

/** `general` = `numbers` = `result`: the law, the law with the numbers put in, and the limit that follows. */
export interface Formula {
	readonly general: readonly FormulaPart[];
	readonly numbers: readonly FormulaPart[];
	readonly result: readonly FormulaPart[];
}

/** An open interval of real capacitance that a rule forbids [F]; 0 and Infinity stand for no end. */
export interface Band {
	readonly from: number;
	readonly to: number;
	readonly cause: string;
	readonly source?: string;
	readonly switching?: string;
	readonly harmonic?: number;
}

export interface Finding {
	readonly rule: string;
	readonly kind: RuleKind;
	readonly class: RuleClass;
	readonly state: 'evaluated' | 'not-evaluated' | 'not-applicable';
	/** Why it was not evaluated or does not apply; null when evaluated. */
	readonly reason: string | null;
	readonly bands: readonly Band[];
	readonly formula: Formula | null;
	readonly rationale: string;
	readonly assumptions: readonly string[];
	readonly cautions: readonly string[];
	/** The rule of thumb's edges beside an exact band that differs by more than 5 %, for a thin line on the chart [F]. */
	readonly thumbEdges?: readonly { readonly capacitance: number; readonly label: string }[];
	/** Present where a named person put this design or advisory rule aside: it closes no window. */
	readonly override?: Override;
}

/** A closed interval of real capacitance that mandatory and design rules leave [F]. */
export interface Window {
	readonly from: number;
	readonly to: number;
	readonly limitedBy: { readonly from: string | null; readonly to: string | null };
	/** Nominal values whose whole tolerance interval lies inside; null at an open end. */
	readonly nominalFrom: number | null;
	readonly nominalTo: number | null;
	readonly nominalEmpty: boolean;
	/** √(nominalFrom · nominalTo); null when an end is open. */
	readonly target: number | null;
	readonly widthDecades: number | null;
	/** A single legal point between two bands that touch. */
	readonly degenerate: boolean;
}

export interface Benefit {
	readonly source: string;
	readonly switching: string;
	readonly harmonic: number;
	/** Where the minimum lies, n · f [Hz]. */
	readonly frequency: number;
	/** null for networks [H]. */
	readonly inductance: number | null;
	readonly gain_dB: number;
}

export interface Candidate {
	readonly capacitance: number;
	readonly series: SeriesName;
	readonly window: number;
	/** C / nominalFrom − 1. */
	readonly marginFrom: number;
	/** nominalTo / C − 1. */
	readonly marginTo: number;
	readonly warnings: readonly string[];
	readonly benefit: readonly Benefit[];
}

export interface Verdict {
	readonly state: 'allowed' | 'nominal-only' | 'forbidden';
	readonly breaks: readonly string[];
	readonly warnings: readonly string[];
	readonly marginFrom: number | null;
	readonly marginTo: number | null;
}

export interface Cure {
	readonly text: string;
	/** JSON pointer into the design. */
	readonly pointer: string;
	readonly value: number;
}

export interface Conflict {
	readonly rules: readonly string[];
	readonly explanation: string;
	readonly cure: Cure | null;
}

export interface Evaluation {
	readonly engine: string;
	readonly findings: readonly Finding[];
	readonly windows: readonly Window[];
	readonly candidates: readonly Candidate[];
	readonly recommended: number | null;
	readonly choice: Verdict | null;
	readonly conflict: Conflict | null;
	readonly benefit: readonly Benefit[];
}
