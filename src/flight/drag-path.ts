import type { Spin } from "../frame/spin.ts";
import type { RingVec } from "../vector/vec3.ts";
import type { Path, State } from "./path.ts";

/**
 * Relative tolerance of a step, on the way gone since release and on the speed, both inertial: a tenth of what a
 * landing is to keep, 1e-9, because errors gather over the steps.
 */
export const RELATIVE_TOLERANCE = 1e-10;
/** Way (m) and speed (m/s) below which the tolerance no longer shrinks. */
const FLOOR = 0.01;

/**
 * Flight with quadratic drag in air that turns rigidly with the ring, in the inertial frame that
 * equals the ring frame at release; integrated by Dormand & Prince 5(4) with its dense output
 * (Hairer, Nørsett & Wanner 1993, Solving ODEs I, II.5–II.6). Steps are kept, so that the path can
 * be read at any time up to `known`.
 */
export class DragPath implements Path {
	readonly spin: Spin;
	/** ½ ρ C_d A / m, 1/m. */
	readonly drag: number;
	/** A uniform field added in the inertial frame, m/s²; zero but for the comparison without turning. */
	readonly field: RingVec;
	known = 0;
	private readonly starts: number[] = [];
	private readonly steps: Float64Array[] = [];
	/** Inertial angle swept from release to the start of each step, rad. */
	private readonly swept: number[] = [];
	private readonly y = new Float64Array(6);
	private readonly k: readonly Float64Array[] = Array.from({ length: 7 }, () => new Float64Array(6));
	private readonly trial = new Float64Array(6);
	private readonly scratch = new Float64Array(6);
	private next: number;
	private readonly origin: readonly [number, number, number];

	constructor(spin: Spin, position: RingVec, velocity: RingVec, drag: number, field: RingVec) {
		if (!(drag >= 0 && Number.isFinite(drag))) throw new RangeError(`the drag factor must be finite and at least 0 1/m, got ${drag}`);
		this.spin = spin;
		this.drag = drag;
		this.field = field;
		const w = spin.rate(0);
		this.y.set([position[0], position[1], position[2], velocity[0] - w * position[1], velocity[1] + w * position[0], velocity[2]]);
		this.origin = [position[0], position[1], position[2]];
		this.derivative(0, this.y, this.k[0] as Float64Array);
		this.next = 0.01;
	}

	private derivative(t: number, y: Float64Array, out: Float64Array): void {
		const w = this.spin.rate(t);
		const ax = (y[3] as number) + w * (y[1] as number);
		const ay = (y[4] as number) - w * (y[0] as number);
		const az = y[5] as number;
		const f = -this.drag * Math.sqrt(ax * ax + ay * ay + az * az);
		out[0] = y[3] as number;
		out[1] = y[4] as number;
		out[2] = y[5] as number;
		out[3] = f * ax + this.field[0];
		out[4] = f * ay + this.field[1];
		out[5] = f * az + this.field[2];
	}

	/** One Dormand–Prince step of `h` from `y` at `t`, k[0] given; fills k[1…6], writes the fifth-order end. */
	private stage(t: number, y: Float64Array, h: number, end: Float64Array): void {
		const [k1, k2, k3, k4, k5, k6, k7] = this.k as [
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
		];
		const s = this.scratch;
		const at = (i: number) => y[i] as number;
		const v = (a: Float64Array, i: number) => a[i] as number;
		for (let i = 0; i < 6; i++) s[i] = at(i) + h * 0.2 * v(k1, i);
		this.derivative(t + 0.2 * h, s, k2);
		for (let i = 0; i < 6; i++) s[i] = at(i) + h * ((3 / 40) * v(k1, i) + (9 / 40) * v(k2, i));
		this.derivative(t + 0.3 * h, s, k3);
		for (let i = 0; i < 6; i++) s[i] = at(i) + h * ((44 / 45) * v(k1, i) - (56 / 15) * v(k2, i) + (32 / 9) * v(k3, i));
		this.derivative(t + 0.8 * h, s, k4);
		for (let i = 0; i < 6; i++)
			s[i] = at(i) + h * ((19372 / 6561) * v(k1, i) - (25360 / 2187) * v(k2, i) + (64448 / 6561) * v(k3, i) - (212 / 729) * v(k4, i));
		this.derivative(t + (8 / 9) * h, s, k5);
		for (let i = 0; i < 6; i++)
			s[i] =
				at(i) +
				h *
					((9017 / 3168) * v(k1, i) -
						(355 / 33) * v(k2, i) +
						(46732 / 5247) * v(k3, i) +
						(49 / 176) * v(k4, i) -
						(5103 / 18656) * v(k5, i));
		this.derivative(t + h, s, k6);
		for (let i = 0; i < 6; i++)
			end[i] =
				at(i) +
				h * ((35 / 384) * v(k1, i) + (500 / 1113) * v(k3, i) + (125 / 192) * v(k4, i) - (2187 / 6784) * v(k5, i) + (11 / 84) * v(k6, i));
		this.derivative(t + h, end, k7);
	}

	/** Takes one accepted step, no longer than `longest`; throws RangeError where the step falls to nothing. */
	advance(longest: number): void {
		const t = this.known;
		const y = this.y;
		const end = this.trial;
		let h = Math.min(this.next, longest);
		for (;;) {
			if (!(h > 1e-14)) throw new RangeError(`the drag integration stalled at t = ${t} s`);
			this.stage(t, y, h, end);
			const error = this.stepError(h, end);
			const factor = Number.isFinite(error) ? Math.min(5, Math.max(0.2, 0.9 * error ** -0.2)) : 0.2;
			if (error <= 1) {
				this.keep(t, h, end);
				this.next = h * factor;
				return;
			}
			h *= factor;
		}
	}

	private stepError(h: number, end: Float64Array): number {
		const [k1, , k3, k4, k5, k6, k7] = this.k as Float64Array[] as [
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
		];
		const gone = Math.hypot((end[0] as number) - this.origin[0], (end[1] as number) - this.origin[1], (end[2] as number) - this.origin[2]);
		const speed = Math.hypot(end[3] as number, end[4] as number, end[5] as number);
		let worst = 0;
		for (let i = 0; i < 6; i++) {
			const e =
				h *
				((71 / 57600) * (k1[i] as number) -
					(71 / 16695) * (k3[i] as number) +
					(71 / 1920) * (k4[i] as number) -
					(17253 / 339200) * (k5[i] as number) +
					(22 / 525) * (k6[i] as number) -
					(1 / 40) * (k7[i] as number));
			const scale = RELATIVE_TOLERANCE * (FLOOR + (i < 3 ? gone : speed));
			worst = Math.max(worst, Math.abs(e) / scale);
		}
		return Math.max(worst, 1e-10);
	}

	private keep(t: number, h: number, end: Float64Array): void {
		const [k1, , k3, k4, k5, k6, k7] = this.k as Float64Array[] as [
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
			Float64Array,
		];
		const y = this.y;
		const dense = new Float64Array(31);
		dense[30] = h;
		for (let i = 0; i < 6; i++) {
			const difference = (end[i] as number) - (y[i] as number);
			const bend = h * (k1[i] as number) - difference;
			dense[i] = y[i] as number;
			dense[6 + i] = difference;
			dense[12 + i] = bend;
			dense[18 + i] = difference - h * (k7[i] as number) - bend;
			dense[24 + i] =
				h *
				((-12715105075 / 11282082432) * (k1[i] as number) +
					(87487479700 / 32700410799) * (k3[i] as number) -
					(10690763975 / 1880347072) * (k4[i] as number) +
					(701980252875 / 199316789632) * (k5[i] as number) -
					(1453857185 / 822651844) * (k6[i] as number) +
					(69997945 / 29380423) * (k7[i] as number));
		}
		const before = this.swept.length ? (this.swept[this.swept.length - 1] as number) : 0;
		if (this.steps.length) {
			const last = this.steps[this.steps.length - 1] as Float64Array;
			this.swept.push(before + turned(last[0] as number, last[1] as number, y[0] as number, y[1] as number));
		} else this.swept.push(0);
		this.starts.push(t);
		this.steps.push(dense);
		this.y.set(end);
		(this.k[0] as Float64Array).set(k7);
		this.known = t + h;
	}

	private stepAt(t: number): number {
		let lo = 0;
		let hi = this.starts.length - 1;
		while (lo < hi) {
			const mid = (lo + hi + 1) >> 1;
			if ((this.starts[mid] as number) <= t) lo = mid;
			else hi = mid - 1;
		}
		return lo;
	}

	private inertialAt(t: number, out: Float64Array): number {
		if (this.steps.length === 0) {
			out.set(this.y);
			return 0;
		}
		const i = this.stepAt(t);
		const d = this.steps[i] as Float64Array;
		const x = (t - (this.starts[i] as number)) / (d[30] as number);
		const z = 1 - x;
		for (let j = 0; j < 6; j++)
			out[j] =
				(d[j] as number) +
				x * ((d[6 + j] as number) + z * ((d[12 + j] as number) + x * ((d[18 + j] as number) + z * (d[24 + j] as number))));
		return i;
	}

	/** Inertial speed at the start of the step that holds t, m/s. */
	stepSpeed(t: number): number {
		const d = this.steps[this.stepAt(t)] as Float64Array;
		return Math.hypot(d[3] as number, d[4] as number, d[5] as number);
	}

	stateAt(t: number, out: State): void {
		this.inertialAt(t, out);
		this.toRing(t, out);
	}

	/** The state at t by one fresh full-order step from the last kept step before it: the dense output is one order less. */
	exactStateAt(t: number, out: State): void {
		if (this.steps.length === 0) {
			this.stateAt(t, out);
			return;
		}
		const i = this.stepAt(t);
		const d = this.steps[i] as Float64Array;
		const start = this.starts[i] as number;
		if (t <= start) {
			this.stateAt(t, out);
			return;
		}
		const y = d.slice(0, 6);
		const first = this.k[0] as Float64Array;
		const saved = first.slice();
		this.derivative(start, y, first);
		this.stage(start, y, t - start, out);
		first.set(saved);
		this.toRing(t, out);
	}

	private toRing(t: number, s: State): void {
		const psi = this.spin.angle(t);
		const w = this.spin.rate(t);
		const c = Math.cos(psi);
		const n = Math.sin(psi);
		const x = c * (s[0] as number) + n * (s[1] as number);
		const y = c * (s[1] as number) - n * (s[0] as number);
		const vx = c * (s[3] as number) + n * (s[4] as number) + w * y;
		const vy = c * (s[4] as number) - n * (s[3] as number) - w * x;
		s[0] = x;
		s[1] = y;
		s[3] = vx;
		s[4] = vy;
	}

	sweptAt(t: number): number {
		const now = new Float64Array(6);
		const i = this.inertialAt(t, now);
		if (this.steps.length === 0) return 0;
		const d = this.steps[i] as Float64Array;
		return (this.swept[i] as number) + turned(d[0] as number, d[1] as number, now[0] as number, now[1] as number) - this.spin.angle(t);
	}
}

/** The signed angle from (ax, ay) to (bx, by), rad in (−π, π]. */
const turned = (ax: number, ay: number, bx: number, by: number): number => Math.atan2(ax * by - ay * bx, ax * bx + ay * by);
