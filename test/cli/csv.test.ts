import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { deckFile, dropFile } from "../support/layout-of.ts";
import { readCsv } from "./rfc4180.ts";
import { assessed, bundle, demo, offplumb, ruled, scratch } from "./support.ts";

const { folder, remove } = scratch();
beforeAll(bundle);
afterAll(remove);

const read = (...path: string[]): string[][] => readCsv(readFileSync(join(folder, ...path), "utf8"));

describe("the demo", () => {
	type Activity = Record<"id" | "crew" | "phase", string> & { summary: object; reasons: object; series: Record<string, unknown[]> | null };
	let activities: Activity[];
	const file = (a: Activity): string => `${a.id}.${a.crew}.${a.phase}.csv`;
	beforeAll(async () => {
		const { stdout } = await offplumb(["assess", demo, "--json", "--series", "--csv", join(folder, "new/demo")]);
		activities = JSON.parse(stdout).activities;
	});

	test("one file a case, in a folder made for them", () => {
		expect(readdirSync(join(folder, "new/demo")).sort()).toEqual(activities.map(file).sort());
	});

	test("a built case: every series key as columns with their unit, numbers as in the JSON, events beside their sample", () => {
		const built = activities.filter((a) => a.series);
		expect(built.length).toBe(2);
		for (const a of built) {
			const [head, ...rows] = read("new/demo", file(a)) as [string[], ...string[][]];
			const { events, ...series } = a.series ?? {};
			for (const name of head) expect(name).toMatch(/_(s|g|deg|m|mps2|degps)$|^event$/);
			const columns = Object.entries(series).flatMap(([key, values]) =>
				Array.isArray(values[0])
					? ["prograde", "up", "axial"].map(
							(part, i) => [key.replace("_mps2", `_${part}_mps2`), values.map((v) => (v as number[])[i])] as const,
						)
					: [[key, values] as const],
			);
			expect(head).toEqual([...columns.map(([name]) => name), "event"]);
			expect(rows.length).toBe(series.t_s?.length);
			for (const [i, [, values]] of columns.entries()) expect(rows.map((row) => (row[i] === "" ? null : Number(row[i])))).toEqual(values);
			const told = rows.flatMap((row, i) => (row.at(-1) === "" ? [] : [[i, row.at(-1)]]));
			const [release, end] = events as { t_s: number; name: string }[];
			expect(told).toEqual([
				[0, `${release?.name} at 0 s`],
				[rows.length - 1, `${end?.name} at ${end?.t_s} s`],
			]);
		}
	});

	test("a case that is not built: its summary keys, no value, the reason", () => {
		const open = activities.filter((a) => !a.series);
		expect(open.length).toBeGreaterThan(0);
		for (const a of open)
			expect(read("new/demo", file(a))).toEqual([
				["quantity", "value", "reason"],
				...Object.keys(a.summary).map((key) => [key, "", "not built"]),
			]);
	});
});

test("no value where a direction does not exist and where no stars are to be seen", async () => {
	expect((await assessed(ruled({ spin: { rate_rpm: 0 } }), "--csv", join(folder, "still"))).status).toBe(3);
	const [head = [], ...rows] = read("still/drop.one.nominal.csv");
	const empty = head.filter((_, i) => rows.every((row) => row[i] === ""));
	expect(empty).toEqual(["tilt_prograde_deg", "tilt_axial_deg", "head_tilt_deg", "stars_degps"]);
	expect(rows.every((row) => row.length === head.length)).toBe(true);
});

test("ids that are no file names and need quotes stay in the folder and come back whole", async () => {
	const well = 'well, "A"\u2028';
	const layout = ruled({
		crew: [{ id: "../../crew", stature_m: 1.75, mass_kg: 75 }],
		activities: [dropFile({ id: "/etc/été\\:*", crew: "../../crew" })],
		elements: [{ id: well, kind: "hatch", deck: "lower", angle_deg: 0, axial_m: 0, shape: "circle", diameter_m: 2 }],
	});
	expect((await assessed(layout, "--csv", join(folder, "a/b"))).stderr).toBe("");
	expect(readdirSync(folder).sort()).toEqual(["a", "new", "still"]);
	const [name = "", ...others] = readdirSync(join(folder, "a/b"));
	expect(others).toEqual([]);
	expect(name).toBe("%2fetc%2f%e9t%e9%5c%3a%2a.%2e%2e%2f%2e%2e%2fcrew.nominal.csv");
	expect(read("a/b", name).at(-1)?.at(-1)).toMatch(/^passes well, "A"\u2028 at [\d.]+ s; leaves the bay at [\d.]+ s$/);
});

test.each([["Drop"], ["DROP"]])("two cases of one file name, %s and drop, are refused before anything is written", async (id) => {
	const layout = ruled({ decks: [deckFile()], activities: [dropFile(), dropFile({ id })] });
	const { status, stdout, stderr } = await assessed(layout, "--csv", join(folder, "twice"));
	expect(stderr).toMatch(/two cases would be written to/);
	expect({ status, stdout, made: existsSync(join(folder, "twice")) }).toEqual({ status: 2, stdout: "", made: false });
});
