import { dropSeries } from "./activity/drop-series.ts";
import type { Series } from "./activity/result.ts";
import type { AssessedCase } from "./assess.ts";

/** The samples of a case against time; null where its kind is not built. Computed on request: they cost more than the summary. */
export const seriesOf = (c: AssessedCase): Series | null => (c.motion ? dropSeries(c.context, c.motion) : null);

const NO_WEIGHT = "null where there is no weight: a tilt has then no direction";
const NULLS: Readonly<Record<string, string>> = {
	tilt_prograde_deg: NO_WEIGHT,
	tilt_axial_deg: NO_WEIGHT,
	head_tilt_deg: NO_WEIGHT,
	stars_degps: "null where no window is in view: there are no stars to see",
};

/** Why samples are null, by the key of a series that holds some. */
export function reasonsOfSeries(series: Series): Record<string, string> {
	const holed = Object.entries(series).filter(([, samples]) => samples.some((sample) => sample === null));
	return Object.fromEntries(
		holed.map(([key]) => {
			const reason = NULLS[key];
			if (reason === undefined) throw new RangeError(`a sample of ${key} is null and no reason is known`);
			return [key, reason];
		}),
	);
}
