import { assess } from "../../src/assess.ts";
import { assessmentDocument } from "../../src/assessment.ts";
import { SHIPPED_ROWS } from "../../src/cli/criteria.ts";
import type { LayoutFile } from "../../src/layout/schema.ts";
import { seriesOf } from "../../src/series.ts";
import { type DropFile, dropFile, type LayoutParts, layoutOf } from "../support/layout-of.ts";

type Vectors = readonly (readonly [number, number, number])[];
type Sizes = readonly number[];

/** The series of the contract. */
export interface DropSeries {
	readonly t_s: Sizes;
	readonly level_g: Sizes;
	readonly tilt_prograde_deg: readonly (number | null)[];
	readonly tilt_axial_deg: readonly (number | null)[];
	readonly head_tilt_deg: readonly (number | null)[];
	readonly c_mps2: Vectors;
	readonly k_mps2: Vectors;
	readonly e_mps2: Vectors;
	readonly a_mps2: Vectors;
	readonly lateral_mps2: Sizes;
	readonly eyes_degps: Sizes;
	readonly stars_degps: readonly (number | null)[];
	readonly ear_degps: Sizes;
	readonly illusion_degps: Sizes;
	readonly disagree_degps: Sizes;
	readonly radius_m: Sizes;
	readonly angle_deg: Sizes;
	readonly axial_m: Sizes;
	readonly events: readonly { readonly t_s: number; readonly name: string }[];
}

export interface Entry {
	readonly id: string;
	readonly kind: string;
	readonly crew: string;
	readonly phase: string;
	readonly summary: Readonly<Record<string, unknown>>;
	readonly reasons: Readonly<Record<string, string>>;
	readonly series?: DropSeries | null;
}

export interface Document {
	readonly activities: readonly Entry[];
	readonly findings: readonly Readonly<Record<string, unknown>>[];
	readonly [key: string]: unknown;
}

/** The assessment as a file would hold it. */
export const documentOf = (layout: LayoutFile, withSeries = false): Document =>
	JSON.parse(JSON.stringify(assessmentDocument(assess(layout, SHIPPED_ROWS), "0", withSeries ? seriesOf : undefined)));

/** The entry of one drop, with its series. */
export function entryOf(parts: LayoutParts, drop: Partial<DropFile> = {}): Entry & { readonly series: DropSeries } {
	const [entry] = documentOf(layoutOf({ ...parts, activities: [dropFile(drop)] }), true).activities;
	if (!entry?.series) throw new RangeError("the drop has no series");
	return { ...entry, series: entry.series };
}
