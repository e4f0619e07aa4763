import { type KeyboardEvent, useId, useState } from "react";
import type { Quantity } from "../../src/layout/quantities.ts";
import { printExact, unitIn, unitNamed, withUnit } from "../../src/quantity/print-quantity.ts";
import { type QuantityFault, readQuantity } from "../../src/quantity/read-quantity.ts";
import { written } from "../../src/quantity/round.ts";
import { roundStep } from "../../src/quantity/round-step.ts";
import { convertUnit, type Unit, unitOf } from "../../src/quantity/units.ts";
import type { Problem } from "../store/core.ts";
import { useSession } from "../store/session.ts";

export interface NumberFieldProps {
	readonly label: string;
	/** In the file's unit, which is the range's. */
	readonly value: number;
	readonly range: Quantity;
	/** One arrow press, in the file's unit; in another unit it is the round step next to it. */
	readonly step: number;
	/** Takes a value in the file's unit; returns what forbids it. Values of arrow and Page keys come one after another until `rest`. */
	readonly commit: (value: number, running: boolean) => readonly Problem[];
	/** The keys are at rest: the field was left. */
	readonly rest?: () => void;
}

const STEPS: Readonly<Record<string, number>> = { ArrowUp: 1, ArrowDown: -1, PageUp: 10, PageDown: -10 };

/** A number with its unit: arrows one step, Page keys ten, any unit typed, Esc puts it back. A value that is refused stays in sight with its reason. */
export function NumberField({ label, value, range, step, commit, rest }: NumberFieldProps) {
	const system = useSession((s) => s.units);
	const [draft, setDraft] = useState<string | null>(null);
	const [fault, setFault] = useState<string | null>(null);
	const id = useId();
	const own = unitNamed(range.unit) ?? unitOf("1");
	const shown = unitIn(system, own);
	const toShown = (v: number): number => (shown === own ? v : Number(convertUnit(v, own, shown).toPrecision(5)));
	const print = (v: number): string => withUnit(printExact(toShown(v)), shown.symbol);

	const text = printExact(toShown(value));
	const [seen, setSeen] = useState(value);
	if (seen !== value) {
		setSeen(value);
		setDraft(null);
		setFault(null);
	}
	const take = (v: number, running: boolean): void => {
		const next = written(v);
		const reason = refusal(next, running);
		setFault(reason);
		setDraft(reason === null ? null : printExact(toShown(next)));
	};
	const refusal = (next: number, running: boolean): string | null => {
		if (!inRange(next, range)) return `${label}: ${print(next)} is outside ${rangeText(range, print)}.`;
		const problems = next === value ? [] : commit(next, running);
		return problems.length === 0 ? null : problems.map((p) => `${label}: ${p.path} would be ${p.value}, expected ${p.expected}.`).join(" ");
	};
	/** What stands in the field, in the file's unit; null where it cannot be read. */
	const read = (): number | null => {
		if (draft === null || draft.trim() === text) return value;
		const result = readQuantity(draft, shown);
		if (result.ok) return convertUnit(result.value, shown, own);
		setFault(`${label}: ${faultText(result.fault, shown)}`);
		return null;
	};
	const finish = (): void => {
		const v = read();
		if (v !== null) take(v, false);
	};
	const nudge = (steps: number): void => {
		const from = read();
		if (from === null) return;
		const one = shown === own ? step : roundStep(step * (own.factor / shown.factor));
		const next = convertUnit(Number((convertUnit(from, own, shown) + steps * one).toPrecision(12)), shown, own);
		take(Math.min(Math.max(next, range.min), range.max), true);
	};
	const onKeyDown = (e: KeyboardEvent<HTMLInputElement>): void => {
		if (e.ctrlKey || e.metaKey || e.altKey) return;
		const steps = STEPS[e.key];
		if (steps !== undefined) nudge(steps);
		else if (e.key === "Enter") finish();
		else if (e.key === "Escape") {
			setDraft(null);
			setFault(null);
		} else return;
		e.preventDefault();
	};
	return (
		<div className={fault ? "field refused" : "field"}>
			<label>
				<span className="name">{label}</span>
				<span className="entry">
					<input
						type="text"
						inputMode="decimal"
						autoComplete="off"
						spellCheck={false}
						role="spinbutton"
						aria-valuenow={toShown(value)}
						aria-valuemin={toShown(range.min)}
						aria-valuemax={toShown(range.max)}
						aria-valuetext={print(value)}
						aria-invalid={fault !== null}
						aria-describedby={fault ? id : undefined}
						value={draft ?? text}
						onChange={(e) => setDraft(e.target.value)}
						onFocus={(e) => e.target.select()}
						onBlur={() => {
							if (draft !== null) finish();
							rest?.();
						}}
						onKeyDown={onKeyDown}
					/>
					<span className="unit">{shown.symbol === "1" ? "" : shown.symbol}</span>
				</span>
			</label>
			{fault && (
				<p id={id} role="alert">
					{fault}
				</p>
			)}
		</div>
	);
}

const inRange = (v: number, q: Quantity): boolean => (q.above ? v > q.min : v >= q.min) && v <= q.max;

const rangeText = (q: Quantity, print: (v: number) => string): string => `${q.above ? "above " : ""}${print(q.min)} to ${print(q.max)}`;

function faultText(fault: QuantityFault, unit: Unit): string {
	switch (fault.kind) {
		case "empty":
			return "a number is missing.";
		case "not-a-number":
			return `“${fault.text}” is not a number.`;
		case "unknown-unit":
			return `“${fault.unit}” is no unit of ${unit.dimension}; known are ${fault.known.join(", ")}.`;
		case "unclear":
			return `“${fault.text}” can be read in more than one way. Use a decimal point, and units from large to small.`;
	}
}
