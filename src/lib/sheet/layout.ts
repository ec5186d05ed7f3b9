/** How a sheet is laid out; what is left out is chosen so that the lines that matter fall inside. */
export type PaperName = 'A4' | 'A3' | 'Letter' | 'Tabloid';

export interface Layout {
	readonly paper: PaperName;
	readonly orientation: 'landscape' | 'portrait';
	/** Length of one decade on both axes, whole millimetres. */
	readonly decade_mm?: number;
	/** Lower ends of the axes, powers of ten. */
	readonly frequencyFrom_Hz?: number;
	readonly impedanceFrom_ohm?: number;
	readonly ink?: 'colour' | 'mono';
	readonly strip?: boolean;
	readonly benefitPane?: boolean;
	readonly zones?: boolean;
	readonly decimalMark?: '.' | ',';
	readonly language?: 'en' | 'de';
}

export type SheetKind = 'blank' | 'step' | 'worked';

/** The cells that people fill in; the rest of the title block is set by the state of the record. */
export interface TitleBlock {
	readonly title?: string;
	readonly supplementaryTitle?: string;
	readonly owner?: string;
	readonly number?: string;
	readonly creator?: string;
	readonly department?: string;
	readonly reference?: string;
}
