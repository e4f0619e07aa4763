import { topics } from "./all-rows.ts";
import { meter, type TruthRow } from "./compare.ts";

const short = (value: number): string => (value === 0 ? "0" : Number(value.toPrecision(2)).toString());

/** The accuracy table, Markdown: one line a group and unit. */
export function meterTable(rows: readonly TruthRow[]): string {
	const head = ["group", "error in", "n", "mean", "p50", "p90", "max", "allowed", "source"];
	const body = meter(rows).map((l) => [
		l.group,
		l.unit,
		`${l.n}`,
		short(l.mean),
		short(l.p50),
		short(l.p90),
		short(l.max),
		[...new Set(l.allowed)].map(short).join(" to "),
		l.sources.join("; "),
	]);
	return [head, head.map(() => "---"), ...body].map((cells) => `| ${cells.join(" | ")} |`).join("\n");
}

export const allRows = (): TruthRow[] => topics.flatMap((t) => t.rows);
