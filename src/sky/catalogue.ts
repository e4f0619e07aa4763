import { radFromDeg } from "../quantity/convert.ts";
import { type IcrsVec, icrs } from "../vector/vec3.ts";
import { directionFromRaDec } from "./direction.ts";

/**
 * The packed star catalogue. Little-endian: "STR1", the count as u32, then 9 bytes a star in rising
 * HIP order:
 *   u8   HIP number less that of the star before (of the first: less 0)
 *   u32  right ascension in 1e-4° (22 bits, high) · V magnitude + 2 in 0.01 (10 bits)
 *   u32  declination + 90° in 2e-4° (20 bits, high) · B−V + 0.5 in 0.001 (12 bits; all ones: the source gives none)
 * Position good to 1e-4°, V and B−V exact as the source prints them.
 */
export const PACKED = {
	magic: "STR1",
	headerBytes: 8,
	starBytes: 9,
	rightAscensionStep: 1e-4,
	rightAscensionSteps: 3_600_000,
	declinationStep: 2e-4,
	declinationSteps: 900_000,
	magnitudeStep: 0.01,
	magnitudeFrom: -2,
	colourStep: 0.001,
	colourFrom: -0.5,
	noColour: 0xfff,
} as const;

/** B−V drawn where the source gives none: white, that of an A0 star. */
export const ASSUMED_B_MINUS_V = 0;

export interface Catalogue {
	readonly count: number;
	/** Hipparcos number, rising. */
	readonly hip: Uint32Array;
	/** Unit ICRS directions, J2000, 3 a star. */
	readonly direction: Float32Array;
	/** Johnson V. */
	readonly magnitude: Float32Array;
	/** Johnson B−V; `ASSUMED_B_MINUS_V` at the indices of `assumedColour`. */
	readonly bMinusV: Float32Array;
	/** Indices of stars whose B−V the source does not give. */
	readonly assumedColour: readonly number[];
}

/** Throws RangeError, in a sentence, on bytes that are not a whole packed catalogue. */
export function decodeCatalogue(bytes: Uint8Array): Catalogue {
	const p = PACKED;
	if (bytes.length < p.headerBytes)
		throw new RangeError(`a packed star catalogue has at least ${p.headerBytes} bytes, these are ${bytes.length}`);
	const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
	const magic = String.fromCharCode(...bytes.subarray(0, 4));
	if (magic !== p.magic)
		throw new RangeError(`a packed star catalogue begins with ${JSON.stringify(p.magic)}, this one with ${JSON.stringify(magic)}`);
	const count = view.getUint32(4, true);
	const expected = p.headerBytes + count * p.starBytes;
	if (bytes.length !== expected)
		throw new RangeError(`a packed catalogue of ${count} stars has ${expected} bytes, this one has ${bytes.length}`);
	const hip = new Uint32Array(count);
	const direction = new Float32Array(3 * count);
	const magnitude = new Float32Array(count);
	const bMinusV = new Float32Array(count);
	const assumedColour: number[] = [];
	let number = 0;
	for (let i = 0, at = p.headerBytes; i < count; i++, at += p.starBytes) {
		const step = view.getUint8(at);
		const first = view.getUint32(at + 1, true);
		const second = view.getUint32(at + 5, true);
		const ra = first >>> 10;
		const dec = second >>> 12;
		const colour = second & 0xfff;
		if (step === 0) throw new RangeError(`star ${i} of the packed catalogue repeats HIP ${number}`);
		if (ra >= p.rightAscensionSteps || dec > p.declinationSteps)
			throw new RangeError(`star ${i} of the packed catalogue stands outside the sky: right ascension step ${ra}, declination step ${dec}`);
		number += step;
		hip[i] = number;
		direction.set(directionFromRaDec(radFromDeg(ra * p.rightAscensionStep), radFromDeg(dec * p.declinationStep - 90)), 3 * i);
		magnitude[i] = (first & 0x3ff) * p.magnitudeStep + p.magnitudeFrom;
		if (colour === p.noColour) assumedColour.push(i);
		bMinusV[i] = colour === p.noColour ? ASSUMED_B_MINUS_V : colour * p.colourStep + p.colourFrom;
	}
	return { count, hip, direction, magnitude, bMinusV, assumedColour };
}

/** Index of a Hipparcos number, or −1. */
export function indexOfHip(catalogue: Catalogue, hip: number): number {
	let lo = 0;
	let hi = catalogue.count - 1;
	while (lo <= hi) {
		const mid = (lo + hi) >> 1;
		const found = catalogue.hip[mid] as number;
		if (found === hip) return mid;
		if (found < hip) lo = mid + 1;
		else hi = mid - 1;
	}
	return -1;
}

export const starDirection = (catalogue: Catalogue, index: number): IcrsVec =>
	icrs(
		catalogue.direction[3 * index] as number,
		catalogue.direction[3 * index + 1] as number,
		catalogue.direction[3 * index + 2] as number,
	);
