import type { Browser, BrowserContextOptions, Page } from "playwright-core";
import { PNG } from "pngjs";
import type { StageProbe } from "../../app/scene/probe-stage.ts";
import { type OpenApp, openApp } from "./browser.ts";

declare global {
	interface Window {
		stageProbe?: StageProbe;
	}
}

/** The stage as it now stands: its rectangle in CSS px, the clock, and the camera in stage coordinates. */
export interface StageState {
	readonly painter: string;
	readonly time: number;
	readonly frames: number;
	readonly left: number;
	readonly top: number;
	readonly width: number;
	readonly height: number;
	/** Where the axis cue's strokes start, stage coordinates. */
	readonly cueOrigin: readonly number[];
	/** Of the instruments: left, top, right, bottom, CSS px within the stage. */
	readonly instruments: readonly (readonly number[])[];
	readonly camera: {
		readonly position: readonly number[];
		readonly right: Vec;
		readonly up: Vec;
		readonly forward: Vec;
		readonly fovY: number;
	};
}

export type Vec = readonly [number, number, number];

/** Asks until it holds; the page may forbid scripts of strings, so that nothing is evaluated but functions. */
export async function until(what: string, holds: () => Promise<boolean>, { every = 50, within = 20_000 } = {}): Promise<void> {
	const end = Date.now() + within;
	while (!(await holds())) {
		if (Date.now() > end) throw new Error(`${what}: not within ${within / 1000} s`);
		await new Promise((resolve) => setTimeout(resolve, every));
	}
}

/** Waits until the picture has been painted at rest, in full quality. */
export async function atRest(page: Page): Promise<void> {
	await until("the picture comes to rest", () =>
		page.evaluate(() => {
			const conductor = window.stageProbe?.conductor;
			return conductor !== undefined && conductor.frames > 0 && conductor.still;
		}),
	);
}

/** Opens the app with its probe and waits for the first picture at rest. `query` begins with "&" or is empty. */
export async function openStage(
	browser: Browser,
	url: string,
	query = "",
	options: BrowserContextOptions = {},
	prepare?: (page: Page) => Promise<unknown>,
): Promise<OpenApp> {
	const app = await openApp(browser, `${url}?probe${query}`, options, prepare);
	await atRest(app.page);
	return app;
}

/** Resizes the window and waits for the picture of that size. */
export async function resize(page: Page, width: number, height: number): Promise<void> {
	await page.setViewportSize({ width, height });
	await until("the stage takes its new size", () =>
		page.evaluate(() => {
			const host = document.querySelector<HTMLElement>(".picture");
			const canvas = host?.querySelector("canvas");
			return host != null && canvas != null && Math.abs(canvas.width / canvas.height - host.clientWidth / host.clientHeight) < 0.02;
		}),
	);
	await atRest(page);
}

export const readStage = (page: Page): Promise<StageState> =>
	page.evaluate(() => {
		const probe = window.stageProbe;
		const picture = probe?.picture();
		const host = document.querySelector<HTMLElement>(".picture");
		if (!probe || !picture || !host) throw new Error("no picture on the stage");
		const { left, top, width, height } = host.getBoundingClientRect();
		const b = [...picture.camera.basis];
		return {
			painter: host.dataset.picture ?? "",
			time: probe.time(),
			frames: probe.conductor.frames,
			left,
			top,
			width,
			height,
			cueOrigin: [...(picture.parts.find((p) => p.drawable.name === "axis prograde")?.matrix.subarray(12, 15) ?? [])],
			instruments: picture.instruments.map((rect) => [...rect]),
			camera: {
				position: [...picture.camera.position],
				right: b.slice(0, 3) as unknown as readonly [number, number, number],
				up: b.slice(3, 6) as unknown as readonly [number, number, number],
				forward: b.slice(6, 9) as unknown as readonly [number, number, number],
				fovY: picture.camera.fovY,
			},
		};
	});

export async function chooseView(page: Page, view: "Eyepoint" | "External"): Promise<void> {
	await page.getByRole("radio", { name: view }).check({ force: true });
	await atRest(page);
}

/** Presses a key so many times with the stage focused. */
export async function press(page: Page, key: string, times = 1): Promise<void> {
	await page.locator(".picture").focus();
	for (let i = 0; i < times; i++) await page.keyboard.press(key);
	await atRest(page);
}

/** Whether the canvas on the stage has a context of its painter's kind that is not lost. */
export const contextAlive = (page: Page): Promise<boolean> =>
	page.evaluate(() => {
		const canvas = document.querySelector<HTMLCanvasElement>(".picture canvas");
		const webgl = document.querySelector<HTMLElement>(".picture")?.dataset.picture === "webgl";
		const context = webgl ? canvas?.getContext("webgl2") : canvas?.getContext("2d");
		return context != null && !context.isContextLost();
	});

/** Drags with the left button from the middle of the stage. */
export async function drag(page: Page, dx: number, dy: number): Promise<void> {
	const { left, top, width, height } = await readStage(page);
	const [x, y] = [left + width / 2, top + height / 2];
	await page.mouse.move(x, y);
	await page.mouse.down();
	await page.mouse.move(x + dx / 2, y + dy / 2);
	await page.mouse.move(x + dx, y + dy);
	await page.mouse.up();
	await atRest(page);
}

/** The canvas as it is composed into the page, one pixel a CSS px, without the labels. */
export async function shotOf(page: Page): Promise<PNG> {
	const show = (opacity: string) =>
		page.evaluate((value) => document.querySelector<HTMLElement>(".labels")?.style.setProperty("opacity", value), opacity);
	const { left, top, width, height } = await readStage(page);
	await show("0");
	const png = await page.screenshot({ clip: { x: left, y: top, width, height } });
	await show("1");
	return PNG.sync.read(png);
}

/** CSS px of a stage point and its distance along the view, by the equations of a pinhole camera. */
export function onScreen(
	{ camera, width, height }: StageState,
	p: ArrayLike<number>,
): { readonly x: number; readonly y: number; readonly depth: number } {
	const d = [0, 1, 2].map((k) => (p[k] as number) - (camera.position[k] as number)) as unknown as Vec;
	const depth = dot(d, camera.forward);
	const focal = height / 2 / Math.tan(camera.fovY / 2);
	return { x: width / 2 + (focal * dot(d, camera.right)) / depth, y: height / 2 - (focal * dot(d, camera.up)) / depth, depth };
}

/** Text as read: non-breaking spaces between numbers and units are spaces. */
export const plain = (text: string | null): string => (text ?? "").replaceAll("\u00a0", " ");

export const dot = (a: Vec, b: Vec): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const cross = (a: Vec, b: Vec): Vec => [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
