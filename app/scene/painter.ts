import type { Stars } from "../../src/shape/drawable.ts";
import type { DropPicture } from "../../src/shape/drop-picture.ts";

/** Draws the picture as it now stands into its canvas. Two exist: WebGL through r3f, and the CPU raster. */
export interface Painter {
	readonly kind: "webgl" | "raster";
	/** The graphics system has taken the canvas away; it may give it back. */
	readonly lost: boolean;
	/** Shows this picture under these stars from now on. */
	show(picture: DropPicture, stars: Stars): void;
	/** Paints at `width` × `height` CSS px and `scale` device px a CSS px; `still` asks for the best quality. Returns whether anything was drawn. */
	paint(width: number, height: number, scale: number, still: boolean): boolean;
	dispose(): void;
}
