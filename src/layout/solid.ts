import { directionOf, ringFromCylindrical, ringFromLocal, type Triad, triadAt } from "../frame/place.ts";
import { along, cross, type RingVec, ring } from "../vector/vec3.ts";
import { deckTriad, floorAlong, floorAngle, type Habitat, type Ladder, placeOnDeck, type Workstation } from "./habitat.ts";

/**
 * Bodies of the elements, ring frame, m: what flies strikes them where the element is marked solid,
 * and the picture is drawn from the same numbers.
 */
export interface Capsule {
	readonly kind: "capsule";
	/** Ends of the axis; the body is all within `radius` of it. */
	readonly a: RingVec;
	readonly b: RingVec;
	readonly radius: number;
}

export interface Box {
	readonly kind: "box";
	readonly centre: RingVec;
	/** Unit, right-handed: ahead (the facing), up, across (to the right of one who faces so). */
	readonly axes: readonly [RingVec, RingVec, RingVec];
	/** Half the size along each axis. */
	readonly half: readonly [number, number, number];
}

export type Primitive = Capsule | Box;

export interface ElementBody {
	readonly id: string;
	readonly solid: boolean;
	readonly primitives: readonly Primitive[];
}

/** A place to build at: ahead × up = across (right). */
interface Site {
	readonly origin: RingVec;
	readonly ahead: RingVec;
	readonly up: RingVec;
	readonly across: RingVec;
}

function site(origin: RingVec, triad: Triad, facing: number): Site {
	const ahead = ringFromLocal(triad, directionOf(facing, 0));
	return { origin, ahead, up: triad.up, across: cross(ahead, triad.up) };
}

const at = (s: Site, ahead: number, up: number, across: number): RingVec =>
	along(along(along(s.origin, ahead, s.ahead), up, s.up), across, s.across);

/** A box centred at (ahead, up, across) of full `size`, its top leaning back by `lean` rad. */
function box(s: Site, centre: readonly [number, number, number], size: readonly [number, number, number], lean = 0): Box {
	const c = Math.cos(lean);
	const k = Math.sin(lean);
	const turn = (x: number, y: number): RingVec => along(ring(x * s.ahead[0], x * s.ahead[1], x * s.ahead[2]), y, s.up);
	return {
		kind: "box",
		centre: at(s, ...centre),
		axes: [turn(c, -k), turn(k, c), s.across],
		half: [size[0] / 2, size[1] / 2, size[2] / 2],
	};
}

/** Radii of rail and rung tubes; a rung of 28 mm is within ISO 14122-4's 20–35 mm. */
const RAIL_RADIUS = 0.02;
const RUNG_RADIUS = 0.014;
const SHOE = [0.13, 0.012, 0.075] as const;

export interface LadderParts {
	readonly rails: readonly Capsule[];
	readonly rungs: readonly Capsule[];
	readonly shoes: readonly Box[];
}

/** Heights of the rung centres above the foot, m: every `rungSpacing`, the last at or below the head. */
export function rungHeights(ladder: Ladder): number[] {
	const count = Math.floor((ladder.footRadius - ladder.headRadius) / ladder.rungSpacing + 1e-9);
	return Array.from({ length: count }, (_, i) => (i + 1) * ladder.rungSpacing);
}

/** Rails stand clear of each other by the ladder's width, along the radius line at its angle and axial place. */
export function ladderParts(ladder: Ladder): LadderParts {
	const foot = ringFromCylindrical({ radius: ladder.footRadius, angle: ladder.angle, axial: ladder.axial });
	const s = site(foot, triadAt(ladder.angle), ladder.facing);
	const length = ladder.footRadius - ladder.headRadius;
	const side = ladder.width / 2 + RAIL_RADIUS;
	return {
		rails: [-side, side].map((x) => ({ kind: "capsule", a: at(s, 0, RAIL_RADIUS, x), b: at(s, 0, length, x), radius: RAIL_RADIUS })),
		rungs: rungHeights(ladder).map((h) => ({ kind: "capsule", a: at(s, 0, h, -side), b: at(s, 0, h, side), radius: RUNG_RADIUS })),
		shoes: [-side, side].map((x) => box(s, [0, SHOE[1] / 2, x], SHOE)),
	};
}

/** A workstation stands about its crew member's place: console ahead, seat behind. m */
export const WORKSTATION = {
	topHeight: 0.74,
	topDepth: 0.65,
	topWidth: 1.2,
	/** From the place of the feet to the console's near edge. */
	reach: 0.22,
	seatHeight: 0.45,
	/** From the place of the feet back to the seat's middle. */
	seatBehind: 0.32,
} as const;

export interface WorkstationParts {
	readonly top: Box;
	readonly panels: readonly Box[];
	readonly keys: Box;
	readonly screen: Box;
	readonly stand: readonly Box[];
	readonly seat: Box;
	readonly post: Capsule;
	readonly base: Box;
}

export function workstationParts(habitat: Habitat, workstation: Workstation): WorkstationParts {
	const deck = habitat.decks[workstation.deck];
	if (!deck) throw new RangeError(`workstation ${workstation.id} stands on deck ${workstation.deck} of ${habitat.decks.length}`);
	const w = WORKSTATION;
	/** Each thing stands upright at its own floor point, `ahead` of the place. */
	const standing = (ahead: number): Site => {
		const { facing } = workstation;
		const angle = floorAngle(deck, floorAlong(deck, workstation.angle) + ahead * Math.cos(facing));
		const point = placeOnDeck(deck, angle, workstation.axial + ahead * Math.sin(facing), 0);
		return site(point, deckTriad(deck, angle), facing);
	};
	const desk = standing(w.reach + w.topDepth / 2);
	const near = -w.topDepth / 2;
	const thick = 0.04;
	const under = w.topHeight - thick;
	const side = w.topWidth / 2 - 0.05;
	const stool = standing(-w.seatBehind);
	const seatThick = 0.06;
	const postRadius = 0.032;
	const baseThick = 0.014;
	return {
		top: box(desk, [0, w.topHeight - thick / 2, 0], [w.topDepth, thick, w.topWidth]),
		panels: [
			box(desk, [0.03, under / 2, -side], [w.topDepth - 0.14, under, 0.03]),
			box(desk, [0.03, under / 2, side], [w.topDepth - 0.14, under, 0.03]),
			box(desk, [near + w.topDepth - 0.1, under - 0.21, 0], [0.024, 0.42, 2 * side - 0.03]),
		],
		keys: box(desk, [near + 0.17, w.topHeight + 0.012, 0], [0.16, 0.024, 0.46]),
		screen: box(desk, [near + 0.47, w.topHeight + 0.31, 0], [0.03, 0.38, 0.66], 0.12),
		stand: [
			box(desk, [near + 0.5, w.topHeight + 0.1, 0], [0.03, 0.2, 0.07]),
			box(desk, [near + 0.5, w.topHeight + 0.006, 0], [0.18, 0.012, 0.26]),
		],
		seat: box(stool, [0, w.seatHeight - seatThick / 2, 0], [0.36, seatThick, 0.38]),
		post: {
			kind: "capsule",
			a: at(stool, 0, postRadius, 0),
			b: at(stool, 0, w.seatHeight - seatThick, 0),
			radius: postRadius,
		},
		base: box(stool, [0, baseThick / 2, 0], [0.3, baseThick, 0.3]),
	};
}

/** The bodies of every ladder and workstation, in the habitat's order, ladders first. */
export const elementBodies = (habitat: Habitat): ElementBody[] => [
	...habitat.ladders.map((ladder) => {
		const p = ladderParts(ladder);
		return { id: ladder.id, solid: ladder.solid, primitives: [...p.rails, ...p.rungs, ...p.shoes] };
	}),
	...habitat.workstations.map((workstation) => {
		const p = workstationParts(habitat, workstation);
		const primitives = [p.top, ...p.panels, p.keys, p.screen, ...p.stand, p.seat, p.post, p.base];
		return { id: workstation.id, solid: workstation.solid, primitives };
	}),
];
