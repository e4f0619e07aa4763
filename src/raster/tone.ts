import { LIGHT } from "../shape/light.ts";
import { type ColourIndex, PALETTE_BYTES } from "../shape/palette.ts";

/** IEC 61966-2-1: encoded 0…1 from linear 0…1, and back. */
const encode = (linear: number): number => (linear <= 0.0031308 ? 12.92 * linear : 1.055 * linear ** (1 / 2.4) - 0.055);
const decode = (encoded: number): number => (encoded <= 0.04045 ? encoded / 12.92 : ((encoded + 0.055) / 1.055) ** 2.4);

/** Steps of a colour's ramp, and how many of them make the factor 1. */
export const RAMP = 1024;
export const UNITY = 800;
if (((Math.max(LIGHT.sky, LIGHT.ground) + LIGHT.lamp) / Math.PI) * UNITY + 1 > RAMP)
	throw new RangeError(`the stage light ${LIGHT.sky}, ${LIGHT.ground}, ${LIGHT.lamp} is brighter than a ramp of ${RAMP} steps holds`);

/** The ramp step of a factor on the linear albedo, half a step up so that cutting it off rounds it. */
export const level = (factor: number): number => factor * UNITY + 0.5;

export const SHADES = 4096;

export interface Tones {
	/** Pixel words, RAMP a colour: the colour under each factor. */
	readonly words: Uint32Array;
	/** The same memory, 4 bytes a word. */
	readonly bytes: Uint8ClampedArray;
	/** Linear light of each byte. */
	readonly linear: Float32Array;
	/** Byte of linear light in SHADES − 1 steps. */
	readonly byte: Uint8ClampedArray;
}

export function createTones(): Tones {
	const linear = Float32Array.from({ length: 256 }, (_, i) => decode(i / 255));
	const colours = PALETTE_BYTES.length / 3;
	const bytes = new Uint8ClampedArray(4 * RAMP * colours);
	for (let c = 0, at = 0; c < colours; c++)
		for (let step = 0; step < RAMP; step++, at += 4) {
			for (let k = 0; k < 3; k++) bytes[at + k] = 255 * encode(Math.min(1, (decode(PALETTE_BYTES[3 * c + k]! / 255) * step) / UNITY));
			bytes[at + 3] = 255;
		}
	return {
		words: new Uint32Array(bytes.buffer),
		bytes,
		linear,
		byte: Uint8ClampedArray.from({ length: SHADES }, (_, i) => 255 * encode(i / (SHADES - 1))),
	};
}

/** Place in `words` of a colour in its plain tone. */
export const plain = (colour: ColourIndex): number => colour * RAMP + UNITY;
