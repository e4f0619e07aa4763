import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { printNumber, printQuantity, unitIn, unitNamed, withUnit } from "../../src/quantity/print-quantity.ts";
import { unitOf } from "../../src/quantity/units.ts";

describe("printNumber", () => {
	test.each([
		[0, "0"],
		[-0, "0"],
		[0.302345, "0.302"],
		[-0.302345, "−0.302"],
		[1.5, "1.50"],
		[17.06, "17.1"],
		[999.6, "1000"],
		[0.9996, "1.00"],
		[34, "34.0"],
		[12345, "12\u202F300"],
		[0.001234, "0.00123"],
		[0.0009996, "0.00100"],
		[0.000_123_4, "1.23\u00A0×\u00A010⁻⁴"],
		[1_234_567, "1.23\u00A0×\u00A010⁶"],
		[-1.5e12, "−1.50\u00A0×\u00A010¹²"],
	])("%d prints %s", (value, text) => expect(printNumber(value)).toBe(text));

	test.each([
		[0.302345, 2, "0.30"],
		[0.996, 2, "1.0"],
		[3.6, 5, "3.6000"],
	])("%d to %d figures prints %s", (value, figures, text) => expect(printNumber(value, figures)).toBe(text));

	test("a value that is not finite throws with the value", () => {
		expect(() => printNumber(Number.NaN)).toThrow("got NaN");
		expect(() => printNumber(Number.POSITIVE_INFINITY)).toThrow("got Infinity");
	});

	test("what is printed is the value to half a unit in the last figure (property)", () => {
		fc.assert(
			fc.property(
				fc.double({ min: -1e9, max: 1e9, noNaN: true }).filter((x) => Math.abs(x) > 1e-9),
				fc.integer({ min: 1, max: 6 }),
				(x, figures) => {
					const back = Number(
						printNumber(x, figures)
							.replace("−", "-")
							.replace(/[\u202F]/g, "")
							.replace(
								/\u00A0×\u00A010(⁻?)([⁰¹²³⁴⁵⁶⁷⁸⁹]+)/,
								(_, minus: string, power: string) => `e${minus ? "-" : ""}${[...power].map((d) => "⁰¹²³⁴⁵⁶⁷⁸⁹".indexOf(d)).join("")}`,
							),
					);
					const unit = 10 ** (Math.floor(Math.log10(Math.abs(x))) - figures + 1);
					expect(Math.abs(back - x)).toBeLessThanOrEqual(unit * 0.500_000_1);
				},
			),
			{ seed: 23 },
		);
	});
});

describe("printQuantity", () => {
	test("a space before the unit except degrees, minutes and seconds of arc", () => {
		expect(withUnit("17.1", "°")).toBe("17.1°");
		expect(withUnit("21.6", "°/s")).toBe("21.6\u00A0°/s");
		expect(withUnit("21.0", "°C")).toBe("21.0\u00A0°C");
		expect(withUnit("0.30", "m")).toBe("0.30\u00A0m");
		expect(withUnit("0.30", "1")).toBe("0.30");
	});

	test("customary units, and units without a counterpart", () => {
		expect(printQuantity(1.8796, unitOf("m"), unitIn("us", unitOf("m")))).toBe("6.17\u00A0ft");
		expect(printQuantity(21, unitOf("°C"), unitIn("us", unitOf("°C")))).toBe("69.8\u00A0°F");
		expect(unitIn("us", unitOf("rpm"))).toBe(unitOf("rpm"));
		expect(unitIn("si", unitOf("m"))).toBe(unitOf("m"));
	});

	test("file spellings name units; a unit of its own names none", () => {
		expect(unitNamed("deg")).toBe(unitOf("°"));
		expect(unitNamed("")).toBe(unitOf("1"));
		expect(unitNamed("mps2")).toBe(unitOf("m/s²"));
		expect(unitNamed("steps")).toBeUndefined();
	});
});
