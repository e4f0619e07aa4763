import { beforeAll, describe, expect, test } from "vitest";
import type { LayoutFile } from "../../src/layout/schema.ts";
import { dropFile } from "../support/layout-of.ts";
import { assessed, bundle, rule, ruled } from "./support.ts";

const walk: LayoutFile["activities"][number] = {
	id: "walk",
	kind: "walk",
	crew: "one",
	deck: "lower",
	angle_deg: 0,
	axial_m: 0,
	heading_deg: 180,
	speed_mps: 1,
};
const unverified = rule({ id: "hearsay", basis: "unverified" });
const outside = rule({ id: "gentle", limit: 0.001, force: "information" });
/** A body at rest where nothing turns is never struck by anything. */
const floating = { spin: { rate_rpm: 0 } };

beforeAll(bundle);

describe.concurrent("the exit status", () => {
	test.each<[number, string, LayoutFile]>([
		[0, "everything built, within and verified", ruled()],
		[0, "a basis of common practice", ruled({ own: [rule({ basis: "common-practice" })] })],
		[0, "a paper's limit met by a value at least as large", ruled({ own: [rule({ basis: "paper", comparison: "at-least", limit: 0.1 })] })],
		[3, "an unverified limit", ruled({ own: [rule(), unverified] })],
		[3, "a kind that is not built, and no row on it", ruled({ activities: [dropFile(), walk] })],
		[3, "a value that does not exist", ruled(floating)],
		[3, "a set that is not shipped", ruled({ use: ["footing"] })],
		[1, "a value outside, though only for information", ruled({ own: [rule(), outside] })],
		[1, "outside beside an unverified limit and a kind not built", ruled({ own: [unverified, outside], activities: [dropFile(), walk] })],
		[1, "outside an unverified limit", ruled({ own: [{ ...outside, basis: "unverified" }] })],
	])("%i: %s", async (expected, _, layout) => {
		const { status, stdout, stderr } = await assessed(layout, "--json");
		expect({ status, stderr }).toEqual({ status: expected, stderr: "" });
		const { findings } = JSON.parse(stdout);
		expect(findings.some((f: { result: string }) => f.result === "outside")).toBe(expected === 1);
	});

	test("equality with the written value is within: 0", async () => {
		const { stdout } = await assessed(ruled(), "--json");
		const limit = JSON.parse(stdout).activities[0].summary.impact_energy_J;
		const at = await assessed(ruled({ own: [rule({ limit })] }), "--json");
		expect(at.status).toBe(0);
		expect(JSON.parse(at.stdout).findings.find((f: { criterion: string }) => f.criterion === "energy").margin).toBe(0);
		expect((await assessed(ruled({ own: [rule({ limit: limit * (1 - 1e-7) })] }))).status).toBe(1);
	});
});
