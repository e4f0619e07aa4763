import { createHash } from "node:crypto";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { sha256, writeLayout } from "../../src/layout/canonical.ts";
import { newLayout } from "../../src/layout/new.ts";
import { parseLayout } from "../../src/layout/parse.ts";
import { shipped, whole } from "./support.ts";

describe.each(shipped)("$file", ({ text }) => {
	const layout = whole(parseLayout(text));
	test("is written canonically", () => expect(writeLayout(layout)).toBe(text));
	test("reads back equal", () => expect(whole(parseLayout(writeLayout(layout)))).toEqual(layout));
	test("has one deck, element, crew member or activity a line", () => {
		const lines = text.split("\n");
		for (const entry of [...layout.habitat.decks, ...(layout.elements ?? []), ...layout.crew, ...layout.activities]) {
			expect(lines.filter((l) => l.trimStart().startsWith(`{ "id": ${JSON.stringify(entry.id)},`))).toHaveLength(1);
		}
		expect(text.endsWith("}\n")).toBe(true);
	});
	test("does not depend on the order of keys or the spacing it was read from", () => {
		const reversed = (value: unknown): unknown => {
			if (Array.isArray(value)) return value.map(reversed);
			if (typeof value !== "object" || value === null) return value;
			return Object.fromEntries(
				Object.entries(value)
					.reverse()
					.map(([k, v]) => [k, reversed(v)]),
			);
		};
		expect(writeLayout(whole(parseLayout(JSON.stringify(reversed(layout), null, "\t"))))).toBe(text);
	});
});

test("numbers are the shortest that read back the same, seed 7", () => {
	fc.assert(
		fc.property(fc.double({ min: 0, max: 60, noNaN: true }), (rate_rpm) => {
			const layout = newLayout("x");
			layout.habitat.spin.rate_rpm = rate_rpm;
			const text = writeLayout(layout);
			expect(text).toContain(`"spin": { "rate_rpm": ${String(rate_rpm + 0)} }`);
			expect(whole(parseLayout(text)).habitat.spin.rate_rpm).toBe(rate_rpm + 0);
		}),
		{ seed: 7, numRuns: 300 },
	);
});

test("any title is read back, seed 8", () => {
	fc.assert(
		fc.property(fc.oneof(fc.string({ unit: "binary" }), fc.constantFrom("\ud800", '"\\\n\u2028')), (title) => {
			expect(whole(parseLayout(writeLayout(newLayout(title)))).title).toBe(title);
		}),
		{ seed: 8, numRuns: 300 },
	);
});

test("what is no layout cannot be written", () => {
	expect(() => writeLayout({ ...newLayout("x"), version: 2 as never })).toThrow("not a layout: version: 2, expected 1");
});

test("the digest is that of an independent implementation, seed 9", () => {
	fc.assert(
		fc.property(fc.string({ unit: "grapheme", maxLength: 300 }), (text) => {
			expect(sha256(text)).toBe(createHash("sha256").update(text, "utf8").digest("hex"));
		}),
		{ seed: 9, numRuns: 200 },
	);
});
