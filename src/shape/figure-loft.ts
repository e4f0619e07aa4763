import type { ColourIndex } from "./palette.ts";

/**
 * A smooth skin over superelliptic rings. A row: where along the axis; the ring's half sizes to the
 * front, back, outside and inside (each quarter its own ellipse, so the outline stays smooth); the
 * exponent (2 ellipse, more is boxier); the ring's middle off the axis, to the front and outside.
 * Thousandths of stature. "up" lofts have front = x, outside = z; "forward" lofts, along x, have
 * front = y, outside = z; "right" lofts, along z, have front = x, outside = y.
 */
export type Row = readonly [
	at: number,
	front: number,
	back: number,
	outer: number,
	inner: number,
	power?: number,
	toFront?: number,
	toOuter?: number,
];

export type Cap = readonly [height: number, steps: number] | null;

export interface Loft {
	readonly along: "up" | "forward" | "right";
	/** In the order of the axis, either way. */
	readonly rows: readonly Row[];
	/** Rings between two rows, the second counted; vertices around. */
	readonly between: number;
	readonly around: number;
	/** How far a rounded end stands out beyond the first and the last row, in how many steps; null leaves it open. */
	readonly capFirst: Cap;
	readonly capLast: Cap;
	/** Colour of the skin from each place on, in the order of the rows. */
	readonly colour: readonly (readonly [from: number, colour: ColourIndex])[];
	/** Overrides the colour by place along and angle from the front, 0…π on both sides. */
	readonly paint?: (at: number, angle: number) => ColourIndex | null;
	/** Moves the whole loft, and turns it about the x axis first and the z axis then, rad. */
	readonly origin?: readonly [number, number, number];
	readonly turn?: readonly [aboutX: number, aboutZ: number];
	/** Nothing lies below this y: a sole. */
	readonly floor?: number;
	/** Without an ink edge of its own. Default false. */
	readonly plain?: boolean;
}

export interface Skin {
	readonly position: number[];
	readonly colour: number[];
	readonly index: number[];
	/** 1 a vertex that the ink hull stands out from, else 0. */
	readonly inked: number[];
}

const COLUMNS = 8;

/** The rows with defaults, between them cubic Hermite rings (tangents from the neighbours), rounded ends added. */
function rings(loft: Loft): number[][] {
	const rows = loft.rows.map(([at, f, b, o, i, power = 2.2, toFront = 0, toOuter = 0]) => [at, f, b, o, i, power, toFront, toOuter]);
	const body: number[][] = [];
	rows.forEach((row, k) => {
		if (k === 0) {
			body.push(row);
			return;
		}
		for (let step = 1; step <= loft.between; step++) body.push(hermite(rows, k - 1, step / loft.between));
	});
	const first = body[0] as number[];
	const last = body[body.length - 1] as number[];
	const way = Math.sign((last[0] as number) - (first[0] as number));
	const rounded = (end: number[], cap: Cap, sense: number): number[][] =>
		Array.from({ length: cap === null ? 0 : cap[1] - 1 }, (_, k) => {
			const [height, steps] = cap as readonly [number, number];
			const angle = ((k + 1) / steps) * (Math.PI / 2);
			const ring = end.slice();
			ring[0] = (end[0] as number) + sense * height * Math.sin(angle);
			for (let c = 1; c <= 4; c++) ring[c] = (end[c] as number) * Math.cos(angle);
			return ring;
		});
	return [...rounded(first, loft.capFirst, -way).reverse(), ...body, ...rounded(last, loft.capLast, way)];
}

function hermite(rows: readonly number[][], k: number, t: number): number[] {
	const row = (i: number) => rows[Math.min(Math.max(i, 0), rows.length - 1)] as number[];
	const [a, b, before, after] = [row(k), row(k + 1), row(k - 1), row(k + 2)];
	const span = (b[0] as number) - (a[0] as number);
	const slope = (from: number[], mid: number[], to: number[], c: number): number => {
		const h0 = (mid[0] as number) - (from[0] as number);
		const h1 = (to[0] as number) - (mid[0] as number);
		const s0 = h0 === 0 ? 0 : ((mid[c] as number) - (from[c] as number)) / h0;
		const s1 = h1 === 0 ? 0 : ((to[c] as number) - (mid[c] as number)) / h1;
		if (h0 === 0) return s1;
		if (h1 === 0) return s0;
		return (s0 * h1 + s1 * h0) / (h0 + h1);
	};
	const t2 = t * t;
	const t3 = t2 * t;
	return Array.from({ length: COLUMNS }, (_, c) => {
		if (c === 0) return (a[0] as number) + span * t;
		const m0 = slope(before, a, b, c) * span;
		const m1 = slope(a, b, after, c) * span;
		return (2 * t3 - 3 * t2 + 1) * (a[c] as number) + (t3 - 2 * t2 + t) * m0 + (-2 * t3 + 3 * t2) * (b[c] as number) + (t3 - t2) * m1;
	});
}

/** Adds a loft to a skin, in metres for the stature, mirrored in z for a left limb. */
export function addLoft(skin: Skin, loft: Loft, stature: number, left: boolean): void {
	const list = rings(loft);
	const { around } = loft;
	const scale = stature / 1000;
	const start = skin.position.length / 3;
	const forward = ((list[list.length - 1] as number[])[0] as number) > ((list[0] as number[])[0] as number);
	const colourAt = (at: number): ColourIndex => {
		let colour = (loft.colour[0] as readonly [number, ColourIndex])[1];
		for (const [from, c] of loft.colour) if (forward ? at >= from - 1e-6 : at <= from + 1e-6) colour = c;
		return colour;
	};
	const push = (at: number, front: number, outer: number, angle: number): void => {
		let [x, y, z] = loft.along === "up" ? [front, at, outer] : loft.along === "forward" ? [at, front, outer] : [front, outer, at];
		if (loft.turn !== undefined) {
			const [cx, sx, cz, sz] = [Math.cos(loft.turn[0]), Math.sin(loft.turn[0]), Math.cos(loft.turn[1]), Math.sin(loft.turn[1])];
			[y, z] = [cx * y - sx * z, sx * y + cx * z];
			[x, y] = [cz * x - sz * y, sz * x + cz * y];
		}
		if (loft.origin !== undefined) {
			x += loft.origin[0];
			y += loft.origin[1];
			z += loft.origin[2];
		}
		if (loft.floor !== undefined) y = Math.max(y, loft.floor);
		skin.position.push(x * scale, y * scale, (left ? -z : z) * scale);
		skin.inked.push(loft.plain === true ? 0 : 1);
		skin.colour.push(loft.paint?.(at, angle) ?? colourAt(at));
	};
	for (const [at, f, b, o, i, power, toFront, toOuter] of list as [number, number, number, number, number, number, number, number][]) {
		for (let k = 0; k < around; k++) {
			const angle = (2 * Math.PI * k) / around;
			const c = Math.cos(angle);
			const s = Math.sin(angle);
			const e = 2 / power;
			push(
				at,
				toFront + (c < 0 ? -b : f) * Math.abs(c) ** e * (Math.abs(c) < 1e-9 ? 0 : 1),
				toOuter + (s < 0 ? -i : o) * Math.abs(s) ** e * (Math.abs(s) < 1e-9 ? 0 : 1),
				Math.acos(Math.cos(angle + Math.PI / around)),
			);
		}
	}
	// (front, axis, outer) is right-handed for "up" alone
	const outward = (forward === (loft.along === "up")) !== left;
	const triangle = (a: number, b: number, c: number) => {
		if (outward) skin.index.push(start + a, start + b, start + c);
		else skin.index.push(start + a, start + c, start + b);
	};
	const count = list.length;
	for (let r = 0; r + 1 < count; r++)
		for (let k = 0; k < around; k++) {
			const a = r * around + k;
			const b = r * around + ((k + 1) % around);
			triangle(a, a + around, b + around);
			triangle(a, b + around, b);
		}
	const close = (row: Row, cap: Cap, ring: number, sense: 1 | -1): void => {
		if (cap === null) return;
		const pole = skin.position.length / 3 - start;
		const middle = list[ring] as number[];
		push(row[0] + (forward ? sense : -sense) * cap[0], middle[6] as number, middle[7] as number, Math.PI);
		for (let k = 0; k < around; k++) {
			const a = ring * around + k;
			const b = ring * around + ((k + 1) % around);
			if (sense < 0) triangle(pole, a, b);
			else triangle(pole, b, a);
		}
	};
	close(loft.rows[0] as Row, loft.capFirst, 0, -1);
	close(loft.rows[loft.rows.length - 1] as Row, loft.capLast, count - 1, 1);
}

/** Area-weighted vertex normals of an indexed skin, unit. */
export function normalsOf(position: ArrayLike<number>, index: ArrayLike<number>): Float32Array {
	const out = new Float32Array(position.length);
	const at = (i: number, k: number) => position[3 * i + k] as number;
	for (let t = 0; t < index.length; t += 3) {
		const [a, b, c] = [index[t] as number, index[t + 1] as number, index[t + 2] as number];
		const [ux, uy, uz] = [at(b, 0) - at(a, 0), at(b, 1) - at(a, 1), at(b, 2) - at(a, 2)];
		const [vx, vy, vz] = [at(c, 0) - at(a, 0), at(c, 1) - at(a, 1), at(c, 2) - at(a, 2)];
		const n = [uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx];
		for (const i of [a, b, c]) for (let k = 0; k < 3; k++) out[3 * i + k] = (out[3 * i + k] as number) + (n[k] as number);
	}
	for (let i = 0; i < out.length; i += 3) {
		const l = Math.hypot(out[i] as number, out[i + 1] as number, out[i + 2] as number);
		if (!(l > 0)) throw new RangeError(`vertex ${i / 3} of a skin has no normal`);
		for (let k = 0; k < 3; k++) out[i + k] = (out[i + k] as number) / l;
	}
	return out;
}
