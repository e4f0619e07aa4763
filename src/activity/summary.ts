import { written } from "../quantity/round.ts";
import type { FormulaId } from "./formula.ts";
import type { CaseSummary, Derivation, DerivationInput, SummaryValue } from "./result.ts";

/** Collects the summary of a case: every number rounded as written, every null with its reason. */
export class SummaryWriter {
	private readonly summary: Record<string, SummaryValue> = {};
	private readonly reasons: Record<string, string> = {};
	private readonly derivations: Record<string, Derivation> = {};

	/** A number (or null with a reason) and how it came about. */
	number(key: string, value: number | null, reason: string, derivation: Derivation): void {
		if (value === null) {
			this.none(key, reason);
			return;
		}
		this.summary[key] = written(value);
		this.derivations[key] = derivation;
	}
	word(key: string, value: string, derivation: Derivation): void {
		this.summary[key] = value;
		this.derivations[key] = derivation;
	}
	list(key: string, value: readonly string[], derivation: Derivation): void {
		this.summary[key] = value;
		this.derivations[key] = derivation;
	}
	/** The derivation of a number that is shown but not part of the summary. */
	beside(key: string, derivation: Derivation): void {
		this.derivations[key] = derivation;
	}
	none(key: string, reason: string): void {
		this.summary[key] = null;
		this.reasons[key] = reason;
	}
	done(): CaseSummary {
		return { summary: this.summary, reasons: this.reasons, derivations: this.derivations };
	}
}

export const derive = (formula: FormulaId, inputs: readonly DerivationInput[], assumptions: readonly string[] = []): Derivation => ({
	formula,
	inputs: inputs.map((i) => (typeof i.value === "number" ? { ...i, value: written(i.value) } : i)),
	assumptions,
});
export const put = (symbol: string, name: string, value: number | string, unit: string): DerivationInput => ({ symbol, name, value, unit });

/** The summary of a kind that has no mechanics yet: its keys, all null. */
export function notBuilt(keys: readonly string[]): CaseSummary {
	const writer = new SummaryWriter();
	for (const key of keys) writer.none(key, "not built");
	return writer.done();
}
