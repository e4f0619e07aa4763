import { radFromDeg } from "../../quantity/convert.ts";
import { floorRadius, LADDER_FOOT, ladderDeck } from "../deck.ts";
import { type Deck, deckCovers } from "../habitat.ts";
import type { LayoutParts } from "../parts.ts";
import { below } from "../problem.ts";
import type { LadderFile } from "../schema.ts";
import { type Problems, placeWithin, problem, told } from "./bounds.ts";
import type { SoundDecks } from "./habitat.ts";
import { hatchProblems, windowProblems } from "./openings.ts";
import { dangling, duplicates } from "./references.ts";

function* ladderProblems(path: string, e: LadderFile, decks: SoundDecks): Problems {
	if (!(e.head_radius_m < e.foot_radius_m)) {
		const expected = `less than foot_radius_m, ${e.foot_radius_m}: the head is inboard of the foot`;
		yield problem(below(path, "head_radius_m"), e.head_radius_m, expected);
	}
	if (decks.all) yield* footProblems(below(path, "foot_radius_m"), e, [...decks.byId.values()]);
}

function* footProblems(path: string, e: LadderFile, decks: readonly Deck[]): Problems {
	const angle = radFromDeg(e.angle_deg);
	if (ladderDeck(decks, angle, e.axial_m, e.foot_radius_m)) return;
	const gap = (deck: Deck): number => Math.abs(floorRadius(deck, angle) - e.foot_radius_m);
	const there = decks.filter((d) => deckCovers(d, { angle, axial: e.axial_m }));
	const nearest = there.reduce<Deck | undefined>((best, d) => (best && gap(best) <= gap(d) ? best : d), undefined);
	if (!nearest) {
		const place = `at ${e.angle_deg} deg, axial ${e.axial_m} m`;
		yield problem(path, e.foot_radius_m, `the floor of a deck within ${LADDER_FOOT} m, and no deck lies ${place}`);
		return;
	}
	const floor = floorRadius(nearest, angle);
	const why = e.foot_radius_m > floor ? "it starts below its deck" : "it starts above the floor";
	yield problem(path, e.foot_radius_m, `${told(floor)} m within ${LADDER_FOOT} m, the floor of deck ${nearest.id}: ${why}`);
}

export function* checkElements({ elements, decks: list }: LayoutParts, decks: SoundDecks): Problems {
	yield* duplicates(elements.ids, "an element id");
	for (const { path, value: e } of elements.entries) {
		if (e.kind === "ladder") {
			yield* ladderProblems(path, e, decks);
			continue;
		}
		yield* dangling([{ path: below(path, "deck"), value: e.deck }], list, "deck");
		const deck = decks.byId.get(e.deck);
		if (!deck) continue;
		if (e.kind === "hatch") yield* hatchProblems(path, e, deck);
		else if (e.kind === "window") yield* windowProblems(path, e, deck);
		else yield* placeWithin(path, e, deck);
	}
}
