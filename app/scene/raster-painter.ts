import { createRaster, type Raster, type RasterScene } from "../../src/raster/raster.ts";
import type { Drawable, Part } from "../../src/shape/drawable.ts";
import type { DropPicture } from "../../src/shape/drop-picture.ts";
import { COLOUR } from "../../src/shape/palette.ts";
import type { Painter } from "./painter.ts";

/** The picture without WebGL. Throws where the canvas gives no 2D context. */
export function createRasterPainter(canvas: HTMLCanvasElement): Painter {
	const context = canvas.getContext("2d", { alpha: false });
	if (!context) throw new Error("this canvas gives no 2D context");
	let raster: Raster | null = null;
	let image: ImageData | null = null;
	let picture: DropPicture | null = null;
	let scene: (RasterScene & { readonly still: Drawable[]; readonly parts: Part[] }) | null = null;
	return {
		kind: "raster",
		lost: false,
		show(next, stars) {
			if (next === picture && scene?.still[0] === stars) return;
			picture = next;
			scene = {
				still: [stars],
				parts: [],
				skyRotation: next.stage.skyRotation,
				pixelRatio: 1,
				background: COLOUR.sky,
			};
		},
		paint(width, height, scale, still) {
			if (!picture || !scene || width < 1 || height < 1) return false;
			const w = Math.max(1, Math.round(width * scale));
			const h = Math.max(1, Math.round(height * scale));
			if (!raster) raster = createRaster(w, h);
			if (!image || image.width !== w || image.height !== h) {
				raster.resize(w, h);
				canvas.width = w;
				canvas.height = h;
				image = new ImageData(raster.pixels, w, h);
			}
			scene.pixelRatio = w / width;
			scene.still.length = 1;
			const { still: fixed } = picture.stage;
			for (let i = 0; i < fixed.length; i++) if (picture.seen[i] === 1) scene.still.push(fixed[i] as Drawable);
			scene.parts.length = 0;
			for (const p of picture.parts) if (p.visible !== false) scene.parts.push(p);
			raster.render(scene, picture.camera, still ? 2 : 1);
			context.putImageData(image, 0, 0);
			return true;
		},
		dispose() {
			raster = null;
			image = null;
			picture = null;
			scene = null;
		},
	};
}
