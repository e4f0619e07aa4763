import type { AssumptionOverrides, LayoutFile } from "./schema.ts";

export type AssumptionKey = keyof Required<AssumptionOverrides>;

/** A number the mechanics needs and no layout states; the layout may override it. */
export interface Assumption {
	readonly key: AssumptionKey;
	readonly title: string;
	/** In the file's unit; null: the effect is left out. */
	readonly value: number | null;
	readonly unit: string;
	readonly basis: "paper" | "common-practice" | "unverified";
	readonly source: string;
	readonly note: string;
}

const DRILLIS_CONTINI = "Drillis & Contini segment lengths (Winter, Biomechanics and Motor Control of Human Movement, Fig. 4.1)";

export const ASSUMPTIONS: readonly Assumption[] = [
	{
		key: "settle_threshold_degps",
		title: "Illusion settled below",
		value: 2,
		unit: "deg/s",
		basis: "unverified",
		source: "Angular rate thresholds of roll and pitch, about 2 deg/s (Benson et al. 1989, Aviat. Space Environ. Med. 60:205)",
		note: "A perception threshold taken as the end of the illusion.",
	},
	{
		key: "canal_tau_s",
		title: "Canal time constant, long",
		value: 5.7,
		unit: "s",
		basis: "paper",
		source: "Rader, Oman & Merfeld 2009, J. Neurophysiol. 102:2232–44, Table 4",
		note: "Other fits run from 4.2 s (Dai et al. 1999) to about 15 s; results carry that band.",
	},
	{
		key: "canal_tau_short_s",
		title: "Canal time constant, short",
		value: 0.005,
		unit: "s",
		basis: "common-practice",
		source: "Textbook range 0.003–0.005 s of the torsion pendulum",
		note: "Without effect on motions slower than a few hertz.",
	},
	{
		key: "adaptation_tau_s",
		title: "Adaptation time constant",
		value: null,
		unit: "s",
		basis: "paper",
		source: "Rader, Oman & Merfeld 2009, Table 4, gives 80 s where adaptation is modelled",
		note: "Off: the report of the canals decays only by their own time constants.",
	},
	{
		key: "standoff_m",
		title: "Mass centre to ladder while climbing",
		value: 0.3,
		unit: "m",
		basis: "unverified",
		source: "Chosen here; no measured value was read",
		note: "Hand pull is given as a range over 0.25–0.40 m.",
	},
	{
		key: "mass_centre_fraction",
		title: "Mass centre height over stature",
		value: 0.56,
		unit: "",
		basis: "common-practice",
		source: "Whole-body mass centre at 0.55–0.57 of stature, standing",
		note: "0.55 is usual for women; equipment carried is not in it.",
	},
	{
		key: "hand_fraction",
		title: "Hand height over stature while climbing",
		value: 0.82,
		unit: "",
		basis: "unverified",
		source: `Shoulder height 0.818 of stature, ${DRILLIS_CONTINI}`,
		note: "Hands taken to hold at shoulder height above the feet.",
	},
	{
		key: "leg_fraction",
		title: "Leg length over stature",
		value: 0.53,
		unit: "",
		basis: "common-practice",
		source: `Hip height 0.530 of stature, ${DRILLIS_CONTINI}`,
		note: "Sets the Froude number of walking.",
	},
];

export type AssumptionValues = { readonly [K in AssumptionKey]: K extends "adaptation_tau_s" ? number | null : number };

/** An assumption that the layout replaces. */
export interface Overridden extends Assumption {
	/** The layout's value. */
	readonly used: number;
}

/** The values in force and those of the layout's own; the list names what must stand beside the results. */
export function assumptionsOf(layout: Pick<LayoutFile, "assumptions">): { values: AssumptionValues; overridden: Overridden[] } {
	const own = layout.assumptions ?? {};
	const overridden = ASSUMPTIONS.flatMap((a) => {
		const used = own[a.key];
		return used === undefined ? [] : [{ ...a, used }];
	});
	const defaults = Object.fromEntries(ASSUMPTIONS.map((a) => [a.key, a.value])) as unknown as AssumptionValues;
	return { values: { ...defaults, ...own }, overridden };
}
