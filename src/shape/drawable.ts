/**
 * What can be drawn: a triangle list, wide lines, or stars. Nothing else exists, so that WebGL, the
 * CPU raster and paper draw the same picture. All positions are stage coordinates in metres
 * (see stage-frame.ts: x prograde, y up, z axial at the station), colours index PALETTE.
 */

export interface Triangles {
	readonly kind: "triangles";
	readonly name: string;
	/** 3 a vertex. */
	readonly position: Float32Array;
	/** Unit, 3 a vertex. */
	readonly normal: Float32Array;
	/** ColourIndex, 1 a vertex; a triangle takes the colour of its first. */
	readonly colour: Uint8Array;
	/** 3 a triangle, counter-clockwise seen from the front. */
	readonly index: Uint32Array;
	/** Which faces are drawn: a bulkhead seen from outside is not, an ink hull is drawn from behind only. */
	readonly side: "front" | "back" | "both";
	/** Lit by the one stage light, or drawn in its plain colour. */
	readonly lit: boolean;
	/** Below 1 drawn after all opaque ones, in list order, without writing depth. */
	readonly opacity: number;
	/** Painted on a surface: drawn over it at equal depth. */
	readonly decal: boolean;
	/** Drawn last, over everything, in list order with lines that are "over". */
	readonly over?: boolean;
}

export interface WideLines {
	readonly kind: "lines";
	readonly name: string;
	/** 6 a segment: both ends. */
	readonly position: Float32Array;
	/** ColourIndex, 1 a segment. */
	readonly colour: Uint8Array;
	/** CSS px. */
	readonly width: number;
	/** Lengths of stroke and gap along each segment run, in the drawable's own coordinates before any part's matrix; null is solid. */
	readonly dash: readonly [number, number] | null;
	/** Hidden by what lies before it, or drawn over everything. */
	readonly depth: "tested" | "over";
	readonly opacity: number;
}

export interface Stars {
	readonly kind: "stars";
	readonly name: string;
	/** Unit ICRS directions, 3 a star; turned into the stage by the sky's rotation at time t. */
	readonly direction: Float32Array;
	/** Diameter, CSS px, 1 a star. */
	readonly size: Float32Array;
	/** Linear-light RGB 0…1 already dimmed by magnitude, 3 a star. */
	readonly light: Float32Array;
}

export type Drawable = Triangles | WideLines | Stars;

/** A drawable with a place of its own that changes with time; what is not readonly is mutated in place, every frame. */
export interface Part {
	readonly drawable: Triangles | WideLines;
	/** Column-major 4 × 4, drawable to stage. */
	readonly matrix: Float32Array;
	/** How many of its triangles or segments are drawn, from the first; absent is all. */
	count?: number;
	/** Absent is visible. */
	visible?: boolean;
}
