import type { Deck, Habitat, WindowOpening } from "../layout/habitat.ts";
import { angleNear, floorAlong, heightAbove } from "../layout/habitat.ts";
import { type ElementBody, elementBodies } from "../layout/solid.ts";
import { ring } from "../vector/vec3.ts";
import { Box, Capsule } from "./convex.ts";
import { Hatchway } from "./hatchway.ts";
import type { State } from "./path.ts";
import type { Surface } from "./surface.ts";

/** What flies can meet in a habitat, prepared once. */
export interface World {
	readonly habitat: Habitat;
	readonly ways: readonly Hatchway[];
	readonly bodies: readonly ElementBody[];
	/** Windows marked solid: struck under their own name. */
	readonly panes: readonly WindowOpening[];
}

export function prepareWorld(habitat: Habitat): World {
	return {
		habitat,
		ways: habitat.hatches.map((h) => new Hatchway(habitat, h)),
		bodies: elementBodies(habitat).filter((b) => b.solid),
		panes: habitat.windows.filter((w) => w.solid),
	};
}

/** The solid elements as surfaces for a sphere of radius `half`. */
export function bodySurfaces(world: World, half: number): Surface[] {
	return world.bodies.flatMap((body) =>
		body.primitives.map((p) =>
			p.kind === "capsule"
				? new Capsule("element", body.id, half, p.a, p.b, p.radius)
				: new Box("element", body.id, half, p.centre, p.axes, p.half),
		),
	);
}

/** The solid pane whose outline holds a contact with the given surface of a deck, or null. */
export function paneAt(world: World, deck: Deck, surface: WindowOpening["surface"], s: State): WindowOpening | null {
	for (const pane of world.panes) {
		if (pane.deck === deck.index && pane.surface === surface && insidePane(deck, pane, s)) return pane;
	}
	return null;
}

function insidePane(deck: Deck, pane: WindowOpening, s: State): boolean {
	const angle = Math.atan2(s[1] as number, s[0] as number);
	const arc = () => floorAlong(deck, angleNear(angle, pane.angle)) - floorAlong(deck, pane.angle);
	const rise = () => heightAbove(deck, ring(s[0] as number, s[1] as number, s[2] as number)) - pane.height;
	let u: number;
	let w: number;
	switch (pane.surface) {
		case "floor":
		case "ceiling":
			u = arc();
			w = (s[2] as number) - pane.axial;
			break;
		case "end-low":
		case "end-high":
			u = (arc() * (deck.radius - pane.height)) / deck.radius;
			w = rise();
			break;
		default:
			u = (s[2] as number) - pane.axial;
			w = rise();
	}
	if (pane.shape === "circle") return u * u + w * w <= (pane.along / 2) ** 2;
	return Math.abs(u) <= pane.along / 2 && Math.abs(w) <= pane.across / 2;
}
