import type { Habitat, Workstation } from "../layout/habitat.ts";
import { type Box, workstationParts } from "../layout/solid.ts";
import type { Drawable } from "./drawable.ts";
import { boxEdges, boxMesh, tubeMesh } from "./elements-body.ts";
import { inkHull, LineBuilder, MeshBuilder } from "./mesh.ts";
import { COLOUR } from "./palette.ts";
import type { StageFrame } from "./stage-frame.ts";

/** A desk with its screen and seat, and their edges. */
export function workstationShape(habitat: Habitat, workstation: Workstation, frame: StageFrame): Drawable[] {
	const parts = workstationParts(habitat, workstation);
	const mesh = new MeshBuilder();
	const lines = new LineBuilder();
	const put = (box: Box, colour: number, face?: Parameters<typeof boxMesh>[4]): void => {
		boxMesh(mesh, frame, box, colour, face);
		boxEdges(lines, frame, box, COLOUR.ink);
	};
	put(parts.top, COLOUR.desk);
	for (const panel of parts.panels) put(panel, COLOUR.desk);
	put(parts.keys, COLOUR.windowFrame);
	put(parts.screen, COLOUR.windowFrame, { axis: 0, sign: -1, colour: COLOUR.coaming });
	for (const stand of parts.stand) put(stand, COLOUR.windowFrame);
	put(parts.seat, COLOUR.suit);
	put(parts.base, COLOUR.windowFrame);
	const post = new MeshBuilder();
	tubeMesh(post, frame, parts.post, 12, ["flat", "open"], COLOUR.windowFrame);
	const tube = post.build(`workstation:${workstation.id}:post`);
	return [
		mesh.build(`workstation:${workstation.id}`),
		inkHull(tube, 0.004, COLOUR.ink),
		tube,
		lines.build(`workstation:${workstation.id}:edges`, 1.2),
	];
}
