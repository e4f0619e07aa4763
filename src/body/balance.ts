import { place, pointAt } from "./kinematics.ts";
import type { Pose } from "./pose.ts";
import { fraction } from "./segments.ts";
import { limb, SEGMENT_COUNT, SEGMENTS, type SegmentSpec, SIDES } from "./skeleton.ts";

const part = new Float64Array(3);

/** Writes the mass centre (m, stance frame) of the body alone; a held object is not in it. */
export function massCentre(pose: Pose, out: Float64Array): void {
	out.fill(0);
	for (let i = 0; i < SEGMENT_COUNT; i++) {
		const { mass, centre } = SEGMENTS[i] as SegmentSpec;
		if (mass === 0) continue;
		pointAt(pose, i, centre[0] * pose.stature, centre[1] * pose.stature, centre[2] * pose.stature, part);
		for (let k = 0; k < 3; k++) out[k] = (out[k] as number) + mass * (part[k] as number);
	}
}

const CORNERS = 6;
/** Sole outline in the foot's axes, × stature: heel, ball and toe, both edges. */
const SOLE: readonly (readonly [number, number])[] = [-1, 1].flatMap((edge) => [
	[-fraction("heel"), edge * 0.42 * fraction("footBreadth")] as const,
	[fraction("ball"), edge * 0.5 * fraction("footBreadth")] as const,
	[fraction("footLength") - fraction("heel"), edge * 0.25 * fraction("footBreadth")] as const,
]);

/** The corner points of both soles on the floor, [forward, right] m. */
export function soleCorners(pose: Pose): (readonly [number, number])[] {
	const out: (readonly [number, number])[] = [];
	for (const side of SIDES) {
		const foot = limb(side, "foot");
		place(pose, foot);
		for (let k = 0; k < CORNERS; k++) {
			const [x, z] = SOLE[k] as readonly [number, number];
			pointAt(pose, foot, x * pose.stature, -fraction("ankleHeight") * pose.stature, z * pose.stature, part);
			out.push([part[0] as number, part[2] as number]);
		}
	}
	return out;
}

/** How far inside the hull of both soles the mass centre stands over the floor, m; negative outside. */
export function supportMargin(pose: Pose): number {
	const hull = convexHull(soleCorners(pose));
	massCentre(pose, part);
	const x = part[0] as number;
	const z = part[2] as number;
	let margin = Number.POSITIVE_INFINITY;
	hull.forEach(([ax, az], i) => {
		const [bx, bz] = hull[(i + 1) % hull.length] as readonly [number, number];
		margin = Math.min(margin, ((bx - ax) * (z - az) - (bz - az) * (x - ax)) / Math.hypot(bx - ax, bz - az));
	});
	return margin;
}

/** Monotone chain (Andrew 1979), counter-clockwise in (x, z). */
function convexHull(points: readonly (readonly [number, number])[]): (readonly [number, number])[] {
	const sorted = points.toSorted((a, b) => a[0] - b[0] || a[1] - b[1]);
	const half = (list: readonly (readonly [number, number])[]) => {
		const chain: (readonly [number, number])[] = [];
		for (const p of list) {
			while (chain.length > 1) {
				const [ax, az] = chain[chain.length - 2] as readonly [number, number];
				const [bx, bz] = chain[chain.length - 1] as readonly [number, number];
				if ((bx - ax) * (p[1] - az) - (bz - az) * (p[0] - ax) > 0) break;
				chain.pop();
			}
			chain.push(p);
		}
		return chain.slice(0, -1);
	};
	return [...half(sorted), ...half(sorted.toReversed())];
}
