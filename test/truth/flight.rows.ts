import type { TruthRow } from "./compare.ts";
import { mathjsFlight } from "./mathjs-flight.ts";
import { odexFlight } from "./odex-flight.ts";
import type { Outcome, Throw } from "./ring-equations.ts";
import { CASES, type Case, ourFlight } from "./throws.ts";

const UNITS = { time: "s", prograde: "m", axial: "m", radius: "m", speed: "m/s", angle: "rad" } as const;
type Quantity = keyof typeof UNITS;

interface Oracle {
	readonly name: string;
	readonly source: string;
	run(thrown: Throw): Outcome;
	/** Allowed without drag: ours is in closed form, so this is the oracle's own error. */
	readonly free: number;
	/** Allowed with drag: what ours gathers over a flight at 1e-10 a step, times 2; the oracle's share is below 1e-11. */
	readonly dragged: number;
}

const ORACLES: readonly Oracle[] = [
	{
		name: "odex",
		source: "odex 2.0.4 (ODEX, Hairer & Wanner), equations of the turning frame, 1e-13, bisection on its dense output",
		run: (thrown) => odexFlight(thrown),
		free: 1e-11,
		dragged: 1e-8,
	},
	{
		name: "mathjs",
		source: "mathjs 15.2.0 solveODE (Dormand & Prince), equations of the turning frame, absolute tolerance 1e-8",
		run: (thrown) => mathjsFlight(thrown, 1e-8),
		free: 1e-8,
		dragged: 1e-8,
	},
];

/** Ours and the oracle's, quantity by quantity. Throws where they strike different things or one has an offset and the other has none. */
function against(oracle: Oracle, { name, thrown }: Case, ours: Outcome): TruthRow[] {
	const reference = oracle.run(thrown);
	if (reference.struck !== ours.struck) throw new RangeError(`${name}: ours struck ${ours.struck}, ${oracle.name} ${reference.struck}`);
	return (Object.keys(UNITS) as Quantity[]).flatMap((quantity) => {
		const [a, b] = [ours[quantity], reference[quantity]];
		if (a === null && b === null) return [];
		return {
			group: `flight against ${oracle.name}, ${thrown.drag > 0 ? "drag" : "no drag"}`,
			check: `${name}, ${quantity}`,
			ours: a ?? Number.NaN,
			reference: b ?? Number.NaN,
			tolerance: thrown.drag > 0 ? oracle.dragged : oracle.free,
			kind: "absolute" as const,
			unit: UNITS[quantity],
			source: oracle.source,
			flag: "C",
		};
	});
}

/** Radius and height of the release (m); time (s) and arc against spin (m) at the rate that makes 1 g at the floor. */
const PUBLISHED = [
	[5, 1, 0.53553, 0.53249],
	[10, 1, 0.48907, 0.33295],
	[25, 1.5, 0.57951, 0.36964],
	[56, 1.5, 0.5645, 0.23815],
	[100, 1.5, 0.55941, 0.17597],
	[894.27, 1.5, 0.55379, 0.05802],
] as const;

const atRest = (radius: number, height: number): Case => ({
	name: `R ${radius} m, h ${height} m`,
	dragCoefficient: 0,
	thrown: {
		floor: "curved",
		radius,
		headroom: height + 1,
		middleDeg: 0,
		halfSpanDeg: 180,
		axialFrom: -3,
		axialTo: 3,
		angleDeg: 0,
		axial: 0,
		height,
		speed: 0,
		headingDeg: 0,
		elevationDeg: 0,
		diameter: 0,
		drag: 0,
		spin: [{ t: 0, rpm: (Math.sqrt(9.80665 / radius) * 30) / Math.PI }],
	},
});

/** A printed value counts only where the integrator gives it to the last printed digit. */
function confirmed(printed: number, integrated: number, halfDigit: number, what: string): number {
	if (!(Math.abs(printed - integrated) <= halfDigit)) throw new RangeError(`${what}: printed ${printed}, odex ${integrated}`);
	return printed;
}

const REFERENCE = "computed from the involute of the release circle; odex gives the same digits";

function published(): TruthRow[] {
	return PUBLISHED.flatMap(([radius, height, time, arc]) => {
		const one = atRest(radius, height);
		const ours = ourFlight(one);
		const byOdex = odexFlight(one.thrown);
		const base = { tolerance: 5.01e-6, kind: "absolute", source: REFERENCE, flag: "C" } as const;
		const group = (what: string): string => `drop from rest, published ${what}`;
		const rows: TruthRow[] = [
			{
				...base,
				group: group("time"),
				check: one.name,
				ours: ours.time,
				reference: confirmed(time, byOdex.time, base.tolerance, one.name),
				unit: "s",
			},
			{
				...base,
				group: group("arc"),
				check: one.name,
				ours: -(ours.prograde ?? Number.NaN),
				reference: confirmed(arc, -(byOdex.prograde ?? Number.NaN), base.tolerance, one.name),
				unit: "m",
			},
		];
		if (radius !== 100) return rows;
		const parts = (o: Outcome) => [o.speed * Math.cos(o.angle), o.speed * Math.sin(o.angle)] as const;
		return [
			...rows,
			...[5.3226, 0.9324].map((printed, i) => ({
				...base,
				tolerance: 5.01e-5,
				group: group("velocity at the floor"),
				check: `${one.name}, ${i === 0 ? "down" : "against spin"}`,
				ours: parts(ours)[i]!,
				reference: confirmed(printed, parts(byOdex)[i]!, 5.01e-5, one.name),
				unit: "m/s",
			})),
		];
	});
}

export function rows(): TruthRow[] {
	const ours = CASES.map(ourFlight);
	return [...published(), ...ORACLES.flatMap((oracle) => CASES.flatMap((one, i) => against(oracle, one, ours[i]!)))];
}
