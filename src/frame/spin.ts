/**
 * The spin of the ring about +z, exact in t: rate Ω(t), its derivative, and the angle ψ(t) = ∫Ω dt
 * from t = 0. Units rad, s.
 */
export interface Spin {
	/** Ω, rad/s, ≥ 0. */
	rate(t: number): number;
	/** dΩ/dt, rad/s². */
	rateDot(t: number): number;
	/** ψ, rad, ψ(0) = 0. */
	angle(t: number): number;
	/** The largest Ω at any time, rad/s. */
	readonly greatestRate: number;
	/** The largest |dΩ/dt| at any time, rad/s². */
	readonly greatestRateDot: number;
	readonly constant: boolean;
}

/** Throws RangeError on a rate that is negative or not finite. */
export function constantSpin(rate: number): Spin {
	if (!(rate >= 0 && Number.isFinite(rate))) throw new RangeError(`a spin rate must be finite and at least 0 rad/s, got ${rate}`);
	return { rate: () => rate, rateDot: () => 0, angle: (t) => rate * t, greatestRate: rate, greatestRateDot: 0, constant: true };
}

export interface SpinPoint {
	readonly t: number;
	readonly rate: number;
}

/** Minimum-jerk share s(τ) on 0…1, its derivative and its integral from 0 (Flash & Hogan 1985). */
export const minimumJerk = {
	share: (x: number): number => x * x * x * (10 + x * (-15 + 6 * x)),
	rate: (x: number): number => 30 * x * x * (1 - x) * (1 - x),
	/** d²s/dτ². */
	bend: (x: number): number => 60 * x * (1 - x) * (1 - 2 * x),
	integral: (x: number): number => x * x * x * x * (2.5 + x * (-3 + x)),
	/** The peak of `rate`. */
	peakRate: 1.875,
} as const;

/**
 * A profile of points joined by minimum-jerk ramps; the rate is held before the first and after the
 * last. `start` is the time on the profile that the returned spin calls 0.
 * Throws RangeError on no points, times that do not rise, or a negative rate.
 */
export function profileSpin(points: readonly SpinPoint[], start = 0): Spin {
	const first = points[0];
	const last = points[points.length - 1];
	if (!first || !last) throw new RangeError("a spin profile needs at least one point");
	for (const [i, p] of points.entries()) {
		if (!(p.rate >= 0 && Number.isFinite(p.rate))) throw new RangeError(`point ${i}: rate ${p.rate} rad/s is not finite and at least 0`);
		const before = points[i - 1];
		if (before && !(p.t > before.t)) throw new RangeError(`point ${i}: time ${p.t} s does not come after ${before.t} s`);
	}
	/** ψ on the profile's own clock at each point, from the first. */
	const angles = [0];
	for (let i = 1; i < points.length; i++) {
		const a = points[i - 1] as SpinPoint;
		const b = points[i] as SpinPoint;
		angles.push((angles[i - 1] as number) + 0.5 * (a.rate + b.rate) * (b.t - a.t));
	}
	const piece = (t: number): number => {
		let lo = 0;
		let hi = points.length - 1;
		while (hi - lo > 1) {
			const mid = (lo + hi) >> 1;
			if ((points[mid] as SpinPoint).t <= t) lo = mid;
			else hi = mid;
		}
		return lo;
	};
	const rateAt = (t: number): number => {
		if (t <= first.t) return first.rate;
		if (t >= last.t) return last.rate;
		const i = piece(t);
		const a = points[i] as SpinPoint;
		const b = points[i + 1] as SpinPoint;
		return a.rate + (b.rate - a.rate) * minimumJerk.share((t - a.t) / (b.t - a.t));
	};
	const rateDotAt = (t: number): number => {
		if (t <= first.t || t >= last.t) return 0;
		const i = piece(t);
		const a = points[i] as SpinPoint;
		const b = points[i + 1] as SpinPoint;
		const span = b.t - a.t;
		return ((b.rate - a.rate) / span) * minimumJerk.rate((t - a.t) / span);
	};
	const angleAt = (t: number): number => {
		if (t <= first.t) return first.rate * (t - first.t);
		if (t >= last.t) return (angles[angles.length - 1] as number) + last.rate * (t - last.t);
		const i = piece(t);
		const a = points[i] as SpinPoint;
		const b = points[i + 1] as SpinPoint;
		const span = b.t - a.t;
		const x = (t - a.t) / span;
		return (angles[i] as number) + span * (a.rate * x + (b.rate - a.rate) * minimumJerk.integral(x));
	};
	const zero = angleAt(start);
	let greatestRateDot = 0;
	for (let i = 1; i < points.length; i++) {
		const a = points[i - 1] as SpinPoint;
		const b = points[i] as SpinPoint;
		greatestRateDot = Math.max(greatestRateDot, (minimumJerk.peakRate * Math.abs(b.rate - a.rate)) / (b.t - a.t));
	}
	return {
		rate: (t) => rateAt(start + t),
		rateDot: (t) => rateDotAt(start + t),
		angle: (t) => angleAt(start + t) - zero,
		greatestRate: Math.max(...points.map((p) => p.rate)),
		greatestRateDot,
		constant: points.every((p) => p.rate === first.rate),
	};
}
