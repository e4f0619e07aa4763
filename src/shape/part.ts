import type { Part, Triangles, WideLines } from "./drawable.ts";

/** A part at the stage's origin. */
export const part = (drawable: Triangles | WideLines): Part => ({ drawable, matrix: identity(), visible: true });

export const identity = (): Float32Array => new Float32Array([1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1]);

/** Places a part upright at a stage point at one scale. */
export function placeAt(matrix: Float32Array, x: number, y: number, z: number, size: number): void {
	matrix.fill(0);
	matrix[0] = size;
	matrix[5] = size;
	matrix[10] = size;
	matrix[12] = x;
	matrix[13] = y;
	matrix[14] = z;
	matrix[15] = 1;
}

/**
 * Places a part whose own +y runs along (dx, dy, dz), its y stretched to `long` and its cross-section
 * to `wide`; (dx, dy, dz) is unit.
 */
export function placeAlong(
	matrix: Float32Array,
	x: number,
	y: number,
	z: number,
	dx: number,
	dy: number,
	dz: number,
	long: number,
	wide: number,
): void {
	const upright = Math.abs(dy) < 0.9;
	let ax = upright ? -dz : 0;
	let ay = upright ? 0 : dz;
	let az = upright ? dx : -dy;
	const l = Math.hypot(ax, ay, az);
	ax /= l;
	ay /= l;
	az /= l;
	matrix[0] = ax * wide;
	matrix[1] = ay * wide;
	matrix[2] = az * wide;
	matrix[3] = 0;
	matrix[4] = dx * long;
	matrix[5] = dy * long;
	matrix[6] = dz * long;
	matrix[7] = 0;
	matrix[8] = (ay * dz - az * dy) * wide;
	matrix[9] = (az * dx - ax * dz) * wide;
	matrix[10] = (ax * dy - ay * dx) * wide;
	matrix[11] = 0;
	matrix[12] = x;
	matrix[13] = y;
	matrix[14] = z;
	matrix[15] = 1;
}
