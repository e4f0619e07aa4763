import demo from "../../assets/layout/larkspur.layout.json?raw";
import { type Assessed, type AssessedCase, assess } from "../../src/assess.ts";
import type { CriterionRow } from "../../src/criteria/row.ts";
import type { LayoutFile } from "../../src/layout/schema.ts";

export { FORMULAS } from "../../src/activity/formula.ts";
export type { Derivation } from "../../src/activity/result.ts";
export type { Finding } from "../../src/criteria/row.ts";
export type { Change } from "../../src/history/edit.ts";
export { writeLayout } from "../../src/layout/canonical.ts";
export { newLayout } from "../../src/layout/new.ts";
export { parseLayout } from "../../src/layout/parse.ts";
export type { Problem } from "../../src/layout/problem.ts";
export type { ActivityOf, LayoutFile } from "../../src/layout/schema.ts";
export type { Assessed, AssessedCase };

/** The shipped criteria, all files of the folder. */
const SHIPPED = Object.values(
	import.meta.glob<readonly CriterionRow[]>("../../assets/criteria/*.json", { eager: true, import: "default" }),
).flat();

export const assessLayout = (layout: LayoutFile): Assessed => assess(layout, SHIPPED);

/** The layout that is open when none was asked for. */
export const DEMO: string = demo;
