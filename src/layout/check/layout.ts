import type { LayoutParts } from "../parts.ts";
import { below } from "../problem.ts";
import { checkActivities } from "./activities.ts";
import type { Problems } from "./bounds.ts";
import { checkElements } from "./elements.ts";
import { checkDecks, checkSpin, soundDecks } from "./habitat.ts";
import { duplicates } from "./references.ts";

/** What no single field shows: ids used twice or leading nowhere, and what does not fit where it is put. */
export function* checkLayout(parts: LayoutParts): Problems {
	const decks = soundDecks(parts);
	yield* checkSpin(parts);
	yield* checkDecks(parts, decks);
	yield* checkElements(parts, decks);
	yield* duplicates(parts.crew.ids, "a crew id");
	yield* checkActivities(parts, decks);
	yield* duplicates(parts.use, "a criteria set");
	yield* duplicates(parts.own.ids, "a criterion id");
	const tailored = parts.tailor.entries.map(({ path, value }) => ({ path: below(path, "criterion"), value: value.criterion }));
	yield* duplicates(tailored, "a criterion tailored");
}
