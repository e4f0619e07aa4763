import type { Deck, Habitat, WindowOpening } from "../layout/habitat.ts";
import { angleNear, floorAlong, heightAbove } from "../layout/habitat.ts";
import { type ElementBody, elementBodies } from "../layout/solid.ts";
import type { RingVec } from "../vector/vec3.ts";
import { Box, Capsule } from "./convex.ts";
import { Hatchway } from "./hatchway.ts";
import { ceilingSurface, floorSurface, type Surface, wallSurfaces } from "./surface.ts";
import { tangentOf } from "./touched.ts";

/** What flies can meet in a habitat, prepared once. */
export interface World {
	readonly habitat: Habitat;
	readonly ways: readonly Hatchway[];
	readonly bodies: readonly ElementBody[];
	/** Windows marked solid: struck under their own name. */
	readonly panes: readonly WindowOpening[];
	/** What a sphere of radius `half` can meet in a deck's bay; kept for the radius asked for last. */
	surfaces(deck: Deck, half: number): readonly Surface[];
}

export function prepareWorld(habitat: Habitat): World {
	const bodies = elementBodies(habitat).filter((b) => b.solid);
	let keptHalf = Number.NaN;
	let kept: Surface[][] = [];
	return {
		habitat,
		ways: habitat.hatches.map((h) => new Hatchway(habitat, h)),
		bodies,
		panes: habitat.windows.filter((w) => w.solid),
		surfaces(deck, half) {
			if (half !== keptHalf) {
				keptHalf = half;
				kept = [];
			}
			kept[deck.index] ??= [
				floorSurface(deck, half),
				ceilingSurface(deck, half),
				...wallSurfaces(deck, half),
				...bodySurfaces(bodies, half),
			];
			return kept[deck.index]!;
		},
	};
}

/** The solid elements as surfaces for a sphere of radius `half`. */
export function bodySurfaces(bodies: World["bodies"], half: number): Surface[] {
	return bodies.flatMap((body) =>
		body.primitives.map((p) =>
			p.kind === "capsule"
				? new Capsule("element", body.id, half, p.a, p.b, p.radius)
				: new Box("element", body.id, half, p.centre, p.axes, p.half),
		),
	);
}

/** The solid pane whose outline holds the point (ring) touched on a surface of a deck, or null. */
export function paneAt(world: World, deck: Deck, surface: WindowOpening["surface"], point: RingVec): WindowOpening | null {
	return world.panes.find((pane) => pane.deck === deck.index && pane.surface === surface && insidePane(deck, pane, point)) ?? null;
}

/** In the surface's own plane: u along (arc, or a flat deck's tangent; axial on a side), w across (axial; up). */
function insidePane(deck: Deck, pane: WindowOpening, point: RingVec): boolean {
	const angle = angleNear(Math.atan2(point[1], point[0]), pane.angle);
	const [height, axial] = [heightAbove(deck, point), point[2] - pane.axial];
	const prograde =
		deck.floor === "curved" ? (deck.radius - pane.height) * (angle - pane.angle) : tangentOf(deck, point) - floorAlong(deck, pane.angle);
	/** On a flat deck's side, which leans outward, up is longer than height. */
	const lean = deck.floor === "curved" ? 1 : Math.cos(pane.angle - deck.middle);
	const [u, w] = {
		floor: [prograde, axial] as const,
		ceiling: [prograde, axial] as const,
		"end-low": [prograde, height - pane.height] as const,
		"end-high": [prograde, height - pane.height] as const,
		"side-low": [axial, (height - pane.height) / lean] as const,
		"side-high": [axial, (height - pane.height) / lean] as const,
	}[pane.surface];
	if (pane.shape === "circle") return Math.hypot(u, w) <= pane.along / 2;
	return Math.abs(u) <= pane.along / 2 && Math.abs(w) <= pane.across / 2;
}
