import { END, GAP } from "../../src/activity/drop.ts";
import { apparentParts } from "../../src/frame/apparent.ts";
import { deckTriad } from "../../src/layout/habitat.ts";
import { degFromRad, gFromMps2, rpmFromRadps } from "../../src/quantity/convert.ts";
import { dot, length, ring } from "../../src/vector/vec3.ts";
import type { AssessedCase, Finding, LayoutFile } from "../store/core.ts";
import { eventsOf } from "../store/motion.ts";
import type { Printer } from "../store/print.ts";

/** The facts of a case as plain sentences, from the person's point of view: for the headline, and for whoever cannot see the picture. */

/** "drop-driver" -> "Drop driver". */
export const nameOf = (id: string): string => {
	const spaced = id.replace(/[-_]+/g, " ").trim() || id;
	return spaced.charAt(0).toUpperCase() + spaced.slice(1);
};

export const KIND_WORDS: Readonly<Record<AssessedCase["kind"], string>> = {
	drop: "drop",
	walk: "walk",
	climb: "climb",
	"sit-stand": "sitting and standing",
	reach: "reach",
	"head-turn": "head turn",
	"window-view": "window view",
	"spin-change": "change of spin",
};

/** How an activity goes, in a few words. */
export function detailOf(c: AssessedCase, print: Printer): string {
	const { file } = c;
	if (file.kind !== "drop") return KIND_WORDS[c.kind];
	const from = print(file.from.height_m, "m");
	const speed = file.release?.speed_mps ?? 0;
	return speed > 0 ? `toss at ${print(speed, "m/s")}` : `drop from ${from}`;
}

export const withOrAgainst = (prograde: number): string => (prograde < 0 ? "against spin" : "with spin");

/** What was struck, as a noun: "the Cargo deck", "the coaming of hatch-a". */
export function struckWords(c: AssessedCase): string {
	if (!c.motion) return "";
	const { struck } = c.motion.flight;
	if (struck.kind === "outside") return "outside of every bay";
	if (struck.kind === "none") return "nothing";
	if (struck.kind === "coaming") return `the coaming of ${struck.id}`;
	if (struck.kind === "element") return struck.id;
	const deck = c.context.habitat.decks[struck.deck]?.name ?? struck.id;
	if (struck.kind === "deck") return `the ${deck}`;
	if (struck.kind === "ceiling") return `the ceiling of the ${deck}`;
	return `the ${struck.kind.replace("-", " ").replace("low", "bulkhead, low side").replace("high", "bulkhead, high side")} of the ${deck}`;
}

export interface Headline {
	/** Before the number. */
	readonly lead: string;
	readonly value: number;
	readonly unit: string;
	/** Key of its derivation: a summary key, or that of the comparison without turning. */
	readonly key: string;
	/** After the number. */
	readonly tail: string;
	/** More, as a sentence; empty where there is none. */
	readonly also: string;
}

const number = (c: AssessedCase, key: string): number | null => {
	const value = c.summary[key];
	return typeof value === "number" ? value : null;
};

/** Null where the case has nothing to say yet (a kind that is not built). */
export function headline(c: AssessedCase, print: Printer): Headline | null {
	if (!c.motion) return null;
	const { struck, end } = c.motion.flight;
	if (struck.kind === "outside")
		return {
			lead: "Leaves the bays after",
			value: end,
			unit: "s",
			key: END,
			tail: `through ${c.motion.flight.passed.join(", ")}`,
			also: "",
		};
	if (struck.kind === "none") return { lead: "Has struck nothing after", value: end, unit: "s", key: END, tail: "of flight", also: "" };
	const prograde = number(c, "landing_prograde_m");
	const lead = struck.kind === "deck" ? "Lands" : `Strikes ${struckWords(c)}`;
	const seen = fromFeetWords(c, print);
	if (prograde === null)
		return { lead: `${lead} after`, value: end, unit: "s", key: "flight_time_s", tail: "of flight", also: sentence(seen) };
	const gap = tossed(c) ? (c.motion.gap?.prograde ?? null) : null;
	const ofHand = `${withOrAgainst(prograde)} of your hand`;
	if (gap === null) return { lead, value: Math.abs(prograde), unit: "m", key: "landing_prograde_m", tail: ofHand, also: sentence(seen) };
	return {
		lead,
		value: Math.abs(gap),
		unit: "m",
		key: GAP,
		tail: `${withOrAgainst(gap)} of where it would land without turning`,
		also: sentence(seen === "" ? `${print(Math.abs(prograde), "m", 2)} ${ofHand}` : seen),
	};
}

const sentence = (words: string): string => (words === "" ? "" : `${words.charAt(0).toUpperCase()}${words.slice(1)}.`);

/** Below this an offset is left unsaid, m. */
const NEGLIGIBLE = 0.005;

/** Where it lands as the person sees it: "0.11 m in front of your feet and 0.25 m to the right". */
export function fromFeetWords(c: AssessedCase, print: Printer): string {
	const feet = c.motion?.stance.given ? c.motion.stance : null;
	const prograde = number(c, "landing_from_feet_prograde_m");
	const axial = number(c, "landing_from_feet_axial_m");
	if (!feet || prograde === null || axial === null) return "";
	const ahead = prograde * Math.cos(feet.facing) + axial * Math.sin(feet.facing);
	const right = axial * Math.cos(feet.facing) - prograde * Math.sin(feet.facing);
	const parts = [
		Math.abs(ahead) < NEGLIGIBLE ? "" : `${print(Math.abs(ahead), "m", 2)} ${ahead > 0 ? "in front of" : "behind"} your feet`,
		Math.abs(right) < NEGLIGIBLE
			? ""
			: `${print(Math.abs(right), "m", 2)} to ${Math.abs(ahead) < NEGLIGIBLE ? `the ${right > 0 ? "right" : "left"} of your feet` : `the ${right > 0 ? "right" : "left"}`}`,
	].filter((s) => s !== "");
	return parts.length === 0 ? "at your feet" : parts.join(" and ");
}

const tossed = (c: AssessedCase): boolean => c.motion?.velocity.some((v) => v !== 0) ?? false;

/** What the impact is like. */
export function consequence(c: AssessedCase, print: Printer): string {
	const speed = number(c, "landing_speed_mps");
	const energy = number(c, "impact_energy_J");
	const drop = number(c, "equal_earth_drop_m");
	if (speed === null || energy === null || drop === null) return "";
	return `Strikes ${struckWords(c)} at ${print(speed, "m/s")} with ${print(energy, "J")}, as after a drop of ${print(drop, "m")} on Earth.`;
}

export const headingWords = (deg: number): string => {
	const turn = ((deg % 360) + 360) % 360;
	const named = { 0: "with spin", 90: "along the axis (+axial)", 180: "against spin", 270: "along the axis (−axial)" }[turn];
	return named ?? `at heading ${Math.round(turn * 10) / 10}°`;
};

/** "walkway_clearance_m" -> "walkway clearance". */
export const quantityWords = (f: Finding): string =>
	f.quantity.replace(/_(m|mps|mps2|deg|degps|radps2|s|g|J|N|hz|rpm|percent|g_per_m)$/, "").replaceAll("_", " ");

export const limitWords = (f: Finding, print: Printer): string =>
	`${f.comparison === "at-most" ? "at most" : "at least"} ${print(f.limit, f.unit)}`;

export const RESULT_WORDS: Readonly<Record<Finding["result"], string>> = {
	outside: "outside",
	within: "within",
	"not-assessed": "not assessed",
};

/** What a finding is about: a deck by its name, anything else by its id, with who and when. */
export function subjectWords(f: Finding, layout: LayoutFile): string {
	const deck = layout.habitat.decks.find((d) => d.id === f.subject);
	return [deck?.name ?? nameOf(f.subject), f.crew, f.phase].filter((s) => s !== null && s !== "").join(", ");
}

/** The first words of a source, up to where it was printed: "Stone 1973". */
export const sourceWords = (f: Finding): string => (/\d{4}/.test(f.source) ? (f.source.split(",")[0] ?? "") : "");

/** A finding as one sentence. */
export function findingWords(f: Finding, print: Printer): string {
	const head = `${nameOf(RESULT_WORDS[f.result])} (${f.force}${f.basis === "unverified" ? ", unverified, confirm" : ""}): ${f.title}`;
	if (f.value === null) return `${head}: ${f.reason ?? "no value"}.`;
	return `${head}: ${quantityWords(f)} ${print(f.value, f.unit)}, ${limitWords(f, print)}${f.reason ? `; ${f.reason}` : ""}.`;
}

/** Level (g) and tilt from the deck's own down (rad) of someone standing still at the case's start; null where the kind is not built. */
export function standing(c: AssessedCase): { readonly level: number; readonly tilt: number } | null {
	if (!c.motion) return null;
	const { deck, stance } = c.motion;
	const still = ring(0, 0, 0);
	const g = apparentParts(c.context.spin, 0, stance.position, still, still).sum;
	const size = length(g);
	if (!(size > 0)) return { level: 0, tilt: 0 };
	const down = -dot(g, deckTriad(deck, stance.angle).up) / size;
	return { level: gFromMps2(size), tilt: Math.acos(Math.min(1, Math.max(-1, down))) };
}

/** Who stands where, at what apparent gravity, and what happens when: the picture in sentences. */
export function inWords(c: AssessedCase, layout: LayoutFile, print: Printer): string[] {
	const here = standing(c);
	if (!c.motion || !here || c.file.kind !== "drop") return [];
	const { file } = c;
	const member = layout.crew.find((m) => m.id === c.crew);
	const who = member ? `Crew member ${member.id}, ${print(member.stature_m, "m")} tall,` : "A crew member";
	const facing = file.feet ? `, facing ${headingWords(file.feet.facing_deg)}` : "";
	const tilt = degFromRad(here.tilt);
	const vertical = tilt < 0.05 ? "straight down to the deck" : `tilted ${print(tilt, "deg")} from the deck’s own down`;
	const felt = here.level > 0 ? `Apparent gravity at the feet is ${print(here.level, "g")}, ${vertical}.` : "There is no apparent gravity.";
	return [
		`${who} stands on the ${c.motion.deck.name}${facing}. The spin rate is ${print(rpmFromRadps(c.context.spin.rate(0)), "rpm")} (phase ${c.phase}). ${felt}`,
		`${nameOf(detailOf(c, print))}, an object of ${print(file.object.mass_kg, "kg")}, ${file.drag ? "with" : "without"} air drag. ${eventsOf(
			c,
		)
			.slice(1)
			.map((e) => `After ${print(e.t, "s")} it ${e.name}.`)
			.join(" ")}`,
		headlineWords(c, print),
		`${consequence(c, print)} First impact only: bounce and roll are not modelled.`.trim(),
	].filter((s) => s !== "");
}

/** The headline as one sentence or two. */
export function headlineWords(c: AssessedCase, print: Printer): string {
	const h = headline(c, print);
	return h ? `${h.lead} ${print(h.value, h.unit, 2)} ${h.tail}. ${h.also}`.trim() : "";
}
