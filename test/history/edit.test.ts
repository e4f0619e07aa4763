import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { type Change, edit, type Path } from "../../src/history/edit.ts";
import { parseLayout } from "../../src/layout/parse.ts";
import type { LayoutFile } from "../../src/layout/schema.ts";

const parsed = parseLayout(readFileSync("assets/layout/larkspur.layout.json", "utf8"));
if (!parsed.ok) throw new Error(JSON.stringify(parsed.problems));
const larkspur = parsed.layout;
const before = JSON.stringify(larkspur);

const set = (path: Path, value: unknown): Change => ({ label: "Set", kind: "set", path, value });
const remove = (path: Path): Change => ({ label: "Remove", kind: "remove", path });

function done(change: Change): LayoutFile {
	const result = edit(larkspur, change);
	if (!result.ok) throw new Error(JSON.stringify(result.problems));
	return result.document;
}
function refused(change: Change): readonly string[] {
	const result = edit(larkspur, change);
	if (result.ok) throw new Error("the edit went through");
	expect(JSON.stringify(larkspur)).toBe(before);
	return result.problems.map((p) => p.path);
}

describe("a set", () => {
	test("changes its place and shares everything else by identity", () => {
		const next = done(set(["habitat", "decks", 0, "radius_m"], 34.04));
		expect(next.habitat.decks[0]?.radius_m).toBe(34.04);
		expect(next.habitat.decks[1]).toBe(larkspur.habitat.decks[1]);
		expect(next.habitat.decks[0]?.walkways).toBe(larkspur.habitat.decks[0]?.walkways);
		expect(next.activities).toBe(larkspur.activities);
		expect(JSON.stringify(larkspur)).toBe(before);
	});
	test("adds a key that is absent, in the place the schema gives it", () => {
		const next = done(set(["activities", 2, "distance_m"], 3));
		expect(Object.keys(next.activities[2] ?? {})).toEqual([
			"id",
			"kind",
			"crew",
			"deck",
			"angle_deg",
			"axial_m",
			"heading_deg",
			"speed_mps",
			"start_mps2",
			"distance_m",
		]);
	});
	test("appends at the index after the last", () => {
		const next = done(set(["crew", 2], { id: "third", stature_m: 1.7, mass_kg: 70 }));
		expect(next.crew.map((c) => c.id)).toEqual(["tall", "short", "third"]);
	});
	test("of an equal value gives the very same document", () => expect(done(set(["title"], larkspur.title))).toBe(larkspur));
	test("does not keep the caller's object", () => {
		const member = { id: "third", stature_m: 1.7, mass_kg: 70 };
		const next = done(set(["crew", 2], member));
		member.mass_kg = -1;
		expect(next.crew[2]?.mass_kg).toBe(70);
	});
});

describe("a removal", () => {
	test("takes an entry out of its list", () => expect(done(remove(["activities", 0])).activities).toHaveLength(8));
	test("takes an optional key away", () => expect(done(remove(["activities", 0, "feet"])).activities[0]).not.toHaveProperty("feet"));
	test("of what something else needs is refused with the reference", () =>
		expect(refused(remove(["elements", 0]))).toEqual(["activities[3].ladder"]));
});

describe("several changes at once", () => {
	test("pass where each alone would be refused", () => {
		const round: Change = {
			label: "Make the hatch round",
			kind: "several",
			changes: [
				{ kind: "set", path: ["elements", 1, "shape"], value: "circle" },
				{ kind: "remove", path: ["elements", 1, "along_m"] },
				{ kind: "remove", path: ["elements", 1, "across_m"] },
				{ kind: "set", path: ["elements", 1, "diameter_m"], value: 0.9 },
			],
		};
		expect(done(round).elements?.[1]).toMatchObject({ shape: "circle", diameter_m: 0.9 });
		expect(refused(set(["elements", 1, "shape"], "circle"))).toEqual([
			"elements[1].diameter_m",
			"elements[1].along_m",
			"elements[1].across_m",
		]);
	});
	test("are all refused where one leads nowhere", () => {
		const change: Change = { label: "x", kind: "several", changes: [set(["title"], "new"), remove(["nothing"])] as never };
		expect(refused(change)).toEqual(["nothing"]);
	});
});

describe("a replacement", () => {
	test("passes the same checks", () => {
		expect(done({ label: "Open", kind: "replace", layout: { ...larkspur, title: "Another" } }).title).toBe("Another");
		expect(refused({ label: "Open", kind: "replace", layout: null })).toEqual(["file"]);
	});
});

describe("refused", () => {
	test.each<[string, Change, string[]]>([
		["a value out of range", set(["habitat", "spin", "rate_rpm"], 90), ["habitat.spin.rate_rpm"]],
		["a value that is no JSON", set(["habitat", "spin", "rate_rpm"], Number.NaN), ["habitat.spin.rate_rpm"]],
		["an undefined value of a needed key", set(["title"], undefined), ["title"]],
		["an unknown key", set(["habitat", "spin", "rate"], 3), ["habitat.spin.rate"]],
		["a path into a number", set(["habitat", "spin", "rate_rpm", "x"], 3), ["habitat.spin.rate_rpm.x"]],
		["a path beyond a list", set(["crew", 7], {}), ["crew[7]"]],
		["a word for a list", set(["crew", "0"], {}), ['crew["0"]']],
		["an empty path", set([], {}), ["file"]],
		["the prototype", set(["__proto__", "polluted"], 1), ["__proto__"]],
		["a key named __proto__", set(["habitat", "__proto__"], { polluted: 1 }), ["habitat.__proto__"]],
		[
			"a place another deck needs",
			set(["habitat", "decks", 0, "to_deg"], 5),
			["habitat.decks[0].walkways[0].to_deg", "elements[3].angle_deg"],
		],
	])("%s", (_, change, paths) => {
		expect(refused(change)).toEqual(paths);
		expect(({} as Record<string, unknown>).polluted).toBeUndefined();
	});
});
