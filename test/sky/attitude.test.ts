import { Vector as AstroVector, MakeTime, RotateVector, Rotation_ECL_EQJ, SphereFromVector } from "astronomy-engine";
import fc from "fast-check";
import { Quaternion, Vector3 } from "three";
import { describe, expect, it } from "vitest";
import type { Sky } from "../../src/layout/habitat.ts";
import { radFromDeg } from "../../src/quantity/convert.ts";
import { icrsFromRing, ringFromIcrs, sunDirection, writeIcrsFromRing, writeRingFromIcrs } from "../../src/sky/attitude.ts";
import { directionFromRaDec, raDecFromDirection } from "../../src/sky/direction.ts";
import { aboutY, aboutZ, compose, type Rotation, rotate } from "../../src/vector/rotation.ts";
import { ring } from "../../src/vector/vec3.ts";

const sky = (axisRaDeg: number, axisDecDeg: number, zeroDeg: number): Sky => ({
	axisRightAscension: radFromDeg(axisRaDeg),
	axisDeclination: radFromDeg(axisDecDeg),
	zero: radFromDeg(zeroDeg),
	sunRightAscension: radFromDeg(80),
	sunDeclination: radFromDeg(23),
});

const skies = fc
	.tuple(
		fc.double({ min: 0, max: 360, noNaN: true }),
		fc.double({ min: -90, max: 90, noNaN: true }),
		fc.double({ min: -720, max: 720, noNaN: true }),
	)
	.map(([ra, dec, zero]) => sky(ra, dec, zero));
const turns = fc.double({ min: -50, max: 50, noNaN: true });

const close = (a: ArrayLike<number>, b: ArrayLike<number>, within: number): void => {
	expect(a.length).toBe(b.length);
	for (let i = 0; i < a.length; i++) expect(Math.abs((a[i] as number) - (b[i] as number)), `entry ${i}`).toBeLessThan(within);
};

describe("attitude", () => {
	it("is Rz(α) · Ry(90° − δ) · Rz(ζ + ψ) (seed 71)", () => {
		fc.assert(
			fc.property(skies, turns, (s, psi) => {
				const tilt: Rotation<"ring", "inertial"> = compose<"ring", "inertial", "inertial">(
					aboutY(Math.PI / 2 - s.axisDeclination),
					aboutZ(s.zero + psi),
				);
				close(icrsFromRing(s, psi), compose(aboutZ<"inertial", "icrs">(s.axisRightAscension), tilt), 1e-13);
			}),
			{ seed: 71 },
		);
	});

	it("is the turn that three's quaternions make (seed 72)", () => {
		const about = (x: number, y: number, z: number, angle: number): Quaternion =>
			new Quaternion().setFromAxisAngle(new Vector3(x, y, z), angle);
		fc.assert(
			fc.property(skies, turns, (s, psi) => {
				const q = about(0, 0, 1, s.axisRightAscension)
					.multiply(about(0, 1, 0, Math.PI / 2 - s.axisDeclination))
					.multiply(about(0, 0, 1, s.zero + psi));
				const r = icrsFromRing(s, psi);
				for (const v of [ring(1, 0, 0), ring(0, 1, 0), ring(0, 0, 1), ring(0.3, -2, 0.7)])
					close(rotate(r, v), new Vector3(...v).applyQuaternion(q).toArray(), 1e-12);
			}),
			{ seed: 72 },
		);
	});

	it("points +z at the axis and turns the sky backwards as seen from the ring", () => {
		const s = sky(123, -34, 10);
		close(rotate(icrsFromRing(s, 2.5), ring(0, 0, 1)), directionFromRaDec(radFromDeg(123), radFromDeg(-34)), 1e-15);
		const star = directionFromRaDec(1, 0.2);
		const before = rotate(ringFromIcrs(s, 0), star);
		const after = rotate(ringFromIcrs(s, 0.1), star);
		const turned = Math.atan2(after[1], after[0]) - Math.atan2(before[1], before[0]);
		expect(Math.atan2(Math.sin(turned), Math.cos(turned))).toBeCloseTo(-0.1, 12);
		expect(after[2]).toBeCloseTo(before[2], 14);
	});

	it("with the axis at the north ecliptic pole and zero 90° equals Astronomy Engine's ecliptic frame of J2000", () => {
		const time = MakeTime(new Date("2000-01-01T12:00:00Z"));
		const toEquator = Rotation_ECL_EQJ();
		const outside = (x: number, y: number, z: number): number[] => {
			const v = RotateVector(toEquator, new AstroVector(x, y, z, time));
			return [v.x, v.y, v.z];
		};
		const pole = RotateVector(toEquator, new AstroVector(0, 0, 1, time));
		const { lon, lat } = SphereFromVector(pole);
		expect(lon).toBeCloseTo(270, 6);
		expect(lat).toBeCloseTo(66.56, 2);
		const r = icrsFromRing(sky(lon, lat, 90), 0);
		for (const v of [ring(1, 0, 0), ring(0, 1, 0), ring(0, 0, 1), ring(-0.2, 0.5, 0.9)])
			close(rotate(r, v), outside(...(v as unknown as [number, number, number])), 1e-9);
	});

	it("comes back through its inverse; the writing forms give the same numbers (seed 73)", () => {
		const out = new Float64Array(9);
		fc.assert(
			fc.property(skies, turns, (s, psi) => {
				const there = icrsFromRing(s, psi);
				const back = ringFromIcrs(s, psi);
				close(compose(back, there), [1, 0, 0, 0, 1, 0, 0, 0, 1], 1e-14);
				writeIcrsFromRing(s, psi, out);
				expect([...out]).toEqual([...there]);
				writeRingFromIcrs(s, psi, out);
				expect([...out]).toEqual([...back]);
			}),
			{ seed: 73 },
		);
	});

	it("places the Sun by its own right ascension and declination", () => {
		const found = raDecFromDirection(sunDirection(sky(270, 66.56, 0)));
		expect(found.rightAscension).toBeCloseTo(radFromDeg(80), 14);
		expect(found.declination).toBeCloseTo(radFromDeg(23), 14);
	});
});
