import { describe, expect, it } from "vitest";
import { degFromRad, radFromDeg } from "../../src/quantity/convert.ts";
import { starDirection } from "../../src/sky/catalogue.ts";
import { directionFromRaDec } from "../../src/sky/direction.ts";
import { separation, shippedCatalogue } from "../sky/shipped.ts";
import { namedStars } from "./stars.rows.ts";

const catalogue = shippedCatalogue();

describe("named stars", () => {
	it("are all there, with hard cases among them: south, near the pole, just below the equator", () => {
		const stars = namedStars();
		expect(stars.length).toBe(26);
		expect(stars.filter((s) => s.decDeg < -45).length).toBeGreaterThanOrEqual(3);
		expect(stars.filter((s) => s.decDeg < 0 && s.decDeg > -1).length).toBeGreaterThanOrEqual(2);
		expect(stars.some((s) => s.decDeg > 89)).toBe(true);
		expect(stars.filter((s) => s.raDeg > 180).length).toBeGreaterThanOrEqual(8);
	});

	it.each(namedStars())("$name is the bright star nearest to its published place, within 0.01°", ({ hip, raDeg, decDeg, magnitude }) => {
		const there = directionFromRaDec(radFromDeg(raDeg), radFromDeg(decDeg));
		let nearest = -1;
		let least = Number.POSITIVE_INFINITY;
		for (let i = 0; i < catalogue.count; i++) {
			if ((catalogue.magnitude[i] as number) > 3.5) continue;
			const apart = degFromRad(separation(starDirection(catalogue, i), there));
			if (apart < least) [nearest, least] = [i, apart];
		}
		expect(catalogue.hip[nearest]).toBe(hip);
		expect(least).toBeLessThan(0.01);
		expect(Math.abs((catalogue.magnitude[nearest] as number) - magnitude)).toBeLessThan(1);
	});
});
