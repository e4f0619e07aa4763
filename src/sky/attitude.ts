import type { Sky } from "../layout/habitat.ts";
import type { Rotation } from "../vector/rotation.ts";
import type { IcrsVec } from "../vector/vec3.ts";
import { directionFromRaDec } from "./direction.ts";

/**
 * Writes the rotation that takes ring vectors to ICRS, v_icrs = Rz(α) · Ry(90° − δ) · Rz(ζ + ψ) · v_ring,
 * into out[0…8], row by row. α, δ: right ascension and declination of +z; ζ: the sky's zero angle;
 * `psi`: the angle turned since t = 0, rad. Allocates nothing.
 */
export function writeIcrsFromRing(sky: Sky, psi: number, out: Float64Array | number[]): void {
	const ca = Math.cos(sky.axisRightAscension);
	const sa = Math.sin(sky.axisRightAscension);
	const cd = Math.cos(sky.axisDeclination);
	const sd = Math.sin(sky.axisDeclination);
	const cz = Math.cos(sky.zero + psi);
	const sz = Math.sin(sky.zero + psi);
	out[0] = ca * sd * cz - sa * sz;
	out[1] = -ca * sd * sz - sa * cz;
	out[2] = ca * cd;
	out[3] = sa * sd * cz + ca * sz;
	out[4] = -sa * sd * sz + ca * cz;
	out[5] = sa * cd;
	out[6] = -cd * cz;
	out[7] = cd * sz;
	out[8] = sd;
}

export function icrsFromRing(sky: Sky, psi: number): Rotation<"ring", "icrs"> {
	const out = new Array<number>(9);
	writeIcrsFromRing(sky, psi, out);
	return out;
}

/** The inverse of `writeIcrsFromRing`. */
export function writeRingFromIcrs(sky: Sky, psi: number, out: Float64Array | number[]): void {
	writeIcrsFromRing(sky, psi, out);
	swap(out, 1, 3);
	swap(out, 2, 6);
	swap(out, 5, 7);
}

function swap(out: Float64Array | number[], i: number, j: number): void {
	const kept = out[i] as number;
	out[i] = out[j] as number;
	out[j] = kept;
}

export function ringFromIcrs(sky: Sky, psi: number): Rotation<"icrs", "ring"> {
	const out = new Array<number>(9);
	writeRingFromIcrs(sky, psi, out);
	return out;
}

/** Unit vector towards the Sun, taken as standing still among the stars. */
export const sunDirection = (sky: Sky): IcrsVec => directionFromRaDec(sky.sunRightAscension, sky.sunDeclination);
