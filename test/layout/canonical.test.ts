import { createHash } from "node:crypto";
import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { sha256, writeLayout } from "../../src/layout/canonical.ts";
import { parseLayout } from "../../src/layout/parse.ts";

const shipped = readdirSync("assets/layout").filter((f) => f.endsWith(".layout.json"));

describe.each(shipped)("%s", (file) => {
	const text = readFileSync(`assets/layout/${file}`, "utf8");
	const result = parseLayout(text);
	if (!result.ok) throw new Error(JSON.stringify(result.problems, null, 1));

	test("is written canonically", () => expect(writeLayout(result.layout)).toBe(text));
	test("reads back equal", () => expect(parseLayout(writeLayout(result.layout))).toEqual(result));
	test("has the digest an independent implementation gives", () => {
		expect(sha256(text)).toBe(createHash("sha256").update(text, "utf8").digest("hex"));
	});
});
