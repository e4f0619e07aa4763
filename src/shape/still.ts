import type { Habitat } from "../layout/habitat.ts";
import { bayShapes } from "./bay.ts";
import type { Drawable } from "./drawable.ts";
import { elementShapes } from "./elements.ts";
import { contactShadow } from "./elements-shadow.ts";
import type { StageFrame } from "./stage-frame.ts";

/**
 * What of a stage does not move, kept while neither the layout nor the place it is seen from changes:
 * an edit of the spin or of a release builds nothing anew.
 */
export class StillShapes {
	private key = "";
	private shapes: readonly Drawable[] = [];

	/** Bays, elements and the shade under the person's feet. The same array for the same habitat and frame. */
	of(habitat: Habitat, frame: StageFrame): readonly Drawable[] {
		const { decks, hatches, ladders, windows, workstations } = habitat;
		const key = JSON.stringify([decks, hatches, ladders, windows, workstations, frame.deck.index, frame.angle, frame.axial]);
		if (key !== this.key) {
			this.key = key;
			this.shapes = [
				...bayShapes(habitat, frame),
				...elementShapes(habitat, frame),
				contactShadow(frame, frame.deck, frame.angle, frame.axial, 0.26, 0.3),
			];
		}
		return this.shapes;
	}
}
