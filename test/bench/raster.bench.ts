import { createRaster } from "../../src/raster/raster.ts";
import { aim, createCamera } from "../../src/shape/camera.ts";
import { sampleBay } from "../raster/scene.ts";
import { type Bench, median } from "./bench.ts";

const pictures = 60;

/** A bay with figure, lines and stars as the crew member sees it, the eye moving a little from picture to picture. */
const bench: Bench = {
	name: "raster: a picture of 1280 × 720",
	goal: "≤ 50 ms",
	run() {
		const raster = createRaster(1280, 720);
		const bay = sampleBay();
		const camera = createCamera((75 * Math.PI) / 180);
		const times: number[] = [];
		for (let k = 0; k < pictures + 10; k++) {
			camera.position.set([-0.7 + 0.004 * k, 1.75, 0]);
			aim(camera, 1, -0.8, -0.2, 0, 1, 0);
			const begin = performance.now();
			raster.render(bay, camera);
			times.push(performance.now() - begin);
		}
		let triangles = 0;
		let segments = 0;
		for (const d of [...bay.still, ...bay.parts.map((p) => p.drawable)]) {
			if (d.kind === "triangles") triangles += d.index.length / 3;
			if (d.kind === "lines") segments += d.colour.length;
		}
		const warm = times.slice(10);
		return {
			value: median(warm),
			unit: "ms",
			detail: `median of ${pictures}, least ${Math.min(...warm).toFixed(1)} ms, first ${times[0]?.toFixed(0)} ms; ${triangles} triangles, ${segments} line segments, 5000 stars`,
		};
	},
};
export default bench;
