/** The spectral lines of a design: every harmonic of every switching entry over its frequency range. */
import type { Design, Source, Switching } from '$lib/design/design';

export interface Line {
	readonly switching: Switching;
	readonly harmonic: number;
	/** Range of n · f [Hz]. */
	readonly from: number;
	readonly to: number;
}

/**
 * Lists the lines of a design, entry by entry, harmonic by harmonic.
 * @param design the worksheet's design
 * @returns lines with the range of their frequency [Hz]
 * @example linesOf(design)[1].from // 252000, the second harmonic of 126 kHz
 * Source: Fourier series of a periodic current.
 */
export function linesOf(design: Pick<Design, 'switching'>): Line[] {
	return design.switching.flatMap((switching) =>
		Array.from({ length: switching.harmonics }, (_, index) => ({
			switching,
			harmonic: index + 1,
			from: (index + 1) * switching.frequencyMin_Hz,
			to: (index + 1) * switching.frequencyMax_Hz
		}))
	);
}

/**
 * Finds the source that a rule names.
 * @param design the worksheet's design
 * @param id id of a source
 * @returns the source
 * @throws RangeError when the design has no such source, which a parsed design never lacks
 * @example sourceOf(design, 'amn').label // 'Test network'
 * Source: common practice.
 */
export function sourceOf(design: Pick<Design, 'sources'>, id: string): Source {
	const source = design.sources.find((entry) => entry.id === id);
	if (source === undefined) throw new RangeError(`no source has the id ${id}`);
	return source;
}
