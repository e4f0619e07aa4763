/**
 * Three-vectors as readonly tuples, branded with the frame they are written in, so that a ring
 * vector cannot be added to an inertial one.
 *
 * Frames: "ring" co-rotating, origin on the spin axis, +z along the spin vector; "inertial" equal to
 * the ring frame at the instant ψ = 0; "icrs" equatorial; "head" X forward, Y left, Z up; "local"
 * (prograde, up, axial) at a place.
 */
declare const frame: unique symbol;
export type Frame = "ring" | "inertial" | "icrs" | "head" | "local";
export type Vec3<F extends Frame> = readonly [number, number, number] & { readonly [frame]: F };

export type RingVec = Vec3<"ring">;
export type IcrsVec = Vec3<"icrs">;
export type HeadVec = Vec3<"head">;
/** Components [prograde, up, axial]. */
export type LocalVec = Vec3<"local">;

const make = <F extends Frame>(x: number, y: number, z: number): Vec3<F> => [x, y, z] as unknown as Vec3<F>;
export const ring = make<"ring">;
export const icrs = make<"icrs">;
export const head = make<"head">;
export const local = make<"local">;

export const add = <F extends Frame>(a: Vec3<F>, b: Vec3<F>): Vec3<F> => make(a[0] + b[0], a[1] + b[1], a[2] + b[2]);
export const sub = <F extends Frame>(a: Vec3<F>, b: Vec3<F>): Vec3<F> => make(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
export const scale = <F extends Frame>(a: Vec3<F>, k: number): Vec3<F> => make(a[0] * k, a[1] * k, a[2] * k);
/** a + k b. */
export const along = <F extends Frame>(a: Vec3<F>, k: number, b: Vec3<F>): Vec3<F> =>
	make(a[0] + k * b[0], a[1] + k * b[1], a[2] + k * b[2]);
export const dot = <F extends Frame>(a: Vec3<F>, b: Vec3<F>): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const cross = <F extends Frame>(a: Vec3<F>, b: Vec3<F>): Vec3<F> =>
	make(a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]);
export const length = <F extends Frame>(a: Vec3<F>): number => Math.hypot(a[0], a[1], a[2]);
/** The unit vector; throws RangeError on a zero vector, which has no direction. */
export function unit<F extends Frame>(a: Vec3<F>): Vec3<F> {
	const l = length(a);
	if (!(l > 0)) throw new RangeError(`a vector of length ${l} has no direction`);
	return scale(a, 1 / l);
}
