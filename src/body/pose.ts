import { SEGMENT_COUNT } from "./skeleton.ts";

/** Whether the asked-for palm point is where the palm is; `gap` is how far it stays away, m. */
export type Reach = { readonly kind: "none" } | { readonly kind: "reached" } | { readonly kind: "short"; readonly gap: number };

/** A posture in the stance frame (skeleton.ts). Made once, written in place. */
export interface Pose {
	/** m */
	readonly stature: number;
	/** The pelvis origin (midway between the hips), m. */
	readonly root: Float64Array;
	/** Anatomical joint angles, rad, three a segment (ranges.ts). */
	readonly angle: Float64Array;
	/** Segment axes and origins, column-major 4 × 4 each, rigid. */
	readonly world: Float64Array;
	/** Unit, where the eyes look. */
	readonly gaze: Float64Array;
	reach: Reach;
}

export function createPose(stature: number): Pose {
	if (!(stature > 0 && Number.isFinite(stature))) throw new RangeError(`a stature must be a positive number of metres, got ${stature}`);
	return {
		stature,
		root: new Float64Array(3),
		angle: new Float64Array(3 * SEGMENT_COUNT),
		world: new Float64Array(16 * SEGMENT_COUNT),
		gaze: new Float64Array([1, 0, 0]),
		reach: { kind: "none" },
	};
}

export function copyPose(from: Pose, to: Pose): void {
	if (from.stature !== to.stature) throw new RangeError(`a pose of stature ${from.stature} m cannot become one of ${to.stature} m`);
	to.root.set(from.root);
	to.angle.set(from.angle);
	to.world.set(from.world);
	to.gaze.set(from.gaze);
	to.reach = from.reach;
}
