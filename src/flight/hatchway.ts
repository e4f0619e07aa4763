import { angleNear, type Deck, floorAlong, floorAngle, type Habitat, type Hatch } from "../layout/habitat.ts";
import { Box } from "./convex.ts";
import type { Bounds, State } from "./path.ts";
import { ceilingSurface, floorSurface, type Surface } from "./surface.ts";

/** A point of the edge of a hatch at its own deck's floor. */
export interface EdgePoint {
	readonly angle: number;
	readonly axial: number;
}

export interface CoamingSurface extends Surface {
	/** The point of the edge nearest to a centre at this state. */
	edge(s: State): EdgePoint;
}

/** Radius of a deck's floor (height 0) or ceiling (height = headroom) on the radius at `angle`, m. */
const radiusOf = (deck: Deck, angle: number, height: number): number =>
	deck.floor === "curved" ? deck.radius - height : (deck.radius - height) / Math.cos(angle - deck.middle);

/**
 * The way through a hatch: its outline carried along the radii from the floor of its deck to the
 * ceiling of the deck below (or nowhere, where none lies below), for a sphere of radius `half`.
 */
export class Hatchway {
	readonly hatch: Hatch;
	readonly deck: Deck;
	readonly below: Deck | null;
	/** Floor coordinate of the centre, m. */
	private readonly centreAlong: number;

	constructor(habitat: Habitat, hatch: Hatch) {
		this.hatch = hatch;
		this.deck = habitat.decks[hatch.deck] as Deck;
		this.below = hatch.below === null ? null : (habitat.decks[hatch.below] as Deck);
		this.centreAlong = floorAlong(this.deck, angleNear(hatch.angle, this.deck.middle));
	}

	/** Whether a radius at this angle and axial place runs inside the outline (the edge itself is inside). */
	admits(angle: number, axial: number): boolean {
		const u = floorAlong(this.deck, angleNear(angle, this.hatch.angle)) - this.centreAlong;
		const w = axial - this.hatch.axial;
		if (this.hatch.shape === "circle") return u * u + w * w <= (this.hatch.along / 2) ** 2;
		return Math.abs(u) <= this.hatch.along / 2 && Math.abs(w) <= this.hatch.across / 2;
	}

	/** Floor radius on the radius at `angle`. */
	top(angle: number): number {
		return radiusOf(this.deck, angle, 0);
	}
	/** Radius of the far end of the shaft on the radius at `angle`; never inboard of the floor. */
	bottom(angle: number): number {
		return this.below ? Math.max(this.top(angle), radiusOf(this.below, angle, this.below.headroom)) : this.top(angle);
	}
	/** Ring angle of a floor coordinate measured from the hatch's centre. */
	angleAt(along: number): number {
		return floorAngle(this.deck, this.centreAlong + along);
	}

	/** The coaming: the shaft's walls with both their edges. */
	coaming(half: number): CoamingSurface[] {
		const { hatch } = this;
		if (hatch.shape === "circle") return [new RoundCoaming(this, half)];
		const low = this.angleAt(-hatch.along / 2);
		const high = this.angleAt(hatch.along / 2);
		return [
			new RadialCoaming(this, half, low),
			new RadialCoaming(this, half, high),
			new AxialCoaming(this, half, hatch.axial - hatch.across / 2, low, high),
			new AxialCoaming(this, half, hatch.axial + hatch.across / 2, low, high),
		];
	}

	/** Where the centre is d/2 beyond the shaft's outer end, and d/2 above the floor; each met from inside the shaft. */
	outerEnd(half: number, kind: Surface["kind"]): Surface {
		const { below, deck } = this;
		const { angle } = this.hatch;
		const shaft = below !== null && radiusOf(below, angle, below.headroom) >= radiusOf(deck, angle, 0) - 1e-9;
		return shaft ? floorSurface({ ...below, radius: below.radius - below.headroom }, -half, kind) : floorSurface(deck, -half, kind);
	}
	innerEnd(half: number, kind: Surface["kind"]): Surface {
		return ceilingSurface({ ...this.deck, headroom: 0 }, -half, kind);
	}
}

/** A wall of a rectangular hatch at one angle: a flat rectangle through the axis's direction. */
class RadialCoaming extends Box implements CoamingSurface {
	private readonly low: number;
	private readonly high: number;
	constructor(
		way: Hatchway,
		half: number,
		private readonly angle: number,
	) {
		const inner = way.top(angle);
		const outer = way.bottom(angle);
		const c = Math.cos(angle);
		const s = Math.sin(angle);
		const r = (inner + outer) / 2;
		super(
			"coaming",
			way.hatch.id,
			half,
			[r * c, r * s, way.hatch.axial],
			[
				[c, s, 0],
				[-s, c, 0],
				[0, 0, 1],
			],
			[(outer - inner) / 2, 0, way.hatch.across / 2],
		);
		this.low = way.hatch.axial - way.hatch.across / 2;
		this.high = way.hatch.axial + way.hatch.across / 2;
	}
	edge(s: State): EdgePoint {
		return { angle: this.angle, axial: Math.min(this.high, Math.max(this.low, s[2] as number)) };
	}
}

/** A wall of a rectangular hatch at one axial place: flat, between two radii and the floor and far-end lines. */
class AxialCoaming implements CoamingSurface {
	readonly kind = "coaming";
	readonly id: string;
	private nx = 0;
	private ny = 0;
	private nz = 0;
	constructor(
		private readonly way: Hatchway,
		private readonly half: number,
		private readonly axial: number,
		private readonly low: number,
		private readonly high: number,
	) {
		this.id = way.hatch.id;
	}

	/** The nearest point of the wall in its own plane. */
	private nearest(s: State): readonly [number, number] {
		const x = s[0] as number;
		const y = s[1] as number;
		const own = angleNear(Math.atan2(y, x), this.way.hatch.angle);
		const angle = Math.min(this.high, Math.max(this.low, own));
		const r = own === angle ? Math.sqrt(x * x + y * y) : x * Math.cos(angle) + y * Math.sin(angle);
		if (r < this.way.top(angle)) return nearestOnLine(this.way.deck, 0, x, y, angle, this.low, this.high);
		if (r > this.way.bottom(angle)) {
			const { below, deck } = this.way;
			const beyond = below !== null && this.way.bottom(angle) > this.way.top(angle);
			return beyond
				? nearestOnLine(below, below.headroom, x, y, angle, this.low, this.high)
				: nearestOnLine(deck, 0, x, y, angle, this.low, this.high);
		}
		return [r * Math.cos(angle), r * Math.sin(angle)];
	}

	gap(s: State): number {
		const [px, py] = this.nearest(s);
		const dx = (s[0] as number) - px;
		const dy = (s[1] as number) - py;
		const dz = (s[2] as number) - this.axial;
		const l = Math.sqrt(dx * dx + dy * dy + dz * dz);
		if (l > 0) {
			this.nx = dx / l;
			this.ny = dy / l;
			this.nz = dz / l;
		}
		return l - this.half;
	}
	rate(s: State): number {
		return this.nx * (s[3] as number) + this.ny * (s[4] as number) + this.nz * (s[5] as number);
	}
	/** Its curved end lines bend away from the centre at no more than their radius; twice that bound for a margin. */
	bend(b: Bounds): number {
		return b.acceleration + (2 * b.speed * b.speed) / this.way.top(this.way.hatch.angle);
	}
	edge(s: State): EdgePoint {
		const [px, py] = this.nearest(s);
		return { angle: Math.min(this.high, Math.max(this.low, angleNear(Math.atan2(py, px), this.way.hatch.angle))), axial: this.axial };
	}
}

/** Nearest point to (x, y) on a deck's floor line (or the line `height` above it) between two angles. */
function nearestOnLine(
	deck: Deck,
	height: number,
	x: number,
	y: number,
	angle: number,
	low: number,
	high: number,
): readonly [number, number] {
	const n = deck.radius - height;
	if (deck.floor === "curved") return [n * Math.cos(angle), n * Math.sin(angle)];
	const c = Math.cos(deck.middle);
	const s = Math.sin(deck.middle);
	const along = Math.min(n * Math.tan(high - deck.middle), Math.max(n * Math.tan(low - deck.middle), c * y - s * x));
	return [n * c - along * s, n * s + along * c];
}

/** The wall of a round hatch: the radii through a circle of the floor. */
class RoundCoaming implements CoamingSurface {
	readonly kind = "coaming";
	readonly id: string;
	private readonly rho: number;
	private nx = 0;
	private ny = 0;
	private nz = 0;
	private distance = 0;
	constructor(
		private readonly way: Hatchway,
		private readonly half: number,
	) {
		this.id = way.hatch.id;
		this.rho = way.hatch.along / 2;
	}

	/** Square of the distance from the centre to the wall's line at the edge parameter; keeps the direction when `keep`. */
	private square(s: State, parameter: number, keep: boolean): number {
		const angle = this.way.angleAt(this.rho * Math.cos(parameter));
		const c = Math.cos(angle);
		const n = Math.sin(angle);
		const x = s[0] as number;
		const y = s[1] as number;
		const r = Math.min(this.way.bottom(angle), Math.max(this.way.top(angle), x * c + y * n));
		const dx = x - r * c;
		const dy = y - r * n;
		const dz = (s[2] as number) - this.way.hatch.axial - this.rho * Math.sin(parameter);
		const q = dx * dx + dy * dy + dz * dz;
		if (keep) {
			this.distance = Math.sqrt(q);
			if (q > 0) {
				this.nx = dx / this.distance;
				this.ny = dy / this.distance;
				this.nz = dz / this.distance;
			}
		}
		return q;
	}

	/** The edge parameter of the nearest line: the best of a fan, golden section, then the vertex of the parabola at its end. */
	private nearest(s: State): number {
		const fan = 24;
		let best = 0;
		let least = Number.POSITIVE_INFINITY;
		for (let i = 0; i < fan; i++) {
			const parameter = (2 * Math.PI * i) / fan;
			const q = this.square(s, parameter, false);
			if (q < least) {
				least = q;
				best = parameter;
			}
		}
		const golden = (Math.sqrt(5) - 1) / 2;
		let a = best - (2 * Math.PI) / fan;
		let b = best + (2 * Math.PI) / fan;
		let p = b - golden * (b - a);
		let q = a + golden * (b - a);
		let fp = this.square(s, p, false);
		let fq = this.square(s, q, false);
		while (b - a > 1e-4) {
			if (fp < fq) {
				b = q;
				q = p;
				fq = fp;
				p = b - golden * (b - a);
				fp = this.square(s, p, false);
			} else {
				a = p;
				p = q;
				fp = fq;
				q = a + golden * (b - a);
				fq = this.square(s, q, false);
			}
		}
		return this.vertex(s, this.vertex(s, (a + b) / 2));
	}

	/** A section search stalls where the square no longer tells; the vertex of the parabola through three points does not. */
	private vertex(s: State, parameter: number): number {
		const h = 1e-5;
		const low = this.square(s, parameter - h, false);
		const high = this.square(s, parameter + h, false);
		const bend = low - 2 * this.square(s, parameter, false) + high;
		return bend > 0 ? parameter + (h * (low - high)) / (2 * bend) : parameter;
	}

	gap(s: State): number {
		this.square(s, this.nearest(s), true);
		return this.distance - this.half;
	}
	/**
	 * Far from the wall the nearest line may change at once, so only the speed bounds the approach; near
	 * it, going away counts as standing still, so that a step never crosses to the other side unseen.
	 */
	rate(s: State): number {
		const vx = s[3] as number;
		const vy = s[4] as number;
		const vz = s[5] as number;
		if (this.distance > this.rho / 2) return -Math.sqrt(vx * vx + vy * vy + vz * vz);
		return Math.min(0, this.nx * vx + this.ny * vy + this.nz * vz);
	}
	bend(b: Bounds): number {
		return b.acceleration + b.speed * b.speed * (5 / this.rho + 2 / this.way.top(this.way.hatch.angle));
	}
	edge(s: State): EdgePoint {
		const parameter = this.nearest(s);
		return { angle: this.way.angleAt(this.rho * Math.cos(parameter)), axial: this.way.hatch.axial + this.rho * Math.sin(parameter) };
	}
}
