import { dot, type HeadVec, head } from "../vector/vec3.ts";

export type CanalId = "LA" | "LH" | "LP" | "RA" | "RH" | "RP";
export const CANALS: readonly CanalId[] = ["LA", "LH", "LP", "RA", "RH", "RP"];

/**
 * Unit normals of the six canal planes, head axes (X forward, Y left, Z up; Reid frame): left and right,
 * anterior, horizontal, posterior. Della Santina et al. 2005, JARO 6:191–206, table 1A, 22 heads.
 * Right-hand rotation about a left normal excites that canal, about a right one inhibits it.
 */
export const CANAL_NORMALS: Readonly<Record<CanalId, HeadVec>> = {
	LA: head(-0.58954, 0.7875, -0.17971),
	LH: head(-0.31645, -0.04108, 0.94772),
	LP: head(-0.69611, -0.6682, -0.26257),
	RA: head(-0.58905, -0.78928, -0.17334),
	RH: head(-0.32891, 0.03566, 0.94369),
	RP: head(-0.69248, 0.66561, -0.27826),
};

/** +1 where rotation about the normal excites, −1 where it inhibits. */
export const excitation = (canal: CanalId): 1 | -1 => (canal.startsWith("L") ? 1 : -1);

const normals = CANALS.map((id) => CANAL_NORMALS[id]);

/** (NᵀN)⁻¹Nᵀ, 3 × 6 row by row: the pseudo-inverse of the stacked normals. */
const PSEUDO_INVERSE = pseudoInverse(normals);

function pseudoInverse(rows: readonly HeadVec[]): Float64Array {
	const gram = (i: 0 | 1 | 2, j: 0 | 1 | 2): number => rows.reduce((sum, n) => sum + n[i] * n[j], 0);
	const [a, b, c, d, e, f] = [gram(0, 0), gram(0, 1), gram(0, 2), gram(1, 1), gram(1, 2), gram(2, 2)];
	const adjugate = [
		head(d * f - e * e, c * e - b * f, b * e - c * d),
		head(c * e - b * f, a * f - c * c, b * c - a * e),
		head(b * e - c * d, b * c - a * e, a * d - b * b),
	];
	const determinant = a * (adjugate[0] as HeadVec)[0] + b * (adjugate[0] as HeadVec)[1] + c * (adjugate[0] as HeadVec)[2];
	return Float64Array.from(adjugate.flatMap((row) => rows.map((n) => dot(row, n) / determinant)));
}

/** n · v of the six planes, in the order of `CANALS`. */
export const canalComponents = (v: HeadVec): number[] => normals.map((n) => dot(n, v));

/** Writes into out[at…at+2] the head vector that fits six plane components best in the sense of least squares. */
export function leastSquaresHead(components: ArrayLike<number>, from: number, out: Float64Array, at: number): void {
	for (let i = 0; i < 3; i++) {
		let sum = 0;
		for (let j = 0; j < 6; j++) sum += (PSEUDO_INVERSE[6 * i + j] as number) * (components[from + j] as number);
		out[at + i] = sum;
	}
}
