import type { ActivityOf, CriterionOwn, DeckFile, ElementFile, LayoutFile, Tailoring } from "../../src/layout/schema.ts";

export type DropFile = ActivityOf<"drop">;
type SpinFile = LayoutFile["habitat"]["spin"];

/** A closed curved deck, R 34 m, unless said otherwise. */
export const deckFile = (over: Partial<DeckFile> = {}): DeckFile => ({
	id: "lower",
	name: "Deck",
	floor: "curved",
	radius_m: 34,
	from_deg: -180,
	to_deg: 180,
	from_m: -3,
	to_m: 3,
	headroom_m: 2.4,
	...over,
});

/** A point-like object let go at rest 1.5 m above the middle of deck "lower", unless said otherwise. */
export function dropFile(over: Partial<DropFile> = {}): DropFile {
	return {
		id: "drop",
		kind: "drop",
		crew: "one",
		from: { deck: "lower", angle_deg: 0, axial_m: 0, height_m: 1.5 },
		object: { mass_kg: 0.4, diameter_m: 0, drag_coefficient: 0.47 },
		drag: false,
		...over,
	};
}

export interface LayoutParts {
	readonly spin?: SpinFile;
	readonly phases?: LayoutFile["habitat"]["phases"];
	readonly decks?: DeckFile[];
	readonly elements?: ElementFile[];
	readonly activities?: LayoutFile["activities"];
	readonly crew?: LayoutFile["crew"];
	readonly use?: string[];
	readonly own?: CriterionOwn[];
	readonly tailor?: Tailoring[];
}

/** A small layout at 3.6 rpm, not parsed: tests of the mechanics may go where the parser would not. */
export const layoutOf = (parts: LayoutParts = {}): LayoutFile => ({
	format: "offplumb-layout",
	version: 1,
	title: "Test bay",
	habitat: {
		spin: parts.spin ?? { rate_rpm: 3.6 },
		...(parts.phases ? { phases: parts.phases } : {}),
		air: { pressure_kPa: 70.3, temperature_C: 21, oxygen_fraction: 0.265 },
		sky: { axis_ra_deg: 0, axis_dec_deg: 90, zero_deg: 0, sun_ra_deg: 0, sun_dec_deg: 0 },
		decks: parts.decks ?? [deckFile()],
	},
	elements: parts.elements ?? [],
	crew: parts.crew ?? [{ id: "one", stature_m: 1.75, mass_kg: 75 }],
	activities: parts.activities ?? [],
	criteria: { use: parts.use ?? [], own: parts.own ?? [], tailor: parts.tailor ?? [] },
});
