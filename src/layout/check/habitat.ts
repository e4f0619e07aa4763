import { degFromRad } from "../../quantity/convert.ts";
import { resolveDeck, SLACK } from "../deck.ts";
import type { Deck } from "../habitat.ts";
import type { LayoutParts, Part } from "../parts.ts";
import { below, type Problem } from "../problem.ts";
import { QUANTITY } from "../quantities.ts";
import { type DeckFile, NOMINAL } from "../schema.ts";
import { problem, within } from "./bounds.ts";
import { duplicates } from "./references.ts";

type Span = Pick<DeckFile, "from_deg" | "to_deg" | "from_m" | "to_m">;

function spanProblems(path: string, s: Span): Problem[] {
	const problems: Problem[] = [];
	if (!(s.to_deg > s.from_deg + SLACK)) problems.push(problem(below(path, "to_deg"), s.to_deg, `more than from_deg, ${s.from_deg}`));
	else if (s.to_deg - s.from_deg > 360 + SLACK) {
		problems.push(problem(below(path, "to_deg"), s.to_deg, `at most 360 deg beyond from_deg, ${s.from_deg}`));
	}
	if (!(s.to_m > s.from_m + SLACK)) problems.push(problem(below(path, "to_m"), s.to_m, `more than from_m, ${s.from_m}`));
	return problems;
}

function deckProblems({ path, value }: Part<DeckFile>): Problem[] {
	const problems = spanProblems(path, value);
	if (value.floor === "flat" && value.to_deg - value.from_deg >= 180 - SLACK) {
		problems.push(problem(below(path, "to_deg"), value.to_deg, `less than 180 deg beyond from_deg, ${value.from_deg}, on a flat floor`));
	}
	if (value.headroom_m >= value.radius_m) {
		problems.push(problem(below(path, "headroom_m"), value.headroom_m, `less than radius_m, ${value.radius_m}`));
	}
	return problems;
}

function walkwayProblems({ path, value }: Part<DeckFile>, deck: Deck): Problem[] {
	const list = below(path, "walkways");
	return (value.walkways ?? []).flatMap((w, i) => {
		const at = below(list, i);
		const own = spanProblems(at, w);
		const resolved = deck.walkways[i];
		if (own.length > 0 || !resolved) return own;
		const why = `on deck ${deck.id}`;
		const axial = { from: deck.axialFrom, to: deck.axialTo };
		const problems = [...within(below(at, "from_m"), w.from_m, axial, "m", why), ...within(below(at, "to_m"), w.to_m, axial, "m", why)];
		if (deck.closed) return problems;
		const angles = { from: degFromRad(deck.from), to: degFromRad(deck.to) };
		return [
			...problems,
			...within(below(at, "from_deg"), degFromRad(resolved.from), angles, "deg", why),
			...within(below(at, "to_deg"), degFromRad(resolved.to), angles, "deg", why),
		];
	});
}

export interface CheckedDecks {
	readonly problems: Problem[];
	/** The decks that are sound in themselves, by id. */
	readonly sound: ReadonlyMap<string, Deck>;
	/** Whether every deck of the file is among them. */
	readonly all: boolean;
}

export function checkDecks(parts: LayoutParts): CheckedDecks {
	const problems = duplicates(parts.decks.ids, "a deck id");
	const sound = new Map<string, Deck>();
	for (const [i, part] of parts.decks.entries.entries()) {
		const own = deckProblems(part);
		problems.push(...own);
		problems.push(
			...duplicates(
				(part.value.walkways ?? []).map((w, k) => ({ path: below(below(below(part.path, "walkways"), k), "id"), value: w.id })),
				"a walkway id on its deck",
			),
		);
		if (own.length > 0) continue;
		const deck = resolveDeck(part.value, i);
		problems.push(...walkwayProblems(part, deck));
		if (!sound.has(deck.id)) sound.set(deck.id, deck);
	}
	return { problems, sound, all: parts.decks.whole && sound.size === parts.decks.entries.length };
}

export function checkSpin(parts: LayoutParts): Problem[] {
	const problems = duplicates(parts.phases.ids, "a phase id");
	for (const { path, value } of parts.phases.ids) {
		if (value === NOMINAL) problems.push(problem(path, value, `another id: ${NOMINAL} is the phase that spin gives`));
	}
	const profile = parts.spin?.value.profile ?? [];
	const gap = QUANTITY.duration.min;
	for (const [i, point] of profile.entries()) {
		const before = profile[i - 1];
		if (before && !(point.t_s - before.t_s >= gap - SLACK)) {
			const path = below(below("habitat.spin.profile", i), "t_s");
			problems.push(problem(path, point.t_s, `at least ${gap} s after the point before it, ${before.t_s} s`));
		}
	}
	return problems;
}
