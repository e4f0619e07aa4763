import { byMargin } from "../../src/criteria/order.ts";
import type { Finding } from "./core.ts";

export { byMargin };

export const findingKey = (f: Finding): string => [f.criterion, f.subject, f.crew ?? "", f.phase].join("|");

const FORCE = { shall: 0, should: 1, information: 2 } as const;
const RESULT = { outside: 0, within: 1, "not-assessed": 2 } as const;

const margin = (f: Finding): number => f.margin ?? Number.POSITIVE_INFINITY;

/** What matters most first: outside before the rest, then shall, should, information, then least margin. */
const byWeight = (a: Finding, b: Finding): number =>
	RESULT[a.result] - RESULT[b.result] || FORCE[a.force] - FORCE[b.force] || compare(margin(a), margin(b));

const compare = (a: number, b: number): number => (a < b ? -1 : a > b ? 1 : 0);

/** The finding that matters most of those given, or null where none is assessed. An unverified limit never leads while a verified one is assessed. */
export function weightiest(findings: readonly Finding[]): Finding | null {
	const assessed = findings.filter((f) => f.result !== "not-assessed");
	const verified = assessed.filter((f) => f.basis !== "unverified");
	return [...(verified.length > 0 ? verified : assessed)].sort(byWeight)[0] ?? null;
}

export interface Tally {
	readonly outside: number;
	readonly within: number;
	readonly notAssessed: number;
	/** Left out of the three counts. */
	readonly unverified: number;
}

export function tally(findings: readonly Finding[]): Tally {
	const counted = findings.filter((f) => f.basis !== "unverified");
	const of = (result: Finding["result"]): number => counted.filter((f) => f.result === result).length;
	return { outside: of("outside"), within: of("within"), notAssessed: of("not-assessed"), unverified: findings.length - counted.length };
}

export interface FindingGroup {
	readonly force: Finding["force"];
	readonly findings: readonly Finding[];
	readonly tally: Tally;
}

/** Shall, should and information apart, each outside first and then by margin; empty groups left out. */
export function grouped(findings: readonly Finding[]): FindingGroup[] {
	return (["shall", "should", "information"] as const)
		.map((force) => findings.filter((f) => f.force === force).sort(byMargin))
		.flatMap((own) => (own[0] ? [{ force: own[0].force, findings: own, tally: tally(own) }] : []));
}
