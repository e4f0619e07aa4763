import type { Catalogue } from "./catalogue.ts";
import { type LinearRgb, starColour } from "./colour.ts";

export interface StarLight {
	/** Linear-light RGB 0…1, dimmed. */
	readonly light: LinearRgb;
	/** Diameter of the drawn dot, CSS px. */
	readonly size: number;
}

/** Where the mapping starts: the faintest magnitude of the catalogue, its dot (px) and its light. */
const FAINTEST = { magnitude: 6, size: 1.5, light: 0.42 } as const;
const LARGEST_SIZE = 7;

/**
 * How a star of V magnitude and B−V is drawn. A choice of drawing, not of photometry: a screen cannot
 * show the 1 : 1000 from V 6 to Sirius. Each magnitude widens the dot by 10^0.09 (1.5 px at V 6, 3.4 at
 * V 2, 7 at Sirius and never more) and brightens it by 10^0.1 until it is full at V 2.2, so that
 * area times light grows by 1.9 a magnitude, then 1.5, where the sky's own step is 2.512.
 */
export function starLight(magnitude: number, bMinusV: number, colour: LinearRgb = starColour(bMinusV)): StarLight {
	const steps = FAINTEST.magnitude - magnitude;
	const dim = Math.min(1, FAINTEST.light * 10 ** (0.1 * steps));
	return { light: [dim * colour[0], dim * colour[1], dim * colour[2]], size: Math.min(LARGEST_SIZE, FAINTEST.size * 10 ** (0.09 * steps)) };
}

/** `starLight` of a whole catalogue: light 3 a star, size 1 a star. A third of the stars have a B−V of their own. */
export function catalogueLight(catalogue: Catalogue): { readonly light: Float32Array; readonly size: Float32Array } {
	const light = new Float32Array(3 * catalogue.count);
	const size = new Float32Array(catalogue.count);
	const colours = new Map<number, LinearRgb>();
	for (let i = 0; i < catalogue.count; i++) {
		const bMinusV = catalogue.bMinusV[i] as number;
		let colour = colours.get(bMinusV);
		if (!colour) {
			colour = starColour(bMinusV);
			colours.set(bMinusV, colour);
		}
		const star = starLight(catalogue.magnitude[i] as number, bMinusV, colour);
		light.set(star.light, 3 * i);
		size[i] = star.size;
	}
	return { light, size };
}
