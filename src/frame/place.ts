import { type LocalVec, local, type RingVec, ring } from "../vector/vec3.ts";

/** Cylindrical coordinates in the ring frame: m, rad (positive the way the floor moves), m along +z. */
export interface Cylindrical {
	readonly radius: number;
	readonly angle: number;
	readonly axial: number;
}

export const ringFromCylindrical = (p: Cylindrical): RingVec => ring(p.radius * Math.cos(p.angle), p.radius * Math.sin(p.angle), p.axial);
/** The angle is in (−π, π]. */
export const cylindricalFromRing = (p: RingVec): Cylindrical => ({
	radius: Math.hypot(p[0], p[1]),
	angle: Math.atan2(p[1], p[0]),
	axial: p[2],
});

/** A right-handed triad of unit ring vectors: prograde, up (inboard), axial. */
export interface Triad {
	readonly prograde: RingVec;
	readonly up: RingVec;
	readonly axial: RingVec;
}

/** The local directions at ring angle `angle` (rad); on a flat deck, at its middle angle. */
export const triadAt = (angle: number): Triad => ({
	prograde: ring(-Math.sin(angle), Math.cos(angle), 0),
	up: ring(-Math.cos(angle), -Math.sin(angle), 0),
	axial: ring(0, 0, 1),
});

export const localFromRing = (t: Triad, v: RingVec): LocalVec =>
	local(v[0] * t.prograde[0] + v[1] * t.prograde[1], v[0] * t.up[0] + v[1] * t.up[1], v[2]);
export const ringFromLocal = (t: Triad, v: LocalVec): RingVec =>
	ring(v[0] * t.prograde[0] + v[1] * t.up[0], v[0] * t.prograde[1] + v[1] * t.up[1], v[2]);

/** Unit local vector of a heading (rad, from prograde towards axial) and elevation (rad, above the floor). */
export const directionOf = (heading: number, elevation: number): LocalVec =>
	local(Math.cos(elevation) * Math.cos(heading), Math.sin(elevation), Math.cos(elevation) * Math.sin(heading));
