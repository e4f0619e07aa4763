import { describe, expect, it } from "vitest";
import { createRaster, type Raster } from "../../src/raster/raster.ts";
import { aim, createCamera, project } from "../../src/shape/camera.ts";
import type { Stars } from "../../src/shape/drawable.ts";
import { COLOUR, PALETTE_BYTES } from "../../src/shape/palette.ts";
import { numbers, quad, scene, starField } from "./scene.ts";

const N = 128;
const star = (direction: readonly number[], size: number, light: readonly [number, number, number] = [0.3, 0.3, 0.3]): Stars => ({
	kind: "stars",
	name: "star",
	direction: new Float32Array(direction),
	size: new Float32Array([size]),
	light: new Float32Array(light),
});

/** Turn by `a` about z after `b` about x, rows. */
function rotation(a: number, b: number): Float64Array {
	const [ca, sa, cb, sb] = [Math.cos(a), Math.sin(a), Math.cos(b), Math.sin(b)];
	return new Float64Array([ca, -sa * cb, sa * sb, sa, ca * cb, -ca * sb, 0, sb, cb]);
}

const linear = (byte: number): number => (byte / 255 <= 0.04045 ? byte / 255 / 12.92 : ((byte / 255 + 0.055) / 1.055) ** 2.4);

/** Added light of channel c and where its middle lies. */
function light(raster: Raster, c = 0): { sum: number; x: number; y: number } {
	const dark = linear(PALETTE_BYTES[3 * COLOUR.sky + c]!);
	let [sum, x, y] = [0, 0, 0];
	for (let k = 0; k < raster.width * raster.height; k++) {
		const l = linear(raster.pixels[4 * k + c]!) - dark;
		sum += l;
		x += l * ((k % raster.width) + 0.5);
		y += l * (Math.floor(k / raster.width) + 0.5);
	}
	return { sum, x: x / sum, y: y / sum };
}

describe("stars", () => {
	const raster = createRaster(N, N);

	it("stand where the sky's rotation and the camera put their direction", () => {
		const camera = createCamera(1.3);
		camera.position.set([40, -7, 12]);
		const out = new Float64Array(3);
		const next = numbers(3);
		let tried = 0;
		for (let k = 0; k < 150; k++) {
			const r = rotation(6 * next(), 6 * next());
			aim(camera, next() - 0.5, next() - 0.5, next() - 0.5, 0, 1, 0);
			const d = [next() - 0.5, next() - 0.5, next() - 0.5];
			const unit = d.map((v) => v / Math.hypot(...d));
			const s = [0, 1, 2].map((i) => [0, 1, 2].reduce((sum, j) => sum + r[3 * i + j]! * unit[j]!, 0)) as [number, number, number];
			const p = camera.position;
			const before = project(camera, N, N, p[0]! + s[0], p[1]! + s[1], p[2]! + s[2], out);
			const inside = before && [0, 1].every((i) => out[i]! > 4 && out[i]! < N - 4);
			raster.render(scene([star(unit, 2)], [], { skyRotation: r }), camera);
			const seen = light(raster);
			if (!before) expect(seen.sum).toBe(0);
			if (!inside) continue;
			tried++;
			expect(Math.hypot(seen.x - out[0]!, seen.y - out[1]!)).toBeLessThan(0.15);
		}
		expect(tried).toBeGreaterThan(8);
	});

	it("give the same light wherever they fall between pixels, in their own colour", () => {
		const camera = createCamera(Math.PI / 2);
		const sums: number[] = [];
		for (let k = 0; k < 40; k++) {
			raster.render(scene([star([(k * 0.137) / 64, (k * 0.071) / 64, -1], 1.4, [0.3, 0.15, 0])]), camera);
			sums.push(light(raster).sum);
			expect(light(raster, 1).sum / light(raster).sum).toBeCloseTo(0.5, 1);
			expect(light(raster, 2).sum).toBe(0);
		}
		expect(Math.max(...sums) / Math.min(...sums)).toBeLessThan(1.04);
	});

	it("grow with size and pixel ratio, and are their light in the middle", () => {
		const camera = createCamera(Math.PI / 2);
		const half = [0.5 / 64, -0.5 / 64, -1];
		const spread = (size: number, pixelRatio: number): number => {
			raster.render(scene([star(half, size)], [], { pixelRatio }), camera);
			expect(linear(raster.pixels[4 * (64 * N + 64)]!)).toBeCloseTo(0.3, 1);
			return light(raster).sum;
		};
		expect(spread(8, 1) / spread(4, 2)).toBeCloseTo(1, 5);
		expect(spread(8, 1)).toBeGreaterThan(2.5 * spread(4, 1));
	});

	it("add to each other and are covered by whatever stands before them", () => {
		const camera = createCamera(Math.PI / 2);
		const one = star([0, 0, -1], 4);
		raster.render(scene([one]), camera);
		const single = light(raster).sum;
		raster.render(scene([one, { ...one, name: "again" }]), camera);
		expect(light(raster).sum / single).toBeCloseTo(2, 1);
		expect(raster.depth.every((w) => w === 0)).toBe(true);
		raster.render(scene([quad([-9, -9, -50], [9, -9, -50], [9, 9, -50], [-9, 9, -50], COLOUR.sky, { lit: false }), one]), camera);
		expect(light(raster).sum).toBe(0);
	});

	it("at the border are cut by it", () => {
		const camera = createCamera(Math.PI / 2);
		raster.render(scene([starField(3000, 5)]), camera);
		const whole = raster.pixels.slice();
		const wide = createRaster(N + 40, N);
		wide.render(scene([starField(3000, 5)]), camera);
		for (let j = 0; j < N; j++) for (let i = 0; i < N; i++) expect(wide.pixels[4 * (j * (N + 40) + i + 20)]).toBe(whole[4 * (j * N + i)]);
	});
});
