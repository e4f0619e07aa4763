import type { Camera } from "../shape/camera.ts";
import type { Drawable, Part, Triangles, WideLines } from "../shape/drawable.ts";
import type { ColourIndex } from "../shape/palette.ts";
import { type Buffers, createBuffers, halve } from "./buffers.ts";
import type { DepthUse, Paint } from "./fill.ts";
import { createLineScratch, drawLines } from "./lines.ts";
import { type Prepared, prepare } from "./prepare.ts";
import { drawStars } from "./stars.ts";
import { createTones, plain } from "./tone.ts";
import { drawTriangles } from "./triangles.ts";
import { createVertexScratch } from "./vertices.ts";
import { createView, placePart, setView } from "./view.ts";

/** A picture. The centre of pixel (i, j) lies at (i + 0.5, j + 0.5) px, as `project` counts them. */
export interface RasterTarget {
	readonly width: number;
	readonly height: number;
	/** RGBA, sRGB, row by row from the top: what ImageData takes. */
	readonly pixels: Uint8ClampedArray<ArrayBuffer>;
	/** 1 / (distance along the view), 1/m; 0 where nothing stands. */
	readonly depth: Float32Array<ArrayBuffer>;
}

export interface RasterScene {
	/** Positions may change in place between pictures; everything else of a drawable is read once. */
	readonly still: readonly Drawable[];
	/** What is not readonly of them is read for every picture. */
	readonly parts: readonly Part[];
	/** ICRS → stage, 9 numbers, row by row. */
	readonly skyRotation: Float64Array;
	/** Device px a CSS px: scales line widths and stars, not the picture. */
	pixelRatio: number;
	readonly background: ColourIndex;
}

export interface Raster extends RasterTarget {
	/**
	 * Draws the scene: opaque triangles, stars behind them, rims smoothed, opaque decals, solid lines, then
	 * all that is translucent in list order (`still` before `parts`), then what is over everything.
	 * Quality 2 draws at twice the size and halves. Colours are blended as encoded, light of stars as
	 * linear. Allocates nothing once it has seen the scene. The camera's `far` is not used. Throws
	 * RangeError, naming it, on a drawable that cannot be drawn.
	 */
	render(scene: RasterScene, camera: Camera, quality?: 1 | 2): void;
	resize(width: number, height: number): void;
}

/** Depth by which a decal is drawn over its surface: of its distance, and pixels along its slope. */
const DECAL = { relative: 2e-4, slope: 1 } as const;

type Pass = "opaque" | "rim" | "decal" | "solid" | "translucent" | "over";

const belongs = (d: Triangles | WideLines, pass: Pass): boolean => {
	if (d.kind === "lines" ? d.depth === "over" : d.over === true) return pass === "over";
	if (d.opacity < 1) return pass === "translucent";
	if (d.kind === "lines") return pass === "solid";
	return d.decal ? pass === "decal" : pass === "opaque" || pass === "rim";
};

const DEPTH_USE: Readonly<Record<Pass, DepthUse>> = {
	opaque: "write",
	rim: "write",
	decal: "test",
	solid: "test",
	translucent: "test",
	over: "ignore",
};

const AFTER_STARS: readonly Pass[] = ["rim", "decal", "solid", "translucent", "over"];

export function createRaster(width: number, height: number): Raster {
	let plainBuffers = createBuffers(width, height);
	let fineBuffers: Buffers | null = null;
	const tones = createTones();
	const view = createView();
	const vertices = createVertexScratch();
	const ink = createLineScratch();
	const paint: Paint = { tones, base: 0, depth: "write", opacity: 1, relative: 0, slope: 0 };
	const known = new WeakMap<Drawable, Prepared>();

	const preparedOf = (drawable: Drawable): Prepared => {
		let p = known.get(drawable);
		if (!p) {
			p = prepare(drawable);
			known.set(drawable, p);
		}
		return p;
	};

	const draw = (buffers: Buffers, drawable: Triangles | WideLines, part: Part | null, pixelRatio: number, pass: Pass): void => {
		const prepared = preparedOf(drawable);
		if (part) placePart(view, part.matrix, drawable.name);
		if (drawable.kind === "lines") {
			drawLines(buffers, view, drawable, part, pixelRatio, ink, tones);
			return;
		}
		paint.depth = DEPTH_USE[pass];
		paint.opacity = drawable.opacity;
		paint.relative = drawable.decal ? DECAL.relative : 0;
		paint.slope = drawable.decal ? DECAL.slope : 0;
		const what = pass === "opaque" ? "fill" : pass === "rim" ? "rim" : "both";
		drawTriangles(buffers, view, drawable, prepared, part, vertices, paint, what);
	};

	const drawPass = (buffers: Buffers, scene: RasterScene, pixelRatio: number, pass: Pass): void => {
		for (const d of scene.still) if (d.kind !== "stars" && belongs(d, pass)) draw(buffers, d, null, pixelRatio, pass);
		for (const p of scene.parts) if (p.visible !== false && belongs(p.drawable, pass)) draw(buffers, p.drawable, p, pixelRatio, pass);
	};

	return {
		get width() {
			return plainBuffers.width;
		},
		get height() {
			return plainBuffers.height;
		},
		get pixels() {
			return plainBuffers.pixels;
		},
		get depth() {
			return plainBuffers.depth;
		},
		render(scene, camera, quality = 1) {
			if (quality === 2) fineBuffers ??= createBuffers(2 * plainBuffers.width, 2 * plainBuffers.height);
			const buffers = quality === 2 && fineBuffers ? fineBuffers : plainBuffers;
			const ratio = scene.pixelRatio * quality;
			if (!(ratio > 0 && Number.isFinite(ratio))) throw new RangeError(`a pixel ratio is above 0, got ${scene.pixelRatio}`);
			for (let i = 0; i < 9; i++)
				if (!Number.isFinite(scene.skyRotation[i])) throw new RangeError(`skyRotation[${i}] is ${scene.skyRotation[i]}`);
			setView(view, camera, buffers.width, buffers.height);
			buffers.words.fill(tones.words[plain(scene.background)]!);
			buffers.depth.fill(0);
			drawPass(buffers, scene, ratio, "opaque");
			for (const d of scene.still)
				if (d.kind === "stars") {
					preparedOf(d);
					drawStars(buffers, view, d, scene.skyRotation, ratio, tones);
				}
			for (const pass of AFTER_STARS) drawPass(buffers, scene, ratio, pass);
			if (buffers !== plainBuffers) halve(buffers, plainBuffers);
		},
		resize(w, h) {
			if (w === plainBuffers.width && h === plainBuffers.height) return;
			plainBuffers = createBuffers(w, h);
			fineBuffers = null;
		},
	};
}
