import type { Finding } from "./row.ts";

const RANK = { outside: 0, within: 1, "not-assessed": 2 } as const;

/** Outside first, then least margin; what is not assessed comes last. */
export const byMargin = (a: Finding, b: Finding): number => RANK[a.result] - RANK[b.result] || (a.margin ?? 0) - (b.margin ?? 0);

/** The findings by `byMargin`; ties keep their order. */
export const orderFindings = (findings: readonly Finding[]): Finding[] => [...findings].sort(byMargin);
