import { type Deck, deckTriad, type Habitat, placeOnDeck } from "../layout/habitat.ts";
import { cross, dot, type RingVec, ring } from "../vector/vec3.ts";
import { Convex } from "./convex.ts";
import type { Flight } from "./fly.ts";
import { pointTouched, tangentOf } from "./touched.ts";

/** Where a sphere touched and how it arrived; offsets in m along the struck surface, + prograde and + axial. */
export interface Landing {
	readonly point: RingVec;
	/**
	 * From the point below the release. Null on a side bulkhead, which has no prograde direction of its own, and where
	 * the line straight down from the release meets the struck deck nowhere.
	 */
	readonly prograde: number | null;
	/** Null on an end bulkhead. */
	readonly axial: number | null;
	/** Of the point touched, m. */
	readonly radius: number;
	/** Of the centre, in the ring, m/s. */
	readonly speed: number;
	/** Between the velocity and down (a flat deck's normal), rad, 0 down, π up; null at rest. */
	readonly angle: number | null;
	/** The same angle from r̂, rad. */
	readonly angleFromRadial: number | null;
}

/** Where and how a flight ended, its offsets taken from the point straight below the release. Null where nothing was struck. */
export function landing(habitat: Habitat, flight: Flight, releaseDeck: Deck, release: RingVec): Landing | null {
	const { struck, surface } = flight;
	if (struck.kind === "outside" || struck.kind === "none" || !surface) return null;
	const deck = habitat.decks[struck.deck]!;
	const s = flight.state;
	const centre = ring(s[0]!, s[1]!, s[2]!);
	const velocity = ring(s[3]!, s[4]!, s[5]!);
	const point = touched(deck, flight, centre);
	const speed = Math.sqrt(dot(velocity, velocity));
	const from = (up: RingVec): number | null => {
		const across = cross(velocity, up);
		return speed > 0 ? Math.atan2(Math.sqrt(dot(across, across)), -dot(velocity, up)) : null;
	};
	const r = radiusOf(centre);
	const fromRadial = from(ring(-centre[0] / r, -centre[1] / r, 0));
	return {
		point,
		prograde: progradeOffset(deck, flight, point, releaseDeck, release, release),
		axial: surface.kind === "end-low" || surface.kind === "end-high" ? null : point[2] - release[2],
		radius: radiusOf(point),
		speed,
		angle: deck.floor === "curved" ? fromRadial : from(deckTriad(deck, 0).up),
		angleFromRadial: fromRadial,
	};
}

/** Offsets of a landing point from the point below a standing person's feet, the same way as `landing` measures; m. */
export function fromFeet(
	habitat: Habitat,
	flight: Flight,
	found: Landing,
	own: Deck,
	release: RingVec,
	feet: RingVec,
): { prograde: number | null; axial: number | null } {
	const { struck } = flight;
	if (struck.kind === "outside" || struck.kind === "none") throw new RangeError(`a flight that ended ${struck.kind} has no landing`);
	return {
		prograde: progradeOffset(habitat.decks[struck.deck]!, flight, found.point, own, release, feet),
		axial: found.axial === null ? null : found.point[2] - feet[2],
	};
}

/** The point touched: of a coaming its edge at the floor. */
function touched(deck: Deck, { surface, edge, state }: Flight, centre: RingVec): RingVec {
	if (surface instanceof Convex && surface.kind === "element") return surface.touched(state);
	switch (surface?.kind) {
		case "deck":
		case "ceiling":
		case "end-low":
		case "end-high":
		case "side-low":
		case "side-high":
			return pointTouched(deck, surface.kind, state);
		case "coaming":
			if (edge) return placeOnDeck(deck, edge.angle, edge.axial, 0);
	}
	throw new RangeError(`nothing was touched at (${centre.join(", ")}) m`);
}

/**
 * From the point where the line through `from`, straight down on the deck it is on, meets the struck floor or ceiling:
 * arc on a curved deck, counted over whole turns since the release, tangent on a flat one; m.
 */
function progradeOffset(deck: Deck, flight: Flight, point: RingVec, own: Deck, release: RingVec, from: RingVec): number | null {
	const kind = flight.surface?.kind;
	if (kind === "side-low" || kind === "side-high") return null;
	const depth = kind === "ceiling" ? deck.radius - deck.headroom : deck.radius;
	const below = straightDown(own, from, deck, depth);
	if (!below) return null;
	if (deck.floor === "flat") return tangentOf(deck, point) - tangentOf(deck, below);
	const centre = ring(flight.state[0]!, flight.state[1]!, 0);
	const turned = flight.path.sweptAt(flight.end) + angleFrom(centre, point) - angleFrom(release, below);
	const along = kind === "deck" || kind === "ceiling" || kind === "coaming" ? depth : radiusOf(point);
	return along * turned;
}

/** Where the line through `from`, straight down on its own deck, meets the face at `depth` of another (or the same); null where it does not. */
function straightDown(own: Deck, from: RingVec, deck: Deck, depth: number): RingVec | null {
	const [c, n] = [Math.cos(deck.middle), Math.sin(deck.middle)];
	if (own.floor === "curved") {
		const r = radiusOf(from);
		const reach = deck.floor === "curved" ? r : from[0] * c + from[1] * n;
		return reach > 0 ? ring((from[0] * depth) / reach, (from[1] * depth) / reach, from[2]) : null;
	}
	const y = tangentOf(own, from);
	const at = (down: number): RingVec => {
		const [a, b] = [Math.cos(own.middle), Math.sin(own.middle)];
		return ring(down * a - y * b, down * b + y * a, from[2]);
	};
	if (deck.floor === "curved") return Math.abs(y) < depth ? at(Math.sqrt(depth * depth - y * y)) : null;
	const turn = deck.middle - own.middle;
	return Math.cos(turn) > 0 ? at((depth - y * Math.sin(turn)) / Math.cos(turn)) : null;
}

const radiusOf = (p: RingVec): number => Math.sqrt(p[0] * p[0] + p[1] * p[1]);

/** Signed ring angle from one point to another, rad in (−π, π]. */
const angleFrom = (a: RingVec, b: RingVec): number => Math.atan2(a[0] * b[1] - a[1] * b[0], a[0] * b[0] + a[1] * b[1]);
