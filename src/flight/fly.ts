import type { Spin } from "../frame/spin.ts";
import type { Deck } from "../layout/habitat.ts";
import { type RingVec, ring } from "../vector/vec3.ts";
import { type Contact, firstContact, type Stretch, stillness, TOUCHING } from "./contact.ts";
import { DragPath } from "./drag-path.ts";
import type { CoamingSurface, EdgePoint, Hatchway } from "./hatchway.ts";
import { type Path, type State, StraightPath } from "./path.ts";
import { CylinderFromWithin, CylinderFromWithout, ceilingSurface, floorSurface, Plane, type Surface, wallSurfaces } from "./surface.ts";
import { pointTouched } from "./touched.ts";
import { bodySurfaces, paneAt, type World } from "./world.ts";

/** A sphere let go at t = 0: ring position of its centre (m), velocity relative to the ring (m/s). */
export interface Release {
	/** Index of the deck whose bay it is in. */
	readonly deck: number;
	readonly position: RingVec;
	readonly velocity: RingVec;
	readonly diameter: number;
	/** ½ ρ C_d A / m, 1/m; 0 is free flight. */
	readonly drag: number;
}

export type Struck =
	| {
			readonly kind: "deck" | "ceiling" | "end-low" | "end-high" | "side-low" | "side-high" | "coaming" | "element";
			readonly id: string;
			readonly deck: number;
	  }
	| { readonly kind: "outside" }
	| { readonly kind: "none" };

export interface Flight {
	readonly struck: Struck;
	/** Of the strike, of leaving the last volume, or of giving up; s. */
	readonly end: number;
	readonly path: Path;
	/** Ring state of the centre at `end`. */
	readonly state: State;
	/** What was touched: of a pane or a closed hatch the face it lies in; null where nothing was. */
	readonly surface: Surface | null;
	/** The nearest point of the edge, where a coaming was struck. */
	readonly edge: EdgePoint | null;
	/** Hatches gone through, in order, and when, s. */
	readonly passed: readonly string[];
	readonly passedAt: readonly number[];
}

const NO_FIELD = ring(0, 0, 0);
/** Nothing is followed longer than this, s: a third of a year, ten turns at 6e-5 rpm. */
const MOST_FOLLOWED = 1e7;
/** A flight is followed for 10 turns at the rate of its release, or 600 s where that is longer. */
export const longestFlight = (rate: number): number => (rate > 0 ? Math.min(MOST_FOLLOWED, Math.max(600, (20 * Math.PI) / rate)) : 600);

/** Where a released sphere goes and what it first strikes (mechanics: free flight). Bounce and roll are not modelled. */
export function fly(world: World, spin: Spin, release: Release): Flight {
	const flight = release.drag > 0 ? new Dragged(world, spin, release) : new Free(world, spin, release);
	return flight.run();
}

type Place = { readonly kind: "bay"; readonly deck: number } | { readonly kind: "shaft"; readonly way: Hatchway; readonly down: boolean };

/** The walk from bay to bay that free and dragged flight share; they differ in how the next contact is found. */
abstract class Journey {
	protected readonly half: number;
	protected readonly until: number;
	protected readonly state: State = new Float64Array(6);
	private readonly passed: string[] = [];
	private readonly passedAt: number[] = [];
	abstract readonly path: Path;

	constructor(
		protected readonly world: World,
		protected readonly spin: Spin,
		protected readonly release: Release,
	) {
		this.half = release.diameter / 2;
		this.until = longestFlight(spin.rate(0));
	}

	/** The first contact after `from`; contacts in `leaving` count once they have opened. */
	protected abstract next(surfaces: readonly Surface[], from: number, leaving: Set<Surface>): Contact | null;
	/** The state at a contact, to full order. */
	protected abstract settle(t: number): void;
	/** A path must be known a little beyond the release to tell moving in from moving away. */
	protected abstract begin(): void;

	run(): Flight {
		this.begin();
		let place: Place = { kind: "bay", deck: this.release.deck };
		let t = 0;
		for (let hops = 0; hops < 10_000; hops++) {
			const surfaces = this.surfacesOf(place);
			const { pressed, leaving } = this.touchedAt(surfaces, t);
			const contact = pressed ? { surface: pressed, t } : this.next(surfaces, t, leaving);
			if (!contact) return this.finish({ kind: "none" }, this.until, null);
			t = contact.t;
			this.settle(t);
			const { surface } = contact;
			if (place.kind === "shaft") {
				if (surface.kind === "far-end") {
					this.passed.push(place.way.hatch.id);
					this.passedAt.push(t);
					const onward: number | null = place.down ? place.way.hatch.below : place.way.hatch.deck;
					if (onward === null) return this.finish({ kind: "outside" }, t, null);
					place = { kind: "bay", deck: onward };
					continue;
				}
				if (surface.kind === "near-end") {
					const back: number | null = place.down ? place.way.hatch.deck : place.way.hatch.below;
					if (back === null) return this.finish({ kind: "outside" }, t, null);
					place = { kind: "bay", deck: back };
					continue;
				}
				if (surface.kind === "coaming")
					return this.finish(
						{ kind: "coaming", id: surface.id, deck: place.way.hatch.deck },
						t,
						surface,
						(surface as CoamingSurface).edge(this.state),
					);
				return this.strike(surface, surface instanceof WithinBay ? surface.deck : place.way.hatch.deck, t);
			}
			const way = this.openingAt(surface, place.deck);
			if (way && !way.hatch.solid) {
				place = { kind: "shaft", way, down: surface.kind === "deck" };
				continue;
			}
			if (way) return this.finish({ kind: "element", id: way.hatch.id, deck: place.deck }, t, surface);
			return this.strike(surface, place.deck, t);
		}
		throw new RangeError(`a flight went through more than 10000 hatch ends (t = ${t} s)`);
	}

	private strike(surface: Surface, deck: number, t: number): Flight {
		if (surface.kind === "far-end" || surface.kind === "near-end") throw new RangeError(`a shaft end was struck in deck ${deck}`);
		if (this.world.panes.length > 0 && surface.kind !== "element" && surface.kind !== "coaming") {
			const own = this.world.habitat.decks[deck] as Deck;
			const face = surface.kind === "deck" ? "floor" : surface.kind;
			const pane = paneAt(this.world, own, face, pointTouched(own, surface.kind, this.state));
			if (pane) return this.finish({ kind: "element", id: pane.id, deck }, t, surface);
		}
		return this.finish({ kind: surface.kind, id: surface.id, deck }, t, surface);
	}

	private finish(struck: Struck, end: number, surface: Surface | null, edge: EdgePoint | null = null): Flight {
		if (struck.kind === "none") this.settle(end);
		return { struck, end, path: this.path, state: this.state, surface, edge, passed: this.passed, passedAt: this.passedAt };
	}

	/** The hatch through which a floor or ceiling contact is none, or null. */
	private openingAt(surface: Surface, deck: number): Hatchway | null {
		if (surface.kind !== "deck" && surface.kind !== "ceiling") return null;
		let point: RingVec | null = null;
		for (const way of this.world.ways) {
			if ((surface.kind === "deck" ? way.hatch.deck : way.hatch.below) !== deck) continue;
			point ??= pointTouched(this.world.habitat.decks[deck]!, surface.kind, this.state);
			if (way.admits(Math.atan2(point[1], point[0]), point[2])) return way;
		}
		return null;
	}

	private surfacesOf(place: Place): readonly Surface[] {
		const { half } = this;
		if (place.kind === "bay") {
			return this.world.surfaces(this.world.habitat.decks[place.deck] as Deck, half);
		}
		const { way, down } = place;
		return [
			way.outerEnd(half, down ? "far-end" : "near-end"),
			way.innerEnd(half, down ? "near-end" : "far-end"),
			...way.coaming(half),
			...wallsWithin(way.deck, half, floorSurface(way.deck, 0)),
			...(way.below ? wallsWithin(way.below, half, ceilingSurface(way.below, 0)) : []),
			...bodySurfaces(this.world.bodies, half),
		];
	}

	/**
	 * Of the surfaces touched at t: one that the body moves into, and those that it moves away from or rests at. One
	 * that it neither nears nor leaves is looked at a little later, when its acceleration has told.
	 */
	private touchedAt(surfaces: readonly Surface[], t: number): { readonly pressed: Surface | null; readonly leaving: Set<Surface> } {
		let leaving = NONE;
		let pressed: Surface | null = null;
		const s = this.state;
		this.path.stateAt(t, s);
		for (const surface of surfaces) {
			const gap = surface.gap(s);
			if (gap > TOUCHING) continue;
			let rate = surface.rate(s);
			const pace = speedOf(s) + 2 * this.spin.greatestRate * Math.sqrt(s[0]! * s[0]! + s[1]! * s[1]!);
			const still = stillness(pace);
			if (Math.abs(rate) <= still) {
				this.path.stateAt(Math.min(t + 1e-3, this.path.known), s);
				surface.gap(s);
				rate = surface.rate(s);
				this.path.stateAt(t, s);
			}
			if (rate < -still || (gap < -INSIDE && isWall(surface))) pressed ??= surface;
			else {
				if (leaving === NONE) leaving = new Set();
				leaving.add(surface);
			}
		}
		return { pressed, leaving };
	}
}

/** Never added to. */
const NONE = new Set<Surface>();
const speedOf = (s: State): number => Math.sqrt(s[3]! * s[3]! + s[4]! * s[4]! + s[5]! * s[5]!);
/** A body this far (m) inside a bulkhead or an element is not touching it but in it: it strikes there and then. */
const INSIDE = 1e-6;
const isWall = ({ kind }: Surface): boolean => kind === "element" || kind.startsWith("end-") || kind.startsWith("side-");

/** A bulkhead of the bay above or below a hatch: it ends at that bay's floor or ceiling. */
class WithinBay implements Surface {
	readonly kind: Surface["kind"];
	readonly id: string;
	private within = true;
	constructor(
		readonly deck: number,
		private readonly wall: Surface,
		private readonly face: Surface,
	) {
		this.kind = wall.kind;
		this.id = wall.id;
	}
	gap(s: State): number {
		const height = this.face.gap(s);
		this.within = height >= 0;
		return this.within ? this.wall.gap(s) : Math.max(-height, 1e-6);
	}
	rate(s: State): number {
		return this.within ? this.wall.rate(s) : -Math.abs(this.face.rate(s));
	}
	bend(b: Parameters<Surface["bend"]>[0]): number {
		return this.within ? this.wall.bend(b) : this.face.bend(b);
	}
}

const wallsWithin = (deck: Deck, half: number, face: Surface): Surface[] =>
	wallSurfaces(deck, half).map((wall) => new WithinBay(deck.index, wall, face));

class Free extends Journey {
	readonly path: StraightPath;
	private readonly stretch: Stretch;
	constructor(world: World, spin: Spin, release: Release) {
		super(world, spin, release);
		this.path = new StraightPath(spin, release.position, release.velocity);
		this.stretch = { path: this.path, spin, inertialSpeed: this.path.inertialSpeed, inertialAcceleration: 0 };
	}
	protected begin(): void {}
	protected settle(t: number): void {
		this.path.stateAt(t, this.state);
	}

	/** Cylinders and ends by their roots; what turns with the ring by advancing to the least of those at most. */
	protected next(surfaces: readonly Surface[], from: number, leaving: Set<Surface>): Contact | null {
		let best: Contact | null = null;
		let to = this.until;
		const turning: Surface[] = [];
		for (const surface of surfaces) {
			const t = straightRoot(this.path, surface, from, leaving.has(surface));
			if (t === undefined) turning.push(surface);
			else if (t < to) {
				to = t;
				best = { surface, t };
			}
		}
		return (turning.length ? firstContact(this.stretch, turning, from, to, leaving) : null) ?? best;
	}
}

/** The first contact of a straight inertial line with a surface of revolution or an end, in closed form; undefined for any other surface. */
function straightRoot(path: StraightPath, surface: Surface, from: number, leaving: boolean): number | undefined {
	if (surface instanceof Plane) {
		if (surface.nx !== 0 || surface.ny !== 0) return undefined;
		const rate = surface.nz * path.uz;
		if (leaving || !(rate < 0)) return Number.POSITIVE_INFINITY;
		return Math.max(from, (surface.nz * path.pz + surface.offset) / -rate);
	}
	const within = surface instanceof CylinderFromWithin;
	if (!within && !(surface instanceof CylinderFromWithout)) return undefined;
	const x = path.px + path.ux * from;
	const y = path.py + path.uy * from;
	const a = path.ux * path.ux + path.uy * path.uy;
	if (a === 0) return Number.POSITIVE_INFINITY;
	const b = x * path.ux + y * path.uy;
	const r = Math.sqrt(x * x + y * y);
	const c = (r - surface.reach) * (r + surface.reach);
	const root = Math.sqrt(Math.max(0, b * b - a * c));
	if (within) {
		if (leaving && b >= 0) return Number.POSITIVE_INFINITY;
		return from + Math.max(0, b > 0 ? -c / (b + root) : (root - b) / a);
	}
	if (b >= 0 || leaving || b * b < a * c) return Number.POSITIVE_INFINITY;
	return from + Math.max(0, c / (root - b));
}

class Dragged extends Journey {
	readonly path: DragPath;
	constructor(world: World, spin: Spin, release: Release) {
		super(world, spin, release);
		this.path = new DragPath(spin, release.position, release.velocity, release.drag, NO_FIELD);
	}
	protected begin(): void {
		this.path.advance(this.until);
	}
	protected settle(t: number): void {
		this.path.exactStateAt(t, this.state);
	}

	protected next(surfaces: readonly Surface[], from: number, leaving: Set<Surface>): Contact | null {
		return firstDragContact(this.path, surfaces, from, this.until, leaving);
	}
}

/** First contact along a dragged path, advancing it as needed; polished on the full-order state. */
export function firstDragContact(
	path: DragPath,
	surfaces: readonly Surface[],
	from: number,
	until: number,
	leaving: Set<Surface>,
): Contact | null {
	const s = new Float64Array(6);
	let t = from;
	while (t < until) {
		if (path.known <= t) path.advance(until - t + 1e-9);
		const to = Math.min(path.known, until);
		path.stateAt(t, s);
		const speed = path.stepSpeed(t) + 0.05 + Math.hypot(path.field[0], path.field[1], path.field[2]) * (to - t);
		const air = speed + path.spin.greatestRate * (Math.hypot(s[0] as number, s[1] as number) + speed * (to - t));
		const stretch: Stretch = {
			path,
			spin: path.spin,
			inertialSpeed: speed + path.drag * air * air * (to - t),
			inertialAcceleration: path.drag * air * air + Math.hypot(path.field[0], path.field[1], path.field[2]),
		};
		const contact = firstContact(stretch, surfaces, t, to, leaving);
		if (contact) return { surface: contact.surface, t: polish(path, contact, s, from, to) };
		t = to;
	}
	return null;
}

function polish(path: DragPath, contact: Contact, s: State, from: number, to: number): number {
	let t = contact.t;
	for (let i = 0; i < 4; i++) {
		path.exactStateAt(t, s);
		const gap = contact.surface.gap(s);
		const rate = contact.surface.rate(s);
		if (!(rate < 0)) break;
		const step = -gap / rate;
		if (Math.abs(step) > 1e-5) break;
		t = Math.min(to, Math.max(from, t + step));
		if (Math.abs(step) < 1e-13) break;
	}
	return t;
}
