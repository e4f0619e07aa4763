import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { printExact, withUnit } from "../../src/quantity/print-quantity.ts";
import { readQuantity } from "../../src/quantity/read-quantity.ts";
import { UNITS, unitOf } from "../../src/quantity/units.ts";

const read = (text: string, symbol: string, dimension?: Parameters<typeof unitOf>[1]): number | string => {
	const r = readQuantity(text, unitOf(symbol, dimension));
	return r.ok ? r.value : r.fault.kind;
};

describe("readQuantity", () => {
	test.each([
		["1.5", "m", 1.5],
		["  .5 ", "m", 0.5],
		["1e2", "m", 100],
		["3 rpm", "rpm", 3],
		["3rpm", "rpm", 3],
		["3 RPM", "rpm", 3],
		["18 °/s", "rpm", 3],
		["18 deg/s", "rpm", 3],
		["6 ft 2 in", "m", 1.8796],
		["6ft2in", "m", 1.8796],
		["6' 2\"", "m", 1.8796],
		["6′2″", "m", 1.8796],
		["5 feet", "m", 1.524],
		["-0.7", "°", -0.7],
		["−0.7°", "°", -0.7],
		["- 0.7 deg", "°", -0.7],
		["4° 30′", "°", 4.5],
		["-4° 30'", "°", -4.5],
		["1 min 30 s", "s", 90],
		["400 g", "kg", 0.4],
		["14 oz", "kg", (0.453_592_37 * 14) / 16],
		["2 lb 3 oz", "kg", 0.453_592_37 * (2 + 3 / 16)],
		["1 g", "m/s²", 9.80665],
		["68 °F", "°C", 20],
		["10 ft/s", "m/s", 3.048],
		["2 ft lbf", "J", 2 * 0.3048 * 0.453_592_37 * 9.80665],
		["12 %", "1", 0.12],
	])("%s as %s is %d", (text, symbol, expected) => {
		expect(read(text, symbol)).toBeCloseTo(expected as number, 12);
	});

	test.each([
		["", "m", "empty"],
		["  ", "m", "empty"],
		["tall", "m", "not-a-number"],
		["1.5 m long", "m", "not-a-number"],
		["5 kg", "m", "unknown-unit"],
		["5 mPa", "Pa", "unknown-unit"],
		["1,5 m", "m", "unclear"],
		["1.5.2", "m", "unclear"],
		["2 in 6 ft", "m", "unclear"],
		["6 ft 2", "m", "unclear"],
		["6 ft 2 ft", "m", "unclear"],
		["5 m/s2", "m/s", "unclear"],
		["20 °C 3 K", "°C", "unclear"],
		["1 ft -2 in", "m", "not-a-number"],
		["NaN", "m", "not-a-number"],
		["1e999", "m", "not-a-number"],
		["Infinity", "m", "not-a-number"],
	])("%s as %s is refused: %s", (text, symbol, kind) => {
		expect(read(text, symbol)).toBe(kind);
	});

	test("an unknown unit names those of the field", () => {
		const r = readQuantity("3 stone", unitOf("kg"));
		expect(r).toEqual({ ok: false, fault: { kind: "unknown-unit", unit: "stone", known: ["kg", "g", "lb", "oz"] } });
	});

	test("what is printed exactly reads back as the same number in every unit (property)", () => {
		fc.assert(
			fc.property(fc.constantFrom(...UNITS), fc.double({ noNaN: true, noDefaultInfinity: true }), (unit, x) => {
				const r = readQuantity(withUnit(printExact(x), unit.symbol), unit);
				expect(r).toEqual({ ok: true, value: x === 0 ? 0 : x });
			}),
			{ seed: 21 },
		);
	});

	test("no text throws (property)", () => {
		const alphabet = fc.constantFrom(..."0123456789.-−+eE ft in'\"°′″rpm/kg·,²".split(""));
		fc.assert(
			fc.property(
				fc.constantFrom(...UNITS),
				fc.oneof(
					fc.string(),
					fc.array(alphabet).map((a) => a.join("")),
				),
				(unit, text) => {
					const r = readQuantity(text, unit);
					if (r.ok) expect(Number.isFinite(r.value)).toBe(true);
				},
			),
			{ seed: 22, numRuns: 2000 },
		);
	});
});
