/** What a unit measures. A parsed number must be of the dimension its field expects. */
export type Dimension =
	| "length"
	| "angle"
	| "rotation"
	| "angular-acceleration"
	| "time"
	| "speed"
	| "acceleration"
	| "mass"
	| "force"
	| "energy"
	| "pressure"
	| "temperature"
	| "frequency"
	| "ratio";

export interface Unit {
	/** As printed, and the key of the table. */
	readonly symbol: string;
	readonly dimension: Dimension;
	/** SI value = number × factor + offset. */
	readonly factor: number;
	readonly offset: number;
	/** Other spellings accepted from a person, compared without case unless the symbol itself matches exactly. */
	readonly spellings: readonly string[];
}

const unit = (symbol: string, dimension: Dimension, factor: number, spellings: readonly string[] = [], offset = 0): Unit => ({
	symbol,
	dimension,
	factor,
	offset,
	spellings,
});

const FOOT = 0.3048;
const POUND = 0.453_592_37;
const GRAVITY = 9.806_65;
const DEGREE = Math.PI / 180;

/**
 * Factors to SI. All are exact but for π: NIST SP 811 (2008) Appendix B.8, with the foot, pound, standard
 * gravity, atmosphere and mile of its §B.6 and the derived units multiplied out here rather than copied rounded.
 */
const TABLE: readonly Unit[] = [
	unit("m", "length", 1, ["metre", "metres", "meter", "meters"]),
	unit("cm", "length", 0.01, ["centimetre", "centimetres", "centimeter", "centimeters"]),
	unit("mm", "length", 0.001, ["millimetre", "millimetres", "millimeter", "millimeters"]),
	unit("km", "length", 1000, ["kilometre", "kilometres", "kilometer", "kilometers"]),
	unit("ft", "length", FOOT, ["foot", "feet", "'", "′", "’"]),
	unit("in", "length", FOOT / 12, ["inch", "inches", '"', "″", "”"]),
	unit("yd", "length", FOOT * 3, ["yard", "yards"]),
	unit("mi", "length", FOOT * 5280, ["mile", "miles"]),
	unit("rad", "angle", 1, ["radian", "radians"]),
	unit("°", "angle", DEGREE, ["deg", "degree", "degrees"]),
	unit("′", "angle", DEGREE / 60, ["'", "’", "arcmin"]),
	unit("″", "angle", DEGREE / 3600, ['"', "”", "arcsec"]),
	unit("rev", "angle", 360 * DEGREE, ["turn", "turns", "revolution", "revolutions"]),
	unit("rad/s", "rotation", 1, ["radps"]),
	unit("rpm", "rotation", (360 * DEGREE) / 60, ["rev/min", "r/min"]),
	unit("°/s", "rotation", DEGREE, ["deg/s", "degps"]),
	unit("rad/s²", "angular-acceleration", 1, ["rad/s2", "rad/s^2", "radps2"]),
	unit("°/s²", "angular-acceleration", DEGREE, ["deg/s2", "deg/s^2", "degps2"]),
	unit("s", "time", 1, ["sec", "second", "seconds"]),
	unit("ms", "time", 0.001, ["millisecond", "milliseconds"]),
	unit("min", "time", 60, ["minute", "minutes"]),
	unit("h", "time", 3600, ["hour", "hours", "hr"]),
	unit("m/s", "speed", 1, ["mps"]),
	unit("km/h", "speed", 1 / 3.6, ["kph", "kmh"]),
	unit("ft/s", "speed", FOOT, ["fps"]),
	unit("mph", "speed", (FOOT * 5280) / 3600, ["mi/h"]),
	unit("kn", "speed", 1852 / 3600, ["kt", "knot", "knots"]),
	unit("m/s²", "acceleration", 1, ["m/s2", "m/s^2", "mps2"]),
	unit("g", "acceleration", GRAVITY, ["gee", "g0"]),
	unit("ft/s²", "acceleration", FOOT, ["ft/s2", "ft/s^2"]),
	unit("kg", "mass", 1, ["kilogram", "kilograms"]),
	unit("g", "mass", 0.001, ["gram", "grams"]),
	unit("lb", "mass", POUND, ["lbs", "lbm", "pound", "pounds"]),
	unit("oz", "mass", POUND / 16, ["ounce", "ounces"]),
	unit("N", "force", 1, ["newton", "newtons"]),
	unit("kN", "force", 1000, []),
	unit("lbf", "force", POUND * GRAVITY, []),
	unit("J", "energy", 1, ["joule", "joules"]),
	unit("ft·lbf", "energy", FOOT * POUND * GRAVITY, ["ft lbf", "ft.lbf", "ftlbf", "ft-lbf", "ft·lb", "ft lb"]),
	unit("Pa", "pressure", 1, ["pascal", "pascals"]),
	unit("kPa", "pressure", 1000, []),
	unit("bar", "pressure", 100_000, []),
	unit("mbar", "pressure", 100, ["millibar", "hPa"]),
	unit("atm", "pressure", 101_325, ["atmosphere", "atmospheres"]),
	unit("psi", "pressure", (POUND * GRAVITY) / (FOOT / 12) ** 2, ["psia", "lbf/in²", "lbf/in2"]),
	unit("K", "temperature", 1, ["kelvin"]),
	unit("°C", "temperature", 1, ["C", "degC", "celsius"], 273.15),
	unit("°F", "temperature", 5 / 9, ["F", "degF", "fahrenheit"], 459.67 * (5 / 9)),
	unit("Hz", "frequency", 1, ["hertz", "1/s", "/s"]),
	unit("1", "ratio", 1),
	unit("%", "ratio", 0.01, ["percent"]),
];

/** The table, for tests and for lists on screen. */
export const UNITS = TABLE;

/**
 * The longest unit of the dimension that `text` begins with, symbol or spelling, and how many characters it
 * took. Case decides only where it must: exact first, then without case for names of two letters or more.
 */
export function leadingUnit(dimension: Dimension, text: string): { readonly unit: Unit; readonly length: number } | undefined {
	let best: { unit: Unit; length: number; exact: boolean } | undefined;
	for (const unit of TABLE) {
		if (unit.dimension !== dimension) continue;
		for (const name of [unit.symbol, ...unit.spellings]) {
			const head = text.slice(0, name.length);
			const exact = head === name;
			if (name === "" || !(exact || (name.length > 1 && head.toLowerCase() === name.toLowerCase()))) continue;
			if (/^\p{L}/u.test(text.slice(name.length)) && /\p{L}$/u.test(name)) continue;
			if (!best || name.length > best.length || (name.length === best.length && exact && !best.exact))
				best = { unit, length: name.length, exact };
		}
	}
	return best;
}

/** The unit by its printed symbol; "g" is standard gravity unless the dimension says mass. Throws RangeError on a symbol not in the table. */
export function unitOf(symbol: string, dimension?: Dimension): Unit {
	const found = TABLE.find((u) => u.symbol === symbol && (dimension === undefined || u.dimension === dimension));
	if (!found) throw new RangeError(`no unit "${symbol}"${dimension ? ` of ${dimension}` : ""} in the table`);
	return found;
}

export const toSi = (value: number, from: Unit): number => value * from.factor + from.offset;
export const fromSi = (value: number, to: Unit): number => (value - to.offset) / to.factor;

/** A value in another unit of the same dimension; the same number back where the units are the same. Throws RangeError otherwise. */
export function convertUnit(value: number, from: Unit, to: Unit): number {
	if (from.dimension !== to.dimension) throw new RangeError(`${from.symbol} (${from.dimension}) is not a unit of ${to.dimension}`);
	return from === to ? value : fromSi(toSi(value, from), to);
}
