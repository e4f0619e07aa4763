import { evaluate } from "mathjs";
import { airDensity } from "../../src/flight/air.ts";
import type { TruthRow } from "./compare.ts";

/** kPa, °C, share of oxygen. */
type Air = readonly [number, number, number];
const ours = ([kPa, celsius, oxygen]: Air): number =>
	airDensity({ pressure: kPa * 1000, temperature: celsius + 273.15, oxygenFraction: oxygen });
/** p M / (R T) with mathjs's own units and gas constant. */
const byMathjs = ([kPa, celsius, oxygen]: Air): number =>
	evaluate(
		`number(${kPa} kPa * (${oxygen} * 31.9988 + ${1 - oxygen} * 28.0134) g/mol / (gasConstant * (${celsius + 273.15} K)), kg/m^3)`,
	) as number;

const EXPLORATION = 0.34;
const DRY = 0.2095;

export function rows(): TruthRow[] {
	const mixed = [
		[[56.5, 20, EXPLORATION], 0.6808],
		[[56.5, 21, EXPLORATION], 0.6785],
		[[56.5, 22, EXPLORATION], 0.6762],
	] as const;
	return [
		...mixed.map(([air, printed]): TruthRow => {
			const second = byMathjs(air);
			if (!(Math.abs(second - printed) <= 5e-5)) throw new RangeError(`printed ${printed}, mathjs ${second}`);
			return {
				group: "air density, oxygen and nitrogen",
				check: `${air[0]} kPa, ${air[1]} °C, 34 % O2`,
				ours: ours(air),
				reference: second,
				tolerance: 1e-8,
				kind: "relative",
				unit: "kg/m³",
				source: "mathjs 15.2.0 units and gas constant, in agreement with a published table",
				flag: "C",
			};
		}),
		...(
			[
				[[101.325, 20, DRY], 1.2, 0.006, "OpenStax College Physics m42219, 1.20 kg/m³", "R"],
				[[101.325, 15, DRY], 1.225, 0.005, "standard atmosphere at sea level; it holds 0.9 % argon, which ours leaves out", "M-h"],
			] as const
		).map(
			([air, reference, tolerance, source, flag]): TruthRow => ({
				group: "air density, dry air with its argon",
				check: `${air[0]} kPa, ${air[1]} °C`,
				ours: ours(air),
				reference,
				tolerance,
				kind: "relative",
				unit: "kg/m³",
				source,
				flag,
			}),
		),
	];
}
