/**
 * A drawing in millimetres, y down, as plain read-only JSON. The set of items is closed: group, path, text.
 * Every coordinate is absolute paper millimetres.
 */

/** What a mark is, for readers of the file and for assistive technology. */
export type Role =
	| 'frame'
	| 'grid'
	| 'inductance-line'
	| 'capacitance-line'
	| 'component-line'
	| 'band'
	| 'window'
	| 'choice'
	| 'benefit'
	| 'scale'
	| 'strip'
	| 'title-block'
	| 'text';

/** `M` and `L` take x, y; `C` takes x1, y1, x2, y2, x, y; `Z` takes nothing. `at` holds the numbers in order [mm]. */
export interface PathData {
	readonly ops: string;
	readonly at: readonly number[];
}

export interface Stroke {
	/** `#rrggbb`. */
	readonly colour: string;
	/** [mm] */
	readonly width: number;
	/** Lengths of dashes and gaps [mm]. */
	readonly dash?: readonly number[];
	readonly cap?: 'butt' | 'round' | 'square';
	readonly join?: 'miter' | 'round' | 'bevel';
}

export type Face = 'regular' | 'medium' | 'semibold' | 'bold';

interface Mark {
	readonly id?: string;
	readonly role?: Role;
	/** Rule id, window index, `inductor`, `capacitor`, `source:<id>`, `choice`: becomes data-of. */
	readonly of?: string;
	/** Spoken by assistive technology. */
	readonly label?: string;
}

export interface Group extends Mark {
	readonly type: 'group';
	readonly items: readonly Item[];
}

export interface PathItem extends Mark {
	readonly type: 'path';
	readonly d: PathData;
	readonly stroke?: Stroke;
	/** `#rrggbb`. */
	readonly fill?: string;
	readonly fillRule?: 'nonzero' | 'evenodd';
}

export interface TextItem extends Mark {
	readonly type: 'text';
	readonly text: string;
	/** Anchor point on the baseline [mm]. */
	readonly x: number;
	readonly y: number;
	/** Capital height [mm]; the font size is this over the face's cap-height ratio (0.7 for Barlow). */
	readonly cap: number;
	readonly face: Face;
	readonly fill: string;
	readonly anchor: 'start' | 'middle' | 'end';
	/** Turn about the anchor, clockwise on paper [degree]. */
	readonly angle?: number;
}

export type Item = Group | PathItem | TextItem;

export interface Scene {
	readonly width: number;
	readonly height: number;
	readonly title: string;
	/** One paragraph that says what the sheet shows. */
	readonly description: string;
	/** BCP 47. */
	readonly language: string;
	/** Goes into the SVG's metadata as JSON. */
	readonly metadata: Readonly<Record<string, unknown>>;
	readonly items: readonly Item[];
}
