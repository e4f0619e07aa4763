import { readFileSync } from "node:fs";
import { degFromRad, radFromDeg } from "../../src/quantity/convert.ts";
import { indexOfHip, starDirection } from "../../src/sky/catalogue.ts";
import { temperatureFromBMinusV } from "../../src/sky/colour.ts";
import { directionFromRaDec } from "../../src/sky/direction.ts";
import { separation, shippedCatalogue } from "../sky/shipped.ts";
import type { TruthRow } from "./compare.ts";

export interface NamedStar {
	readonly name: string;
	readonly hip: number;
	readonly raDeg: number;
	readonly decDeg: number;
	readonly magnitude: number;
	readonly source: string;
}

/** The rows of named-stars.csv; throws on a row that is not six fields with finite numbers. */
export function namedStars(): NamedStar[] {
	const [header, ...lines] = readFileSync(new URL("named-stars.csv", import.meta.url), "utf8")
		.trim()
		.split("\n");
	if (header !== "name,hip,ra_deg,dec_deg,v_mag,source") throw new Error(`named-stars.csv begins with ${header}`);
	return lines.map((line) => {
		const match = /^([^,]+),(\d+),([-\d.]+),([-\d.]+),([-\d.]+),"([^"]+)"$/.exec(line);
		const numbers = match?.slice(2, 6).map(Number) ?? [];
		if (!match || !numbers.every(Number.isFinite)) throw new Error(`named-stars.csv: a row that is not six fields: ${line}`);
		const [hip, raDeg, decDeg, magnitude] = numbers as [number, number, number, number];
		return { name: match[1] as string, hip, raDeg, decDeg, magnitude, source: match[6] as string };
	});
}

/** Right ascension h m s and declination ° ′ ″ with their sign, ICRS J2000. */
const SEXAGESIMAL = [
	["Sirius", 32349, [6, 45, 8.917], -1, [16, 42, 58.02]],
	["Canopus", 30438, [6, 23, 57.11], -1, [52, 41, 44.38]],
	["Vega", 91262, [18, 36, 56.336], 1, [38, 47, 1.28]],
	["Betelgeuse", 27989, [5, 55, 10.305], 1, [7, 24, 25.43]],
	["Polaris", 11767, [2, 31, 49.095], 1, [89, 15, 50.79]],
] as const;

const TEMPERATURES = [
	[-0.03, 10515.6],
	[0, 10125.2],
	[0.65, 5778.4],
	[1.5, 3793.5],
	[1.865, 3316.0],
] as const;

export function rows(): TruthRow[] {
	const catalogue = shippedCatalogue();
	const apart = (hip: number, raDeg: number, decDeg: number): number => {
		const i = indexOfHip(catalogue, hip);
		if (i < 0) throw new Error(`HIP ${hip} is not in the packed catalogue`);
		return degFromRad(separation(starDirection(catalogue, i), directionFromRaDec(radFromDeg(raDeg), radFromDeg(decDeg))));
	};
	const direction = { reference: 0, tolerance: 0.01, kind: "absolute", unit: "deg" } as const;
	return [
		...namedStars().map((s) => ({
			...direction,
			group: "named stars, direction",
			check: s.name,
			ours: apart(s.hip, s.raDeg, s.decDeg),
			source: s.source,
			flag: "R",
		})),
		...SEXAGESIMAL.map(([name, hip, [h, m, s], sign, [d, minute, second]]) => ({
			...direction,
			group: "named stars, ICRS to the arcsecond",
			check: name,
			ours: apart(hip, 15 * (h + m / 60 + s / 3600), sign * (d + minute / 60 + second / 3600)),
			tolerance: 0.001,
			source: "ICRS J2000 positions from memory, in agreement with two catalogues",
			flag: "M-h",
		})),
		...TEMPERATURES.map(([bMinusV, kelvin]) => ({
			group: "star temperature from B−V",
			check: `B−V ${bMinusV}`,
			ours: temperatureFromBMinusV(bMinusV),
			reference: kelvin,
			tolerance: 2e-5,
			kind: "relative" as const,
			unit: "K",
			source: "Ballesteros 2012, EPL 97, 34008, values computed from the formula",
			flag: "R2, C",
		})),
	];
}
