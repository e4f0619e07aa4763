import { flown } from "../support/flown.ts";
import { deckFile, dropFile } from "../support/layout-of.ts";
import { type Draw, draw } from "../support/seeded.ts";
import type { Outcome, Throw } from "./ring-equations.ts";

/** Air of the test layouts: 70.3 kPa, 21 °C, 26.5 % oxygen, rest nitrogen; kg/m³. */
const AIR = (70_300 * (0.265 * 0.0319988 + 0.735 * 0.0280134)) / (8.314462618 * 294.15);
const MASS = 0.2;

export interface Case {
	readonly name: string;
	readonly thrown: Throw;
	readonly dragCoefficient: number;
}

/** A drop or toss by its seed: curved or flat floor, drag or none, constant or changing spin, in turn by the seed's bits. */
export function seededCase(seed: number): Case {
	const d = draw(seed);
	const floor = seed & 1 ? "flat" : "curved";
	const slowed = (seed & 2) !== 0;
	const changing = (seed & 4) !== 0;
	const radius = Math.exp(d.between(Math.log(5), Math.log(300)));
	const rpm = (Math.sqrt((d.between(0.2, 1) * 9.80665) / radius) * 30) / Math.PI;
	const speed = d.chance(0.3) ? 0 : d.between(0.2, 6);
	const diameter = d.between(0.02, 0.3);
	const headroom = Math.min(d.between(2.2, 4), radius / 2);
	const height = d.between(0.2 + diameter / 2, headroom - 0.2 - diameter / 2);
	const middleDeg = d.between(-180, 180);
	const halfSpanDeg = floor === "flat" ? 70 : 180;
	const dragCoefficient = slowed ? d.between(0.3, 1.2) : 0;
	const thrown: Throw = {
		floor,
		radius,
		headroom,
		middleDeg,
		halfSpanDeg,
		axialFrom: -4,
		axialTo: 4,
		angleDeg: floor === "flat" ? middleDeg + aside(d, radius) : d.between(-180, 180),
		axial: d.between(-2, 2),
		height,
		speed,
		headingDeg: d.between(0, 360),
		elevationDeg: d.between(-80, 80),
		diameter,
		drag: slowed ? (AIR * dragCoefficient * Math.PI * diameter ** 2) / 4 / (2 * MASS) : 0,
		spin: changing ? profile(d, rpm) : [{ t: 0, rpm }],
	};
	const words = [floor, slowed ? "drag" : "no drag", changing ? "changing spin" : "constant spin", speed > 0 ? "toss" : "drop"];
	return { name: `seed ${seed}: ${words.join(", ")}`, thrown, dragCoefficient };
}

/** Up to 4 m of floor from a flat deck's middle, as an angle in deg. */
const aside = (d: Draw, radius: number): number => (Math.atan(d.between(-4, 4) / radius) * 180) / Math.PI;

/** A ramp under way at the release, the next point in the middle of a usual fall. */
const profile = (d: Draw, rpm: number): Throw["spin"] => [
	{ t: 0, rpm: rpm * d.between(0.9, 1.1) },
	{ t: d.between(0.2, 0.5), rpm },
	{ t: d.between(0.6, 3), rpm: rpm * d.between(0.6, 1.3) },
];

/** The same through the layout file, the flight and the landing of the code under test. */
export function ourFlight({ thrown, dragCoefficient }: Case): Outcome {
	const file = dropFile({
		from: { deck: "lower", angle_deg: thrown.angleDeg, axial_m: thrown.axial, height_m: thrown.height },
		object: { mass_kg: MASS, diameter_m: thrown.diameter, drag_coefficient: dragCoefficient },
		drag: dragCoefficient > 0,
		...(thrown.speed > 0
			? { release: { speed_mps: thrown.speed, heading_deg: thrown.headingDeg, elevation_deg: thrown.elevationDeg } }
			: {}),
	});
	const parts = {
		spin: { rate_rpm: thrown.spin[0]!.rpm, profile: thrown.spin.map((p) => ({ t_s: p.t, rate_rpm: p.rpm })) },
		decks: [
			deckFile({
				floor: thrown.floor,
				radius_m: thrown.radius,
				from_deg: thrown.middleDeg - thrown.halfSpanDeg,
				to_deg: thrown.middleDeg + thrown.halfSpanDeg,
				from_m: thrown.axialFrom,
				to_m: thrown.axialTo,
				headroom_m: thrown.headroom,
			}),
		],
	};
	const { flight, landing } = flown(parts, file).drop;
	if (!landing || landing.angle === null) throw new RangeError(`seed of ${JSON.stringify(thrown)} struck ${flight.struck.kind}`);
	return {
		struck: flight.struck.kind,
		time: flight.end,
		prograde: landing.prograde,
		axial: landing.axial,
		radius: landing.radius,
		speed: landing.speed,
		angle: landing.angle,
	};
}

/** 48 cases: each of the eight kinds six times. */
export const CASES: readonly Case[] = Array.from({ length: 48 }, (_, i) => seededCase(i + 1));
