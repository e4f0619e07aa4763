import type { deckFile } from "../support/layout-of.ts";
import { spinAt, type Throw } from "../truth/ring-equations.ts";
import type { DropSeries } from "./support.ts";

/**
 * The oracle "path differences": the place of the body alone (radius, angle, axial as written) is differenced to fourth
 * order over samples, in the ring and in the inertial frame; the apparent parts are then what their definitions say of
 * that velocity and acceleration. Each is [prograde, up, axial], m/s².
 */
interface FromPath {
	/** Index of the sample. */
	readonly at: number;
	readonly centrifugal: number[];
	readonly coriolis: number[];
	readonly euler: number[];
	/** Minus the acceleration relative to the ring. */
	readonly own: number[];
	/** Of the path in the inertial frame. */
	readonly inertial: number[];
	/** Relative to the ring, m/s. */
	readonly velocity: number[];
}

type Spin = Throw["spin"];
type Deck = ReturnType<typeof deckFile>;
const rad = (deg: number): number => (deg / 180) * Math.PI;

/** Angle swept since `start`, rad; of a profile by Simpson's rule. */
function sweptAngle(spin: Spin, start: number, t: number): number {
	if (spin.length === 1) return spinAt(spin, start)[0] * t;
	const parts = 2 * Math.ceil(50 * t + 1);
	const h = t / parts;
	let sum = spinAt(spin, start)[0] + spinAt(spin, start + t)[0];
	for (let i = 1; i < parts; i++) sum += (i % 2 === 1 ? 4 : 2) * spinAt(spin, start + i * h)[0];
	return (sum * h) / 3;
}

/** At some 60 samples far enough from both ends, `stride` samples between the points differenced. */
export function fromPath(series: DropSeries, deck: Deck, spin: Spin, start: number, stride: number): FromPath[] {
	const step = series.t_s[1] as number;
	const h = stride * step;
	const place = (i: number, turned: number): number[] => {
		const angle = rad(series.angle_deg[i] as number) + turned;
		const r = series.radius_m[i] as number;
		return [r * Math.cos(angle), r * Math.sin(angle), series.axial_m[i] as number];
	};
	const out: FromPath[] = [];
	for (let i = 2 * stride; i + 2 * stride < series.t_s.length; i += Math.max(1, Math.floor(series.t_s.length / 60))) {
		const five = (points: (k: number) => number[]): number[][] => [-2, -1, 0, 1, 2].map((k) => points(i + k * stride));
		const first = ([a, b, , d, e]: number[][]): number[] => [0, 1, 2].map((n) => (a![n]! - 8 * b![n]! + 8 * d![n]! - e![n]!) / (12 * h));
		const second = ([a, b, c, d, e]: number[][]): number[] =>
			[0, 1, 2].map((n) => (-a![n]! + 16 * b![n]! - 30 * c![n]! + 16 * d![n]! - e![n]!) / (12 * h * h));
		const ring = five((k) => place(k, 0));
		const [x, y] = ring[2] as [number, number];
		const [vx, vy, vz] = first(ring) as [number, number, number];
		const [rate, rateDot] = spinAt(spin, start + i * step);
		const normal = deck.floor === "curved" ? Math.atan2(y, x) : rad((deck.from_deg + deck.to_deg) / 2);
		const local = ([a, b, c]: number[]): number[] => [
			-a! * Math.sin(normal) + b! * Math.cos(normal),
			-a! * Math.cos(normal) - b! * Math.sin(normal),
			c!,
		];
		const now = sweptAngle(spin, start, i * step);
		out.push({
			at: i,
			centrifugal: local([rate * rate * x, rate * rate * y, 0]),
			coriolis: local([2 * rate * vy, -2 * rate * vx, 0]),
			euler: local([rateDot * y, -rateDot * x, 0]),
			own: local(second(ring).map((a) => -a)),
			inertial: local(second(five((k) => place(k, sweptAngle(spin, start, k * step) - now)))),
			velocity: local([vx, vy, vz]),
		});
	}
	return out;
}
