import type { Page } from "playwright-core";
import { openCautioned, playOn, withPages } from "../support/browser-bench.ts";
import { until } from "../support/browser-stage.ts";
import type { Bench } from "./bench.ts";

const seconds = 60;
const step = 6;
/** Played before, so that the engine has compiled what it will. */
const warm = 600;

/** Bytes on the heap of a page after a collection. */
async function heapOf(page: Page): Promise<() => Promise<number>> {
	const session = await page.context().newCDPSession(page);
	await session.send("HeapProfiler.enable");
	return async () => {
		for (let i = 0; i < 3; i++) await session.send("HeapProfiler.collectGarbage");
		return (await session.send("Runtime.getHeapUsage")).usedSize;
	};
}

/** Slope by least squares, a minute. */
function slope(points: readonly (readonly [number, number])[]): number {
	const n = points.length;
	const mt = points.reduce((sum, [t]) => sum + t, 0) / n;
	const mv = points.reduce((sum, [, v]) => sum + v, 0) / n;
	return (60 * points.reduce((sum, [t, v]) => sum + (t - mt) * (v - mv), 0)) / points.reduce((sum, [t]) => sum + (t - mt) ** 2, 0);
}

const bench: Bench = {
	name: "page: growth of the heap over a minute of play",
	goal: "≤ 100 kB",
	run: () =>
		withPages(async (browser, appUrl) => {
			const measured = [];
			for (const painter of ["webgl", "raster"] as const) {
				const { page, close } = await openCautioned(browser, appUrl, painter, { viewport: { width: 480, height: 640 } });
				const frames = () => page.evaluate(() => window.stageProbe?.conductor.frames ?? 0);
				await playOn(page, 1, 0, 0.7);
				await until("it is warm", async () => (await frames()) > warm, { within: 180_000 });
				const heap = await heapOf(page);
				const before = await frames();
				const begin = Date.now();
				const points: [number, number][] = [];
				while ((points.at(-1)?.[0] ?? 0) < seconds) {
					points.push([(Date.now() - begin) / 1000, await heap()]);
					await page.waitForTimeout(step * 1000);
				}
				const all = points.map(([, bytes]) => bytes / 1e6);
				measured.push({
					kB: slope(points) / 1000,
					text: `${painter} ${(slope(points) / 1000).toFixed(0)} kB (${Math.min(...all).toFixed(2)} to ${Math.max(...all).toFixed(2)} MB, ${(await frames()) - before} frames)`,
				});
				await close();
			}
			return {
				value: Math.max(...measured.map((m) => m.kB)),
				unit: "kB",
				detail: `slope of what is left after collections: ${measured.map((m) => m.text).join("; ")}`,
			};
		}),
};
export default bench;
