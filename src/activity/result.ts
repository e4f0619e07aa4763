import type { FormulaId } from "./formula.ts";

/** What an assessed number, word, list or unit vector can be; null with its reason where it does not exist. */
export type SummaryValue = number | string | readonly string[] | readonly number[] | null;

export type Basis = "standard" | "paper" | "common-practice" | "unverified";

/** How one summary number came about: a formula with the values put in. Data for screen, sheet and tests alike. */
export interface Derivation {
	readonly formula: FormulaId;
	/** In the order of the formula's terms; units as printed (degrees, rpm and g allowed here, at the edge). */
	readonly inputs: readonly DerivationInput[];
	readonly assumptions: readonly string[];
}

export interface DerivationInput {
	readonly symbol: string;
	readonly name: string;
	readonly value: number | string;
	readonly unit: string;
}

/** Samples against time, keys and units as the contract names them. */
export interface Series {
	readonly [key: string]: readonly (number | null)[] | readonly (readonly number[])[] | readonly SeriesEvent[];
}
export interface SeriesEvent {
	readonly t_s: number;
	readonly name: string;
}

/** One activity in one case (crew × phase), written numbers rounded. */
export interface CaseSummary {
	readonly summary: Readonly<Record<string, SummaryValue>>;
	/** Why a value is null, by summary key. */
	readonly reasons: Readonly<Record<string, string>>;
	readonly derivations: Readonly<Record<string, Derivation>>;
}
