import { radFromDeg } from "../quantity/convert.ts";
import type { LimbName, TrunkName } from "./skeleton.ts";

/**
 * What each joint's three angles mean and how far they go. A joint turns by Rz · Rx · Ry of its angles
 * times the segment's signs, so that left and right share one table. "clinical" ranges are the usual
 * goniometry values for healthy adults (AAOS 1965 and later tables), recalled from memory; "practice" is
 * this figure's own share of a chain or a limit without a source.
 */
export interface Axis {
	readonly name: string;
	/** rad */
	readonly least: number;
	readonly most: number;
	readonly basis: "clinical" | "practice" | "fixed";
}
export type Joint = readonly [Axis, Axis, Axis];

const axis = (name: string, least: number, most: number, basis: Axis["basis"] = "clinical"): Axis => ({
	name,
	least: radFromDeg(least),
	most: radFromDeg(most),
	basis,
});
const FIXED = axis("fixed", 0, 0, "fixed");

export const JOINT: Readonly<Record<TrunkName | LimbName, Joint>> = {
	/** The pelvis against the stance frame: how far a standing or seated person tips it. */
	pelvis: [
		axis("forward tilt", -30, 75, "practice"),
		axis("drop to the right", -15, 15, "practice"),
		axis("turn to the left", -45, 45, "practice"),
	],
	abdomen: [
		axis("flexion", -15, 40, "practice"),
		axis("bend to the right", -18, 18, "practice"),
		axis("turn to the left", -8, 8, "practice"),
	],
	thorax: [
		axis("flexion", -15, 35, "practice"),
		axis("bend to the right", -18, 18, "practice"),
		axis("turn to the left", -35, 35, "practice"),
	],
	neck: [
		axis("flexion", -35, 30, "practice"),
		axis("bend to the right", -25, 25, "practice"),
		axis("turn to the left", -38, 38, "practice"),
	],
	head: [
		axis("flexion", -25, 25, "practice"),
		axis("bend to the right", -15, 15, "practice"),
		axis("turn to the left", -42, 42, "practice"),
	],
	collar: [FIXED, axis("elevation", -10, 30), axis("protraction", -15, 22)],
	upperArm: [axis("flexion", -60, 180), axis("abduction", -45, 90), axis("internal rotation", -90, 80)],
	forearm: [axis("flexion", 0, 145), FIXED, axis("pronation", -80, 85)],
	hand: [axis("radial deviation", -30, 20), axis("flexion", -70, 75), FIXED],
	fingers: [FIXED, axis("flexion", -20, 90), FIXED],
	fingertips: [FIXED, axis("flexion", 0, 100), FIXED],
	thumb: [axis("radial abduction", -10, 65), axis("palmar abduction", -10, 70), axis("opposition", -10, 80, "practice")],
	thumbTip: [FIXED, axis("flexion", -10, 75), FIXED],
	thigh: [axis("flexion", -20, 120), axis("abduction", -25, 45), axis("internal rotation", -45, 40)],
	shank: [axis("flexion", 0, 140), FIXED, FIXED],
	/** Dorsiflexion with the knee bent. */
	foot: [axis("dorsiflexion", -50, 35), axis("eversion", -35, 20), axis("internal rotation", -20, 20, "practice")],
	toes: [axis("extension", -30, 70), FIXED, FIXED],
};
