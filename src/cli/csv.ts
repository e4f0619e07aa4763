import { SUMMARY_KEYS } from "../activity/keys.ts";
import type { Series, SeriesEvent } from "../activity/result.ts";
import type { AssessedCase } from "../assess.ts";

type Cell = string | number | null;

/** RFC 4180: CRLF, quotes where they are needed; nothing where there is no value. */
const line = (cells: readonly Cell[]): string =>
	`${cells.map((c) => (typeof c === "string" && /[",\r\n]/.test(c) ? `"${c.replaceAll('"', '""')}"` : String(c ?? ""))).join(",")}\r\n`;

/** A case as CSV: its samples, vectors spread over three columns and events beside the sample they follow; or its summary where there are none. */
export function csvOf(c: AssessedCase, series: Series | null): string {
	if (!series) {
		const keys = Object.keys(SUMMARY_KEYS[c.kind]);
		return line(["quantity", "value", "reason"]) + keys.map((k) => line([k, text(c.summary[k]), c.reasons[k] ?? ""])).join("");
	}
	const { events, ...samples } = series;
	const columns: { readonly head: string; readonly values: readonly Cell[] }[] = [];
	for (const [key, values] of Object.entries(samples)) {
		if (Array.isArray(values[0])) {
			const rows = values as readonly (readonly number[])[];
			for (const [i, part] of ["prograde", "up", "axial"].entries())
				columns.push({ head: key.replace("_mps2", `_${part}_mps2`), values: rows.map((r) => r[i] as number) });
		} else columns.push({ head: key, values: values as readonly Cell[] });
	}
	columns.push({ head: "event", values: beside(series.t_s as readonly number[], events as readonly SeriesEvent[]) });
	const heads = line(columns.map((column) => column.head));
	return heads + columns[0]?.values.map((_, i) => line(columns.map((column) => column.values[i] ?? null))).join("");
}

/** The events as one column: each in the row of the last sample that is not after it, with its own instant. */
function beside(times: readonly number[], events: readonly SeriesEvent[]): string[] {
	const column = times.map(() => [] as string[]);
	for (const { t_s, name } of events)
		column[
			Math.max(
				0,
				times.findLastIndex((t) => t <= t_s),
			)
		]?.push(`${name} at ${t_s} s`);
	return column.map((names) => names.join("; "));
}

const text = (value: unknown): string => (value === null ? "" : Array.isArray(value) ? value.join(" ") : String(value));
