import { join } from "node:path";
import type { Browser, BrowserContextOptions, Page } from "playwright-core";
import { build } from "vite";
import { cache, root } from "../../.ci/house.mjs";
import { serve } from "../../.ci/serve.mjs";
import type { Bare } from "../bench/bare/main.ts";
import { launch, type OpenApp, openApp, serveApp } from "./browser.ts";
import { atRest, openStage, readStage, resize, until } from "./browser-stage.ts";

declare global {
	interface Window {
		bare?: Bare;
	}
}

export const SIZE = { width: 1280, height: 720 } as const;
/** An instant with everything in flight that is drawn in flight, s. */
export const INSTANT = 0.6;

/** A browser with the app and the bare page served to it; closed after the work. */
export async function withPages<T>(
	work: (browser: Browser, app: string, bare: string) => Promise<T>,
	webgl: "software" | "none" = "software",
): Promise<T> {
	const outDir = join(cache, "bare");
	await build({
		configFile: false,
		root: join(root, "test/bench/bare"),
		base: "./",
		logLevel: "warn",
		build: { outDir, emptyOutDir: true, target: "es2023", chunkSizeWarningLimit: 1000 },
	});
	const [app, bare] = await Promise.all([serveApp(), serve(outDir)]);
	const browser = await launch({ webgl });
	try {
		return await work(browser, app.url, bare.url);
	} finally {
		await browser.close();
		await Promise.all([app.close(), bare.close()]);
	}
}

/** The app with the caution already accepted. */
export const openCautioned = (
	browser: Browser,
	url: string,
	painter: "webgl" | "raster",
	options: BrowserContextOptions = {},
): Promise<OpenApp> =>
	openStage(browser, url, `&picture=${painter}`, options, (page) =>
		page.addInitScript(() => localStorage.setItem("offplumb", JSON.stringify({ cautionAccepted: true }))),
	);

/** The same with its canvas at `SIZE`. */
export async function openSized(browser: Browser, url: string, painter: "webgl" | "raster"): Promise<OpenApp> {
	const app = await openCautioned(browser, url, painter);
	const { width, height } = await readStage(app.page);
	await resize(app.page, 1440 + SIZE.width - width, 900 + SIZE.height - height);
	const now = await readStage(app.page);
	if (now.width !== SIZE.width || now.height !== SIZE.height) throw new Error(`the stage is ${now.width} × ${now.height}`);
	return app;
}

export async function openBare(browser: Browser, url: string, view: "eyepoint" | "external"): Promise<Page> {
	const { page } = await openApp(browser, `${url}?width=${SIZE.width}&height=${SIZE.height}&time=${INSTANT}&view=${view}`);
	await until("the bare page is ready", () => page.evaluate(() => window.bare !== undefined));
	return page;
}

export const bareFrame = (page: Page): Promise<number> => page.evaluate(() => window.bare?.frame() ?? Number.NaN);

/** Paints one picture at full size as while it moves, and waits until it is drawn, ms. */
export const stageFrame = (page: Page): Promise<number> =>
	page.evaluate(() => {
		const conductor = window.stageProbe?.conductor;
		const gl = document.querySelector<HTMLCanvasElement>('.picture[data-picture="webgl"] canvas')?.getContext("webgl2");
		const begin = performance.now();
		if (!conductor?.step(1, false)) throw new Error("nothing was painted");
		gl?.readPixels(0, 0, 1, 1, gl.RGBA, gl.UNSIGNED_BYTE, new Uint8Array(4));
		return performance.now() - begin;
	});

/** Plays between two instants at a speed, over and over: before it leaves, the clock goes back. About `INSTANT` at 1/8 unless told. */
export async function playOn(page: Page, speed = 0.125, from = INSTANT - 0.05, to = INSTANT + 0.05): Promise<void> {
	await page.getByRole("combobox", { name: "Speed of playback" }).selectOption(String(speed));
	await page.evaluate(
		([start = 0, end = 0]) => {
			const probe = window.stageProbe;
			if (!probe) throw new Error("no probe");
			probe.setTime(start);
			document.querySelector<HTMLButtonElement>("button[aria-label=Play]")?.click();
			const back = (): void => {
				// At full size: how far the resolution would be lowered is not what is measured.
				(probe.conductor as unknown as { level: number }).level = 0;
				if (probe.time() > end) probe.setTime(start);
				if (document.querySelector("button[aria-label=Pause]")) requestAnimationFrame(back);
			};
			requestAnimationFrame(back);
		},
		[from, to],
	);
	await until("it plays", () => page.evaluate(() => document.querySelector("button[aria-label=Pause]") !== null));
}

export async function stop(page: Page): Promise<void> {
	await page.evaluate(() => document.querySelector<HTMLButtonElement>("button[aria-label=Pause]")?.click());
	await atRest(page);
}

/** Times between frames while it plays, ms. */
export const frameTimes = (page: Page, frames: number): Promise<number[]> =>
	page.evaluate(async (count) => {
		const times: number[] = [];
		let last = 0;
		while (times.length < count) {
			const now = await new Promise<number>((resolve) => requestAnimationFrame(resolve));
			if (last > 0) times.push(now - last);
			last = now;
		}
		return times;
	}, frames);
