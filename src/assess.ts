import type { Context } from "./activity/context.ts";
import { computeDrop, type Drop, summariseDrop } from "./activity/drop.ts";
import { SUMMARY_KEYS } from "./activity/keys.ts";
import type { CaseSummary } from "./activity/result.ts";
import { notBuilt } from "./activity/summary.ts";
import { evaluate } from "./criteria/evaluate.ts";
import type { CriterionRow, Finding } from "./criteria/row.ts";
import { prepareWorld } from "./flight/world.ts";
import { assumptionsOf, type Overridden } from "./layout/assumptions.ts";
import { sha256, writeLayout } from "./layout/canonical.ts";
import type { Habitat } from "./layout/habitat.ts";
import { type Case, cases, resolveHabitat, spinOf } from "./layout/resolve.ts";
import type { ActivityFile, LayoutFile } from "./layout/schema.ts";

/** What an activity computed beyond its summary; null where its kind is not built yet. */
export type Motion = Drop | null;

export interface AssessedCase extends CaseSummary {
	readonly id: string;
	readonly kind: ActivityFile["kind"];
	readonly crew: string;
	readonly phase: string;
	readonly file: ActivityFile;
	readonly context: Context;
	readonly motion: Motion;
}

export interface Assessed {
	readonly layout: LayoutFile;
	readonly sha256: string;
	readonly habitat: Habitat;
	readonly cases: readonly AssessedCase[];
	readonly findings: readonly Finding[];
	/** Assumptions that the layout replaces. */
	readonly overridden: readonly Overridden[];
}

/** The one door: a layout and the shipped criteria rows in, every case and every finding out. The layout must have been parsed. */
export function assess(layout: LayoutFile, shipped: readonly CriterionRow[]): Assessed {
	const habitat = resolveHabitat(layout);
	const world = prepareWorld(habitat);
	const assessed = cases(layout).map((one) => assessCase(layout, habitat, world, one));
	return {
		layout,
		sha256: sha256(writeLayout(layout)),
		habitat,
		cases: assessed,
		findings: evaluate(layout, habitat, assessed, shipped),
		overridden: assumptionsOf(layout).overridden,
	};
}

function assessCase(layout: LayoutFile, habitat: Habitat, world: Context["world"], { activity, crew, phase }: Case): AssessedCase {
	const { values } = assumptionsOf(layout);
	const context: Context = {
		habitat,
		world,
		spin: spinOf(layout, phase, activity.start_s ?? 0),
		phase,
		person: { id: crew.id, stature: crew.stature_m, mass: crew.mass_kg },
		canals: { cupula: values.canal_tau_s, short: values.canal_tau_short_s, adaptation: values.adaptation_tau_s },
	};
	const who = { id: activity.id, kind: activity.kind, crew: crew.id, phase, file: activity, context };
	if (activity.kind === "drop") {
		const motion = computeDrop(context, activity);
		return { ...who, ...summariseDrop(context, activity, motion), motion };
	}
	return { ...who, ...notBuilt(Object.keys(SUMMARY_KEYS[activity.kind])), motion: null };
}
