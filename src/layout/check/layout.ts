import type { LayoutParts } from "../parts.ts";
import { below, type Problem } from "../problem.ts";
import { checkActivities } from "./activities.ts";
import { checkElements } from "./elements.ts";
import { checkDecks, checkSpin } from "./habitat.ts";
import { duplicates } from "./references.ts";

/** What no single field shows: ids used twice or leading nowhere, and what does not fit where it is put. */
export function checkLayout(parts: LayoutParts): Problem[] {
	const decks = checkDecks(parts);
	const tailored = parts.tailor.entries.map(({ path, value }) => ({ path: below(path, "criterion"), value: value.criterion }));
	return [
		...checkSpin(parts),
		...decks.problems,
		...checkElements(parts, decks),
		...duplicates(parts.crew.ids, "a crew id"),
		...checkActivities(parts, decks),
		...duplicates(parts.use, "a criteria set"),
		...duplicates(parts.own.ids, "a criterion id"),
		...duplicates(tailored, "a criterion tailored"),
	];
}
