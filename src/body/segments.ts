/**
 * The crew figure's proportions as fractions of stature (boots count within it). "recalled" values were
 * written from memory of the named source and want checking against it before anything rests on them.
 */
export interface Fraction {
	readonly value: number;
	readonly source: string;
	readonly recalled: boolean;
}

const WINTER = "Drillis & Contini 1966 as drawn in Winter, Biomechanics and Motor Control of Human Movement, Fig. 4.1";
const HANDOUT = "Winter 2005, segment mass table, as reprinted in a university handout";
const recalled = (value: number, source = WINTER): Fraction => ({ value, source, recalled: true });
const read = (value: number, source = HANDOUT): Fraction => ({ value, source, recalled: false });
const placed = (value: number): Fraction => ({
	value,
	source: "placed by eye within the neighbouring landmarks; no source",
	recalled: false,
});

/** Heights above the floor in erect standing, breadths and lengths; × stature, m. */
export const FRACTION = {
	eyeHeight: recalled(0.936),
	chinHeight: recalled(0.87),
	shoulderHeight: recalled(0.818),
	elbowHeight: recalled(0.63),
	wristHeight: recalled(0.485),
	fingertipHeight: recalled(0.377),
	hipHeight: recalled(0.53),
	kneeHeight: recalled(0.285),
	ankleHeight: recalled(0.039),
	/** Over both deltoids. */
	shoulderBreadth: recalled(0.259),
	hipBreadth: recalled(0.191),
	footLength: recalled(0.152),
	footBreadth: recalled(0.055),
	/** Axis levels of the trunk: lumbar, thoracolumbar, base and top of the neck. */
	lumbarHeight: placed(0.588),
	thoraxHeight: placed(0.66),
	neckHeight: placed(0.843),
	headHeight: placed(0.905),
	/** Half the distance between both hip, both shoulder axes, and both inner ends of the collar bones. */
	hipHalf: placed(0.05),
	shoulderHalf: placed(0.099),
	collarHalf: placed(0.014),
	/** How far the eyes lie before the top of the neck, and their half distance. */
	eyeForward: placed(0.047),
	eyeHalf: placed(0.018),
	/** Heel behind the ankle axis, ball of the foot before it. */
	heel: placed(0.04),
	ball: placed(0.074),
	/** Wrist to knuckles, knuckles to the second finger joint. */
	palmLength: placed(0.055),
	proximalLength: placed(0.025),
} as const satisfies Record<string, Fraction>;

export type FractionName = keyof typeof FRACTION;
export const fraction = (name: FractionName): number => FRACTION[name].value;

/** Segment masses as fractions of body mass; a limb's are for one side. They add up to one. */
export const MASS = {
	hand: read(0.006),
	forearm: read(0.016),
	upperArm: read(0.028),
	foot: read(0.0145),
	shank: read(0.0465),
	thigh: read(0.1),
	head: read(0.081),
	/** The trunk's 0.497 in three. */
	thorax: recalled(0.216, WINTER),
	abdomen: recalled(0.139, WINTER),
	pelvis: recalled(0.142, WINTER),
} as const satisfies Record<string, Fraction>;
export type MassName = keyof typeof MASS;

/** Mass centre along a limb segment from its upper end, as a fraction of the segment's length. */
export const MASS_CENTRE = {
	hand: recalled(0.506),
	forearm: recalled(0.43),
	upperArm: recalled(0.436),
	foot: recalled(0.5),
	shank: recalled(0.433),
	thigh: recalled(0.433),
} as const satisfies Record<string, Fraction>;
