import type { Cylindrical, Triad } from "../frame/place.ts";
import { triadAt } from "../frame/place.ts";
import { type RingVec, ring } from "../vector/vec3.ts";

/**
 * The habitat as the mechanics reads it: SI and radians, ids resolved to indices. Built from a layout
 * file by `resolveHabitat`; nothing below the layout layer sees the file.
 */
export interface Habitat {
	readonly decks: readonly Deck[];
	readonly hatches: readonly Hatch[];
	readonly ladders: readonly Ladder[];
	readonly windows: readonly WindowOpening[];
	readonly workstations: readonly Workstation[];
	readonly air: Air;
	readonly sky: Sky;
}

export interface Air {
	/** Pa */
	readonly pressure: number;
	/** K */
	readonly temperature: number;
	/** By volume, 0…1, rest nitrogen, dry. */
	readonly oxygenFraction: number;
}

/** Where +z points and where the ring's zero angle stands at t = 0; rad, ICRS. Null where the file gives none. */
export interface Sky {
	readonly axisRightAscension: number;
	readonly axisDeclination: number;
	readonly zero: number;
	readonly sunRightAscension: number;
	readonly sunDeclination: number;
}

/** A rectangle in floor coordinates: angles in rad, axial in m. */
export interface FloorRange {
	readonly from: number;
	readonly to: number;
	readonly axialFrom: number;
	readonly axialTo: number;
}

export interface Walkway extends FloorRange {
	readonly id: string;
}

export interface Deck extends FloorRange {
	readonly index: number;
	readonly id: string;
	readonly name: string;
	readonly floor: "curved" | "flat";
	/** Of a curved floor its radius; of a flat one the distance of its plane from the axis. m */
	readonly radius: number;
	readonly headroom: number;
	/** Middle angle, rad: the normal of a flat floor. */
	readonly middle: number;
	/** Spans a whole turn, so it has no side bulkheads. */
	readonly closed: boolean;
	readonly walkways: readonly Walkway[];
}

/** `along` and `across` are the full sizes at the floor, m; a circle has both equal to its diameter. */
export interface Outline {
	readonly shape: "rectangle" | "circle";
	readonly along: number;
	readonly across: number;
}

export interface Hatch extends Outline {
	readonly id: string;
	readonly deck: number;
	/** Index of the deck below it, or null where the hatch opens outside. */
	readonly below: number | null;
	readonly angle: number;
	readonly axial: number;
	readonly solid: boolean;
}

export interface Ladder {
	readonly id: string;
	/** The deck whose floor lies at the foot. */
	readonly deck: number;
	readonly angle: number;
	readonly axial: number;
	readonly footRadius: number;
	readonly headRadius: number;
	/** Heading the climber looks, rad. */
	readonly facing: number;
	readonly width: number;
	readonly rungSpacing: number;
	readonly toeClearance: number;
	readonly traffic: "up" | "down" | "both";
	readonly solid: boolean;
}

export type WindowSurface = "floor" | "ceiling" | "end-low" | "end-high" | "side-low" | "side-high";

export interface WindowOpening extends Outline {
	readonly id: string;
	readonly deck: number;
	readonly surface: WindowSurface;
	/** Centre: angle (floor, ceiling, ends), axial (floor, ceiling, sides), height (ends, sides); unused ones are the surface's own. */
	readonly angle: number;
	readonly axial: number;
	readonly height: number;
	readonly solid: boolean;
}

export interface Workstation {
	readonly id: string;
	readonly deck: number;
	readonly angle: number;
	readonly axial: number;
	/** Heading the seated person looks, rad. */
	readonly facing: number;
	readonly solid: boolean;
}

/** The directions in force at a floor angle: of a curved floor the local ones, of a flat one the deck's own. */
export const deckTriad = (deck: Deck, angle: number): Triad => triadAt(deck.floor === "curved" ? angle : deck.middle);

/** The floor coordinate along prograde, m: arc on a curved floor, tangent from the middle on a flat one. */
export const floorAlong = (deck: Deck, angle: number): number =>
	deck.floor === "curved" ? deck.radius * (angle - deck.middle) : deck.radius * Math.tan(angle - deck.middle);

/** The inverse of `floorAlong`, rad. */
export const floorAngle = (deck: Deck, along: number): number =>
	deck.middle + (deck.floor === "curved" ? along / deck.radius : Math.atan(along / deck.radius));

/** The ring position of a place above a deck. */
export function placeOnDeck(deck: Deck, angle: number, axial: number, height: number): RingVec {
	if (deck.floor === "curved") {
		const r = deck.radius - height;
		return ring(r * Math.cos(angle), r * Math.sin(angle), axial);
	}
	const triad = triadAt(deck.middle);
	const y = deck.radius * Math.tan(angle - deck.middle);
	const n = deck.radius - height;
	return ring(-triad.up[0] * n + triad.prograde[0] * y, -triad.up[1] * n + triad.prograde[1] * y, axial);
}

/** Height of a ring position above a deck's floor, m (along the local up, or the flat deck's normal). */
export function heightAbove(deck: Deck, p: RingVec): number {
	if (deck.floor === "curved") return deck.radius - Math.hypot(p[0], p[1]);
	return deck.radius - (p[0] * Math.cos(deck.middle) + p[1] * Math.sin(deck.middle));
}

/** An angle moved by whole turns to lie nearest to `near`, rad. */
export const angleNear = (angle: number, near: number): number => angle - 2 * Math.PI * Math.round((angle - near) / (2 * Math.PI));

/** Whether the ring place lies within the deck's angles and axial range (bounds included). */
export function deckCovers(deck: Deck, p: Pick<Cylindrical, "angle" | "axial">): boolean {
	const angle = angleNear(p.angle, deck.middle);
	const slack = 1e-12;
	return (
		(deck.closed || (angle >= deck.from - slack && angle <= deck.to + slack)) &&
		p.axial >= deck.axialFrom - slack &&
		p.axial <= deck.axialTo + slack
	);
}
