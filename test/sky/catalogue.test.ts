import { createHash } from "node:crypto";
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { packCatalogue, type StarCollection } from "../../assets/star/pack.ts";
import { degFromRad } from "../../src/quantity/convert.ts";
import { ASSUMED_B_MINUS_V, decodeCatalogue, indexOfHip, starDirection } from "../../src/sky/catalogue.ts";
import { raDecFromDirection } from "../../src/sky/direction.ts";
import { separation, shippedBytes, shippedCatalogue, sourceBytes, sourceStars } from "./shipped.ts";

const catalogue = shippedCatalogue();
const source = sourceStars();

/** Written out on its own, from degrees, so that the packer and the decoder cannot agree on an error. */
function sourceDirection([ra, dec]: readonly [number, number]): [number, number, number] {
	const a = (ra * Math.PI) / 180;
	const d = (dec * Math.PI) / 180;
	return [Math.cos(d) * Math.cos(a), Math.cos(d) * Math.sin(a), Math.sin(d)];
}

describe("shipped catalogue", () => {
	it("is what the build script packs today, byte for byte, and SOURCE.md has both checksums", () => {
		const packed = packCatalogue(source);
		expect(Buffer.compare(Buffer.from(packed.bytes), Buffer.from(shippedBytes()))).toBe(0);
		const page = readFileSync(new URL("../../assets/star/SOURCE.md", import.meta.url), "utf8");
		for (const bytes of [sourceBytes(), shippedBytes()]) expect(page).toContain(createHash("sha256").update(bytes).digest("hex"));
		for (const hip of packed.withoutColour) expect(page).toContain(`HIP ${hip}`);
	});

	it("holds every star of the source: position within 1.1e-4°, V and B−V as printed", () => {
		expect(catalogue.count).toBe(source.features.length);
		expect(catalogue.count).toBe(5044);
		let worst = 0;
		for (const star of source.features) {
			const i = indexOfHip(catalogue, star.id);
			expect(i, `HIP ${star.id}`).toBeGreaterThanOrEqual(0);
			const apart = degFromRad(separation(starDirection(catalogue, i), sourceDirection(star.geometry.coordinates)));
			expect(Number.isFinite(apart)).toBe(true);
			worst = Math.max(worst, apart);
			expect(Math.abs((catalogue.magnitude[i] as number) - star.properties.mag)).toBeLessThan(1e-6);
			if (star.properties.bv !== "") expect(Math.abs((catalogue.bMinusV[i] as number) - Number(star.properties.bv))).toBeLessThan(1e-6);
		}
		expect(worst).toBeLessThan(1.1e-4);
		expect(worst).toBeGreaterThan(0);
	});

	it("has unit directions and both hemispheres, and right ascensions on either side of 0 and 180°", () => {
		let south = 0;
		const quarters = [0, 0, 0, 0];
		for (let i = 0; i < catalogue.count; i++) {
			const v = starDirection(catalogue, i);
			expect(Math.abs(Math.hypot(...v) - 1)).toBeLessThan(1e-6);
			if (v[2] < 0) south++;
			const ra = raDecFromDirection(v).rightAscension as number;
			const quarter = Math.floor(ra / (Math.PI / 2));
			quarters[quarter] = (quarters[quarter] as number) + 1;
		}
		const [positive, negative] = [
			source.features.filter((f) => f.geometry.coordinates[1] >= 0),
			source.features.filter((f) => f.geometry.coordinates[1] < 0),
		];
		expect(south).toBe(negative.length);
		expect(positive.length).toBeGreaterThan(2000);
		for (const n of quarters) expect(n).toBeGreaterThan(1000);
	});

	it("names the two stars without B−V and uses white for them", () => {
		expect(catalogue.assumedColour.map((i) => catalogue.hip[i])).toEqual([26220, 32609]);
		expect(source.features.filter((f) => f.properties.bv === "").map((f) => f.id)).toEqual([26220, 32609]);
		for (const i of catalogue.assumedColour) expect(catalogue.bMinusV[i]).toBe(ASSUMED_B_MINUS_V);
	});

	it("finds no star that is not there", () => {
		for (const hip of [0, 87, 118323]) expect(indexOfHip(catalogue, hip)).toBe(-1);
	});
});

const one = (id: number, ra: number, dec: number, mag = 1, bv = "0.5"): StarCollection["features"][number] => ({
	id,
	properties: { mag, bv },
	geometry: { coordinates: [ra, dec] },
});

describe("packing", () => {
	it.each([
		[-180, 0, Math.PI],
		[180, 0, Math.PI],
		[-0.00001, 0, 0],
		[-0.0001, -0.0002, 2 * Math.PI - 1.745329e-6],
		[0, 0, 0],
	])("right ascension %d°, declination %d° comes back", (ra, dec, expected) => {
		const back = decodeCatalogue(packCatalogue({ features: [one(1, ra, dec)] }).bytes);
		const found = raDecFromDirection(starDirection(back, 0));
		expect(found.rightAscension).toBeCloseTo(expected, 6);
		expect(found.declination).toBeCloseTo((dec * Math.PI) / 180, 6);
	});

	it("holds the poles", () => {
		const back = decodeCatalogue(packCatalogue({ features: [one(1, 10, -90), one(2, 10, 90)] }).bytes);
		expect([back.direction[2], back.direction[5]]).toEqual([-1, 1]);
	});

	it.each([
		["a declination beyond the pole", [one(1, 0, 90.001)], /declination 90.001/],
		["a right ascension in 0…360", [one(1, 181, 0)], /right ascension 181/],
		["a doubled number", [one(1, 0, 0), one(1, 5, 0)], /gap of 0/],
		["a wide gap in numbers", [one(1, 0, 0), one(400, 5, 0)], /gap of 399/],
		["a magnitude that is not a number", [one(1, 0, 0, Number.NaN)], /magnitude NaN/],
		["a B−V that is a word", [one(1, 0, 0, 1, "blue")], /B−V NaN/],
		["a B−V too red", [one(1, 0, 0, 1, "3.7")], /B−V 3.7/],
	])("refuses %s", (_, features, message) => {
		expect(() => packCatalogue({ features })).toThrow(message);
	});
});

describe("decoding refuses, in a sentence,", () => {
	const good = shippedBytes();
	const changed = (edit: (bytes: Uint8Array, view: DataView) => void): Uint8Array => {
		const copy = good.slice();
		edit(copy, new DataView(copy.buffer));
		return copy;
	};
	it.each([
		["no bytes", new Uint8Array(0), /at least 8 bytes, these are 0/],
		["another file", changed((b) => b.set([0x50, 0x4b, 3, 4])), /begins with "STR1"/],
		["a file cut short", good.subarray(0, good.length - 1), /of 5044 stars has 45404 bytes, this one has 45403/],
		["a file with a tail", Uint8Array.from([...good, 0]), /has 45405/],
		["a false count", changed((_, v) => v.setUint32(4, 0xffffffff, true)), /of 4294967295 stars/],
		["a repeated number", changed((b) => b.fill(0, 8 + 9, 8 + 10)), /star 1 .* repeats HIP 88/],
		["a star outside the sky", changed((_, v) => v.setUint32(9, 0xffffffff, true)), /star 0 .* outside the sky/],
	])("%s", (_, bytes, message) => {
		expect(() => decodeCatalogue(bytes)).toThrow(message);
	});

	it("but takes bytes that lie inside a larger buffer", () => {
		const wide = new Uint8Array(good.length + 3);
		wide.set(good, 3);
		expect(decodeCatalogue(wide.subarray(3)).hip).toEqual(catalogue.hip);
	});
});
