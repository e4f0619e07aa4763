import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { parseLayout } from "../../src/layout/parse.ts";
import { problemLine } from "../../src/layout/problem.ts";
import { changed, type Damaged, damaged } from "./support.ts";

const twin = readFileSync("assets/layout/twin-arm.layout.json", "utf8");
const ring = readFileSync("assets/layout/great-ring.layout.json", "utf8");

type Row = [string, (l: Damaged) => unknown, ...string[]];
const refused = (rows: Row[], text?: string): void => {
	test.each(rows)("refused: %s", (_, damage, ...lines) => expect(damaged(damage, text).map(problemLine)).toEqual(lines));
};
const accepted = (rows: Row[], text?: string): void => {
	test.each(rows)("read: %s", (_, change) => expect(changed(change, text).version).toBe(1));
};
const set = (l: Damaged, list: string, i: number, values: object): void => Object.assign(l[list][i], values);
const deck = (l: Damaged, i: number, values: object): void => Object.assign(l.habitat.decks[i], values);

describe("ids", () => {
	refused([
		[
			"two decks of one id",
			(l) => l.habitat.decks.push({ ...l.habitat.decks[1], radius_m: 28 }),
			'habitat.decks[2].id: "upper", expected a deck id only once; it stands at habitat.decks[1].id too',
		],
		[
			"two elements",
			(l) => set(l, "elements", 4, { id: "window-a" }),
			'elements[4].id: "window-a", expected an element id only once; it stands at elements[2].id too',
		],
		["two of the crew", (l) => l.crew.push(l.crew[0]), 'crew[2].id: "tall", expected a crew id only once; it stands at crew[0].id too'],
		[
			"two activities",
			(l) => set(l, "activities", 1, { id: "drop-driver" }),
			'activities[1].id: "drop-driver", expected an activity id only once; it stands at activities[0].id too',
		],
		[
			"two phases",
			(l) => l.habitat.phases.push(l.habitat.phases[0]),
			'habitat.phases[1].id: "reduced", expected a phase id only once; it stands at habitat.phases[0].id too',
		],
		[
			"two walkways of a deck",
			(l) => l.habitat.decks[0].walkways.push(l.habitat.decks[0].walkways[0]),
			'habitat.decks[0].walkways[1].id: "spine", expected a walkway id on its deck only once; it stands at habitat.decks[0].walkways[0].id too',
		],
		[
			"one crew member twice in an activity",
			(l) => set(l, "activities", 0, { crew: ["tall", "tall"] }),
			'activities[0].crew[1]: "tall", expected a crew member only once; it stands at activities[0].crew[0] too',
		],
		[
			"a set used twice",
			(l) => (l.criteria.use = ["grip", "gait", "grip"]),
			'criteria.use[2]: "grip", expected a criteria set only once; it stands at criteria.use[0] too',
		],
		[
			"one criterion tailored twice",
			(l) => (l.criteria.tailor = [1, 2].map((limit) => ({ criterion: "x", limit, reason: "" }))),
			'criteria.tailor[1].criterion: "x", expected a criterion tailored only once; it stands at criteria.tailor[0].criterion too',
		],
		[
			"a phase called nominal",
			(l) => l.habitat.phases.push({ id: "nominal", rate_rpm: 1 }),
			'habitat.phases[1].id: "nominal", expected another id: nominal is the phase that spin gives',
		],
		[
			"a deck that is not there",
			(l) => set(l, "elements", 4, { deck: "lowr" }),
			'elements[4].deck: "lowr", expected the id of a deck: lower, upper; nearest: lower',
		],
		[
			"a ladder that is a hatch",
			(l) => set(l, "activities", 3, { ladder: "hatch-a" }),
			'activities[3].ladder: "hatch-a", expected the id of a ladder: ladder-a; nearest: ladder-a',
		],
		[
			"a window that is not there",
			(l) => l.elements.splice(2, 2),
			'activities[7].window: "window-a", expected the id of a window: there is none',
		],
		[
			"a phase that is not there",
			(l) => set(l, "activities", 3, { phase: ["nominal", "reducd"] }),
			'activities[3].phase[1]: "reducd", expected the id of a phase: nominal, reduced; nearest: reduced',
		],
		[
			"an id that only a prototype has",
			(l) => set(l, "activities", 0, { crew: "toString" }),
			'activities[0].crew: "toString", expected the id of a crew member: tall, short; nearest: tall',
		],
	]);
	accepted([
		[
			"ids of objects' own words",
			(l) => l.crew.push({ id: "__proto__", stature_m: 1.7, mass_kg: 60 }, { id: "constructor", stature_m: 1.7, mass_kg: 60 }),
		],
		[
			"one id for a deck, an element and an activity",
			(l) => [set(l, "elements", 4, { id: "lower" }), set(l, "activities", 0, { id: "lower" })],
		],
		[
			"a tailored criterion that only the shipped sets know",
			(l) => l.criteria.tailor.push({ criterion: "anything", limit: 1, reason: "why" }),
		],
	]);
});

describe("decks", () => {
	refused([
		[
			"from beyond to",
			(l) => [deck(l, 1, { from_deg: 16 }), l.elements.splice(1, 1)],
			"habitat.decks[1].to_deg: 15, expected more than from_deg, 16",
		],
		[
			"no axial extent",
			(l) => [deck(l, 1, { from_m: 3 }), l.elements.splice(1, 1)],
			"habitat.decks[1].to_m: 3, expected more than from_m, 3",
		],
		[
			"more than once around",
			(l) => deck(l, 1, { to_deg: 345.1 }),
			"habitat.decks[1].to_deg: 345.1, expected at most 360 deg beyond from_deg, -15",
		],
		[
			"a flat floor of half a turn",
			(l) => deck(l, 1, { floor: "flat", from_deg: -90, to_deg: 90 }),
			"habitat.decks[1].to_deg: 90, expected less than 180 deg beyond from_deg, -90, on a flat floor",
		],
		["a ceiling at the axis", (l) => deck(l, 1, { radius_m: 2.3 }), "habitat.decks[1].headroom_m: 2.3, expected less than radius_m, 2.3"],
		[
			"a walkway off its deck",
			(l) => Object.assign(l.habitat.decks[0].walkways[0], { to_deg: 15.5, from_m: -3.5 }),
			"habitat.decks[0].walkways[0].from_m: -3.5, expected from -3 to 3 m (on deck lower)",
			"habitat.decks[0].walkways[0].to_deg: 15.5, expected from -15 to 15 deg (on deck lower)",
		],
		[
			"a walkway backwards",
			(l) => Object.assign(l.habitat.decks[0].walkways[0], { to_m: -1 }),
			"habitat.decks[0].walkways[0].to_m: -1, expected more than from_m, -0.5",
		],
		[
			"a profile that runs back",
			(l) => {
				l.habitat.spin.profile = [0, 5, 5].map((t_s) => ({ t_s, rate_rpm: 3 }));
				l.activities.pop();
			},
			"habitat.spin.profile[2].t_s: 5, expected at least 0.01 s after the point before it, 5 s",
		],
		[
			"a spin change on a profile",
			(l) => (l.habitat.spin.profile = [{ t_s: 0, rate_rpm: 3 }]),
			'activities[8].kind: "spin-change", expected another kind: habitat.spin.profile already says how the spin changes',
		],
	]);
	accepted([
		["a walkway a whole turn on", (l) => Object.assign(l.habitat.decks[0].walkways[0], { from_deg: 350, to_deg: 370 })],
		["a deck given a turn on", (l) => deck(l, 0, { from_deg: 345, to_deg: 375 })],
	]);
	accepted(
		[["a walkway across the seam of a closed bay", (l) => Object.assign(l.habitat.decks[0].walkways[0], { from_deg: 100, to_deg: 300 })]],
		ring,
	);
});

describe("ladders", () => {
	const ladder = (l: Damaged, values: object) => set(l, "elements", 0, values);
	refused([
		[
			"starting below its deck",
			(l) => ladder(l, { foot_radius_m: 34.06 }),
			"elements[0].foot_radius_m: 34.06, expected 34 m within 0.05 m, the floor of deck lower: it starts below its deck",
		],
		[
			"starting in mid-air",
			(l) => ladder(l, { foot_radius_m: 33 }),
			"elements[0].foot_radius_m: 33, expected 34 m within 0.05 m, the floor of deck lower: it starts above the floor",
		],
		[
			"where no deck is",
			(l) => ladder(l, { angle_deg: 40 }),
			"elements[0].foot_radius_m: 34, expected the floor of a deck within 0.05 m, and no deck lies at 40 deg, axial 0.8 m",
		],
		[
			"upside down",
			(l) => ladder(l, { head_radius_m: 34.5 }),
			"elements[0].head_radius_m: 34.5, expected less than foot_radius_m, 34: the head is inboard of the foot",
		],
		[
			"that takes more than a day",
			(l) => set(l, "activities", 3, { speed_mps: 1e-5 }),
			"activities[3].speed_mps: 0.00001, expected at least 0.00004513889 m/s, to climb 3.9 m within 86400 s",
		],
	]);
	accepted([
		["five centimetres low", (l) => ladder(l, { foot_radius_m: 34.05 })],
		["a turn on", (l) => ladder(l, { angle_deg: 364 })],
		["to within a step of the axis", (l) => ladder(l, { head_radius_m: 0.2 })],
	]);
	refused(
		[
			[
				"at the middle's radius away from the middle of a flat deck",
				(l) => ladder(l, { angle_deg: 8, axial_m: -1 }),
				"elements[0].foot_radius_m: 24, expected 24.23586 m within 0.05 m, the floor of deck hearth: it starts above the floor",
			],
		],
		twin,
	);
	accepted([["at the floor's own distance there", (l) => ladder(l, { angle_deg: 8, axial_m: -1, foot_radius_m: 24.236 })]], twin);
});

describe("hatches and windows", () => {
	const hatch = (l: Damaged, values: object) => set(l, "elements", 1, values);
	const port = (l: Damaged, values: object) => set(l, "elements", 2, values);
	const end = (l: Damaged, values: object) => set(l, "elements", 3, values);
	refused([
		[
			"a hatch over the angular end",
			(l) => hatch(l, { angle_deg: 14.5 }),
			"elements[1].angle_deg: 14.5, expected from -14.17362 to 14.17362 deg (the outline within deck upper)",
		],
		[
			"a hatch over the axial end",
			(l) => hatch(l, { axial_m: -2.6 }),
			"elements[1].axial_m: -2.6, expected from -2.55 to 2.55 m (the outline within deck upper)",
		],
		[
			"a hatch larger than its deck",
			(l) => hatch(l, { along_m: 17, across_m: 7 }),
			"elements[1].along_m: 17, expected a size that fits between the angular ends of deck upper",
			"elements[1].across_m: 7, expected at most 6 m (the outline within deck upper)",
		],
		[
			"a hatch off its deck altogether",
			(l) => hatch(l, { angle_deg: 90 }),
			"elements[1].angle_deg: 90, expected from -14.17362 to 14.17362 deg (the outline within deck upper)",
		],
		[
			"a floor window over the end",
			(l) => port(l, { axial_m: -2.8 }),
			"elements[2].axial_m: -2.8, expected from -2.7 to 2.7 m (the outline within deck lower)",
		],
		[
			"an end window through the ceiling",
			(l) => end(l, { height_m: 2.1 }),
			"elements[3].height_m: 2.1, expected from 0.35 to 2.05 m (the outline within the headroom of deck lower)",
		],
		[
			"an end window beyond the side",
			(l) => end(l, { angle_deg: 14.5 }),
			"elements[3].angle_deg: 14.5, expected from -14.03335 to 14.03335 deg (the outline within deck lower)",
		],
		[
			"a hatch with both kinds of size",
			(l) => hatch(l, { diameter_m: 1 }),
			"elements[1].diameter_m: 1, expected no such key; known here: id, kind, deck, angle_deg, axial_m, shape, along_m, across_m, solid; nearest: axial_m",
		],
		[
			"a side window with an angle",
			(l) => end(l, { surface: "side-low", axial_m: 0 }),
			"elements[3].angle_deg: 8, expected no such key; known here: id, kind, deck, surface, axial_m, height_m, shape, along_m, across_m, solid; nearest: axial_m",
		],
		[
			"a workstation off its deck",
			(l) => set(l, "elements", 4, { angle_deg: -16, axial_m: 3.1 }),
			"elements[4].angle_deg: -16, expected from -15 to 15 deg (on deck lower)",
			"elements[4].axial_m: 3.1, expected from -3 to 3 m (on deck lower)",
		],
	]);
	accepted([
		["a hatch that touches both edges", (l) => hatch(l, { angle_deg: 14.1736, axial_m: 2.55 })],
		[
			"a window on the low side",
			(l) =>
				l.elements.push({
					id: "w",
					kind: "window",
					deck: "upper",
					surface: "side-low",
					axial_m: 1,
					height_m: 1.2,
					shape: "circle",
					diameter_m: 0.6,
				}),
		],
		[
			"a window in the ceiling",
			(l) =>
				l.elements.push({
					id: "w",
					kind: "window",
					deck: "upper",
					surface: "ceiling",
					angle_deg: 14.2,
					axial_m: 0,
					shape: "circle",
					diameter_m: 0.6,
				}),
		],
	]);
	refused(
		[
			[
				"a side window where the bay closes",
				(l) => set(l, "elements", 4, { deck: "promenade" }),
				'elements[4].surface: "side-low", expected floor, ceiling, end-low or end-high: deck promenade closes on itself and has no sides',
			],
		],
		ring,
	);
	// The ceiling of a flat bay is narrower than its floor: 21.3 m − 2.2 m, ±10° gives ±3.368 m, less half of 0.7 m.
	refused(
		[
			[
				"a ceiling window that would fit the floor only",
				(l) => set(l, "elements", 3, { angle_deg: -8.2 }),
				"elements[3].angle_deg: -8.2, expected from -8.064157 to 8.064157 deg (the outline within deck loft)",
			],
		],
		twin,
	);
	accepted([["the same a little further in", (l) => set(l, "elements", 3, { angle_deg: -8.06 })]], twin);
});

describe("activities", () => {
	const at = (l: Damaged, i: number, key: string, values: object): void => Object.assign(l.activities[i][key], values);
	refused([
		[
			"let go inside the floor",
			(l) => at(l, 0, "from", { height_m: 0.02 }),
			"activities[0].from.height_m: 0.02, expected from 0.03 to 2.37 m (half the diameter clear of floor and ceiling of deck lower)",
		],
		[
			"let go inside the ceiling",
			(l) => at(l, 0, "from", { height_m: 2.38 }),
			"activities[0].from.height_m: 2.38, expected from 0.03 to 2.37 m (half the diameter clear of floor and ceiling of deck lower)",
		],
		[
			"larger than the room",
			(l) => at(l, 0, "object", { diameter_m: 3 }),
			"activities[0].from.height_m: 1.5, expected room for it, and there is none (half the diameter clear of floor and ceiling of deck lower)",
		],
		[
			"let go inside an end",
			(l) => at(l, 0, "from", { axial_m: 2.98 }),
			"activities[0].from.axial_m: 2.98, expected from -2.97 to 2.97 m (clear of the walls of deck lower)",
		],
		[
			"let go off the deck",
			(l) => at(l, 0, "from", { angle_deg: 20 }),
			"activities[0].from.angle_deg: 20, expected from -14.94711 to 14.94711 deg (clear of the walls of deck lower)",
		],
		[
			"feet off the deck",
			(l) => at(l, 0, "feet", { angle_deg: -15.1 }),
			"activities[0].feet.angle_deg: -15.1, expected from -15 to 15 deg (on deck lower)",
		],
		[
			"a walk that starts off the deck",
			(l) => set(l, "activities", 2, { axial_m: 4 }),
			"activities[2].axial_m: 4, expected from -3 to 3 m (on deck lower)",
		],
		[
			"a rise higher than the mass centre",
			(l) => set(l, "activities", 4, { height_m: 1.09 }),
			"activities[4].height_m: 1.09, expected less than 1.08976 m, where the mass centre of tall stands",
		],
		[
			"a hand above the ceiling",
			(l) => at(l, 5, "at", { height_m: 2.5 }),
			"activities[5].at.height_m: 2.5, expected from 0 to 2.4 m (below the ceiling of deck lower)",
		],
		[
			"an eye in the ceiling",
			(l) => at(l, 7, "eye", { height_m: 2.4 }),
			"activities[7].eye.height_m: 2.4, expected less than the headroom of deck lower, 2.4 m",
		],
		[
			"an eye beyond the wall",
			(l) => at(l, 7, "eye", { angle_deg: -17 }),
			"activities[7].eye.angle_deg: -17, expected from -15 to 15 deg (on deck lower)",
		],
		[
			"standing where no deck is",
			(l) => at(l, 8, "at", { angle_deg: 180 }),
			"activities[8].at.angle_deg: 180, expected from -15 to 15 deg (on deck lower)",
		],
	]);
	accepted([
		["a release a turn back", (l) => at(l, 0, "from", { angle_deg: -360 })],
		["a ball that fills the room", (l) => [at(l, 0, "object", { diameter_m: 2.4 }), at(l, 0, "from", { height_m: 1.2 })]],
		[
			"a rise under another fraction",
			(l) => [set(l, "activities", 4, { height_m: 1.09 }), Object.assign(l, { assumptions: { mass_centre_fraction: 0.57 } })],
		],
	]);
	// A flat bay's walls lean in: at 2 m above a floor at 24 m, ±10°, the room is 22 m · tan 10° = 3.879 m to each side.
	refused(
		[
			[
				"let go beyond the leaning wall of a flat bay",
				(l) => at(l, 0, "from", { angle_deg: 9.3, height_m: 2 }),
				"activities[0].from.angle_deg: 9.3, expected from -9.075145 to 9.075145 deg (clear of the walls of deck hearth)",
			],
		],
		twin,
	);
	accepted([["the same near the floor", (l) => at(l, 0, "from", { angle_deg: 9.3, height_m: 0.1 })]], twin);
});

test("what refers to an entry that cannot be read is not called dangling", () => {
	const lines = damaged((l) => {
		l.habitat.decks[0].radius_m = "wide";
		l.elements[0].rung_spacing_m = 0;
	}).map(problemLine);
	expect(lines).toEqual([
		'habitat.decks[0].radius_m: "wide", expected a number from 0.5 to 10000 m',
		"elements[0].rung_spacing_m: 0, expected a number from 0.01 to 100 m",
	]);
});

test("an object too light for its size is refused where the air slows it, and only there", () => {
	const layout = (drag: boolean) => {
		const file = JSON.parse(readFileSync("assets/layout/larkspur.layout.json", "utf8"));
		Object.assign(file.activities[1], { drag, object: { mass_kg: 1e-6, diameter_m: 0.5, drag_coefficient: 10 } });
		return parseLayout(JSON.stringify(file));
	};
	const refused = layout(true);
	expect(refused.ok ? [] : refused.problems.map((p) => p.path)).toEqual(["activities[1].object.mass_kg"]);
	expect(layout(false).ok).toBe(true);
});
