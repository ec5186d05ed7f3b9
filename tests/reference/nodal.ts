/** Nodal analysis of any small network of impedances, written apart from the product as a second way to the same values. */
import { add, divide, magnitude, multiply, reciprocal, subtract, type Complex } from '$lib/network/complex';

/** An impedance [Ω] between two nodes; node 0 is the reference. */
export interface Branch {
	readonly from: number;
	readonly to: number;
	readonly impedance: Complex;
}

const ZERO: Complex = { re: 0, im: 0 };

/**
 * Node voltages when 1 A flows into a node: Y·V = I by elimination with column pivots.
 * @param branches the network
 * @param into node that takes the ampere
 * @returns voltages of nodes 0 … n [V]
 */
export function nodeVoltages(branches: readonly Branch[], into: number): Complex[] {
	const size = Math.max(...branches.flatMap(({ from, to }) => [from, to]));
	const rows = Array.from({ length: size }, () => Array.from({ length: size + 1 }, () => ZERO));
	const stamp = (row: number, column: number, value: Complex): void => {
		const line = rows[row - 1];
		if (line && column > 0) line[column - 1] = add(line[column - 1] ?? ZERO, value);
	};
	for (const { from, to, impedance } of branches) {
		const y = reciprocal(impedance);
		const minus = { re: -y.re, im: -y.im };
		stamp(from, from, y);
		stamp(to, to, y);
		stamp(from, to, minus);
		stamp(to, from, minus);
	}
	stamp(into, size + 1, { re: 1, im: 0 });
	for (let pivot = 0; pivot < size; pivot += 1) {
		const rest = rows.slice(pivot);
		const best = rest.reduce((a, b) => (magnitude(b[pivot] ?? ZERO) > magnitude(a[pivot] ?? ZERO) ? b : a));
		rows.splice(rows.indexOf(best), 1);
		rows.splice(pivot, 0, best);
		for (const row of rows) {
			if (row === best) continue;
			const share = divide(row[pivot] ?? ZERO, best[pivot] ?? ZERO);
			row.forEach((value, column) => {
				row[column] = subtract(value, multiply(share, best[column] ?? ZERO));
			});
		}
	}
	return [ZERO, ...rows.map((row, index) => divide(row[size] ?? ZERO, row[index] ?? ZERO))];
}
