import type { Drop } from "../../src/activity/drop.ts";
import { type Assessed, assess } from "../../src/assess.ts";
import { type DropFile, type LayoutParts, layoutOf } from "./layout-of.ts";

export interface Flown {
	readonly drop: Drop;
	readonly habitat: Assessed["habitat"];
	readonly context: Assessed["cases"][number]["context"];
	readonly summary: Assessed["cases"][number]["summary"];
	readonly reasons: Assessed["cases"][number]["reasons"];
}

/** A drop in a layout through the one door of the code under test. */
export function flown(parts: LayoutParts, file: DropFile): Flown {
	const { cases, habitat } = assess(layoutOf({ ...parts, activities: [file] }), []);
	const [one] = cases;
	if (one?.motion?.kind !== "drop") throw new RangeError(`"${file.id}" was not assessed as a drop`);
	return { drop: one.motion, habitat, context: one.context, summary: one.summary, reasons: one.reasons };
}
