import { cylindricalFromRing } from "../frame/place.ts";
import { angleNear, type Deck, deckTriad, floorAlong, type Habitat, placeOnDeck } from "../layout/habitat.ts";
import { dot, type RingVec, ring } from "../vector/vec3.ts";
import type { Flight } from "./fly.ts";

/** Where a sphere touched and how it arrived; offsets in m along the struck surface, + prograde and + axial. */
export interface Landing {
	readonly point: RingVec;
	/** Null on a side bulkhead, which has no prograde direction of its own. */
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

/**
 * Offsets of a strike from the point straight below (or above) `from` as seen from its own deck: where
 * that deck's local-down line meets the struck surface. `swept` is the unwrapped ring angle from the
 * release to the strike. Null where nothing was struck.
 */
export function landing(habitat: Habitat, flight: Flight, releaseDeck: Deck, release: RingVec): Landing | null {
	const { struck } = flight;
	if (struck.kind === "outside" || struck.kind === "none") return null;
	const deck = habitat.decks[struck.deck] as Deck;
	const s = flight.state;
	const centre = ring(s[0] as number, s[1] as number, s[2] as number);
	const velocity = ring(s[3] as number, s[4] as number, s[5] as number);
	const swept = flight.path.sweptAt(flight.end);
	const point = touched(deck, flight, centre);
	const startAngle = Math.atan2(release[1], release[0]);
	/** The unwrapped ring angle of the point touched: that of the centre, moved by what lies between them. */
	const centreAngle = startAngle + swept;
	const pointAngle = angleNear(Math.atan2(point[1], point[0]), centreAngle);
	const place = cylindricalFromRing(point);
	const height = struck.kind === "ceiling" ? deck.headroom : 0;
	let prograde: number | null;
	if (struck.kind === "side-low" || struck.kind === "side-high") prograde = null;
	else if (struck.kind === "deck" || struck.kind === "ceiling" || struck.kind === "coaming") {
		prograde = alongSurface(deck, height, pointAngle) - alongSurface(deck, height, belowAngle(releaseDeck, release, deck, height));
	} else if (deck.floor === "flat") prograde = tangent(deck, point) - tangent(deck, release);
	else prograde = place.radius * (pointAngle - startAngle);
	const speed = Math.hypot(velocity[0], velocity[1], velocity[2]);
	const down = (axis: RingVec): number | null => (speed > 0 ? Math.acos(Math.min(1, Math.max(-1, -dot(velocity, axis) / speed))) : null);
	const angle = Math.atan2(centre[1], centre[0]);
	return {
		point,
		prograde,
		axial: struck.kind === "end-low" || struck.kind === "end-high" ? null : point[2] - release[2],
		radius: place.radius,
		speed,
		angle: down(deckTriad(deck, angle).up),
		angleFromRadial: down(ring(-Math.cos(angle), -Math.sin(angle), 0)),
	};
}

/** The point of the struck surface nearest to the centre (of a coaming, of its edge at the floor). */
function touched(deck: Deck, flight: Flight, centre: RingVec): RingVec {
	const { struck, edge } = flight;
	const r = Math.hypot(centre[0], centre[1]);
	const onCylinder = (radius: number): RingVec => ring((centre[0] * radius) / r, (centre[1] * radius) / r, centre[2]);
	const onPlane = (distance: number): RingVec => {
		const c = Math.cos(deck.middle);
		const s = Math.sin(deck.middle);
		const k = distance - (centre[0] * c + centre[1] * s);
		return ring(centre[0] + k * c, centre[1] + k * s, centre[2]);
	};
	switch (struck.kind) {
		case "deck":
			return deck.floor === "curved" ? onCylinder(deck.radius) : onPlane(deck.radius);
		case "ceiling":
			return deck.floor === "curved" ? onCylinder(deck.radius - deck.headroom) : onPlane(deck.radius - deck.headroom);
		case "end-low":
			return ring(centre[0], centre[1], deck.axialFrom);
		case "end-high":
			return ring(centre[0], centre[1], deck.axialTo);
		case "side-low":
		case "side-high": {
			const at = struck.kind === "side-low" ? deck.from : deck.to;
			const q = centre[0] * Math.cos(at) + centre[1] * Math.sin(at);
			return ring(q * Math.cos(at), q * Math.sin(at), centre[2]);
		}
		case "coaming":
			if (!edge) throw new RangeError("a struck coaming has an edge point");
			return placeOnDeck(deck, edge.angle, edge.axial, 0);
		default:
			return centre;
	}
}

/** Surface coordinate along prograde: arc on a curved floor or ceiling, tangent on a flat one; m. */
function alongSurface(deck: Deck, height: number, angle: number): number {
	if (deck.floor === "curved") return (deck.radius - height) * angle;
	return (floorAlong(deck, angleNear(angle, deck.middle)) * (deck.radius - height)) / deck.radius;
}

const tangent = (deck: Deck, p: RingVec): number => p[1] * Math.cos(deck.middle) - p[0] * Math.sin(deck.middle);

/** Ring angle at which the local-down line through `from` on its own deck meets a surface of another (or the same) deck, rad. */
export function belowAngle(own: Deck, from: RingVec, deck: Deck, height: number): number {
	const angle = Math.atan2(from[1], from[0]);
	if (own.floor === "curved") return angle;
	const surface = deck.radius - height;
	const y = tangent(own, from);
	if (deck.floor === "curved") return angleNear(own.middle + Math.asin(y / surface), angle);
	if (deck.middle === own.middle) return angleNear(own.middle + Math.atan(y / surface), angle);
	/** The line y = const of the own deck meets the plane n·p = surface of the other. */
	const turn = deck.middle - own.middle;
	const n = (surface - y * Math.sin(turn)) / Math.cos(turn);
	return angleNear(own.middle + Math.atan2(y, n), angle);
}

/** Offsets of a landing point from the point below a standing person's feet, the same way as `landing` measures; m. */
export function fromFeet(habitat: Habitat, flight: Flight, found: Landing, own: Deck, release: RingVec, feet: RingVec): { prograde: number | null; axial: number | null } {
	const { struck } = flight;
	if (found.prograde === null || struck.kind === "outside" || struck.kind === "none")
		return { prograde: null, axial: found.axial === null ? null : found.point[2] - feet[2] };
	const deck = habitat.decks[struck.deck] as Deck;
	const height = struck.kind === "ceiling" ? deck.headroom : 0;
	const onSurface = struck.kind === "deck" || struck.kind === "ceiling" || struck.kind === "coaming";
	const startAngle = Math.atan2(release[1], release[0]);
	const feetAngle = angleNear(Math.atan2(feet[1], feet[0]), startAngle);
	let shift: number;
	if (onSurface) {
		const feetBelow = angleNear(belowAngle(own, feet, deck, height), feetAngle);
		shift = alongSurface(deck, height, belowAngle(own, release, deck, height)) - alongSurface(deck, height, feetBelow);
	} else if (deck.floor === "flat") shift = tangent(deck, release) - tangent(deck, feet);
	else shift = found.radius * (startAngle - feetAngle);
	return { prograde: found.prograde + shift, axial: found.axial === null ? null : found.point[2] - feet[2] };
}
