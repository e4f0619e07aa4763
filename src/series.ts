import { dropSeries } from "./activity/drop-series.ts";
import type { Series } from "./activity/result.ts";
import type { AssessedCase } from "./assess.ts";

/** The samples of a case against time; null where its kind is not built. Computed on request: they cost more than the summary. */
export const seriesOf = (c: AssessedCase): Series | null => (c.motion ? dropSeries(c.context, c.motion, c.context.canals) : null);
