import * as z from "zod/mini";
import { ACTIVITY_KINDS, activity } from "./activity.ts";
import { ELEMENT_KINDS, element, type hatch, type ladder, type window, type workstation } from "./element.ts";
import { described, filled, id, list, number, object, oneOrSeveral, optional, text, word } from "./field.ts";
import { QUANTITY } from "./quantities.ts";

/**
 * The layout file, version 1: the one source of its types, of what the parser accepts, of the order of its keys and of
 * its JSON Schema. Units are those of the file: every key ends in its own.
 */
export const FORMAT = "offplumb-layout";
export const VERSION = 1;
/** The phase that `spin` is. */
export const NOMINAL = "nominal";

const span = (what: string) => ({
	from_deg: number(QUANTITY.angle, `Least ring angle of ${what}`),
	to_deg: number(QUANTITY.angle, `Greatest ring angle of ${what}`),
	from_m: number(QUANTITY.axial, `Least axial position of ${what}`),
	to_m: number(QUANTITY.axial, `Greatest axial position of ${what}`),
});

export const walkway = z.strictObject({ id: id("Name of the walkway"), ...span("the walkway") });

export const deck = z.strictObject({
	id: id("Name of the deck"),
	name: text("What people call it"),
	floor: word(["curved", "flat"], "A cylinder about the spin axis, or the plane touching it at the deck's middle angle"),
	radius_m: number(QUANTITY.radius, "Distance of the floor from the spin axis"),
	...span("the bay"),
	headroom_m: number(QUANTITY.extent, "Floor to ceiling"),
	walkways: optional(list(walkway, "Where people walk")),
});

export const phase = z.strictObject({ id: id("Name of the phase, not nominal"), rate_rpm: number(QUANTITY.rate, "Constant spin rate") });

export const spinPoint = z.strictObject({ t_s: number(QUANTITY.time, "Time"), rate_rpm: number(QUANTITY.rate, "Spin rate") });

export const spin = object(
	{
		rate_rpm: number(QUANTITY.rate, "Spin rate of the phase nominal"),
		profile: optional(
			filled(
				spinPoint,
				"at least one point",
				"Replaces the constant nominal rate: points joined by minimum-jerk ramps, held beyond the ends",
			),
		),
	},
	"Spin in the phase nominal",
);

const air = object(
	{
		pressure_kPa: number(QUANTITY.pressure, "Pressure"),
		temperature_C: number(QUANTITY.temperature, "Temperature"),
		oxygen_fraction: number(QUANTITY.fraction, "Oxygen by volume, rest nitrogen, dry"),
	},
	"Air, turning with the ring",
);

const sky = object(
	{
		axis_ra_deg: number(QUANTITY.angle, "Right ascension of the spin vector"),
		axis_dec_deg: number(QUANTITY.latitude, "Declination of the spin vector"),
		zero_deg: number(QUANTITY.angle, "Where ring angle 0 stands at t = 0"),
		sun_ra_deg: number(QUANTITY.angle, "Right ascension of the Sun"),
		sun_dec_deg: number(QUANTITY.latitude, "Declination of the Sun"),
	},
	"Attitude and Sun, ICRS",
);

const habitat = object(
	{
		spin,
		phases: optional(list(phase, "Other phases, at constant rates")),
		air,
		sky,
		decks: filled(deck, "at least one deck", "Bays, each named by its floor"),
	},
	"Spin, air, sky and bays",
);

export const crewMember = z.strictObject({
	id: id("Name of the crew member"),
	stature_m: number(QUANTITY.extent, "Stature"),
	mass_kg: number(QUANTITY.mass, "Mass, above 0"),
});

/** What a criterion may be about. */
export const SUBJECT_KINDS = [...ACTIVITY_KINDS, ...ELEMENT_KINDS, "habitat"] as const;

export const ownCriterion = z.strictObject({
	id: id("Name of the criterion"),
	title: text("What it asks"),
	applies_to: oneOrSeveral(word(SUBJECT_KINDS, "Kind of activity or element, or habitat"), "What it is about"),
	quantity: id("Summary key, or a quantity of the habitat"),
	comparison: word(["at-most", "at-least"], "Which side is within"),
	limit: number(QUANTITY.limit, "Limit, in the unit given"),
	unit: text("Unit of quantity and limit"),
	force: word(["shall", "should", "information"], "How binding it is"),
	basis: word(["standard", "paper", "common-practice", "unverified"], "How well it is known"),
	source: text("Where it is written"),
	note: text("What else to know"),
});

export const tailoring = z.strictObject({
	criterion: id("Criterion tailored"),
	limit: number(QUANTITY.limit, "Limit used instead"),
	reason: text("Why"),
});

const criteria = object(
	{
		use: list(id("Name of a criteria set"), "Criteria sets assessed against"),
		own: optional(list(ownCriterion, "Criteria of the project's own")),
		tailor: optional(list(tailoring, "Limits used instead of the shipped ones")),
	},
	"What the results are held against",
);

export const assumptions = object(
	{
		settle_threshold_degps: optional(number(QUANTITY.threshold, "Illusion below which it counts as settled")),
		canal_tau_s: optional(number(QUANTITY.canalTau, "Long time constant of the canals")),
		canal_tau_short_s: optional(number(QUANTITY.canalTauShort, "Short time constant of the canals")),
		adaptation_tau_s: optional(number(QUANTITY.adaptationTau, "Adaptation time constant; absent: no adaptation")),
		standoff_m: optional(number(QUANTITY.standoff, "Mass centre to ladder, while climbing")),
		mass_centre_fraction: optional(number(QUANTITY.bodyFraction, "Height of the mass centre over stature")),
		hand_fraction: optional(number(QUANTITY.bodyFraction, "Height of the hands over stature, while climbing")),
		leg_fraction: optional(number(QUANTITY.bodyFraction, "Leg length over stature")),
	},
	"Overrides of the assumptions",
);

export const layoutSchema = z.strictObject({
	format: word([FORMAT], "What kind of file this is"),
	version: described("Version of the format", z.literal(VERSION, { error: `${VERSION}` })),
	title: text("Title of the layout"),
	habitat,
	elements: optional(list(element, "Ladders, hatches, windows, workstations")),
	crew: list(crewMember, "Crew members"),
	activities: list(activity, "What the crew does"),
	assumptions: optional(assumptions),
	criteria,
});

export type LayoutFile = z.infer<typeof layoutSchema>;
export type SpinFile = z.infer<typeof spin>;
export type DeckFile = z.infer<typeof deck>;
export type PhaseFile = z.infer<typeof phase>;
export type ElementFile = z.infer<typeof element>;
export type LadderFile = z.infer<typeof ladder>;
export type HatchFile = z.infer<typeof hatch>;
export type WindowFile = z.infer<typeof window>;
export type WorkstationFile = z.infer<typeof workstation>;
export type CrewMember = z.infer<typeof crewMember>;
export type ActivityFile = z.infer<typeof activity>;
export type ActivityKind = ActivityFile["kind"];
export type ActivityOf<K extends ActivityKind> = Extract<ActivityFile, { kind: K }>;
export type CriterionOwn = z.infer<typeof ownCriterion>;
export type Tailoring = z.infer<typeof tailoring>;
export type AssumptionOverrides = z.infer<typeof assumptions>;
