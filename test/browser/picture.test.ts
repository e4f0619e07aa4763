import type { Browser, Page } from "playwright-core";
import type { PNG } from "pngjs";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { launch, type OpenApp, serveApp } from "../support/browser.ts";
import { demoDrop, floorToStage, stageDirections } from "../support/browser-demo.ts";
import { countOchre, findRing, findStrokes, type Rect, variety } from "../support/browser-pixels.ts";
import {
	chooseView,
	contextAlive,
	cross,
	dot,
	drag,
	onScreen,
	openStage,
	press,
	readStage,
	type StageState,
	shotOf,
} from "../support/browser-stage.ts";

const { assessed, frame, landing } = demoDrop();
const directions = stageDirections(frame);
const { decks, ladders, workstations, hatches, windows } = assessed.habitat;
/** Of the drawn mark: its white runs from 1.05 to 1.75 times this, its ink ring from there to 2.1 times, m. */
const MARK = 0.03;

/** Points of a circle about the landing on its floor, stage coordinates, m. */
const circle = (radius: number, n = 48) =>
	Array.from({ length: n }, (_, i) => {
		const turn = (2 * Math.PI * i) / n;
		const along = radius * Math.cos(turn);
		return floorToStage(frame, landing.deck, landing.angle + along / landing.deck.radius, landing.axial + radius * Math.sin(turn));
	});

/** px by which the mark in the picture is off the place that the assessment says, found without knowing where it was drawn. */
function markOff(state: StageState, shot: PNG): { off: number; contrast: number } {
	const at = onScreen(state, floorToStage(frame, landing.deck, landing.angle, landing.axial));
	const around = (radius: number) =>
		circle(radius).map((p) => {
			const q = onScreen(state, p);
			return [q.x - at.x, q.y - at.y] as const;
		});
	const { dx, dy, contrast } = findRing(shot, at.x, at.y, around(1.4 * MARK), around(1.93 * MARK), 20);
	return { off: Math.hypot(dx, dy), contrast };
}

/** Degrees between the drawn stroke of the axis cue that carries the label "with spin" and the camera's own prograde. */
async function cueOff(page: Page, state: StageState, shot: PNG): Promise<number> {
	const { x, y } = onScreen(state, state.cueOrigin);
	const strokes = findStrokes(shot, x, y);
	const label = await page.getByText("with spin", { exact: true }).boundingBox();
	if (!label) throw new Error("the axis cue has no label");
	const towards = Math.atan2(state.top + y - (label.y + label.height / 2), label.x + label.width / 2 - state.left - x);
	const between = (a: number, b: number): number => (Math.acos(Math.cos(a - b)) * 180) / Math.PI;
	const drawn = [...strokes].sort((a, b) => between(a.angle, towards) - between(b.angle, towards))[0];
	if (!drawn) throw new Error("the axis cue has no strokes");
	const expected = Math.atan2(dot(directions.prograde, state.camera.up), dot(directions.prograde, state.camera.right));
	return between(drawn.angle, expected);
}

/** Floor places of the demo's elements by id: metres with spin of the person's feet, metres along the axis, and the stage point. */
const places = [...ladders, ...workstations, ...hatches, ...windows].map((e) => {
	const lower = decks.find((d) => d.id === "lower") as (typeof decks)[number];
	return {
		id: e.id,
		along: lower.radius * (e.angle - frame.angle),
		axial: windowAxial(e.id) ?? e.axial,
		point: floorToStage(frame, lower, e.angle, windowAxial(e.id) ?? e.axial),
	};
});
/** A window in an end has the end's own axial place. */
function windowAxial(id: string): number | null {
	const w = windows.find((one) => one.id === id);
	if (w?.surface !== "end-high") return null;
	return (decks[w.deck] as (typeof decks)[number]).axialTo;
}

/** Of every three elements before the camera: whether they turn the same way on the page as seen from above in the layout. Returns who was seen. */
function turnsAlike(state: StageState): { seen: string[]; triples: number; wrong: string[] } {
	const before = places.map((p) => ({ ...p, on: onScreen(state, p.point) })).filter((p) => p.on.depth > 0.3);
	const wrong: string[] = [];
	let triples = 0;
	before.forEach((a, i) => {
		before.slice(i + 1).forEach((b, j) => {
			for (const c of before.slice(i + j + 2)) {
				// Seen from above with spin is right when axial points down the page.
				const above = (b.along - a.along) * (c.axial - a.axial) - (b.axial - a.axial) * (c.along - a.along);
				if (Math.abs(above) < 1) continue;
				const drawn = (b.on.x - a.on.x) * (c.on.y - a.on.y) - (b.on.y - a.on.y) * (c.on.x - a.on.x);
				triples += 1;
				if (Math.sign(above) !== Math.sign(drawn)) wrong.push(`${a.id}, ${b.id}, ${c.id}`);
			}
		});
	});
	return { seen: before.map((p) => p.id), triples, wrong };
}

/** The middle lines of the ladder's stiles and rungs from the foot up, as they should appear. */
function ladderOnScreen(state: StageState) {
	const ladder = ladders[0] as (typeof ladders)[number];
	const deck = decks[ladder.deck] as (typeof decks)[number];
	const points = [];
	for (let height = 0; height <= ladder.footRadius - ladder.headRadius; height += 0.05)
		for (const side of [-0.5, -0.25, 0, 0.25, 0.5])
			points.push(
				onScreen(state, floorToStage(frame, deck, ladder.angle, ladder.axial + side * ladder.width * Math.cos(ladder.facing), height)),
			);
	return points.filter((p) => p.depth > 0.3);
}

const shots = new Map<string, PNG>();

describe.each([
	["software", "&picture=webgl", "webgl"],
	["software", "&picture=raster", "raster"],
	["none", "", "raster"],
] as const)("webgl %s, address %j: %s", (webgl, query, painter) => {
	let browser: Browser;
	let server: Awaited<ReturnType<typeof serveApp>>;
	let app: OpenApp;
	beforeAll(async () => {
		server = await serveApp();
		browser = await launch({ webgl });
		app = await openStage(browser, server.url, query);
	});
	afterAll(async () => {
		await browser?.close();
		await server?.close();
	});

	describe.each(["Eyepoint", "External"] as const)("%s", (view) => {
		const eyepoint = view === "Eyepoint";
		let state: StageState;
		let shot: PNG;
		const look = async (): Promise<void> => {
			state = await readStage(app.page);
			shot = await shotOf(app.page);
		};
		beforeAll(async () => {
			await chooseView(app.page, view);
			await look();
			shots.set(`${webgl} ${painter} ${view}`, shot);
		});

		test("is painted as asked by a context that is alive, and not flat", async () => {
			expect(state.painter).toBe(painter);
			expect(await contextAlive(app.page)).toBe(true);
			const { colours, deviation, commonest } = variety(shot);
			expect(colours).toBeGreaterThan(100);
			expect(deviation).toBeGreaterThan(15);
			expect(commonest).toBeLessThan(0.6);
		});

		test("the camera is a right-handed one", () => {
			const { right, up, forward } = state.camera;
			const back = cross(right, up).map((v) => -v);
			for (let k = 0; k < 3; k++) expect(back[k]).toBeCloseTo(forward[k] as number, 6);
			expect([dot(right, right), dot(up, up), dot(right, up)].map((v) => Math.abs(v) < 1e-9 || Math.abs(v - 1) < 1e-9)).toEqual([
				true,
				true,
				true,
			]);
		});

		test.each([
			["as opened", 0, 0],
			["turned by dragging", eyepoint ? 60 : 170, eyepoint ? -40 : 110],
		])("mark and axis cue lie where assessment and camera say, %s", async (_, dx, dy) => {
			if (dx !== 0) {
				const before = state.camera.forward;
				await drag(app.page, dx, dy);
				await look();
				expect(dot(before, state.camera.forward)).toBeLessThan(Math.cos(0.15));
			}
			const { off, contrast } = markOff(state, shot);
			expect(contrast).toBeGreaterThan(60);
			expect(off).toBeLessThanOrEqual(3);
			expect(await cueOff(app.page, state, shot)).toBeLessThan(2);
		});

		// Without WebGL the pixels are the same, as is checked below.
		if (webgl === "none") return;

		test("left and right of every element are those of the layout", async () => {
			const seen = new Set<string>();
			let triples = 0;
			await press(app.page, "Home");
			for (const times of [0, eyepoint ? 4 : 36]) {
				await press(app.page, eyepoint ? "ArrowDown" : "ArrowRight", times);
				await look();
				const one = turnsAlike(state);
				expect(one.wrong).toEqual([]);
				triples += one.triples;
				for (const id of one.seen) seen.add(id);
			}
			expect([...seen].sort()).toEqual(places.map((p) => p.id).sort());
			expect(triples).toBeGreaterThan(3);
		});

		test("the ladder is drawn where the layout puts it", async () => {
			await press(app.page, "Home", 1);
			if (eyepoint) await press(app.page, "ArrowUp", 9);
			else await drag(app.page, 326, 0);
			await look();
			const { all, near } = countOchre(shot, ladderOnScreen(state), 14, state.instruments as unknown as Rect[]);
			expect(all).toBeGreaterThan(300);
			expect(near / all).toBeGreaterThan(0.97);
		});
	});

	test("the console is clean", () => app.expectClean());
});

describe.each(["Eyepoint", "External"])("%s", (view) => {
	/** Mean difference of the grey, and the share of pixels that differ by more than 40 of 255 in a channel. */
	const differ = (a: PNG, b: PNG): { mean: number; far: number } => {
		expect([a.width, a.height]).toEqual([b.width, b.height]);
		let sum = 0;
		let far = 0;
		for (let k = 0; k < a.data.length; k += 4) {
			const d = Math.max(...[0, 1, 2].map((c) => Math.abs((a.data[k + c] as number) - (b.data[k + c] as number))));
			sum += d;
			if (d > 40) far += 1;
		}
		return { mean: sum / (a.data.length / 4), far: far / (a.data.length / 4) };
	};
	const shot = (name: string): PNG => shots.get(`${name} ${view}`) as PNG;

	test("a browser without WebGL shows the same pixels", () => {
		expect(differ(shot("none raster"), shot("software raster")).far).toBeLessThan(0.0005);
	});
	test("both painters show the same picture", () => {
		const { mean, far } = differ(shot("software webgl"), shot("software raster"));
		expect(mean).toBeLessThan(4);
		expect(far).toBeLessThan(0.02);
	});
});
