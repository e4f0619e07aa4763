import type { Camera } from "../shape/camera.ts";

/** The camera for one picture. Camera coordinates: x right, y up, z along the view, m. */
export interface View {
	width: number;
	height: number;
	/** Pixels per unit of x / z. */
	focal: number;
	near: number;
	/** Stage → camera, 3 × 4, row by row. */
	readonly stage: Float64Array;
	/** Part → camera, 3 × 4, row by row. */
	readonly part: Float64Array;
}

export const createView = (): View => ({ width: 0, height: 0, focal: 0, near: 0, stage: new Float64Array(12), part: new Float64Array(12) });

/** Sets the view to a camera. Throws RangeError on numbers that are not finite, a field of view outside 0…π or near ≤ 0. */
export function setView(view: View, camera: Camera, width: number, height: number): void {
	const { basis, position, fovY, near } = camera;
	if (!(fovY > 0 && fovY < Math.PI)) throw new RangeError(`a vertical field of view lies between 0 and π rad, got ${fovY}`);
	if (!(near > 0 && near < Number.POSITIVE_INFINITY)) throw new RangeError(`a near plane lies before the camera, got ${near} m`);
	view.width = width;
	view.height = height;
	view.focal = height / 2 / Math.tan(fovY / 2);
	view.near = near;
	const x = position[0]!;
	const y = position[1]!;
	const z = position[2]!;
	for (let r = 0; r < 3; r++) {
		const a = basis[3 * r]!;
		const b = basis[3 * r + 1]!;
		const c = basis[3 * r + 2]!;
		const d = -(a * x + b * y + c * z);
		if (!Number.isFinite(a + b + c + d)) throw new RangeError(`a camera at (${x}, ${y}, ${z}) with axis (${a}, ${b}, ${c}) is not finite`);
		view.stage[4 * r] = a;
		view.stage[4 * r + 1] = b;
		view.stage[4 * r + 2] = c;
		view.stage[4 * r + 3] = d;
	}
}

/** Sets `part` to the view after a part's matrix (column-major 4 × 4). Throws RangeError where that is not finite. */
export function placePart(view: View, matrix: Float32Array, name: string): void {
	const { stage, part } = view;
	for (let c = 0; c < 4; c++) {
		const x = matrix[4 * c]!;
		const y = matrix[4 * c + 1]!;
		const z = matrix[4 * c + 2]!;
		if (!Number.isFinite(x + y + z)) throw new RangeError(`column ${c} of the matrix of "${name}" is (${x}, ${y}, ${z}), not finite`);
		for (let r = 0; r < 12; r += 4) part[r + c] = stage[r]! * x + stage[r + 1]! * y + stage[r + 2]! * z + (c === 3 ? stage[r + 3]! : 0);
	}
}
