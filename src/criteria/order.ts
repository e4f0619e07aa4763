import type { Finding } from "./row.ts";

const RANK = { outside: 0, within: 1, "not-assessed": 2 } as const;

/** Outside first, then least margin; what is not assessed comes last. Ties keep their order. */
export const orderFindings = (findings: readonly Finding[]): Finding[] =>
	[...findings].sort((a, b) => RANK[a.result] - RANK[b.result] || (a.margin ?? 0) - (b.margin ?? 0));
