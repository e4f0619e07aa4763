import { describe, expect, it } from "vitest";
import { rowsFor } from "../../src/criteria/rows.ts";
import type { CriterionOwn } from "../../src/layout/schema.ts";
import { layoutOf } from "../support/layout-of.ts";
import { rowOf } from "./row-of.ts";

const shipped = [
	rowOf({ id: "a", set: "one" }),
	rowOf({ id: "b", set: "two", limit: 5, note: "Read with care." }),
	rowOf({ id: "c", set: "always" }),
];
const own: CriterionOwn = {
	id: "mine",
	title: "My own",
	applies_to: "drop",
	quantity: "landing_speed_mps",
	comparison: "at-least",
	limit: 3,
	unit: "m/s",
	force: "shall",
	basis: "common-practice",
	source: "The project",
	note: "n",
};

describe("rows for a layout", () => {
	it("are those of the sets it uses and those that always hold", () => {
		expect(rowsFor(layoutOf({ use: ["two"] }), shipped).rows.map((r) => r.id)).toEqual(["b", "c"]);
		expect(rowsFor(layoutOf(), shipped).rows.map((r) => r.id)).toEqual(["c"]);
	});

	it("say which sets have no row", () => {
		expect(rowsFor(layoutOf({ use: ["two", "grip", "gait"] }), shipped).missing).toEqual(["grip", "gait"]);
		expect(rowsFor(layoutOf({ use: ["one", "two"] }), shipped).missing).toEqual([]);
	});

	it("take the layout's own, for one kind or several, held against any exposure", () => {
		const { rows } = rowsFor(layoutOf({ own: [own, { ...own, id: "other", applies_to: ["drop", "habitat"] }] }), []);
		expect(rows).toEqual([
			{
				id: "mine",
				title: "My own",
				set: "own",
				appliesTo: ["drop"],
				quantity: "landing_speed_mps",
				comparison: "at-least",
				limit: 3,
				unit: "m/s",
				force: "shall",
				basis: "common-practice",
				source: "The project",
				clause: "",
				exposure: "any",
				note: "n",
			},
			expect.objectContaining({ id: "other", appliesTo: ["drop", "habitat"] }),
		]);
	});

	it("take a tailored limit with the old one and the reason in the note, and leave the shipped row as it was", () => {
		const tailor = [
			{ criterion: "b", limit: 7, reason: "Agreed with the crew office." },
			{ criterion: "mine", limit: 1, reason: "Own." },
		];
		const { rows } = rowsFor(layoutOf({ use: ["one", "two"], own: [own], tailor }), shipped);
		const row = (id: string) => rows.find((r) => r.id === id);
		expect(row("b")).toMatchObject({
			limit: 7,
			note: "Read with care. Tailored from 5 J: Agreed with the crew office.",
			basis: "standard",
		});
		expect(row("a")).toMatchObject({ limit: 2, note: "" });
		expect(row("mine")).toMatchObject({ limit: 1, note: "n Tailored from 3 m/s: Own." });
		expect(shipped[1]!.limit).toBe(5);
	});

	it("of the layout's own replace a shipped one of the same id, and say so; tailoring changes only that one", () => {
		const tailor = [{ criterion: "a", limit: 1, reason: "Own." }];
		const parts = { own: [{ ...own, id: "a", unit: "" }], tailor };
		const { rows } = rowsFor(layoutOf({ use: ["one"], ...parts }), shipped);
		expect(rows.map((r) => [r.id, r.set, r.limit])).toEqual([
			["c", "always", 2],
			["a", "own", 1],
		]);
		expect(rows[1]!.note).toBe("n Replaces the shipped criterion of this id. Tailored from 3: Own.");
		expect(rowsFor(layoutOf(parts), shipped).rows.find((r) => r.id === "a")!.note).toBe("n Tailored from 3: Own.");
	});

	it("say which tailoring belongs to none of them, and why", () => {
		const tailor = ["a", "b", "d"].map((criterion) => ({ criterion, limit: 1, reason: "r" }));
		expect(rowsFor(layoutOf({ use: ["one"], tailor }), shipped).untailored).toEqual([
			{ criterion: "b", reason: 'the layout does not use its set "two"' },
			{ criterion: "d", reason: "no criterion has this id" },
		]);
	});
});
