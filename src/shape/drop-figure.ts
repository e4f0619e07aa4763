import type { Drop } from "../activity/drop.ts";
import { createDropper, type Dropper, dropPose, poseFor } from "../body/drop.ts";
import { createEyePoint, type EyePoint, eyePoint } from "../body/gaze.ts";
import type { Pose } from "../body/pose.ts";
import { ring } from "../vector/vec3.ts";
import type { Part } from "./drawable.ts";
import type { Stance } from "./drop-stage.ts";
import { createFigure, type Figure, stanceToStage, updateFigure } from "./figure.ts";
import { stageFrame, toStage } from "./stage-frame.ts";

/** Distance the gaze keeps ahead for each metre the object is below the eyes, cot 68°: straight down would turn the view over. */
const LEAST_AHEAD = 0.4;
/** The gaze takes that distance within this time of the release, s. */
const COME_AHEAD = 0.3;
/** Too near the eyes to be seen by oneself as more than a bar: trunk, and the ink edges of the upper arms. */
const NEAR = /crew-(thorax|abdomen)(-ink)?$|(upperArm|collar|pelvis)-ink$/;

/** The person who lets go, moved by time. */
export class DropFigure {
	readonly parts: readonly Part[];
	/** Stage coordinates. */
	readonly eye: EyePoint = createEyePoint();
	private readonly figure: Figure;
	private readonly unseen: readonly Part[];
	private readonly dropper: Dropper;
	private readonly pose: Pose;
	private readonly own = createEyePoint();
	private readonly matrix = new Float32Array(16);

	constructor(drop: Drop, stance: Stance, stature: number) {
		this.figure = createFigure(stature);
		this.parts = this.figure.parts;
		this.unseen = [...this.figure.hiddenInFirstPerson, ...this.parts.filter((p) => NEAR.test(p.drawable.name))];
		stanceToStage(0, 0, 0, stance.facing, this.matrix);
		const track = trackOf(drop, stance, stature);
		const release = new Float64Array(3);
		track(0, release);
		const { deck } = drop;
		this.dropper = createDropper({
			stature,
			diameter: drop.object.diameter,
			hand: (release[2] as number) >= -0.02 ? "right" : "left",
			track,
			floor: (forward, right) => {
				if (deck.floor === "flat") return 0;
				const prograde = forward * Math.cos(stance.facing) - right * Math.sin(stance.facing);
				return deck.radius - Math.sqrt(deck.radius ** 2 - prograde ** 2);
			},
		});
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

/** Where the person looks for the object: its place in the stance frame, kept ahead of the feet. */
function trackOf(drop: Drop, stance: Stance, stature: number): (t: number, out: Float64Array) => void {
	const frame = stageFrame(drop.deck, stance.angle, stance.axial);
	const state = new Float64Array(6);
	const c = Math.cos(stance.facing);
	const s = Math.sin(stance.facing);
	return (t, out) => {
		drop.flight.path.stateAt(Math.min(t, drop.flight.end), state);
		toStage(frame, ring(state[0] as number, state[1] as number, state[2] as number), out);
		const [x, y, z] = out as unknown as [number, number, number];
		const forward = c * x + s * z;
		const least = 0.1 + LEAST_AHEAD * Math.max(0, 0.93 * stature - y);
		out[0] = forward + Math.max(0, least - forward) * Math.min(1, Math.max(0, t / COME_AHEAD));
		out[1] = y;
		out[2] = -s * x + c * z;
	};
}
