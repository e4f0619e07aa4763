import type { Habitat } from "../../src/layout/habitat.ts";
import { QUANTITY, type Quantity } from "../../src/layout/quantities.ts";
import type { ActivityOf, AssessedCase, Change, LayoutFile } from "../store/core.ts";

/** One number of the layout that can be edited beside the stage. */
export interface Input {
	/** Names the field among all of the layout. */
	readonly key: string;
	readonly label: string;
	readonly range: Quantity;
	readonly step: number;
	readonly value: number;
	readonly change: (value: number) => Change;
}

export interface InputGroup {
	readonly title: "Ring" | "Release" | "Object";
	readonly inputs: readonly Input[];
}

/** The inputs of a case: the ring, and how and what is let go. */
export function inputsOf(layout: LayoutFile, c: AssessedCase): InputGroup[] {
	const { file } = c;
	if (file.kind !== "drop") return [{ title: "Ring", inputs: rate(layout, c.phase) }];
	const index = layout.activities.findIndex((a) => a.id === file.id);
	const part = (name: "from" | "object", key: string, label: string, range: Quantity, step: number): Input =>
		input(label, range, step, (file[name] as Record<string, unknown>)[key] as number, ["activities", index, name, key]);
	const tossed = (file.release?.speed_mps ?? 0) > 0;
	return [
		{ title: "Ring", inputs: [...rate(layout, c.phase), ...radius(layout, c.context.habitat, file.from.deck)] },
		{
			title: "Release",
			inputs: [
				part("from", "height_m", "Height", QUANTITY.size, 0.05),
				part("from", "angle_deg", "Ring angle", QUANTITY.angle, 0.5),
				part("from", "axial_m", "Axial", QUANTITY.axial, 0.05),
				release(file, index, "speed_mps", "Speed", QUANTITY.speed, 0.1),
				...(tossed
					? [
							release(file, index, "heading_deg", "Heading", QUANTITY.angle, 5),
							release(file, index, "elevation_deg", "Elevation", QUANTITY.latitude, 5),
						]
					: []),
			],
		},
		{
			title: "Object",
			inputs: [
				part("object", "mass_kg", "Mass", QUANTITY.mass, 0.05),
				part("object", "diameter_m", "Diameter", QUANTITY.size, 0.01),
				...(file.drag ? [part("object", "drag_coefficient", "Drag coefficient", QUANTITY.dragCoefficient, 0.05)] : []),
			],
		},
	];
}

/** Whether the air slows what an activity lets go. */
export const dragChange = (layout: LayoutFile, id: string, drag: boolean): Change => ({
	label: drag ? "Switch air drag on" : "Switch air drag off",
	kind: "set",
	path: ["activities", layout.activities.findIndex((a) => a.id === id), "drag"],
	value: drag,
});

function input(label: string, range: Quantity, step: number, value: number, path: readonly (string | number)[]): Input {
	const set = (next: number): Change => ({ label: `Set ${label.toLowerCase()}`, kind: "set", path, value: next });
	return { key: path.join("."), label, range, step, value, change: set };
}

type Drop = ActivityOf<"drop">;
type Release = NonNullable<Drop["release"]>;

const AT_REST: Release = { speed_mps: 0, heading_deg: 0, elevation_deg: 0 };

/** A speed of 0 is a drop: the release is then left out, as in the file. */
function release(file: Drop, index: number, key: keyof Release, label: string, range: Quantity, step: number): Input {
	const path = ["activities", index, "release"] as const;
	const change = (value: number): Change => {
		const next = { ...(file.release ?? AT_REST), [key]: value };
		const named = { label: `Set ${label.toLowerCase()}` };
		return next.speed_mps > 0 ? { ...named, kind: "set", path, value: next } : { ...named, kind: "remove", path };
	};
	return { key: [...path, key].join("."), label, range, step, value: file.release?.[key] ?? 0, change };
}

/** The rate of a phase; none on a profile, which has no single number to edit. */
function rate({ habitat }: LayoutFile, phase: string): Input[] {
	const index = habitat.phases?.findIndex((p) => p.id === phase) ?? -1;
	const other = habitat.phases?.[index];
	if (other) return [input("Spin rate", QUANTITY.rate, 0.1, other.rate_rpm, ["habitat", "phases", index, "rate_rpm"])];
	if (habitat.spin.profile) return [];
	return [input("Spin rate", QUANTITY.rate, 0.1, habitat.spin.rate_rpm, ["habitat", "spin", "rate_rpm"])];
}

/** A deck moved outward or inward takes along the feet of the ladders that stand on it. */
function radius(layout: LayoutFile, { ladders }: Habitat, id: string): Input[] {
	const index = layout.habitat.decks.findIndex((d) => d.id === id);
	const deck = layout.habitat.decks[index];
	if (!deck) return [];
	const path = ["habitat", "decks", index, "radius_m"];
	const change = (value: number): Change => ({
		label: `Set radius of the ${deck.name}`,
		kind: "several",
		changes: [
			{ kind: "set", path, value },
			...(layout.elements ?? []).flatMap((e, i) =>
				e.kind === "ladder" && ladders.some((l) => l.id === e.id && l.deck === index)
					? [{ kind: "set" as const, path: ["elements", i, "foot_radius_m"], value: e.foot_radius_m + value - deck.radius_m }]
					: [],
			),
		],
	});
	return [{ key: path.join("."), label: "Deck radius", range: QUANTITY.radius, step: 0.5, value: deck.radius_m, change }];
}
