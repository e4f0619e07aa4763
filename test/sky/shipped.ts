import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import type { StarCollection } from "../../assets/star/pack.ts";
import { type Catalogue, decodeCatalogue } from "../../src/sky/catalogue.ts";

export const shippedBytes = (): Uint8Array => new Uint8Array(readFileSync(new URL("../../assets/star/catalogue.bin", import.meta.url)));
export const shippedCatalogue = (): Catalogue => decodeCatalogue(shippedBytes());

export const sourceBytes = (): Uint8Array =>
	new Uint8Array(readFileSync(createRequire(import.meta.url).resolve("d3-celestial/data/stars.6.json")));
export const sourceStars = (): StarCollection => JSON.parse(new TextDecoder().decode(sourceBytes()));

/** Angle between two vectors, rad, exact for small ones too. */
export function separation(a: ArrayLike<number>, b: ArrayLike<number>): number {
	const [ax, ay, az, bx, by, bz] = [a[0], a[1], a[2], b[0], b[1], b[2]] as [number, number, number, number, number, number];
	return Math.atan2(Math.hypot(ay * bz - az * by, az * bx - ax * bz, ax * by - ay * bx), ax * bx + ay * by + az * bz);
}
