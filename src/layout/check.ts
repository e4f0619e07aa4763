import type { LayoutParts } from "./parts.ts";
import type { Problem } from "./problem.ts";

export function checkLayout(_: LayoutParts): Problem[] {
	return [];
}
