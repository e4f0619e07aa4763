import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { parseLayout } from "../../src/layout/parse.ts";
import { problemLine } from "../../src/layout/problem.ts";
import { MOST_BYTES, MOST_DEPTH, scanJson } from "../../src/layout/scan.ts";

const lines = (text: string): string[] => scanJson(text).problems.map(problemLine);

const isJson = (text: string): boolean => {
	try {
		JSON.parse(text);
		return true;
	} catch {
		return false;
	}
};

describe("what is no JSON is refused with line and column", () => {
	test.each([
		["", "line 1, column 1: the end of the file, expected a JSON value"],
		["{", "line 1, column 2: the end of the file, expected a key in quotation marks"],
		['{\n  "a": 1,\n}', 'line 3, column 1: "}", expected a key in quotation marks'],
		['{\n  "a" 1 }', 'line 2, column 7: "1", expected a colon'],
		["[1 2]", 'line 1, column 4: "2]", expected a comma or ]'],
		["[01]", 'line 1, column 3: "1]", expected a comma or ]'],
		["[NaN]", 'line 1, column 2: "NaN]", expected a JSON value'],
		["{'a': 1}", `line 1, column 2: "'a':", expected a key in quotation marks`],
		['"a\nb"', 'line 1, column 3: "\\n", expected an escape in place of a control character'],
		['"\\x"', 'line 1, column 2: "\\\\x\\"", expected an escape that JSON knows'],
		['"abc', "line 1, column 5: the end of the file, expected a closing quotation mark"],
		["1 // one", 'line 1, column 3: "//", expected the end of the file'],
	])("%j", (text, line) => {
		expect(isJson(text)).toBe(false);
		expect(lines(text)).toEqual([line]);
		expect(parseLayout(text).ok).toBe(false);
	});
});

test("it takes for JSON just what the platform's parser takes, seed 99", () => {
	const scrap = fc.array(
		fc.constantFrom("{", "}", "[", "]", ",", ":", '"a"', '"', "\\", "\\u00e9", "1", "-", ".5", "0", "e5", "true", "null", " ", "\n", "é"),
		{ maxLength: 12 },
	);
	fc.assert(
		fc.property(
			fc.oneof(
				scrap.map((s) => s.join("")),
				fc.json(),
				fc.json().map((s) => s.slice(0, -1)),
			),
			(text) => {
				expect(scanJson(text).readable).toBe(isJson(text));
			},
		),
		{ seed: 99, numRuns: 3000 },
	);
});

describe("a key written twice", () => {
	test.each([
		['{ "a": 1, "a": 2 }', ["a"]],
		['{ "x": [ {}, { "b": 1, "c": 1, "b": 1 } ] }', ["x[1].b"]],
		['{ "a": 1, "\\u0061": 2 }', ["a"]],
		['{ "a": { "a": 1 }, "b": { "a": 1 } }', []],
		['{ "__proto__": 1, "__proto__": 2 }', ["__proto__"]],
	])("%s", (text, paths) => expect(scanJson(text).problems.map((p) => p.path)).toEqual(paths));
});

describe("bombs", () => {
	const objects = (depth: number): string => `${'{"a":'.repeat(depth)}1${"}".repeat(depth)}`;
	test(`${MOST_DEPTH} deep is read, one more is not`, () => {
		expect(scanJson("[".repeat(MOST_DEPTH) + "]".repeat(MOST_DEPTH)).readable).toBe(true);
		expect(scanJson(objects(MOST_DEPTH)).readable).toBe(true);
		expect(lines("[".repeat(MOST_DEPTH + 1) + "]".repeat(MOST_DEPTH + 1))).toEqual([
			`line 1, column ${MOST_DEPTH + 1}: "[]]]]]]]]]]]]]]]]]]]]]]]", expected nesting at most 32 deep`,
		]);
		expect(scanJson(objects(MOST_DEPTH + 1)).readable).toBe(false);
	});
	test("brackets in texts do not nest", () => expect(scanJson(JSON.stringify("[".repeat(1000))).readable).toBe(true));
	test("4 MB is counted in UTF-8", () => {
		expect(scanJson(`"${"a".repeat(MOST_BYTES - 2)}"`).readable).toBe(true);
		expect(scanJson(`"${"a".repeat(MOST_BYTES - 1)}"`).readable).toBe(false);
		expect(scanJson(`"${"é".repeat(MOST_BYTES / 2 - 1)}"`).readable).toBe(true);
		expect(scanJson(`"${"é".repeat(MOST_BYTES / 2)}"`).readable).toBe(false);
		expect(scanJson(`"${"😀".repeat(MOST_BYTES / 4)}"`).readable).toBe(false);
	});
	test.each([
		["lists without end", "[".repeat(MOST_BYTES)],
		["objects without end", '{"a":'.repeat(MOST_BYTES / 5)],
		["a text too long", "a".repeat(64 * 1024 * 1024)],
		["a text just too long", `"${"a".repeat(MOST_BYTES)}"`],
	])("%s are answered in less than 50 ms (best of five)", (_, text) => {
		const times = Array.from({ length: 5 }, () => {
			const start = performance.now();
			expect(parseLayout(text).ok).toBe(false);
			return performance.now() - start;
		});
		expect(Math.min(...times)).toBeLessThan(50);
	});
});
