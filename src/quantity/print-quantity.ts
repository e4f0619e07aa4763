import { convertUnit, UNITS, type Unit, unitOf } from "./units.ts";

const MINUS = "−";
/** No-break space: number and unit stay on one line. */
const SPACE = "\u00A0";
/** Narrow no-break space between groups of three digits (NIST SP 811 §10.5.3), from five digits on. */
const GROUP = "\u202F";
const SUPERSCRIPT = "⁰¹²³⁴⁵⁶⁷⁸⁹";

/**
 * A number to `figures` significant figures, trailing zeros kept, a true minus sign, powers of ten only
 * outside 0.001 … 10⁶. Throws RangeError on a value that is not finite.
 */
export function printNumber(value: number, figures = 3): string {
	if (!Number.isFinite(value)) throw new RangeError(`a printed number must be finite, got ${value}`);
	if (value === 0) return "0";
	const [mantissa, exponent] = Math.abs(value)
		.toExponential(figures - 1)
		.split("e") as [string, string];
	const power = Number(exponent);
	const sign = value < 0 ? MINUS : "";
	if (power < -3 || power >= 6) return `${sign}${mantissa}${SPACE}×${SPACE}10${power < 0 ? "⁻" : ""}${superscript(Math.abs(power))}`;
	return sign + grouped(Number(`${mantissa}e${exponent}`).toFixed(Math.max(0, figures - 1 - power)));
}

/** A number as it stands in the file, shortest form, with a true minus sign: for fields, where rounding would change the document. */
export const printExact = (value: number): string => String(value === 0 ? 0 : value).replaceAll("-", MINUS);

/** NIST SP 811 §7.2: a space before every unit but °, ′ and ″; nothing after a pure number. */
export function withUnit(number: string, symbol: string): string {
	if (symbol === "" || symbol === "1") return number;
	return /^[°′″]$/.test(symbol) ? number + symbol : number + SPACE + symbol;
}

/** A value of `from` printed in `to`. */
export const printQuantity = (value: number, from: Unit, to: Unit = from, figures = 3): string =>
	withUnit(printNumber(convertUnit(value, from, to), figures), to.symbol);

export type UnitSystem = "si" | "us";

const CUSTOMARY: Readonly<Record<string, string>> = {
	m: "ft",
	kg: "lb",
	"m/s": "ft/s",
	"m/s²": "ft/s²",
	J: "ft·lbf",
	N: "lbf",
	kPa: "psi",
	"°C": "°F",
};

/** The unit a system prints a quantity of `unit` in; those without a customary counterpart stay. */
export const unitIn = (system: UnitSystem, unit: Unit): Unit => {
	const other = system === "us" ? CUSTOMARY[unit.symbol] : undefined;
	return other === undefined ? unit : unitOf(other, unit.dimension);
};

/** File and criterion spellings of a unit ("deg", "mps", "degps", "") and the table's symbol. */
const FILE_UNITS: Readonly<Record<string, string>> = {
	deg: "°",
	mps: "m/s",
	mps2: "m/s²",
	"m/s2": "m/s²",
	degps: "°/s",
	"deg/s": "°/s",
	radps2: "rad/s²",
	"rad/s2": "rad/s²",
	C: "°C",
	"": "1",
};

/** The unit a file, key or criterion names, or undefined where it is not in the table (a unit of its own such as "steps"). */
export const unitNamed = (name: string): Unit | undefined => UNITS.find((u) => u.symbol === (FILE_UNITS[name] ?? name));

function grouped(fixed: string): string {
	const [whole, fraction] = fixed.split(".") as [string, string?];
	const spaced = whole.length > 4 ? whole.replace(/\B(?=(\d{3})+$)/g, GROUP) : whole;
	return fraction === undefined ? spaced : `${spaced}.${fraction}`;
}

const superscript = (n: number): string => [...String(n)].map((d) => SUPERSCRIPT[Number(d)]).join("");
