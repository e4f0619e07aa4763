import { frameTimes, openBare, openSized, playOn, SIZE, stop, withPages } from "../support/browser-bench.ts";
import { chooseView } from "../support/browser-stage.ts";
import { type Bench, median } from "./bench.ts";

const blocks = 10;
const frames = 8;

/** From frame to frame while the app plays with everything on its page, against the bare page in its own loop; in turns of some frames. */
const bench: Bench = {
	name: "frame: the whole page playing, software WebGL, against a bare three.js page",
	goal: "≤ 1.6 ×",
	run: () =>
		withPages(async (browser, appUrl, bareUrl) => {
			const { page } = await openSized(browser, appUrl, "webgl");
			let ratio = 0;
			const details: string[] = [];
			for (const view of ["Eyepoint", "External"] as const) {
				await chooseView(page, view);
				const bare = await openBare(browser, bareUrl, view === "Eyepoint" ? "eyepoint" : "external");
				const ratios: number[] = [];
				const ours: number[] = [];
				const theirs: number[] = [];
				for (let i = 0; i < blocks; i++) {
					await bare.bringToFront();
					const block = (await bare.evaluate((n) => window.bare?.loop(n), frames)) as number[];
					await page.bringToFront();
					await playOn(page);
					const own = (await frameTimes(page, frames + 3)).slice(3);
					await stop(page);
					ratios.push(median(own) / median(block));
					ours.push(...own);
					theirs.push(...block);
				}
				ratio = Math.max(ratio, median(ratios));
				details.push(`${view} ${median(ratios).toFixed(2)} × (${median(ours).toFixed(0)} ms against ${median(theirs).toFixed(0)} ms)`);
				await bare.context().close();
			}
			return {
				ratio,
				detail: `canvas ${SIZE.width} × ${SIZE.height} at full resolution, ${blocks} blocks of ${frames} frames: ${details.join("; ")}`,
			};
		}),
};
export default bench;
