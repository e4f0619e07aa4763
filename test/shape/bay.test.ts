import { describe, expect, it } from "vitest";
import { angleNear, type Deck, floorAlong, type Habitat, heightAbove, placeOnDeck } from "../../src/layout/habitat.ts";
import { bayShape, bayShapes, facesFromBehind } from "../../src/shape/bay.ts";
import type { Triangles } from "../../src/shape/drawable.ts";
import { fromStage, type StageFrame, stageFrame } from "../../src/shape/stage-frame.ts";
import type { RingVec } from "../../src/vector/vec3.ts";
import { seeded } from "../support/seeded.ts";
import { atCutOff, atOpening, leavesByOpening, nearBuilt, probe, squarePoint } from "./opening-probe.ts";
import {
	area,
	cast,
	crossed,
	dotted,
	lines,
	meshes,
	minus,
	named,
	normalAt,
	type Point,
	plus,
	positionAt,
	ringAt,
	shipped,
	size,
	triangles,
	vertexCount,
} from "./probe.ts";
import { manyOpenings, wholeRings } from "./test-bays.ts";

const bays: readonly (readonly [string, Habitat, number])[] = [
	["larkspur, lower", shipped("larkspur"), 0],
	["larkspur, upper", shipped("larkspur"), 1],
	["twin-arm, hearth", shipped("twin-arm"), 0],
	["great-ring, promenade", shipped("great-ring"), 0],
	["many openings, curved", manyOpenings(), 0],
	["many openings, flat", manyOpenings(), 1],
	["whole rings, rim", wholeRings(), 0],
	["whole rings, hub", wholeRings(), 1],
];

const stationOf = (habitat: Habitat, index: number): StageFrame => {
	const deck = habitat.decks[index] as Deck;
	return stageFrame(deck, deck.middle + 0.1 * (deck.to - deck.middle) * (deck.closed ? 0 : 1), 0.2);
};
const deckOf = (habitat: Habitat, mesh: Triangles): Deck => habitat.decks.find((d) => mesh.name.startsWith(`bay:${d.id}:`)) as Deck;

/** How far a ring point is from the plane or cylinder of a face, and null for a mesh that is not one face. */
function offFace(deck: Deck, face: string, p: RingVec): number | null {
	switch (face) {
		case "floor":
			return Math.abs(heightAbove(deck, p));
		case "ceiling":
			return Math.abs(heightAbove(deck, p) - deck.headroom);
		case "end-low":
			return Math.abs(p[2] - deck.axialFrom);
		case "end-high":
			return Math.abs(p[2] - deck.axialTo);
		case "side-low":
		case "side-high": {
			const angle = face === "side-low" ? deck.from : deck.to;
			return Math.abs(-Math.sin(angle) * p[0] + Math.cos(angle) * p[1]);
		}
		default:
			return null;
	}
}

const faceOf = (mesh: Triangles): string => mesh.name.split(":")[2] as string;
const isFace = (mesh: Triangles): boolean => mesh.name.split(":").length === 3 && !["shafts", "slab"].includes(faceOf(mesh));

function insideBay(deck: Deck, p: RingVec): boolean {
	const height = heightAbove(deck, p);
	const angle = angleNear(Math.atan2(p[1], p[0]), deck.middle);
	return (
		height > 0 &&
		height < deck.headroom &&
		p[2] > deck.axialFrom &&
		p[2] < deck.axialTo &&
		(deck.closed || (angle > deck.from && angle < deck.to))
	);
}

describe.each(bays)("bay shape: %s", (_name, habitat, index) => {
	const frame = stationOf(habitat, index);
	const drawn = bayShapes(habitat, frame);
	const solid = meshes(drawn);
	const faces = solid.filter(isFace);

	it("numbers are finite, normals unit, indices in range, winding agrees", () => {
		expect(solid.length).toBeGreaterThan(4);
		for (const d of drawn) if (d.kind !== "stars") expect(d.position.every(Number.isFinite), d.name).toBe(true);
		for (const m of solid) {
			expect(
				m.index.every((i) => i < vertexCount(m)),
				m.name,
			).toBe(true);
			let unit = 0;
			let agree = 1;
			for (let i = 0; i < vertexCount(m); i++) unit = Math.max(unit, Math.abs(size(normalAt(m, i)) - 1));
			for (const [a, b, c, i, j, k] of triangles(m)) {
				const n = crossed(minus(b, a), minus(c, a));
				if (size(n) < 1e-7) continue;
				for (const v of [i, j, k]) agree = Math.min(agree, dotted(n, normalAt(m, v)) / size(n));
			}
			expect(unit, m.name).toBeLessThan(1e-5);
			expect(agree, m.name).toBeGreaterThan(0.9);
		}
	});

	it("vertices and edge middles lie on their face within 2 mm, normals point into the bay", () => {
		for (const m of faces) {
			const deck = deckOf(habitat, m);
			const off = (p: Point): number => offFace(deck, faceOf(m), fromStage(frame, ...p)) as number;
			const half = (p: Point, q: Point): Point => [(p[0] + q[0]) / 2, (p[1] + q[1]) / 2, (p[2] + q[2]) / 2];
			let vertex = 0;
			let chord = 0;
			let outward = 0;
			for (let i = 0; i < vertexCount(m); i++) vertex = Math.max(vertex, off(positionAt(m, i)));
			for (const [a, b, c, i] of triangles(m)) {
				chord = Math.max(chord, off(half(a, b)), off(half(b, c)), off(half(c, a)));
				const middle: Point = [(a[0] + b[0] + c[0]) / 3, (a[1] + b[1] + c[1]) / 3, (a[2] + b[2] + c[2]) / 3];
				if (size(crossed(minus(b, a), minus(c, a))) < 1e-4) continue;
				if (!insideBay(deck, fromStage(frame, ...plus(middle, 0.004, normalAt(m, i))))) outward++;
			}
			expect(vertex, m.name).toBeLessThan(2e-5);
			expect(chord, m.name).toBeLessThan(2e-3);
			expect(outward, m.name).toBe(0);
		}
	});

	it("the floor's area is the analytic one less its openings within 0.5 %", () => {
		for (const m of faces.filter((f) => faceOf(f) === "floor")) {
			const deck = deckOf(habitat, m);
			const angles = Array.from({ length: vertexCount(m) }, (_, i) => {
				const p = ringAt(frame, m, i);
				return angleNear(Math.atan2(p[1], p[0]), deck.middle);
			});
			const whole = deck.closed && Math.max(...angles) - Math.min(...angles) > 6;
			const long = whole ? 2 * Math.PI * deck.radius : floorAlong(deck, Math.max(...angles)) - floorAlong(deck, Math.min(...angles));
			const open = [...habitat.hatches, ...habitat.windows.filter((w) => w.surface === "floor")]
				.filter((o) => o.deck === deck.index && o.angle > Math.min(...angles) && o.angle < Math.max(...angles) + 1e-9)
				.reduce((sum, o) => sum + (o.shape === "circle" ? (Math.PI * o.along ** 2) / 4 : o.along * o.across), 0);
			const want = long * (deck.axialTo - deck.axialFrom) - open;
			expect(Math.abs(area(m) / want - 1), `${m.name}: ${area(m)} of ${want} m²`).toBeLessThan(0.005);
		}
	});

	it("faces share whole edges: no crack within a face, between faces, or at a shaft", () => {
		const uses = new Map<string, number>();
		const shell = [...faces, ...solid.filter((m) => faceOf(m) === "shafts")];
		const key = (p: Point): string => p.map((x) => Math.round(x * 1e4)).join(" ");
		/** Tries the neighbours of a rounding border, so that equal points get one name. */
		const names = new Map<string, string>();
		const nameOf = (p: Point): string => {
			for (const x of [-2e-5, 0, 2e-5])
				for (const y of [-2e-5, 0, 2e-5])
					for (const z of [-2e-5, 0, 2e-5]) {
						const found = names.get(key([p[0] + x, p[1] + y, p[2] + z]));
						if (found) return found;
					}
			names.set(key(p), key(p));
			return key(p);
		};
		const ends = new Map<string, readonly [Point, Point]>();
		for (const m of shell)
			for (const [a, b, c] of triangles(m))
				for (const [p, q] of [
					[a, b],
					[b, c],
					[c, a],
				] as const) {
					const [i, j] = [nameOf(p), nameOf(q)];
					if (i === j) continue;
					const edge = i < j ? `${i}|${j}` : `${j}|${i}`;
					uses.set(edge, (uses.get(edge) ?? 0) + 1);
					ends.set(edge, [p, q]);
				}
		const lone = [...uses].filter(([, n]) => n % 2 === 1).map(([edge]) => ends.get(edge) as readonly [Point, Point]);
		/** Straight edges may be shared in pieces, for pieces of a straight line leave no gap. */
		const onOther = (p: Point, edge: readonly [Point, Point]): boolean =>
			lone.some(
				(other) =>
					other !== edge &&
					!(nameOf(other[0]) === nameOf(edge[0]) && nameOf(other[1]) === nameOf(edge[1])) &&
					distanceToSegment(p, other) < 2e-5,
			);
		/** What is left open: outlines of windows, far ends of hatches that open outside, and where a long ring is cut off. */
		const stray = lone
			.filter((edge) => !edge.every((p) => atOpening(habitat, fromStage(frame, ...p)) || atCutOff(habitat, faces, frame, p)))
			.filter((edge) => ![0.01, 0.5, 0.99].every((k) => onOther(plus(edge[0], k, minus(edge[1], edge[0])), edge)));
		expect(stray.length, JSON.stringify(stray.slice(0, 3))).toBe(0);
	});

	it("openings are open inside their outline and closed outside it", () => {
		const seen = [...habitat.windows, ...habitat.hatches].filter((o) =>
			solid.some((m) => m.name === `bay:${habitat.decks[o.deck]?.id}:floor`),
		);
		const built = seen.filter((o) => nearBuilt(habitat, faces, frame, o));
		expect(built.length).toBeGreaterThan(0);
		for (const o of built) {
			const surface = "surface" in o ? o.surface : "floor";
			for (let k = 0; k < 16; k++) {
				const t = (2 * Math.PI * (k + 0.3)) / 16;
				const [x, y] = o.shape === "circle" ? [Math.cos(t) / 2, Math.sin(t) / 2] : squarePoint(k);
				for (const [by, open] of [
					[-0.004, true],
					[0.004, false],
					[0.3, false],
				] as const) {
					const a = x * (o.along + 2 * by);
					const c = y * (o.across + 2 * by);
					const { from, way } = probe(habitat, o, surface, a, c, frame);
					const hit = cast(solid, from, way, 0.05 + 0.02);
					const what = `${o.id} ${surface} (${a.toFixed(3)}, ${c.toFixed(3)}): ${hit?.name}`;
					if (by === 0.3 && !insideBay(habitat.decks[o.deck] as Deck, fromStage(frame, ...from))) continue;
					expect(hit === null, what).toBe(open);
				}
			}
			const { from, way } = probe(habitat, o, surface, 0, 0, frame);
			const below = "below" in o ? o.below : null;
			expect(cast(solid, from, way, below === null ? 0.4 : 0.6), o.id).toBeNull();
		}
	});

	it("no line of sight leaves but through an opening (seed 7)", () => {
		const random = seeded(7);
		const deck = habitat.decks[index] as Deck;
		let closed = 0;
		for (let i = 0; i < 300; i++) {
			const up = 2 * random() - 1;
			const turn = 2 * Math.PI * random();
			const flat = Math.sqrt(1 - up * up);
			/** A third along the floor, where a long ring reaches its horizon. */
			const lift = i % 3 === 0 ? 0.05 * up : up;
			const raw: Point = [flat * Math.cos(turn), lift, flat * Math.sin(turn)];
			const way = plus([0, 0, 0], 1 / size(raw), raw);
			const eye: Point = [0, 0.4 + (deck.headroom - 0.5) * random(), 0];
			const hit = cast(solid, eye, way, 2000);
			if (hit) closed++;
			else expect(leavesByOpening(habitat, frame, eye, way), `from ${eye} along ${way}`).toBe(true);
		}
		expect(closed).toBeGreaterThan(250);
	});

	it("the grid is ruled at whole metres of arc and axially", () => {
		const ruled = lines(drawn).filter((l) => /:floor:grid(-5)?$/.test(l.name));
		expect(ruled.length).toBeGreaterThan(0);
		let along = 0;
		let across = 0;
		let buried = 0;
		let astray = 0;
		for (const l of ruled) {
			const deck = habitat.decks.find((d) => l.name.startsWith(`bay:${d.id}:`)) as Deck;
			for (let s = 0; s < l.colour.length; s++) {
				const [p, q] = [0, 3].map((k) => {
					const at = fromStage(frame, ...(l.position.slice(6 * s + k, 6 * s + k + 3) as unknown as Point));
					if (!(heightAbove(deck, at) > 0.0005 && heightAbove(deck, at) < 0.004)) buried++;
					const angle = angleNear(Math.atan2(at[1], at[0]), deck.middle);
					return [floorAlong(deck, angle), at[2]] as const;
				}) as [readonly [number, number], readonly [number, number]];
				const off = (x: number, y: number): number => Math.max(Math.abs(x - Math.round(x)), Math.abs(y - Math.round(x)));
				const wrapped = deck.closed && Math.abs(p[0]) > 3 * deck.radius;
				const [u, v] = [off(p[0], q[0]), off(p[1], q[1])];
				if (v < 1e-3) along++;
				else across++;
				const rest = Math.abs((v < 1e-3 ? p[1] : p[0]) % 5);
				if (!wrapped && (Math.min(u, v) > 2e-3 || (l.name.endsWith("-5") && rest > 2e-3 && rest < 5 - 2e-3))) astray++;
			}
		}
		expect({ buried, astray }).toEqual({ buried: 0, astray: 0 });
		expect(Math.min(along, across)).toBeGreaterThan(3);
	});
});

function distanceToSegment(p: Point, [a, b]: readonly [Point, Point]): number {
	const d = minus(b, a);
	const k = Math.min(1, Math.max(0, dotted(minus(p, a), d) / dotted(d, d)));
	return size(minus(p, plus(a, k, d)));
}

describe("bay shape", () => {
	it("a deck that no hatch leads to is not built", () => {
		const habitat = shipped("twin-arm");
		const far = habitat.decks.findIndex((d) => d.id === "workshop");
		expect(bayShape(habitat, far, stationOf(habitat, 0))).toEqual([]);
	});

	it("a whole ring has no side bulkheads, a segment has two", () => {
		const sides = (habitat: Habitat): number =>
			bayShape(habitat, 0, stationOf(habitat, 0)).filter((d) => /:side-(low|high)$/.test(d.name)).length;
		expect(sides(wholeRings())).toBe(0);
		expect(sides(shipped("larkspur"))).toBe(2);
	});

	it("a long ring is built as far as its ceiling lets one see from any height", () => {
		const habitat = shipped("great-ring");
		const frame = stationOf(habitat, 0);
		const solid = meshes(bayShape(habitat, 0, frame));
		for (const height of [0.05, 1.7, 3.3])
			for (const sign of [1, -1])
				for (let k = 0; k < 120; k++) {
					const up = -0.1 + 0.0025 * k;
					const hit = cast(solid, [0, height, 0], [sign * Math.cos(up), Math.sin(up), 0.001], 5000);
					expect(hit?.name, `${height} m, ${sign}, ${up} rad`).toMatch(/^bay:promenade:/);
				}
		const floor = named(solid, "bay:promenade:floor");
		const reach = Math.max(...Array.from({ length: vertexCount(floor) }, (_, i) => positionAt(floor, i)[0]));
		expect(reach).toBeLessThan(180);
	});

	it("is the same from any deck, moved", () => {
		const habitat = shipped("larkspur");
		const [a, b] = [0, 1].map((i) => named(meshes(bayShapes(habitat, stationOf(habitat, i))), "bay:lower:floor")) as [Triangles, Triangles];
		const [fa, fb] = [stationOf(habitat, 0), stationOf(habitat, 1)];
		for (let i = 0; i < vertexCount(a); i += 17)
			expect(size(minus(ringAt(fa, a, i) as unknown as Point, ringAt(fb, b, i) as unknown as Point))).toBeLessThan(1e-5);
	});

	it("from outside an end, that end is seen from behind and no other of its deck", () => {
		const habitat = shipped("larkspur");
		const frame = stationOf(habitat, 0);
		expect(facesFromBehind(habitat, frame, placeOnDeck(habitat.decks[0] as Deck, 0, 9, 1))).toEqual([
			"bay:lower:end-high",
			"bay:upper:floor",
			"bay:upper:end-high",
		]);
		expect(facesFromBehind(habitat, frame, placeOnDeck(habitat.decks[0] as Deck, 0, 0, 1))).toEqual(["bay:upper:floor"]);
	});

	it.each([
		["larkspur", 24_000],
		["twin-arm", 24_000],
		["great-ring", 60_000],
	])("%s stays below %i triangles", (name, budget) => {
		const habitat = shipped(name);
		const drawn = bayShapes(habitat, stationOf(habitat, 0));
		const count = meshes(drawn).reduce((n, m) => n + m.index.length / 3, 0);
		console.info(
			`${name}: ${count} triangles, ${lines(drawn).reduce((n, l) => n + l.colour.length, 0)} line segments, ${drawn.length} drawables`,
		);
		expect(count).toBeGreaterThan(500);
		expect(count).toBeLessThan(budget);
	});
});
