import { assumptionsOf } from "../assumptions.ts";
import type { LayoutParts, Part } from "../parts.ts";
import { below } from "../problem.ts";
import { QUANTITY } from "../quantities.ts";
import { type ActivityFile, type ActivityOf, type ElementFile, NOMINAL } from "../schema.ts";
import { type Problems, placeWithin, problem, told, within } from "./bounds.ts";
import type { SoundDecks } from "./habitat.ts";
import { dangling, duplicates, each, type Known } from "./references.ts";

interface Context {
	readonly parts: LayoutParts;
	readonly decks: SoundDecks;
	readonly phases: Known;
	readonly ladders: Known;
	readonly windows: Known;
}

/** The ids that may be of elements of a kind: those only of other kinds are out, those of entries that cannot be read are in. */
function elementsOf({ elements }: LayoutParts, kind: ElementFile["kind"]): Known {
	const known = new Set(elements.known);
	for (const { value } of elements.entries) if (value.kind !== kind) known.delete(value.id);
	for (const { value } of elements.entries) if (value.kind === kind) known.add(value.id);
	return { present: elements.present, known };
}

const named = ({ parts }: Context, path: string, deck: string): Problems =>
	dangling([{ path: below(path, "deck"), value: deck }], parts.decks, "deck");

/** A place that names its deck; a height in it lies between floor and ceiling. */
function* placeProblems(
	context: Context,
	path: string,
	place: { deck: string; angle_deg: number; axial_m: number; height_m?: number },
): Problems {
	yield* named(context, path, place.deck);
	const deck = context.decks.byId.get(place.deck);
	if (!deck) return;
	const height = place.height_m ?? 0;
	const upright = [...within(below(path, "height_m"), height, { from: 0, to: deck.headroom }, "m", `below the ceiling of deck ${deck.id}`)];
	yield* upright;
	if (upright.length === 0) yield* placeWithin(path, place, deck, height);
}

/** Largest C_d A / m that is followed through the air, m²/kg: lighter than any down feather, it would only drift with the air. */
const MOST_DRAG = 500;

function* dragProblems(path: string, { drag, object }: ActivityOf<"drop">): Problems {
	const share = (object.drag_coefficient * Math.PI * object.diameter_m ** 2) / 4;
	if (!drag || share <= MOST_DRAG * object.mass_kg) return;
	yield problem(
		below(below(path, "object"), "mass_kg"),
		object.mass_kg,
		`at least ${told(share / MOST_DRAG)} kg for this size and drag coefficient`,
	);
}

function* dropProblems(context: Context, path: string, a: ActivityOf<"drop">): Problems {
	yield* dragProblems(path, a);
	const from = below(path, "from");
	yield* named(context, from, a.from.deck);
	const deck = context.decks.byId.get(a.from.deck);
	if (!deck) return;
	const half = a.object.diameter_m / 2;
	const room = { from: half, to: deck.headroom - half };
	const why = `half the diameter clear of floor and ceiling of deck ${deck.id}`;
	const upright = [...within(below(from, "height_m"), a.from.height_m, room, "m", why)];
	yield* upright;
	if (upright.length === 0) yield* placeWithin(from, a.from, deck, a.from.height_m, half);
	if (a.feet) yield* placeWithin(below(path, "feet"), a.feet, deck);
}

function* climbProblems({ parts, ladders }: Context, path: string, a: ActivityOf<"climb">): Problems {
	yield* dangling([{ path: below(path, "ladder"), value: a.ladder }], ladders, "ladder");
	const ladder = parts.elements.byId.get(a.ladder);
	if (ladder?.kind !== "ladder") return;
	const length = ladder.foot_radius_m - ladder.head_radius_m;
	const most = QUANTITY.duration.max;
	if (length / a.speed_mps <= most) return;
	yield problem(below(path, "speed_mps"), a.speed_mps, `at least ${told(length / most)} m/s, to climb ${told(length)} m within ${most} s`);
}

function* sitStandProblems(context: Context, path: string, a: ActivityOf<"sit-stand">): Problems {
	yield* placeProblems(context, below(path, "at"), a.at);
	const { assumptions, crew } = context.parts;
	if (assumptions === null) return;
	const share = assumptionsOf({ assumptions }).values.mass_centre_fraction;
	for (const { value: who } of each("", a.crew)) {
		const member = crew.byId.get(who);
		if (!member || a.height_m < share * member.stature_m) continue;
		const expected = `less than ${told(share * member.stature_m)} m, where the mass centre of ${member.id} stands`;
		yield problem(below(path, "height_m"), a.height_m, expected);
	}
}

function* windowViewProblems(context: Context, path: string, a: ActivityOf<"window-view">): Problems {
	yield* dangling([{ path: below(path, "window"), value: a.window }], context.windows, "window");
	const eye = below(path, "eye");
	yield* placeProblems(context, eye, a.eye);
	const deck = context.decks.byId.get(a.eye.deck);
	if (deck && a.eye.height_m === deck.headroom) {
		yield problem(below(eye, "height_m"), a.eye.height_m, `less than the headroom of deck ${deck.id}, ${deck.headroom} m`);
	}
}

function* spinChangeProblems(context: Context, path: string, a: ActivityOf<"spin-change">): Problems {
	yield* placeProblems(context, below(path, "at"), a.at);
	if (context.parts.spin?.value.profile === undefined) return;
	yield problem(below(path, "kind"), a.kind, "another kind: habitat.spin.profile already says how the spin changes");
}

function kindProblems(context: Context, path: string, a: ActivityFile): Problems {
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

function* caseProblems({ parts, phases }: Context, { path, value: a }: Part<ActivityFile>): Problems {
	const crew = below(path, "crew");
	const phase = below(path, "phase");
	yield* duplicates(each(crew, a.crew), "a crew member");
	yield* dangling(each(crew, a.crew), parts.crew, "crew member");
	yield* duplicates(each(phase, a.phase ?? []), "a phase");
	yield* dangling(each(phase, a.phase ?? []), phases, "phase");
}

export function* checkActivities(parts: LayoutParts, decks: SoundDecks): Problems {
	const context: Context = {
		parts,
		decks,
		phases: { present: parts.phases.present, known: new Set([NOMINAL, ...parts.phases.known]) },
		ladders: elementsOf(parts, "ladder"),
		windows: elementsOf(parts, "window"),
	};
	yield* duplicates(parts.activities.ids, "an activity id");
	for (const part of parts.activities.entries) {
		yield* caseProblems(context, part);
		yield* kindProblems(context, part.path, part.value);
	}
}
