import type { Frame, Vec3 } from "./vec3.ts";

/** A proper rotation from frame A to frame B: nine numbers, row by row. */
export type Rotation<A extends Frame, B extends Frame> = readonly number[] & { readonly from?: A; readonly to?: B };

/** Active right-handed rotations about the coordinate axes by `angle` (rad). */
export const aboutX = <A extends Frame, B extends Frame>(angle: number): Rotation<A, B> => {
	const c = Math.cos(angle);
	const s = Math.sin(angle);
	return [1, 0, 0, 0, c, -s, 0, s, c];
};
export const aboutY = <A extends Frame, B extends Frame>(angle: number): Rotation<A, B> => {
	const c = Math.cos(angle);
	const s = Math.sin(angle);
	return [c, 0, s, 0, 1, 0, -s, 0, c];
};
export const aboutZ = <A extends Frame, B extends Frame>(angle: number): Rotation<A, B> => {
	const c = Math.cos(angle);
	const s = Math.sin(angle);
	return [c, -s, 0, s, c, 0, 0, 0, 1];
};

/** second ∘ first. */
export function compose<A extends Frame, B extends Frame, C extends Frame>(second: Rotation<B, C>, first: Rotation<A, B>): Rotation<A, C> {
	const out = new Array<number>(9);
	for (let i = 0; i < 3; i++)
		for (let j = 0; j < 3; j++) {
			let sum = 0;
			for (let k = 0; k < 3; k++) sum += (second[3 * i + k] as number) * (first[3 * k + j] as number);
			out[3 * i + j] = sum;
		}
	return out;
}

export const inverse = <A extends Frame, B extends Frame>(r: Rotation<A, B>): Rotation<B, A> =>
	[r[0], r[3], r[6], r[1], r[4], r[7], r[2], r[5], r[8]] as number[];

export const rotate = <A extends Frame, B extends Frame>(r: Rotation<A, B>, v: Vec3<A>): Vec3<B> =>
	[
		(r[0] as number) * v[0] + (r[1] as number) * v[1] + (r[2] as number) * v[2],
		(r[3] as number) * v[0] + (r[4] as number) * v[1] + (r[5] as number) * v[2],
		(r[6] as number) * v[0] + (r[7] as number) * v[1] + (r[8] as number) * v[2],
	] as unknown as Vec3<B>;
