import { describe, expect, it } from "vitest";
import { createRaster, type Raster } from "../../src/raster/raster.ts";
import { aim, type Camera, createCamera, project } from "../../src/shape/camera.ts";
import type { Part, Triangles } from "../../src/shape/drawable.ts";
import { COLOUR, PALETTE_BYTES } from "../../src/shape/palette.ts";
import { cast } from "./oracle.ts";
import { at, ball, bent, box, numbers, quad, scene, triangles } from "./scene.ts";

const W = 96;
const H = 64;

function cameraAt(x: number, y: number, z: number, dx: number, dy: number, dz: number, fov = 1.2): Camera {
	const camera = createCamera(fov);
	camera.position.set([x, y, z]);
	aim(camera, dx, dy, dz, 0, 1, 0);
	return camera;
}

/** Compares depth at every pixel and colour wherever a pixel and its neighbours show one triangle or one surface. */
function compare(raster: Raster, drawables: readonly Triangles[], camera: Camera, background = COLOUR.sky) {
	const truth = cast(drawables, camera, W, H, background);
	let wrongDepth = 0;
	let compared = 0;
	let wrongColour = 0;
	let seen = 0;
	for (let j = 1; j < H - 1; j++)
		for (let i = 1; i < W - 1; i++) {
			const k = j * W + i;
			const t = truth[k] as (typeof truth)[number];
			const w = raster.depth[k]!;
			if (!Number.isFinite(w)) throw new Error(`depth ${w} at (${i}, ${j})`);
			if (t.id >= 0) seen++;
			if (t.id < 0 ? w !== 0 : Math.abs(w * t.depth - 1) > 1e-5) wrongDepth++;
			const around = [k - 1, k + 1, k - W, k + W].map((n) => truth[n] as (typeof truth)[number]);
			if (around.some((n) => n.seen !== t.seen)) continue;
			compared++;
			for (let c = 0; c < 3; c++) if (Math.abs(raster.pixels[4 * k + c]! - t.colour[c]!) > 1.2) wrongColour++;
		}
	return { wrongDepth, compared, wrongColour, seen };
}

/** A soup of triangles about the camera, many of them crossing its near plane. */
function soup(seed: number, count: number, over: Partial<Triangles>): Triangles {
	const next = numbers(seed);
	const p = () => [3 * next() - 1.5, 3 * next() - 1.5, 3 * next() - 1.5] as const;
	return triangles(
		Array.from({ length: count }, () => {
			const a = p();
			const corner = () => a.map((v) => v + 2 * next() - 1) as [number, number, number];
			return [a, corner(), corner()] as const;
		}),
		COLOUR.deck,
		over,
	);
}

describe("triangles against a ray through every pixel", () => {
	for (const seed of [1, 2])
		for (const side of ["front", "back", "both"] as const)
			it(`soup of seed ${seed}, ${side} faces`, () => {
				const t = soup(seed, 60, { side });
				const camera = cameraAt(0, 0, 0, 0.3, -0.2, -1);
				const crossing = Array.from({ length: 60 }, (_, k) =>
					[0, 1, 2].map((c) => 0.3 * t.position[9 * k + 3 * c]! - 0.2 * t.position[9 * k + 3 * c + 1]! - t.position[9 * k + 3 * c + 2]!),
				).filter((z) => Math.min(...z) < 0 && Math.max(...z) > 0.1);
				expect(crossing.length).toBeGreaterThan(5);
				const raster = createRaster(W, H);
				raster.render(scene([t]), camera);
				const r = compare(raster, [t], camera);
				expect(r.seen).toBeGreaterThan(400);
				expect(r.compared).toBeGreaterThan(1000);
				expect(r.wrongDepth).toBeLessThanOrEqual(0.002 * W * H);
				expect(r.wrongColour).toBeLessThanOrEqual(0.01 * r.compared);
			});

	it("a smooth ball, a bent deck under the feet, a box and a translucent pane", () => {
		const pane = quad([-0.5, 0, -1], [0.5, 0, -1], [0.5, 1.5, -1], [-0.5, 1.5, -1], COLOUR.coriolis, {
			opacity: 0.4,
			side: "both",
			lit: false,
		});
		const deck = bent(5, 0.8, 3, 0, 8, 4, COLOUR.deck, 1);
		const [block] = box([-1.2, 0, -2.2], [-0.4, 0.9, -1.4], COLOUR.desk);
		const all = [pane, deck, ball(0.5, 8, 12, COLOUR.suit), block];
		const camera = cameraAt(0.4, 1.4, 1.5, -0.2, -0.4, -1);
		const raster = createRaster(W, H);
		raster.render(scene(all), camera);
		const r = compare(raster, all, camera);
		expect(r.compared).toBeGreaterThan(2500);
		expect(r.wrongDepth).toBeLessThanOrEqual(0.002 * W * H);
		expect(r.wrongColour).toBeLessThanOrEqual(0.01 * r.compared);
	});

	it("a part turned, stretched and mirrored is lit as the same triangles standing still", () => {
		const body = ball(0.5, 8, 12, COLOUR.suit);
		for (const mirror of [1, -1]) {
			const [c, s] = [Math.cos(0.7), Math.sin(0.7)];
			const matrix = new Float32Array([c, s, 0, 0, -2 * s, 2 * c, 0, 0, 0, 0, mirror * 0.6, 0, 0.2, 0.1, -2.5, 1]);
			const still: Triangles = { ...body, position: body.position.slice(), normal: body.normal.slice(), index: body.index.slice() };
			for (let v = 0; v < body.position.length; v += 3) {
				const [x, y, z] = body.position.subarray(v, v + 3) as unknown as [number, number, number];
				still.position.set([c * x - 2 * s * y + 0.2, s * x + 2 * c * y + 0.1, mirror * 0.6 * z - 2.5], v);
				const [nx, ny, nz] = body.normal.subarray(v, v + 3) as unknown as [number, number, number];
				const n = [c * nx - (s * ny) / 2, s * nx + (c * ny) / 2, (mirror * nz) / 0.6] as const;
				still.normal.set(
					n.map((x2) => x2 / Math.hypot(...n)),
					v,
				);
			}
			if (mirror < 0) for (let k = 0; k < still.index.length; k += 3) still.index.subarray(k, k + 3).reverse();
			const camera = cameraAt(0, 0, 0, 0, 0, -1);
			const a = createRaster(W, H);
			a.render(scene([], [{ drawable: body, matrix }]), camera);
			const r = compare(a, [still], camera);
			expect(r.seen).toBeGreaterThan(300);
			expect(r.wrongDepth).toBeLessThanOrEqual(10);
			expect(r.wrongColour).toBe(0);
		}
	});
});

describe("where things come to lie", () => {
	it("the middle of a small square is where `project` puts it", () => {
		const camera = cameraAt(1, 2, 3, -0.4, -0.7, -1);
		const raster = createRaster(400, 300);
		const out = new Float64Array(3);
		for (const [x, y, z] of [
			[0, 0, 0],
			[0.5, 0.1, -1],
			[-1, 0.3, 1],
		] as const) {
			const s = 0.04;
			raster.render(scene([quad([x - s, y, z + s], [x + s, y, z + s], [x + s, y, z - s], [x - s, y, z - s], COLOUR.coriolis)]), camera);
			let [n, u, v] = [0, 0, 0];
			for (let k = 0; k < 400 * 300; k++)
				if (raster.depth[k]! > 0) {
					n++;
					u += (k % 400) + 0.5;
					v += Math.floor(k / 400) + 0.5;
				}
			expect(project(camera, 400, 300, x, y, z, out)).toBe(true);
			expect(n).toBeGreaterThan(3);
			expect(Math.hypot(u / n - out[0]!, v / n - out[1]!)).toBeLessThan(0.5);
		}
	});

	it("neighbouring triangles leave no gap and share no pixel", () => {
		const next = numbers(11);
		const g = 9;
		const grid = Array.from({ length: g * g }, (_, k) => {
			const [i, j] = [k % g, Math.floor(k / g)];
			const inside = i > 0 && j > 0 && i < g - 1 && j < g - 1;
			return [
				i / (g - 1) - 0.5 + (inside ? 0.08 * (next() - 0.5) : 0),
				j / (g - 1) - 0.5 + (inside ? 0.08 * (next() - 0.5) : 0),
				-0.4,
			] as const;
		});
		const faces = Array.from({ length: (g - 1) * (g - 1) }, (_, k) => {
			const a = Math.floor(k / (g - 1)) * g + (k % (g - 1));
			const [p, q, r, s] = [grid[a], grid[a + 1], grid[a + g + 1], grid[a + g]] as [
				(typeof grid)[0],
				(typeof grid)[0],
				(typeof grid)[0],
				(typeof grid)[0],
			];
			return [[p, q, r] as const, [p, r, s] as const];
		}).flat();
		const raster = createRaster(200, 200);
		const camera = cameraAt(0, 0, 0, 0, 0, -1, 1.2);
		/** Half opaque on black: a pixel laid twice is brighter, one left out black. */
		raster.render(scene([triangles(faces, COLOUR.halo, { opacity: 0.5, lit: false })], [], { background: COLOUR.ink }), camera);
		let wrong = 0;
		const once = (PALETTE_BYTES[3 * COLOUR.ink]! + 255) / 2;
		for (let j = 2; j < 198; j++) for (let i = 2; i < 198; i++) if (Math.abs(raster.pixels[4 * (200 * j + i)]! - once) > 1) wrong++;
		expect(wrong).toBe(0);
	});
});

describe("what lies on what", () => {
	const camera = cameraAt(0, 1.5, 2, 0, -0.5, -1);
	const floor = quad([-3, 0, 3], [3, 0, 3], [3, 0, -3], [-3, 0, -3], COLOUR.deck, { lit: false });
	const patch = (s: number, colour: number, over: Partial<Triangles> = {}) =>
		quad([-s, 0, s], [s, 0, s], [s, 0, -s], [-s, 0, -s], colour, { lit: false, decal: true, ...over });
	const middle = (raster: Raster): number[] => {
		const out = new Float64Array(3);
		project(camera, W, H, 0, 0, 0, out);
		const k = 4 * (Math.floor(out[1]!) * W + Math.floor(out[0]!));
		return [...raster.pixels.subarray(k, k + 3)];
	};
	const bytes = (c: number) => [...PALETTE_BYTES.subarray(3 * c, 3 * c + 3)];
	const raster = createRaster(W, H);

	it("a decal covers its whole surface, the later one the earlier, wherever the surface is listed", () => {
		for (const still of [
			[floor, patch(1, COLOUR.coaming), patch(0.4, COLOUR.focus)],
			[patch(1, COLOUR.coaming), patch(0.4, COLOUR.focus), floor],
		]) {
			raster.render(scene(still), camera);
			expect(middle(raster)).toEqual(bytes(COLOUR.focus));
			const shown = (c: number) => {
				const b = bytes(c);
				let n = 0;
				for (let k = 0; k < W * H; k++) if (b.every((v, m) => raster.pixels[4 * k + m] === v)) n++;
				return n;
			};
			const [coaming, focus] = [shown(COLOUR.coaming), shown(COLOUR.focus)];
			expect(focus).toBeGreaterThan(100);
			raster.render(scene([patch(1, COLOUR.coaming), patch(0.4, COLOUR.focus)]), camera);
			/** The rims of a decal are mixed with what lies under it. */
			expect(Math.abs(coaming - shown(COLOUR.coaming))).toBeLessThan(5);
			expect(Math.abs(focus - shown(COLOUR.focus))).toBeLessThan(5);
		}
	});

	it("a decal does not show through a wall before its surface", () => {
		const wall = quad([-2, -1, 0.9], [2, -1, 0.9], [2, 2, 0.9], [-2, 2, 0.9], COLOUR.bulkhead, { lit: false });
		raster.render(scene([floor, patch(1, COLOUR.focus), wall]), camera);
		expect(middle(raster)).toEqual(bytes(COLOUR.bulkhead));
	});

	it("translucent layers blend in list order, still before parts, whatever their depth", () => {
		const pane = (y: number, colour: number, opacity: number) =>
			quad([-1, y, 1], [1, y, 1], [1, y, -1], [-1, y, -1], colour, { lit: false, opacity });
		raster.render(
			scene(
				[pane(0.2, COLOUR.focus, 0.5), floor, pane(0.1, COLOUR.coriolis, 0.25)],
				[{ drawable: pane(0, COLOUR.own, 0.3), matrix: at(0, 0.05, 0) }],
			),
			camera,
		);
		let want = bytes(COLOUR.deck);
		for (const [c, o] of [
			[COLOUR.focus, 0.5],
			[COLOUR.coriolis, 0.25],
			[COLOUR.own, 0.3],
		] as const)
			want = want.map((v, k) => v + (bytes(c)[k]! - v) * o);
		for (const [k, v] of middle(raster).entries()) expect(Math.abs(v - want[k]!)).toBeLessThanOrEqual(1.5);
	});

	it("what is hidden stays hidden, whichever comes first", () => {
		const near = quad([-1, 0.5, 1], [1, 0.5, 1], [1, 0.5, -1], [-1, 0.5, -1], COLOUR.desk, { lit: false });
		const a = createRaster(W, H);
		raster.render(scene([floor, near]), camera);
		a.render(scene([near, floor]), camera);
		expect(middle(raster)).toEqual(bytes(COLOUR.desk));
		expect(a.pixels).toEqual(raster.pixels);
	});

	it("what is over everything is painted last in list order, without depth", () => {
		const over = (y: number, colour: number) =>
			quad([-0.5, y, 0.5], [0.5, y, 0.5], [0.5, y, -0.5], [-0.5, y, -0.5], colour, { lit: false, over: true });
		const depth = createRaster(W, H);
		depth.render(scene([floor]), camera);
		raster.render(scene([over(-1, COLOUR.own), over(-2, COLOUR.focus), floor]), camera);
		const out = new Float64Array(3);
		project(camera, W, H, 0, -1.5, 0, out);
		const k = 4 * (Math.floor(out[1]!) * W + Math.floor(out[0]!));
		expect([...raster.pixels.subarray(k, k + 3)]).toEqual(bytes(COLOUR.focus));
		expect(raster.depth).toEqual(depth.depth);
	});

	it("a part shows as many triangles as it counts, and none when it is not visible", () => {
		const empty = createRaster(W, H);
		empty.render(scene([]), camera);
		const whole = quad([-1, 0, 1], [1, 0, 1], [1, 0, -1], [-1, 0, -1], COLOUR.deck);
		const seen = (part: Partial<Part>): number => {
			raster.render(scene([], [{ drawable: whole, matrix: at(0, 0, 0), ...part }]), camera);
			return raster.depth.reduce((n, w) => n + (w > 0 ? 1 : 0), 0);
		};
		const all = seen({});
		expect(all).toBeGreaterThan(300);
		expect(seen({ count: 9 })).toBe(all);
		expect(seen({ count: 1 })).toBeGreaterThan(0.3 * all);
		expect(seen({ count: 1 })).toBeLessThan(0.7 * all);
		for (const part of [{ count: 0 }, { count: -3 }, { visible: false }]) {
			expect(seen(part)).toBe(0);
			expect(raster.pixels).toEqual(empty.pixels);
		}
	});

	it("the seam between two colours of a surface is a mix of both", () => {
		const front = createCamera(Math.PI / 2);
		const view = createRaster(64, 64);
		for (const x of [0.2, 0.4, 0.6, 0.8])
			for (const over of [{}, { decal: true }, { over: true }]) {
				const left = quad([-20, -20, -32], [8 + x, -20, -32], [8 + x, 20, -32], [-20, 20, -32], COLOUR.halo, { lit: false, ...over });
				const right = quad([8 + x, -20, -32], [20, -20, -32], [20, 20, -32], [8 + x, 20, -32], COLOUR.ink);
				const both: Triangles = {
					...left,
					position: new Float32Array([...left.position, ...right.position]),
					normal: new Float32Array([...left.normal, ...right.normal]),
					colour: new Uint8Array([...left.colour, ...right.colour]),
					index: Uint32Array.from({ length: 12 }, (_, k) => k),
				};
				view.render(scene([both]), front);
				const ink = PALETTE_BYTES[3 * COLOUR.ink]!;
				expect(Math.abs(view.pixels[4 * (64 * 32 + 40)]! - (ink + (255 - ink) * x))).toBeLessThanOrEqual(1);
			}
	});

	it("a thin coat ends on the rim and leaves sharp what lies under it", () => {
		const front = createCamera(Math.PI / 2);
		const view = createRaster(64, 64);
		const black = quad([-20, -20, -32], [8.5, -20, -32], [8.5, 20, -32], [-20, 20, -32], COLOUR.ink, { lit: false });
		for (const x of [0.2, 0.4, 0.6, 0.8]) {
			const coat = quad([-20, -20, -32], [8 + x, -20, -32], [8 + x, 20, -32], [-20, 20, -32], COLOUR.halo, {
				lit: false,
				decal: true,
				opacity: 0.5,
			});
			view.render(scene([black], [], { background: COLOUR.halo }), front);
			const row = 4 * 64 * 32 + 4 * 40;
			const under = view.pixels[row]!;
			view.render(scene([black, coat], [], { background: COLOUR.halo }), front);
			expect(Math.abs(view.pixels[row]! - (under + (255 - under) * 0.5 * x))).toBeLessThanOrEqual(2);
		}
	});

	it("triangles without area draw nothing and break nothing", () => {
		const flat = triangles(
			[
				[
					[0, 0.5, 0],
					[0, 0.5, 0],
					[0, 0.5, 0],
				],
				[
					[-1, 0.5, 0],
					[0, 0.5, 0],
					[1, 0.5, 0],
				],
				[
					[-1, 0.5, 3],
					[0, 0.5, 0],
					[1, 0.5, -3],
				],
			],
			COLOUR.focus,
			{ side: "both" },
		);
		const a = createRaster(W, H);
		raster.render(scene([floor]), camera);
		a.render(scene([floor, flat]), camera);
		let differ = 0;
		for (let k = 0; k < W * H; k++) if (a.pixels[4 * k] !== raster.pixels[4 * k]) differ++;
		expect(differ).toBe(0);
	});

	it("the rim of a surface is a mix of both sides by the share of the pixel", () => {
		const front = createCamera(Math.PI / 2);
		const view = createRaster(64, 64);
		for (const x of [0.1, 0.35, 0.5, 0.65, 0.9]) {
			/** Right rim at 40 + x px at a distance of 32 m, where a metre is a pixel. */
			view.render(
				scene([quad([-20, -20, -32], [8 + x, -20, -32], [8 + x, 20, -32], [-20, 20, -32], COLOUR.halo, { lit: false })], [], {
					background: COLOUR.ink,
				}),
				front,
			);
			const row = 4 * 64 * 32;
			const ink = PALETTE_BYTES[3 * COLOUR.ink]!;
			expect(view.pixels[row + 4 * 39]).toBe(255);
			expect(view.pixels[row + 4 * 41]).toBe(ink);
			expect(Math.abs(view.pixels[row + 4 * 40]! - (ink + (255 - ink) * x))).toBeLessThanOrEqual(1);
		}
	});
});
