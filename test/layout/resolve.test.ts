import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { parseLayout } from "../../src/layout/parse.ts";
import { cases, resolveHabitat, spinOf } from "../../src/layout/resolve.ts";
import { changed, larkspurText, whole } from "./support.ts";

const deg = Math.PI / 180;
const larkspur = whole(parseLayout(larkspurText));
const habitat = resolveHabitat(larkspur);
const twin = readFileSync("assets/layout/twin-arm.layout.json", "utf8");
const ring = readFileSync("assets/layout/great-ring.layout.json", "utf8");

describe("the demo in SI and radians", () => {
	test("decks", () => {
		expect(habitat.decks[0]).toMatchObject({
			index: 0,
			id: "lower",
			name: "Cargo deck",
			floor: "curved",
			radius: 34,
			headroom: 2.4,
			middle: 0,
			closed: false,
			axialFrom: -3,
			axialTo: 3,
		});
		expect(habitat.decks[0]?.from).toBeCloseTo(-15 * deg, 14);
		expect(habitat.decks[0]?.walkways).toEqual([{ id: "spine", from: -15 * deg, to: 15 * deg, axialFrom: -0.5, axialTo: 0.5 }]);
	});
	test("elements", () => {
		expect(habitat.ladders).toEqual([
			{
				id: "ladder-a",
				deck: 0,
				angle: 4 * deg,
				axial: 0.8,
				footRadius: 34,
				headRadius: 30.1,
				facing: 0,
				width: 0.45,
				rungSpacing: 0.3,
				toeClearance: 0.2,
				traffic: "both",
				solid: false,
			},
		]);
		expect(habitat.hatches).toEqual([
			{ id: "hatch-a", deck: 1, below: 0, angle: 4 * deg, axial: 0.8, shape: "rectangle", along: 0.9, across: 0.9, solid: false },
		]);
		expect(habitat.windows).toMatchObject([
			{ id: "window-a", deck: 0, surface: "floor", axial: -1, height: 0, shape: "circle", along: 0.6, across: 0.6 },
			{ id: "window-b", deck: 0, surface: "end-high", axial: 3, height: 1.4, shape: "rectangle", along: 1.1, across: 0.7 },
		]);
		expect(habitat.workstations).toMatchObject([{ id: "desk-a", deck: 0, axial: 1.8, facing: Math.PI / 2 }]);
	});
	test("air and sky", () => {
		expect(habitat.air).toEqual({ pressure: 70_300, temperature: 294.15, oxygenFraction: 0.265 });
		expect(habitat.sky.axisDeclination).toBeCloseTo(66.56 * deg, 14);
	});
});

describe("hatches", () => {
	const below = (damage: Parameters<typeof changed>[0], text?: string) => resolveHabitat(changed(damage, text)).hatches[0]?.below;
	const deck = (id: string, radius_m: number, more: object = {}) => ({
		id,
		name: id,
		floor: "curved",
		radius_m,
		from_deg: -15,
		to_deg: 15,
		from_m: -3,
		to_m: 3,
		headroom_m: 2,
		...more,
	});
	test("open outside where no deck lies outward", () => {
		expect(below((l) => Object.assign(l.elements[1], { deck: "lower" }))).toBeNull();
	});
	test("lead to the nearest deck outward, in whatever order the file has them", () => {
		expect(below((l) => l.habitat.decks.unshift(deck("cellar", 37)))).toBe(1);
		expect(below((l) => l.habitat.decks.push(deck("between", 33)))).toBe(2);
	});
	test("pass decks that do not lie under the hatch's centre", () => {
		expect(below((l) => l.habitat.decks.push(deck("aside", 33, { to_deg: 3.9 })))).toBe(0);
		expect(below((l) => l.habitat.decks.push(deck("along", 33, { to_m: 0.7 })))).toBe(0);
		expect(below((l) => l.habitat.decks.push(deck("turned", 33, { from_deg: 350, to_deg: 370 })))).toBe(2);
	});
	test("in a flat bay lead to the flat deck below", () => expect(below(() => {}, twin)).toBe(0));
	test("above a closed bay lead to it", () => expect(below(() => {}, ring)).toBe(0));
});

describe("angles equal modulo 360° are the same place", () => {
	test("and come out near the deck's middle", () => {
		const turned = resolveHabitat(
			changed((l) => {
				l.elements[0].angle_deg += 360;
				l.elements[1].angle_deg -= 720;
				l.elements[2].angle_deg += 360;
				l.elements[4].angle_deg += 3600;
				Object.assign(l.habitat.decks[0].walkways[0], { from_deg: 345, to_deg: 375 });
			}),
		);
		const close = (a: number | undefined, b: number): void => expect(a).toBeCloseTo(b, 12);
		close(turned.ladders[0]?.angle, 4 * deg);
		close(turned.hatches[0]?.angle, 4 * deg);
		close(turned.windows[0]?.angle, -6 * deg);
		close(turned.workstations[0]?.angle, -9 * deg);
		close(turned.decks[0]?.walkways[0]?.from, -15 * deg);
		close(turned.decks[0]?.walkways[0]?.to, 15 * deg);
	});
	test("about a middle of 180° too", () => {
		const h = resolveHabitat(changed((l) => Object.assign(l.elements[5], { angle_deg: -175.5 }), twin));
		expect(h.workstations[0]?.angle).toBeCloseTo(184.5 * deg, 12);
	});
});

test("a bay of a whole turn is closed", () => {
	expect(resolveHabitat(changed(() => {}, ring)).decks.map((d) => d.closed)).toEqual([true, false]);
});

test("windows of ceilings and sides lie on them", () => {
	const windows = resolveHabitat(
		changed((l) => {
			const window = { kind: "window", deck: "upper", shape: "circle", diameter_m: 0.5 };
			l.elements.push({ ...window, id: "c", surface: "ceiling", angle_deg: 2, axial_m: 1 });
			l.elements.push({ ...window, id: "lo", surface: "side-low", axial_m: 1, height_m: 1 });
			l.elements.push({ ...window, id: "hi", surface: "side-high", axial_m: 1, height_m: 1 });
			l.elements.push({ ...window, id: "end", surface: "end-low", angle_deg: 2, height_m: 1 });
		}),
	).windows.slice(2);
	expect(windows.map((w) => [w.id, w.height, w.axial])).toEqual([
		["c", 2.3, 1],
		["lo", 1, 1],
		["hi", 1, 1],
		["end", 1, -3],
	]);
	expect(windows[1]?.angle).toBeCloseTo(-15 * deg, 14);
	expect(windows[2]?.angle).toBeCloseTo(15 * deg, 14);
});

describe("cases", () => {
	test("are every activity by every crew member named in every phase named, in the file's order", () => {
		expect(cases(larkspur).map((c) => `${c.activity.id} ${c.crew.id} ${c.phase}`)).toEqual([
			"drop-driver tall nominal",
			"toss-pouch tall nominal",
			"walk-against tall nominal",
			"climb-a tall nominal",
			"climb-a tall reduced",
			"climb-a short nominal",
			"climb-a short reduced",
			"stand-up tall nominal",
			"reach-panel tall nominal",
			"look-left tall nominal",
			"look-down tall nominal",
			"spin-down tall nominal",
		]);
	});
});

describe("spin", () => {
	const rpm = Math.PI / 30;
	test("of the phases", () => {
		expect(spinOf(larkspur, "nominal").rate(5)).toBeCloseTo(3.6 * rpm, 14);
		expect(spinOf(larkspur, "reduced").rate(5)).toBeCloseTo(2.4 * rpm, 14);
		expect(() => spinOf(larkspur, "other")).toThrow('no phase has the id "other"');
	});
	test("of a profile from where the activity begins; other phases stay constant", () => {
		const profiled = changed((l) => {
			l.habitat.spin.profile = [
				{ t_s: 10, rate_rpm: 3 },
				{ t_s: 20, rate_rpm: 1 },
			];
			l.activities.pop();
		});
		expect(spinOf(profiled, "nominal").rate(0)).toBeCloseTo(3 * rpm, 14);
		expect(spinOf(profiled, "nominal", 15).rate(0)).toBeCloseTo(2 * rpm, 14);
		expect(spinOf(profiled, "nominal", 15).rate(100)).toBeCloseTo(rpm, 14);
		expect(spinOf(profiled, "nominal", 15).angle(0)).toBe(0);
		expect(spinOf(profiled, "reduced", 15).constant).toBe(true);
	});
});
