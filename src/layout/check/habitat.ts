import { degFromRad } from "../../quantity/convert.ts";
import { resolveDeck, SLACK } from "../deck.ts";
import type { Deck } from "../habitat.ts";
import type { LayoutParts, Part } from "../parts.ts";
import { below } from "../problem.ts";
import { QUANTITY } from "../quantities.ts";
import { type DeckFile, NOMINAL } from "../schema.ts";
import { type Problems, problem, within } from "./bounds.ts";
import { duplicates } from "./references.ts";

type Span = Pick<DeckFile, "from_deg" | "to_deg" | "from_m" | "to_m">;

function* spanProblems(path: string, s: Span): Problems {
	const toDeg = below(path, "to_deg");
	if (!(s.to_deg > s.from_deg + SLACK)) yield problem(toDeg, s.to_deg, `more than from_deg, ${s.from_deg}`);
	else if (s.to_deg - s.from_deg > 360 + SLACK) yield problem(toDeg, s.to_deg, `at most 360 deg beyond from_deg, ${s.from_deg}`);
	if (!(s.to_m > s.from_m + SLACK)) yield problem(below(path, "to_m"), s.to_m, `more than from_m, ${s.from_m}`);
}

function* deckProblems({ path, value }: Part<DeckFile>): Problems {
	yield* spanProblems(path, value);
	if (value.floor === "flat" && value.to_deg - value.from_deg >= 180 - SLACK) {
		yield problem(below(path, "to_deg"), value.to_deg, `less than 180 deg beyond from_deg, ${value.from_deg}, on a flat floor`);
	}
	if (value.headroom_m >= value.radius_m) {
		yield problem(below(path, "headroom_m"), value.headroom_m, `less than radius_m, ${value.radius_m}`);
	}
}

function* walkwayProblems({ path, value }: Part<DeckFile>, deck: Deck | undefined): Problems {
	const list = below(path, "walkways");
	const walkways = value.walkways ?? [];
	yield* duplicates(
		walkways.map((w, i) => ({ path: below(below(list, i), "id"), value: w.id })),
		"a walkway id on its deck",
	);
	for (const [i, w] of walkways.entries()) {
		const at = below(list, i);
		const own = [...spanProblems(at, w)];
		yield* own;
		const resolved = deck?.walkways[i];
		if (own.length > 0 || !deck || !resolved) continue;
		const why = `on deck ${deck.id}`;
		const axial = { from: deck.axialFrom, to: deck.axialTo };
		yield* within(below(at, "from_m"), w.from_m, axial, "m", why);
		yield* within(below(at, "to_m"), w.to_m, axial, "m", why);
		if (deck.closed) continue;
		const angles = { from: degFromRad(deck.from), to: degFromRad(deck.to) };
		yield* within(below(at, "from_deg"), degFromRad(resolved.from), angles, "deg", why, w.from_deg);
		yield* within(below(at, "to_deg"), degFromRad(resolved.to), angles, "deg", why, w.to_deg);
	}
}

/** The decks that are sound in themselves, by id: what stands on others cannot be judged. */
export interface SoundDecks {
	readonly byId: ReadonlyMap<string, Deck>;
	/** Whether every deck of the file is among them. */
	readonly all: boolean;
}

export function soundDecks({ decks }: LayoutParts): SoundDecks {
	const byId = new Map<string, Deck>();
	for (const [i, part] of decks.entries.entries()) {
		if (!byId.has(part.value.id) && deckProblems(part).next().done) byId.set(part.value.id, resolveDeck(part.value, i));
	}
	return { byId, all: decks.whole && byId.size === decks.entries.length };
}

export function* checkDecks({ decks }: LayoutParts, sound: SoundDecks): Problems {
	yield* duplicates(decks.ids, "a deck id");
	for (const part of decks.entries) {
		yield* deckProblems(part);
		yield* walkwayProblems(part, sound.byId.get(part.value.id));
	}
}

export function* checkSpin({ phases, spin }: LayoutParts): Problems {
	yield* duplicates(phases.ids, "a phase id");
	for (const { path, value } of phases.ids) {
		if (value === NOMINAL) yield problem(path, value, `another id: ${NOMINAL} is the phase that spin gives`);
	}
	const profile = spin?.value.profile ?? [];
	const gap = QUANTITY.duration.min;
	for (const [i, point] of profile.entries()) {
		const before = profile[i - 1];
		if (!before || point.t_s - before.t_s >= gap - SLACK) continue;
		const path = below(below("habitat.spin.profile", i), "t_s");
		yield problem(path, point.t_s, `at least ${gap} s after the point before it, ${before.t_s} s`);
	}
}
