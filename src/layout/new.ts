import { FORMAT, type LayoutFile, VERSION } from "./schema.ts";

/** A small layout to start from: one bay, one crew member, one thing let go. */
export const newLayout = (title: string): LayoutFile => ({
	format: FORMAT,
	version: VERSION,
	title,
	habitat: {
		spin: { rate_rpm: 3 },
		air: { pressure_kPa: 101.3, temperature_C: 21, oxygen_fraction: 0.21 },
		sky: { axis_ra_deg: 0, axis_dec_deg: 90, zero_deg: 0, sun_ra_deg: 0, sun_dec_deg: 0 },
		decks: [
			{
				id: "main",
				name: "Main deck",
				floor: "curved",
				radius_m: 50,
				from_deg: -10,
				to_deg: 10,
				from_m: -2.5,
				to_m: 2.5,
				headroom_m: 2.4,
				walkways: [{ id: "aisle", from_deg: -10, to_deg: 10, from_m: -0.5, to_m: 0.5 }],
			},
		],
	},
	elements: [],
	crew: [{ id: "one", stature_m: 1.72, mass_kg: 72 }],
	activities: [
		{
			id: "drop-tool",
			kind: "drop",
			crew: "one",
			from: { deck: "main", angle_deg: 0, axial_m: 0.3, height_m: 1.3 },
			feet: { angle_deg: -0.5, axial_m: 0, facing_deg: 0 },
			object: { mass_kg: 0.5, diameter_m: 0.05, drag_coefficient: 0.5 },
			drag: false,
		},
	],
	criteria: { use: ["dropped-objects"], own: [], tailor: [] },
});
