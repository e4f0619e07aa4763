import { setFlagsFromString } from "node:v8";
import { runInNewContext } from "node:vm";
import { describe, expect, it } from "vitest";
import { createRaster, type Raster } from "../../src/raster/raster.ts";
import { aim, createCamera } from "../../src/shape/camera.ts";
import type { Drawable } from "../../src/shape/drawable.ts";
import { COLOUR, PALETTE_BYTES } from "../../src/shape/palette.ts";
import { at, ball, IDENTITY, lines, quad, sampleBay, scene, starField } from "./scene.ts";

const camera = createCamera((75 * Math.PI) / 180);
camera.position.set([2.6, 1.9, 2.6]);
aim(camera, -2.6, -1.1, -3.2, 0, 1, 0);

const same = (a: Raster, b: Raster): boolean =>
	Buffer.from(a.pixels.buffer).equals(Buffer.from(b.pixels.buffer)) && Buffer.from(a.depth.buffer).equals(Buffer.from(b.depth.buffer));

describe("a picture", () => {
	it("of nothing is the background, opaque, at no depth", () => {
		const raster = createRaster(7, 5);
		raster.render(scene([], [], { background: COLOUR.coriolis }), camera);
		const c = PALETTE_BYTES.subarray(3 * COLOUR.coriolis, 3 * COLOUR.coriolis + 3);
		for (let k = 0; k < 35; k++) expect([...raster.pixels.subarray(4 * k, 4 * k + 4)]).toEqual([...c, 255]);
		expect(raster.depth).toEqual(new Float32Array(35));
	});

	it("of the same scene is the same to the last byte, whatever was drawn before", () => {
		const a = createRaster(320, 180);
		const b = createRaster(320, 180);
		const bay = sampleBay();
		for (const quality of [1, 2] as const) {
			a.render(bay, camera, quality);
			b.render(
				scene([
					quad([-9, 1, -2], [9, 1, -2], [9, 2, -2], [-9, 2, -2], COLOUR.focus),
					lines(
						[
							[-9, 0, -3],
							[9, 1, -3],
						],
						COLOUR.own,
						{ width: 9, opacity: 0.3 },
					),
				]),
				camera,
				quality,
			);
			b.render(bay, camera, quality);
			expect(same(a, b)).toBe(true);
		}
		const seen = new Set(new Uint32Array(a.pixels.buffer));
		expect(seen.size).toBeGreaterThan(200);
		expect([...seen].every((word) => new Uint8Array(new Uint32Array([word]).buffer)[3] === 255)).toBe(true);
	});

	it("at quality 2 is the mean of four, and its depth the nearest of them", () => {
		const small = createRaster(160, 90);
		const large = createRaster(320, 180);
		const bay = sampleBay();
		small.render(bay, camera, 2);
		large.render({ ...bay, pixelRatio: 2 }, camera, 1);
		for (let j = 0; j < 90; j++)
			for (let i = 0; i < 160; i++) {
				const four = [0, 1, 320, 321].map((k) => 640 * j + 2 * i + k);
				for (let c = 0; c < 3; c++) {
					const mean = four.reduce((s, k) => s + large.pixels[4 * k + c]!, 0) / 4;
					if (Math.abs(small.pixels[4 * (160 * j + i) + c]! - mean) > 0.51) throw new Error(`pixel (${i}, ${j}) is not the mean ${mean}`);
				}
				if (small.depth[160 * j + i] !== Math.max(...four.map((k) => large.depth[k]!))) throw new Error(`depth at (${i}, ${j})`);
			}
	});

	it("keeps its buffers from picture to picture and changes them with its size only", () => {
		const raster = createRaster(64, 48);
		const { pixels, depth } = raster;
		raster.render(sampleBay(), camera);
		raster.resize(64, 48);
		expect(raster.pixels).toBe(pixels);
		expect(raster.depth).toBe(depth);
		raster.resize(80, 60);
		raster.render(sampleBay(), camera, 2);
		expect([raster.width, raster.height, raster.pixels.length, raster.depth.length]).toEqual([80, 60, 19200, 4800]);
		const fresh = createRaster(80, 60);
		fresh.render(sampleBay(), camera, 2);
		expect(same(raster, fresh)).toBe(true);
	});

	it("follows positions and matrices changed in place", () => {
		const raster = createRaster(64, 48);
		const floor = quad([-1, 0, 0], [1, 0, 0], [1, 1, 0], [-1, 1, 0], COLOUR.deck, { side: "both" });
		const part = { drawable: ball(0.2, 6, 8, COLOUR.suit), matrix: at(0, 0, 1) };
		const s = scene([floor], [part]);
		raster.render(s, camera);
		floor.position.forEach((v, k) => {
			if (k % 3 === 0) floor.position[k] = v + 0.5;
		});
		part.matrix[13] = 0.4;
		raster.render(s, camera);
		const fresh = createRaster(64, 48);
		fresh.render(
			scene(
				[quad([-0.5, 0, 0], [1.5, 0, 0], [1.5, 1, 0], [-0.5, 1, 0], COLOUR.deck, { side: "both" })],
				[{ drawable: part.drawable, matrix: at(0, 0.4, 1) }],
			),
			camera,
		);
		expect(same(raster, fresh)).toBe(true);
	});

	it("costs no memory once the scene is known: 200 pictures", () => {
		setFlagsFromString("--expose-gc");
		const collect = runInNewContext("gc") as () => void;
		const raster = createRaster(160, 90);
		const bay = sampleBay();
		const draw = (count: number): void => {
			for (let k = 0; k < count; k++) {
				camera.position[0] = 2.6 - k / 200;
				raster.render(bay, camera);
			}
			camera.position[0] = 2.6;
		};
		draw(60);
		collect();
		const before = process.memoryUsage();
		draw(200);
		collect();
		const after = process.memoryUsage();
		expect(after.heapUsed - before.heapUsed).toBeLessThan(3e5);
		expect(after.arrayBuffers - before.arrayBuffers).toBeLessThan(1e5);
	});
});

describe("what cannot be drawn is refused by name", () => {
	const raster = createRaster(16, 12);
	const draw = (d: Drawable) => () => raster.render(scene([d]), camera);
	const face = () => quad([0, 0, 0], [1, 0, 0], [1, 1, 0], [0, 1, 0], COLOUR.deck, { name: "panel" });
	const line = () =>
		lines(
			[
				[0, 0, 0],
				[1, 0, 0],
			],
			COLOUR.ink,
			{ name: "edge" },
		);
	const sky = () => starField(3, 1);
	const put = <T extends { [i: number]: number }>(values: T, i: number, v: number): T => {
		values[i] = v;
		return values;
	};
	const cases: [string, () => Drawable, RegExp][] = [
		["a position", () => ({ ...face(), position: put(face().position, 4, Number.NaN) }), /"panel".*position\[4\] is NaN/],
		["a normal", () => ({ ...face(), normal: put(face().normal, 0, Number.POSITIVE_INFINITY) }), /"panel".*normal\[0\] is Infinity/],
		["too few normals", () => ({ ...face(), normal: new Float32Array(3) }), /"panel".*normal holds 3 numbers, expected 18/],
		["a colour", () => ({ ...face(), colour: put(face().colour, 2, 250) }), /"panel".*colour\[2\] is 250/],
		["an index", () => ({ ...face(), index: put(face().index, 5, 6) }), /"panel".*index\[5\] is 6, there are 6 vertices/],
		["a loose index", () => ({ ...face(), index: new Uint32Array(4) }), /"panel".*index holds 4/],
		["an opacity", () => ({ ...face(), opacity: Number.NaN }), /"panel".*opacity is NaN/],
		["a line's end", () => ({ ...line(), position: put(line().position, 0, Number.NaN) }), /"edge".*position\[0\] is NaN/],
		["a width", () => ({ ...line(), width: 0 }), /"edge".*width is 0/],
		["a dash", () => ({ ...line(), dash: [0.1, 0] }), /"edge".*dash is 0.1 m and 0 m/],
		["a half line", () => ({ ...line(), position: new Float32Array(9) }), /"edge".*position holds 9/],
		["a star's direction", () => ({ ...sky(), direction: put(sky().direction, 8, Number.NaN) }), /"stars".*direction\[8\] is NaN/],
		["a star without size", () => ({ ...sky(), size: new Float32Array(2) }), /"stars".*size holds 2/],
	];
	for (const [name, make, message] of cases)
		it(name, () => {
			expect(draw(make())).toThrow(RangeError);
			expect(draw(make())).toThrow(message);
		});

	it("a coordinate that goes bad later, a matrix, a camera, a rotation, a ratio, a size", () => {
		const panel = face();
		draw(panel)();
		panel.position[0] = Number.NaN;
		expect(draw(panel)).toThrow(/"panel".*not finite/);
		const edge = line();
		draw(edge)();
		edge.position[3] = Number.NaN;
		expect(draw(edge)).toThrow(/"edge".*not finite/);
		expect(() => raster.render(scene([], [{ drawable: face(), matrix: at(Number.NaN, 0, 0) }]), camera)).toThrow(/matrix of "panel"/);
		const blind = createCamera(0);
		expect(() => raster.render(scene([]), blind)).toThrow(/field of view.*got 0/);
		const lost = createCamera(1);
		lost.position[1] = Number.NaN;
		expect(() => raster.render(scene([]), lost)).toThrow(/NaN/);
		expect(() => raster.render(scene([], [], { skyRotation: IDENTITY.map((v) => v / 0) }), camera)).toThrow(/skyRotation\[0\] is Infinity/);
		expect(() => raster.render(scene([], [], { pixelRatio: 0 }), camera)).toThrow(/pixel ratio.*got 0/);
		expect(() => createRaster(0, 10)).toThrow(/got 0 × 10/);
		expect(() => raster.resize(10.5, 10)).toThrow(/got 10.5 × 10/);
	});
});
