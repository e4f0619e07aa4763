import { apparentParts } from "../../src/frame/apparent.ts";
import { constantSpin } from "../../src/frame/spin.ts";
import { degFromRad, gFromMps2, radpsFromRpm, rpmFromRadps } from "../../src/quantity/convert.ts";
import { length, type RingVec, ring } from "../../src/vector/vec3.ts";
import type { TruthRow } from "./compare.ts";
import { apparentByDifferences } from "./inertial.ts";

const STILL = ring(0, 0, 0);
const apparent = (rate: number, radius: number, velocity: RingVec = STILL, acceleration: RingVec = STILL) =>
	apparentParts(constantSpin(rate), 0, ring(radius, 0, 0), velocity, acceleration);
const level = (rpm: number, radius: number): number => length(apparent(radpsFromRpm(rpm), radius).sum);
/** The centrifugal part is as Ω² and as r, which the rows of `level` hold; these are its inverses. */
const radiusFor = (mps2: number, rpm: number): number => mps2 / level(rpm, 1);
const rateFor = (mps2: number, radius: number): number => Math.sqrt(mps2 / length(apparent(1, radius).sum));

type Row = Omit<TruthRow, "group" | "kind"> & { kind?: TruthRow["kind"] };
const gather = (group: string, list: Row[]): TruthRow[] => list.map((row) => ({ kind: "relative", ...row, group }));

const TRADE = "common practice figure, no source";
const CP = "OpenStax College Physics, m42086";
const HALL = "Globus & Hall 2017, NSS Space Settlement Journal, abstract (rounded there)";

/** A walker at `v` m/s along the floor: ours, and by differences of the path itself. */
function walker(rpm: number, radius: number, v: number): { ours: number; differenced: number } {
	const rate = radpsFromRpm(rpm);
	const ours = gFromMps2(length(apparent(rate, radius, ring(0, v, 0), ring((-v * v) / radius, 0, 0)).sum));
	const g = apparentByDifferences(rate, (t) => [radius * Math.cos((v * t) / radius), radius * Math.sin((v * t) / radius), 0]);
	return { ours, differenced: gFromMps2(Math.hypot(...g)) };
}

/** A climber inward at `v`: sideways force on `mass`, and tilt, ours and by differences. */
function climber(rpm: number, radius: number, v: number): { ours: RingVec; differenced: readonly [number, number, number] } {
	const rate = radpsFromRpm(rpm);
	return { ours: apparent(rate, radius, ring(-v, 0, 0)).sum, differenced: apparentByDifferences(rate, (t) => [radius - v * t, 0, 0]) };
}

/** A computed value of the reference sheet counts only where the differences give it to its last digit. */
function confirmed(printed: number, differenced: number, halfDigit: number): number {
	if (!(Math.abs(printed - differenced) <= halfDigit)) throw new RangeError(`printed ${printed}, by differences ${differenced}`);
	return printed;
}

const DIFFERENCES = "computed from Ω²r and 2Ωv; second differences of the inertial path give the same digits";

export function rows(): TruthRow[] {
	const walks = [3, -3].flatMap((v) => [[4, 56, v, v > 0 ? 1.2746 : 0.7621] as const, [8, 10, v, v > 0 ? 1.32 : 0.2949] as const]);
	const climbs = [
		[4, 0.3, 20.106],
		[4, 0.5, 33.51],
		[6, 0.3, 30.159],
		[2, 0.3, 10.053],
	] as const;
	return [
		...gather("level on a turning floor", [
			{ check: "895 m, 1 rpm", ours: gFromMps2(level(1, 895)), reference: 1, tolerance: 0.002, unit: "g", source: TRADE, flag: "C" },
			{
				check: "100 m, floor at 31.5 m/s",
				ours: gFromMps2(level(rpmFromRadps(31.5 / 100), 100)),
				reference: 1,
				tolerance: 0.02,
				unit: "g",
				source: TRADE,
				flag: "C",
			},
			{ check: "4.5 m, 14 rpm", ours: gFromMps2(level(14, 4.5)), reference: 1, tolerance: 0.02, unit: "g", source: TRADE, flag: "C" },
			{ check: "322 m, 1 rpm", ours: gFromMps2(level(1, 322)), reference: 0.36, tolerance: 0.01, unit: "g", source: TRADE, flag: "C" },
			{
				check: "22.0 kg child, 40.0 rpm at 1.25 m, force",
				ours: 22 * level(40, 1.25),
				reference: 483,
				tolerance: 0.5 / 483,
				unit: "N",
				source: CP,
				flag: "R",
			},
			{
				check: "22.0 kg child, 3.00 rpm at 8.00 m, force",
				ours: 22 * level(3, 8),
				reference: 17.4,
				tolerance: 0.05 / 17.4,
				unit: "N",
				source: CP,
				flag: "R",
			},
		]),
		...gather(
			"radius for 1 g",
			[
				[1, 895],
				[2, 225],
				[4, 56],
				[6, 25],
				[10, 9],
			].map(([rpm, radius]) => ({
				check: `${rpm} rpm`,
				ours: radiusFor(9.80665, rpm!),
				reference: radius!,
				tolerance: 0.007,
				unit: "m",
				source: HALL,
				flag: "R",
			})),
		),
		...gather("spin rate for a level", [
			{
				check: "10 × 9.80 m/s² at 15.0 m, rad/s",
				ours: rateFor(98, 15),
				reference: 2.56,
				tolerance: 0.005 / 2.56,
				unit: "rad/s",
				source: CP,
				flag: "R",
			},
			{
				check: "wheel 110 m across, 3.00 m/s²",
				ours: rpmFromRadps(rateFor(3, 55)),
				reference: 2.23,
				tolerance: 0.005 / 2.23,
				unit: "rpm",
				source: "a college problem with its printed solution",
				flag: "R",
			},
			{
				check: "1.60 rpm, 9.60 m/s²: radius",
				ours: radiusFor(9.6, 1.6),
				reference: 340,
				tolerance: 0.01,
				unit: "m",
				source: "a college problem with its printed solution (rate rounded there)",
				flag: "R",
			},
		]),
		...gather("speed of the floor", [
			{
				check: "130 m at the spin of 100 m at 31.5 m/s",
				ours: length(apparent(31.5 / 100, 130).sum) / (31.5 / 100),
				reference: 41,
				tolerance: 0.005,
				unit: "m/s",
				source: TRADE,
				flag: "C",
			},
		]),
		...gather(
			"walking with and against spin",
			walks.map(([rpm, radius, v, printed]) => {
				const { ours, differenced } = walker(rpm, radius, v);
				return {
					check: `${v} m/s, ${radius} m, ${rpm} rpm`,
					ours,
					reference: confirmed(printed, differenced, 5.01e-5),
					tolerance: 5.01e-5,
					kind: "absolute" as const,
					unit: "g",
					source: DIFFERENCES,
					flag: "C",
				};
			}),
		),
		...gather(
			"climbing inward, sideways on 80 kg",
			climbs.map(([rpm, v, printed]) => {
				const { ours, differenced } = climber(rpm, 50, v);
				return {
					check: `${v} m/s, ${rpm} rpm, prograde`,
					ours: 80 * ours[1],
					reference: confirmed(printed, 80 * differenced[1], 5.01e-4),
					tolerance: 5.01e-4,
					kind: "absolute" as const,
					unit: "N",
					source: DIFFERENCES,
					flag: "C",
				};
			}),
		),
		...gather(
			"climbing inward at 50 m, tilt",
			(
				[
					[4, 0.3, 1.641],
					[4, 0.5, 2.7336],
				] as const
			).map(([rpm, v, printed]) => {
				const { ours, differenced } = climber(rpm, 50, v);
				const tilt = (g: readonly number[]): number => degFromRad(Math.atan2(g[1]!, g[0]!));
				return {
					check: `${v} m/s, ${rpm} rpm`,
					ours: tilt(ours),
					reference: confirmed(printed, tilt(differenced), 5.01e-5),
					tolerance: 5.01e-5,
					kind: "absolute" as const,
					unit: "deg",
					source: DIFFERENCES,
					flag: "C",
				};
			}),
		),
	];
}
