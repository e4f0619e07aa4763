/**
 * A drop or toss and its motion as the textbooks write it in the turning frame, for the two integrators that the
 * flight is held against. Nothing here imports the code under test: places, directions, spin profile, surfaces and
 * offsets are written out once more from the definitions.
 */
export interface Throw {
	readonly floor: "curved" | "flat";
	/** Floor radius, of a flat floor the distance of its plane; m. */
	readonly radius: number;
	readonly headroom: number;
	/** Middle of the bay, deg. */
	readonly middleDeg: number;
	/** Half the span, deg; a curved bay of 180 has no sides. */
	readonly halfSpanDeg: number;
	readonly axialFrom: number;
	readonly axialTo: number;
	readonly angleDeg: number;
	readonly axial: number;
	readonly height: number;
	readonly speed: number;
	readonly headingDeg: number;
	readonly elevationDeg: number;
	readonly diameter: number;
	/** ½ ρ C_d A / m, 1/m. */
	readonly drag: number;
	/** Points joined by minimum-jerk ramps; one point is a constant rate. */
	readonly spin: readonly { readonly t: number; readonly rpm: number }[];
}

/** x, y, z, then their rates, in the ring; then the ring angle swept since the release. */
export type Motion = readonly number[];

export interface Outcome {
	readonly struck: string;
	readonly time: number;
	readonly prograde: number | null;
	readonly axial: number | null;
	readonly radius: number;
	readonly speed: number;
	readonly angle: number;
}

type Triple = readonly [number, number, number];
const cross = (a: Triple, b: Triple): Triple => [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
const rad = (deg: number): number => (deg / 180) * Math.PI;

/** Spin rate and its derivative at t, rad/s and rad/s². */
export function spinAt(spin: Throw["spin"], t: number): readonly [number, number] {
	const perRpm = Math.PI / 30;
	const after = spin.findIndex((p) => p.t > t);
	if (after <= 0) return [(after === 0 ? spin[0]! : spin.at(-1)!).rpm * perRpm, 0];
	const a = spin[after - 1]!;
	const b = spin[after]!;
	const x = (t - a.t) / (b.t - a.t);
	const change = (b.rpm - a.rpm) * perRpm;
	return [
		a.rpm * perRpm + change * (10 * x ** 3 - 15 * x ** 4 + 6 * x ** 5),
		(change / (b.t - a.t)) * (30 * x ** 2 - 60 * x ** 3 + 30 * x ** 4),
	];
}

/** a = −Ω×(Ω×r) − 2Ω×v − Ω̇×r − k|v|v, and the angle swept. */
export function ringDerivative(thrown: Throw): (t: number, y: Motion) => number[] {
	return (t, y) => {
		const [rate, rateDot] = spinAt(thrown.spin, t);
		const r: Triple = [y[0]!, y[1]!, y[2]!];
		const v: Triple = [y[3]!, y[4]!, y[5]!];
		const omega: Triple = [0, 0, rate];
		const centrifugal = cross(omega, cross(omega, r));
		const coriolis = cross(omega, v);
		const euler = cross([0, 0, rateDot], r);
		const slow = thrown.drag * Math.hypot(...v);
		const a = [0, 1, 2].map((i) => -centrifugal[i]! - 2 * coriolis[i]! - euler[i]! - slow * v[i]!);
		return [...v, ...a, (r[0] * v[1] - r[1] * v[0]) / (r[0] * r[0] + r[1] * r[1])];
	};
}

/** Prograde and down where the body is, or of the flat deck. */
function directions(thrown: Throw, angle: number): { readonly prograde: Triple; readonly down: Triple } {
	const at = thrown.floor === "curved" ? angle : rad(thrown.middleDeg);
	return { prograde: [-Math.sin(at), Math.cos(at), 0], down: [Math.cos(at), Math.sin(at), 0] };
}

export function start(thrown: Throw): number[] {
	const angle = rad(thrown.angleDeg);
	const { prograde, down } = directions(thrown, angle);
	const depth = thrown.radius - thrown.height;
	const along = thrown.floor === "curved" ? 0 : thrown.radius * Math.tan(rad(thrown.angleDeg - thrown.middleDeg));
	const level = thrown.speed * Math.cos(rad(thrown.elevationDeg));
	const forward = level * Math.cos(rad(thrown.headingDeg));
	const rise = thrown.speed * Math.sin(rad(thrown.elevationDeg));
	return [
		depth * down[0] + along * prograde[0],
		depth * down[1] + along * prograde[1],
		thrown.axial,
		forward * prograde[0] - rise * down[0],
		forward * prograde[1] - rise * down[1],
		level * Math.sin(rad(thrown.headingDeg)),
		0,
	];
}

/** Clear distance of the sphere from each surface, m. */
export function clearances(thrown: Throw, y: Motion): Record<string, number> {
	const half = thrown.diameter / 2;
	const { down } = directions(thrown, 0);
	const depth = thrown.floor === "curved" ? Math.hypot(y[0]!, y[1]!) : y[0]! * down[0] + y[1]! * down[1];
	const out: Record<string, number> = {
		deck: thrown.radius - half - depth,
		ceiling: depth - (thrown.radius - thrown.headroom) - half,
		"end-low": y[2]! - thrown.axialFrom - half,
		"end-high": thrown.axialTo - y[2]! - half,
	};
	if (thrown.halfSpanDeg < 180) {
		const low = rad(thrown.middleDeg - thrown.halfSpanDeg);
		const high = rad(thrown.middleDeg + thrown.halfSpanDeg);
		out["side-low"] = y[1]! * Math.cos(low) - y[0]! * Math.sin(low) - half;
		out["side-high"] = y[0]! * Math.sin(high) - y[1]! * Math.cos(high) - half;
	}
	return out;
}

/** What the assessment would say of this state at a strike. */
export function outcome(thrown: Throw, struck: string, time: number, y: Motion): Outcome {
	const swept = y[6]!;
	const angle = rad(thrown.angleDeg) + swept;
	const { prograde, down } = directions(thrown, angle);
	const from = start(thrown);
	const r = Math.hypot(y[0]!, y[1]!);
	const along = (y[0]! - from[0]!) * prograde[0] + (y[1]! - from[1]!) * prograde[1];
	const speed = Math.hypot(y[3]!, y[4]!, y[5]!);
	const side = struck.startsWith("side");
	const end = struck.startsWith("end");
	let surface = r;
	if (struck === "deck") surface = thrown.radius;
	if (struck === "ceiling") surface = thrown.radius - thrown.headroom;
	const across = thrown.floor === "flat" && !end && !side ? y[0]! * prograde[0] + y[1]! * prograde[1] : 0;
	return {
		struck,
		time,
		prograde: side ? null : thrown.floor === "curved" ? surface * swept : along,
		axial: end ? null : y[2]! - from[2]!,
		radius: side
			? r * Math.cos(Math.asin(thrown.diameter / 2 / r))
			: thrown.floor === "flat" && !end
				? Math.hypot(surface, across)
				: surface,
		speed,
		angle: Math.acos((y[3]! * down[0] + y[4]! * down[1]) / speed),
	};
}
