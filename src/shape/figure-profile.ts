import type { LimbName, TrunkName } from "../body/skeleton.ts";
import type { Loft, Row } from "./figure-loft.ts";
import { COLOUR } from "./palette.ts";

/**
 * The crew figure's build, segment by segment, of a right limb: an adult of middling build in a light
 * coverall and soft boots. Drawn by eye between the landmarks of body/segments.ts.
 */
const { skin, suit, suitDark, boot, coaming } = COLOUR;

/** Trunk rows are written in absolute heights and brought to the segment's origin. */
const from = (x0: number, y0: number, rows: readonly (readonly [number, number, number, number, number?])[]): Row[] =>
	rows.map(([y, front, back, half, power = 2.3]) => [y - y0, front - x0, back + x0, half, half, power]);

const pelvis: Loft = {
	along: "up",
	rows: from(0, 530, [
		[474, 16, 40, 30],
		[488, 36, 60, 64],
		[505, 46, 67, 84],
		[523, 51, 69, 91.5],
		[543, 53, 66, 92.5],
		[565, 54, 58, 88],
		[585, 54, 50, 81],
		[586, 56, 52, 82.5],
		[599, 56, 49, 79.5],
		[600, 46, 38, 68],
	]),
	between: 1,
	around: 20,
	capFirst: [5, 1],
	capLast: null,
	colour: [
		[-100, suit],
		[56, suitDark],
		[69, suit],
	],
};

const abdomen: Loft = {
	along: "up",
	rows: from(-6, 588, [
		[572, 42, 34, 64],
		[590, 50, 42.5, 74],
		[604, 53, 45, 75.5],
		[622, 55, 45.5, 75],
		[645, 58, 51, 78],
		[668, 58, 53.5, 77],
		[684, 54, 50, 70],
	]),
	between: 1,
	around: 20,
	capFirst: null,
	capLast: null,
	colour: [[-100, suit]],
};

const thorax: Loft = {
	along: "up",
	rows: from(-2, 660, [
		[632, 46, 38, 62],
		[662, 59.5, 55, 79.5],
		[698, 65, 66, 86],
		[735, 66, 73, 90, 2.4],
		[770, 63, 77, 91, 2.4],
		[797, 54, 77, 90, 2.3],
		[814, 44, 74, 86],
		[829, 34, 69, 76],
		[841, 25, 63, 57],
		[849, 18, 57, 42],
		[854, 16.5, 54.5, 37],
		[860, 16, 53, 35.5],
	]),
	between: 1,
	around: 20,
	capFirst: null,
	capLast: [0, 1],
	colour: [
		[-100, suit],
		[110, suitDark],
	],
};

const neck: Loft = {
	along: "up",
	rows: [
		[-15, 33, 34, 32, 32],
		[8, 31, 32, 30, 30, 2.1, 1],
		[34, 31, 29, 29, 29, 2.1, 6],
		[62, 30, 29, 29.5, 29.5, 2.1, 12],
	],
	between: 1,
	around: 12,
	capFirst: null,
	capLast: null,
	colour: [[-100, skin]],
};

const TEMPLE = 1.6;
const head: Loft = {
	along: "up",
	rows: [
		[-34, 44, 4, 17, 17, 2.2],
		[-28, 48, 18, 26, 26, 2.3],
		[-14, 50, 38, 35, 35, 2.4],
		[2, 51, 50, 39.5, 39.5, 2.3],
		[18, 52.5, 55, 42, 42, 2.2],
		[34, 52, 58, 43.5, 43.5, 2.1],
		[48, 53, 58, 43.5, 43.5, 2.1],
		[60, 49.5, 56, 42, 42, 2.1],
		[72, 42, 50, 37.5, 37.5, 2.05],
		[82, 32, 40, 29, 29, 2],
		[90, 19, 25, 17, 17, 2],
	],
	between: 1,
	around: 16,
	capFirst: [3, 1],
	capLast: [5, 1],
	colour: [
		[-100, skin],
		[59, suitDark],
	],
	paint: (at, angle) => (angle > TEMPLE && at > -16 && at < 59 ? suitDark : null),
};

const ear: Loft = {
	along: "right",
	rows: [
		[39, 8, 10, 16, 15],
		[45, 9, 11, 17, 16],
	],
	between: 1,
	around: 10,
	capFirst: null,
	capLast: [4, 2],
	colour: [[-100, suitDark]],
	origin: [-2, 24, 0],
};

const collar: Loft = {
	along: "right",
	rows: [
		[20, 10, 76, 24, 34],
		[42, 10, 73, 26, 38],
		[62, 8, 63, 23, 36],
		[85, 5, 51, 17.5, 28],
	],
	between: 1,
	around: 12,
	capFirst: null,
	capLast: [15, 2],
	colour: [[-100, suitDark]],
};

const upperArm: Loft = {
	along: "up",
	rows: [
		[0, 22.5, 23, 24, 24],
		[-24, 29.5, 30.5, 28, 25],
		[-50, 30, 31, 28, 24.5],
		[-80, 29, 28, 25, 24],
		[-112, 28, 26, 23, 23],
		[-150, 24.5, 24, 23, 23],
		[-188, 24, 24, 23.5, 23],
	],
	between: 1,
	around: 12,
	capFirst: [19, 3],
	capLast: [24, 2],
	colour: [
		[100, suitDark],
		[-50, suit],
	],
};

const forearm: Loft = {
	along: "up",
	rows: [
		[0, 22.3, 22.3, 22, 21.5],
		[-22, 24, 23, 26, 24],
		[-48, 24, 22, 25, 23.5],
		[-82, 21, 19.5, 21, 20],
		[-112, 18.3, 16.8, 16.8, 16.2],
		[-127, 17.8, 16.3, 15.7, 15],
		[-128, 18.6, 17.1, 16.5, 15.8],
		[-141, 17.8, 16.3, 15.2, 14.7],
	],
	between: 1,
	around: 12,
	capFirst: [22, 2],
	capLast: [0, 1],
	colour: [
		[100, suit],
		[-128, suitDark],
	],
};

const palm: Loft = {
	along: "up",
	rows: [
		[8, 14, 13.5, 10.5, 11],
		[-4, 14.5, 14, 10, 11],
		[-16, 18, 17.5, 9, 12],
		[-32, 22, 21, 8.5, 11.5],
		[-47, 23, 22.5, 8, 9.5],
		[-55, 22.5, 22, 7.5, 8.5],
	],
	between: 1,
	around: 10,
	capFirst: null,
	capLast: [5, 2],
	colour: [[100, skin]],
};

/** Index to little finger: place across the knuckles, knuckle above the line, radius, length of the last two bones. */
const FINGERS = [
	[17, 0.5, 5.2, 26],
	[5.8, 0, 5.4, 29],
	[-5.4, 1, 5.1, 27],
	[-16.2, 4, 4.6, 21],
] as const;

const fingers: Loft[] = FINGERS.map(([x, up, r]) => ({
	along: "up",
	rows: [
		[2 + up, r * 1.12, r * 1.12, r * 1.1, r * 1.1],
		[-12, r * 0.98, r * 0.98, r * 0.98, r * 1.02],
		[-25, r, r, r, r],
	],
	between: 1,
	around: 6,
	capFirst: [4, 1],
	capLast: [r, 2],
	colour: [[100, skin]],
	origin: [x, 0, 0],
}));

const fingertips: Loft[] = FINGERS.map(([x, , r, long]) => ({
	along: "up",
	rows: [
		[0, r, r, r, r],
		[-long * 0.6, r * 0.9, r * 0.9, r * 0.87, r * 0.92, 2.2, 0, -long * 0.05],
		[-long + r * 0.6, r * 0.7, r * 0.7, r * 0.6, r * 0.65, 2.2, 0, -long * 0.16],
	],
	between: 1,
	around: 6,
	capFirst: [r, 2],
	capLast: [r * 0.6, 1],
	colour: [[100, skin]],
	origin: [x, 0, 0],
}));

const thumb: Loft = {
	along: "up",
	rows: [
		[4, 9, 9, 9, 9],
		[-10, 9.5, 9.5, 9.5, 10],
		[-22, 7, 7, 7, 7.5],
		[-34, 6.2, 6.2, 6, 6],
	],
	between: 1,
	around: 8,
	capFirst: [8, 2],
	capLast: [6, 2],
	colour: [[100, skin]],
};

const thumbTip: Loft = {
	along: "up",
	rows: [
		[0, 6.2, 6.2, 6, 6],
		[-9, 6, 6, 5, 5.5],
		[-15, 4.8, 4.8, 3.6, 4],
	],
	between: 1,
	around: 8,
	capFirst: [6, 2],
	capLast: [3, 1],
	colour: [[100, skin]],
};

/** Half width of the knee patch, rad. */
const KNEE = 1;
const thigh: Loft = {
	along: "up",
	rows: [
		[16, 42, 55, 41.3, 36],
		[-8, 49.5, 63, 43.5, 43],
		[-34, 52, 61, 45, 45.5],
		[-64, 50, 53, 45, 46.5],
		[-110, 46, 45, 41, 42],
		[-160, 40, 38, 36, 35.5],
		[-205, 35, 33.5, 32, 31],
		[-245, 32.5, 32.5, 31, 31],
	],
	between: 1,
	around: 12,
	capFirst: [24, 2],
	capLast: [32, 3],
	colour: [[100, suit]],
	paint: (at, angle) => (at < -204 && angle < KNEE ? suitDark : null),
};

const shank: Loft = {
	along: "up",
	rows: [
		[0, 30.5, 30.5, 30.3, 30.3],
		[-22, 31, 33, 31, 30.5],
		[-41, 29, 36, 31.8, 31],
		[-62, 27, 39, 32.5, 31.5],
		[-90, 25, 38, 31, 31],
		[-124, 23.5, 32, 27, 27],
		[-137, 23.2, 30, 26, 26],
		[-138, 26, 33, 28.5, 28.5],
		[-152, 25.5, 31.5, 28, 28],
		[-192, 24.5, 27, 24, 24],
		[-222, 27.5, 30.5, 24.5, 23.5],
		[-246, 32, 33, 25, 24],
	],
	between: 1,
	around: 12,
	capFirst: [28, 2],
	capLast: null,
	colour: [
		[100, suit],
		[-138, boot],
	],
	paint: (at, angle) => (at < 3 && at > -40 && angle < KNEE ? suitDark : null),
};

/** A slab under the boot, level with the floor. */
const sole = (rows: readonly (readonly [at: number, outer: number, inner: number])[], level: number, toe: number): Loft => ({
	along: "forward",
	rows: rows.map(([at, outer, inner]) => [at, 3, 3, outer, inner, 4, level + 3]),
	between: 1,
	around: 8,
	capFirst: [4, 2],
	capLast: [toe, 2],
	colour: [[-100, coaming]],
	plain: true,
});
const foot: Loft = {
	along: "forward",
	rows: [
		[-35, 25, 25, 18, 18, 2.4, -14],
		[-20, 31, 31, 23.5, 22.5, 2.4, -9],
		[4, 35, 35, 25.5, 24.5, 2.3, -5],
		[28, 29.5, 29.5, 27.5, 26.5, 2.4, -11],
		[51, 22.5, 22.5, 30, 28.5, 2.5, -18],
		[62, 20, 20, 30.6, 28.8, 2.5, -20.5],
		[74, 14.5, 14.5, 27, 25, 2.5, -23.5],
		[82, 9, 9, 20, 18, 2.5, -25],
	],
	between: 1,
	around: 10,
	capFirst: [5, 2],
	capLast: [4, 1],
	colour: [[-100, boot]],
	floor: -36,
};
const footSole = sole(
	[
		[-34, 16, 16],
		[-26, 22.5, 22],
		[0, 25.5, 24],
		[40, 29.5, 27.5],
		[78, 31.5, 29.5],
	],
	-39,
	2,
);

const toes: Loft = {
	along: "forward",
	rows: [
		[-26, 13, 13, 24, 22, 2.5, 3],
		[-7, 18, 18, 31, 29.2, 2.5, 4.3],
		[6, 17, 17, 31, 29, 2.5, 3.6],
		[18, 16, 16, 30, 27, 2.5, 2.2],
		[32, 12, 12, 22.5, 18.5, 2.4, -1],
	],
	between: 1,
	around: 10,
	capFirst: null,
	capLast: [10, 2],
	colour: [[-100, boot]],
	floor: -9,
};
const toeSole = sole(
	[
		[0, 31.5, 29.5],
		[18, 30, 27],
		[33, 22.5, 18.5],
	],
	-12,
	9.5,
);

export const BUILD: Readonly<Record<TrunkName | LimbName, readonly Loft[]>> = {
	pelvis: [pelvis],
	abdomen: [abdomen],
	thorax: [thorax],
	neck: [neck],
	head: [head, ear, { ...ear, rows: ear.rows.map(([z, ...rest]) => [-z, ...rest] as unknown as Row) }],
	collar: [collar],
	upperArm: [upperArm],
	forearm: [forearm],
	hand: [palm],
	fingers,
	fingertips,
	thumb: [thumb],
	thumbTip: [thumbTip],
	thigh: [thigh],
	shank: [shank],
	foot: [foot, footSole],
	toes: [toes, toeSole],
};
