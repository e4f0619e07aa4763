import { PACKED } from "../../src/sky/catalogue.ts";

/** The source as d3-celestial ships it: GeoJSON points, degrees, right ascension −180…180, B−V a string. */
export interface StarCollection {
	readonly features: readonly {
		readonly id: number;
		readonly properties: { readonly mag: number; readonly bv: string };
		readonly geometry: { readonly coordinates: readonly [number, number] };
	}[];
}

export interface Packed {
	readonly bytes: Uint8Array;
	/** HIP numbers of stars whose B−V is empty in the source. */
	readonly withoutColour: readonly number[];
}

/** The nearest whole step; throws RangeError where the value does not fit. */
function steps(value: number, from: number, step: number, most: number, what: string): number {
	const n = Math.round((value - from) / step);
	if (!(n >= 0 && n <= most)) throw new RangeError(`${what} ${value} does not fit into the packed catalogue`);
	return n;
}

/** Packs as the docstring of src/sky/catalogue.ts says. Throws on a value that does not fit, a doubled HIP number or a gap above 255. */
export function packCatalogue(source: StarCollection): Packed {
	const p = PACKED;
	const stars = [...source.features].sort((a, b) => a.id - b.id);
	const bytes = new Uint8Array(p.headerBytes + stars.length * p.starBytes);
	const view = new DataView(bytes.buffer);
	for (let i = 0; i < 4; i++) bytes[i] = p.magic.charCodeAt(i);
	view.setUint32(4, stars.length, true);
	const withoutColour: number[] = [];
	let before = 0;
	for (const [i, star] of stars.entries()) {
		const at = p.headerBytes + i * p.starBytes;
		const name = `HIP ${star.id}:`;
		const [raw, declination] = star.geometry.coordinates;
		const gap = star.id - before;
		if (!(Number.isInteger(gap) && gap > 0 && gap < 256))
			throw new RangeError(`${name} a gap of ${gap} to HIP ${before} does not fit into a byte`);
		before = star.id;
		if (!(raw >= -180 && raw <= 180)) throw new RangeError(`${name} right ascension ${raw}° is not within ±180°`);
		const ra =
			steps(raw < 0 ? raw + 360 : raw, 0, p.rightAscensionStep, p.rightAscensionSteps, `${name} right ascension`) % p.rightAscensionSteps;
		const dec = steps(declination, -90, p.declinationStep, p.declinationSteps, `${name} declination`);
		const magnitude = steps(star.properties.mag, p.magnitudeFrom, p.magnitudeStep, 0x3ff, `${name} magnitude`);
		const empty = star.properties.bv.trim() === "";
		if (empty) withoutColour.push(star.id);
		const colour = empty ? p.noColour : steps(Number(star.properties.bv), p.colourFrom, p.colourStep, p.noColour - 1, `${name} B−V`);
		view.setUint8(at, gap);
		view.setUint32(at + 1, ((ra << 10) | magnitude) >>> 0, true);
		view.setUint32(at + 5, ((dec << 12) | colour) >>> 0, true);
	}
	return { bytes, withoutColour };
}
