import { fraction as f, MASS, MASS_CENTRE, type MassName } from "./segments.ts";

/**
 * The jointed skeleton. Stance frame: metres, origin on the floor midway between the middles of both
 * feet; x forward, y up, z right (right-handed: forward × up = right). Facing heading χ, forward is
 * (cos χ, 0, sin χ) and right (−sin χ, 0, cos χ) in (prograde, up, axial). Every segment has the same
 * axes as the stance frame when the body stands erect, arms hanging, palms to the thighs; its origin is
 * the joint at its upper (proximal) end.
 */
export type Side = 0 | 1;
export const RIGHT: Side = 0;
export const LEFT: Side = 1;
export const SIDES = [RIGHT, LEFT] as const;
/** +1 right, −1 left: the sign of the body's z on that side. */
export const outward = (side: Side): 1 | -1 => (side === RIGHT ? 1 : -1);

export const TRUNK = { pelvis: 0, abdomen: 1, thorax: 2, neck: 3, head: 4 } as const;
export const LIMB = {
	collar: 0,
	upperArm: 1,
	forearm: 2,
	hand: 3,
	fingers: 4,
	fingertips: 5,
	thumb: 6,
	thumbTip: 7,
	thigh: 8,
	shank: 9,
	foot: 10,
	toes: 11,
} as const;
export type TrunkName = keyof typeof TRUNK;
export type LimbName = keyof typeof LIMB;

const TRUNK_COUNT = 5;
const LIMB_COUNT = 12;
export const SEGMENT_COUNT = TRUNK_COUNT + 2 * LIMB_COUNT;
export const trunk = (name: TrunkName): number => TRUNK[name];
export const limb = (side: Side, name: LimbName): number => TRUNK_COUNT + side * LIMB_COUNT + LIMB[name];

type Triple = readonly [number, number, number];

export interface SegmentSpec {
	readonly name: TrunkName | LimbName;
	/** Null in the trunk. */
	readonly side: Side | null;
	/** −1 for the pelvis. */
	readonly parent: number;
	/** Its joint in the parent's axes, × stature. */
	readonly offset: Triple;
	/** Signs of the anatomical angles about z, x and y (see JOINT in ranges.ts). */
	readonly sign: Triple;
	readonly mass: number;
	/** Mass centre in its own axes, × stature. */
	readonly centre: Triple;
}

interface Draft {
	readonly name: TrunkName | LimbName;
	readonly parent: TrunkName | LimbName | null;
	readonly offset: Triple;
	readonly sign: Triple;
	readonly mass?: MassName;
	readonly centre?: Triple;
}

const upperArm = f("shoulderHeight") - f("elbowHeight");
const forearm = f("elbowHeight") - f("wristHeight");
const hand = f("wristHeight") - f("fingertipHeight");
const thigh = f("hipHeight") - f("kneeHeight");
const shank = f("kneeHeight") - f("ankleHeight");
/** Segment lengths, × stature. */
export const LENGTH = { upperArm, forearm, hand, thigh, shank } as const;

const ORIGIN: Triple = [0, 0, 0];
const SPINE: Triple = [-1, 1, 1];
const LIMB_SIGN: Triple = [1, -1, 1];
const PALM_SIGN: Triple = [1, 1, 1];

const trunkDrafts: readonly Draft[] = [
	{ name: "pelvis", parent: null, offset: ORIGIN, sign: SPINE, mass: "pelvis", centre: [-0.004, 0.022, 0] },
	{
		name: "abdomen",
		parent: "pelvis",
		offset: [-0.006, f("lumbarHeight") - f("hipHeight"), 0],
		sign: SPINE,
		mass: "abdomen",
		centre: [0.008, 0.037, 0],
	},
	{
		name: "thorax",
		parent: "abdomen",
		offset: [0.004, f("thoraxHeight") - f("lumbarHeight"), 0],
		sign: SPINE,
		mass: "thorax",
		centre: [0.002, 0.09, 0],
	},
	{ name: "neck", parent: "thorax", offset: [-0.016, f("neckHeight") - f("thoraxHeight"), 0], sign: SPINE },
	{
		name: "head",
		parent: "neck",
		offset: [0.014, f("headHeight") - f("neckHeight"), 0],
		sign: SPINE,
		mass: "head",
		centre: [0.004, 0.024, 0],
	},
];
const limbDrafts: readonly Draft[] = [
	{ name: "collar", parent: "thorax", offset: [0.016, 0.822 - f("thoraxHeight"), f("collarHalf")], sign: [1, -1, 1] },
	{
		name: "upperArm",
		parent: "collar",
		offset: [-0.022, f("shoulderHeight") - 0.822, f("shoulderHalf") - f("collarHalf")],
		sign: LIMB_SIGN,
		mass: "upperArm",
		centre: [0, -MASS_CENTRE.upperArm.value * upperArm, 0],
	},
	{
		name: "forearm",
		parent: "upperArm",
		offset: [0, -upperArm, 0],
		sign: LIMB_SIGN,
		mass: "forearm",
		centre: [0, -MASS_CENTRE.forearm.value * forearm, 0],
	},
	{
		name: "hand",
		parent: "forearm",
		offset: [0, -forearm, 0],
		sign: PALM_SIGN,
		mass: "hand",
		centre: [0, -MASS_CENTRE.hand.value * hand, 0],
	},
	{ name: "fingers", parent: "hand", offset: [0, -f("palmLength"), 0], sign: PALM_SIGN },
	{ name: "fingertips", parent: "fingers", offset: [0, -f("proximalLength"), 0], sign: PALM_SIGN },
	{ name: "thumb", parent: "hand", offset: [0.012, -0.014, -0.004], sign: PALM_SIGN },
	{ name: "thumbTip", parent: "thumb", offset: [0, -0.028, 0], sign: PALM_SIGN },
	{
		name: "thigh",
		parent: "pelvis",
		offset: [0, 0, f("hipHalf")],
		sign: LIMB_SIGN,
		mass: "thigh",
		centre: [0, -MASS_CENTRE.thigh.value * thigh, 0],
	},
	{
		name: "shank",
		parent: "thigh",
		offset: [0, -thigh, 0],
		sign: [-1, -1, 1],
		mass: "shank",
		centre: [0, -MASS_CENTRE.shank.value * shank, 0],
	},
	{
		name: "foot",
		parent: "shank",
		offset: [0, -shank, 0],
		sign: LIMB_SIGN,
		mass: "foot",
		centre: [MASS_CENTRE.foot.value * f("footLength") - f("heel"), -0.02, 0],
	},
	{ name: "toes", parent: "foot", offset: [f("ball"), -f("ankleHeight") + 0.012, 0], sign: LIMB_SIGN },
];

const mirrored = (v: Triple, side: Side): Triple => [v[0], v[1], v[2] * outward(side)];
const mirroredSign = (v: Triple, side: Side): Triple => [v[0], v[1] * outward(side), v[2] * outward(side)];

function specs(): SegmentSpec[] {
	const spec = (d: Draft, side: Side | null): SegmentSpec => ({
		name: d.name,
		side,
		parent: d.parent === null ? -1 : d.parent in TRUNK ? trunk(d.parent as TrunkName) : limb(side as Side, d.parent as LimbName),
		offset: side === null ? d.offset : mirrored(d.offset, side),
		sign: side === null ? d.sign : mirroredSign(d.sign, side),
		mass: d.mass === undefined ? 0 : MASS[d.mass].value,
		centre: side === null ? (d.centre ?? ORIGIN) : mirrored(d.centre ?? ORIGIN, side),
	});
	return [...trunkDrafts.map((d) => spec(d, null)), ...SIDES.flatMap((side) => limbDrafts.map((d) => spec(d, side)))];
}

/** All segments, parents before children; index by `trunk` and `limb`. */
export const SEGMENTS: readonly SegmentSpec[] = specs();
