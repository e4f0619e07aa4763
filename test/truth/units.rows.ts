import { unit as byMathjs } from "mathjs";
import { radpsFromRpm } from "../../src/quantity/convert.ts";
import { toSi, unitOf } from "../../src/quantity/units.ts";
import type { TruthRow } from "./compare.ts";

/** Our symbol, the same in mathjs, the SI unit there. */
const PAIRS = [
	["ft", "ft", "m"],
	["in", "inch", "m"],
	["yd", "yd", "m"],
	["mi", "mi", "m"],
	["°", "deg", "rad"],
	["″", "arcsec", "rad"],
	["km/h", "km/h", "m/s"],
	["mph", "mi/h", "m/s"],
	["lb", "lbm", "kg"],
	["oz", "oz", "kg"],
	["lbf", "lbf", "N"],
	["ft·lbf", "ft lbf", "J"],
	["atm", "atm", "Pa"],
	["psi", "psi", "Pa"],
	["bar", "bar", "Pa"],
	["°F", "degF", "K"],
	["°C", "degC", "K"],
] as const;

export function rows(): TruthRow[] {
	return [
		...PAIRS.map(
			([symbol, theirs, si]): TruthRow => ({
				group: "units against mathjs",
				check: `37.5 ${symbol}`,
				ours: toSi(37.5, unitOf(symbol)),
				reference: byMathjs(37.5, theirs).toNumber(si),
				tolerance: 1e-9,
				kind: "relative",
				unit: si,
				source: "mathjs 15.2.0, unit table",
				flag: "R2",
			}),
		),
		{
			group: "revolutions a minute",
			check: "1 rpm; π/60 would make radii four times too large",
			ours: radpsFromRpm(1),
			reference: 0.104719755,
			tolerance: 5e-10,
			kind: "absolute",
			unit: "rad/s",
			source: "2π/60, computed",
			flag: "C",
		},
	];
}
