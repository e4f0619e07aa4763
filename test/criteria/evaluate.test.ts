import { describe, expect, it } from "vitest";
import { assess } from "../../src/assess.ts";
import { exitStatus } from "../../src/assessment.ts";
import type { CriterionRow, Finding } from "../../src/criteria/row.ts";
import { deckFile, dropFile, type LayoutParts, layoutOf } from "../support/layout-of.ts";
import { rowOf } from "./row-of.ts";

const found = (parts: LayoutParts, ...rows: CriterionRow[]): readonly Finding[] =>
	assess(layoutOf({ use: ["test-set"], activities: [], ...parts }), rows).findings;
const onDecks = (over: Partial<CriterionRow>): CriterionRow =>
	rowOf({ appliesTo: ["habitat"], exposure: "sustained", quantity: "floor_level_g", unit: "g", ...over });
const level = (rpm: number, radius: number): number => Number((((rpm * Math.PI) / 30) ** 2 * (radius / 9.80665)).toPrecision(9));

describe("rows on the habitat", () => {
	const decks = [deckFile(), deckFile({ id: "upper", radius_m: 31.2, from_deg: 10, to_deg: 50 })];

	it("are held on every deck in every phase, at the middle of its floor", () => {
		const findings = found({ decks, phases: [{ id: "slow", rate_rpm: 2.4 }] }, onDecks({ limit: 1 }));
		expect(findings.map((f) => [f.subject, f.phase, f.value, f.crew])).toEqual([
			["lower", "nominal", level(3.6, 34), null],
			["upper", "nominal", level(3.6, 31.2), null],
			["lower", "slow", level(2.4, 34), null],
			["upper", "slow", level(2.4, 31.2), null],
		]);
		expect(findings[1]!.at).toEqual({ deck: "upper", angle_deg: 30, axial_m: 0, height_m: 0 });
		expect(new Set(findings.map((f) => f.result))).toEqual(new Set(["within"]));
	});

	it.each([
		["at-most", 4, 4],
		["at-least", 4, 1],
	] as const)("on a profile take its worst point: %s", (comparison, limit, rpm) => {
		const profile = [3, 1, 4, 2].map((rate_rpm, i) => ({ t_s: 10 * i, rate_rpm }));
		const [finding] = found({ spin: { rate_rpm: 9, profile } }, onDecks({ quantity: "spin_rate_rpm", comparison, limit, unit: "rpm" }));
		expect(finding).toMatchObject({ phase: "nominal", value: rpm, result: rpm === 4 ? "within" : "outside" });
	});

	it.each([
		["spin_rate_rpm", 3.6],
		["rim_speed_mps", 0.12 * Math.PI * 34],
		["head_to_foot_percent", (100 * 1.9) / 34],
		["gradient_per_2m_percent", 200 / 34],
		["gradient_g_per_m", (0.12 * Math.PI) ** 2 / 9.80665],
	] as const)("%s", (quantity, value) => {
		const crew = [
			{ id: "short", stature_m: 1.5, mass_kg: 50 },
			{ id: "tall", stature_m: 1.9, mass_kg: 90 },
		];
		const [finding] = found({ crew }, onDecks({ quantity, limit: 100, unit: "" }));
		expect(finding!.value).toBeCloseTo(value, 7);
		expect(finding!.crew).toBe(quantity === "head_to_foot_percent" ? "tall" : null);
	});

	describe("on a flat floor", () => {
		const flat = deckFile({ floor: "flat", radius_m: 20, from_deg: -30, to_deg: 20 });
		const [middle, low] = [-5, -30];
		const held = (over: Partial<CriterionRow>, deck = flat) => found({ decks: [deck] }, onDecks(over))[0]!;
		const away = 20 / Math.cos((25 * Math.PI) / 180);

		it.each([
			["floor_level_g", "at-most", level(3.6, away), low],
			["floor_level_g", "at-least", level(3.6, 20), middle],
			["rim_speed_mps", "at-most", 0.12 * Math.PI * away, low],
			["rim_speed_mps", "at-least", 0.12 * Math.PI * 20, middle],
			["head_to_foot_percent", "at-most", 175 / 20, middle],
			["head_to_foot_percent", "at-least", 175 / away, low],
			["gradient_per_2m_percent", "at-least", 200 / away, low],
			["spin_rate_rpm", "at-most", 3.6, middle],
			["gradient_g_per_m", "at-least", (0.12 * Math.PI) ** 2 / 9.80665, middle],
		] as const)("%s %s is held at the middle and both ends, the worst told: %d", (quantity, comparison, value, angle_deg) => {
			const finding = held({ quantity, comparison, limit: 1, unit: "" });
			expect(finding.value).toBeCloseTo(value, 7);
			expect(finding.at).toMatchObject({ angle_deg });
		});

		it("decides there: within at the middle, outside at the ends", () => {
			const limit = (level(3.6, 20) + level(3.6, away)) / 2;
			expect(held({ limit })).toMatchObject({ result: "outside" });
			expect(held({ limit }, deckFile({ radius_m: 20, from_deg: -30, to_deg: 20 }))).toMatchObject({ result: "within" });
		});
	});

	it("name an unknown quantity though every object has one of that name", () => {
		for (const appliesTo of [["habitat"], ["drop"]])
			expect(found({ activities: [dropFile()] }, rowOf({ appliesTo, quantity: "constructor" }))[0]).toMatchObject({
				result: "not-assessed",
				reason: expect.stringContaining('"constructor" is not a quantity'),
			});
	});

	it("say why where there is nothing to hold", () => {
		expect(found({}, onDecks({ quantity: "warmth" }))[0]).toMatchObject({
			result: "not-assessed",
			reason: expect.stringContaining("warmth"),
		});
		expect(found({ crew: [] }, onDecks({ quantity: "head_to_foot_percent" }))[0]).toMatchObject({
			result: "not-assessed",
			reason: "the layout has no crew",
		});
	});

	it("do not hold a transient limit against a standing value", () => {
		expect(found({}, onDecks({ exposure: "transient" }))[0]).toMatchObject({
			result: "not-assessed",
			reason: "a sustained value against a transient limit",
		});
	});
});

describe("rows on activities", () => {
	const crew = [
		{ id: "one", stature_m: 1.9, mass_kg: 90 },
		{ id: "two", stature_m: 1.5, mass_kg: 50 },
	];
	const drop = dropFile({
		crew: ["one", "two"],
		phase: ["nominal", "slow"],
		from: { deck: "lower", angle_deg: 350, axial_m: 0.25, height_m: 1.5 },
	});
	const parts: LayoutParts = { crew, phases: [{ id: "slow", rate_rpm: 2.4 }], activities: [drop] };

	it("are held against each case of the kind, at the instant and place of the strike", () => {
		const findings = found(parts, rowOf());
		expect(findings.map((f) => [f.crew, f.phase])).toEqual([
			["one", "nominal"],
			["one", "slow"],
			["two", "nominal"],
			["two", "slow"],
		]);
		const { at, value } = findings[0]!;
		expect(at).toMatchObject({ deck: "lower", axial_m: 0.25, height_m: 0 });
		const phi = Math.acos(32.5 / 34);
		expect(at.t_s).toBeCloseTo(Math.tan(phi) / (0.12 * Math.PI), 7);
		expect(at.angle_deg).toBeCloseTo(-10 - ((Math.tan(phi) - phi) * 180) / Math.PI, 6);
		const [v, w] = [0.12 * Math.PI * 32.5 * Math.sin(phi), 0.12 * Math.PI * (34 - 32.5 * Math.cos(phi))];
		expect(value).toBeCloseTo(0.2 * (v * v + w * w), 7);
	});

	it("of a kind that is not built, and on elements, say so", () => {
		const walk = { id: "w", kind: "walk", crew: "one", deck: "lower", angle_deg: 0, axial_m: 0, heading_deg: 0, speed_mps: 1 } as const;
		const hatch = { id: "h", kind: "hatch", deck: "lower", angle_deg: 90, axial_m: 0, shape: "circle", diameter_m: 1 } as const;
		const findings = found(
			{ crew, activities: [walk], elements: [hatch] },
			rowOf({ appliesTo: ["walk", "hatch", "drop"], quantity: "froude" }),
		);
		expect(findings.map((f) => [f.subject, f.result, f.reason])).toEqual([
			["w", "not-assessed", "not built"],
			["h", "not-assessed", "not built"],
		]);
	});

	it("say why where the quantity has no value, is no number or is none of the kind", () => {
		const up = { ...drop, crew: "one", phase: "nominal", release: { speed_mps: 20, heading_deg: 90, elevation_deg: 0 } };
		const reasons = ["landing_axial_m", "struck", "warmth"].map(
			(quantity) => found({ ...parts, activities: [up] }, rowOf({ quantity }))[0]!.reason,
		);
		expect(reasons).toEqual([
			"an end bulkhead has no axial direction of its own",
			'"struck" is not a number',
			'"warmth" is not a quantity of a drop',
		]);
	});

	it("do not hold a sustained limit against what passes", () => {
		expect(found(parts, rowOf({ exposure: "sustained" }))[0]).toMatchObject({ result: "not-assessed", margin: null });
	});
});

it("a set that no row belongs to is reported, not dropped", () => {
	const findings = found({ use: ["test-set", "grip"] }, onDecks({ limit: 1 }));
	expect(findings.map((f) => [f.criterion, f.result])).toEqual([
		["row", "within"],
		["grip", "not-assessed"],
	]);
});

it("a tailored limit that belongs to no row is reported, not dropped", () => {
	const findings = found({ tailor: [{ criterion: "rowe", limit: 1, reason: "A slip." }] }, onDecks({ limit: 1 }));
	expect(findings.slice(1)).toMatchObject([
		{ criterion: "rowe", force: "information", subject: "layout", value: null, result: "not-assessed", reason: "no criterion has this id" },
	]);
});

it("a limit of the layout's own is held in its own unit", () => {
	const own = {
		id: "slow",
		title: "Comes down slowly",
		applies_to: "drop",
		quantity: "landing_speed_mps",
		comparison: "at-most",
		limit: 10,
		unit: "km/h",
		force: "shall",
		basis: "common-practice",
		source: "",
		note: "",
	} as const;
	const of = (unit: string) => found({ own: [{ ...own, unit }], activities: [dropFile()] })[0]!;
	const speed = of("m/s");
	expect(speed.result).toBe("within");
	expect(of("km/h")).toMatchObject({ value: expect.closeTo((speed.value as number) * 3.6, 6), unit: "km/h", limit: 10, result: "outside" });
	expect(of("kg")).toMatchObject({ result: "not-assessed", reason: "the limit is in kg, the quantity in m/s" });
});

describe("exit status", () => {
	const status = (...rows: CriterionRow[]): number => exitStatus(assess(layoutOf({ use: ["test-set"], activities: [dropFile()] }), rows));
	it.each([
		[0, "everything within", [rowOf({ limit: 100 })]],
		[1, "something outside", [rowOf({ limit: 100 }), rowOf({ limit: 0.1 })]],
		[1, "something outside an unverified limit", [rowOf({ limit: 0.1, basis: "unverified" })]],
		[1, "something outside and something not assessed", [rowOf({ limit: 0.1 }), rowOf({ quantity: "warmth" })]],
		[1, "only information outside", [rowOf({ limit: 0.1, force: "information" })]],
		[3, "something not assessed", [rowOf({ limit: 100 }), rowOf({ quantity: "warmth" })]],
		[3, "a limit that is unverified", [rowOf({ limit: 100, basis: "unverified" })]],
	] as const)("%i: %s", (expected, _, rows) => {
		expect(status(...rows)).toBe(expected);
	});
	it("0: nothing to hold", () => {
		expect(exitStatus(assess(layoutOf({ activities: [dropFile()] }), []))).toBe(0);
	});
	it("3: a set without rows", () => {
		expect(status()).toBe(3);
	});
	it("3: an activity of a kind that is not built", () => {
		const walk = { id: "w", kind: "walk", crew: "one", deck: "lower", angle_deg: 0, axial_m: 0, heading_deg: 0, speed_mps: 1 } as const;
		expect(exitStatus(assess(layoutOf({ activities: [walk] }), []))).toBe(3);
	});
});
