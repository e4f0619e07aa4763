import { describe, expect, it } from "vitest";
import { placeAll } from "../../src/body/kinematics.ts";
import { createPose } from "../../src/body/pose.ts";
import { fraction } from "../../src/body/segments.ts";
import { LEFT, limb, RIGHT, SEGMENT_COUNT, SEGMENTS } from "../../src/body/skeleton.ts";
import { type Deck, deckTriad, heightAbove, placeOnDeck } from "../../src/layout/habitat.ts";
import type { Part, Triangles } from "../../src/shape/drawable.ts";
import { createFigure, stageToStance, stanceToStage, standOnDeck, updateFigure } from "../../src/shape/figure.ts";
import { COLOUR } from "../../src/shape/palette.ts";
import { fromStage, stageFrame } from "../../src/shape/stage-frame.ts";
import { dot, sub } from "../../src/vector/vec3.ts";

const STATURE = 1.75;
const figure = createFigure(STATURE);
const triangles = (p: Part) => p.drawable as Triangles;
const skins = figure.parts.slice(0, SEGMENT_COUNT).map(triangles);
const hulls = figure.parts.slice(SEGMENT_COUNT).map(triangles);
const named = (name: string) => skins.find((d) => d.name === `crew-${name}`) as Triangles;
const pose = createPose(STATURE);
pose.root[1] = fraction("hipHeight") * STATURE;
placeAll(pose);

const volume = (d: Triangles): number => {
	let sum = 0;
	const p = (i: number, k: number) => d.position[3 * (d.index[i] as number) + k] as number;
	for (let t = 0; t < d.index.length; t += 3)
		sum +=
			p(t, 0) * (p(t + 1, 1) * p(t + 2, 2) - p(t + 1, 2) * p(t + 2, 1)) +
			p(t, 1) * (p(t + 1, 2) * p(t + 2, 0) - p(t + 1, 0) * p(t + 2, 2)) +
			p(t, 2) * (p(t + 1, 0) * p(t + 2, 1) - p(t + 1, 1) * p(t + 2, 0));
	return sum / 6;
};

/** Bounds of the whole figure as placed, m: [least, most] an axis. */
const bounds = (): [number, number][] => {
	const out: [number, number][] = [0, 1, 2].map(() => [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]);
	figure.parts.slice(0, SEGMENT_COUNT).forEach(({ matrix }, i) => {
		const { position } = skins[i] as Triangles;
		for (let v = 0; v < position.length; v += 3)
			for (let k = 0; k < 3; k++) {
				const at =
					(matrix[k] as number) * (position[v] as number) +
					(matrix[4 + k] as number) * (position[v + 1] as number) +
					(matrix[8 + k] as number) * (position[v + 2] as number) +
					(matrix[12 + k] as number);
				const range = out[k] as [number, number];
				range[0] = Math.min(range[0], at);
				range[1] = Math.max(range[1], at);
			}
	});
	return out;
};

describe("the crew figure", () => {
	it("has a skin and an ink hull a segment, within the triangle budget", () => {
		expect(figure.parts).toHaveLength(2 * SEGMENT_COUNT);
		const count = (list: readonly Triangles[]) => list.reduce((s, d) => s + d.index.length / 3, 0);
		expect(count(skins)).toBeLessThan(6300);
		expect(count(hulls)).toBe(count(skins));
	});

	it("is made of finite numbers, unit normals, known colours and indices in range", () => {
		for (const d of [...skins, ...hulls]) {
			expect(d.position.every(Number.isFinite), d.name).toBe(true);
			for (let v = 0; v < d.normal.length; v += 3)
				expect(Math.hypot(d.normal[v] as number, d.normal[v + 1] as number, d.normal[v + 2] as number)).toBeCloseTo(1, 5);
			expect(Math.max(...d.index)).toBeLessThan(d.position.length / 3);
			expect(d.colour).toHaveLength(d.position.length / 3);
			expect(Math.max(...d.colour)).toBeLessThan(Object.keys(COLOUR).length);
		}
	});

	it("winds every skin outward, left and right alike, and has no triangle without area", () => {
		for (const d of skins) {
			expect(volume(d), d.name).toBeGreaterThan(0);
			for (let t = 0; t < d.index.length; t += 3) expect(new Set(d.index.subarray(t, t + 3)).size).toBe(3);
		}
	});

	it("draws the hull from behind, in ink, about 3.5 mm outside the skin", () => {
		hulls.forEach((hull, i) => {
			const skin = skins[i] as Triangles;
			expect(hull.side).toBe("back");
			expect(hull.lit).toBe(false);
			expect(hull.colour.every((c) => c === COLOUR.ink)).toBe(true);
			for (let v = 0; v < hull.position.length; v += 3) {
				const d = [0, 1, 2].map((k) => (hull.position[v + k] as number) - (skin.position[v + k] as number));
				// the slabs of the soles have no edge of their own
				if (skin.colour[v / 3] === COLOUR.coaming) expect(Math.hypot(...d)).toBe(0);
				else expect(Math.hypot(...d)).toBeCloseTo(0.0035, 5);
			}
			expect(volume(hull)).toBeGreaterThan(volume(skin));
		});
	});

	it("mirrors right into left", () => {
		for (const { name, side } of SEGMENTS) {
			if (side !== RIGHT) continue;
			const [r, l] = [named(`right-${name}`), named(`left-${name}`)];
			r.position.forEach((v, i) => {
				expect(l.position[i]).toBeCloseTo(i % 3 === 2 ? -v : v, 6);
			});
			expect(volume(l)).toBeCloseTo(volume(r), 6);
		}
	});

	it("stands from the floor to its stature, as broad over the shoulders as it should be", () => {
		const identity = new Float32Array(16);
		stanceToStage(0, 0, 0, 0, identity);
		updateFigure(figure, pose, identity);
		const [, up, across] = bounds() as [[number, number], [number, number], [number, number]];
		expect(up[0]).toBeCloseTo(0, 2);
		expect(up[1] / STATURE).toBeCloseTo(1, 2);
		const shoulder = figure.parts[limb(RIGHT, "upperArm")] as Part;
		const outermost =
			triangles(shoulder).position.reduce((m, v, i) => (i % 3 === 2 ? Math.max(m, v) : m), 0) + (shoulder.matrix[14] as number);
		expect((2 * outermost) / STATURE).toBeGreaterThan(0.245);
		expect((2 * outermost) / STATURE).toBeLessThan(0.27);
		expect(across[1] / STATURE).toBeLessThan(0.16);
	});

	it("has head and hands of human size", () => {
		const extent = (d: Triangles, k: number) => {
			const values = d.position.filter((_, i) => i % 3 === k);
			return (Math.max(...values) - Math.min(...values)) / STATURE;
		};
		expect(extent(named("head"), 1)).toBeCloseTo(0.132, 2);
		const least = (name: string, y: number) =>
			named(name).position.reduce((m, v, i) => (i % 3 === 1 ? Math.min(m, v) : m), 0) / STATURE + y;
		expect(least("right-fingertips", -fraction("palmLength") - fraction("proximalLength"))).toBeCloseTo(-0.108, 2);
	});

	it("moves by the stance's place and facing: forward to the heading, right clockwise of it", () => {
		const m = new Float32Array(16);
		stanceToStage(1, 0.5, -2, Math.PI / 2, m);
		updateFigure(figure, pose, m);
		const hand = (side: 0 | 1) => (figure.parts[limb(side, "hand")] as Part).matrix;
		// facing +axial, the right hand lies retrograde
		expect(hand(RIGHT)[12]).toBeLessThan(1);
		expect(hand(LEFT)[12]).toBeGreaterThan(1);
		expect(hand(RIGHT)[13]).toBeCloseTo(0.5 + 0.485 * STATURE, 5);
		const forward = hand(RIGHT).subarray(0, 3);
		expect(forward[2]).toBeCloseTo(1, 6);
		expect(figure.matrices[limb(RIGHT, "hand")]).toBe(hand(RIGHT));
		expect((figure.parts[SEGMENT_COUNT + limb(RIGHT, "hand")] as Part).matrix).toBe(hand(RIGHT));
	});

	it.each(["curved", "flat"] as const)("stands upright on a %s deck away from the stage's origin, and back", (floor) => {
		const deck: Deck = {
			index: 0,
			id: "d",
			name: "d",
			floor,
			radius: 20,
			headroom: 2.4,
			middle: 0.1,
			closed: false,
			from: -0.5,
			to: 0.7,
			axialFrom: -4,
			axialTo: 4,
			walkways: [],
		};
		const frame = stageFrame(deck, 0.1, 1);
		const m = new Float32Array(16);
		standOnDeck(frame, 0.25, -0.5, 0.6, m);
		const head = [0, 1, 2].map((k) => 1.6 * (m[4 + k] as number) + (m[12 + k] as number)) as [number, number, number];
		expect(heightAbove(deck, fromStage(frame, ...head))).toBeCloseTo(1.6, 5);
		const ahead = fromStage(frame, ...([0, 1, 2].map((k) => 1e-3 * (m[k] as number) + (m[12 + k] as number)) as [number, number, number]));
		const triad = deckTriad(deck, 0.25);
		const moved = sub(ahead, placeOnDeck(deck, 0.25, -0.5, 0));
		expect(Math.atan2(moved[2], dot(moved, triad.prograde))).toBeCloseTo(0.6, 3);
		const back = new Float64Array(3);
		stageToStance(m, ...head, back);
		expect([...back].map((v) => Math.round(v * 1e5) / 1e5 + 0)).toEqual([0, 1.6, 0]);
	});

	it("leaves head and neck out of the view through one's own eyes, and the ink of what is near to them", () => {
		const names = figure.hiddenInFirstPerson.map((p) => p.drawable.name);
		expect(names.filter((n) => !n.endsWith("-ink")).sort()).toEqual(["crew-head", "crew-neck"]);
		expect(names).toContain("crew-head-ink");
		expect(names).toContain("crew-thorax-ink");
		expect(names).not.toContain("crew-right-hand-ink");
	});

	it("refuses a pose of another stature", () => {
		expect(() => updateFigure(figure, createPose(1.6), new Float32Array(16))).toThrow(/1.6/);
	});
});
