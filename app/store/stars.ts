import { create } from "zustand";
import type { Stars } from "../../src/shape/drawable.ts";
import { decodeCatalogue } from "../../src/sky/catalogue.ts";
import { catalogueLight } from "../../src/sky/light.ts";

const none: Stars = {
	kind: "stars",
	name: "no stars",
	direction: new Float32Array(0),
	size: new Float32Array(0),
	light: new Float32Array(0),
};

/** The star catalogue as a drawable; none until it has been read. */
export const useStars = create<{ readonly stars: Stars }>()(() => ({ stars: none }));

/** Takes the packed catalogue. Throws RangeError on bytes that are none. */
export function takeStars(bytes: Uint8Array): void {
	const catalogue = decodeCatalogue(bytes);
	useStars.setState({ stars: { kind: "stars", name: "stars", direction: catalogue.direction, ...catalogueLight(catalogue) } });
}
