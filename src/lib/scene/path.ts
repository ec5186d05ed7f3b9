/** Gathers path data from drawing commands; any generator of shapes that draws on a context can draw on this. */
import type { PathData } from './scene';

const QUARTER = Math.PI / 2;
const FULL = 2 * Math.PI;

/** Turn from start to end as a canvas counts it: a full turn at most, in the direction asked for. */
const sweepOf = (start: number, end: number, anticlockwise: boolean): number => {
	const turn = anticlockwise ? start - end : end - start;
	const sweep = turn >= FULL ? FULL : ((turn % FULL) + FULL) % FULL;
	return anticlockwise ? -sweep : sweep;
};

/**
 * Builds path data [mm] by the commands of a canvas path, so that it serves as the `context` of d3-shape.
 * Arcs become cubic Bézier curves of at most a quarter turn: k = 4/3·tan(φ/4), off the circle by under 0.03 % of r.
 * @example new PathBuilder().moveTo(0, 0).lineTo(10, 5).data() // { ops: 'ML', at: [0, 0, 10, 5] }
 * Source: A. Riškus, Approximation of a cubic Bézier curve by circular arcs and vice versa, 2006; recalled.
 */
export class PathBuilder {
	#ops = '';
	readonly #at: number[] = [];
	#x = 0;
	#y = 0;
	#startX = 0;
	#startY = 0;

	#push(op: string, ...at: readonly number[]): this {
		this.#ops += op;
		this.#at.push(...at);
		this.#x = at.at(-2) ?? this.#x;
		this.#y = at.at(-1) ?? this.#y;
		return this;
	}

	moveTo(x: number, y: number): this {
		this.#startX = x;
		this.#startY = y;
		return this.#push('M', x, y);
	}

	lineTo(x: number, y: number): this {
		return this.#ops === '' ? this.moveTo(x, y) : this.#push('L', x, y);
	}

	bezierCurveTo(...at: [x1: number, y1: number, x2: number, y2: number, x: number, y: number]): this {
		if (this.#ops === '') this.moveTo(at[0], at[1]);
		return this.#push('C', ...at);
	}

	quadraticCurveTo(...[x1, y1, x, y]: [x1: number, y1: number, x: number, y: number]): this {
		if (this.#ops === '') this.moveTo(x1, y1);
		const third = (from: number, control: number): number => from + (2 / 3) * (control - from);
		return this.#push('C', third(this.#x, x1), third(this.#y, y1), third(x, x1), third(y, y1), x, y);
	}

	arc(
		...[x, y, radius, start, end, anticlockwise]: [
			x: number,
			y: number,
			radius: number,
			start: number,
			end: number,
			anticlockwise?: boolean
		]
	): this {
		return this.ellipse(x, y, radius, radius, 0, start, end, anticlockwise);
	}

	ellipse(
		...[x, y, radiusX, radiusY, rotation, start, end, anticlockwise = false]: [
			x: number,
			y: number,
			radiusX: number,
			radiusY: number,
			rotation: number,
			start: number,
			end: number,
			anticlockwise?: boolean
		]
	): this {
		if (!(radiusX >= 0 && radiusY >= 0)) {
			throw new RangeError(`radius must be >= 0 mm, got ${String(radiusX)} and ${String(radiusY)}`);
		}
		const [cos, sin] = [Math.cos(rotation), Math.sin(rotation)];
		const place = (u: number, v: number): [number, number] => [
			x + radiusX * u * cos - radiusY * v * sin,
			y + radiusX * u * sin + radiusY * v * cos
		];
		const [x0, y0] = place(Math.cos(start), Math.sin(start));
		// No line of no length where the arc starts at the present point.
		if (this.#ops === '' || Math.hypot(x0 - this.#x, y0 - this.#y) > 1e-6) this.lineTo(x0, y0);
		const sweep = sweepOf(start, end, anticlockwise);
		const parts = Math.ceil(Math.abs(sweep) / QUARTER - 1e-9);
		const step = parts === 0 ? 0 : sweep / parts;
		const reach = (4 / 3) * Math.tan(step / 4);
		for (let part = 0; part < parts; part += 1) {
			const [from, to] = [start + part * step, start + (part + 1) * step];
			const [c0, s0, c1, s1] = [Math.cos(from), Math.sin(from), Math.cos(to), Math.sin(to)];
			this.#push(
				'C',
				...place(c0 - reach * s0, s0 + reach * c0),
				...place(c1 + reach * s1, s1 - reach * c1),
				...place(c1, s1)
			);
		}
		return this;
	}

	/** Rounds the corner at x1, y1 between the present point and x2, y2. */
	arcTo(...[x1, y1, x2, y2, radius]: [x1: number, y1: number, x2: number, y2: number, radius: number]): this {
		const before = Math.atan2(this.#y - y1, this.#x - x1);
		const after = Math.atan2(y2 - y1, x2 - x1);
		const half = sweepOf(before, after, false) / 2;
		const flat = Math.abs(Math.sin(2 * half)) < 1e-9;
		if (flat || !(radius > 0) || this.#ops === '') return this.lineTo(x1, y1);
		const turnsLeft = half > QUARTER;
		const middle = before + half + (turnsLeft ? Math.PI : 0);
		const away = radius / Math.abs(Math.sin(half));
		const [cx, cy] = [x1 + away * Math.cos(middle), y1 + away * Math.sin(middle)];
		const side = turnsLeft ? 1 : -1;
		return this.arc(cx, cy, radius, before + side * QUARTER, after - side * QUARTER, !turnsLeft);
	}

	rect(...[x, y, width, height]: [x: number, y: number, width: number, height: number]): this {
		return this.moveTo(x, y)
			.lineTo(x + width, y)
			.lineTo(x + width, y + height)
			.lineTo(x, y + height)
			.closePath();
	}

	closePath(): this {
		if (this.#ops === '' || this.#ops.endsWith('Z')) return this;
		this.#ops += 'Z';
		this.#x = this.#startX;
		this.#y = this.#startY;
		return this;
	}

	/** @returns what was drawn so far */
	data(): PathData {
		return { ops: this.#ops, at: [...this.#at] };
	}
}
