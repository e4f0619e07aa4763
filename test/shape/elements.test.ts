import { describe, expect, it } from "vitest";
import { type Deck, deckTriad, type Habitat, heightAbove, type Ladder, type Workstation } from "../../src/layout/habitat.ts";
import {
	type Capsule,
	elementBodies,
	ladderParts,
	type Primitive,
	rungHeights,
	WORKSTATION,
	workstationParts,
} from "../../src/layout/solid.ts";
import { elementShapes } from "../../src/shape/elements.ts";
import { ladderShape } from "../../src/shape/elements-ladder.ts";
import { objectShape } from "../../src/shape/elements-object.ts";
import { contactShadow } from "../../src/shape/elements-shadow.ts";
import { workstationShape } from "../../src/shape/elements-workstation.ts";
import { type StageFrame, stageFrame } from "../../src/shape/stage-frame.ts";
import { dot, length, type RingVec, sub } from "../../src/vector/vec3.ts";
import { crossed, dotted, lines, meshes, minus, normalAt, positionAt, ringAt, shipped, size, triangles, vertexCount } from "./probe.ts";
import { manyOpenings, wholeRings } from "./test-bays.ts";

const habitats: readonly (readonly [string, Habitat])[] = [
	["larkspur", shipped("larkspur")],
	["twin-arm", shipped("twin-arm")],
	["great-ring", shipped("great-ring")],
	["many openings", manyOpenings()],
	["whole rings", wholeRings()],
];

/** Distance from a primitive's surface, m, negative inside. */
function distance(p: Primitive, x: RingVec): number {
	if (p.kind === "capsule") {
		const d = sub(p.b, p.a);
		const k = Math.min(1, Math.max(0, dot(sub(x, p.a), d) / dot(d, d)));
		return length(sub(x, [p.a[0] + k * d[0], p.a[1] + k * d[1], p.a[2] + k * d[2]] as unknown as RingVec)) - p.radius;
	}
	const q = p.axes.map((axis, i) => Math.abs(dot(sub(x, p.centre), axis)) - (p.half[i] as number));
	const outside = Math.hypot(...q.map((v) => Math.max(0, v)));
	return outside > 0 ? outside : Math.max(...q);
}

const deckOf = (habitat: Habitat, e: Ladder | Workstation): Deck => habitat.decks[e.deck] as Deck;
const frameAt = (habitat: Habitat, e: Ladder | Workstation): StageFrame => stageFrame(deckOf(habitat, e), e.angle, e.axial);

describe.each(habitats)("elements: %s", (_name, habitat) => {
	const elements: readonly (readonly [Ladder | Workstation, StageFrame, ReturnType<typeof ladderShape>])[] = [
		...habitat.ladders.map((l) => [l, frameAt(habitat, l), ladderShape(l, frameAt(habitat, l))] as const),
		...habitat.workstations.map((w) => [w, frameAt(habitat, w), workstationShape(habitat, w, frameAt(habitat, w))] as const),
	];

	it("every drawn vertex lies within 1 cm of the body that things strike, or inside it", () => {
		expect(elements.length).toBeGreaterThan(0);
		const bodies = elementBodies(habitat);
		expect(bodies.map((b) => b.id)).toEqual(elements.map(([e]) => e.id));
		for (const [e, frame, drawn] of elements) {
			const body = bodies.find((b) => b.id === e.id) as (typeof bodies)[number];
			let worst = Number.NEGATIVE_INFINITY;
			for (const m of meshes(drawn))
				for (let i = 0; i < vertexCount(m); i++)
					worst = Math.max(worst, Math.min(...body.primitives.map((p) => distance(p, ringAt(frame, m, i)))));
			expect(worst, e.id).toBeLessThan(0.01);
		}
	});

	it("every body is drawn: some vertex lies on the surface of each", () => {
		const bodies = elementBodies(habitat);
		for (const [e, frame, drawn] of elements)
			for (const p of bodies.find((b) => b.id === e.id)?.primitives ?? []) {
				let nearest = Number.POSITIVE_INFINITY;
				for (const m of meshes(drawn).filter((d) => d.side === "front"))
					for (let i = 0; i < vertexCount(m); i++) nearest = Math.min(nearest, Math.abs(distance(p, ringAt(frame, m, i))));
				expect(nearest, `${e.id}, ${p.kind}`).toBeLessThan(1e-3);
			}
	});

	it("normals are unit, winding agrees, and nothing but a foot's edge goes below the deck", () => {
		for (const [e, frame, drawn] of elements)
			for (const m of meshes(drawn).filter((d) => d.side === "front")) {
				let agree = 1;
				let unit = 0;
				let lowest = Number.POSITIVE_INFINITY;
				for (const [a, b, c, i] of triangles(m)) {
					const n = crossed(minus(b, a), minus(c, a));
					if (size(n) > 1e-9) agree = Math.min(agree, dotted(n, normalAt(m, i)) / size(n));
				}
				for (let i = 0; i < vertexCount(m); i++) {
					unit = Math.max(unit, Math.abs(size(normalAt(m, i)) - 1));
					lowest = Math.min(lowest, heightAbove(deckOf(habitat, e), ringAt(frame, m, i)));
				}
				expect(agree, m.name).toBeGreaterThan(0.5);
				expect(unit, m.name).toBeLessThan(1e-5);
				/** Flat feet dip into a floor that rises to both sides: half a width squared over twice the radius. */
				const dip = deckOf(habitat, e).floor === "curved" ? 0.7 ** 2 / 2 / deckOf(habitat, e).radius : 0.06;
				expect(lowest, m.name).toBeGreaterThan(-dip - 0.001);
			}
	});
});

describe("ladder", () => {
	it("rungs stand at every spacing from the foot, 13 on the demo's, the last at its head", () => {
		const ladder = shipped("larkspur").ladders[0] as Ladder;
		const heights = rungHeights(ladder);
		expect(heights).toHaveLength(13);
		expect(heights[0]).toBeCloseTo(0.3, 12);
		expect(heights[12]).toBeCloseTo(3.9, 12);
		const { rungs } = ladderParts(ladder);
		for (const [i, rung] of rungs.entries())
			expect(Math.hypot((rung.a[0] + rung.b[0]) / 2, (rung.a[1] + rung.b[1]) / 2)).toBeCloseTo(34 - (heights[i] as number), 9);
	});

	it("its width is clear between the rails, across the way the climber looks", () => {
		for (const facing of [0, 0.7, Math.PI / 2, 4]) {
			const ladder = { ...(shipped("larkspur").ladders[0] as Ladder), facing };
			const [left, right] = ladderParts(ladder).rails as unknown as readonly [Capsule, Capsule];
			const apart = sub(right.a, left.a);
			expect(length(apart) - left.radius - right.radius).toBeCloseTo(ladder.width, 12);
			const { prograde, axial } = deckTriad(shipped("larkspur").decks[0] as Deck, ladder.angle);
			const ahead = [0, 1, 2].map(
				(k) => Math.cos(facing) * (prograde[k] as number) + Math.sin(facing) * (axial[k] as number),
			) as unknown as RingVec;
			expect(Math.abs(dot(apart, ahead))).toBeLessThan(1e-12);
		}
	});
});

describe("workstation", () => {
	it("the console stands ahead of the place and the seat behind it, at their heights", () => {
		for (const facing of [0, 1, Math.PI / 2, Math.PI, 5]) {
			const habitat = shipped("larkspur");
			const w = { ...(habitat.workstations[0] as Workstation), facing };
			const parts = workstationParts(habitat, w);
			const deck = habitat.decks[w.deck] as Deck;
			/** Along the floor, from the place, the way one faces. */
			const ahead = (p: RingVec): number =>
				Math.cos(facing) * deck.radius * (Math.atan2(p[1], p[0]) - w.angle) + Math.sin(facing) * (p[2] - w.axial);
			expect(ahead(parts.top.centre)).toBeCloseTo(WORKSTATION.reach + WORKSTATION.topDepth / 2, 9);
			expect(ahead(parts.seat.centre)).toBeCloseTo(-WORKSTATION.seatBehind, 9);
			expect(heightAbove(deck, parts.top.centre) + parts.top.half[1]).toBeCloseTo(0.74, 9);
			expect(heightAbove(deck, parts.seat.centre) + parts.seat.half[1]).toBeCloseTo(0.45, 9);
			for (const box of [parts.top, parts.screen, parts.seat]) {
				const [a, b, c] = box.axes;
				expect([dot(a, b), dot(b, c), dot(a, c), length(a) - 1, length(b) - 1, length(c) - 1].every((x) => Math.abs(x) < 1e-12)).toBe(true);
			}
		}
	});

	it("on a deck that is not there is refused", () => {
		const habitat = shipped("larkspur");
		expect(() => workstationParts(habitat, { ...(habitat.workstations[0] as Workstation), deck: 9 })).toThrow("desk-a stands on deck 9");
	});
});

describe("what a station sees", () => {
	it("draws the elements of built decks only, each with its shadow", () => {
		const habitat = shipped("larkspur");
		const drawn = elementShapes(habitat, stageFrame(habitat.decks[0] as Deck, 0, 0));
		expect(new Set(drawn.map((d) => d.name))).toEqual(
			new Set([
				"shadow:lower",
				"ladder:ladder-a:hull",
				"ladder:ladder-a",
				"workstation:desk-a",
				"workstation:desk-a:post:hull",
				"workstation:desk-a:post",
				"workstation:desk-a:edges",
			]),
		);
		const far = shipped("twin-arm");
		const arm = far.decks.find((d) => d.id === "workshop") as Deck;
		const seen = elementShapes(far, stageFrame(arm, arm.middle, 0)).map((d) => d.name.split(":")[1]);
		for (const e of [...far.ladders, ...far.workstations]) expect(seen.includes(e.id), e.id).toBe(e.deck === arm.index);
	});
});

describe("contact shadow", () => {
	it.each(["curved", "flat"])("lies on a %s deck, turned by its heading, as a decal", (floor) => {
		const habitat = manyOpenings();
		const deck = habitat.decks.find((d) => d.id === floor) as Deck;
		const frame = stageFrame(deck, deck.middle + 0.02, 0.1);
		const shadow = contactShadow(frame, deck, deck.middle + 0.02, 0.1, 0.6, 0.2, Math.PI / 2);
		expect(shadow.decal && shadow.opacity < 0.1 && !shadow.lit).toBe(true);
		const at = Array.from({ length: vertexCount(shadow) }, (_, i) => positionAt(shadow, i));
		expect(Math.max(...at.map((p) => Math.abs(p[0])))).toBeCloseTo(0.2, 3);
		expect(Math.max(...at.map((p) => Math.abs(p[2])))).toBeCloseTo(0.6, 3);
		for (let i = 0; i < vertexCount(shadow); i++) expect(Math.abs(heightAbove(deck, ringAt(frame, shadow, i)) - 0.0015)).toBeLessThan(1e-5);
	});
});

describe("object", () => {
	it.each([0.02, 0.06, 0.5])("of %f m is a sphere of that diameter about its centre, with an ink edge outside it", (diameter) => {
		const [hull, body, equator] = objectShape(diameter);
		const radii = (m: typeof body): number[] => Array.from({ length: vertexCount(m) }, (_, i) => size(positionAt(m, i)));
		for (const r of radii(body)) expect(r).toBeCloseTo(diameter / 2, 6);
		for (const r of radii(hull)) expect(r).toBeGreaterThan(diameter / 2);
		expect(hull.side).toBe("back");
		expect(lines([equator])).toHaveLength(1);
		expect(equator.position.every((x, i) => i % 3 !== 1 || x === 0)).toBe(true);
	});
});
