import { useMemo } from "react";
import { printExact, printNumber, type UnitSystem, unitIn, unitNamed, withUnit } from "../../src/quantity/print-quantity.ts";
import { convertUnit } from "../../src/quantity/units.ts";
import { useSession } from "./session.ts";

export interface Printer {
	/** A value in a unit of the file, a criterion or a formula, in the system chosen; three significant figures unless said, counts whole. */
	(value: number, unit: string, figures?: number): string;
	/** The same, number and unit apart. */
	parts(value: number, unit: string, figures?: number): { readonly number: string; readonly unit: string };
	/** The value in the chosen system's unit. */
	shown(value: number, unit: string): number;
	/** The symbol the chosen system prints. */
	symbol(unit: string): string;
}

export function printer(system: UnitSystem): Printer {
	const shown = (value: number, name: string): number => {
		const unit = unitNamed(name);
		return unit ? convertUnit(value, unit, unitIn(system, unit)) : value;
	};
	const symbol = (name: string): string => {
		const unit = unitNamed(name);
		const printed = unit ? unitIn(system, unit).symbol : name;
		return printed === "1" ? "" : printed;
	};
	const parts: Printer["parts"] = (value, unit, figures) => ({
		number: unit === "" && Number.isInteger(value) ? printExact(value) : printNumber(shown(value, unit), figures),
		unit: symbol(unit),
	});
	const print = (value: number, unit: string, figures?: number): string => {
		const p = parts(value, unit, figures);
		return withUnit(p.number, p.unit);
	};
	return Object.assign(print, { parts, shown, symbol });
}

export function usePrinter(): Printer {
	const units = useSession((s) => s.units);
	return useMemo(() => printer(units), [units]);
}
