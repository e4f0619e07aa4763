/**
 * The oracle "inertial differences": a path given in the ring (m, s) is carried into the inertial frame by the angle
 * Ωt and differenced twice there, centrally and to fourth order; minus that acceleration, written in the directions of
 * the ring at t = 0, is what a scale and a plumb line show. No apparent force is written down.
 */
export function apparentByDifferences(rate: number, path: (t: number) => readonly [number, number, number]): [number, number, number] {
	const h = 2e-3;
	const inertial = (t: number): number[] => {
		const [x, y, z] = path(t);
		const turned = Math.hypot(x, y);
		const at = Math.atan2(y, x) + rate * t;
		return [turned * Math.cos(at), turned * Math.sin(at), z];
	};
	const [a, b, c, d, e] = [-2, -1, 0, 1, 2].map((i) => inertial(i * h)) as [number[], number[], number[], number[], number[]];
	return [0, 1, 2].map((i) => -(-a[i]! + 16 * b[i]! - 30 * c[i]! + 16 * d[i]! - e[i]!) / (12 * h * h)) as [number, number, number];
}
