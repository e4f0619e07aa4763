/** A pinhole camera in stage coordinates. Looks along `forward`; `right` × `forward`… is left to `basis`. */
export interface Camera {
	readonly position: Float64Array;
	/** Unit: right, up, forward; 9 numbers. */
	readonly basis: Float64Array;
	/** Vertical field of view, rad. */
	fovY: number;
	near: number;
	far: number;
}

export const createCamera = (fovY: number): Camera => ({
	position: new Float64Array(3),
	basis: new Float64Array([1, 0, 0, 0, 1, 0, 0, 0, -1]),
	fovY,
	near: 0.03,
	far: 4000,
});

/**
 * Points the camera from its position along a direction (need not be unit), its up kept as near to
 * `up` as that allows. `up` must not be parallel to the direction; a near-parallel one is refused with RangeError.
 */
export function aim(camera: Camera, dx: number, dy: number, dz: number, ux: number, uy: number, uz: number): void {
	const b = camera.basis;
	const l = Math.hypot(dx, dy, dz);
	const fx = dx / l;
	const fy = dy / l;
	const fz = dz / l;
	let rx = fy * uz - fz * uy;
	let ry = fz * ux - fx * uz;
	let rz = fx * uy - fy * ux;
	const r = Math.hypot(rx, ry, rz);
	if (!(r > 1e-9)) throw new RangeError(`a camera cannot look along its own up (${dx}, ${dy}, ${dz})`);
	rx /= r;
	ry /= r;
	rz /= r;
	b[0] = rx;
	b[1] = ry;
	b[2] = rz;
	b[3] = ry * fz - rz * fy;
	b[4] = rz * fx - rx * fz;
	b[5] = rx * fy - ry * fx;
	b[6] = fx;
	b[7] = fy;
	b[8] = fz;
}

/**
 * Projects a stage point to CSS px (x right, y down) and depth in m along the view, into out[0…2].
 * Returns whether it lies before the near plane; out is written either way.
 */
export function project(camera: Camera, width: number, height: number, x: number, y: number, z: number, out: Float64Array): boolean {
	const b = camera.basis;
	const px = x - (camera.position[0] as number);
	const py = y - (camera.position[1] as number);
	const pz = z - (camera.position[2] as number);
	const cx = px * (b[0] as number) + py * (b[1] as number) + pz * (b[2] as number);
	const cy = px * (b[3] as number) + py * (b[4] as number) + pz * (b[5] as number);
	const cz = px * (b[6] as number) + py * (b[7] as number) + pz * (b[8] as number);
	const f = height / 2 / Math.tan(camera.fovY / 2);
	out[0] = width / 2 + (f * cx) / cz;
	out[1] = height / 2 - (f * cy) / cz;
	out[2] = cz;
	return cz > camera.near;
}
