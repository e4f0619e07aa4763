import type { Ladder } from "../layout/habitat.ts";
import { ladderParts } from "../layout/solid.ts";
import type { Drawable } from "./drawable.ts";
import { boxMesh, tubeMesh } from "./elements-body.ts";
import { inkHull, MeshBuilder } from "./mesh.ts";
import { COLOUR } from "./palette.ts";
import type { StageFrame } from "./stage-frame.ts";

const EDGE = 0.005;

/** Rails, rungs and shoes of a ladder, and their ink edge. */
export function ladderShape(ladder: Ladder, frame: StageFrame): Drawable[] {
	const parts = ladderParts(ladder);
	const mesh = new MeshBuilder();
	for (const rail of parts.rails) tubeMesh(mesh, frame, rail, 10, ["flat", "round"], COLOUR.ladder);
	for (const rung of parts.rungs) tubeMesh(mesh, frame, rung, 8, ["open", "open"], COLOUR.ladder);
	for (const shoe of parts.shoes) boxMesh(mesh, frame, shoe, COLOUR.ladder);
	const body = mesh.build(`ladder:${ladder.id}`);
	return [inkHull(body, EDGE, COLOUR.ink), body];
}
