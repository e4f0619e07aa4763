import * as z from "zod/mini";
import { flag, id, number, optional, word } from "./field.ts";
import { QUANTITY } from "./quantities.ts";

/** Elements: what is fixed in the bays. An opening is a rectangle or a circle; a window says on which surface it lies. */

const head = { id: id("Name of the element") };
const deck = id("Deck it is on");
const solid = optional(flag("What flies strikes it; absent: false"));
const angle = number(QUANTITY.angle, "Ring angle of its centre, positive the way the floor moves");
const axial = number(QUANTITY.axial, "Position of its centre along the spin axis");
const height = number(QUANTITY.size, "Height of its centre above the floor");
const facing = (who: string) => number(QUANTITY.angle, `Heading ${who} looks: 0 prograde, 90 axial`);

const rectangle = {
	shape: word(["rectangle"], "Outline"),
	along_m: number(QUANTITY.extent, "Size along prograde (on a side: axial)"),
	across_m: number(QUANTITY.extent, "Size across (floor, ceiling: axial; ends, sides: up)"),
};
const circle = { shape: word(["circle"], "Outline"), diameter_m: number(QUANTITY.extent, "Diameter") };

export const ladder = z.strictObject({
	...head,
	kind: word(["ladder"], "Kind of element"),
	angle_deg: angle,
	axial_m: axial,
	foot_radius_m: number(QUANTITY.ladderRadius, "Distance of the foot from the spin axis: the floor of its deck within 0.05 m"),
	head_radius_m: number(QUANTITY.ladderRadius, "Distance of the head from the spin axis"),
	facing_deg: facing("the climber"),
	width_m: number(QUANTITY.extent, "Clear width"),
	rung_spacing_m: number(QUANTITY.extent, "Rung to rung"),
	toe_clearance_m: number(QUANTITY.size, "Clearance behind the rungs"),
	traffic: word(["up", "down", "both"], "Which way it is climbed"),
	solid,
});

const hatchHead = { ...head, kind: word(["hatch"], "Kind of element"), deck, angle_deg: angle, axial_m: axial };
const rectangularHatch = z.strictObject({ ...hatchHead, ...rectangle, solid });
const circularHatch = z.strictObject({ ...hatchHead, ...circle, solid });
export const hatch = z.discriminatedUnion("shape", [rectangularHatch, circularHatch], { error: "rectangle or circle" });

const FLAT_SURFACES = ["floor", "ceiling"] as const;
const END_SURFACES = ["end-low", "end-high"] as const;
const SIDE_SURFACES = ["side-low", "side-high"] as const;
export const SURFACES = [...FLAT_SURFACES, ...END_SURFACES, ...SIDE_SURFACES] as const;

const windowHead = { ...head, kind: word(["window"], "Kind of element"), deck };
const surface = <const T extends readonly [string, ...string[]]>(words: T) => word(words, "Surface it lies on");
const onFlat = { ...windowHead, surface: surface(FLAT_SURFACES), angle_deg: angle, axial_m: axial };
const onEnd = { ...windowHead, surface: surface(END_SURFACES), angle_deg: angle, height_m: height };
const onSide = { ...windowHead, surface: surface(SIDE_SURFACES), axial_m: axial, height_m: height };

const surfaceError = { error: `one of ${SURFACES.join(", ")}` };
const rectangularWindow = z.discriminatedUnion(
	"surface",
	[
		z.strictObject({ ...onFlat, ...rectangle, solid }),
		z.strictObject({ ...onEnd, ...rectangle, solid }),
		z.strictObject({ ...onSide, ...rectangle, solid }),
	],
	surfaceError,
);
const circularWindow = z.discriminatedUnion(
	"surface",
	[
		z.strictObject({ ...onFlat, ...circle, solid }),
		z.strictObject({ ...onEnd, ...circle, solid }),
		z.strictObject({ ...onSide, ...circle, solid }),
	],
	surfaceError,
);
export const window = z.discriminatedUnion("shape", [rectangularWindow, circularWindow], { error: "rectangle or circle" });

export const workstation = z.strictObject({
	...head,
	kind: word(["workstation"], "Kind of element"),
	deck,
	angle_deg: angle,
	axial_m: axial,
	facing_deg: facing("the seated person"),
	solid,
});

export const ELEMENT_KINDS = ["ladder", "hatch", "window", "workstation"] as const;
export const element = z.discriminatedUnion("kind", [ladder, hatch, window, workstation], { error: `one of ${ELEMENT_KINDS.join(", ")}` });
