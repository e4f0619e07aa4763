import { TAU } from "../quantity/constants.ts";
import { type IcrsVec, icrs } from "../vector/vec3.ts";

/** Unit ICRS vector of a right ascension and declination, rad. */
export function directionFromRaDec(rightAscension: number, declination: number): IcrsVec {
	const c = Math.cos(declination);
	return icrs(c * Math.cos(rightAscension), c * Math.sin(rightAscension), Math.sin(declination));
}

export interface RaDec {
	/** rad, 0 ≤ α < 2π; null within 1e-9 rad of a pole, where there is none. */
	readonly rightAscension: number | null;
	/** rad, −π/2…π/2. */
	readonly declination: number;
}

/** Of a vector of any length; throws RangeError on a zero vector or one that is not finite. */
export function raDecFromDirection(v: IcrsVec): RaDec {
	const l = Math.hypot(v[0], v[1], v[2]);
	if (!(l > 0 && Number.isFinite(l))) throw new RangeError(`a vector (${v.join(", ")}) has no direction in the sky`);
	const equatorial = Math.hypot(v[0], v[1]);
	const declination = Math.atan2(v[2], equatorial);
	if (equatorial / l < 1e-9) return { rightAscension: null, declination };
	const angle = Math.atan2(v[1], v[0]);
	const turned = angle < 0 ? angle + TAU : angle;
	return { rightAscension: turned < TAU ? turned : 0, declination };
}
