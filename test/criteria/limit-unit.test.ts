import { describe, expect, it } from "vitest";
import { judge } from "../../src/criteria/judge.ts";
import { rowOf } from "./row-of.ts";

const held = (value: number, unit: string, limit: number, limitUnit: string) =>
	judge(rowOf({ limit, unit: limitUnit }), { subject: "s", crew: null, phase: "nominal", at: {} }, { value, unit }, "transient");

describe("a limit in another unit than the quantity's", () => {
	it.each([
		[5, "m/s", 18, "km/h", 18, "within"],
		[5, "m/s", 17.9, "km/h", 18, "outside"],
		[5, "m/s", 18, "kph", 18, "within"],
		[5, "m/s", 5, "mps", 5, "within"],
		[90, "°", 2, "rad", Number((Math.PI / 2).toPrecision(9)), "within"],
		[9, "°", 9, "deg", 9, "within"],
		[3, "rpm", 18, "deg/s", 18, "within"],
		[0.5, "g", 4, "m/s²", 4.903325, "outside"],
		[12, "%", 0.1, "1", 0.12, "outside"],
		[0.2, "", 25, "%", 20, "within"],
	] as const)("%d %s held against %d %s is %d: %s", (value, unit, limit, limitUnit, shown, result) => {
		expect(held(value, unit, limit, limitUnit)).toMatchObject({ value: shown, limit, unit: limitUnit, result });
	});

	it.each([
		["m/s", "J", "the limit is in J, the quantity in m/s"],
		["J", "N", "the limit is in N, the quantity in J"],
		["", "m", "the limit is in m, the quantity has no unit"],
		["g/m", "g", "the limit is in g, the quantity in g/m"],
		["kg", "furlongs", "the limit is in furlongs, the quantity in kg"],
		["m", "m and more", "the limit is in m and more, the quantity in m"],
	])("%s against %s is not assessed", (unit, limitUnit, reason) => {
		expect(held(1, unit, 1, limitUnit)).toMatchObject({ value: null, margin: null, unit: limitUnit, result: "not-assessed", reason });
	});

	it("is the quantity's own where none is named, and where the table does not know it but both name the same", () => {
		expect(held(1, "m/s", 1, "")).toMatchObject({ value: 1, unit: "m/s", result: "within" });
		expect(held(1, "g/m", 1, "g/m")).toMatchObject({ value: 1, unit: "g/m", result: "within" });
	});
});
