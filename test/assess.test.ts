import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { assess } from "../src/assess.ts";
import { exitStatus } from "../src/assessment.ts";
import { SHIPPED_ROWS } from "../src/cli/criteria.ts";
import { parseLayout } from "../src/layout/parse.ts";
import { odexFlight } from "./truth/odex-flight.ts";
import type { Throw } from "./truth/ring-equations.ts";

const parsed = parseLayout(readFileSync(new URL("../assets/layout/larkspur.layout.json", import.meta.url), "utf8"));
if (!parsed.ok) throw new Error(JSON.stringify(parsed.problems));
const { layout } = parsed;
const assessed = assess(layout, SHIPPED_ROWS);
const caseOf = (id: string) => assessed.cases.find((c) => c.id === id)!;

const RATE = (3.6 * Math.PI) / 30;
const R = 34;

describe("the shipped demo", () => {
	it("has a case for every activity, crew member and phase", () => {
		expect(assessed.cases.map((c) => [c.id, c.crew, c.phase].join(" "))).toEqual([
			"drop-driver tall nominal",
			"toss-pouch tall nominal",
			"walk-against tall nominal",
			"climb-a tall nominal",
			"climb-a tall reduced",
			"climb-a short nominal",
			"climb-a short reduced",
			"stand-up tall nominal",
			"reach-panel tall nominal",
			"look-left tall nominal",
			"look-down tall nominal",
			"spin-down tall nominal",
		]);
	});

	it("lands its dropped driver where the formula says: s = R (tan φ − φ), cos φ = (R − h) / (R − d/2)", () => {
		const [r0, reach] = [R - 1.5, R - 0.03];
		const phi = Math.acos(r0 / reach);
		const arc = R * (Math.tan(phi) - phi);
		const [down, against] = [RATE * r0 * Math.sin(phi), RATE * (reach - r0 * Math.cos(phi))];
		const speed = Math.hypot(down, against);
		const expected = {
			flight_time_s: Math.tan(phi) / RATE,
			landing_prograde_m: -arc,
			landing_axial_m: 0,
			landing_radius_m: R,
			landing_speed_mps: speed,
			landing_angle_deg: (Math.atan2(against, down) * 180) / Math.PI,
			landing_from_feet_prograde_m: -arc + (R * 0.7 * Math.PI) / 180,
			landing_from_feet_axial_m: 0.25,
			impact_energy_J: 0.2 * speed ** 2,
			equal_earth_drop_m: speed ** 2 / (2 * 9.80665),
		};
		const { summary } = caseOf("drop-driver");
		expect(summary).toMatchObject({ struck: "deck:lower", passed: [] });
		for (const [key, value] of Object.entries(expected))
			expect(Math.abs((summary[key] as number) - value), key).toBeLessThan(5e-9 * (1 + Math.abs(value)));
	});

	it("lands its tossed pouch, slowed by the air, where odex does", () => {
		const air = (70_300 * (0.265 * 0.0319988 + 0.735 * 0.0280134)) / (8.314462618 * 294.15);
		const thrown: Throw = {
			floor: "curved",
			radius: R,
			headroom: 2.4,
			middleDeg: 0,
			halfSpanDeg: 15,
			axialFrom: -3,
			axialTo: 3,
			angleDeg: 0,
			axial: 0,
			height: 1.4,
			speed: 3,
			headingDeg: 0,
			elevationDeg: 30,
			diameter: 0.12,
			drag: (air * 1 * Math.PI * 0.12 ** 2) / 4 / (2 * 0.2),
			spin: [{ t: 0, rpm: 3.6 }],
		};
		const theirs = odexFlight(thrown);
		const { summary } = caseOf("toss-pouch");
		expect(summary.struck).toBe(`${theirs.struck}:lower`);
		for (const [key, value] of [
			["flight_time_s", theirs.time],
			["landing_prograde_m", theirs.prograde!],
			["landing_speed_mps", theirs.speed],
			["landing_angle_deg", (theirs.angle * 180) / Math.PI],
		] as const)
			expect(Math.abs((summary[key] as number) - value), key).toBeLessThan(2e-8 * (1 + Math.abs(value)));
		expect(summary.landing_from_feet_prograde_m).toBeNull();
	});

	it("is held against every row: decks in both phases, drops in their cases, unbuilt sets said", () => {
		const { findings } = assessed;
		const decks = SHIPPED_ROWS.filter(
			(r) => r.appliesTo.includes("habitat") && (r.set === "always" || layout.criteria.use.includes(r.set)),
		);
		const drops = SHIPPED_ROWS.filter((r) => r.appliesTo.includes("drop") && layout.criteria.use.includes(r.set));
		expect(decks.length).toBeGreaterThan(15);
		expect(drops.length).toBeGreaterThan(3);
		for (const row of decks)
			expect(
				findings.filter((f) => f.criterion === row.id && f.crew !== "one"),
				row.id,
			).toHaveLength(4);
		for (const row of drops)
			expect(
				findings.filter((f) => f.criterion === row.id).map((f) => f.subject),
				row.id,
			).toEqual(["drop-driver", "toss-pouch"]);
		const shipped = new Set(SHIPPED_ROWS.map((r) => r.set));
		for (const set of layout.criteria.use.filter((s) => !shipped.has(s)))
			expect(
				findings.find((f) => f.criterion === set),
				set,
			).toMatchObject({ result: "not-assessed" });
	});

	it("finds the driver on the walkway, at the instant and place where it lands", () => {
		const { summary } = caseOf("drop-driver");
		const finding = assessed.findings.find((f) => f.criterion === "dropped-walkway" && f.subject === "drop-driver")!;
		expect(finding).toMatchObject({
			value: 1,
			margin: -1,
			result: "outside",
			force: "should",
			at: { deck: "lower", axial_m: 0.25, height_m: 0, t_s: summary.flight_time_s },
		});
		expect((finding.at.angle_deg! * Math.PI * R) / 180).toBeCloseTo(summary.landing_prograde_m as number, 7);
		expect(exitStatus(assessed)).toBe(1);
	});

	it("puts the levels of its decks at Ω²R", () => {
		const level = (rpm: number, radius: number): number => ((rpm * Math.PI) / 30) ** 2 * (radius / 9.80665);
		const values = assessed.findings.filter((f) => f.criterion === "level-above-3g").map((f) => [f.subject, f.phase, f.value] as const);
		expect(values.map(([deck, phase]) => `${deck} ${phase}`)).toEqual(["lower nominal", "upper nominal", "lower reduced", "upper reduced"]);
		for (const [i, value] of [level(3.6, 34), level(3.6, 31.2), level(2.4, 34), level(2.4, 31.2)].entries())
			expect(values[i]![2]).toBeCloseTo(value, 8);
	});

	it("never lets a finding be within without a margin, nor unassessed without a reason", () => {
		for (const f of assessed.findings) {
			if (f.result === "not-assessed") expect([f.margin, Boolean(f.reason)], f.criterion).toEqual([null, true]);
			else
				expect(Number.isFinite(f.value) && Number.isFinite(f.margin) && f.margin! >= 0 === (f.result === "within"), f.criterion).toBe(true);
		}
	});
});
