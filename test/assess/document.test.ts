import { createHash } from "node:crypto";
import { readFileSync } from "node:fs";
import { beforeAll, describe, expect, test } from "vitest";
import { parseLayout } from "../../src/layout/parse.ts";
import type { ActivityKind, LayoutFile } from "../../src/layout/schema.ts";
import { bundle, offplumb, rule } from "../cli/support.ts";
import { shipped, whole } from "../layout/support.ts";
import { deckFile, dropFile, layoutOf } from "../support/layout-of.ts";
import { type Document, documentOf, type Entry } from "./support.ts";

/** The table "Summary keys" of the contract. */
const KEYS: Record<ActivityKind, string> = {
	drop: "struck flight_time_s landing_prograde_m landing_axial_m landing_radius_m landing_speed_mps landing_angle_deg landing_from_feet_prograde_m landing_from_feet_axial_m impact_energy_J equal_earth_drop_m passed",
	walk: "apparent_mps2 apparent_g apparent_ratio tilt_deg friction_demand froude unload_speed_mps",
	climb:
		"duration_s apparent_foot_g apparent_head_g peak_coriolis_mps2 peak_tilt_deg peak_toward_mps2 peak_away_mps2 peak_lateral_mps2 hand_pull_N hand_pull_low_N hand_pull_high_N",
	"sit-stand": "peak_coriolis_mps2 peak_tilt_deg floor_load_min_g head_change_g",
	reach: "peak_side_force_N miss_m",
	"head-turn": "cross_coupled_peak_radps2 illusion_peak_degps illusion_low_degps illusion_high_degps illusion_axis illusion_settle_s",
	"window-view": "gaze_ra_deg gaze_dec_deg star_rate_degps field_roll_degps turn_period_s flash_hz sun_passes_per_turn sun_dwell_s",
	"spin-change": "peak_euler_mps2 tilt_at_half_level_deg level_at_10deg_g over_10deg_s apparent_from_g apparent_to_g",
};
const FINDING = "criterion force subject crew phase quantity value unit limit comparison margin at result basis source note".split(" ");
const OURS = ["title", "reason"];

const still = layoutOf({ spin: { rate_rpm: 0 }, activities: [dropFile()], own: [rule({ limit: 1 / 3 })] });
const layouts: [string, LayoutFile][] = [
	...shipped.map(({ file, text }): [string, LayoutFile] => [file, whole(parseLayout(text))]),
	["a body that nothing strikes", still],
	["assumptions replaced", { ...still, assumptions: { canal_tau_s: 17 / 3, adaptation_tau_s: 80 } }],
];

const several = (ids: string | string[] | undefined): string[] => (ids === undefined ? ["nominal"] : typeof ids === "string" ? [ids] : ids);

function visit(value: unknown, path: string, each: (value: unknown, path: string) => void): void {
	each(value, path);
	if (typeof value === "object" && value !== null) for (const [key, v] of Object.entries(value)) visit(v, `${path}.${key}`, each);
}

/** Keys that hold null, or a list with null in it. */
const holes = (values: object): string[] =>
	Object.entries(values).flatMap(([key, v]) => (v === null || (Array.isArray(v) && v.includes(null)) ? [key] : []));

describe.each(layouts)("%s", (_, layout) => {
	let document: Document;
	let entries: readonly Entry[];
	beforeAll(() => {
		document = documentOf(layout, true);
		entries = document.activities;
	});

	test("names itself, the layout and the tool", () => {
		expect(Object.keys(document)).toEqual(["format", "version", "layout", "tool", "assumptions", "activities", "findings"]);
		expect(document).toMatchObject({ format: "offplumb-assessment", version: 1, layout: { title: layout.title }, tool: { version: "0" } });
		expect(document.layout).toEqual({ title: layout.title, sha256: expect.stringMatching(/^[0-9a-f]{64}$/) });
	});

	test("one entry a case: activities in the file's order, crew, then phases", () => {
		const cases = layout.activities.flatMap((a) =>
			several(a.crew).flatMap((crew) => several(a.phase).map((phase) => ({ id: a.id, kind: a.kind, crew, phase }))),
		);
		expect(entries.map(({ id, kind, crew, phase }) => ({ id, kind, crew, phase }))).toEqual(cases);
	});

	test("summary keys of the kind, exactly and in order; kinds not built are null throughout", () => {
		for (const { kind, summary, reasons, series } of entries) {
			const keys = KEYS[kind as ActivityKind].split(" ");
			expect(Object.keys(summary)).toEqual(keys);
			if (kind === "drop") continue;
			expect(Object.values(summary)).toEqual(keys.map(() => null));
			expect(reasons).toEqual(Object.fromEntries([...keys, "series"].map((key) => [key, "not built"])));
			expect(series).toBeNull();
		}
	});

	test("every number finite and of at most 9 significant figures", () => {
		let numbers = 0;
		visit(document, "", (value, path) => {
			if (typeof value !== "number") return;
			numbers++;
			if (!Number.isFinite(value) || Number(value.toPrecision(9)) !== value || Object.is(value, -0)) throw new Error(`${path} is ${value}`);
		});
		expect(numbers).toBeGreaterThan(1000);
	});

	test("every null has its reason under the same key, and every reason its null", () => {
		for (const { id, summary, reasons, series } of entries) {
			const open = [...holes(summary), ...(series ? holes(series) : ["series"])];
			expect([id, Object.keys(reasons).sort()]).toEqual([id, open.sort()]);
			for (const reason of Object.values(reasons)) expect(reason).toMatch(/\w/);
		}
		for (const f of document.findings) {
			const open = f.value === null || f.margin === null;
			expect([f.criterion, f.result === "not-assessed", "reason" in f]).toEqual([f.criterion, open, open]);
			if (open) expect(f.reason).toMatch(/\w/);
		}
	});

	test("findings have the contract's keys and ours, and words it knows", () => {
		const places = new Set<string>();
		for (const f of document.findings) {
			expect(
				Object.keys(f)
					.filter((key) => !OURS.includes(key))
					.sort(),
			).toEqual([...FINDING].sort());
			expect(["shall", "should", "information"]).toContain(f.force);
			expect(["standard", "paper", "common-practice", "unverified"]).toContain(f.basis);
			expect(["at-most", "at-least"]).toContain(f.comparison);
			expect(["within", "outside", "not-assessed"]).toContain(f.result);
			for (const key of Object.keys(f.at as object)) places.add(key);
		}
		expect(document.findings.length).toBeGreaterThan(0);
		for (const key of places) expect(["t_s", "deck", "angle_deg", "axial_m", "height_m"]).toContain(key);
	});

	test("margins follow from the written value and limit, and results from margins", () => {
		for (const f of document.findings) {
			if (f.margin === null) continue;
			const [value, limit] = [f.value as number, f.limit as number];
			const room = f.comparison === "at-most" ? limit - value : value - limit;
			const margin = limit === 0 ? room : room / Math.abs(limit);
			expect(Math.abs((f.margin as number) - margin)).toBeLessThanOrEqual(1e-8 * Math.max(1, Math.abs(margin)));
			expect(f.result).toBe(margin >= 0 ? "within" : "outside");
		}
	});

	test("findings on a case name one, with the instant and place of the strike", () => {
		for (const f of document.findings) {
			const entry = entries.find((e) => e.id === f.subject && e.crew === f.crew && e.phase === f.phase);
			const deck = layout.habitat.decks.some((d) => d.id === f.subject);
			expect([
				f.subject,
				entry !== undefined || deck || f.subject === "layout" || layout.elements?.some((e) => e.id === f.subject),
			]).toEqual([f.subject, true]);
			if (entry?.kind !== "drop" || entry.summary.flight_time_s === null) continue;
			expect(f.at).toMatchObject({ t_s: entry.summary.flight_time_s, deck: expect.any(String), height_m: expect.any(Number) });
		}
	});

	test("without series: the same, and not a word of them", () => {
		const bare = documentOf(layout);
		expect(JSON.stringify(bare)).not.toContain('"series"');
		const strip = ({ series: _, reasons, ...rest }: Entry): object => ({
			...rest,
			reasons: Object.fromEntries(Object.entries(reasons).filter(([key]) => key in rest.summary)),
		});
		expect(bare).toEqual({ ...document, activities: entries.map(strip) });
	});
});

describe("against the command line, which runs the bundle", () => {
	beforeAll(bundle);
	const { version } = JSON.parse(readFileSync("package.json", "utf8"));

	test.concurrent.each(shipped)("the same rounded numbers: $file", async ({ file, text }) => {
		const { stdout, stderr } = await offplumb(["assess", `assets/layout/${file}`, "--json", "--series"]);
		expect(stderr).toBe("");
		expect(JSON.parse(stdout)).toEqual({ ...documentOf(whole(parseLayout(text)), true), tool: { version } });
	});

	test("sha256 is of the canonical write, whatever the layout's file looks like", async () => {
		const { stdout: canonical } = await offplumb(["new"]);
		const sha256 = createHash("sha256").update(canonical, "utf8").digest("hex");
		const backwards = (value: unknown): unknown =>
			typeof value !== "object" || value === null || Array.isArray(value)
				? Array.isArray(value)
					? value.map(backwards)
					: value
				: Object.fromEntries(
						Object.entries(value)
							.reverse()
							.map(([key, v]) => [key, backwards(v)]),
					);
		const texts = [canonical, JSON.stringify(JSON.parse(canonical)), JSON.stringify(backwards(JSON.parse(canonical)), null, "\t")];
		texts.push(canonical.replace('"rate_rpm": 3 ', '"rate_rpm": 0.30e1 '), `\uFEFF${canonical.replaceAll("\n", "\r\n")}`);
		expect(new Set(texts).size).toBe(5);
		for (const text of texts) expect(documentOf(whole(parseLayout(text))).layout).toMatchObject({ sha256 });
		expect(documentOf(whole(parseLayout(canonical.replace('"rate_rpm": 3 ', '"rate_rpm": 3.1 ')))).layout).not.toMatchObject({ sha256 });
	});
});

test("a case for each crew member and phase, each with its own numbers", () => {
	const layout = layoutOf({
		phases: [{ id: "slow", rate_rpm: 1.8 }],
		decks: [deckFile()],
		activities: [dropFile({ crew: ["one", "two"], phase: ["slow", "nominal"] })],
		crew: [
			{ id: "one", stature_m: 1.5, mass_kg: 50 },
			{ id: "two", stature_m: 1.9, mass_kg: 90 },
		],
	});
	const { activities } = documentOf(layout);
	expect(activities.map((a) => `${a.crew} ${a.phase}`)).toEqual(["one slow", "one nominal", "two slow", "two nominal"]);
	const [slow, nominal] = activities.map((a) => a.summary.flight_time_s as number);
	expect((slow as number) / (nominal as number)).toBeCloseTo(2, 8);
	expect(activities[2]?.summary).toEqual(activities[0]?.summary);
});
