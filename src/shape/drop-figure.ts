import type { Drop } from "../activity/drop.ts";
import { createEyePoint, type EyePoint, eyePoint } from "../body/gaze.ts";
import { poseStandingReach } from "../body/reach.ts";
import { ring } from "../vector/vec3.ts";
import type { Part } from "./drawable.ts";
import type { Stance } from "./drop-stage.ts";
import { createFigure, type Figure, stanceToStage, updateFigure } from "./figure.ts";
import { stageFrame, toStage } from "./stage-frame.ts";

/** The person who lets go, moved by time. */
export class DropFigure {
	readonly parts: readonly Part[];
	/** Stage coordinates. */
	readonly eye: EyePoint = createEyePoint();
	private readonly figure: Figure;
	private readonly own = createEyePoint();
	private readonly matrix = new Float32Array(16);
	private readonly state = new Float64Array(6);
	private readonly target = new Float64Array(3);
	private readonly release: readonly [number, number, number];

	constructor(
		private readonly drop: Drop,
		private readonly stance: Stance,
		private readonly stature: number,
	) {
		this.figure = createFigure(stature);
		this.parts = this.figure.parts;
		stanceToStage(0, 0, 0, stance.facing, this.matrix);
		this.objectAt(0);
		this.release = [this.target[0] as number, this.target[1] as number, this.target[2] as number];
	}

	private objectAt(t: number): void {
		const { drop, stance, state, target } = this;
		drop.flight.path.stateAt(t, state);
		const p = [0, 0, 0];
		toStage(stageFrame(drop.deck, stance.angle, stance.axial), ring(state[0] as number, state[1] as number, state[2] as number), p);
		const c = Math.cos(stance.facing);
		const s = Math.sin(stance.facing);
		target[0] = c * (p[0] as number) + s * (p[2] as number);
		target[1] = p[1] as number;
		target[2] = -s * (p[0] as number) + c * (p[2] as number);
	}

	update(t: number, firstPerson: boolean): void {
		this.objectAt(Math.min(t, this.drop.flight.end));
		const pose = poseStandingReach({
			stature: this.stature,
			handTarget: this.release,
			gazeTarget: [this.target[0] as number, this.target[1] as number, this.target[2] as number],
			holding: t <= 0 ? this.drop.object.diameter : null,
			hand: this.release[2] >= -0.02 ? "right" : "left",
			lowestGaze: (70 * Math.PI) / 180,
		});
		updateFigure(this.figure, pose, this.matrix);
		for (const p of this.figure.hiddenInFirstPerson) p.visible = !firstPerson;
		eyePoint(pose, this.own);
		const m = this.matrix;
		for (let r = 0; r < 3; r++) {
			const turn = (v: Float64Array): number => (m[r] as number) * (v[0] as number) + (m[4 + r] as number) * (v[1] as number) + (m[8 + r] as number) * (v[2] as number);
			this.eye.position[r] = turn(this.own.position) + (m[12 + r] as number);
			this.eye.gaze[r] = turn(this.own.gaze);
			this.eye.forward[r] = turn(this.own.forward);
			this.eye.up[r] = turn(this.own.up);
		}
	}
}
