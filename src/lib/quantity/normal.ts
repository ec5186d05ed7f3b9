/** The standard normal distribution. */

/** Beyond this the continued fraction takes fewer terms than the series. */
const SERIES_END = 3;

/** Φ(x) − ½ as x·φ(x)·Σ x²ᵏ / (1·3·5…(2k+1)). */
const halfBySeries = (x: number): number => {
	let term = x;
	let sum = x;
	for (let odd = 3; Math.abs(term) > Math.abs(sum) * 1e-17; odd += 2) {
		term *= (x * x) / odd;
		sum += term;
	}
	return sum * Math.exp((-x * x) / 2) * Math.sqrt(1 / (2 * Math.PI));
};

/** 1 − Φ(x) for x > 0 as φ(x) / (x + 1/(x + 2/(x + …))). */
const tailByFraction = (x: number): number => {
	let value = x;
	for (let k = 120; k > 0; k--) value = x + k / value;
	return (Math.exp((-x * x) / 2) * Math.sqrt(1 / (2 * Math.PI))) / value;
};

/**
 * Distribution function of the standard normal: Φ(x) = ∫₋∞ˣ exp(−t²/2) dt / √(2π).
 * @param x standard deviations from the mean, any number
 * @returns probability, 0 … 1, to about 1e-15
 * @example standardNormal(1.959963984540054) // 0.975
 * @see Abramowitz and Stegun, Handbook of Mathematical Functions, 26.2.10 and 26.2.14 (recalled)
 */
export function standardNormal(x: number): number {
	if (Math.abs(x) < SERIES_END) return 0.5 + halfBySeries(x);
	if (x > 38) return 1;
	if (x < -38) return 0;
	return x > 0 ? 1 - tailByFraction(x) : tailByFraction(-x);
}
