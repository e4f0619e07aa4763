import { Color } from "three";
import { PALETTE } from "../../src/shape/palette.ts";

/** The palette in linear light, 3 a colour, in index order: what vertex colours are made of. */
export const PALETTE_LINEAR: Float32Array = Float32Array.from(Object.values(PALETTE).flatMap((hex) => new Color(hex).toArray()));

/** Vertex colours of colour indices, each repeated `times`. */
export function linearColours(indices: Uint8Array, times = 1): Float32Array {
	const out = new Float32Array(indices.length * times * 3);
	for (let i = 0; i < indices.length; i++)
		for (let k = 0; k < times; k++)
			for (let c = 0; c < 3; c++) out[(i * times + k) * 3 + c] = PALETTE_LINEAR[3 * (indices[i] as number) + c] as number;
	return out;
}
