import { angleNear, type Deck, floorAlong, floorAngle, type Habitat, type Ladder, type Workstation } from "../layout/habitat.ts";
import { WORKSTATION } from "../layout/solid.ts";
import { extents, within } from "./bay-extent.ts";
import type { Drawable, Triangles } from "./drawable.ts";
import { ladderShape } from "./elements-ladder.ts";
import { contactShadow } from "./elements-shadow.ts";
import { workstationShape } from "./elements-workstation.ts";
import type { StageFrame } from "./stage-frame.ts";

/** The ladders and workstations that can be seen from a station, with their contact shadows. */
export function elementShapes(habitat: Habitat, frame: StageFrame): Drawable[] {
	const built = extents(habitat, frame);
	const seen = (e: Ladder | Workstation): boolean => {
		const extent = built.get(habitat.decks[e.deck] as Deck);
		return extent !== undefined && within(extent, e.angle);
	};
	return [
		...habitat.ladders
			.filter(seen)
			.flatMap((l) => [
				contactShadow(frame, habitat.decks[l.deck] as Deck, l.angle, l.axial, 0.17, l.width / 2 + 0.16, l.facing),
				...ladderShape(l, frame),
			]),
		...habitat.workstations.filter(seen).flatMap((w) => [...workstationShadows(habitat, w, frame), ...workstationShape(habitat, w, frame)]),
	];
}

/** Under the console and under the seat. */
function workstationShadows(habitat: Habitat, w: Workstation, frame: StageFrame): Triangles[] {
	const deck = habitat.decks[w.deck] as Deck;
	const along = floorAlong(deck, angleNear(w.angle, deck.middle));
	const under = (ahead: number, depth: number, width: number): Triangles =>
		contactShadow(
			frame,
			deck,
			floorAngle(deck, along + ahead * Math.cos(w.facing)),
			w.axial + ahead * Math.sin(w.facing),
			depth,
			width,
			w.facing,
		);
	return [
		under(WORKSTATION.reach + WORKSTATION.topDepth / 2, WORKSTATION.topDepth / 2 + 0.2, WORKSTATION.topWidth / 2 + 0.22),
		under(-WORKSTATION.seatBehind, 0.34, 0.34),
	];
}
