import type { Deck } from "../layout/habitat.ts";
import type { Bounds, State } from "./path.ts";

/**
 * One thing the sphere's centre can come to touch. `gap` is ≥ 0 while it has not, in metres near
 * contact; `rate` its time derivative at the same state, called right after `gap`; `bend` a bound on
 * how fast the rate can fall, so that the gap cannot close before the root of gap + rate t − bend t²/2.
 */
export interface Surface {
	readonly kind: "deck" | "ceiling" | "end-low" | "end-high" | "side-low" | "side-high" | "coaming" | "element" | "far-end" | "near-end";
	readonly id: string;
	gap(s: State): number;
	rate(s: State): number;
	bend(b: Bounds): number;
}

/** Contact with a curved floor from within: the centre at radius R − d/2. Written in r², which has bounded bend everywhere. */
export class CylinderFromWithin implements Surface {
	constructor(
		readonly kind: Surface["kind"],
		readonly id: string,
		/** Radius of the centre at contact, m. */
		readonly reach: number,
	) {}
	gap(s: State): number {
		const r2 = (s[0] as number) ** 2 + (s[1] as number) ** 2;
		return (this.reach * this.reach - r2) / (2 * this.reach);
	}
	rate(s: State): number {
		return -((s[0] as number) * (s[3] as number) + (s[1] as number) * (s[4] as number)) / this.reach;
	}
	bend(b: Bounds): number {
		return (b.speed * b.speed + b.radius * b.acceleration) / this.reach;
	}
}

/** Contact with a curved ceiling from without: the centre at radius R_c + d/2. */
export class CylinderFromWithout implements Surface {
	constructor(
		readonly kind: Surface["kind"],
		readonly id: string,
		readonly reach: number,
	) {}
	gap(s: State): number {
		const r2 = (s[0] as number) ** 2 + (s[1] as number) ** 2;
		return (r2 - this.reach * this.reach) / (2 * this.reach);
	}
	rate(s: State): number {
		return ((s[0] as number) * (s[3] as number) + (s[1] as number) * (s[4] as number)) / this.reach;
	}
	/** r²/2 bends by v² + r·a, and only r·a can be negative. */
	bend(b: Bounds): number {
		return (b.radius * b.acceleration) / this.reach;
	}
}

/** Contact with a plane that turns with the ring: n·p + offset = 0, n a unit vector towards the free side. */
export class Plane implements Surface {
	constructor(
		readonly kind: Surface["kind"],
		readonly id: string,
		readonly nx: number,
		readonly ny: number,
		readonly nz: number,
		readonly offset: number,
	) {}
	gap(s: State): number {
		return this.nx * (s[0] as number) + this.ny * (s[1] as number) + this.nz * (s[2] as number) + this.offset;
	}
	rate(s: State): number {
		return this.nx * (s[3] as number) + this.ny * (s[4] as number) + this.nz * (s[5] as number);
	}
	bend(b: Bounds): number {
		return b.acceleration;
	}
}

/**
 * A side bulkhead: the half-plane through the axis at one angle. Beyond a quarter turn from it the
 * nearest thing is the axis itself, which no bay reaches. `behind` is how far behind it (rad) still counts as
 * in it: half of what the bay leaves open of the turn, since a bay of more than 270° comes round to its back.
 */
export class HalfPlane implements Surface {
	private readonly cos: number;
	private readonly sin: number;
	private beside = true;
	constructor(
		readonly kind: "side-low" | "side-high",
		readonly id: string,
		readonly angle: number,
		readonly half: number,
		private readonly behind: number,
	) {
		this.cos = Math.cos(angle);
		this.sin = Math.sin(angle);
	}
	gap(s: State): number {
		const x = s[0] as number;
		const y = s[1] as number;
		const along = this.cos * x + this.sin * y;
		const turn = this.cos * y - this.sin * x;
		const ahead = this.kind === "side-low" ? turn : -turn;
		this.beside = along > 0 && (ahead >= 0 || Math.atan2(-ahead, along) <= this.behind);
		return (this.beside ? ahead : Math.sqrt(x * x + y * y)) - this.half;
	}
	rate(s: State): number {
		if (!this.beside) return -Math.hypot(s[3] as number, s[4] as number);
		const ahead = this.cos * (s[4] as number) - this.sin * (s[3] as number);
		return this.kind === "side-low" ? ahead : -ahead;
	}
	bend(b: Bounds): number {
		return b.acceleration;
	}
}

/** The floor of a deck for a sphere of radius `half`. */
export function floorSurface(deck: Deck, half: number, kind: Surface["kind"] = "deck"): Surface {
	if (deck.floor === "curved") return new CylinderFromWithin(kind, deck.id, deck.radius - half);
	return new Plane(kind, deck.id, -Math.cos(deck.middle), -Math.sin(deck.middle), 0, deck.radius - half);
}

/** The ceiling of a deck for a sphere of radius `half`. */
export function ceilingSurface(deck: Deck, half: number, kind: Surface["kind"] = "ceiling"): Surface {
	const top = deck.radius - deck.headroom;
	if (deck.floor === "curved") return new CylinderFromWithout(kind, deck.id, top + half);
	return new Plane(kind, deck.id, Math.cos(deck.middle), Math.sin(deck.middle), 0, -(top + half));
}

/** The end and side bulkheads of a deck's bay for a sphere of radius `half`. */
export function wallSurfaces(deck: Deck, half: number): Surface[] {
	const walls: Surface[] = [
		new Plane("end-low", deck.id, 0, 0, 1, -(deck.axialFrom + half)),
		new Plane("end-high", deck.id, 0, 0, -1, deck.axialTo - half),
	];
	const behind = Math.PI - (deck.to - deck.from) / 2;
	if (!deck.closed)
		walls.push(new HalfPlane("side-low", deck.id, deck.from, half, behind), new HalfPlane("side-high", deck.id, deck.to, half, behind));
	return walls;
}
