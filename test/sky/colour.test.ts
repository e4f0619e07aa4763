import { describe, expect, it } from "vitest";
import { blackBodyColour, blackBodyXyz, colourMatching, starColour, temperatureFromBMinusV } from "../../src/sky/colour.ts";
import { catalogueLight, starLight } from "../../src/sky/light.ts";
import { shippedCatalogue } from "./shipped.ts";

/** Chromaticity of the Planckian locus: Kim et al. 2002 (US patent 7024034), cubic in 1/T, 1667–25 000 K. */
function kimLocus(t: number): [number, number] {
	const k = 1000 / t;
	const x =
		t < 4000
			? -0.2661239 * k ** 3 - 0.2343589 * k ** 2 + 0.8776956 * k + 0.17991
			: -3.0258469 * k ** 3 + 2.1070379 * k ** 2 + 0.2226347 * k + 0.24039;
	const y =
		t < 2222
			? -1.1063814 * x ** 3 - 1.3481102 * x ** 2 + 2.18555832 * x - 0.20219683
			: t < 4000
				? -0.9549476 * x ** 3 - 1.37418593 * x ** 2 + 2.09137015 * x - 0.16748867
				: 3.081758 * x ** 3 - 5.8733867 * x ** 2 + 3.75112997 * x - 0.37001483;
	return [x, y];
}

const chromaticity = (t: number): [number, number] => {
	const [x, y, z] = blackBodyXyz(t);
	return [x / (x + y + z), y / (x + y + z)];
};

describe("star colour", () => {
	it("has matching functions that see an equal-energy spectrum as white, and peak where the CIE's do", () => {
		const wavelengths = Array.from({ length: 471 }, (_, i) => 360 + i);
		const sums = ([0, 1, 2] as const).map((k) => wavelengths.reduce((sum, l) => sum + colourMatching(l)[k], 0));
		for (const sum of sums) expect(Math.abs(sum - 106.86)).toBeLessThan(1);
		expect(colourMatching(555)[1]).toBeCloseTo(1, 1);
		expect(colourMatching(600)[0]).toBeCloseTo(1.0622, 1);
		expect(colourMatching(445)[2]).toBeCloseTo(1.7826, 1);
	});

	it.each([2000, 2856, 3316, 4000, 5000, 5778, 6500, 8000, 10000, 15000, 20000])("lies on the Planckian locus at %d K", (t) => {
		const [x, y] = chromaticity(t);
		const [kx, ky] = kimLocus(t);
		expect(Math.abs(x - kx)).toBeLessThan(0.005);
		expect(Math.abs(y - ky)).toBeLessThan(0.005);
	});

	it("gives CIE standard illuminant A, a black body of 2855.54 K: x 0.44758, y 0.40745", () => {
		const [x, y] = chromaticity(2855.54);
		expect(Math.abs(x - 0.44758)).toBeLessThan(0.004);
		expect(Math.abs(y - 0.40745)).toBeLessThan(0.004);
	});

	it("is warm when cool and blue when hot, near white at 6600 K, largest part 1", () => {
		const [sirius, betelgeuse] = [starColour(0.009), starColour(1.5)];
		expect(sirius[2]).toBe(1);
		expect(sirius[0]).toBeLessThan(0.75);
		expect(betelgeuse[0]).toBe(1);
		expect(betelgeuse[2]).toBeLessThan(0.45);
		for (const part of blackBodyColour(6600)) expect(part).toBeGreaterThan(0.93);
		for (let t = 1000; t < 40000; t *= 1.1) {
			const c = blackBodyColour(t);
			expect(Math.max(...c)).toBe(1);
			expect(Math.min(...c)).toBeGreaterThanOrEqual(0);
		}
	});

	it("refuses a B−V that no star has", () => {
		for (const bad of [-0.7, Number.NaN, Number.POSITIVE_INFINITY]) expect(() => temperatureFromBMinusV(bad)).toThrow(/not a star's/);
	});
});

describe("drawn light", () => {
	it("grows with brightness in size and light and stays within 1…7 px", () => {
		let [size, most] = [0, 0];
		for (let v = 7; v >= -2; v -= 0.05) {
			const s = starLight(v, 0.3);
			const light = Math.max(...s.light);
			expect(s.size).toBeGreaterThanOrEqual(size);
			expect(light).toBeGreaterThanOrEqual(most);
			[size, most] = [s.size, light];
		}
		expect(size).toBe(7);
		expect(most).toBe(1);
		expect(starLight(6, 0).size).toBeCloseTo(1.5, 12);
	});

	it("covers the whole catalogue with finite numbers, equal to starLight star by star", () => {
		const catalogue = shippedCatalogue();
		const { light, size } = catalogueLight(catalogue);
		expect(light.length).toBe(3 * catalogue.count);
		for (let i = 0; i < catalogue.count; i++) {
			const s = starLight(catalogue.magnitude[i] as number, catalogue.bMinusV[i] as number);
			expect(size[i]).toBe(Math.fround(s.size));
			for (const k of [0, 1, 2] as const) expect(light[3 * i + k]).toBe(Math.fround(s.light[k]));
		}
		expect(light.every((l) => l >= 0 && l <= 1)).toBe(true);
		expect(size.filter((s) => s < 2.3).length).toBeGreaterThan(catalogue.count / 2);
		expect(size.filter((s) => s > 4).length).toBeGreaterThan(10);
	});
});
