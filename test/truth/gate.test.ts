import { describe, expect, it } from "vitest";
import { topics } from "./all-rows.ts";
import { compare } from "./compare.ts";

describe("truth gate", () => {
	it("has found its topics", () => {
		expect(topics.map((t) => t.topic)).toEqual(expect.arrayContaining(["canals", "stars"]));
	});

	it("names every check once, with a source and a flag", () => {
		const names = topics.flatMap((t) => t.rows.map((r) => `${r.group}: ${r.check}`));
		expect(names.filter((name, i) => names.indexOf(name) !== i)).toEqual([]);
		for (const t of topics) for (const r of t.rows) expect(r.source && r.flag, `${r.group}: ${r.check}`).toBeTruthy();
	});

	for (const { topic, rows } of topics)
		describe(topic, () => {
			it("has rows", () => {
				expect(rows.length).toBeGreaterThan(0);
			});
			it.each(rows)("$group: $check", (row) => {
				const { error, within } = compare(row);
				expect(
					within,
					`ours ${row.ours}, reference ${row.reference} ${row.unit} (${row.source}): ${row.kind} error ${error} > ${row.tolerance}`,
				).toBe(true);
			});
		});
});
