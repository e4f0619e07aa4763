/** Linear-light sRGB (IEC 61966-2-1 primaries, D65 white), largest part 1. */
export type LinearRgb = readonly [number, number, number];

/**
 * Effective temperature, K, of a B−V colour index: Ballesteros 2012, EPL 97, 34008, a black body seen
 * through the B and V bands. Gives 3169 K at B−V 2.0, where tables say some 2000 K. Throws RangeError
 * at B−V ≤ −0.6, near the formula's pole.
 */
export function temperatureFromBMinusV(bMinusV: number): number {
	if (!(bMinusV > -0.6 && Number.isFinite(bMinusV))) throw new RangeError(`B−V of ${bMinusV} is not a star's`);
	return 4600 * (1 / (0.92 * bMinusV + 1.7) + 1 / (0.92 * bMinusV + 0.62));
}

/** Second radiation constant hc/k, nm K (exact SI: 0.01438776877… m K). */
const SECOND_RADIATION = 1.438776877e7;

/** A lobe of width `left` below its centre, `right` above, nm. */
const lobe = (wavelength: number, centre: number, left: number, right: number): number =>
	Math.exp(-0.5 * ((wavelength - centre) / (wavelength < centre ? left : right)) ** 2);

/**
 * CIE 1931 2° colour matching functions at a wavelength in nm, by the multi-lobe fit of Wyman, Sloan &
 * Shirley 2013, J. Computer Graphics Techniques 2(2):1–11.
 */
export const colourMatching = (wavelength: number): readonly [number, number, number] => [
	1.056 * lobe(wavelength, 599.8, 37.9, 31.0) + 0.362 * lobe(wavelength, 442.0, 16.0, 26.7) - 0.065 * lobe(wavelength, 501.1, 20.4, 26.2),
	0.821 * lobe(wavelength, 568.8, 46.9, 40.5) + 0.286 * lobe(wavelength, 530.9, 16.3, 31.1),
	1.217 * lobe(wavelength, 437.0, 11.8, 36.0) + 0.681 * lobe(wavelength, 459.0, 26.0, 13.8),
];

/** 370–790 nm: [λ, λ⁻⁵ x̄, λ⁻⁵ ȳ, λ⁻⁵ z̄] each 10 nm, λ in units of 560 nm under the power. */
const SAMPLES = new Float64Array(
	Array.from({ length: 43 }, (_, i) => 370 + 10 * i).flatMap((wavelength) => [
		wavelength,
		...colourMatching(wavelength).map((m) => m * (wavelength / 560) ** -5),
	]),
);

/** XYZ of a black body at `temperature` K, scaled to Y = 1: Planck's law λ⁻⁵ / (exp(hc/λkT) − 1) under the matching functions. */
export function blackBodyXyz(temperature: number): readonly [number, number, number] {
	let x = 0;
	let y = 0;
	let z = 0;
	for (let i = 0; i < SAMPLES.length; i += 4) {
		const radiance = 1 / (Math.exp(SECOND_RADIATION / ((SAMPLES[i] as number) * temperature)) - 1);
		x += radiance * (SAMPLES[i + 1] as number);
		y += radiance * (SAMPLES[i + 2] as number);
		z += radiance * (SAMPLES[i + 3] as number);
	}
	return [x / y, 1, z / y];
}

/** Parts outside the sRGB gamut (below some 1900 K) are cut at 0. */
export function blackBodyColour(temperature: number): LinearRgb {
	const [x, y, z] = blackBodyXyz(temperature);
	const r = Math.max(0, 3.2404542 * x - 1.5371385 * y - 0.4985314 * z);
	const g = Math.max(0, -0.969266 * x + 1.8760108 * y + 0.041556 * z);
	const b = Math.max(0, 0.0556434 * x - 0.2040259 * y + 1.0572252 * z);
	const most = Math.max(r, g, b);
	return [r / most, g / most, b / most];
}

export const starColour = (bMinusV: number): LinearRgb => blackBodyColour(temperatureFromBMinusV(bMinusV));
