import { describe, expect, it } from "vitest";
import { judge, marginOf } from "../../src/criteria/judge.ts";
import type { Quantity } from "../../src/criteria/quantity.ts";
import type { CriterionRow } from "../../src/criteria/row.ts";
import { rowOf } from "./row-of.ts";

const WHO = { subject: "drop", crew: "one", phase: "nominal", at: {} };
const held = (over: Partial<CriterionRow>, quantity: Quantity | number, exposure: "sustained" | "transient" = "transient") =>
	judge(rowOf(over), WHO, typeof quantity === "number" ? { value: quantity, unit: "J" } : quantity, exposure);

describe("margins", () => {
	it.each([
		["at-most", 3, 4, 0.25],
		["at-most", 4, 4, 0],
		["at-most", 5, 4, -0.25],
		["at-least", 5, 4, 0.25],
		["at-least", 4, 4, 0],
		["at-least", 3, 4, -0.25],
		["at-most", -5, -4, 0.25],
		["at-least", -5, -4, -0.25],
		["at-most", 0.3, 0, -0.3],
		["at-most", -0.3, 0, 0.3],
		["at-least", 0.3, 0, 0.3],
		["at-least", -0.3, 0, -0.3],
		["at-least", 0, 0, 0],
	] as const)("%s: %d against %d leaves %d", (comparison, value, limit, margin) => {
		expect(marginOf(comparison, value, limit)).toBe(margin);
		const finding = held({ comparison, limit }, value);
		expect(finding).toMatchObject({ value, margin, limit, result: margin >= 0 ? "within" : "outside" });
		expect(finding.reason).toBeUndefined();
	});

	it("are decided on the written values: what differs beyond the ninth figure is equal", () => {
		expect(held({ limit: 2 }, 2 + 4e-9)).toMatchObject({ value: 2, margin: 0, result: "within" });
		expect(held({ limit: 2 }, 2 + 6e-9)).toMatchObject({ value: 2.00000001, result: "outside" });
		expect(held({ comparison: "at-least", limit: 0.3 }, 0.1 + 0.2)).toMatchObject({ value: 0.3, margin: 0, result: "within" });
		expect(held({ limit: 0.3 }, 0.1 + 0.2)).toMatchObject({ result: "within" });
	});

	it("do not turn a narrow miss into a tie", () => {
		expect(held({ limit: 0 }, 1e-9)).toMatchObject({ value: 1e-9, result: "outside" });
		expect(held({ limit: 1 }, 1.00000001)).toMatchObject({ margin: expect.closeTo(-1e-8, 12), result: "outside" });
	});

	it("refuse a value that is no number", () => {
		expect(() => held({}, Number.NaN)).toThrow(RangeError);
		expect(() => held({}, Number.POSITIVE_INFINITY)).toThrow(RangeError);
	});
});

describe("what is not assessed", () => {
	it("is a null value, with its reason and without a margin", () => {
		expect(held({}, { value: null, reason: "nothing was struck" })).toMatchObject({
			value: null,
			margin: null,
			result: "not-assessed",
			reason: "nothing was struck",
		});
	});

	it.each([
		["sustained", "transient", false],
		["transient", "sustained", false],
		["sustained", "sustained", true],
		["transient", "transient", true],
		["any", "transient", true],
		["any", "sustained", true],
	] as const)("a limit for %s values against a %s one: assessed %s", (limit, value, assessed) => {
		const finding = held({ exposure: limit, limit: 2 }, 1, value);
		expect(finding.result).toBe(assessed ? "within" : "not-assessed");
		expect(finding.value).toBe(1);
		if (!assessed) expect([finding.margin, finding.reason]).toEqual([null, `a ${value} value against a ${limit} limit`]);
	});
});

it("a finding says what it rests on", () => {
	const row = rowOf({
		force: "shall",
		basis: "standard",
		source: "A standard",
		clause: "5.3",
		note: "By analogy.",
		unit: "J",
		title: "Energy",
	});
	expect(judge(row, { ...WHO, at: { t_s: 1 } }, { value: 1, unit: "J" }, "transient")).toMatchObject({
		criterion: row.id,
		title: "Energy",
		force: "shall",
		basis: "standard",
		source: "A standard, 5.3",
		note: "By analogy.",
		unit: "J",
		subject: "drop",
		crew: "one",
		phase: "nominal",
		at: { t_s: 1 },
	});
	expect(held({ source: "Bare", clause: "" }, 1).source).toBe("Bare");
});
