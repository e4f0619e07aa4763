import { type RingVec, ring } from "../vector/vec3.ts";
import type { Bounds, State } from "./path.ts";
import type { Surface } from "./surface.ts";

/**
 * A convex body struck by the sphere. Distance to a convex set is a convex function of place, so along
 * a path its rate falls no faster than the acceleration.
 */
export abstract class Convex implements Surface {
	readonly kind: "element" | "coaming";
	readonly id: string;
	protected readonly half: number;
	/** Unit, from the nearest point of the body to the centre, of the last `gap`. */
	protected nx = 0;
	protected ny = 0;
	protected nz = 0;
	constructor(kind: "element" | "coaming", id: string, half: number) {
		this.kind = kind;
		this.id = id;
		this.half = half;
	}
	abstract gap(s: State): number;
	rate(s: State): number {
		return this.nx * (s[3] as number) + this.ny * (s[4] as number) + this.nz * (s[5] as number);
	}
	bend(b: Bounds): number {
		return b.acceleration;
	}
	/** The point of the body nearest to a centre. */
	touched(s: State): RingVec {
		const reach = this.half + this.gap(s);
		return ring(s[0]! - reach * this.nx, s[1]! - reach * this.ny, s[2]! - reach * this.nz);
	}
	/** Distance of the offset (dx, dy, dz) from the nearest point, keeping its direction. */
	protected away(dx: number, dy: number, dz: number): number {
		const l = Math.sqrt(dx * dx + dy * dy + dz * dz);
		if (l > 0) {
			this.nx = dx / l;
			this.ny = dy / l;
			this.nz = dz / l;
		}
		return l;
	}
}

export class Capsule extends Convex {
	private readonly a: readonly number[];
	private readonly d: readonly [number, number, number];
	private readonly dd: number;
	constructor(
		kind: "element" | "coaming",
		id: string,
		half: number,
		a: readonly [number, number, number],
		b: readonly [number, number, number],
		private readonly radius: number,
	) {
		super(kind, id, half);
		this.a = a;
		this.d = [b[0] - a[0], b[1] - a[1], b[2] - a[2]];
		this.dd = this.d[0] ** 2 + this.d[1] ** 2 + this.d[2] ** 2;
	}
	gap(s: State): number {
		const x = (s[0] as number) - (this.a[0] as number);
		const y = (s[1] as number) - (this.a[1] as number);
		const z = (s[2] as number) - (this.a[2] as number);
		const [dx, dy, dz] = this.d;
		const k = this.dd > 0 ? Math.min(1, Math.max(0, (x * dx + y * dy + z * dz) / this.dd)) : 0;
		return this.away(x - k * dx, y - k * dy, z - k * dz) - this.radius - this.half;
	}
}

/** A box by its centre, unit axes and half sizes; a half size of 0 makes it a flat rectangle. Inside, the gap is negative. */
export class Box extends Convex {
	constructor(
		kind: "element" | "coaming",
		id: string,
		half: number,
		private readonly centre: readonly [number, number, number],
		private readonly axes: readonly (readonly [number, number, number])[],
		private readonly halves: readonly [number, number, number],
	) {
		super(kind, id, half);
	}
	gap(s: State): number {
		const x = (s[0] as number) - this.centre[0];
		const y = (s[1] as number) - this.centre[1];
		const z = (s[2] as number) - this.centre[2];
		let ox = 0;
		let oy = 0;
		let oz = 0;
		let deepest = Number.NEGATIVE_INFINITY;
		let deepAxis: readonly [number, number, number] = [1, 0, 0];
		for (let i = 0; i < 3; i++) {
			const axis = this.axes[i] as readonly [number, number, number];
			const h = this.halves[i] as number;
			const along = x * axis[0] + y * axis[1] + z * axis[2];
			const over = along > h ? along - h : along < -h ? along + h : 0;
			ox += over * axis[0];
			oy += over * axis[1];
			oz += over * axis[2];
			const depth = Math.abs(along) - h;
			if (depth > deepest) {
				deepest = depth;
				deepAxis = along < 0 ? [-axis[0], -axis[1], -axis[2]] : axis;
			}
		}
		if (deepest > 0) return this.away(ox, oy, oz) - this.half;
		[this.nx, this.ny, this.nz] = deepAxis;
		return deepest - this.half;
	}
}
