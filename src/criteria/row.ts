import type { Basis } from "../activity/result.ts";

/** One requirement or published limit. Shipped rows live in assets/criteria and reach the core as an argument. */
export interface CriterionRow {
	readonly id: string;
	readonly title: string;
	/** The set of contract.md that brings it in, e.g. "dropped-objects". */
	readonly set: string;
	/** Activity kinds or element kinds, or "habitat" for rows on every deck in every phase. */
	readonly appliesTo: readonly string[];
	/** A summary key, or a quantity named in quantity.ts. */
	readonly quantity: string;
	readonly comparison: "at-most" | "at-least";
	readonly limit: number;
	/** Of the limit; empty: that of the quantity. */
	readonly unit: string;
	readonly force: "shall" | "should" | "information";
	readonly basis: Basis;
	readonly source: string;
	/** Clause, table or page; empty where the source has none or it was not read. */
	readonly clause: string;
	/** "sustained" limits are not held against transient values. */
	readonly exposure: "sustained" | "transient" | "any";
	readonly note: string;
}

export interface Finding {
	readonly criterion: string;
	readonly title: string;
	readonly force: "shall" | "should" | "information";
	/** Activity, element or deck id. */
	readonly subject: string;
	readonly crew: string | null;
	readonly phase: string;
	/** Empty where the finding is about no row: a set or a tailoring that leads nowhere. */
	readonly quantity: string;
	readonly value: number | null;
	/** Of value and limit both. */
	readonly unit: string;
	/** Stands for nothing (0) where `quantity` is empty. */
	readonly limit: number;
	readonly comparison: "at-most" | "at-least";
	/** Relative; null where not assessed. */
	readonly margin: number | null;
	readonly at: FindingPlace;
	readonly result: "within" | "outside" | "not-assessed";
	/** Why it is not assessed; absent otherwise. */
	readonly reason?: string;
	readonly basis: Basis;
	readonly source: string;
	readonly note: string;
}

export interface FindingPlace {
	readonly t_s?: number;
	readonly deck?: string;
	readonly angle_deg?: number;
	readonly axial_m?: number;
	readonly height_m?: number;
}
