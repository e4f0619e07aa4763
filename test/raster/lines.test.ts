import { describe, expect, it } from "vitest";
import { createRaster } from "../../src/raster/raster.ts";
import { aim, createCamera, project } from "../../src/shape/camera.ts";
import type { Drawable, WideLines } from "../../src/shape/drawable.ts";
import { COLOUR, PALETTE_BYTES } from "../../src/shape/palette.ts";
import { at, box, lines, quad, scene } from "./scene.ts";

const INK = PALETTE_BYTES[3 * COLOUR.ink]!;
const WHITE = { background: COLOUR.halo };
const N = 64;
/** Looks along −z with a metre a pixel at 32 m: stage (x, y, −32) is pixel (32 + x, 32 − y). */
const plan = createCamera(Math.PI / 2);

/** Ink laid at each pixel, 0…1. */
function inkOf(still: readonly Drawable[], pixelRatio = 1, quality: 1 | 2 = 1): Float64Array {
	const raster = createRaster(N, N);
	raster.render(scene(still, [], { ...WHITE, pixelRatio }), plan, quality);
	return Float64Array.from({ length: N * N }, (_, k) => (255 - raster.pixels[4 * k]!) / (255 - INK));
}
const column = (ink: Float64Array, i: number): number[] => Array.from({ length: N }, (_, j) => ink[j * N + i]!);
const sum = (values: readonly number[]): number => values.reduce((s, v) => s + v, 0);

describe("width", () => {
	for (const width of [0.5, 1, 1.3, 2, 4])
		for (const pixelRatio of [1, 1.5, 2])
			for (const quality of [1, 2] as const)
				for (const slope of [0, 0.37, 1])
					it(`${width} px at ${pixelRatio} device px, quality ${quality}, slope ${slope}`, () => {
						const ink = inkOf(
							[
								lines(
									[
										[-30, -10 * slope + 0.3, -32],
										[30, 50 * slope + 0.3, -32],
									],
									COLOUR.ink,
									{ width },
								),
							],
							pixelRatio,
							quality,
						);
						const upright = [14, 20, 25].map((i) => sum(column(ink, i)));
						const want = width * pixelRatio * Math.hypot(1, slope);
						for (const got of upright) expect(Math.abs(got - want)).toBeLessThan(0.04 * want + 0.04);
					});

	it("ends are round: half a width beyond the point, and narrower off the middle", () => {
		const ink = inkOf([
			lines(
				[
					[-10, 0, -32],
					[10, 0, -32],
				],
				COLOUR.ink,
				{ width: 12 },
			),
		]);
		const row = (j: number): number => sum([...ink.subarray(j * N, (j + 1) * N)]);
		expect(Math.abs(row(31) - 32)).toBeLessThan(0.5);
		expect(Math.abs(row(27) - (20 + 2 * Math.sqrt(36 - 4.5 ** 2)))).toBeLessThan(0.5);
	});

	it("a part shows as many segments as it counts", () => {
		const raster = createRaster(N, N);
		const path = lines(
			[
				[-20, 0, -32],
				[-10, 0, -32],
				[0, 0, -32],
				[10, 0, -32],
			],
			COLOUR.ink,
			{ width: 2 },
		);
		const shown = (count: number): Uint8ClampedArray => {
			raster.render(scene([], [{ drawable: path, matrix: at(0, 0, 0), count }], WHITE), plan);
			return raster.pixels.slice();
		};
		raster.render(scene([{ ...path, position: path.position.slice(0, 12), colour: path.colour.slice(0, 2) }], [], WHITE), plan);
		expect(shown(2)).toEqual(raster.pixels.slice());
		expect(shown(0).every((v) => v === 255)).toBe(true);
		expect(shown(3)).toEqual(shown(7));
	});

	it("a line that is a point is a dot", () => {
		const ink = inkOf([
			lines(
				[
					[0, 0, -32],
					[0, 0, -32],
				],
				COLOUR.ink,
				{ width: 6 },
			),
		]);
		expect(Math.abs(sum([...ink]) - Math.PI * 9)).toBeLessThan(0.7);
	});

	it("joints and crossings of a translucent drawable are no darker than its lines", () => {
		const path = lines(
			[
				[-20, -3, -32],
				[0, 0, -32],
				[20, -3, -32],
			],
			COLOUR.ink,
			{ width: 5, opacity: 0.4 },
		);
		const across = lines(
			[
				[-10, -20, -32],
				[-10, 20, -32],
			],
			COLOUR.ink,
		);
		const both: WideLines = {
			...path,
			position: new Float32Array([...path.position, ...across.position]),
			colour: new Uint8Array(3).fill(COLOUR.ink),
		};
		const ink = inkOf([both]);
		expect(Math.max(...ink)).toBeGreaterThan(0.39);
		expect(Math.max(...ink)).toBeLessThan(0.41);
	});
});

describe("dashes", () => {
	it("are metres along the run, go on over shared ends and begin anew at a break", () => {
		const dash = [6, 4] as const;
		const whole = inkOf([
			lines(
				[
					[-25, 0.5, -32],
					[25, 0.5, -32],
				],
				COLOUR.ink,
				{ width: 2, dash },
			),
		]);
		const pieces = inkOf([
			lines(
				[
					[-25, 0.5, -32],
					[-22, 0.5, -32],
					[-7, 0.5, -32],
					[25, 0.5, -32],
				],
				COLOUR.ink,
				{ width: 2, dash },
			),
		]);
		const row = [...whole.subarray(31 * N, 32 * N)];
		for (let i = 8; i < 56; i++) {
			const phase = (i + 0.5 - 32 + 25) % 10;
			expect(row[i]).toBeCloseTo(phase < 6 ? 1 : 0, 1);
		}
		for (const [k, v] of whole.entries()) expect(pieces[k]).toBeCloseTo(v, 2);
		const a = lines(
			[
				[-25, 0.5, -32],
				[-18, 0.5, -32],
			],
			COLOUR.ink,
			{ width: 2, dash },
		);
		const b = lines(
			[
				[-17, 0.5, -32],
				[20, 0.5, -32],
			],
			COLOUR.ink,
		);
		const broken = inkOf([
			{ ...a, position: new Float32Array([...a.position, ...b.position]), colour: new Uint8Array(2).fill(COLOUR.ink) },
		]);
		expect(broken[31 * N + 16]).toBeGreaterThan(0.9);
		expect(broken[31 * N + 22]).toBeLessThan(0.1);
	});

	it("shorten with distance as their metres do", () => {
		const camera = createCamera(Math.PI / 2);
		const raster = createRaster(N, N);
		raster.render(
			scene(
				[
					lines(
						[
							[-1.5, 0, -2],
							[1.5, 0, -6],
						],
						COLOUR.ink,
						{ width: 2, dash: [0.5, 0.5] },
					),
				],
				[],
				WHITE,
			),
			camera,
		);
		const out = new Float64Array(3);
		for (let m = 0.25; m < 4; m += 0.5) {
			const t = m / 5;
			project(camera, N, N, -1.5 + 3 * t, 0, -2 - 4 * t, out);
			const ink = (255 - raster.pixels[4 * (31 * N + Math.floor(out[0]!))]!) / (255 - INK);
			if (m % 1 < 0.5) expect(ink).toBeGreaterThan(0.6);
			else expect(ink).toBeLessThan(0.4);
		}
	});

	it("finer than the pixels are an even tone", () => {
		const ink = inkOf([
			lines(
				[
					[-25, 0.5, -32],
					[25, 0.5, -32],
				],
				COLOUR.ink,
				{ width: 2, dash: [0.1, 0.3] },
			),
		]);
		for (let i = 10; i < 50; i++) expect(ink[31 * N + i]).toBeCloseTo(0.25, 1);
	});
});

describe("depth", () => {
	const W = 160;
	const H = 120;
	const camera = createCamera(1.1);
	const shown = (still: readonly Drawable[], along: readonly (readonly [number, number, number])[]): number => {
		const raster = createRaster(W, H);
		raster.render(scene(still, [], WHITE), camera);
		const out = new Float64Array(3);
		let n = 0;
		for (const [x, y, z] of along) {
			project(camera, W, H, x, y, z, out);
			const k = 4 * (Math.floor(out[1]!) * W + Math.floor(out[0]!));
			const focus = PALETTE_BYTES.subarray(3 * COLOUR.focus, 3 * COLOUR.focus + 3);
			if ([0, 1, 2].every((c) => Math.abs(raster.pixels[k + c]! - focus[c]!) < 60)) n++;
		}
		return n / along.length;
	};
	const between = (a: readonly [number, number, number], b: readonly [number, number, number]) =>
		Array.from({ length: 41 }, (_, i) => [0, 1, 2].map((c) => a[c]! + ((i + 1) / 43) * (b[c]! - a[c]!)) as [number, number, number]);
	const room = (): Drawable[] => [
		quad([-3, 0, 4], [3, 0, 4], [3, 0, -4], [-3, 0, -4], COLOUR.deck),
		quad([-3, 0, -4], [3, 0, -4], [3, 3, -4], [-3, 3, -4], COLOUR.bulkhead),
		quad([-3, 0, 4], [-3, 0, -4], [-3, 3, -4], [-3, 3, 4], COLOUR.bulkhead),
		box([0.5, 0, -1.5], [1.3, 0.8, -0.7], COLOUR.desk)[0],
	];
	const seen = [
		["where the deck meets the end", [-3, 0, -4], [0.2, 0, -4]],
		["where the deck meets the side", [-3, 0, -4], [-3, 0, -0.5]],
		["upright in the corner", [-3, 0, -4], [-3, 2.5, -4]],
		["at the foot of a box, on the near side", [0.5, 0, -0.7], [1.3, 0, -0.7]],
		["on a box's ridge", [0.5, 0.8, -0.7], [1.3, 0.8, -0.7]],
		["on the deck", [-2, 0, -3.5], [0, 0, 0.5]],
	] as const;
	const hidden = [
		["at the foot of a box, on the far side", [0.6, 0, -1.5], [1.2, 0, -1.5]],
		["2 cm behind the end", [-2, 1, -4.02], [2, 1, -4.02]],
		["6 cm below the deck", [-2, -0.06, -3], [0, -0.06, 0]],
	] as const;

	for (const height of [0.35, 1.7, 2.6])
		for (const [name, a, b] of seen)
			it(`seen from ${height} m: ${name}`, () => {
				camera.position.set([-0.4, height, 3.4]);
				aim(camera, 0.05, -height / 6, -1, 0, 1, 0);
				expect(shown([...room(), lines([a, b], COLOUR.focus, { width: 2 })], between(a, b))).toBeGreaterThan(0.96);
			});

	for (const height of [1.2, 1.7, 2.6])
		for (const [name, a, b] of hidden)
			it(`hidden from ${height} m: ${name}`, () => {
				camera.position.set([-0.4, height === 1.2 ? 0.7 : height, 3.4]);
				aim(camera, 0.05, -height / 6, -1, 0, 1, 0);
				const line = lines([a, b], COLOUR.focus, { width: 2 });
				if (!(name.includes("box") && height > 1.2)) expect(shown([...room(), line], between(a, b))).toBe(0);
				expect(shown([...room(), { ...line, depth: "over" }], between(a, b))).toBeGreaterThan(0.96);
			});

	it("a solid line hides what is drawn later behind it, a translucent one does not", () => {
		camera.position.set([0, 1, 3]);
		aim(camera, 0, 0, -1, 0, 1, 0);
		const front = lines(
			[
				[-1, 1, 0],
				[1, 1, 0],
			],
			COLOUR.ink,
			{ width: 6 },
		);
		const behind = lines(
			[
				[0.02, 0.02, -1],
				[0.02, 2, -1],
			],
			COLOUR.focus,
			{ width: 6 },
		);
		expect(shown([front, behind], [[0.015, 1, 0]])).toBe(0);
		expect(shown([{ ...front, opacity: 0.1 }, behind], [[0.015, 1, 0]])).toBe(1);
	});
});

describe("the near plane", () => {
	it("cuts a line that runs past the camera, and its dashes stay where they were", () => {
		const camera = createCamera(1.2);
		camera.position.set([0, 0, 0]);
		const raster = createRaster(N, N);
		const draw = (from: number, dash: readonly [number, number] | null): Uint8ClampedArray => {
			raster.render(
				scene(
					[
						lines(
							[
								[0.3, -0.4, from],
								[0.3, -0.4, -8],
							],
							COLOUR.ink,
							{ width: 3, dash },
						),
					],
					[],
					WHITE,
				),
				camera,
			);
			return raster.pixels.slice();
		};
		const far = draw(8, null);
		expect(far.some((v, k) => k % 4 === 0 && v < 60)).toBe(true);
		expect(draw(-0.03, null)).toEqual(far);
		/** 16 m and 8 m behind: a whole number of dashes apart. */
		expect(draw(8, [0.25, 0.25])).toEqual(draw(16, [0.25, 0.25]));
		expect(draw(8, [0.25, 0.25])).not.toEqual(far);
	});

	it("leaves out what lies behind, and a part's lines move with it", () => {
		const raster = createRaster(N, N);
		raster.render(
			scene(
				[
					lines(
						[
							[-1, 0, 1],
							[1, 0, 5],
						],
						COLOUR.ink,
					),
				],
				[],
				WHITE,
			),
			plan,
		);
		expect(raster.pixels.every((v) => v === 255)).toBe(true);
		const line = lines(
			[
				[-5, 0, 0],
				[5, 0, 0],
			],
			COLOUR.ink,
			{ width: 2 },
		);
		raster.render(scene([], [{ drawable: line, matrix: at(3, 7, -32) }], WHITE), plan);
		const moved = raster.pixels.slice();
		raster.render(
			scene(
				[
					lines(
						[
							[-2, 7, -32],
							[8, 7, -32],
						],
						COLOUR.ink,
						{ width: 2 },
					),
				],
				[],
				WHITE,
			),
			plan,
		);
		expect(raster.pixels).toEqual(moved);
	});
});
