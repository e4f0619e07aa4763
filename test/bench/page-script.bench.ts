import { gzipSync } from "node:zlib";
import { launch, openApp, serveApp } from "../support/browser.ts";
import { openSized, playOn, stop, withPages } from "../support/browser-bench.ts";
import { chooseView, until } from "../support/browser-stage.ts";
import { type Bench, median } from "./bench.ts";

const frames = 150;

/** All callbacks of a frame together, less the painting. */
const perFrame: Bench = {
	name: "page: own script of a frame while it plays",
	goal: "≤ 2 ms",
	run: () =>
		withPages(async (browser, appUrl) => {
			const { page } = await openSized(browser, appUrl, "raster");
			const found: string[] = [];
			let worst = 0;
			for (const view of ["Eyepoint", "External"] as const) {
				await chooseView(page, view);
				await playOn(page);
				const times = await page.evaluate(async (count) => {
					const conductor = window.stageProbe?.conductor as unknown as { frame: (now: number) => void; paintTime: number; wake(): void };
					const own: number[] = [];
					const frame = conductor.frame;
					conductor.frame = (now) => {
						const begin = performance.now();
						frame(now);
						own.push(performance.now() - begin - conductor.paintTime);
					};
					while (own.length < count) await new Promise((resolve) => setTimeout(resolve, 100));
					conductor.frame = frame;
					return own;
				}, frames);
				await stop(page);
				worst = Math.max(worst, median(times));
				found.push(`${view} ${median(times).toFixed(2)} ms, most ${Math.max(...times).toFixed(1)} ms`);
			}
			return { value: worst, unit: "ms", detail: `clock, panels, picture and labels, median of ${frames} frames: ${found.join("; ")}` };
		}, "none"),
};

/** What was sent of script until the first picture stood, packed as a server would. */
async function packed(painter: "webgl" | "raster"): Promise<{ bytes: number; files: number }> {
	const server = await serveApp();
	const browser = await launch();
	const bodies: Promise<Buffer>[] = [];
	const { page } = await openApp(browser, "about:blank");
	page.on("response", (response) => {
		if (response.url().endsWith(".js")) bodies.push(response.body());
	});
	await page.goto(`${server.url}?probe&picture=${painter}`);
	await until("the first picture", () => page.evaluate(() => (window.stageProbe?.conductor.frames ?? 0) > 0));
	const files = await Promise.all(bodies);
	await browser.close();
	await server.close();
	return { bytes: files.reduce((sum, body) => sum + gzipSync(body).length, 0), files: files.length };
}

const size: Bench = {
	name: "page: script before the first picture, gzip",
	goal: "≤ 400 kB",
	async run() {
		const webgl = await packed("webgl");
		const raster = await packed("raster");
		return {
			value: webgl.bytes / 1000,
			unit: "kB",
			detail: `by WebGL ${webgl.files} files; by the raster ${(raster.bytes / 1000).toFixed(0)} kB in ${raster.files} files`,
		};
	},
};
export default [perFrame, size];
