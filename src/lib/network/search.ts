/** Roots and minima along one axis, for quantities that have no closed form. */

const GOLDEN = (Math.sqrt(5) - 1) / 2;

/**
 * Minimum of a function with one valley between two ends, by golden section.
 * @param of the function
 * @param from lower end, unit of the argument
 * @param to upper end, same unit
 * @param rel spread of values, relative, at which the search ends
 * @returns argument of the least value met
 * @example goldenMinimum((x) => (x - 2) ** 2 + 1, 0, 5, 1e-12) // 2.0000
 * @see J. Kiefer, Sequential minimax search for a maximum, 1953 (title recalled)
 */
export function goldenMinimum(of: (x: number) => number, from: number, to: number, rel: number): number {
	let [low, high] = [from, to];
	let left = high - GOLDEN * (high - low);
	let right = low + GOLDEN * (high - low);
	let [atLeft, atRight] = [of(left), of(right)];
	let flat = 0;
	for (let round = 0; round < 90 && flat < 3 && high - low > 1e-15 * Math.abs(high); round += 1) {
		flat = Math.abs(atLeft - atRight) <= rel * Math.abs(Math.min(atLeft, atRight)) ? flat + 1 : 0;
		if (atLeft <= atRight) {
			[high, right, atRight] = [right, left, atLeft];
			left = high - GOLDEN * (high - low);
			atLeft = of(left);
		} else {
			[low, left, atLeft] = [left, right, atRight];
			right = low + GOLDEN * (high - low);
			atRight = of(right);
		}
	}
	return atLeft <= atRight ? left : right;
}

/** The point at a share of the way; the middle where that is not between the ends. */
const nextGuess = (low: number, high: number, share: number): number => {
	const guess = low + share * (high - low);
	return guess > low && guess < high ? guess : (low + high) / 2;
};

/**
 * Where a function changes its sign between two ends, by false position with halved weights (Illinois rule) and
 * bisection in every third round, so that a pole ends the search as surely as a root.
 * @param of the function; of(from) and of(to) have different signs
 * @param from lower end, unit of the argument
 * @param to upper end, same unit
 * @returns the argument, to the last bits
 * @example signChange((x) => x * x - 2, 1, 2) // 1.4142135623730951
 * @see M. Dowell and P. Jarratt, A modified regula falsi method, 1971 (title recalled)
 */
export function signChange(of: (x: number) => number, from: number, to: number): number {
	let [low, high] = [from, to];
	let [atLow, atHigh] = [of(low), of(high)];
	let kept = 0;
	for (let round = 1; round < 160 && high - low > 4e-16 * Math.abs(high); round += 1) {
		const x = nextGuess(low, high, round % 3 === 0 ? 1 : atLow / (atLow - atHigh));
		if (x <= low || x >= high) break;
		const value = of(x);
		if (value === 0) return x;
		if (value > 0 === atHigh > 0) {
			[high, atHigh] = [x, value];
			atLow *= kept > 0 ? 0.5 : 1;
			kept = 1;
		} else {
			[low, atLow] = [x, value];
			atHigh *= kept < 0 ? 0.5 : 1;
			kept = -1;
		}
	}
	return (low + high) / 2;
}
