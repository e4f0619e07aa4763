import fc from "fast-check";
import { unit as oracle } from "mathjs";
import { describe, expect, test } from "vitest";
import { convertUnit, type Dimension, fromSi, toSi, UNITS, unitOf } from "../../src/quantity/units.ts";

/** What mathjs calls the units it has; those missing here it does not know, and they are held by the definitions below. */
const ORACLE: Readonly<Record<string, readonly [name: string, si: string]>> = {
	cm: ["cm", "m"],
	mm: ["mm", "m"],
	km: ["km", "m"],
	ft: ["ft", "m"],
	in: ["inch", "m"],
	yd: ["yard", "m"],
	mi: ["mile", "m"],
	"°": ["deg", "rad"],
	"′": ["arcmin", "rad"],
	"″": ["arcsec", "rad"],
	rev: ["cycle", "rad"],
	"°/s": ["deg/s", "rad/s"],
	rpm: ["cycle/minute", "rad/s"],
	"°/s²": ["deg/s^2", "rad/s^2"],
	ms: ["ms", "s"],
	min: ["minute", "s"],
	h: ["hour", "s"],
	"km/h": ["km/hour", "m/s"],
	"ft/s": ["ft/s", "m/s"],
	mph: ["mile/hour", "m/s"],
	"ft/s²": ["ft/s^2", "m/s^2"],
	lb: ["lbm", "kg"],
	oz: ["oz", "kg"],
	kN: ["kN", "N"],
	lbf: ["lbf", "N"],
	ft·lbf: ["ft lbf", "J"],
	kPa: ["kPa", "Pa"],
	bar: ["bar", "Pa"],
	mbar: ["mbar", "Pa"],
	atm: ["atm", "Pa"],
	psi: ["psi", "Pa"],
	"°C": ["degC", "K"],
	"°F": ["degF", "K"],
};

describe("units: factors", () => {
	for (const [symbol, [name, si]] of Object.entries(ORACLE)) {
		test(`${symbol} agrees with mathjs`, () => {
			const expected = oracle(37.25, name).toNumber(si);
			expect(Math.abs(toSi(37.25, unitOf(symbol)) / expected - 1)).toBeLessThan(symbol === "psi" ? 1e-8 : 1e-12);
		});
	}

	test("what mathjs lacks or rounds is held by its definition", () => {
		expect(toSi(1, unitOf("rpm"))).toBeCloseTo((2 * Math.PI) / 60, 15);
		expect(toSi(1, unitOf("g", "acceleration"))).toBe(9.80665);
		expect(toSi(1, unitOf("g", "mass"))).toBe(0.001);
		expect(toSi(1, unitOf("kn"))).toBeCloseTo(1852 / 3600, 15);
		// NIST SP 811 Appendix B.8 gives 6.894 757 E+03 Pa.
		expect(toSi(1, unitOf("psi"))).toBeCloseTo(6894.757, 3);
	});

	test("every unit of more than one per dimension is held by one of the two", () => {
		const base = new Set(["m", "rad", "rad/s", "rad/s²", "s", "m/s", "m/s²", "kg", "N", "J", "Pa", "K", "Hz", "1", "%"]);
		const free = UNITS.filter((u) => !base.has(u.symbol) && !(u.symbol in ORACLE)).map((u) => u.symbol);
		expect(free).toEqual(["kn", "g", "g"]);
	});

	test("a unit of another dimension throws with both names", () => {
		expect(() => convertUnit(1, unitOf("m"), unitOf("kg"))).toThrow("m (length) is not a unit of mass");
		expect(() => unitOf("furlong")).toThrow('no unit "furlong"');
	});

	const dimensions = [...new Set(UNITS.map((u) => u.dimension))] as Dimension[];
	test("there and back keeps the number (property)", () => {
		fc.assert(
			fc.property(fc.constantFrom(...UNITS), fc.double({ min: -1e6, max: 1e6, noNaN: true }), (u, x) => {
				expect(Math.abs(fromSi(toSi(x, u), u) - x)).toBeLessThan(1e-9 + Math.abs(x) * 1e-12);
			}),
			{ seed: 20 },
		);
		expect(dimensions.length).toBeGreaterThan(10);
	});
});
