import { bareFrame, INSTANT, openBare, openSized, SIZE, stageFrame, withPages } from "../support/browser-bench.ts";
import { atRest, chooseView } from "../support/browser-stage.ts";
import { type Bench, undisturbed } from "./bench.ts";

const pairs = 25;

/** Both pages draw the same instant from the same camera, in turns, each frame waited for. */
const bench: Bench = {
	name: "frame: canvas by software WebGL against a bare three.js page",
	goal: "≤ 1.3 ×",
	run: () =>
		withPages(async (browser, appUrl, bareUrl) => {
			const { page } = await openSized(browser, appUrl, "webgl");
			let ratio = 0;
			const details: string[] = [];
			for (const view of ["Eyepoint", "External"] as const) {
				await chooseView(page, view);
				await page.evaluate((t) => window.stageProbe?.setTime(t), INSTANT);
				await atRest(page);
				const bare = await openBare(browser, bareUrl, view === "Eyepoint" ? "eyepoint" : "external");
				const ours: number[] = [];
				const theirs: number[] = [];
				for (let i = 0; i < pairs + 3; i++) {
					theirs.push(await bareFrame(bare));
					ours.push(await stageFrame(page));
				}
				const one = undisturbed(ours.slice(3)) / undisturbed(theirs.slice(3));
				ratio = Math.max(ratio, one);
				const counts = await bare.evaluate(() => window.bare?.counts);
				details.push(
					`${view} ${one.toFixed(2)} × (${undisturbed(ours).toFixed(0)} ms against ${undisturbed(theirs).toFixed(0)} ms; ${counts?.triangles} triangles, ${counts?.segments} segments, ${counts?.stars} stars in ${counts?.objects} objects)`,
				);
				await bare.context().close();
			}
			return { ratio, detail: `${SIZE.width} × ${SIZE.height}, lower quartile of ${pairs} pairs: ${details.join("; ")}` };
		}),
};
export default bench;
