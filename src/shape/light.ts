/**
 * The one light of the stage: a hemisphere and a weak lamp, Lambert. WebGL and raster read the same
 * numbers. Directions in stage coordinates.
 */
export const LIGHT = {
	/** Irradiance from above and below, in three's units (radiance = albedo × irradiance / π). */
	sky: 2.9,
	ground: 2.15,
	lamp: 0.55,
	/** Unit, towards the lamp. */
	lampDirection: [-0.43, 0.8, 0.42] as const,
} as const;

const l = Math.hypot(...LIGHT.lampDirection);

/** Factor on the linear albedo for a unit normal. */
export function lambert(nx: number, ny: number, nz: number): number {
	const hemisphere = LIGHT.ground + (LIGHT.sky - LIGHT.ground) * (0.5 + 0.5 * ny);
	const lamp = LIGHT.lampDirection;
	const facing = (nx * lamp[0] + ny * lamp[1] + nz * lamp[2]) / l;
	return (hemisphere + LIGHT.lamp * Math.max(0, facing)) / Math.PI;
}
