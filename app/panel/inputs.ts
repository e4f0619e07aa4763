import { QUANTITY, type Quantity } from "../../src/layout/quantities.ts";
import type { ActivityOf, AssessedCase, Change, LayoutFile } from "../store/core.ts";

/** One number of the layout that can be edited beside the stage. */
export interface Input {
	/** Names the field in the undo menu ("Undo set spin rate") and merges its steps. */
	readonly key: string;
	readonly label: string;
	/** Where the label alone would not say what was changed. */
	readonly undoLabel?: string;
	readonly range: Quantity;
	readonly step: number;
	readonly value: number;
	readonly set: (layout: LayoutFile, value: number) => LayoutFile;
}

export interface InputGroup {
	readonly title: string;
	readonly inputs: readonly Input[];
}

/** The inputs of a case: the ring, and how and what is let go. */
export function inputsOf(layout: LayoutFile, c: AssessedCase): InputGroup[] {
	const { file } = c;
	if (file.kind !== "drop") return [ring(layout, c.phase, null)];
	const part = <K extends "from" | "object">(name: K, key: string, label: string, range: Quantity, step: number): Input => ({
		key: `${file.id}.${name}.${key}`,
		label,
		range,
		step,
		value: (file[name] as Record<string, unknown>)[key] as number,
		set: (l, value) => withDrop(l, file.id, (d) => ({ ...d, [name]: { ...d[name], [key]: value } })),
	});
	const release = (key: keyof Release, label: string, range: Quantity, step: number): Input => ({
		key: `${file.id}.release.${key}`,
		label,
		range,
		step,
		value: file.release?.[key] ?? 0,
		set: (l, value) => withDrop(l, file.id, (d) => withRelease(d, key, value)),
	});
	const tossed = (file.release?.speed_mps ?? 0) > 0;
	return [
		ring(layout, c.phase, file.from.deck),
		{
			title: "Release",
			inputs: [
				part("from", "height_m", "Height", QUANTITY.size, 0.05),
				part("from", "angle_deg", "Ring angle", QUANTITY.angle, 0.5),
				part("from", "axial_m", "Axial", QUANTITY.axial, 0.05),
				release("speed_mps", "Speed", QUANTITY.speed, 0.1),
				...(tossed
					? [release("heading_deg", "Heading", QUANTITY.angle, 5), release("elevation_deg", "Elevation", QUANTITY.latitude, 5)]
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

type Drop = ActivityOf<"drop">;
type Release = NonNullable<Drop["release"]>;

const AT_REST: Release = { speed_mps: 0, heading_deg: 0, elevation_deg: 0 };

/** A speed of 0 is a drop: the release is then left out, as in the file. */
function withRelease(drop: Drop, key: keyof Release, value: number): Drop {
	const next = { ...(drop.release ?? AT_REST), [key]: value };
	if (next.speed_mps > 0) return { ...drop, release: next };
	const { release: _, ...rest } = drop;
	return rest;
}

const withDrop = (layout: LayoutFile, id: string, change: (drop: Drop) => Drop): LayoutFile => ({
	...layout,
	activities: layout.activities.map((a) => (a.id === id && a.kind === "drop" ? change(a) : a)),
});

/** Whether the air slows what an activity lets go. */
export const dragChange = (id: string, drag: boolean): Change => ({
	label: drag ? "switch air drag on" : "switch air drag off",
	apply: (layout) => withDrop(layout, id, (d) => ({ ...d, drag })),
});

export const changeOf = (input: Input, value: number): Change => ({
	label: input.undoLabel ?? `set ${input.label.toLowerCase()}`,
	key: input.key,
	apply: (layout) => input.set(layout, value),
});

function ring(layout: LayoutFile, phase: string, deckId: string | null): InputGroup {
	const { spin, phases, decks } = layout.habitat;
	const other = phases?.find((p) => p.id === phase);
	const deck = decks.find((d) => d.id === deckId);
	const rate: Input = {
		key: `rate.${phase}`,
		label: "Spin rate",
		range: QUANTITY.rate,
		step: 0.1,
		value: other?.rate_rpm ?? spin.rate_rpm,
		set: (l, value) => ({
			...l,
			habitat: other
				? { ...l.habitat, phases: (l.habitat.phases ?? []).map((p) => (p.id === phase ? { ...p, rate_rpm: value } : p)) }
				: { ...l.habitat, spin: { ...l.habitat.spin, rate_rpm: value } },
		}),
	};
	const radius = deck && {
		key: `radius.${deck.id}`,
		label: "Deck radius",
		undoLabel: `set radius of the ${deck.name}`,
		range: QUANTITY.radius,
		step: 0.5,
		value: deck.radius_m,
		set: (l: LayoutFile, value: number) => withRadius(l, deck.id, value),
	};
	// On a profile the rate at hand is the profile's, which has no single number to edit.
	const profiled = other === undefined && spin.profile !== undefined;
	return { title: "Ring", inputs: [...(profiled ? [] : [rate]), ...(radius ? [radius] : [])] };
}

/** How far a ladder's foot may stand from its deck's floor, m, as the layout file allows. */
const FOOT_SLACK = 0.05;

/** A deck moved outward or inward takes along the feet of the ladders that stand on it. */
function withRadius(layout: LayoutFile, id: string, radius: number): LayoutFile {
	const before = layout.habitat.decks.find((d) => d.id === id)?.radius_m;
	if (before === undefined) return layout;
	const elements = layout.elements?.map((e) =>
		e.kind === "ladder" && Math.abs(e.foot_radius_m - before) <= FOOT_SLACK
			? { ...e, foot_radius_m: e.foot_radius_m + radius - before }
			: e,
	);
	return {
		...layout,
		habitat: { ...layout.habitat, decks: layout.habitat.decks.map((d) => (d.id === id ? { ...d, radius_m: radius } : d)) },
		...(elements ? { elements } : {}),
	};
}
