import { frameTimes, openBare, openSized, playOn, SIZE, stop, withPages } from "../support/browser-bench.ts";
import { chooseView } from "../support/browser-stage.ts";
import { type Bench, undisturbed } from "./bench.ts";

const blocks = 10;
const frames = 8;
/** Left out of each block: what the other page has still drawn falls into them. */
const settle = 3;

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
				const ours: number[] = [];
				const theirs: number[] = [];
				for (let i = 0; i < blocks; i++) {
					await bare.bringToFront();
					const block = (await bare.evaluate((n) => window.bare?.loop(n), frames + settle)) as number[];
					await page.bringToFront();
					await playOn(page);
					ours.push(...(await frameTimes(page, frames + settle)).slice(settle));
					await stop(page);
					theirs.push(...block.slice(settle));
				}
				const one = undisturbed(ours) / undisturbed(theirs);
				ratio = Math.max(ratio, one);
				details.push(`${view} ${one.toFixed(2)} × (${undisturbed(ours).toFixed(0)} ms against ${undisturbed(theirs).toFixed(0)} ms)`);
				await bare.context().close();
			}
			return {
				ratio,
				detail: `canvas ${SIZE.width} × ${SIZE.height} at full resolution, lower quartile of ${blocks} blocks of ${frames} frames: ${details.join("; ")}`,
			};
		}),
};
export default bench;
