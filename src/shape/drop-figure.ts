import type { Drop } from "../activity/drop.ts";
import { personOf } from "../activity/drop-person.ts";
import { type Dropper, dropPose, poseFor } from "../body/drop.ts";
import { createEyePoint, type EyePoint, eyePoint } from "../body/gaze.ts";
import type { Pose } from "../body/pose.ts";
import type { Part } from "./drawable.ts";
import { type Figure, stanceToStage, updateFigure } from "./figure.ts";

/** So near the eyes that it would fill the picture when looking down. */
const TRUNK = /^crew-(thorax|abdomen)(-ink)?$/;

/** The person who lets go, moved by time. */
export class DropFigure {
	readonly parts: readonly Part[];
	/** Stage coordinates. */
	readonly eye: EyePoint = createEyePoint();
	private readonly unseen: readonly Part[];
	private readonly dropper: Dropper;
	private readonly pose: Pose;
	private readonly own = createEyePoint();
	private readonly matrix = new Float32Array(16);

	constructor(
		drop: Drop,
		private readonly figure: Figure,
	) {
		const { stature } = figure;
		this.parts = figure.parts;
		this.unseen = [...figure.hiddenInFirstPerson, ...this.parts.filter((p) => TRUNK.test(p.drawable.name))];
		stanceToStage(0, 0, 0, drop.stance.facing, this.matrix);
		this.dropper = personOf(drop, stature);
		this.pose = poseFor(this.dropper);
	}

	/** Moves the person to time t, s from the release. */
	update(t: number, firstPerson: boolean): void {
		const { figure, pose, matrix, own, eye } = this;
		dropPose(this.dropper, t, pose);
		updateFigure(figure, pose, matrix);
		for (const p of this.unseen) p.visible = !firstPerson;
		eyePoint(pose, own);
		for (let r = 0; r < 3; r++) {
			eye.position[r] = turned(matrix, own.position, r) + (matrix[12 + r] as number);
			eye.gaze[r] = turned(matrix, own.gaze, r);
			eye.forward[r] = turned(matrix, own.forward, r);
			eye.up[r] = turned(matrix, own.up, r);
		}
	}
}

const turned = (m: Float32Array, v: Float64Array, r: number): number =>
	(m[r] as number) * (v[0] as number) + (m[4 + r] as number) * (v[1] as number) + (m[8 + r] as number) * (v[2] as number);
