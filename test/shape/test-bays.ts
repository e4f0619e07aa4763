import type { Habitat } from "../../src/layout/habitat.ts";
import { resolveHabitat } from "../../src/layout/resolve.ts";
import type { ElementFile } from "../../src/layout/schema.ts";
import { deckFile, layoutOf } from "../support/layout-of.ts";

const ladder = (
	id: string,
	angle_deg: number,
	axial_m: number,
	foot_radius_m: number,
	head_radius_m: number,
	facing_deg: number,
): ElementFile => ({
	id,
	kind: "ladder",
	angle_deg,
	axial_m,
	foot_radius_m,
	head_radius_m,
	facing_deg,
	width_m: 0.45,
	rung_spacing_m: 0.3,
	toe_clearance_m: 0.2,
	traffic: "both",
});

/** A flat deck over a curved one, with a window or hatch of either outline in every face. */
export const manyOpenings = (): Habitat =>
	resolveHabitat(
		layoutOf({
			decks: [
				deckFile({ id: "curved", radius_m: 16, from_deg: -15, to_deg: 15, from_m: -2.5, to_m: 2.5, headroom_m: 2.6 }),
				deckFile({ id: "flat", floor: "flat", radius_m: 12, from_deg: -20, to_deg: 20, from_m: -2.5, to_m: 2.5, headroom_m: 2.5 }),
			],
			elements: [
				{
					id: "floor-round",
					kind: "window",
					deck: "curved",
					surface: "floor",
					angle_deg: -8,
					axial_m: -1,
					shape: "circle",
					diameter_m: 0.8,
				},
				{
					id: "end-round",
					kind: "window",
					deck: "curved",
					surface: "end-low",
					angle_deg: 3,
					height_m: 1.3,
					shape: "circle",
					diameter_m: 1.2,
				},
				{
					id: "end-square",
					kind: "window",
					deck: "curved",
					surface: "end-high",
					angle_deg: 3,
					height_m: 1.3,
					shape: "rectangle",
					along_m: 1.7,
					across_m: 0.8,
				},
				{
					id: "ceiling-square",
					kind: "window",
					deck: "curved",
					surface: "ceiling",
					angle_deg: -9,
					axial_m: 1,
					shape: "rectangle",
					along_m: 1.3,
					across_m: 0.8,
				},
				{
					id: "side-round",
					kind: "window",
					deck: "curved",
					surface: "side-low",
					axial_m: 0.5,
					height_m: 1.4,
					shape: "circle",
					diameter_m: 0.7,
				},
				{
					id: "flat-ceiling",
					kind: "window",
					deck: "flat",
					surface: "ceiling",
					angle_deg: 2,
					axial_m: -1,
					shape: "circle",
					diameter_m: 0.6,
				},
				{
					id: "flat-end",
					kind: "window",
					deck: "flat",
					surface: "end-high",
					angle_deg: 6,
					height_m: 1.4,
					shape: "rectangle",
					along_m: 1.2,
					across_m: 0.6,
				},
				{
					id: "flat-side",
					kind: "window",
					deck: "flat",
					surface: "side-high",
					axial_m: 0.5,
					height_m: 1.4,
					shape: "circle",
					diameter_m: 0.7,
				},
				{ id: "round-hatch", kind: "hatch", deck: "flat", angle_deg: 8, axial_m: 0.8, shape: "circle", diameter_m: 0.9 },
				{ id: "square-hatch", kind: "hatch", deck: "flat", angle_deg: -6, axial_m: -0.6, shape: "rectangle", along_m: 1.1, across_m: 0.7 },
				{ id: "outer-hatch", kind: "hatch", deck: "curved", angle_deg: 9, axial_m: -1.5, shape: "rectangle", along_m: 0.9, across_m: 0.6 },
				ladder("ladder", 8, 0.8, 16, 11, 90),
				{ id: "desk", kind: "workstation", deck: "flat", angle_deg: -10, axial_m: 0.8, facing_deg: 180 },
			],
		}),
	);

/** Two whole rings, a hatch at the seam of one of them. */
export const wholeRings = (): Habitat =>
	resolveHabitat(
		layoutOf({
			decks: [deckFile({ id: "rim", radius_m: 8, headroom_m: 2.5 }), deckFile({ id: "hub", radius_m: 5, headroom_m: 2.5 })],
			elements: [
				{ id: "between", kind: "hatch", deck: "hub", angle_deg: 30, axial_m: 0, shape: "rectangle", along_m: 1, across_m: 0.8 },
				{ id: "seam", kind: "hatch", deck: "rim", angle_deg: 180, axial_m: 0, shape: "circle", diameter_m: 1 },
				{ id: "port", kind: "window", deck: "rim", surface: "end-high", angle_deg: 20, height_m: 1.4, shape: "circle", diameter_m: 1.2 },
				ladder("ladder", 30, 0, 8, 4, 45),
				{ id: "desk", kind: "workstation", deck: "rim", angle_deg: -40, axial_m: 0.8, facing_deg: 30 },
			],
		}),
	);
