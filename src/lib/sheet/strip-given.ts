/** Sections 1 to 4 of the strip: supply, converter, filter and sources, as the design states them. */
import type {
	Capacitor,
	Design,
	Inductor,
	NetworkKind,
	NetworkSource,
	Source,
	Supply,
	Tolerance
} from '$lib/design/design';
import { formatQuantity } from '$lib/quantity/format';
import type { Quantity } from '$lib/quantity/unit';
import { joinRange, type DecimalMark } from './edge';
import { shorten } from './fitting';
import { lettered } from './pen';
import { PARALLEL, runItems, runsWidth, wrapRuns, type Run } from './runs';
import {
	BASE,
	CAP,
	heading,
	NUMBER_WIDTH,
	ROW,
	rowLine,
	rowNumber,
	SYMBOL_WIDTH,
	type Block,
	type StripContext
} from './strip-block';
import { fill } from './words';

interface Given {
	readonly symbol: string;
	readonly index?: string;
	readonly value: readonly Run[];
	readonly note: string;
}

interface Section {
	readonly name: 'supply' | 'converter' | 'filter' | 'sources';
	readonly rows: readonly Given[];
}

type Written = (value: number, quantity: Quantity) => string;

const writer =
	(mark: DecimalMark): Written =>
	(value, quantity) =>
		formatQuantity(value, quantity, { decimalMark: mark });

const plain = (text: string): Run[] => [{ text, face: 'semibold' }];

/**
 * Writes a tolerance.
 * @param part with fractions downward and upward
 * @param mark decimal mark
 * @returns e.g. '±10 %' or '−20 % +10 %'; empty when there is none
 * @example toleranceText({ toleranceMinus: 0.1, tolerancePlus: 0.1 }, '.') // '±10 %'
 */
export function toleranceText({ toleranceMinus, tolerancePlus }: Tolerance, mark: DecimalMark): string {
	const write = writer(mark);
	if (toleranceMinus === 0 && tolerancePlus === 0) return '';
	if (toleranceMinus === tolerancePlus) return `±${write(tolerancePlus, 'fraction')}`;
	return `\u2212${write(toleranceMinus, 'fraction')} +${write(tolerancePlus, 'fraction')}`;
}

const supplyRow = (supply: Supply, write: Written, { words }: StripContext): Given => {
	const voltage = joinRange(write(supply.voltage_V, 'voltage'), write(supply.voltageMax_V, 'voltage'));
	const { frequency_Hz: low, frequencyMax_Hz: high } = supply;
	const frequency =
		low === undefined ? '' : `, ${joinRange(write(low, 'frequency'), write(high ?? low, 'frequency'))}`;
	const kind = supply.kind === 'ac' ? words.strip.alternating : words.strip.direct;
	return { symbol: 'U', value: plain(voltage + frequency), note: kind };
};

const loadRows = ({ load }: Design, write: Written, { words }: StripContext): Given[] => {
	if (load === undefined) return [];
	const value = `${write(load.power_W, 'power')}, ≥ ${write(load.voltageMin_V, 'voltage')}`;
	const { lightLoad_W: light } = load;
	const { load: full, lightLoad } = words.strip;
	const note = light === undefined ? full : fill(lightLoad, { value: write(light, 'power') });
	return [{ symbol: 'P', value: plain(value), note }];
};

const switchingRows = ({ switching }: Design, write: Written, { words }: StripContext): Given[] =>
	switching.map((entry, index): Given => {
		const low = write(entry.frequencyMin_Hz, 'frequency');
		const high = write(entry.frequencyMax_Hz, 'frequency');
		const lines = fill(words.strip.harmonics, { n: String(entry.harmonics) });
		return {
			symbol: 'f',
			index: switching.length > 1 ? `sw${String(index + 1)}` : 'sw',
			value: plain(joinRange(low, high)),
			note: entry.label === '' ? lines : `${entry.label} · ${lines}`
		};
	});

const withTolerance = (value: string, part: Tolerance, mark: DecimalMark): Run[] => {
	const tolerance = toleranceText(part, mark);
	return plain(tolerance === '' ? value : `${value} ${tolerance}`);
};

const inductorRow = (part: Inductor, write: Written, { words, mark }: StripContext): Given => {
	const { resistance_ohm: resistance, parallelCapacitance_F: across } = part;
	const real = [
		resistance === undefined ? '' : `DCR ${write(resistance, 'resistance')}`,
		across === undefined ? '' : `Cp ${write(across, 'capacitance')}`
	].filter((text) => text !== '');
	const note = real.length === 0 ? words.strip.inductor : real.join(', ');
	return { symbol: 'L', value: withTolerance(write(part.inductance_H, 'inductance'), part, mark), note };
};

const capacitorRow = (part: Capacitor, write: Written, { words, mark }: StripContext): Given => {
	const real = [
		part.esr_ohm === undefined ? '' : `ESR ${write(part.esr_ohm, 'resistance')}`,
		part.esl_H === undefined ? '' : `ESL ${write(part.esl_H, 'inductance')}`
	].filter((text) => text !== '');
	const note = real.length === 0 ? words.strip.capacitor : real.join(', ');
	return { symbol: 'C', value: withTolerance(write(part.capacitance_F, 'capacitance'), part, mark), note };
};

const dampingRows = ({ damping }: Design, write: Written, { words }: StripContext): Given[] => {
	if (damping === undefined) return [];
	const value = `${write(damping.resistance_ohm, 'resistance')} + ${write(damping.capacitance_F, 'capacitance')}`;
	return [{ symbol: 'R', index: 'd', value: plain(value), note: words.strip.damping }];
};

/** Series inductance and resistance of one network [H, Ω]. */
const NETWORK: Readonly<Record<NetworkKind, readonly [number, number]>> = {
	'amn-50uH-5ohm': [50e-6, 5],
	'amn-50uH': [50e-6, 0],
	'amn-5uH-1ohm': [5e-6, 1],
	'an-5uH': [5e-6, 0]
};

const networkValue = ({ kind, networks }: NetworkSource, write: Written): Run[] => {
	const [inductance, resistance] = NETWORK[kind];
	const branch = write(inductance * networks, 'inductance');
	const series = resistance === 0 ? branch : `(${branch} + ${write(resistance * networks, 'resistance')})`;
	return [
		...plain(`${write(50 * networks, 'resistance')} `),
		{ text: PARALLEL, face: 'semibold' },
		...plain(` ${series}`)
	];
};

const sourceValue = (source: Source, design: Design, context: StripContext): Run[] => {
	const write = writer(context.mark);
	if (source.kind === 'measured') {
		const curve = design.curves?.find(({ id }) => id === source.curve);
		return plain(`${context.words.strip.measured} ${curve?.fileName ?? source.curve}`);
	}
	if (source.kind !== 'impedance') return networkValue(source, write);
	const low = write(source.inductanceMin_H, 'inductance');
	const high = write(source.inductanceMax_H, 'inductance');
	return plain(`${joinRange(low, high)}, ${write(source.resistance_ohm, 'resistance')}`);
};

const sections = (context: StripContext): Section[] => {
	const { design } = context;
	const write = writer(context.mark);
	return [
		{
			name: 'supply',
			rows: [supplyRow(design.supply, write, context), ...loadRows(design, write, context)]
		},
		{ name: 'converter', rows: switchingRows(design, write, context) },
		{
			name: 'filter',
			rows: [
				inductorRow(design.inductor, write, context),
				capacitorRow(design.capacitor, write, context),
				...dampingRows(design, write, context)
			]
		},
		{
			name: 'sources',
			rows: design.sources.map((source, index) => ({
				symbol: 'Z',
				index: design.sources.length > 1 ? `s${String(index + 1)}` : 's',
				value: sourceValue(source, design, context),
				note: source.label
			}))
		}
	];
};

/** The value keeps its width; the note takes what is left, shortened. */
const givenBlock = (context: StripContext, number: string, given: Given): Block => {
	const { ink, k, width } = context;
	const cap = CAP * k;
	const start = (NUMBER_WIDTH + SYMBOL_WIDTH) * k;
	const [value = []] = wrapRuns(given.value, width - start, cap, 1);
	const left = width - start - runsWidth(value, cap) - 2.4 * k;
	const note = left < 6 * k ? '' : shorten(given.note, { width: left, cap });
	const symbol: Run[] = [
		{ text: given.symbol, face: 'bold' },
		...(given.index === undefined ? [] : [{ text: given.index, shift: 'index' } as const])
	];
	return {
		height: ROW * k,
		optional: true,
		draw: (x, y) => {
			const base = y + BASE * k;
			return [
				rowNumber(context, number, x, y),
				...runItems(symbol, { x: x + NUMBER_WIDTH * k, y: base, cap, fill: ink.ink }),
				...runItems(value, { x: x + start, y: base, cap, fill: ink.ink }),
				...(note === '' ? [] : [lettered(note, x + width, base, { cap, fill: ink.graphite, anchor: 'end' })]),
				rowLine(context, x, y + ROW * k)
			];
		}
	};
};

/**
 * The rows of what is given.
 * @param context design, palette, scale
 * @param heads whether each section has its own head; else one head stands over all four
 * @returns the blocks
 * @example givenBlocks(context, false)[0].heading // true
 */
export function givenBlocks(context: StripContext, heads: boolean): Block[] {
	const { words } = context;
	const rows = sections(context).flatMap(({ name, rows: given }, index) => {
		const number = String(index + 1);
		const head = heads ? [heading(context, number, words.strip[name])] : [];
		return [...head, ...given.map((row, at) => givenBlock(context, `${number}.${String(at + 1)}`, row))];
	});
	return heads ? rows : [heading(context, '', words.strip.given), ...rows];
}
