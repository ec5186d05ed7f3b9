/** The benefit of a nominal value at every line of every source. */
import type { Design } from '$lib/design/design';
import { benefitAt } from '$lib/network/benefit';
import { sourceImpedance } from '$lib/network/source';
import { capacitorPart, filterOf, sourceModel } from './circuit';
import type { Benefit } from './finding';
import { linesOf } from './lines';

export function benefitMeter(design: Design): (capacitance: number) => Benefit[] {
	const filter = filterOf(design);
	const lines = linesOf(design);
	return (capacitance) =>
		design.sources.flatMap((source) =>
			lines.map((line): Benefit => {
				const model = sourceModel(design, source);
				let best: Benefit | null = null;
				for (let i = 0; i <= 20; i += 1) {
					const frequency = line.from * (line.to / line.from) ** (i / 20);
					const choices =
						model.kind === 'impedance'
							? Array.from(
									{ length: 21 },
									(_, k) => model.inductanceMin + ((model.inductanceMax - model.inductanceMin) * k) / 20
								)
							: [null];
					for (const inductance of choices) {
						const z = sourceImpedance(model, frequency, inductance ?? undefined);
						const gain_dB = benefitAt(
							filter,
							z,
							capacitorPart(design, design.choice, capacitance),
							frequency
						);
						if (best === null || gain_dB < best.gain_dB) {
							best = {
								source: source.id,
								switching: line.switching.id,
								harmonic: line.harmonic,
								frequency,
								inductance,
								gain_dB
							};
						}
					}
				}
				if (best === null) throw new RangeError('no line');
				return best;
			})
		);
}
