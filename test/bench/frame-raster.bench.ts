import { readFileSync } from "node:fs";
import { join } from "node:path";
import { root } from "../../.ci/house.mjs";
import { createRaster, type RasterScene } from "../../src/raster/raster.ts";
import type { Drawable } from "../../src/shape/drawable.ts";
import { COLOUR } from "../../src/shape/palette.ts";
import { INSTANT, openSized, SIZE, stageFrame, withPages } from "../support/browser-bench.ts";
import { atRest, chooseView } from "../support/browser-stage.ts";
import { type Bench, type Measured, median } from "./bench.ts";
import { demoPicture, starsOf } from "./demo-picture.ts";

const pictures = 40;

const worse = (of: readonly { readonly view: string; readonly times: readonly number[]; readonly detail?: string }[]): Measured => ({
	value: Math.max(...of.map(({ times }) => median(times))),
	unit: "ms",
	detail: `${SIZE.width} × ${SIZE.height}, median of ${pictures}: ${of.map(({ view, times, detail }) => `${view} ${median(times).toFixed(1)} ms${detail ?? ""}`).join(", ")}`,
});

const inPage: Bench = {
	name: "frame: the demo by the raster in a page",
	goal: "≤ 50 ms",
	run: () =>
		withPages(async (browser, appUrl) => {
			const { page } = await openSized(browser, appUrl, "raster");
			const measured = [];
			for (const view of ["Eyepoint", "External"] as const) {
				await chooseView(page, view);
				await page.evaluate((t) => window.stageProbe?.setTime(t), INSTANT);
				await atRest(page);
				const times: number[] = [];
				for (let i = 0; i < pictures + 5; i++) times.push(await stageFrame(page));
				measured.push({ view, times: times.slice(5) });
			}
			return worse(measured);
		}, "none"),
};

const inNode: Bench = {
	name: "frame: the demo by the raster in Node",
	goal: "≤ 50 ms",
	run() {
		const stars = starsOf(readFileSync(join(root, "assets/star/catalogue.bin")));
		const picture = demoPicture();
		const raster = createRaster(SIZE.width, SIZE.height);
		const measured = (["eyepoint", "external"] as const).map((view) => {
			picture.update(INSTANT, view, picture.defaultLook(), SIZE.width, SIZE.height);
			const parts = picture.parts.filter((p) => p.visible !== false);
			const scene: RasterScene = {
				still: [stars, ...picture.stage.still],
				parts,
				skyRotation: picture.stage.skyRotation,
				pixelRatio: 1,
				background: COLOUR.sky,
			};
			const times: number[] = [];
			for (let i = 0; i < pictures + 5; i++) {
				const begin = performance.now();
				raster.render(scene, picture.camera);
				times.push(performance.now() - begin);
			}
			const count = (d: Drawable): number => (d.kind === "triangles" ? d.index.length / 3 : 0);
			const triangles = [...scene.still, ...parts.map((p) => p.drawable)].reduce((sum, d) => sum + count(d), 0);
			return { view, times: times.slice(5), detail: ` (${triangles} triangles)` };
		});
		return worse(measured);
	},
};
export default [inPage, inNode];
