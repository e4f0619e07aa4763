import { describe, expect, test } from "vitest";
import { byMargin, findingKey, grouped, tally, weightiest } from "../../../app/store/findings.ts";
import { findingOf } from "../../support/finding-of.ts";

const outside = (over = {}) => findingOf({ result: "outside", margin: -0.5, ...over });
const open = (over = {}) => findingOf({ result: "not-assessed", value: null, margin: null, reason: "not built", ...over });

describe("order of findings", () => {
	test("outside first, then least margin, not assessed last", () => {
		const a = findingOf({ margin: 0.9 });
		const b = findingOf({ margin: 0.1 });
		const c = outside({ margin: -0.1 });
		const d = outside({ margin: -0.9 });
		const e = open();
		expect([e, a, c, b, d].sort(byMargin)).toEqual([d, c, b, a, e]);
	});

	test("shall, should and information stay apart, empty ones left out", () => {
		const a = findingOf({ force: "information" });
		const b = findingOf({ force: "shall" });
		expect(grouped([a, b]).map((g) => [g.force, g.findings])).toEqual([
			["shall", [b]],
			["information", [a]],
		]);
	});

	test("unverified limits take part in no count", () => {
		const found = [findingOf(), outside(), open(), outside({ basis: "unverified" }), findingOf({ basis: "unverified" })];
		expect(tally(found)).toEqual({ outside: 1, within: 1, notAssessed: 1, unverified: 2 });
	});

	test("a key names criterion, subject, crew and phase", () => {
		const a = findingOf({ criterion: "x" });
		expect(new Set([a, { ...a, subject: "other" }, { ...a, crew: null }, { ...a, phase: "reduced" }].map(findingKey)).size).toBe(4);
	});
});

describe("the finding that matters most", () => {
	test.each([
		["outside before within, whatever the force", [findingOf({ force: "shall", margin: 0 }), outside({ force: "information" })], 1],
		["shall before should", [outside({ force: "should", margin: -9 }), outside({ force: "shall", margin: -0.1 })], 1],
		["should before information", [outside({ force: "information", margin: -9 }), outside({ force: "should", margin: -0.1 })], 1],
		["then the least margin", [outside({ margin: -0.1 }), outside({ margin: -0.2 })], 1],
		[
			"a verified limit before an unverified one",
			[outside({ basis: "unverified", force: "shall" }), findingOf({ force: "information" })],
			1,
		],
		["an unverified one where there is no other", [open(), outside({ basis: "unverified" })], 1],
	])("%s", (_, findings, at) => expect(weightiest(findings)).toBe(findings[at]));

	test("none where nothing is assessed", () => expect(weightiest([open()])).toBeNull());
});
