import { radFromDeg } from "../quantity/convert.ts";
import type { Pose } from "./pose.ts";
import { JOINT } from "./ranges.ts";
import { fraction } from "./segments.ts";
import { limb, type Side } from "./skeleton.ts";

/** Half thicknesses × stature: of the palm below the grip, and of a finger. */
const PALM = 0.0085;
const FINGER = 0.0048;
/** The hand never closes on less than this, m. */
const THINNEST = 0.024;

/**
 * Where the centre of a held sphere of diameter d (m) lies in a right hand's axes (m): before the
 * knuckles, resting on the palm, so that each finger bone touches it at its middle.
 */
export function gripPoint(stature: number, diameter: number, out: Float64Array): void {
	out[0] = 0.002 * stature;
	out[1] = -(fraction("palmLength") - fraction("proximalLength") / 2) * stature;
	out[2] = -PALM * stature - Math.max(diameter, THINNEST) / 2;
}

/** The bend at a joint between two bones that both touch a circle of radius `radius` at `half` from it. */
const wrap = (radius: number, half: number, most: number): number => Math.min(Math.PI - 2 * Math.atan(radius / half), most);

const OPEN = {
	fingers: radFromDeg(17),
	fingertips: radFromDeg(22),
	thumb: [radFromDeg(38), radFromDeg(16), radFromDeg(30)],
	thumbTip: radFromDeg(12),
} as const;
const HELD = { thumb: [radFromDeg(24), radFromDeg(52), radFromDeg(58)], thumbTip: radFromDeg(34) } as const;
export const RELAXED_CURL = 0.45;

/** Bends fingers and thumb: closed on a sphere of diameter `diameter` (m) at `closed` 1, open at 0. */
export function setHand(pose: Pose, side: Side, diameter: number, closed: number): void {
	const H = pose.stature;
	const radius = Math.max(diameter, THINNEST) / 2 + FINGER * H;
	const proximal = fraction("proximalLength") * H;
	const distal = (fraction("wristHeight") - fraction("fingertipHeight") - fraction("palmLength") - fraction("proximalLength")) * H;
	const fingers = wrap(radius, proximal / 2, JOINT.fingers[1].most);
	const fingertips = wrap(radius, distal / 2, JOINT.fingertips[1].most);
	/** A wide body spreads the thumb away again. */
	const wide = Math.min(1, diameter / 0.16);
	const set = (name: "fingers" | "fingertips" | "thumb" | "thumbTip", axis: number, open: number, held: number) => {
		pose.angle[3 * limb(side, name) + axis] = open + (held - open) * closed;
	};
	set("fingers", 1, OPEN.fingers, fingers);
	set("fingertips", 1, OPEN.fingertips, fingertips);
	for (let k = 0; k < 3; k++) {
		const open = OPEN.thumb[k] as number;
		set("thumb", k, open, (HELD.thumb[k] as number) + (open - (HELD.thumb[k] as number)) * wide * 0.6);
	}
	set("thumbTip", 1, OPEN.thumbTip, HELD.thumbTip * (1 - 0.6 * wide));
}
