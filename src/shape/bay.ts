import { angleNear, type Deck, type Habitat, heightAbove, type WindowSurface } from "../layout/habitat.ts";
import type { RingVec } from "../vector/vec3.ts";
import { cut } from "./bay-cut.ts";
import { type Extent, extents, middleOf } from "./bay-extent.ts";
import { corners, faceLine, grid, joints } from "./bay-line.ts";
import { hatchOpening, hole, type Opening, openings } from "./bay-opening.ts";
import { bend, SKIRTING, shade, skirting, slab, WALKWAY_OPACITY, walkways } from "./bay-paint.ts";
import { type FarEnd, frameReach, rim, rimLines, shaft } from "./bay-rim.ts";
import { type Surface, surfaces } from "./bay-surface.ts";
import type { Drawable } from "./drawable.ts";
import { LineBuilder, MeshBuilder } from "./mesh.ts";
import { COLOUR } from "./palette.ts";
import type { StageFrame } from "./stage-frame.ts";

const FACE = {
	floor: COLOUR.deck,
	ceiling: COLOUR.ceiling,
	"end-low": COLOUR.bulkhead,
	"end-high": COLOUR.bulkhead,
	"side-low": COLOUR.bulkhead,
	"side-high": COLOUR.bulkhead,
} as const;

/** Distance between panel joints, m. */
const END_PITCH = 2;
const SIDE_PITCH = 1;

/** The far face of a hatch's shaft, where the deck below is built. */
function farEnd(habitat: Habitat, built: ReadonlyMap<Deck, Extent>, frame: StageFrame, id: string): FarEnd | null {
	const hatch = habitat.hatches.find((h) => h.id === id);
	const below = hatch === undefined || hatch.below === null ? undefined : built.get(habitat.decks[hatch.below] as Deck);
	if (!hatch || !below) return null;
	const surface = surfaces(below, frame).find((s) => s.name === "ceiling") as Surface;
	return { surface, opening: hatchOpening(habitat, built, below, hatch) };
}

/**
 * A deck's bay as seen from a station: floor, ceiling and bulkheads with real openings, their frames and
 * shafts, the metre grid, edges and joints. Empty for a deck that cannot be seen from there. Drawables
 * are named bay:DECK:PART, those that lie on one face alone bay:DECK:FACE or bay:DECK:FACE:PART.
 */
export function bayShape(habitat: Habitat, deckIndex: number, frame: StageFrame): Drawable[] {
	const built = extents(habitat, frame);
	const extent = built.get(habitat.decks[deckIndex] as Deck);
	return extent ? shapeOf(habitat, built, extent, frame) : [];
}

/** The bays of every deck that can be seen from a station: its own and those that hatches lead to. */
export function bayShapes(habitat: Habitat, frame: StageFrame): Drawable[] {
	const built = extents(habitat, frame);
	return [...built.values()].flatMap((extent) => shapeOf(habitat, built, extent, frame));
}

function shapeOf(habitat: Habitat, built: ReadonlyMap<Deck, Extent>, extent: Extent, frame: StageFrame): Drawable[] {
	const name = (part: string): string => `bay:${extent.deck.id}:${part}`;
	const shafts = new MeshBuilder();
	const shaftEdges = new LineBuilder();
	const foot = new LineBuilder();
	const head = new LineBuilder();
	const faces = surfaces(extent, frame).flatMap((surface) => {
		const open = openings(habitat, built, extent, surface);
		const parts = surface.name === "floor" ? floorParts(surface, open, extent, frame, name) : wallParts(surface, open, name);
		if (surface.name !== "floor" && surface.name !== "ceiling") corners(foot, head, surface);
		const face = new MeshBuilder();
		const holes = open.map((o) => hole(o));
		bend(face, surface, cut(surface, holes), 0, FACE[surface.name]);
		const frames = new MeshBuilder();
		const rims = new LineBuilder();
		for (const o of open) {
			rim(frames, surface, o);
			rimLines(rims, surface, o);
			if (o.kind === "hatch" && surface.name === "floor") shaft(shafts, shaftEdges, surface, o, farEnd(habitat, built, frame, o.id));
		}
		return [
			face.build(name(surface.name), { lit: surface.name !== "ceiling" && surface.name !== "floor" }),
			frames.build(name(`${surface.name}:frames`)),
			...parts,
			rims.build(name(`${surface.name}:rims`), 1.2),
		];
	});
	const all: Drawable[] = [
		...faces,
		shafts.build(name("shafts")),
		shaftEdges.build(name("shaft-edges"), 1.2),
		foot.build(name("foot"), 1.4),
		head.build(name("head"), 1.1),
	];
	return all.filter((d) => d.kind === "stars" || d.position.length > 0);
}

type Namer = (part: string) => string;

/** What lies on a floor: shade, walkways and the grid. */
function floorParts(floor: Surface, open: readonly Opening[], extent: Extent, frame: StageFrame, name: Namer): Drawable[] {
	const clear = cut(
		floor,
		open.map((o) => hole(o, frameReach(o))),
	);
	const shades = new MeshBuilder();
	const depth = shade(shades, floor, clear, extent);
	const edge = new MeshBuilder();
	slab(edge, floor);
	const bands = new MeshBuilder();
	const edges = new LineBuilder();
	walkways(bands, edges, floor, clear, open, extent);
	const fine = new LineBuilder();
	const fifth = new LineBuilder();
	grid(fine, fifth, floor, open, extent, frame);
	return [
		edge.build(name("slab")),
		bands.build(name("floor:walkways"), { opacity: WALKWAY_OPACITY, lit: false, decal: true }),
		shades.build(name("floor:shade"), { opacity: depth, lit: false, decal: true }),
		fine.build(name("floor:grid"), 1.15),
		fifth.build(name("floor:grid-5"), 1.8),
		edges.build(name("floor:walkway-edges"), 1),
	];
}

/** What lies on a ceiling or bulkhead: panel joints, and the skirting at a bulkhead's foot. */
function wallParts(surface: Surface, open: readonly Opening[], name: Namer): Drawable[] {
	const lines = new LineBuilder();
	const ceiling = surface.name === "ceiling";
	joints(lines, surface, open, surface.name.startsWith("side") ? SIDE_PITCH : END_PITCH, ceiling ? surface.from[1] : SKIRTING);
	const drawn = lines.build(name(`${surface.name}:joints`), 1, 0.35);
	if (ceiling) return [drawn];
	const plinth = new MeshBuilder();
	skirting(
		plinth,
		surface,
		cut(
			surface,
			open.map((o) => hole(o, frameReach(o))),
		),
	);
	const top = new LineBuilder();
	faceLine(top, surface, open, 1, SKIRTING, COLOUR.deskEdge);
	return [plinth.build(name(`${surface.name}:skirting`), { decal: true }), drawn, top.build(name(`${surface.name}:skirting-edge`), 1)];
}

/**
 * The faces, named as in `bayShape`, that a place sees from behind. They are not drawn from there, being
 * front faces; what lies on them, named bay:DECK:FACE:PART, should not be either.
 */
export function facesFromBehind(habitat: Habitat, frame: StageFrame, eye: RingVec): string[] {
	return [...extents(habitat, frame).values()].flatMap((extent) => {
		const { deck } = extent;
		const height = heightAbove(deck, eye);
		const angle = angleNear(Math.atan2(eye[1], eye[0]), middleOf(extent));
		const behind: Record<WindowSurface, boolean> = {
			floor: height < 0,
			ceiling: height > deck.headroom,
			"end-low": eye[2] < deck.axialFrom,
			"end-high": eye[2] > deck.axialTo,
			"side-low": extent.sideLow && angle < extent.from,
			"side-high": extent.sideHigh && angle > extent.to,
		};
		return Object.entries(behind).flatMap(([face, is]) => (is ? [`bay:${deck.id}:${face}`] : []));
	});
}
