import { ASSUMPTIONS } from "../assumptions.ts";
import type { LayoutParts, Part, Parts } from "../parts.ts";
import { below, type Problem } from "../problem.ts";
import { QUANTITY } from "../quantities.ts";
import { type ActivityFile, type ActivityOf, type ElementFile, NOMINAL } from "../schema.ts";
import { placeWithin, problem, told, within } from "./bounds.ts";
import type { CheckedDecks } from "./habitat.ts";
import { duplicates, each, refer } from "./references.ts";

interface Context {
	readonly parts: LayoutParts;
	readonly decks: CheckedDecks;
	readonly phases: Known;
	readonly ladders: Known;
	readonly windows: Known;
}

type Known = Pick<Parts<unknown>, "present" | "known">;

/** The ids that may be of elements of a kind: those of other kinds are out, those of entries that cannot be read are in. */
function elementsOf({ elements }: LayoutParts, kind: ElementFile["kind"]): Known {
	const others = new Set(elements.entries.filter((e) => e.value.kind !== kind).map((e) => e.value.id));
	return { present: elements.present, known: new Set([...elements.known].filter((id) => !others.has(id))) };
}

interface DeckPlaceFile {
	readonly deck: string;
	readonly angle_deg: number;
	readonly axial_m: number;
	readonly height_m?: number;
}

/** A place that names its deck; a height in it lies between floor and ceiling. */
function placeProblems({ parts, decks }: Context, path: string, place: DeckPlaceFile): Problem[] {
	const deck = decks.sound.get(place.deck);
	const named = refer([{ path: below(path, "deck"), value: place.deck }], parts.decks, "deck");
	if (!deck) return named;
	const height = place.height_m ?? 0;
	const upright = within(below(path, "height_m"), height, { from: 0, to: deck.headroom }, "m", `below the ceiling of deck ${deck.id}`);
	return [...named, ...upright, ...(upright.length > 0 ? [] : placeWithin(path, place, deck, height))];
}

function dropProblems(context: Context, path: string, a: ActivityOf<"drop">): Problem[] {
	const from = below(path, "from");
	const problems = refer([{ path: below(from, "deck"), value: a.from.deck }], context.parts.decks, "deck");
	const deck = context.decks.sound.get(a.from.deck);
	if (!deck) return problems;
	const half = a.object.diameter_m / 2;
	const why = `half the diameter clear of floor and ceiling of deck ${deck.id}`;
	const upright = within(below(from, "height_m"), a.from.height_m, { from: half, to: deck.headroom - half }, "m", why);
	problems.push(...upright);
	if (upright.length === 0) problems.push(...placeWithin(from, a.from, deck, a.from.height_m, half));
	if (a.feet) problems.push(...placeWithin(below(path, "feet"), a.feet, deck));
	return problems;
}

function climbProblems(context: Context, path: string, a: ActivityOf<"climb">): Problem[] {
	const problems = refer([{ path: below(path, "ladder"), value: a.ladder }], context.ladders, "ladder");
	const element = context.parts.elements.byId.get(a.ladder);
	if (element?.kind !== "ladder") return problems;
	const length = element.foot_radius_m - element.head_radius_m;
	const most = QUANTITY.duration.max;
	if (length / a.speed_mps <= most) return problems;
	return [
		...problems,
		problem(below(path, "speed_mps"), a.speed_mps, `at least ${told(length / most)} m/s, to climb ${told(length)} m within ${most} s`),
	];
}

function sitStandProblems(context: Context, path: string, a: ActivityOf<"sit-stand">): Problem[] {
	const problems = placeProblems(context, below(path, "at"), a.at);
	const share = context.parts.assumptions?.mass_centre_fraction ?? ASSUMPTIONS.find((x) => x.key === "mass_centre_fraction")?.value;
	if (context.parts.assumptions === null || typeof share !== "number") return problems;
	for (const { value: who } of each("", a.crew)) {
		const member = context.parts.crew.byId.get(who);
		if (member && a.height_m >= share * member.stature_m) {
			const expected = `less than ${told(share * member.stature_m)} m, where the mass centre of ${member.id} stands`;
			problems.push(problem(below(path, "height_m"), a.height_m, expected));
		}
	}
	return problems;
}

function windowViewProblems(context: Context, path: string, a: ActivityOf<"window-view">): Problem[] {
	const eye = below(path, "eye");
	const named = refer([{ path: below(path, "window"), value: a.window }], context.windows, "window");
	const problems = [...named, ...placeProblems(context, eye, a.eye)];
	const deck = context.decks.sound.get(a.eye.deck);
	if (deck && a.eye.height_m === deck.headroom) {
		problems.push(problem(below(eye, "height_m"), a.eye.height_m, `less than the headroom of deck ${deck.id}, ${deck.headroom} m`));
	}
	return problems;
}

function spinChangeProblems(context: Context, path: string, a: ActivityOf<"spin-change">): Problem[] {
	const problems = placeProblems(context, below(path, "at"), a.at);
	if (context.parts.spin?.value.profile === undefined) return problems;
	return [...problems, problem(below(path, "kind"), a.kind, "another kind: habitat.spin.profile already says how the spin changes")];
}

function kindProblems(context: Context, path: string, a: ActivityFile): Problem[] {
	switch (a.kind) {
		case "drop":
			return dropProblems(context, path, a);
		case "walk":
			return placeProblems(context, path, { deck: a.deck, angle_deg: a.angle_deg, axial_m: a.axial_m });
		case "climb":
			return climbProblems(context, path, a);
		case "sit-stand":
			return sitStandProblems(context, path, a);
		case "reach":
		case "head-turn":
			return placeProblems(context, below(path, "at"), a.at);
		case "window-view":
			return windowViewProblems(context, path, a);
		case "spin-change":
			return spinChangeProblems(context, path, a);
	}
}

function caseProblems({ parts, phases: known }: Context, { path, value: a }: Part<ActivityFile>): Problem[] {
	const crew = each(below(path, "crew"), a.crew);
	const phases = each(below(path, "phase"), a.phase ?? []);
	return [
		...duplicates(crew, "a crew member"),
		...refer(crew, parts.crew, "crew member"),
		...duplicates(phases, "a phase"),
		...refer(phases, known, "phase"),
	];
}

export function checkActivities(parts: LayoutParts, decks: CheckedDecks): Problem[] {
	const context: Context = {
		parts,
		decks,
		phases: { present: parts.phases.present, known: new Set([NOMINAL, ...parts.phases.known]) },
		ladders: elementsOf(parts, "ladder"),
		windows: elementsOf(parts, "window"),
	};
	return [
		...duplicates(parts.activities.ids, "an activity id"),
		...parts.activities.entries.flatMap((part) => [...caseProblems(context, part), ...kindProblems(context, part.path, part.value)]),
	];
}
