import { styleText } from "node:util";
import { SUMMARY_KEYS } from "../activity/keys.ts";
import type { SummaryValue } from "../activity/result.ts";
import type { Assessed } from "../assess.ts";
import { orderFindings } from "../criteria/order.ts";
import type { Finding } from "../criteria/row.ts";

const MINUS = "−";
/** A text of the layout on one line of a terminal, which must not obey it. */
const plain = (text: string): string => text.replace(/\p{Cc}/gu, "\uFFFD");
const figures = (value: number): string => {
	const short =
		value === 0 ? "0" : Math.abs(value) >= 1e5 || Math.abs(value) < 1e-4 ? value.toExponential(2) : String(Number(value.toPrecision(3)));
	return short.replaceAll("-", MINUS);
};
const shown = (value: SummaryValue | undefined, unit: string): string => {
	if (value === null || value === undefined) return "none";
	if (typeof value === "number") return `${figures(value)}${unit === "" ? "" : unit === "°" ? unit : ` ${unit}`}`;
	return typeof value === "string" ? value : value.length === 0 ? "none" : value.join(", ");
};

/** The assessment for a terminal: every case with its numbers, every finding, worst first. */
export function assessmentTable(assessed: Assessed, colour: boolean): string {
	const bold = (s: string): string => (colour ? styleText("bold", s) : s);
	const out: string[] = [bold(plain(assessed.layout.title)), `sha256 ${assessed.sha256}`, ""];
	for (const a of assessed.overridden)
		out.push(`Assumption replaced: ${a.title}: ${a.used} ${a.unit} (shipped: ${a.value ?? "off"})`.trim());
	for (const c of assessed.cases) {
		out.push(bold(`${c.id}  ${c.kind}, ${c.crew}, ${c.phase}`));
		if (c.motion === null) out.push("  not built");
		else
			for (const [key, unit] of Object.entries(SUMMARY_KEYS[c.kind])) {
				const reason = c.reasons[key];
				out.push(`  ${key.padEnd(30)} ${shown(c.summary[key], unit)}${reason ? ` (${reason})` : ""}`);
			}
		out.push("");
	}
	for (const force of ["shall", "should", "information"] as const) {
		const list = orderFindings(assessed.findings.filter((f) => f.force === force));
		if (list.length === 0) continue;
		out.push(bold(`Findings, ${force}`));
		for (const f of list) out.push(`  ${plain(findingLine(f))}`);
		out.push("");
	}
	out.push("Results support a review. They do not replace the project's human-rating authority, local codes or licensed practice.", "");
	return out.join("\n");
}

function findingLine(f: Finding): string {
	const who = [f.subject, f.crew, f.phase].filter((s) => s !== null).join(", ");
	const limit = f.quantity === "" ? "" : `${f.comparison} ${figures(f.limit)} ${f.unit}`.trim();
	const value = f.value === null ? "" : `${f.quantity} ${figures(f.value)} ${f.unit}`.trim();
	const held = f.reason
		? `${f.title}: ${f.reason}`
		: `${f.title}: ${value}, ${limit}, margin ${f.margin === null ? "none" : figures(f.margin)}`;
	return `${f.result.padEnd(12)} ${who.padEnd(28)} ${held}${f.basis === "unverified" && f.quantity !== "" ? " [limit unverified, confirm]" : ""}`;
}
