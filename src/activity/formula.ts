import { RELATIVE_TOLERANCE } from "../flight/drag-path.ts";

/** The formulas that summary numbers come from: what the derivation prints. */
export interface Formula {
	readonly title: string;
	/** Plain-text mathematics. */
	readonly expression: string;
	readonly terms: readonly { readonly symbol: string; readonly meaning: string; readonly unit: string }[];
	readonly source: string;
	/** What was left out and what that costs. */
	readonly dropped: string;
}

const NEWTON = "Newton's first law in the inertial frame; rotating-frame form in OpenStax University Physics vol. 1, §6";

export const FORMULAS = {
	"drop-from-rest": {
		title: "Drop from rest above a curved floor",
		expression: "cos φ = r₀ / R_c;   t = tan φ / Ω;   s = −R (tan φ − φ)",
		terms: [
			{ symbol: "R", meaning: "floor radius", unit: "m" },
			{ symbol: "r₀", meaning: "radius of the release, R − h", unit: "m" },
			{ symbol: "R_c", meaning: "radius of the centre at contact, R − d/2", unit: "m" },
			{ symbol: "Ω", meaning: "spin rate", unit: "rpm" },
			{ symbol: "φ", meaning: "inertial angle swept in the fall", unit: "°" },
		],
		source: NEWTON,
		dropped: "Air drag. The arc does not depend on Ω; the time does.",
	},
	"free-flight": {
		title: "Free flight: a straight line in the inertial frame",
		expression: "r(t) = R_z(−ψ(t)) · [ r₀ + (v₀ + Ω × r₀) t ];   t = first contact with a surface",
		terms: [
			{ symbol: "r₀", meaning: "radius of the release", unit: "m" },
			{ symbol: "v₀", meaning: "release speed relative to the ring", unit: "m/s" },
			{ symbol: "Ω", meaning: "spin rate at the release", unit: "rpm" },
			{ symbol: "t", meaning: "time of the first contact", unit: "s" },
		],
		source: NEWTON,
		dropped: "Air drag; bounce and roll after the first impact.",
	},
	"drag-flight": {
		title: "Flight with air drag",
		expression: "a = C + K + E − ½ ρ C_d A |v| v / m;   ρ = p M / (R_u T)",
		terms: [
			{ symbol: "r₀", meaning: "radius of the release", unit: "m" },
			{ symbol: "v₀", meaning: "release speed relative to the ring", unit: "m/s" },
			{ symbol: "Ω", meaning: "spin rate at the release", unit: "rpm" },
			{ symbol: "ρ", meaning: "air density", unit: "kg/m³" },
			{ symbol: "C_d", meaning: "drag coefficient", unit: "" },
			{ symbol: "A", meaning: "frontal area, π d² / 4", unit: "m²" },
			{ symbol: "m", meaning: "mass of the object", unit: "kg" },
		],
		source: `Quadratic drag, OpenStax College Physics §5.2; integrated by Dormand & Prince 5(4), relative tolerance ${RELATIVE_TOLERANCE}`,
		dropped: "Lift and spin of the object, and the rise of air density towards the rim (0.6 % at 100 m and 1 g).",
	},
	"first-contact": {
		title: "What is struck first",
		expression: "struck = the surface whose distance to the centre is first d/2",
		terms: [
			{ symbol: "d", meaning: "diameter of the object", unit: "m" },
			{ symbol: "h", meaning: "height of its centre at the release", unit: "m" },
		],
		source: "Geometry of the layout; the object is a sphere",
		dropped: "Bounce and roll after the first impact; the object's real outline.",
	},
	"landing-axial": {
		title: "Axial offset",
		expression: "z = z_touched − z_release",
		terms: [
			{ symbol: "z_touched", meaning: "axial place of the point touched", unit: "m" },
			{ symbol: "z_release", meaning: "axial place of the release", unit: "m" },
		],
		source: "Geometry; no force acts along the axis without drag",
		dropped: "Nothing.",
	},
	"landing-radius": {
		title: "Radius of the point touched",
		expression: "r = √(x² + y²) of the point touched",
		terms: [{ symbol: "r", meaning: "radius", unit: "m" }],
		source: "Geometry of the layout",
		dropped: "Nothing.",
	},
	"landing-speed": {
		title: "Speed at contact, relative to the ring",
		expression: "v = | R_z(−ψ) v_inertial − Ω × r |",
		terms: [
			{ symbol: "v_down", meaning: "part along down", unit: "m/s" },
			{ symbol: "v_pro", meaning: "part along prograde, − against spin", unit: "m/s" },
			{ symbol: "v_axial", meaning: "part along the axis", unit: "m/s" },
		],
		source: NEWTON,
		dropped: "Nothing beyond the flight itself.",
	},
	"landing-angle": {
		title: "Angle of arrival off the vertical",
		expression: "β = arccos(v_down / v)",
		terms: [
			{ symbol: "v_down", meaning: "part of the velocity along down", unit: "m/s" },
			{ symbol: "v", meaning: "speed at contact", unit: "m/s" },
		],
		source: "Geometry",
		dropped: "Nothing.",
	},
	"without-turning": {
		title: "From where it would land without turning",
		expression:
			"along the floor s − s₀, along the axis s_z − s_z₀;   s₀, s_z₀: the same release in a room that does not turn, under the uniform level g = Ω² R",
		terms: [
			{ symbol: "s", meaning: "offset of the landing from the point below the release", unit: "m" },
			{ symbol: "s₀", meaning: "offset of the landing without turning", unit: "m" },
			{ symbol: "s_z", meaning: "axial offset of the landing from the release", unit: "m" },
			{ symbol: "s_z₀", meaning: "axial offset of the landing without turning", unit: "m" },
			{ symbol: "g", meaning: "uniform level, that of the floor", unit: "m/s²" },
		],
		source: "Uniform field, OpenStax University Physics vol. 1, §4.3; the same air and the same floor",
		dropped: "Every surface but the release deck's own floor.",
	},
	"from-feet": {
		title: "Offset from the feet",
		expression: "s_feet = s + s_release − s_feet₀",
		terms: [
			{ symbol: "s", meaning: "offset from the point below the release", unit: "m" },
			{ symbol: "s_release − s_feet₀", meaning: "from the feet to the point below the release, along the struck surface", unit: "m" },
		],
		source: "Geometry of the layout",
		dropped: "Nothing.",
	},
	"impact-energy": {
		title: "Kinetic energy at contact",
		expression: "E = ½ m v²",
		terms: [
			{ symbol: "m", meaning: "mass of the object", unit: "kg" },
			{ symbol: "v", meaning: "speed at contact", unit: "m/s" },
		],
		source: "OpenStax University Physics vol. 1, §7.2",
		dropped: "Energy of the object's own rotation.",
	},
	"equal-earth-drop": {
		title: "Drop on Earth with the same speed at the end",
		expression: "H = v² / (2 g₀)",
		terms: [
			{ symbol: "v", meaning: "speed at contact", unit: "m/s" },
			{ symbol: "g₀", meaning: "standard gravity", unit: "m/s²" },
		],
		source: "OpenStax College Physics §2.7; g₀ NIST SP 811",
		dropped: "Air drag on Earth.",
	},
} as const satisfies Record<string, Formula>;

export type FormulaId = keyof typeof FORMULAS;
