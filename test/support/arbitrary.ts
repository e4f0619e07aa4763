import fc from "fast-check";
import type { DeckFile } from "../../src/layout/schema.ts";
import { type DropFile, deckFile, dropFile, type LayoutParts } from "./layout-of.ts";

/** Finite numbers in a physical range, both ends included. */
export const within = (min: number, max: number): fc.Arbitrary<number> => fc.double({ min, max, noNaN: true, noDefaultInfinity: true });

export interface Toss {
	readonly parts: LayoutParts;
	readonly file: DropFile;
	/** rad/s */
	readonly rate: number;
}

export interface TossRanges {
	readonly floor?: "curved" | "flat";
	readonly atRest?: boolean;
	readonly drag?: boolean;
}

/**
 * A toss in one bay of 5 to 500 m at 0.1 to 1.2 g: in a closed curved bay, or on a flat deck up to 4 m from its middle.
 * Whatever it strikes, it strikes within some seconds.
 */
export const toss = (ranges: TossRanges = {}): fc.Arbitrary<Toss> =>
	fc
		.record({
			floor: ranges.floor ? fc.constant(ranges.floor) : fc.constantFrom<"curved" | "flat">("curved", "flat"),
			radius: within(Math.log(5), Math.log(500)).map(Math.exp),
			level: within(0.1, 1.2),
			headroom: within(2, 4),
			diameter: fc.oneof(fc.constant(0), within(0.01, 0.4)),
			share: within(0.05, 0.95),
			place: within(-1, 1),
			axial: within(-2, 2),
			speed: ranges.atRest ? fc.constant(0) : within(0, 10),
			heading: within(0, 360),
			elevation: within(-90, 90),
		})
		.map(({ floor, radius, level, headroom, diameter, share, place, axial, speed, heading, elevation }) => {
			const rate = Math.sqrt((level * 9.80665) / radius);
			const half = diameter / 2;
			const deck: DeckFile = deckFile({
				floor,
				radius_m: radius,
				headroom_m: headroom,
				...(floor === "flat" ? { from_deg: -75, to_deg: 75 } : {}),
			});
			const file = dropFile({
				from: {
					deck: "lower",
					angle_deg: floor === "flat" ? (Math.atan((4 * place) / radius) * 180) / Math.PI : 180 * place,
					axial_m: axial,
					height_m: half + share * (headroom - diameter),
				},
				object: { mass_kg: 0.3, diameter_m: diameter, drag_coefficient: 0.5 },
				drag: ranges.drag ?? false,
				...(speed > 0 ? { release: { speed_mps: speed, heading_deg: heading, elevation_deg: elevation } } : {}),
			});
			return { parts: { spin: { rate_rpm: (rate * 30) / Math.PI }, decks: [deck] }, file, rate };
		});
