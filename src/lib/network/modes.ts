/**
 * Sums of decaying exponentials, and the most that one reaches. Oscillating parts come as conjugate pairs, the others
 * two by two, so that nearly equal ones, whose amplitudes are huge and opposite, are bounded together.
 */
import { divide, multiply, subtract, type Complex } from './complex';
import { valueAt, type Polynomial } from './polynomial';
import { goldenMinimum } from './search';

/** One part of the sum, with bounds that hold over a whole stretch of time. */
interface Part {
	readonly value: (t: number) => number;
	/** No value between two times is above this. */
	readonly most: (from: number, to: number) => number;
	/** No second derivative between two times is further from 0 than this. */
	readonly curvature: (from: number, to: number) => number;
	/** |pole| [1/s], by which parts are fast or slow. */
	readonly speed: number;
	/** Angular frequency of an oscillation [rad/s], 0 without. */
	readonly omega: number;
}

interface Term {
	readonly pole: Complex;
	readonly residue: Complex;
}

/** A constant and the exponentials around it; the same in parts, slow ones first. */
export interface Modes {
	readonly constant: number;
	readonly terms: readonly Term[];
	readonly parts: readonly Part[];
}

const pairPart = ({ pole, residue }: Term): Part => {
	const amplitude = 2 * Math.hypot(residue.re, residue.im);
	const angle = Math.atan2(residue.im, residue.re);
	const speed = Math.hypot(pole.re, pole.im);
	const envelope = (t: number): number => amplitude * Math.exp(Math.min(0, pole.re) * t);
	return {
		value: (t) => envelope(t) * Math.cos(pole.im * t + angle),
		most: envelope,
		curvature: (from) => speed * speed * envelope(from),
		speed,
		omega: pole.im
	};
};

/** The most of a·e^(pt) + b·e^(qt) between two times: at an end, or where the derivative vanishes. */
const mostOfTwo = (of: (t: number) => number, turn: number, from: number, to: number): number =>
	Math.max(of(from), to === Infinity ? 0 : of(to), turn > from && turn < to ? of(turn) : -Infinity);

const realPart = (one: Term, two: Term | undefined): Part => {
	const [p, a] = [one.pole.re, one.residue.re];
	const [q, b] = two ? [two.pole.re, two.residue.re] : [2 * p, 0];
	const sum = (power: number) => (t: number) =>
		a * p ** power * Math.exp(p * t) + b * q ** power * Math.exp(q * t);
	const turn = (power: number): number => Math.log(-(b * q ** power) / (a * p ** power)) / (p - q);
	const [value, second] = [sum(0), sum(2)];
	const [turnOfValue, turnOfSecond] = [turn(1), turn(3)];
	return {
		value,
		most: (from, to) => mostOfTwo(value, turnOfValue, from, to),
		curvature: (from, to) =>
			Math.max(
				mostOfTwo(second, turnOfSecond, from, to),
				mostOfTwo((t) => -second(t), turnOfSecond, from, to)
			),
		speed: Math.max(Math.abs(p), Math.abs(q)),
		omega: 0
	};
};

/** Real poles two by two, those nearest each other first. */
const realParts = (terms: readonly Term[]): Part[] => {
	const left = [...terms].sort((a, b) => b.pole.re - a.pole.re);
	const parts: Part[] = [];
	while (left.length > 0) {
		const ratios = left.map((term, index) => (left[index + 1]?.pole.re ?? -Infinity) / term.pole.re);
		const [one, two] = left.splice(ratios.indexOf(Math.min(...ratios)), left.length > 1 ? 2 : 1);
		if (one) parts.push(realPart(one, two));
	}
	return parts;
};

const modesFrom = (constant: number, terms: readonly Term[]): Modes => {
	const parts = [
		...terms.filter(({ pole }) => pole.im > 0).map(pairPart),
		...realParts(terms.filter(({ pole }) => pole.im === 0))
	];
	return { constant, terms, parts: parts.sort((a, b) => a.speed - b.speed) };
};

/** A Laplace transform N/D whose poles are known. */
export interface Fraction {
	/** Lowest power first. */
	readonly numerator: Polynomial;
	/** Lowest power first, of higher degree. */
	readonly denominator: Polynomial;
	/** Roots of the denominator. */
	readonly poles: readonly Complex[];
}

/** D′ at a pole from the other poles, so that what rounding did to two equal ones cancels in their sum. */
const slopeAt = ({ denominator, poles }: Fraction, pole: Complex): Complex =>
	poles
		.filter((other) => other !== pole)
		.reduce<Complex>((value, other) => multiply(value, subtract(pole, other)), {
			re: denominator[denominator.length - 1] ?? NaN,
			im: 0
		});

/**
 * Time function of N/D: f(t) = Σ N(p)/D′(p)·e^(pt).
 * @param of the fraction
 * @returns the modes
 * @example // 1/(s + 2): e^(−2t)
 * impulseModes({ numerator: [1], denominator: [2, 1], poles: [{ re: -2, im: 0 }] })
 * @see Heaviside's expansion theorem
 */
export function impulseModes(of: Fraction): Modes {
	return modesFrom(
		0,
		of.poles.map((pole) => ({ pole, residue: divide(valueAt(of.numerator, pole), slopeAt(of, pole)) }))
	);
}

/**
 * Time function of N/(s·D): f(t) = N(0)/D(0) + Σ N(p)/(p·D′(p))·e^(pt).
 * @param of the fraction without its factor 1/s
 * @returns the modes
 * @example // 2/(s·(s + 2)): 1 − e^(−2t)
 * stepModes({ numerator: [2], denominator: [2, 1], poles: [{ re: -2, im: 0 }] })
 * @see Heaviside's expansion theorem
 */
export function stepModes(of: Fraction): Modes {
	return modesFrom(
		(of.numerator[0] ?? 0) / (of.denominator[0] ?? NaN),
		of.poles.map((pole) => ({
			pole,
			residue: divide(valueAt(of.numerator, pole), multiply(pole, slopeAt(of, pole)))
		}))
	);
}

/**
 * The same modes with the other sign.
 * @param of the modes
 * @returns −f(t)
 * @example // of 1 − e^(−2t): e^(−2t) − 1
 * opposite(modes)
 * @see identity
 */
export function opposite({ constant, terms }: Modes): Modes {
	return modesFrom(
		-constant,
		terms.map(({ pole, residue }) => ({ pole, residue: { re: -residue.re, im: -residue.im } }))
	);
}

/**
 * Value of a sum of modes at a time.
 * @param of the modes
 * @param t time since the step [s]
 * @returns value, unit of the modes
 * @example // of e^(−2t)
 * valueOf(modes, 0.5) // 0.36788
 * @see identity
 */
export function valueOf({ constant, parts }: Modes, t: number): number {
	let sum = constant;
	for (const part of parts) sum += part.value(t);
	return sum;
}

/** Share of the most by which the result may fall short. */
const SHORT = 4e-6;

const MOST_STRETCHES = 20_000;

/**
 * A bound of the sum over a stretch: the slower parts together by their ends and curvature, the faster ones each by
 * its own, at whatever split is lowest.
 */
const boundOf = ({ constant, parts }: Modes, from: number, to: number): number => {
	let [start, end, bend, bound] = [constant, constant, 0, constant];
	for (const part of parts) bound += part.most(from, to);
	let rest = bound - constant;
	for (const part of parts) {
		start += part.value(from);
		end += part.value(to);
		bend += part.curvature(from, to);
		rest -= part.most(from, to);
		bound = Math.min(bound, Math.max(start, end) + (bend * (to - from) ** 2) / 8 + rest);
	}
	return bound;
};

const everAfter = ({ constant, parts }: Modes, from: number): number =>
	parts.reduce((sum, part) => sum + Math.max(0, part.most(from, Infinity)), constant);

/** The best of samples, then of a golden section beside it. */
const firstBest = (of: Modes, stretch: number): number => {
	const count = 48;
	let at = 0;
	for (let index = 1; index <= count; index += 1)
		if (valueOf(of, (index * stretch) / 8) > valueOf(of, (at * stretch) / 8)) at = index;
	const [from, to] = [(Math.max(0, at - 1) * stretch) / 8, ((at + 1) * stretch) / 8];
	return Math.max(
		valueOf(of, 0),
		valueOf(
			of,
			goldenMinimum((t) => -valueOf(of, t), from, to, 1e-9)
		)
	);
};

/**
 * The most that a sum of modes ever reaches from t = 0 on, within 4e-6 of itself: stretches of time that cannot hold
 * more than what was found are dropped, the others halved.
 * @param of the modes
 * @param known a value known to be reached, to start from
 * @returns the most, unit of the modes
 * @example // of e^(−2t)
 * most(modes) // 1
 * @see branch and bound
 */
export function most(of: Modes, known = -Infinity): number {
	const slowest = of.parts[0];
	if (!slowest) return Math.max(known, of.constant);
	const stretch = Math.PI / 2 / (slowest.omega > 0 ? slowest.omega : slowest.speed);
	const seen = known === -Infinity ? firstBest(of, stretch) : known;
	let best = Math.max(seen, of.constant);
	let looked = 0;
	for (let index = 0; looked < MOST_STRETCHES; index += 1) {
		if (everAfter(of, index * stretch) <= best + SHORT * Math.abs(best)) break;
		const open: (readonly [number, number])[] = [[index * stretch, (index + 1) * stretch]];
		for (let next = open.pop(); next && looked < MOST_STRETCHES; next = open.pop()) {
			looked += 1;
			const [from, to] = next;
			best = Math.max(best, valueOf(of, to));
			if (boundOf(of, from, to) <= best + SHORT * Math.abs(best)) continue;
			const middle = (from + to) / 2;
			open.push([middle, to], [from, middle]);
		}
	}
	return best;
}
