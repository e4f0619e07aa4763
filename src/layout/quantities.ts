/** What a number of the layout file measures: its unit as written there and the range it may have. */
export interface Quantity {
	/** The unit as printed; empty for a pure number. */
	readonly unit: string;
	readonly min: number;
	readonly max: number;
	/** The minimum itself is refused. */
	readonly above?: boolean;
}

/**
 * The ranges of the layout file, in its own units. Where a size or mass is divided by or stepped over, its least value
 * is small rather than zero, so that nothing downstream overflows or never ends.
 */
export const QUANTITY = {
	rate: { unit: "rpm", min: 0, max: 60 },
	radius: { unit: "m", min: 0.5, max: 10_000 },
	ladderRadius: { unit: "m", min: 0, max: 10_000, above: true },
	/** Any angle, heading or right ascension; equal modulo 360°. A hundred turns keep 12 digits of the angle. */
	angle: { unit: "deg", min: -36_000, max: 36_000 },
	/** A declination or an elevation. */
	latitude: { unit: "deg", min: -90, max: 90 },
	/** How far a head turns; the sign is the direction. */
	turn: { unit: "deg", min: -360, max: 360 },
	axial: { unit: "m", min: -10_000, max: 10_000 },
	size: { unit: "m", min: 0, max: 100 },
	/** Of an opening, a ladder, a bay: what is not there at size zero. */
	extent: { unit: "m", min: 0.01, max: 100 },
	distance: { unit: "m", min: 0, max: 100_000 },
	turnRadius: { unit: "m", min: 0.01, max: 10_000 },
	mass: { unit: "kg", min: 1e-6, max: 1e6 },
	load: { unit: "kg", min: 0, max: 1e6 },
	dragCoefficient: { unit: "", min: 0, max: 10 },
	speed: { unit: "m/s", min: 0, max: 50 },
	climbSpeed: { unit: "m/s", min: 0, max: 50, above: true },
	acceleration: { unit: "m/s²", min: 0, max: 1_000 },
	duration: { unit: "s", min: 0.01, max: 86_400 },
	time: { unit: "s", min: 0, max: 8_640_000 },
	pressure: { unit: "kPa", min: 0, max: 200 },
	temperature: { unit: "°C", min: -50, max: 60 },
	fraction: { unit: "", min: 0, max: 1 },
	frequency: { unit: "per day", min: 0, max: 86_400 },
	threshold: { unit: "deg/s", min: 0, max: 1_000, above: true },
	canalTau: { unit: "s", min: 0.1, max: 1_000 },
	canalTauShort: { unit: "s", min: 0.0001, max: 0.05 },
	adaptationTau: { unit: "s", min: 1, max: 10_000 },
	bodyFraction: { unit: "", min: 0.1, max: 1 },
	standoff: { unit: "m", min: 0, max: 2 },
	/** A limit in whatever unit its row states. */
	limit: { unit: "", min: -1e12, max: 1e12 },
} as const satisfies Record<string, Quantity>;

/** "a number from 0 to 60 rpm". */
export function rangeWords(q: Quantity): string {
	const unit = q.unit === "" ? "" : ` ${q.unit}`;
	return q.above ? `a number above ${q.min} and at most ${q.max}${unit}` : `a number from ${q.min} to ${q.max}${unit}`;
}
