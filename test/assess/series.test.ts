import { describe, expect, test } from "vitest";
import { parseLayout } from "../../src/layout/parse.ts";
import { shipped, whole } from "../layout/support.ts";
import { type DropFile, deckFile, type LayoutParts } from "../support/layout-of.ts";
import { spinAt, type Throw } from "../truth/ring-equations.ts";
import { fromPath } from "./from-path.ts";
import { type DropSeries, documentOf, entryOf } from "./support.ts";

const G0 = 9.80665;
const DEG = 180 / Math.PI;
/** Air of the test layouts, kg/m³: p M / (R_u T). */
const AIR = (70_300 * (0.265 * 0.0319988 + 0.735 * 0.0280134)) / (8.314462618 * 294.15);

/** Single numbers that are never null. */
const SIZES = "t_s level_g lateral_mps2 eyes_degps ear_degps illusion_degps disagree_degps radius_m angle_deg axial_m".split(" ");
const TILTS = ["tilt_prograde_deg", "tilt_axial_deg", "head_tilt_deg"] as const;
const VECTORS = ["c_mps2", "k_mps2", "e_mps2", "a_mps2"] as const;

const flat = deckFile({ floor: "flat", radius_m: 24, from_deg: 40, to_deg: 80, from_m: -4, to_m: 4 });
const ramp = [
	{ t_s: 0, rate_rpm: 3.6 },
	{ t_s: 5, rate_rpm: 2 },
];
const toss = { speed_mps: 3, heading_deg: 30, elevation_deg: 35 };
const pouch = { mass_kg: 0.2, diameter_m: 0.12, drag_coefficient: 1 };
const from = (height_m: number, angle_deg = 0): DropFile["from"] => ({ deck: "lower", angle_deg, axial_m: 0.4, height_m });
const feet = (angle_deg: number): NonNullable<DropFile["feet"]> => ({ angle_deg, axial_m: 0.1, facing_deg: 0 });
/** Against the spin as fast as the spin carries it: at rest in the inertial frame, never struck. */
const hanging = { speed_mps: (3.6 * Math.PI * 32.5) / 30, heading_deg: 180, elevation_deg: 0 };
const well = { id: "well", kind: "hatch", deck: "upper", angle_deg: 0, axial_m: 0.4, shape: "circle", diameter_m: 1.2 } as const;

interface Flight {
	readonly parts: LayoutParts;
	readonly drop: Partial<DropFile>;
	/** Steps between the points differenced. */
	readonly stride?: number;
}
const FLIGHTS: Record<string, Flight> = {
	"let go above a curved floor": { parts: {}, drop: { from: from(1.5, 170), feet: feet(169.4) } },
	"tossed with drag": { parts: {}, drop: { from: from(1.4), release: toss, object: pouch, drag: true, feet: feet(-0.6) } },
	"tossed above a flat floor, off its middle": { parts: { decks: [flat] }, drop: { from: from(1.2, 66), release: toss, feet: feet(65) } },
	"a flat floor, drag and a changing spin": {
		parts: { decks: [flat], spin: { rate_rpm: 3.6, profile: ramp } },
		drop: { from: from(1.2, 55), release: toss, object: pouch, drag: true, start_s: 1.5, feet: feet(54) },
	},
	"a changing spin": { parts: { spin: { rate_rpm: 3.6, profile: ramp } }, drop: { from: from(1.5), start_s: 1, feet: feet(-0.7) } },
	"after the end of a profile": {
		parts: { spin: { rate_rpm: 1, profile: ramp } },
		drop: { from: from(1.5), start_s: 7, feet: feet(-0.7) },
	},
	"through a hatch": {
		parts: { decks: [deckFile(), deckFile({ id: "upper", radius_m: 31.2, headroom_m: 2.3 })], elements: [well] },
		drop: { from: { deck: "upper", angle_deg: 0.5, axial_m: 0.4, height_m: 1 }, feet: feet(-0.5) },
	},
	"tossed where nothing turns": { parts: { spin: { rate_rpm: 0 } }, drop: { from: from(1.4), release: toss, feet: feet(-0.7) } },
	"followed for 600 s and never struck": { parts: {}, drop: { from: from(1.5), release: hanging, feet: feet(0.7) }, stride: 1 },
};

const spinOf = ({ spin = { rate_rpm: 3.6 } }: LayoutParts): Throw["spin"] =>
	(spin.profile ?? [{ t_s: 0, rate_rpm: spin.rate_rpm }]).map((p) => ({ t: p.t_s, rpm: p.rate_rpm }));

/** Keys, lengths, steps and finiteness that the contract asks of every series. */
function sound(series: DropSeries, duration: number): void {
	expect(Object.keys(series).sort()).toEqual([...SIZES, ...TILTS, ...VECTORS, "stars_degps", "events"].sort());
	const step = Math.max(1 / 120, duration / 3999);
	const n = Math.floor(duration / step + 1e-6) + 1;
	expect(n).toBeLessThanOrEqual(4000);
	const odd: string[] = [];
	const each = (key: string, fits: (sample: unknown, i: number) => boolean): void => {
		const samples = series[key as keyof DropSeries] as readonly unknown[];
		if (samples.length !== n) odd.push(`${key} has ${samples.length} samples, not ${n}`);
		for (const [i, sample] of samples.entries()) if (!fits(sample, i)) odd.push(`${key}[${i}] is ${sample}`);
	};
	for (const key of SIZES) each(key, Number.isFinite);
	for (const key of TILTS) each(key, (sample, i) => (sample === null ? series.level_g[i] === 0 : Number.isFinite(sample)));
	each("stars_degps", (sample) => sample === null || (Number.isFinite(sample) && (sample as number) >= 0));
	for (const key of VECTORS) each(key, (sample) => Array.isArray(sample) && sample.length === 3 && sample.every(Number.isFinite));
	for (const key of ["level_g", "lateral_mps2", "eyes_degps", "ear_degps", "illusion_degps", "disagree_degps"] as const)
		if (series[key].some((size) => size < 0)) odd.push(`${key} is a size and goes below 0`);
	expect(odd).toEqual([]);
	near(
		series.t_s,
		series.t_s.map((_, i) => i * step),
		1e-8 * Math.max(1, duration),
		"time",
	);
}

function near(values: readonly number[], expected: readonly number[], tolerance: number, what: string): void {
	for (const [n, value] of values.entries())
		if (!(Math.abs(value - expected[n]!) <= tolerance)) throw new Error(`${what}: ${value}, expected ${expected[n]} (${n})`);
}

describe.each(Object.entries(FLIGHTS))("%s", (_, { parts, drop, stride = 6 }) => {
	const entry = entryOf(parts, drop);
	const { series, summary } = entry;
	const deck = (parts.decks ?? [deckFile()]).find((d) => d.id === drop.from?.deck) as ReturnType<typeof deckFile>;
	const spin = spinOf(parts);
	const start = drop.start_s ?? 0;
	const end = series.events.at(-1)?.t_s as number;

	test("keys, lengths, uniform step, finite numbers", () => sound(series, end));

	test("events in order, from the release to the end of the flight", () => {
		const times = series.events.map((e) => e.t_s);
		expect(times).toEqual([...times].sort((a, b) => a - b));
		expect(series.events[0]).toEqual({ t_s: 0, name: "release" });
		expect(end).toBe(summary.flight_time_s ?? 600);
		expect(series.events.filter((e) => e.name.startsWith("passes")).map((e) => e.name.slice(7))).toEqual(summary.passed);
	});

	const found = fromPath(series, deck, spin, start, stride);
	const sum = (i: number): number[] =>
		[0, 1, 2].map((n) => VECTORS.reduce((total, key) => total + (series[key][i] as readonly number[])[n]!, 0));

	test("C + K + E + A on the object is nothing without drag, else what the drag takes, turned about", () => {
		const k = drop.drag ? (AIR * pouch.drag_coefficient * Math.PI * pouch.diameter_m ** 2) / (8 * pouch.mass_kg) : 0;
		if (k === 0) expect(Math.max(...series.t_s.flatMap((_, i) => sum(i).map(Math.abs)))).toBeLessThan(1e-7);
		expect(found.length).toBeGreaterThan(30);
		for (const { at, velocity, inertial } of found) {
			const slowed = velocity.map((v) => k * Math.hypot(...velocity) * v);
			near(sum(at), slowed, 1e-5, `the sum at ${at}`);
			near(
				inertial.map((a) => -a),
				slowed,
				1e-3,
				`the inertial path at ${at}`,
			);
		}
	});

	test("each part is what the differenced path says", () => {
		for (const { at, ...path } of found) {
			near(series.c_mps2[at]!, path.centrifugal, 1e-7, `c at ${at}`);
			near(series.k_mps2[at]!, path.coriolis, 1e-5, `k at ${at}`);
			near(series.e_mps2[at]!, path.euler, 1e-7, `e at ${at}`);
			near(series.a_mps2[at]!, path.own, 1e-3, `a at ${at}`);
		}
	});

	test("level, tilt and lateral push of the person standing at the feet", () => {
		const theta = (((drop.feet as { angle_deg: number }).angle_deg - (deck.from_deg + deck.to_deg) / 2) / 180) * Math.PI;
		const along = deck.floor === "flat" ? deck.radius_m * Math.tan(theta) : 0;
		for (const [i, t] of series.t_s.entries()) {
			const [rate, rateDot] = spinAt(spin, start + t);
			const down = rate * rate * deck.radius_m + rateDot * along;
			const prograde = rate * rate * along - rateDot * deck.radius_m;
			near(
				[series.level_g[i]!, series.lateral_mps2[i]!],
				[Math.hypot(down, prograde) / G0, Math.abs(prograde)],
				1e-7,
				`level and push at ${t} s`,
			);
			const tilts = [series.tilt_prograde_deg[i]!, series.tilt_axial_deg[i]!];
			if (down === 0 && prograde === 0) expect([...tilts, series.head_tilt_deg[i]]).toEqual([null, null, null]);
			else near(tilts as number[], [Math.atan2(prograde, down) * DEG, 0], 1e-6, `tilt at ${t} s`);
		}
	});

	test("an adapted person reports nothing at the release; the illusion stays below twice the spin", () => {
		expect([series.ear_degps[0], series.illusion_degps[0]]).toEqual([0, 0]);
		const most = Math.max(...series.t_s.map((t) => spinAt(spin, start + t)[0])) * DEG;
		expect(Math.max(...series.illusion_degps)).toBeLessThanOrEqual(2 * most + 1e-9);
		if (most > 0 && series.eyes_degps.some((eyes) => eyes > 5)) expect(Math.max(...series.illusion_degps)).toBeGreaterThan(0.05 * most);
	});
});

test.each(shipped)("every built case of $file is sound", ({ text }) => {
	const built = documentOf(whole(parseLayout(text)), true).activities.filter((a) => a.series);
	expect(built.length).toBeGreaterThan(1);
	for (const { series } of built) if (series) sound(series, series.events.at(-1)?.t_s as number);
});

test("a spin profile changes the Euler part and the tilt; without one there is neither", () => {
	const { series: steady } = entryOf({}, {});
	const { series: changing } = entryOf({ spin: { rate_rpm: 3.6, profile: ramp } }, { start_s: 1 });
	expect(steady.e_mps2.flat().every((e) => e === 0)).toBe(true);
	expect(steady.tilt_prograde_deg.every((tilt) => tilt === 0)).toBe(true);
	// Slowing down, the floor falls behind: the plumb bob swings with the spin.
	expect(changing.e_mps2.every(([prograde]) => prograde > 0.1)).toBe(true);
	expect(changing.tilt_prograde_deg.every((tilt) => tilt !== null && tilt > 1)).toBe(true);
});

test("where nothing turns: tilts null with their reason, everything else finite, no illusion, level 0", () => {
	const { series, reasons } = entryOf({ spin: { rate_rpm: 0 } }, { from: from(1.4), release: toss });
	for (const key of TILTS) expect(reasons[key]).toMatch(/no weight/);
	for (const key of ["level_g", "lateral_mps2", "illusion_degps"] as const) expect(series[key].every((size) => size === 0)).toBe(true);
	expect(VECTORS.every((key) => series[key].flat().every((part) => part === 0))).toBe(true);
	expect(Math.max(...series.eyes_degps)).toBeGreaterThan(1);
});

test("a profile that ends at no spin: tilts null from there on only", () => {
	const profile = [ramp[0]!, { t_s: 0.4, rate_rpm: 0 }];
	const { series, reasons } = entryOf({ spin: { rate_rpm: 3.6, profile } }, { feet: feet(-0.7) });
	for (const key of TILTS) {
		expect(reasons[key]).toMatch(/no weight/);
		expect(series[key].map((tilt) => tilt === null)).toEqual(series.t_s.map((t) => t >= 0.4));
	}
});

test("the ear follows the eyes through the canals, where the head turns in one plane and nothing spins", () => {
	const straight = { speed_mps: 2, heading_deg: 0, elevation_deg: 10 };
	const { series } = entryOf({ spin: { rate_rpm: 0 } }, { from: { ...from(1.2), axial_m: 0.1 }, release: straight, feet: feet(-1) });
	const rate = series.eyes_degps;
	const [long, short] = [5.7, 0.005];
	const substeps = 200;
	const h = (series.t_s[1] as number) / substeps;
	let [washed, report] = [rate[0] as number, 0];
	const peak = Math.max(...rate);
	expect(peak).toBeGreaterThan(5);
	for (let i = 1; i < rate.length; i++) {
		for (let k = 0; k < substeps; k++) {
			const now = rate[i - 1]! + ((rate[i]! - rate[i - 1]!) * (k + 0.5)) / substeps;
			washed += (h / long) * (now - washed);
			report += (h / short) * (now - washed - report);
		}
		expect(Math.abs(series.ear_degps[i]! - Math.abs(report))).toBeLessThan(2e-3 * peak);
		expect(Math.abs(series.disagree_degps[i]! - Math.abs(rate[i]! - report))).toBeLessThan(2e-3 * peak);
	}
});

test("stars turn by the spin and the head where a window is in view, and are not seen where none is", () => {
	const pane = {
		id: "pane",
		kind: "window",
		deck: "lower",
		surface: "floor",
		angle_deg: 0.5,
		axial_m: 0.4,
		shape: "circle",
		diameter_m: 0.6,
	} as const;
	const drop = { from: from(1.5), feet: feet(-0.7) };
	const seen = entryOf({ elements: [pane] }, drop).series;
	expect(seen.stars_degps[0]).toBeCloseTo(21.6, 6);
	expect(Math.max(...seen.eyes_degps)).toBeGreaterThan(1);
	const viewed = seen.stars_degps.flatMap((stars, i) => (stars !== null ? [[stars, seen.eyes_degps[i] as number] as const] : []));
	expect(viewed.length).toBeGreaterThan(10);
	for (const [stars, eyes] of viewed) {
		expect(stars).toBeLessThanOrEqual(21.6 + eyes + 1e-6);
		expect(stars).toBeGreaterThanOrEqual(Math.abs(21.6 - eyes) - 1e-6);
	}
	for (const elements of [[], [{ ...pane, angle_deg: -8 }]]) {
		const { series, reasons } = entryOf({ elements }, drop);
		expect(series.stars_degps.every((stars) => stars === null)).toBe(true);
		expect(reasons.stars_degps).toMatch(/no window is in view/);
	}
	const { series, reasons } = entryOf({ spin: { rate_rpm: 0 }, elements: [pane] }, drop);
	expect(series.stars_degps[0]).toBe(0);
	expect(reasons.stars_degps === undefined).toBe(!series.stars_degps.includes(null));
});

test("level, tilt and lateral push are those below the release where the layout puts nobody's feet anywhere", () => {
	for (const [height, angle] of [
		[1.2, 66],
		[0.3, 47],
	] as const) {
		const { series } = entryOf({ decks: [flat] }, { from: from(height, angle) });
		const along = 24 * Math.tan((angle - 60) / DEG);
		const rate = 0.12 * Math.PI;
		near(
			[series.level_g[0]!, series.lateral_mps2[0]!],
			[(rate * rate * Math.hypot(24, along)) / G0, rate * rate * Math.abs(along)],
			1e-7,
			"level",
		);
		near([series.tilt_prograde_deg[0]!, series.tilt_axial_deg[0]!], [angle - 60, 0], 1e-6, "tilt");
	}
});

test("beyond a hatch the object's parts are along the axes of the deck it has come to", () => {
	const parts: LayoutParts = {
		decks: [deckFile({ floor: "flat", radius_m: 34, from_deg: -20, to_deg: 20 }), deckFile({ id: "upper", radius_m: 31, headroom_m: 2.3 })],
		elements: [{ ...well, angle_deg: 5 }],
	};
	const { series } = entryOf(parts, { from: { deck: "upper", angle_deg: 5.3, axial_m: 0.4, height_m: 1 } });
	const [, passes] = series.events;
	expect(passes!.name).toBe("passes well");
	const rate = 0.12 * Math.PI;
	let beyond = 0;
	for (const [i, t] of series.t_s.entries()) {
		const r = series.radius_m[i]!;
		const angle = series.angle_deg[i]! / DEG;
		const after = t >= passes!.t_s;
		if (after) beyond++;
		near(
			series.c_mps2[i]!,
			after ? [rate * rate * r * Math.sin(angle), -rate * rate * r * Math.cos(angle), 0] : [0, -rate * rate * r, 0],
			1e-7,
			`c at ${t} s`,
		);
	}
	expect(beyond).toBeGreaterThan(5);
	expect(series.t_s.length - beyond).toBeGreaterThan(5);
});

test("600 s without a strike: 4000 samples within 4 s of processor time", () => {
	const before = process.cpuUsage();
	const { series } = entryOf({}, { from: from(1.5), release: hanging });
	const used = process.cpuUsage(before);
	expect(series.t_s.length).toBe(4000);
	expect(series.t_s.at(-1)).toBe(600);
	expect((used.user + used.system) / 1e6).toBeLessThan(4);
});
