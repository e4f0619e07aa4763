import type { Series, SummaryValue } from "./activity/result.ts";
import type { Assessed, AssessedCase } from "./assess.ts";
import type { Finding } from "./criteria/row.ts";
import type { Overridden } from "./layout/assumptions.ts";
import { written } from "./quantity/round.ts";
import { reasonsOfSeries } from "./series.ts";

export const ASSESSMENT_FORMAT = "offplumb-assessment";
export const ASSESSMENT_VERSION = 1;

/** The document that screen, command line and review sheet share. */
export interface AssessmentDocument {
	readonly format: typeof ASSESSMENT_FORMAT;
	readonly version: typeof ASSESSMENT_VERSION;
	readonly layout: { readonly title: string; readonly sha256: string };
	readonly tool: { readonly version: string };
	/** Assumptions that the layout replaces, with the value used. */
	readonly assumptions: readonly Overridden[];
	readonly activities: readonly AssessmentActivity[];
	readonly findings: readonly Finding[];
}

export interface AssessmentActivity {
	readonly id: string;
	readonly kind: string;
	readonly crew: string;
	readonly phase: string;
	readonly summary: Readonly<Record<string, SummaryValue>>;
	readonly reasons: Readonly<Record<string, string>>;
	/** Only where asked for; null where the kind is not built. */
	readonly series?: Series | null;
}

/** The assessment as it is written; `series` gives the samples of a case, or null where its kind is not built. */
export function assessmentDocument(
	assessed: Assessed,
	toolVersion: string,
	series?: (c: AssessedCase) => Series | null,
): AssessmentDocument {
	return {
		format: ASSESSMENT_FORMAT,
		version: ASSESSMENT_VERSION,
		layout: { title: assessed.layout.title, sha256: assessed.sha256 },
		tool: { version: toolVersion },
		assumptions: assessed.overridden.map((a) => ({ ...a, used: written(a.used) })),
		activities: assessed.cases.map((c) => activityOf(c, series)),
		findings: assessed.findings.map((f) => ({ ...f, limit: written(f.limit) })),
	};
}

function activityOf(c: AssessedCase, series?: (c: AssessedCase) => Series | null): AssessmentActivity {
	const bare = { id: c.id, kind: c.kind, crew: c.crew, phase: c.phase, summary: c.summary, reasons: c.reasons };
	if (!series) return bare;
	const samples = series(c);
	return { ...bare, reasons: { ...c.reasons, ...(samples ? reasonsOfSeries(samples) : { series: "not built" }) }, series: samples };
}

/**
 * The exit status of an assessment: 1 something outside; else 3 something not assessed or resting on an
 * unverified limit; else 0.
 */
export function exitStatus(assessed: Assessed): 0 | 1 | 3 {
	if (assessed.findings.some((f) => f.result === "outside")) return 1;
	const open = assessed.findings.some((f) => f.result === "not-assessed" || f.basis === "unverified");
	return open || assessed.cases.some((c) => c.motion === null) ? 3 : 0;
}
