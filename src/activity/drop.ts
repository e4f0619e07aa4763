import { airDensity } from "../flight/air.ts";
import { type Flight, fly } from "../flight/fly.ts";
import { type Ghost, ghostOf } from "../flight/ghost.ts";
import { fromFeet, type Landing, landing } from "../flight/landing.ts";
import { type Cylindrical, cylindricalFromRing, directionOf, localFromRing, ringFromLocal } from "../frame/place.ts";
import { angleNear, type Deck, deckTriad, floorAlong, placeOnDeck } from "../layout/habitat.ts";
import type { ActivityOf } from "../layout/schema.ts";
import { STANDARD_GRAVITY } from "../quantity/constants.ts";
import { degFromRad, radFromDeg, rpmFromRadps } from "../quantity/convert.ts";
import { type LocalVec, type RingVec, ring, scale } from "../vector/vec3.ts";
import type { Context } from "./context.ts";
import type { CaseSummary, Derivation } from "./result.ts";
import { givenStance, type Stance, stanceAtHand } from "./stance.ts";
import { derive, put, SummaryWriter } from "./summary.ts";

export type DropFile = ActivityOf<"drop">;

/** A drop or toss as computed: what the summary, the series and the picture are drawn from. SI. */
export interface Drop {
	readonly kind: "drop";
	readonly deck: Deck;
	readonly position: RingVec;
	readonly velocity: RingVec;
	readonly object: { readonly mass: number; readonly diameter: number };
	readonly flight: Flight;
	readonly landing: Landing | null;
	readonly ghost: Ghost;
	/** ½ ρ C_d A / m, 1/m; 0 where the air is left out. */
	readonly drag: number;
	/** From where it would land without turning to where it lands, along the floor, m, + prograde and + axial; null where one of the two is not on the release deck's floor. */
	readonly gap: { readonly prograde: number; readonly axial: number; readonly length: number } | null;
	/** Where the person stands: as the layout says, else so that the hand is at the release. */
	readonly stance: Stance;
	readonly fromFeet: { readonly prograde: number | null; readonly axial: number | null } | null;
}

/** Flies the object of a drop activity and finds where it lands, with and without turning. */
export function computeDrop(context: Context, file: DropFile): Drop {
	const { habitat, world, spin } = context;
	const deck = habitat.decks.find((d) => d.id === file.from.deck);
	if (!deck) throw new RangeError(`activity "${file.id}": no deck has the id "${file.from.deck}"`);
	const angle = radFromDeg(file.from.angle_deg);
	const position = placeOnDeck(deck, angle, file.from.axial_m, file.from.height_m);
	const velocity = releaseVelocity(deck, angle, file);
	const { mass_kg: mass, diameter_m: diameter, drag_coefficient } = file.object;
	const drag = file.drag ? dragFactor(airDensity(habitat.air), drag_coefficient, diameter, mass) : 0;
	const flight = fly(world, spin, { deck: deck.index, position, velocity, diameter, drag });
	const found = landing(habitat, flight, deck, position);
	const stance = file.feet
		? givenStance(deck, angleNear(radFromDeg(file.feet.angle_deg), deck.middle), file.feet.axial_m, radFromDeg(file.feet.facing_deg))
		: stanceAtHand(deck, position, context.person.stature, radFromDeg(file.release?.heading_deg ?? 0));
	const ghost = ghostOf(world, deck, spin.rate(0), position, velocity, diameter, drag);
	return {
		kind: "drop",
		deck,
		position,
		velocity,
		object: { mass, diameter },
		flight,
		landing: found,
		ghost,
		gap:
			flight.struck.kind === "deck" && flight.struck.deck === deck.index && found && ghost.point
				? gapBetween(deck, ghost.point, found.point)
				: null,
		drag,
		stance,
		fromFeet: found && stance.given ? fromFeet(habitat, flight, found, deck, position, stance.position) : null,
	};
}

function gapBetween(deck: Deck, from: RingVec, to: RingVec): NonNullable<Drop["gap"]> {
	const start = angleNear(Math.atan2(from[1], from[0]), deck.middle);
	const prograde = floorAlong(deck, angleNear(Math.atan2(to[1], to[0]), start)) - floorAlong(deck, start);
	const axial = to[2] - from[2];
	return { prograde, axial, length: Math.hypot(prograde, axial) };
}

/** ½ ρ C_d A / m, 1/m. */
export const dragFactor = (density: number, coefficient: number, diameter: number, mass: number): number =>
	(density * coefficient * Math.PI * diameter * diameter) / (8 * mass);

function releaseVelocity(deck: Deck, angle: number, file: DropFile): RingVec {
	if (!file.release) return ring(0, 0, 0);
	const { speed_mps, heading_deg, elevation_deg } = file.release;
	return scale(ringFromLocal(deckTriad(deck, angle), directionOf(radFromDeg(heading_deg), radFromDeg(elevation_deg))), speed_mps);
}

/** The name of what was struck, as the assessment writes it. */
export function struckName(flight: Flight, habitat: Context["habitat"]): string {
	const { struck } = flight;
	if (struck.kind === "outside" || struck.kind === "none") return struck.kind;
	if (struck.kind === "coaming" || struck.kind === "element") return `${struck.kind}:${struck.id}`;
	return `${struck.kind}:${(habitat.decks[struck.deck] as Deck).id}`;
}

/** What happens at an instant, s from the release. */
export interface MotionEvent {
	readonly t: number;
	readonly name: string;
}

const STRIKES: Readonly<Record<Exclude<Flight["struck"]["kind"], "element">, string>> = {
	deck: "lands",
	ceiling: "strikes the ceiling",
	"end-low": "strikes a bulkhead",
	"end-high": "strikes a bulkhead",
	"side-low": "strikes a bulkhead",
	"side-high": "strikes a bulkhead",
	coaming: "strikes the coaming",
	outside: "leaves the bay",
	none: "is no longer followed",
};

/** Events of a drop in order: the release, every hatch gone through, the end. */
export function eventsOfDrop({ flight }: Drop): readonly MotionEvent[] {
	return [
		{ t: 0, name: "release" },
		...flight.passed.map((id, i) => ({ t: flight.passedAt[i] as number, name: `passes ${id}` })),
		{ t: flight.end, name: flight.struck.kind === "element" ? `strikes ${flight.struck.id}` : STRIKES[flight.struck.kind] },
	];
}

/** The derivation of the picture's own comparison stands beside those of the summary under this key. */
export const GAP = "gap";
/** Likewise that of the time at which a flight that struck nothing ends. */
export const END = "end_s";

const LONGEST = "10 turns at the rate of the release, at least 600 s and at most 10⁷ s";
const NOTHING_STRUCK = "nothing was struck";
const LEFT = "it left through a hatch into no deck's volume";
const NO_AXIAL = "an end bulkhead has no axial direction of its own";

/** Why a landing has no prograde offset. */
function noPrograde(context: Context, drop: Drop, from: "release" | "feet"): string {
	const { kind } = drop.flight.struck;
	if (kind === "side-low" || kind === "side-high") return "a side bulkhead has no prograde direction of its own";
	const struck = `deck "${deckOfStrike(context, drop).id}"`;
	return `the line straight down from the ${from} does not meet ${kind === "ceiling" ? `the ceiling of ${struck}` : struck}`;
}

export function summariseDrop(context: Context, file: DropFile, drop: Drop): CaseSummary {
	const { spin, habitat } = context;
	const { flight, deck, object } = drop;
	const found = drop.landing;
	const writer = new SummaryWriter();
	const none = flight.struck.kind === "outside" ? LEFT : NOTHING_STRUCK;
	const start = cylindricalFromRing(drop.position);
	const how = flightDerivation(context, file, drop, start);
	const struck = derive("first-contact", [
		put("d", "diameter of the object", object.diameter, "m"),
		put("h", "height of its centre at the release", file.from.height_m, "m"),
	]);
	const parts = found ? arrival(deckOfStrike(context, drop), flight) : null;
	const speedParts = parts
		? [
				put("v_down", "part along down", -parts[1], "m/s"),
				put("v_pro", "part along prograde, − against spin", parts[0], "m/s"),
				put("v_axial", "part along the axis", parts[2], "m/s"),
			]
		: [];
	const speed = put("v", "speed at contact", found?.speed ?? "none", "m/s");

	writer.word("struck", struckName(flight, habitat), struck);
	writer.number("flight_time_s", found ? flight.end : null, none, how);
	writer.number("landing_prograde_m", found?.prograde ?? null, found ? noPrograde(context, drop, "release") : none, how);
	if (!found) writer.beside(END, how);
	writer.number(
		"landing_axial_m",
		found?.axial ?? null,
		found ? NO_AXIAL : none,
		derive("landing-axial", [
			put("z_touched", "axial place of the point touched", found?.point[2] ?? "none", "m"),
			put("z_release", "axial place of the release", file.from.axial_m, "m"),
		]),
	);
	writer.number(
		"landing_radius_m",
		found?.radius ?? null,
		none,
		derive("landing-radius", [put("r", "radius", found?.radius ?? "none", "m")]),
	);
	writer.number("landing_speed_mps", found?.speed ?? null, none, derive("landing-speed", speedParts));
	writer.number(
		"landing_angle_deg",
		found?.angle == null ? null : degFromRad(found.angle),
		found ? "it touches at rest" : none,
		derive("landing-angle", [put("v_down", "part of the velocity along down", parts ? -parts[1] : "none", "m/s"), speed]),
	);
	feetNumbers(writer, drop, none);
	writer.number(
		"impact_energy_J",
		found ? 0.5 * object.mass * found.speed ** 2 : null,
		none,
		derive("impact-energy", [put("m", "mass of the object", object.mass, "kg"), speed]),
	);
	writer.number(
		"equal_earth_drop_m",
		found ? found.speed ** 2 / (2 * STANDARD_GRAVITY) : null,
		none,
		derive("equal-earth-drop", [speed, put("g₀", "standard gravity", STANDARD_GRAVITY, "m/s²")]),
	);
	writer.list("passed", flight.passed, struck);
	if (drop.gap && found?.prograde != null && found.axial != null)
		writer.beside(
			GAP,
			derive(
				"without-turning",
				[
					put("s", "offset of the landing from the point below the release", found.prograde, "m"),
					put("s₀", "offset of the landing without turning", found.prograde - drop.gap.prograde, "m"),
					put("s_z", "axial offset of the landing from the release", found.axial, "m"),
					put("s_z₀", "axial offset of the landing without turning", found.axial - drop.gap.axial, "m"),
					put("g", "uniform level, that of the floor", drop.ghost.field, "m/s²"),
				],
				[file.drag ? "The same air drag." : "No air drag in either."],
			),
		);
	return writer.done();

	function feetNumbers(to: SummaryWriter, d: Drop, reason: string): void {
		const missing = d.stance.given ? reason : "the layout does not say where the person stands";
		const offset = (kind: "prograde" | "axial", from: number | null): Derivation =>
			derive("from-feet", [
				put("s", "offset from the point below the release", from ?? "none", "m"),
				put(
					"s_release − s_feet₀",
					"from the feet to the point below the release",
					from !== null && d.fromFeet?.[kind] != null ? d.fromFeet[kind] - from : "none",
					"m",
				),
			]);
		const landed = found && d.stance.given;
		to.number(
			"landing_from_feet_prograde_m",
			d.fromFeet?.prograde ?? null,
			landed ? noPrograde(context, d, "feet") : missing,
			offset("prograde", found?.prograde ?? null),
		);
		to.number("landing_from_feet_axial_m", d.fromFeet?.axial ?? null, landed ? NO_AXIAL : missing, offset("axial", found?.axial ?? null));
	}

	function flightDerivation(c: Context, f: DropFile, d: Drop, from: Cylindrical): Derivation {
		const rate = put("Ω", "spin rate at the release", rpmFromRadps(spin.rate(0)), "rpm");
		const v0 = put("v₀", "release speed relative to the ring", f.release?.speed_mps ?? 0, "m/s");
		const r0 = put("r₀", "radius of the release", from.radius, "m");
		const until =
			flight.struck.kind === "none"
				? [`Nothing is struck: it is followed for ${LONGEST}.`]
				: flight.struck.kind === "outside"
					? ["Nothing is struck: followed until it is wholly out of the hatch."]
					: [];
		if (f.drag) {
			return derive(
				"drag-flight",
				[
					r0,
					v0,
					rate,
					put("ρ", "air density", airDensity(c.habitat.air), "kg/m³"),
					put("C_d", "drag coefficient", f.object.drag_coefficient, ""),
					put("A", "frontal area", (Math.PI * object.diameter ** 2) / 4, "m²"),
					put("m", "mass of the object", object.mass, "kg"),
				],
				["The object is a sphere.", "The air turns rigidly with the ring and is equally dense everywhere.", ...until],
			);
		}
		const atRest = d.velocity.every((v) => v === 0);
		const plain =
			atRest && deck.floor === "curved" && flight.passed.length === 0 && flight.struck.kind === "deck" && spin.constant && spin.rate(0) > 0;
		if (plain) {
			const reach = deck.radius - object.diameter / 2;
			return derive(
				"drop-from-rest",
				[
					put("R", "floor radius", deck.radius, "m"),
					r0,
					put("R_c", "radius of the centre at contact", reach, "m"),
					put("Ω", "spin rate", rpmFromRadps(spin.rate(0)), "rpm"),
					put("φ", "inertial angle swept in the fall", degFromRad(Math.acos(Math.min(1, from.radius / reach))), "°"),
				],
				["The object is a sphere.", "Air drag is switched off for this activity."],
			);
		}
		return derive(
			"free-flight",
			[r0, v0, rate, put("t", found ? "time of the first contact" : "time followed", flight.end, "s")],
			["The object is a sphere.", "Air drag is switched off for this activity.", ...until],
		);
	}
}

function deckOfStrike(context: Context, drop: Drop): Deck {
	const { struck } = drop.flight;
	return struck.kind === "outside" || struck.kind === "none" ? drop.deck : (context.habitat.decks[struck.deck] as Deck);
}

/** Velocity at the strike as [prograde, up, axial] of the struck deck, m/s. */
function arrival(deck: Deck, flight: Flight): LocalVec {
	const s = flight.state;
	const angle = Math.atan2(s[1] as number, s[0] as number);
	return localFromRing(deckTriad(deck, angle), ring(s[3] as number, s[4] as number, s[5] as number));
}
