import { SUMMARY_KEYS } from "../activity/keys.ts";
import type { Series } from "../activity/result.ts";
import type { AssessedCase } from "../assess.ts";

/** RFC 4180: CRLF, quotes where they are needed. */
const line = (cells: readonly (string | number)[]): string =>
	`${cells.map((c) => (typeof c === "string" && /[",\r\n]/.test(c) ? `"${c.replaceAll('"', '""')}"` : String(c))).join(",")}\r\n`;

/** A case as CSV: its samples, vectors spread over three columns; or its summary where there are none. */
export function csvOf(c: AssessedCase, series: Series | null): string {
	if (!series) {
		const keys = Object.keys(SUMMARY_KEYS[c.kind]);
		return line(["quantity", "value", "reason"]) + keys.map((k) => line([k, text(c.summary[k]), c.reasons[k] ?? ""])).join("");
	}
	const columns: { readonly head: string; readonly values: readonly number[] }[] = [];
	for (const [key, samples] of Object.entries(series)) {
		if (key === "events") continue;
		if (Array.isArray(samples[0])) {
			const rows = samples as readonly (readonly number[])[];
			for (const [i, part] of ["prograde", "up", "axial"].entries())
				columns.push({ head: key.replace("_mps2", `_${part}_mps2`), values: rows.map((r) => r[i] as number) });
		} else columns.push({ head: key, values: samples as readonly number[] });
	}
	const n = columns[0]?.values.length ?? 0;
	let out = line(columns.map((column) => column.head));
	for (let i = 0; i < n; i++) out += line(columns.map((column) => column.values[i] as number));
	return out;
}

const text = (value: unknown): string => (value === null ? "" : Array.isArray(value) ? value.join(" ") : String(value));
