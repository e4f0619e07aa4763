import * as z from "zod/mini";
import { flag, id, list, number, object, oneOrSeveral, optional, text, word } from "./field.ts";
import { QUANTITY } from "./quantities.ts";

/** What the crew does: one object per kind. */

const angle = number(QUANTITY.angle, "Ring angle of the floor point");
const axial = number(QUANTITY.axial, "Position along the spin axis");
const heading = number(QUANTITY.angle, "Heading from prograde towards axial");
const elevation = number(QUANTITY.latitude, "Elevation above the floor plane");
const duration = number(QUANTITY.duration, "Duration");
const deck = id("Deck it is on");
const floorPlace = object({ deck, angle_deg: angle, axial_m: axial }, "Where the feet are");
const abovePlace = (what: string, description: string) =>
	object({ deck, angle_deg: angle, axial_m: axial, height_m: number(QUANTITY.size, `Height of ${what} above the floor`) }, description);

const task = object(
	{
		name: text("What the task is"),
		frequency_per_day: number(QUANTITY.frequency, "How often"),
		criticality: word(["routine", "important", "critical"], "What depends on it"),
		clothing: word(["light", "bulky"], "What is worn"),
		requirements: list(text("Identifier of a requirement"), "Requirements it traces to"),
		owner: text("Who answers for it"),
	},
	"The task it stands for, for traceability",
);

const name = <const K extends string>(kind: K) => ({ id: id("Name of the activity"), kind: word([kind], "Kind of activity") });
const who = {
	crew: oneOrSeveral(id("Crew member"), "Crew member or several, each a case"),
	phase: optional(oneOrSeveral(id("Phase"), "Phase or several, each a case; absent: nominal")),
	start_s: optional(number(QUANTITY.time, "Where on the spin profile it begins; absent: 0")),
};
const head = <const K extends string>(kind: K) => ({ ...name(kind), ...who });
const tail = { task: optional(task) };

const drop = z.strictObject({
	...head("drop"),
	from: abovePlace("the object's centre", "Where it is let go"),
	feet: optional(object({ angle_deg: angle, axial_m: axial, facing_deg: heading }, "Where the person stands, on the deck of `from`")),
	release: optional(
		object(
			{ speed_mps: number(QUANTITY.speed, "Speed relative to the ring"), heading_deg: heading, elevation_deg: elevation },
			"How it is tossed; absent: let go at rest",
		),
	),
	object: object(
		{
			mass_kg: number(QUANTITY.mass, "Mass, above 0"),
			diameter_m: number(QUANTITY.size, "Diameter of the sphere it is taken for"),
			drag_coefficient: number(QUANTITY.dragCoefficient, "Drag coefficient"),
		},
		"What is let go",
	),
	drag: flag("Whether the air slows it"),
	...tail,
});

const walk = z.strictObject({
	...head("walk"),
	deck,
	angle_deg: angle,
	axial_m: axial,
	heading_deg: heading,
	speed_mps: number(QUANTITY.speed, "Walking speed"),
	start_mps2: optional(number(QUANTITY.acceleration, "Acceleration of starting and stopping; absent: 1.0")),
	turn_radius_m: optional(number(QUANTITY.turnRadius, "Radius of a turn; absent: no turn")),
	distance_m: optional(number(QUANTITY.distance, "How far; absent: to the deck's edge")),
	...tail,
});

const climb = z.strictObject({
	...head("climb"),
	ladder: id("Ladder climbed"),
	way: word(["up", "down"], "Which way"),
	speed_mps: number(QUANTITY.climbSpeed, "Climbing speed"),
	load_kg: optional(number(QUANTITY.load, "Load carried; absent: 0")),
	...tail,
});

const sitStand = z.strictObject({
	...name("sit-stand"),
	way: word(["stand", "sit"], "Standing up or sitting down"),
	...who,
	at: floorPlace,
	height_m: number(QUANTITY.size, "Rise of the mass centre"),
	duration_s: duration,
	...tail,
});

const reach = z.strictObject({
	...head("reach"),
	at: abovePlace("the hand", "Where the hand starts"),
	distance_m: number(QUANTITY.size, "Length of the reach"),
	duration_s: duration,
	heading_deg: heading,
	elevation_deg: elevation,
	load_kg: optional(number(QUANTITY.load, "Load in the hand; absent: 0")),
	...tail,
});

const headTurn = z.strictObject({
	...head("head-turn"),
	at: floorPlace,
	facing_deg: heading,
	axis: word(["yaw", "pitch", "roll"], "Turn about the head's own axis: + left, nose down, right ear down"),
	angle_deg: number(QUANTITY.turn, "How far the head turns"),
	duration_s: duration,
	...tail,
});

const windowView = z.strictObject({
	...head("window-view"),
	window: id("Window looked through"),
	eye: abovePlace("the eye", "Where the eye is"),
	...tail,
});

const spinChange = z.strictObject({
	...head("spin-change"),
	at: floorPlace,
	to_rpm: number(QUANTITY.rate, "Rate at the end"),
	duration_s: duration,
	...tail,
});

export const ACTIVITY_KINDS = ["drop", "walk", "climb", "sit-stand", "reach", "head-turn", "window-view", "spin-change"] as const;
export const activity = z.discriminatedUnion("kind", [drop, walk, climb, sitStand, reach, headTurn, windowView, spinChange], {
	error: `one of ${ACTIVITY_KINDS.join(", ")}`,
});
